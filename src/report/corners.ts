import type { Quantity } from '../../grammar/question.ts';
import type { Interval } from '../stats/interval.ts';

const uncertain = (quantity: Quantity) => quantity.low !== quantity.high;

/** True where a quantity is known only to a range, so that no single value can stand for it in an interval. */
export const isRange = (quantity: Quantity) => quantity.precision === 'range';

/**
 * The smallest and largest value that a function takes at the corners of its inputs' ranges.
 *
 * Enough for functions that are monotone in each input (risks, ratios, differences, odds ratios, fractions); not for
 * those with an interior extreme. A corner at which the function is undefined (`NaN`) is left out; an infinite one gives
 * `null`, no end on that side. `null` as a whole where no input is uncertain.
 */
export function rangeOverCorners(
  quantities: readonly Quantity[],
  value: (values: readonly number[]) => number,
): Interval | null {
  if (!quantities.some(uncertain)) return null;
  const at = corners(quantities)
    .map(value)
    .filter((x) => !Number.isNaN(x));
  if (at.length === 0) return null;
  const low = Math.min(...at);
  const high = Math.max(...at);
  return { low: Number.isFinite(low) ? low : null, high: Number.isFinite(high) ? high : null };
}

/** The hull of the intervals at all corners: `null` on a side where one of them has no limit. */
export function envelopeOverCorners(
  quantities: readonly Quantity[],
  interval: (values: readonly number[]) => Interval,
): Interval {
  const all = corners(quantities).map(interval);
  const lows = all.map(({ low }) => low);
  const highs = all.map(({ high }) => high);
  return {
    low: lows.some((low) => low === null) ? null : Math.min(...lows.filter((low) => low !== null)),
    high: highs.some((high) => high === null) ? null : Math.max(...highs.filter((high) => high !== null)),
  };
}

function corners(quantities: readonly Quantity[]): number[][] {
  return quantities.reduce<number[][]>(
    (rows, quantity) =>
      rows.flatMap((row) =>
        uncertain(quantity)
          ? [
              [...row, quantity.low],
              [...row, quantity.high],
            ]
          : [[...row, quantity.value]],
      ),
    [[]],
  );
}
