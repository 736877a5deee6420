import type { FigureClaim } from '../../grammar/claim.ts';
import type { Reading, ReadingId } from './reading.ts';
import type { GroupedReport as Report } from './report.ts';
import type { SaysPair } from './said.ts';

/** A reading with its value in the unit of a claim: what would have to round to the claim's number. */
export interface Comparable {
  readonly reading: Reading;
  readonly value: number;
}

export const plainRatios: readonly ReadingId[] = [
  'risk-ratio',
  'rate-ratio',
  'count-ratio',
  'percentage-ratio',
  'pooled-risk-ratio',
  'pooled-rate-ratio',
  'crude-risk-ratio',
  'crude-rate-ratio',
  'standardised-risk-ratio',
];
const oddsRatios: readonly ReadingId[] = ['odds-ratio', 'pooled-odds-ratio'];
const differences: readonly ReadingId[] = [
  'risk-difference',
  'percentage-difference',
  'pooled-risk-difference',
];
const rateDifferences: readonly ReadingId[] = ['rate-difference', 'pooled-rate-difference'];

/** The readings that compare the two groups of a pair, all layers together. */
export function ofPair(report: Report, pair: SaysPair, ids: readonly ReadingId[]): readonly Reading[] {
  return report.readings.filter(
    ({ id, of, against, layer, rest }) =>
      ids.includes(id) && of === pair.of && against === pair.against && layer === null && !rest,
  );
}

/** A ratio as the sentence has it: turned round where the sentence is. */
export function ratioValue({ estimate, unbounded }: Reading, { turned }: SaysPair): number {
  const value = estimate ?? (unbounded ? Infinity : NaN);
  return turned ? 1 / value : value;
}

const signed = ({ direction }: FigureClaim, value: number) => (direction === 'down' ? -value : value);

/** Ratios, their own or those of the odds, each with the value the claim is about. */
export function ratios(report: Report, pair: SaysPair, which: 'plain' | 'odds'): readonly Comparable[] {
  const ids = which === 'odds' ? oddsRatios : plainRatios;
  const found = ofPair(report, pair, ids).map((reading) => ({ reading, value: ratioValue(reading, pair) }));
  // The headline's first.
  return [...found].sort(
    (a, b) => Number(b.reading.id === report.headline) - Number(a.reading.id === report.headline),
  );
}

/** The relative changes as the claim counts them: positive where they go its way. */
export function changes(report: Report, pair: SaysPair, claim: FigureClaim): readonly Comparable[] {
  const own = ofPair(report, pair, ['relative-change']).map((reading) => {
    const ratio = (reading.estimate ?? (reading.unbounded ? Infinity : NaN)) + 1;
    return { reading, value: signed(claim, (pair.turned ? 1 / ratio : ratio) - 1) };
  });
  // The ratios that no change of their own goes with.
  const further = ofPair(report, pair, [
    'crude-risk-ratio',
    'crude-rate-ratio',
    'standardised-risk-ratio',
  ]).map((reading) => ({ reading, value: signed(claim, ratioValue(reading, pair) - 1) }));
  return [...own, ...further];
}

/** The differences in points; without a direction in the words their size counts. */
export function pointDifferences(report: Report, pair: SaysPair, claim: FigureClaim): readonly Comparable[] {
  return ofPair(report, pair, differences).map((reading) => ({
    reading,
    value: sized(claim, pair, reading.estimate ?? NaN),
  }));
}

export function sized(claim: FigureClaim, { turned }: SaysPair, value: number): number {
  const own = turned ? -value : value;
  return claim.direction === null ? Math.abs(own) : signed(claim, own);
}

/** Extra cases per so many, or one for every so many, as a plain share. */
function extras(report: Report, pair: SaysPair, claim: FigureClaim): readonly Comparable[] {
  const scaled = ofPair(report, pair, ['extra-cases', ...rateDifferences]).map((reading) => ({
    reading,
    value: sized(
      claim,
      pair,
      (reading.estimate ?? NaN) / (reading.id === 'extra-cases' ? (reading.per ?? 1) : 1),
    ),
  }));
  const oneIn = ofPair(report, pair, ['one-extra-per']).map((reading) => ({
    reading,
    value: 1 / sized(claim, pair, reading.estimate ?? NaN),
  }));
  // "One more for every 90" is worded as that reading, "11 more per 1,000" as the other.
  return /^(?:1|one)(?![\d.])/.test(claim.text) ? [...oneIn, ...scaled] : [...scaled, ...oneIn];
}

/** Shares of one group: the subject's alone where the sentence names it, else its first. */
export function ofGroups(report: Report, pair: SaysPair, ids: readonly ReadingId[]): readonly Comparable[] {
  const found = report.readings.filter(
    ({ id, of, layer, rest }) =>
      ids.includes(id) && layer === null && !rest && (!pair.named || of === pair.subject),
  );
  return [...found]
    .sort((a, b) => Number(b.of === pair.subject) - Number(a.of === pair.subject))
    .map((reading) => ({ reading, value: reading.estimate ?? NaN }));
}

const fractions: readonly ReadingId[] = [
  'attributable-fraction',
  'prevented-fraction',
  'population-attributable-fraction',
];

/** What stands behind the figure says what it is a share of. */
export function shareOf(report: Report, claim: FigureClaim, sentence: string): 'cases' | 'all' | null {
  const behind = sentence.toLowerCase().slice(claim.at + claim.text.length);
  const noun = /^ ?of (?:the |all |those |our )*([a-z\u00c0-\uffff-]+(?: [a-z\u00c0-\uffff-]+)?)/.exec(
    behind,
  )?.[1];
  if (noun === undefined) return claim.about === 'cases' ? 'cases' : null;
  const starts = (typed: string | null) =>
    typed !== null && noun.startsWith(typed.toLowerCase().replace(/s$/, ''));
  if (starts(report.question.caseNoun)) return 'cases';
  if (starts(report.question.unit)) return 'all';
  return claim.about === 'cases' || noun.startsWith('case') ? 'cases' : null;
}

/** The readings that a claim is worded as, with their values in its unit. */
export function wordedAs(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): readonly Comparable[] {
  const plain = ratios(report, pair, 'plain');
  const odds = ratios(report, pair, 'odds');
  // From rows chosen by outcome only the odds ratio can be read; "as likely" still words a risk.
  const onlyOdds = report.headline === 'odds-ratio';
  const worded =
    claim.about === 'odds' || (onlyOdds && claim.about !== 'risk') ? odds : onlyOdds ? [] : plain;
  const oddsChange = odds.map(({ reading, value }) => ({ reading, value: signed(claim, value - 1) }));
  const change =
    claim.about === 'odds' || onlyOdds
      ? worded.length === 0
        ? []
        : oddsChange
      : changes(report, pair, claim);
  switch (claim.measure) {
    case 'ratio':
      return worded;
    case 'times-more':
      if (claim.direction === 'down')
        return worded.map(({ reading, value }) => ({ reading, value: 1 / value }));
      return [...worded, ...change];
    case 'change':
      return change;
    case 'points':
      return pointDifferences(report, pair, claim);
    case 'extra':
      return extras(report, pair, claim);
    case 'share':
      return shareReadings(report, pair, claim, sentence);
    case 'percentage': {
      const sizedChange = changes(report, pair, claim).map(({ reading, value }) => ({
        reading,
        value: Math.abs(value),
      }));
      return [
        ...ofGroups(report, pair, ['risk', 'case-share', 'population-share', ...fractions]),
        ...(onlyOdds ? [] : sizedChange),
      ];
    }
    case 'figure':
      return [
        ...(claim.about === 'odds' ? odds : [...plain, ...odds]),
        ...ofGroups(report, pair, ['rate']),
        ...ofPair(report, pair, rateDifferences).map((reading) => ({
          reading,
          value: sized(claim, pair, reading.estimate ?? NaN),
        })),
      ];
  }
}

function shareReadings(
  report: Report,
  pair: SaysPair,
  claim: FigureClaim,
  sentence: string,
): readonly Comparable[] {
  const of = shareOf(report, claim, sentence);
  if (claim.about === 'risk') return ofGroups(report, pair, ['risk', 'rate']);
  const excess = /above|excess|extra|due|prevent|attribut/i.test(sentence) ? fractions : [];
  if (report.question.kind === 'shares' && of === 'all')
    return ofGroups(report, pair, ['risk', 'population-share']);
  if (of === 'cases') return ofGroups(report, pair, ['case-share', 'risk', ...excess]);
  return ofGroups(report, pair, ['risk', 'case-share', 'population-share', 'rate', ...excess]);
}

/** Floating point leaves a hair between 1.65 and what rounds to it. */
const hair = (value: number) => Math.abs(value) * 1e-9 + 1e-15;

/** About 10% off, at most 10% below, at most 10% above. */
const hedged = 0.1;

/** Whether a value agrees with a claim's number at its own precision, with the hedge that stands before it. */
export function agrees(claim: Pick<FigureClaim, 'value' | 'low' | 'high' | 'hedge'>, value: number): boolean {
  const { value: claimed, low, high, hedge } = claim;
  // A ratio without an upper end is at least anything.
  if (!Number.isFinite(value)) return value === Infinity && hedge === 'at-least';
  const within = (from: number, to: number) => value >= from - hair(from) && value <= to + hair(to);
  switch (hedge) {
    case null:
      return within(low, high);
    case 'about':
      return within(Math.min(low, claimed * (1 - hedged)), Math.max(high, claimed * (1 + hedged)));
    case 'nearly':
      return within(claimed * (1 - hedged), claimed);
    case 'over':
      return within(claimed, claimed * (1 + hedged));
    case 'at-least':
      return within(claimed, Infinity);
    case 'at-most':
      return value >= 0 && within(-Infinity, claimed);
    case 'below':
      return value >= 0 && value < claimed;
  }
}
