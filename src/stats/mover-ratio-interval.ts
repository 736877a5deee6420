import { ArgumentError } from './argument-error.ts';
import type { Interval } from './interval.ts';

/** An independent estimate with its interval, all above 0; a lower limit of 0 and a missing upper limit are allowed. */
export interface Estimated extends Interval {
  readonly estimate: number;
}

/**
 * Interval of a ratio of two independent estimates from their own intervals: the method of variance estimates recovery, on logs.
 * Serves totals and coverages that are themselves estimates.
 *
 * @param numerator, denominator estimates above 0, inside their limits, all limits at one level
 * @returns ln low = ln(a/b) - root((ln a - ln la)^2 + (ln ub - ln b)^2), and the upper limit likewise with the other ends;
 *   lower limit 0 or no upper limit where the end it needs is 0 or missing
 * @throws ArgumentError for estimates outside their limits
 *
 * Zou & Donner 2008 (Statistics in Medicine 27:1693).
 */
export function moverRatioInterval(numerator: Estimated, denominator: Estimated): Interval {
  check(numerator);
  check(denominator);
  const ratio = numerator.estimate / denominator.estimate;
  const down = Math.hypot(below(numerator), above(denominator));
  const up = Math.hypot(above(numerator), below(denominator));
  return {
    low: down === Infinity ? 0 : ratio * Math.exp(-down),
    high: up === Infinity ? null : ratio * Math.exp(up),
  };
}

const below = ({ estimate, low }: Estimated) =>
  low === null || low === 0 ? Infinity : Math.log(estimate / low);
const above = ({ estimate, high }: Estimated) => (high === null ? Infinity : Math.log(high / estimate));

function check({ estimate, low, high }: Estimated): void {
  const inside = (low === null || (low >= 0 && low <= estimate)) && (high === null || estimate <= high);
  if (!(estimate > 0 && estimate < Infinity && inside)) {
    throw new ArgumentError(
      'limits-out-of-order',
      `${low}, ${estimate} and ${high} must rise, the estimate above 0`,
    );
  }
}
