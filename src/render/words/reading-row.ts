import type { Question } from '../../../grammar/question.ts';
import type { NoInterval, Reading } from '../../report/reading.ts';
import type { Report } from '../../report/report.ts';
import { alarmRangePart, alarmReadingNames } from './alarm-rows.ts';
import { estimateText, levelText, limitsText, workingText } from './interval-text.ts';
import { cases, plainLabel } from './labels.ts';
import { amount, beside, fixed } from './numbers.ts';
import { perExposure } from './rate-words.ts';
import { formulaOf } from './reading-formulas.ts';
import { methodOf } from './reading-methods.ts';
import { layerName } from './strata-words.ts';
import type { ReadingRow } from './telling.ts';

/** One reading in words: its name, its value with its interval, and how it was worked out. */
export function readingRow(report: Report, reading: Reading): ReadingRow {
  const { question } = report;
  return {
    reading,
    name: nameOf(question, reading, isFewer(report, reading)),
    value: valueOf(question, reading),
    formula: formulaOf(question, reading),
    long: workingText(reading),
    method: methodOf(reading),
  };
}

function nameOf(question: Question, reading: Reading, fewer: boolean): string {
  const group = plainLabel(question, reading.of);
  const against = reading.rest
    ? ' against the rest'
    : reading.against === null
      ? ''
      : ` against ${plainLabel(question, reading.against)}`;
  const within =
    reading.layer === null || question.kind !== 'strata' ? '' : ` in ${layerName(question, reading.layer)}`;
  switch (reading.id) {
    case 'risk':
      return question.kind === 'stated' ? `As stated, ${group}` : `Risk, ${group}`;
    case 'case-share':
      return `Share of ${cases(question)}, ${group}`;
    case 'population-share':
      return `Coverage, ${group}`;
    case 'risk-ratio':
      return `Risk ratio${within}, ${group}${against}`;
    case 'relative-change':
      return `Relative change, ${group}${against}`;
    case 'risk-difference':
      return `Risk difference, ${group}${against}`;
    case 'odds-ratio':
      return `Odds ratio, ${group}${against}`;
    case 'extra-cases':
      return `Extra ${cases(question)} per ${fixed(reading.per ?? 0, 0)}, ${group}${against}`;
    case 'one-extra-per':
      return `One ${fewer ? 'case fewer' : 'extra case'} for every K, ${group}${against}`;
    case 'break-even-coverage':
      return `Break-even coverage, ${group}`;
    case 'attributable-fraction':
      return `Fraction of the ${cases(question)} above the rate of ${plainLabel(question, reading.against ?? 0)}, ${group}`;
    case 'prevented-fraction':
      return `Fraction below the rate of ${plainLabel(question, reading.against ?? 0)}, ${group}`;
    case 'population-attributable-fraction':
      return `Fraction of all ${cases(question)} above the rate of ${plainLabel(question, reading.against ?? 0)}`;
    case 'rate':
      return `Rate, ${group}`;
    case 'rate-ratio':
      return `Rate ratio${within}, ${group}${against}`;
    case 'crude-risk-ratio':
      return `Risk ratio all together, ${group}${against}`;
    case 'crude-rate-ratio':
      return `Rate ratio all together, ${group}${against}`;
    case 'pooled-risk-ratio':
      return `Pooled risk ratio, ${group}${against}`;
    case 'pooled-rate-ratio':
      return `Pooled rate ratio, ${group}${against}`;
    case 'pooled-risk-difference':
      return `Pooled risk difference, ${group}${against}`;
    case 'pooled-rate-difference':
      return `Pooled rate difference, ${group}${against}`;
    case 'pooled-odds-ratio':
      return `Pooled odds ratio, ${group}${against}`;
    case 'standardised-rate':
      return `Standardised rate, ${group}`;
    case 'standardised-risk-ratio':
      return `Standardised risk ratio, ${group}${against}`;
    case 'overall-difference':
      return 'Do the groups differ at all? (p value)';
    case 'homogeneity':
      return `Are the layers alike? (p value), ${group}${against}`;
    case 'rate-difference':
      return `Rate difference, ${group}${against}`;
    case 'count-ratio':
      return `Ratio of the counts, ${group}${against}`;
    case 'percentage-ratio':
      return `Ratio as stated, ${group}${against}`;
    case 'percentage-difference':
      return `Difference as stated, ${group}${against}`;
    case 'hidden-cause-strength':
      return `Hidden-cause strength, ${group}${against}`;
    case 'sensitivity':
    case 'specificity':
    case 'prevalence':
    case 'positive-predictive-value':
    case 'negative-predictive-value':
    case 'likelihood-ratio-positive':
    case 'likelihood-ratio-negative':
      return alarmReadingNames[reading.id];
  }
}

/** Whether the difference behind a reading is below 0. */
const isFewer = ({ readings }: Report, { of }: Reading) =>
  (readings.find((each) => (each.id === 'risk-difference' || each.id === 'rate-difference') && each.of === of)
    ?.estimate ?? 0) < 0;

function valueOf(question: Question, reading: Reading): string {
  const plain = estimateText(reading, 'full') ?? (reading.unbounded ? 'no upper end' : 'no value');
  const estimate = `${plain}${unitOf(question, reading)}`;
  const parts = [
    intervalPart(reading),
    atOncePart(reading),
    exactPart(reading),
    question.kind === 'alarm' ? alarmRangePart(question, reading) : roundingPart(question, reading),
    limitPart(reading),
  ].filter((part) => part !== null);
  return parts.length === 0 ? estimate : `${estimate} (${parts.join('; ')})`;
}

/** What a rate, and one case for every K of exposure, are counted in. */
function unitOf(question: Question, { id, per }: Reading): string {
  if (id === 'pooled-rate-difference' || id === 'standardised-rate')
    return ` ${perExposure(question, per ?? 1)}`;
  if (question.kind !== 'rates') return '';
  if (id === 'rate' || id === 'rate-difference') return ` ${perExposure(question, per ?? 1)}`;
  return id === 'one-extra-per' && question.unit !== null ? ` ${question.unit}` : '';
}

function intervalPart(reading: Reading): string | null {
  if (reading.interval !== null) {
    return `${levelText(reading.interval.level)} interval ${limitsText(reading, reading.interval, 'full')}`;
  }
  if (reading.id === 'one-extra-per' && reading.ranges !== null) return rangesText(reading);
  return reading.whyNoInterval === null ? null : whyText(reading.whyNoInterval);
}

function rangesText({ ranges }: Reading): string {
  const from = (low: number | null) => (low === null ? 'any number' : `every ${amount(low, 'full')} or more`);
  const more = ranges?.more == null ? [] : [`one extra for ${from(ranges.more.low)}`];
  const fewer = ranges?.fewer == null ? [] : [`one fewer for ${from(ranges.fewer.low)}`];
  return [...more, ...fewer].join(', or ');
}

/** Why a reading has no interval, in words. */
export function whyText(why: NoInterval): string {
  switch (why) {
    case 'no-counts':
      return 'no interval: percentages without counts';
    case 'no-totals':
      return 'no interval: counts without totals';
    case 'no-case-number':
      return 'no interval: the number of cases is not given';
    case 'given':
      return 'as given, taken as exact';
    case 'range-given':
      return 'the middle of the range given';
    case 'mean-of-growth':
      return 'the mean of its two ends';
    case 'mean-over-cases':
      return 'the mean over all cases';
    case 'range':
      return 'given as a range';
    case 'no-exact-form':
      return 'no exact interval of this reading; leave out `exact` for the score interval';
    case 'too-large-for-exact':
      return 'no exact interval: too many cases to go through one by one; leave out `exact`';
    case 'no-cases-at-all':
      return 'no interval: a standardised risk is 0';
    case 'spans-none':
      return 'the interval of the difference includes none';
    case 'counts-rows-only':
      return 'no interval of its own: with `population` every interval comes from the counts';
  }
}

function atOncePart(reading: Reading): string | null {
  if (reading.atOnce === null) return null;
  return `for all ${reading.atOnce.pairs} pairs at once ${limitsText(reading, reading.atOnce, 'full')}`;
}

function exactPart(reading: Reading): string | null {
  return reading.exactBeside === null
    ? null
    : `exact limits ${limitsText(reading, reading.exactBeside, 'full')}`;
}

function roundingPart(question: Question, reading: Reading): string | null {
  if (reading.roundingRange === null) return null;
  const limits = limitsText(reading, reading.roundingRange, 'full');
  const isRange = question.kind === 'shares' && question.groups.some(({ known }) => known.kind === 'range');
  if (reading.id === 'population-share' && reading.whyNoInterval !== 'given') return `from ${limits}`;
  return isRange && reading.id !== 'case-share'
    ? `the range alone allows ${limits}`
    : `rounding alone allows ${limits}`;
}

function limitPart(reading: Reading): string | null {
  return reading.atLimit === null
    ? null
    : `at the limit nearer to no difference ${beside(reading.atLimit, 0, 'full')}`;
}
