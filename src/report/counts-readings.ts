import type { Quantity } from '../../grammar/question.ts';
import { clopperPearsonInterval } from '../stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../stats/conditional-odds-ratio-interval.ts';
import type { Interval, TwoGroups } from '../stats/interval.ts';
import { oddsRatioInterval } from '../stats/odds-ratio-interval.ts';
import { oneExtraPer } from '../stats/one-extra-per.ts';
import { riskDifferenceInterval } from '../stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../stats/risk-ratio-interval.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import { rangeOverCorners } from './corners.ts';
import { estimateOf, intervalOver, mapInterval } from './estimates.ts';
import { ratioFollowers, relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import type { Reading } from './reading.ts';

/** Cases among a total, as the readings need them. Totals may be coverage times population and need not be whole. */
export interface CountsRow {
  readonly cases: Quantity;
  readonly total: Quantity;
}

export interface CountsOptions {
  readonly level: number;
  readonly exact: boolean;
  readonly designEffect: number;
  /** The M of extra cases per M; `null`: the smallest power of ten at which the smaller risk gives at least 1. */
  readonly per: number | null;
}

/** The risk in one group. */
export function riskReading(
  row: CountsRow,
  of: number,
  { level, exact, designEffect }: CountsOptions,
): Reading {
  const quantities = [row.cases, row.total];
  return reading({
    id: 'risk',
    of,
    estimate: row.cases.value / row.total.value,
    interval: exact
      ? intervalOver(quantities, level, 'clopper-pearson', ([x = NaN, n = NaN]) =>
          clopperPearsonInterval(x, n, level),
        )
      : intervalOver(
          quantities,
          level,
          'wilson',
          ([x = NaN, n = NaN]) => wilsonInterval(x, n, level),
          designEffect,
        ),
    roundingRange: rangeOverCorners(quantities, ([x = NaN, n = NaN]) => x / n),
  });
}

/** Every reading of a group against its reference group, all from one null test, so that they never contradict each other. */
export function pairReadings(
  rows: readonly CountsRow[],
  of: number,
  against: number,
  options: CountsOptions,
): Reading[] {
  const group = rows[of];
  const reference = rows[against];
  if (group === undefined || reference === undefined) return [];
  const pair: Pair = {
    of,
    against,
    quantities: [group.cases, group.total, reference.cases, reference.total],
  };
  const ratio = measured(riskRatio, pair, options);
  const difference = measured(riskDifference, pair, options);
  return [
    ratio,
    relativeChange(ratio),
    difference,
    extraCases(difference, group, reference, options),
    ...oneExtra(difference),
    measured(oddsRatio, pair, options),
    ...ratioFollowers(ratio),
  ];
}

/** The odds ratio alone, for rows that were chosen by outcome. */
export function oddsRatioReading(
  rows: readonly CountsRow[],
  of: number,
  against: number,
  options: CountsOptions,
): Reading[] {
  const group = rows[of];
  const reference = rows[against];
  if (group === undefined || reference === undefined) return [];
  return [
    measured(
      oddsRatio,
      { of, against, quantities: [group.cases, group.total, reference.cases, reference.total] },
      options,
    ),
  ];
}

interface Pair {
  readonly of: number;
  readonly against: number;
  readonly quantities: readonly [Quantity, Quantity, Quantity, Quantity];
}

const asGroups = ([
  cases = NaN,
  total = NaN,
  referenceCases = NaN,
  referenceTotal = NaN,
]: readonly number[]): TwoGroups => ({
  cases,
  total,
  referenceCases,
  referenceTotal,
});

const riskRatioOf = ({ cases, total, referenceCases, referenceTotal }: TwoGroups) =>
  (cases * referenceTotal) / (referenceCases * total);
const riskDifferenceOf = ({ cases, total, referenceCases, referenceTotal }: TwoGroups) =>
  (cases * referenceTotal - referenceCases * total) / (total * referenceTotal);
const oddsRatioOf = ({ cases, total, referenceCases, referenceTotal }: TwoGroups) =>
  (cases * (referenceTotal - referenceCases)) / (referenceCases * (total - cases));

/** One measure of a pair: its estimate, the score interval or the exact one, and what rounding allows. */
interface Measure {
  readonly id: 'risk-ratio' | 'risk-difference' | 'odds-ratio';
  readonly estimate: (groups: TwoGroups) => number;
  readonly score: (groups: TwoGroups, level: number) => Interval;
  /** `null`: there is no exact interval of the same family. */
  readonly exact: ((groups: TwoGroups, level: number) => Interval) | null;
}

const riskRatio: Measure = { id: 'risk-ratio', estimate: riskRatioOf, score: riskRatioInterval, exact: null };
const riskDifference: Measure = {
  id: 'risk-difference',
  estimate: riskDifferenceOf,
  score: riskDifferenceInterval,
  exact: null,
};
const oddsRatio: Measure = {
  id: 'odds-ratio',
  estimate: oddsRatioOf,
  score: oddsRatioInterval,
  exact: conditionalOddsRatioInterval,
};

function measured(
  measure: Measure,
  { of, against, quantities }: Pair,
  { level, exact, designEffect }: CountsOptions,
): Reading {
  const interval = exact ? measure.exact : measure.score;
  const method = exact ? 'conditional-exact' : 'miettinen-nurminen';
  return reading({
    id: measure.id,
    of,
    against,
    ...estimateOf(measure.estimate(asGroups(quantities.map(({ value }) => value)))),
    interval:
      interval &&
      intervalOver(quantities, level, method, (at) => interval(asGroups(at), level), designEffect),
    whyNoInterval: interval === null ? 'no-exact-form' : null,
    roundingRange: rangeOverCorners(quantities, (at) => measure.estimate(asGroups(at))),
  });
}

function extraCases(
  difference: Reading,
  group: CountsRow,
  reference: CountsRow,
  options: CountsOptions,
): Reading {
  const risks = [group, reference].map(({ cases, total }) => cases.value / total.value);
  return scaledCases(difference, options.per ?? perFor(risks));
}

/** The difference as extra cases per `per` people, or per so much exposure. */
export function scaledCases(difference: Reading, per: number): Reading {
  const scale = (share: number) => share * per;
  return {
    ...difference,
    id: 'extra-cases',
    estimate: difference.estimate === null ? null : scale(difference.estimate),
    interval: difference.interval && mapInterval(difference.interval, scale),
    roundingRange: difference.roundingRange && mapInterval(difference.roundingRange, scale),
    per,
  };
}

/** The smallest power of ten from 100 at which the smaller risk above zero gives at least 1; 100 where there is none. */
export function perFor(risks: readonly number[]): number {
  const smallest = Math.min(...risks.filter((risk) => risk > 0));
  let per = 100;
  while (Number.isFinite(smallest) && smallest * per < 1) per *= 10;
  return per;
}

/** One extra case for every K, in the form that stays honest when the interval spans zero (Altman 1998). */
export function oneExtra(difference: Reading): Reading[] {
  if (difference.estimate === null || difference.estimate === 0) return [];
  const { interval, ranges } = oneExtraPer(difference.estimate, difference.interval);
  return [
    reading({
      id: 'one-extra-per',
      of: difference.of,
      against: difference.against,
      estimate: 1 / Math.abs(difference.estimate),
      interval: interval && difference.interval && { ...difference.interval, ...interval },
      whyNoInterval: interval === null ? (difference.whyNoInterval ?? 'spans-none') : null,
      ranges,
    }),
  ];
}
