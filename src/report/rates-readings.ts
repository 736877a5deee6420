import type { Quantity, RatesGroup } from '../../grammar/question.ts';
import { garwoodInterval, mostExactEvents } from '../stats/garwood-interval.ts';
import type { Interval } from '../stats/interval.ts';
import { rateDifference, rateDifferenceInterval } from '../stats/rate-difference-interval.ts';
import { exactRateRatioInterval, rateRatioInterval } from '../stats/rate-ratio.ts';
import type { RatePair } from '../stats/rate-ratio.ts';
import { rateScoreInterval } from '../stats/rate-score-interval.ts';
import { rangeOverCorners } from './corners.ts';
import { oneExtra } from './counts-readings.ts';
import type { CountsOptions } from './counts-readings.ts';
import { estimateOf, intervalOver } from './estimates.ts';
import { ratioFollowers, relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import type { IntervalMethod, NoInterval, Reading, ReadingInterval } from './reading.ts';

/** The rate in one group, per one unit of exposure; `per` is the exposure that it is shown for. */
export function rateReading(group: RatesGroup, of: number, per: number, options: CountsOptions): Reading {
  const { level, exact, designEffect } = options;
  const quantities = [group.cases, group.exposure];
  const tooLarge = exact && group.cases.high > mostExactEvents;
  return reading({
    id: 'rate',
    of,
    estimate: group.cases.value / group.exposure.value,
    interval:
      group.asStated || tooLarge
        ? null
        : intervalOver(
            quantities,
            level,
            exact ? 'garwood' : 'rate-score',
            ([x = NaN, t = NaN]) => (exact ? garwoodInterval(x, t, level) : rateScoreInterval(x, t, level)),
            designEffect,
          ),
    whyNoInterval: group.asStated ? 'no-counts' : tooLarge ? 'too-large-for-exact' : null,
    roundingRange: rangeOverCorners(quantities, ([x = NaN, t = NaN]) => x / t),
    per,
  });
}

/** Every reading of a group's rate against its reference group's, all from one null test. */
export function ratePairReadings(
  groups: readonly RatesGroup[],
  of: number,
  against: number,
  per: number,
  options: CountsOptions,
): Reading[] {
  const [group, reference] = [groups[of], groups[against]];
  if (group === undefined || reference === undefined) return [];
  const pair: Pair = {
    of,
    against,
    quantities: [group.cases, group.exposure, reference.cases, reference.exposure],
    counted: !group.asStated && !reference.asStated,
  };
  const ratio = rateRatioReading(pair, options);
  const difference = rateDifferenceReading(pair, per, options);
  return [ratio, relativeChange(ratio), difference, ...oneExtra(difference), ...ratioFollowers(ratio)];
}

/** The smallest power of ten at which the smallest rate above zero gives at least 1; 1 where there is none. */
export function exposureShown(groups: readonly RatesGroup[]): number {
  const rates = groups.map(({ cases, exposure }) => cases.value / exposure.value).filter((rate) => rate > 0);
  const smallest = Math.min(...rates);
  let per = 1;
  while (Number.isFinite(smallest) && smallest * per < 1) per *= 10;
  return per;
}

interface Pair {
  readonly of: number;
  readonly against: number;
  readonly quantities: readonly [Quantity, Quantity, Quantity, Quantity];
  readonly counted: boolean;
}

const asRates = ([
  cases = NaN,
  exposure = NaN,
  referenceCases = NaN,
  referenceExposure = NaN,
]: readonly number[]): RatePair => ({ cases, exposure, referenceCases, referenceExposure });

const ratioOf = ({ cases, exposure, referenceCases, referenceExposure }: RatePair) =>
  (cases * referenceExposure) / (referenceCases * exposure);

function rateRatioReading(pair: Pair, { level, exact, designEffect }: CountsOptions): Reading {
  return compared(pair, {
    id: 'rate-ratio',
    estimate: ratioOf,
    method: exact ? 'exact-rate-ratio' : 'rate-ratio-score',
    limits: (rates) => (exact ? exactRateRatioInterval(rates, level) : rateRatioInterval(rates, level)),
    level,
    designEffect,
  });
}

function rateDifferenceReading(
  pair: Pair,
  per: number,
  { level, exact, designEffect }: CountsOptions,
): Reading {
  const difference = compared(pair, {
    id: 'rate-difference',
    estimate: rateDifference,
    method: 'rate-difference-score',
    limits: exact ? null : (rates) => rateDifferenceInterval(rates, level),
    level,
    designEffect,
  });
  return { ...difference, per };
}

interface Measure {
  readonly id: 'rate-ratio' | 'rate-difference';
  readonly estimate: (rates: RatePair) => number;
  readonly method: IntervalMethod;
  /** `null`: there is no exact interval of the same family. */
  readonly limits: ((rates: RatePair) => Interval) | null;
  readonly level: number;
  readonly designEffect: number;
}

function compared({ of, against, quantities, counted }: Pair, measure: Measure): Reading {
  const { limits, level, method, designEffect } = measure;
  const why: NoInterval | null = !counted ? 'no-counts' : limits === null ? 'no-exact-form' : null;
  const interval: ReadingInterval | null =
    limits === null || !counted
      ? null
      : intervalOver(quantities, level, method, (at) => limits(asRates(at)), designEffect);
  return reading({
    id: measure.id,
    of,
    against,
    ...estimateOf(measure.estimate(asRates(quantities.map(({ value }) => value)))),
    interval,
    whyNoInterval: why,
    roundingRange: rangeOverCorners(quantities, (at) => measure.estimate(asRates(at))),
  });
}
