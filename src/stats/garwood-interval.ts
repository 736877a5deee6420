import { ArgumentError, checkExposure, checkLevel } from './argument-error.ts';
import { gammaLowerQuantile, gammaUpperQuantile } from './gamma-tail.ts';
import type { Interval } from './interval.ts';

/** Beyond this many events the exact interval is not worked out. */
export const mostExactEvents = 1e9;

/**
 * Exact interval of a rate, events over exposure: never holds the truth less often than its level.
 *
 * @param events whole, in [0, 1e9]
 * @param exposure person-time or whatever else the events are counted over, above 0
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits per unit of exposure; no events: the lower limit is 0 and the upper -ln((1 - level)/2) over the exposure
 * @throws ArgumentError for anything else
 *
 * Garwood 1936 (Biometrika 28:437), as quantiles of the gamma distribution. Accuracy: 1e-12 relative.
 */
export function garwoodInterval(events: number, exposure: number, level: number): Interval {
  checkLevel(level);
  checkExposure(events, exposure);
  if (!Number.isInteger(events) || events > mostExactEvents) {
    throw new ArgumentError('not-whole', `events must be whole and at most 1e9, not ${events}`);
  }
  const half = (1 - level) / 2;
  return {
    low: events === 0 ? 0 : gammaLowerQuantile(events, half) / exposure,
    high: gammaUpperQuantile(events + 1, half) / exposure,
  };
}
