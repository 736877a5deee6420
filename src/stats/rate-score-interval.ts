import { checkExposure } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';

/**
 * Score interval of a rate, events over exposure.
 *
 * @param events 0 or above; need not be whole
 * @param exposure above 0
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits per unit of exposure; no events: lower limit 0, upper z^2 over the exposure
 * @throws ArgumentError for anything else
 *
 * Rao 1948 (the score test of a Poisson mean), in the form without cancellation: with B = z root(z^2 + 4x),
 * lower = 2x^2/((2x + z^2 + B)T) and upper = (2x + z^2 + B)/(2T). Accuracy: 1e-14 relative.
 */
export function rateScoreInterval(events: number, exposure: number, level: number): Interval {
  checkExposure(events, exposure);
  const z = criticalValue(level);
  const sum = 2 * events + z * z + z * Math.sqrt(z * z + 4 * events);
  return { low: (2 * events * events) / sum / exposure, high: sum / 2 / exposure };
}
