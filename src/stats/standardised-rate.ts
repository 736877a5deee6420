import { ArgumentError, checkExposure, checkLevel } from './argument-error.ts';
import { gammaLowerQuantile, gammaUpperQuantile } from './gamma-tail.ts';
import type { Interval } from './interval.ts';

/** Events over exposure in a layer, and the layer's size in the standard population. */
export interface WeightedLayer {
  readonly cases: number;
  readonly exposure: number;
  /** 0 or above, in any unit; only the proportions count. */
  readonly weight: number;
}

/**
 * The directly standardised rate: the layers' rates weighted by the standard population, per unit of exposure.
 *
 * @throws ArgumentError for numbers out of range, or where no layer has a weight
 */
export function standardisedRate(layers: readonly WeightedLayer[]): number {
  return sumOver(partsOf(layers), ({ cases, part }) => cases * part);
}

/**
 * Interval of the directly standardised rate by the gamma distribution.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without events; with equal weights per exposure it is Garwood's exact interval
 * @throws ArgumentError for numbers out of range, or where no layer has a weight
 *
 * Fay & Feuer 1997 (Statistics in Medicine 16:791): with y the rate, v its variance sum w^2 x and M the largest weight per
 * exposure, lower = (v/y) times the gamma quantile of shape y^2/v, upper with y + M and v + M^2. Accuracy: 1e-11 relative.
 */
export function fayFeuerInterval(layers: readonly WeightedLayer[], level: number): Interval {
  checkLevel(level);
  const parts = partsOf(layers);
  const rate = sumOver(parts, ({ cases, part }) => cases * part);
  const variance = sumOver(parts, ({ cases, part }) => cases * part * part);
  const largest = Math.max(...parts.map(({ part }) => part));
  const half = (1 - level) / 2;
  const upperRate = rate + largest;
  const upperVariance = variance + largest * largest;
  return {
    low: rate === 0 ? 0 : (variance / rate) * gammaLowerQuantile((rate * rate) / variance, half),
    high: (upperVariance / upperRate) * gammaUpperQuantile((upperRate * upperRate) / upperVariance, half),
  };
}

/** Each layer's events beside what one event adds to the standardised rate. */
function partsOf(
  layers: readonly WeightedLayer[],
): readonly { readonly cases: number; readonly part: number }[] {
  for (const { cases, exposure, weight } of layers) {
    checkExposure(cases, exposure);
    if (!(weight >= 0 && weight < Infinity)) {
      throw new ArgumentError('weight-out-of-range', `a weight must be 0 or more, not ${weight}`);
    }
  }
  const weights = sumOver(layers, ({ weight }) => weight);
  if (!(weights > 0)) throw new ArgumentError('weight-out-of-range', 'a layer must have a weight');
  return layers.map(({ cases, exposure, weight }) => ({ cases, part: weight / weights / exposure }));
}

const sumOver = <T>(items: readonly T[], value: (item: T) => number) =>
  items.reduce((sum, item) => sum + value(item), 0);
