import type { Question } from '../../../grammar/question.ts';
import type { IntervalMethod, NoInterval, Reading, ReadingInterval } from '../../report/reading.ts';
import type { Report } from '../../report/report.ts';
import { alarmFormula, alarmMethod, alarmRangePart, alarmReadingNames } from './alarm-rows.ts';
import { estimateText, levelText, limitsText, workingText } from './interval-text.ts';
import { cases, plainLabel } from './labels.ts';
import { amount, beside, fixed } from './numbers.ts';
import { quantityText } from './read-as.ts';
import type { ReadingRow } from './telling.ts';

/** One reading in words: its name, its value with its interval, and how it was worked out. */
export function readingRow(report: Report, reading: Reading): ReadingRow {
  const { question } = report;
  return {
    reading,
    name: nameOf(question, reading, isFewer(report, reading)),
    value: valueOf(
      reading,
      question.kind === 'alarm' ? alarmRangePart(question, reading) : roundingPart(reading),
    ),
    formula: formulaOf(question, reading),
    long: workingText(reading),
    method: methodOf(reading),
  };
}

function nameOf(question: Question, reading: Reading, fewer: boolean): string {
  const group = plainLabel(question, reading.of);
  const against = reading.against === null ? '' : ` against ${plainLabel(question, reading.against)}`;
  switch (reading.id) {
    case 'risk':
      return question.kind === 'stated' ? `As stated, ${group}` : `Risk, ${group}`;
    case 'case-share':
      return `Share of ${cases(question)}, ${group}`;
    case 'population-share':
      return `Coverage, ${group}`;
    case 'risk-ratio':
      return `Risk ratio, ${group}${against}`;
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
      return `Fraction of the ${cases(question)} of ${group} above the rate of ${plainLabel(question, reading.against ?? 0)}`;
    case 'prevented-fraction':
      return `Fraction below the rate of ${plainLabel(question, reading.against ?? 0)}, ${group}`;
    case 'population-attributable-fraction':
      return `Fraction of all ${cases(question)} above the rate of ${plainLabel(question, reading.against ?? 0)}`;
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
  (readings.find((each) => each.id === 'risk-difference' && each.of === of)?.estimate ?? 0) < 0;

function valueOf(reading: Reading, allowed: string | null): string {
  const estimate = estimateText(reading, 'full') ?? (reading.unbounded ? 'no upper end' : 'no value');
  const parts = [intervalPart(reading), exactPart(reading), allowed, limitPart(reading)].filter(
    (part) => part !== null,
  );
  return parts.length === 0 ? estimate : `${estimate} (${parts.join('; ')})`;
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
    case 'range':
      return 'given as a range';
    case 'no-exact-form':
      return 'no exact interval of this reading; leave out `exact` for the score interval';
    case 'spans-none':
      return 'the interval of the difference includes none';
    case 'counts-rows-only':
      return 'no interval of its own: with `population` every interval comes from the counts';
  }
}

function exactPart(reading: Reading): string | null {
  return reading.exactBeside === null
    ? null
    : `exact limits ${limitsText(reading, reading.exactBeside, 'full')}`;
}

function roundingPart(reading: Reading): string | null {
  return reading.roundingRange === null
    ? null
    : `rounding alone allows ${limitsText(reading, reading.roundingRange, 'full')}`;
}

function limitPart(reading: Reading): string | null {
  return reading.atLimit === null
    ? null
    : `at the limit nearer to no difference ${beside(reading.atLimit, 0, 'full')}`;
}

/** The formula with the typed numbers in it. */
function formulaOf(question: Question, reading: Reading): string {
  const own = parts(question, reading.of);
  const other = reading.against === null ? null : parts(question, reading.against);
  const pair = other === null ? '' : `${own.risk} / (${other.risk})`;
  switch (reading.id) {
    case 'risk':
      return own.risk;
    case 'case-share':
    case 'break-even-coverage':
      return own.share;
    case 'population-share':
      return own.coverage;
    case 'risk-ratio':
      return question.kind === 'shares'
        ? `${own.share} / (${other?.share ?? ''}) x ${other?.coverage ?? ''} / ${own.coverage}`
        : pair;
    case 'count-ratio':
    case 'percentage-ratio':
      return pair;
    case 'relative-change':
      return 'ratio - 1';
    case 'risk-difference':
    case 'percentage-difference':
      return `${own.risk} - ${other?.risk ?? ''}`;
    case 'odds-ratio':
      return `${own.odds} / (${other?.odds ?? ''})`;
    case 'extra-cases':
      return `${fixed(reading.per ?? 0, 0)} x the difference`;
    case 'one-extra-per':
      return '1 / the difference';
    case 'attributable-fraction':
      return '1 - 1/ratio';
    case 'prevented-fraction':
      return '1 - ratio';
    case 'population-attributable-fraction':
      return 'c(ratio - 1) / (1 + c(ratio - 1)), c the coverage';
    case 'hidden-cause-strength':
      return 'ratio + root(ratio (ratio - 1)), the ratio inverted first if below 1';
    case 'sensitivity':
    case 'specificity':
    case 'prevalence':
    case 'positive-predictive-value':
    case 'negative-predictive-value':
    case 'likelihood-ratio-positive':
    case 'likelihood-ratio-negative':
      return alarmFormula(question, reading.id);
  }
}

interface FormulaParts {
  readonly risk: string;
  readonly share: string;
  readonly coverage: string;
  readonly odds: string;
}

function parts(question: Question, index: number): FormulaParts {
  const empty = { risk: '', share: '', coverage: '', odds: '' };
  switch (question.kind) {
    case 'counts': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      const [x, n] = [quantityText(group.cases), quantityText(group.total)];
      return { ...empty, risk: `${x}/${n}`, odds: `${x}/${fixed(group.total.value - group.cases.value, 0)}` };
    }
    case 'shares': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      const coverage = group.coverageImplied
        ? `(1 - ${restOf(question, index)})`
        : quantityText(group.coverage);
      const share =
        group.cases === null
          ? quantityText(group.caseShare)
          : `${quantityText(group.cases)}/${question.totalCases === null ? '' : quantityText(question.totalCases)}`;
      return {
        ...empty,
        share,
        coverage,
        risk:
          group.cases === null
            ? share
            : `${quantityText(group.cases)}/(${coverage} x ${population(question)})`,
      };
    }
    case 'stated': {
      const group = question.groups[index];
      return { ...empty, risk: group === undefined ? '' : group.share.text };
    }
    case 'alarm':
      return empty;
    case 'bare-counts': {
      const group = question.groups[index];
      return { ...empty, risk: group === undefined ? '' : quantityText(group.cases) };
    }
  }
}

const population = (question: Question) =>
  question.clauses.population === null ? '' : quantityText(question.clauses.population);

function restOf(question: Question, index: number): string {
  if (question.kind !== 'shares') return '';
  return question.groups
    .filter((_, other) => other !== index)
    .map(({ coverage }) => quantityText(coverage))
    .join(' - ');
}

const sources = {
  wilson: 'Wilson score (Wilson 1927)',
  'clopper-pearson': 'exact (Clopper & Pearson 1934)',
  'miettinen-nurminen': 'Miettinen-Nurminen score (1985)',
  'conditional-exact': 'exact conditional (Cornfield 1956)',
  'wilson-share-odds': 'Wilson limits of the share of cases, through its odds (Orenstein 1985; Wilson 1927)',
  'clopper-pearson-share-odds':
    'exact limits of the share of cases, through its odds (Orenstein 1985; Clopper & Pearson 1934)',
  'miettinen-nurminen-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985), through the odds of the prevalence (Bayes)',
  'mover-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985) and Wilson limits of the prevalence, combined on logs (Zou & Donner 2008)',
} satisfies Record<IntervalMethod, string>;

/** The name of an interval's method, with its source. */
function methodOf(reading: Reading): string {
  if (reading.id === 'hidden-cause-strength') return 'VanderWeele & Ding 2017';
  if (reading.interval === null) return alarmMethod(reading.id);
  return methodText(reading.interval);
}

export function methodText({ method, envelope }: ReadingInterval): string {
  return envelope ? `${sources[method]}, outermost limits over the range given` : sources[method];
}
