import type { Quantity, SharesGroup, SharesQuestion } from '../../grammar/question.ts';
import { clopperPearsonInterval } from '../stats/clopper-pearson-interval.ts';
import { populationAttributableFraction } from '../stats/attributable-fraction.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../stats/share-ratio.ts';
import type { SharePair } from '../stats/share-ratio.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import type { CountsOptions } from './counts-readings.ts';
import { estimateOf, intervalOver, mapInterval } from './estimates.ts';
import { ratioFollowers, relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import type { NoInterval, Reading, ReadingInterval } from './reading.ts';

/** Below this many cases in a group the exact limits stand beside the score limits (common practice). */
export const fewCases = 5;

/** The group's share of all cases. With `population` no interval of its own: every interval then comes from the counts rows. */
export function caseShareReading(
  question: SharesQuestion,
  of: number,
  options: CountsOptions,
  countsRowsOnly: boolean,
): Reading {
  const group = question.groups[of];
  if (group === undefined) throw new RangeError('a share reading was asked for a group that is not there');
  const { caseShare } = group;
  const why: NoInterval | null = countsRowsOnly
    ? 'counts-rows-only'
    : group.cases === null
      ? 'no-case-number'
      : null;
  return reading({
    id: 'case-share',
    of,
    estimate: caseShare.value,
    interval: why === null ? shareInterval(question, of, options) : null,
    whyNoInterval: why,
    roundingRange: caseShare.low === caseShare.high ? null : { low: caseShare.low, high: caseShare.high },
  });
}

function shareInterval(
  question: SharesQuestion,
  of: number,
  { level, exact, designEffect }: CountsOptions,
): ReadingInterval | null {
  const all = caseQuantities(question);
  if (all === null) return null;
  return intervalOver(
    all,
    level,
    exact ? 'clopper-pearson' : 'wilson',
    (values) => {
      const total = values.reduce((sum, x) => sum + x, 0);
      const cases = values[of] ?? NaN;
      return exact ? clopperPearsonInterval(cases, total, level) : wilsonInterval(cases, total, level);
    },
    designEffect,
  );
}

function caseQuantities({ groups }: SharesQuestion): Quantity[] | null {
  const cases = groups.map((group) => group.cases);
  return cases.every((quantity) => quantity !== null) ? cases : null;
}

/** The ratio per person from cases (or shares of cases) and coverage, and what follows from it. */
export function shareRatioReadings(question: SharesQuestion, of: number, options: CountsOptions): Reading[] {
  const ratio = shareRatioReading(question, of, options);
  return [ratio, relativeChange(ratio), ...ratioFollowers(ratio)];
}

function shareRatioReading(
  { groups, reference }: SharesQuestion,
  of: number,
  { level, exact, designEffect }: CountsOptions,
): Reading {
  const group = groups[of];
  const other = groups[reference];
  if (group === undefined || other === undefined)
    throw new RangeError('a pair was asked for that is not there');
  const coverages = coverageCorners(group, other);
  const counted = group.cases !== null && other.cases !== null ? ([group.cases, other.cases] as const) : null;
  const numerators = counted ?? ([group.caseShare, other.caseShare] as const);
  const limits = (at: readonly number[], coverage: SharePair, level_: number, useExact: boolean) => {
    const pair = { ...coverage, cases: at[0] ?? NaN, referenceCases: at[1] ?? NaN };
    return useExact ? exactShareRatioInterval(pair, level_) : shareRatioInterval(pair, level_);
  };
  const here: SharePair = {
    cases: numerators[0].value,
    referenceCases: numerators[1].value,
    coverage: group.coverage.value,
    referenceCoverage: other.coverage.value,
  };
  const interval =
    counted &&
    intervalOver(
      counted,
      level,
      exact ? 'clopper-pearson-share-odds' : 'wilson-share-odds',
      (at) => limits(at, here, level, exact),
      designEffect,
    );
  // A design effect leaves no whole counts, which exact limits need.
  const few = designEffect === 1 && counted !== null && counted.some(({ value }) => value < fewCases);
  return reading({
    id: 'risk-ratio',
    of,
    against: reference,
    ...estimateOf(ratioOf(here)),
    interval,
    whyNoInterval: counted === null ? 'no-case-number' : null,
    roundingRange: ratioRoundingRange(numerators, coverages),
    exactBeside:
      few && !exact && counted !== null
        ? intervalOver(counted, level, 'clopper-pearson-share-odds', (at) => limits(at, here, level, true))
        : null,
  });
}

const ratioOf = ({ cases, referenceCases, coverage, referenceCoverage }: SharePair) =>
  (cases * referenceCoverage) / (referenceCases * coverage);

export interface CoverageEnd {
  readonly coverage: number;
  readonly referenceCoverage: number;
}

/** The ends of what the rounding of coverage allows. Two groups whose coverages complete each other are one number, not two. */
export function coverageCorners(
  { coverage }: SharesGroup,
  { coverage: reference }: SharesGroup,
): CoverageEnd[] {
  return coverageEnds(coverage).flatMap((own) =>
    complete(coverage, reference)
      ? [{ coverage: own, referenceCoverage: 1 - own }]
      : coverageEnds(reference).map((end) => ({ coverage: own, referenceCoverage: end })),
  );
}

const complete = (one: Quantity, other: Quantity) => Math.abs(one.value + other.value - 1) < 1e-9;

const coverageEnds = ({ low, high }: Quantity) => (low === high ? [low] : [low, high]);

export function ratioRoundingRange(
  numerators: readonly [Quantity, Quantity],
  coverages: readonly CoverageEnd[],
): { low: number | null; high: number | null } | null {
  const [own, other] = numerators;
  const rounded = coverages.length > 1 || own.low !== own.high || other.low !== other.high;
  if (!rounded) return null;
  // Shares of cases that complete each other are one number too: the one's high end goes with the other's low end.
  const ends: readonly (readonly [number, number])[] = complete(own, other)
    ? [
        [own.low, 1 - own.low],
        [own.high, 1 - own.high],
      ]
    : [
        [own.low, other.low],
        [own.low, other.high],
        [own.high, other.low],
        [own.high, other.high],
      ];
  const at = ends
    .flatMap(([cases, referenceCases]) =>
      coverages.map((coverage) => ratioOf({ cases, referenceCases, ...coverage })),
    )
    .filter((ratio) => !Number.isNaN(ratio));
  if (at.length === 0) return null;
  const high = Math.max(...at);
  return { low: Math.min(...at), high: Number.isFinite(high) ? high : null };
}

/** The share of all cases above the reference group's rate: c(RR - 1)/(1 + c(RR - 1)), monotone in the ratio alone. */
export function populationFraction(question: SharesQuestion, pair: readonly Reading[]): Reading[] {
  const ratio = pair.find(({ id }) => id === 'risk-ratio');
  const coverage = ratio === undefined ? undefined : question.groups[ratio.of]?.coverage;
  if (ratio === undefined || coverage === undefined) return [];
  if (ratio.estimate === null || ratio.estimate <= 1) return [];
  const through = (value: number) => populationAttributableFraction(value, coverage.value);
  const interval = ratio.interval && {
    ...mapInterval(ratio.interval, through),
    ...(ratio.interval.high === null ? { high: 1 } : {}),
  };
  return [
    {
      ...ratio,
      id: 'population-attributable-fraction',
      ...estimateOf(through(ratio.estimate)),
      interval,
      roundingRange: null,
      exactBeside: null,
    },
  ];
}

/** How large the group's coverage would have to be for the difference to vanish: its share of the cases. */
export function breakEvenReading(
  question: SharesQuestion,
  of: number,
  options: CountsOptions,
  countsRowsOnly: boolean,
): Reading[] {
  const share = caseShareReading(question, of, options, countsRowsOnly);
  return [{ ...share, id: 'break-even-coverage', against: question.reference }];
}
