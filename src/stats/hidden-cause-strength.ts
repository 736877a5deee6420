import { ArgumentError } from './argument-error.ts';
import type { Interval } from './interval.ts';

/**
 * How strongly a hidden cause would have to go with both the group and the outcome, as a risk ratio with each, to explain the
 * whole ratio away: RR + root(RR(RR - 1)), the ratio inverted first if it is below 1.
 *
 * @param ratio risk or rate ratio, 0 or above
 * @returns 1 at a ratio of 1; `null` at a ratio of 0, where no cause is strong enough
 * @throws ArgumentError for a negative ratio or NaN
 *
 * VanderWeele & Ding 2017 (Annals of Internal Medicine 167:268).
 */
export function hiddenCauseStrength(ratio: number): number | null {
  if (!(ratio >= 0)) throw new ArgumentError('ratio-out-of-range', `a ratio must be 0 or more, not ${ratio}`);
  if (ratio === 0) return null;
  const above = ratio < 1 ? 1 / ratio : ratio;
  return above + Math.sqrt(above * (above - 1));
}

/** The same at the limit nearer to no difference; 1 where the interval holds 1. */
export function hiddenCauseStrengthAtLimit({ low, high }: Interval): number | null {
  if (low !== null && low > 1) return hiddenCauseStrength(low);
  if (high !== null && high < 1) return hiddenCauseStrength(high);
  return 1;
}
