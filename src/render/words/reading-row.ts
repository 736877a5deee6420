import type { Question } from '../../../grammar/question.ts';
import type { IntervalMethod, NoInterval, Reading, ReadingInterval } from '../../report/reading.ts';
import type { Report } from '../../report/report.ts';
import { coverageFormula } from './coverage-formulas.ts';
import { alarmFormula, alarmMethod, alarmRangePart, alarmReadingNames } from './alarm-rows.ts';
import { estimateText, levelText, limitsText, workingText } from './interval-text.ts';
import { cases, plainLabel } from './labels.ts';
import { amount, beside, fixed } from './numbers.ts';
import { perExposure } from './rate-words.ts';
import { quantityText } from './read-as.ts';
import { layerName, summed } from './strata-words.ts';
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

/** The formula with the typed numbers in it. */
function formulaOf(asked: Question, reading: Reading): string {
  const question =
    reading.layer === null || asked.kind !== 'strata'
      ? asked
      : (asked.layers[reading.layer]?.question ?? asked);
  const own = parts(question, reading.of);
  const other = reading.against === null ? null : parts(question, reading.against);
  const pair = reading.rest
    ? `${own.risk} / (all the others together)`
    : other === null
      ? ''
      : `${own.risk} / (${other.risk})`;
  const special = coverageFormula(question, reading);
  if (special !== null) return special;
  switch (reading.id) {
    case 'risk':
    case 'rate':
      return own.risk;
    case 'case-share':
    case 'break-even-coverage':
      return own.share;
    case 'population-share':
      return own.coverage;
    case 'risk-ratio':
      if (reading.rest && question.kind === 'shares')
        return `${own.share} against all the others together, with ${own.coverage}`;
      return question.kind === 'shares'
        ? `${own.share} / (${other?.share ?? ''}) x ${other?.coverage ?? ''} / ${own.coverage}`
        : pair;
    case 'count-ratio':
    case 'percentage-ratio':
    case 'rate-ratio':
      return pair;
    case 'crude-risk-ratio':
    case 'crude-rate-ratio':
      return asked.kind === 'strata'
        ? `the sums: ${summed(asked, reading.of)}; ${summed(asked, reading.against ?? 0)}`
        : '';
    case 'pooled-risk-ratio':
      return asked.kind === 'strata' && asked.layers[0]?.question.kind === 'shares'
        ? 'the root t of sum(x1 - n t o/(1 + t o)), o the odds of coverage'
        : 'sum(x1 n2/N) / sum(x2 n1/N)';
    case 'pooled-rate-ratio':
      return 'the root t of sum(x1 - n t o/(1 + t o)), o = T1/T2';
    case 'pooled-risk-difference':
      return 'sum(x1 n2/N - x2 n1/N) / sum(n1 n2/N)';
    case 'pooled-rate-difference':
      return 'sum(x1 T2/T - x2 T1/T) / sum(T1 T2/T)';
    case 'pooled-odds-ratio':
      return 'the root t of sum(x1 - E(x1; t)), E given the margins';
    case 'standardised-rate':
      return 'sum(w x/T) / sum(w), w the exposure of all groups in the layer';
    case 'standardised-risk-ratio':
      return 'sum(N p1) / sum(N p2), N both groups of the layer';
    case 'overall-difference':
    case 'homogeneity':
      return reading.test === null
        ? ''
        : `chi-squared ${fixed(reading.test.statistic, 2)} on ${reading.test.degrees} df`;
    case 'relative-change':
      return 'ratio - 1';
    case 'risk-difference':
    case 'percentage-difference':
    case 'rate-difference':
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
    case 'strata':
      return empty;
    case 'rates': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      return { ...empty, risk: `${quantityText(group.cases)}/${quantityText(group.exposure)}` };
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
  'rate-score': 'score (Rao 1948)',
  garwood: 'exact (Garwood 1936)',
  'rate-ratio-score': 'score, as the odds of the Wilson limits (Miettinen & Nurminen 1985)',
  'exact-rate-ratio': 'exact conditional, as the odds of the Clopper-Pearson limits (1934)',
  'rate-difference-score': 'Miettinen-Nurminen score for rates (1985)',
  'equal-times-score': 'score of the rate ratio over two times of equal length (Miettinen & Nurminen 1985)',
  'pooled-score':
    'score with Mantel-Haenszel weights (Mantel & Haenszel 1959; Miettinen & Nurminen 1985, strata)',
  'pooled-conditional-score': 'conditional score (Gart 1970; Mehta, Patel & Gray 1985)',
  'pooled-conditional-exact': 'exact conditional (Gart 1970)',
  'pooled-shares-score': 'score (Farrington 1993)',
  'pooled-shares-exact': 'exact tails of the sum of binomial counts (Farrington 1993)',
  'fay-feuer': 'gamma limits (Fay & Feuer 1997)',
  'log-delta': 'delta method on the log scale, weights as known',
  'sampled-coverage':
    'Miettinen-Nurminen score of the odds ratio, cases against the sample (Miettinen & Nurminen 1985)',
  'sampled-coverage-fraction':
    '1 minus the Miettinen-Nurminen score limits of the risk ratio, cases against the sample (Miettinen & Nurminen 1985)',
  'effective-sample':
    'The coverage as from a sample that would have its interval (effective sample), then the Miettinen-Nurminen score of the odds ratio (Miettinen & Nurminen 1985)',
  'effective-sample-fraction':
    'The coverage as from a sample that would have its interval (effective sample), then 1 minus the Miettinen-Nurminen score limits of the risk ratio (Miettinen & Nurminen 1985)',
  'growing-coverage':
    'The wider of two assumptions, constant risk and evenly spread cases, each from the Wilson limits of the share (Wilson 1927)',
  'coverage-by-period': 'Score of the cases of all periods together (Farrington 1993)',
  'as-given': 'The interval that came with the figure',
  'miettinen-nurminen-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985), through the odds of the prevalence (Bayes)',
  'mover-prevalence-odds':
    'Miettinen-Nurminen limits of the likelihood ratio (1985) and Wilson limits of the prevalence, combined on logs (Zou & Donner 2008)',
} satisfies Record<IntervalMethod, string>;

/** The name of an interval's method, with its source. */
function methodOf(reading: Reading): string {
  if (reading.id === 'overall-difference') return 'Pearson 1900, times (N - 1)/N (Campbell 2007)';
  if (reading.id === 'homogeneity')
    return reading.test?.name === 'deviance'
      ? 'Deviance (Farrington 1993); misses most real differences'
      : 'Gart & Nam 1988; misses most real differences';
  if (reading.id === 'hidden-cause-strength') return 'VanderWeele & Ding 2017';
  if (reading.interval === null) return alarmMethod(reading.id);
  return methodText(reading.interval);
}

export function methodText({ method, envelope, unknownToEitherSide, designEffect }: ReadingInterval): string {
  const over = envelope ? ', outermost limits over the range given' : '';
  const unknown =
    unknownToEitherSide === true
      ? ', all unknown cases on one side, then on the other (Horowitz & Manski 2000)'
      : '';
  const divided =
    designEffect === 1
      ? ''
      : `, counts divided by the design effect ${String(designEffect)} (Rao & Scott 1992)`;
  return `${sources[method]}${over}${unknown}${divided}`;
}
