import type { CoverageKnown, SharesGroup } from '../../grammar/question.ts';
import { populationAttributableFraction } from '../stats/attributable-fraction.ts';
import { conditionalOddsRatioInterval } from '../stats/conditional-odds-ratio-interval.ts';
import { coverageByPeriodInterval, coverageByPeriodRatio } from '../stats/coverage-by-period.ts';
import type { Period } from '../stats/coverage-by-period.ts';
import { effectiveSample } from '../stats/effective-sample.ts';
import { hullOfGrowth, ratioUnderConstantRisk, ratioUnderEvenCases } from '../stats/growing-coverage.ts';
import type { Interval } from '../stats/interval.ts';
import {
  sampledCoverageRatioInterval,
  sampledPopulationFractionInterval,
} from '../stats/sampled-coverage.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../stats/share-ratio.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import type { IntervalMethod } from './reading.ts';

/** Cases of a group and of its reference group to something. */
type OfCases<Value> = (cases: number, referenceCases: number) => Value;

/** How the ratio per person, and the share of all cases that follows from it, come from two counts of cases and one coverage. */
export interface CoverageMethod {
  /** Infinite without an upper end, NaN where undefined. */
  readonly ratio: OfCases<number>;
  /** `null`: with `exact`, where there is no exact interval of this kind. */
  readonly interval: OfCases<Interval> | null;
  readonly method: IntervalMethod;
  /** The share of all cases above the reference group's rate. */
  readonly fraction: OfCases<number>;
  readonly fractionInterval: OfCases<Interval> | null;
  readonly fractionMethod: IntervalMethod;
  /** The limits are the outermost over a range of coverage. */
  readonly envelope: boolean;
}

/** An interval of its own that names no level is taken as a 95% interval (common practice). */
export const usualOwnLevel = 0.95;

/** The method that goes with how a group's coverage is known; the other group is everybody else. */
export function coverageMethod(
  { coverage, known }: Pick<SharesGroup, 'coverage' | 'known'>,
  level: number,
  exact: boolean,
): CoverageMethod {
  const ratio: OfCases<number> = (cases, referenceCases) =>
    (cases * (1 - coverage.value)) / (referenceCases * coverage.value);
  const fraction: OfCases<number> = (cases, referenceCases) =>
    populationAttributableFraction(ratio(cases, referenceCases), coverage.value);
  switch (known.kind) {
    case 'given':
      return { ratio, fraction, ...overCoverages([coverage.value], level, exact), envelope: false };
    case 'range':
      return {
        ratio,
        fraction,
        ...overCoverages([known.low.value, known.high.value], level, exact),
        envelope: true,
      };
    case 'sample':
    case 'interval':
      return { ratio, fraction, ...sampled(known, coverage.value, level, exact), envelope: false };
    case 'growth':
      return {
        ratio,
        fraction,
        ...growing(known.start.value, known.end.value, level, exact),
        envelope: false,
      };
    case 'periods':
      return byPeriod(
        known.periods.map((period) => ({ allCases: period.allCases, coverage: period.coverage.value })),
        level,
        exact,
      );
  }
}

type Limits = Omit<CoverageMethod, 'ratio' | 'fraction' | 'envelope'>;

/** One coverage, or the outermost limits over several. */
function overCoverages(coverages: readonly number[], level: number, exact: boolean): Limits {
  const at = (coverage: number, cases: number, referenceCases: number) => {
    const pair = { cases, referenceCases, coverage, referenceCoverage: 1 - coverage };
    return exact ? exactShareRatioInterval(pair, level) : shareRatioInterval(pair, level);
  };
  const method = exact ? 'clopper-pearson-share-odds' : 'wilson-share-odds';
  return {
    interval: (cases, referenceCases) =>
      hullOf(coverages.map((coverage) => at(coverage, cases, referenceCases))),
    method,
    fractionInterval: (cases, referenceCases) =>
      hullOf(
        coverages.map((coverage) => {
          const { low, high } = at(coverage, cases, referenceCases);
          const through = (limit: number) => populationAttributableFraction(limit, coverage);
          return { low: low === null ? null : through(low), high: high === null ? 1 : through(high) };
        }),
      ),
    fractionMethod: method,
  };
}

/** Coverage from a sample, or as good as from one: an interval of its own says how large the sample would have been. */
function sampled(
  known: Extract<CoverageKnown, { kind: 'sample' | 'interval' }>,
  coverage: number,
  level: number,
  exact: boolean,
): Limits {
  const size =
    known.kind === 'sample'
      ? known.sampled
      : effectiveSample(coverage, known.low.value, known.high.value, known.level?.value ?? usualOwnLevel);
  const inGroup = known.kind === 'sample' ? known.inGroup : coverage * size;
  const score: OfCases<Interval> = (cases, referenceCases) =>
    sampledCoverageRatioInterval({ cases, referenceCases, sampledInGroup: inGroup, sampled: size }, level);
  const conditional: OfCases<Interval> = (cases, referenceCases) =>
    conditionalOddsRatioInterval(
      { cases, total: cases + referenceCases, referenceCases: inGroup, referenceTotal: size },
      level,
    );
  // Without a case nothing is known about the ratio; a hidden count may be none.
  const someCases =
    (limits: OfCases<Interval>): OfCases<Interval> =>
    (cases, referenceCases) =>
      cases + referenceCases === 0 ? { low: 0, high: null } : limits(cases, referenceCases);
  const exactForm = known.kind === 'sample' ? conditional : null;
  const interval = exact ? exactForm : score;
  return {
    interval: interval && someCases(interval),
    method: exact ? 'conditional-exact' : known.kind === 'sample' ? 'sampled-coverage' : 'effective-sample',
    fractionInterval: exact
      ? null
      : someCases((cases, referenceCases) =>
          sampledPopulationFractionInterval(
            { cases, referenceCases, sampledInGroup: inGroup, sampled: size },
            level,
          ),
        ),
    fractionMethod: known.kind === 'sample' ? 'sampled-coverage-fraction' : 'effective-sample-fraction',
  };
}

/** The wider of two assumptions: the risk stayed the same, or the cases came evenly. */
function growing(start: number, end: number, level: number, exact: boolean): Limits {
  const both: OfCases<readonly [Interval, Interval]> = (cases, referenceCases) => {
    const from = { cases, referenceCases, start, end };
    return [ratioUnderConstantRisk(from, level).interval, ratioUnderEvenCases(from, level).interval];
  };
  return {
    interval: exact ? null : (cases, referenceCases) => hullOfGrowth(...both(cases, referenceCases)),
    method: 'growing-coverage',
    // Under either assumption it is the share of cases times 1 - 1/ratio, at the same limits of the share.
    fractionInterval: exact
      ? null
      : (cases, referenceCases) => {
          if (cases + referenceCases === 0) return { low: null, high: 1 };
          const share = wilsonInterval(cases, cases + referenceCases, level);
          const part = (held: number | null, ratio: number | null) =>
            ratio === 0 ? null : (held ?? 1) * (ratio === null ? 1 : 1 - 1 / ratio);
          const [one, other] = both(cases, referenceCases).map(({ low, high }) => ({
            low: part(share.low, low),
            high: part(share.high, high),
          }));
          return hullOf([one, other].filter((interval) => interval !== undefined));
        },
    fractionMethod: 'growing-coverage',
  };
}

function byPeriod(periods: readonly Period[], level: number, exact: boolean): CoverageMethod {
  const all = periods.reduce((sum, { allCases }) => sum + allCases, 0);
  const fraction = (ratio: number | null) =>
    ratio === null
      ? 1
      : periods.reduce(
          (sum, { allCases, coverage }) =>
            sum + (allCases / all) * populationAttributableFraction(ratio, coverage),
          0,
        );
  const ratio: OfCases<number> = (cases) => coverageByPeriodRatio(cases, periods) ?? Infinity;
  const interval: OfCases<Interval> = (cases) => coverageByPeriodInterval(cases, periods, level);
  return {
    ratio,
    interval: exact ? null : interval,
    method: 'coverage-by-period',
    fraction: (cases, referenceCases) => fraction(ratio(cases, referenceCases)),
    fractionInterval: exact
      ? null
      : (cases, referenceCases) => {
          const { low, high } = interval(cases, referenceCases);
          return { low: fraction(low ?? 0), high: fraction(high) };
        },
    fractionMethod: 'coverage-by-period',
    envelope: false,
  };
}

/** The outermost limits of several intervals: none on a side where one of them has none. */
function hullOf(intervals: readonly Interval[]): Interval {
  const lows = intervals.map(({ low }) => low);
  const highs = intervals.map(({ high }) => high);
  return {
    low: lows.some((low) => low === null) ? null : Math.min(...lows.filter((low) => low !== null)),
    high: highs.some((high) => high === null) ? null : Math.max(...highs.filter((high) => high !== null)),
  };
}
