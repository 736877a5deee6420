import type { Layer, Quantity } from '../../grammar/question.ts';
import { mostExactSums } from '../stats/convolution-tail.ts';
import type { ChiSquaredTest } from '../stats/homogeneity.ts';
import type { Interval } from '../stats/interval.ts';
import { isRange } from './corners.ts';
import type { CountsOptions } from './counts-readings.ts';
import { reading } from './reading.ts';
import type { IntervalMethod, NoInterval, Reading, ReadingId } from './reading.ts';

/** What is pooled over layers: the pairs of a group and its reference, and how a measure of them becomes a reading. */

/** A group and its reference within each layer, with every hidden count at its most or least favourable end. */
export interface Pairs<T> {
  readonly middle: readonly T[];
  readonly tested: readonly T[];
  /** The group's hidden counts at their lowest and the reference's at their highest: every ratio is then at its lowest. */
  readonly lowest: readonly T[];
  readonly highest: readonly T[];
  readonly hidden: boolean;
}

/** How a measure gets its limits; `null` where it has none, with the reason. */
export interface Limits<T> {
  readonly limits: ((pairs: readonly T[], level: number) => Interval | null) | null;
  readonly method: IntervalMethod;
  readonly why?: NoInterval;
}

/** What is pooled over the layers: each measure with its interval, from one null test wherever there is one. */
export interface Measure<T> extends Limits<T> {
  readonly id: ReadingId;
  readonly estimate: (pairs: readonly T[]) => number | null;
  readonly per?: number;
}

/** The group that a reading is of, and the one it is compared with. */
export interface Place {
  readonly of: number;
  readonly against: number;
}

type AnyGroup = Layer['question']['groups'][number];
interface Pick {
  readonly own: (cases: Quantity) => number;
  readonly reference: (cases: Quantity) => number;
  /** A total or an exposure. */
  readonly size: (quantity: Quantity) => number;
}

/** The pairs of a group and its reference; those for limits and tests are divided by the design effect, where there is one. */
export function pairsOf<T>(
  layers: readonly Layer[],
  { of, against }: Place,
  { designEffect }: CountsOptions,
  make: (own: AnyGroup, reference: AnyGroup, pick: Pick) => T | null,
): Pairs<T> {
  const each = (pick: Pick) =>
    layers.flatMap(({ question: { groups } }) => {
      const [own, reference] = [groups[of], groups[against]];
      const pair = own === undefined || reference === undefined ? null : make(own, reference, pick);
      return pair === null ? [] : [pair];
    });
  const at = (end: 'low' | 'high') => (cases: Quantity) =>
    (isRange(cases) ? cases[end] : cases.value) / designEffect;
  const value = (quantity: Quantity) => quantity.value;
  const size = (quantity: Quantity) => quantity.value / designEffect;
  return {
    middle: each({ own: value, reference: value, size: value }),
    tested: each({ own: size, reference: size, size }),
    lowest: each({ own: at('low'), reference: at('high'), size }),
    highest: each({ own: at('high'), reference: at('low'), size }),
    hidden: layers.some(({ question }) =>
      question.groups.some(({ cases }) => cases !== null && isRange(cases)),
    ),
  };
}

/** Pools one measure; where a count is hidden the interval is the outermost one over everything it may be. */
export function pooled<T>(pairs: Pairs<T>, place: Place, { level, designEffect }: CountsOptions) {
  return ({ id, estimate, limits, method, per, why: reason }: Measure<T>): Reading => {
    const value = estimate(pairs.middle);
    const lowest = limits?.(pairs.lowest, level) ?? null;
    const highest = pairs.hidden ? (limits?.(pairs.highest, level) ?? null) : lowest;
    const why: NoInterval | null =
      limits === null ? (reason ?? 'no-exact-form') : lowest === null ? 'no-cases-at-all' : null;
    return reading({
      id,
      ...place,
      estimate: value,
      unbounded: value === null && lowest !== null && (lowest.low ?? 0) > 0,
      interval:
        lowest === null || highest === null
          ? null
          : { low: lowest.low, high: highest.high, level, method, envelope: pairs.hidden, designEffect },
      whyNoInterval: why,
      per: per ?? null,
    });
  };
}

/** Exact limits, as long as the sum over the layers does not take too many values to go through one by one. */
export function exactly<T extends { readonly cases: number; readonly referenceCases: number }>(
  pairs: Pairs<T>,
  limits: (pairs: readonly T[], level: number) => Interval,
  method: IntervalMethod,
): Limits<T> {
  const sums = Math.max(
    ...[pairs.lowest, pairs.highest].map((layers) =>
      layers.reduce((sum, { cases, referenceCases }) => sum + cases + referenceCases, 1),
    ),
  );
  return sums > mostExactSums ? { limits: null, method, why: 'too-large-for-exact' } : { limits, method };
}

export function alike(test: ChiSquaredTest | null, place: Place, name: 'Gart-Nam' | 'deviance'): Reading[] {
  if (test === null) return [];
  const { statistic, degrees, pValue } = test;
  return [reading({ id: 'homogeneity', ...place, estimate: pValue, test: { name, statistic, degrees } })];
}
