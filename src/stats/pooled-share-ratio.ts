import { checkWhole } from './argument-error.ts';
import {
  layersOfRates,
  layersOfShares,
  logRatioOfLayers,
  lowerScoreLimit,
  swappedLayers,
} from './case-layers.ts';
import type { CaseLayers } from './case-layers.ts';
import { lowerTailLimit } from './convolution-tail.ts';
import type { Interval } from './interval.ts';
import type { RatePair } from './rate-ratio.ts';
import type { SharePair } from './share-ratio.ts';

/**
 * The ratio per person pooled over layers of cases and coverages: the root of sum(x1 - n t o/(1 + t o)) = 0, n all cases of a
 * layer and o the odds of its coverages. The maximum likelihood estimate, not the Mantel-Haenszel one.
 *
 * @returns `null` where the reference group has no case
 * @throws ArgumentError for cases or coverages out of range
 *
 * Farrington 1993 (International Journal of Epidemiology 22:742).
 */
export function pooledShareRatio(strata: readonly SharePair[]): number | null {
  return ratioOfLayers(layersOfShares(strata));
}

/**
 * Score interval of that ratio: the same sum over the root of its binomial variance.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference; the outermost roots where
 *   the equation has several (coverages from about 8% to 92% in layers of very few cases)
 *
 * Accuracy: 1e-12 relative. One layer gives the interval of share-ratio.ts.
 */
export function pooledShareRatioInterval(strata: readonly SharePair[], level: number): Interval {
  return scoreIntervalOfLayers(layersOfShares(strata), level);
}

/** Exact interval of the same: the tails of the sum of the layers' binomial counts, by convolution. Whole cases, fewer than `mostExactSums`. */
export function exactPooledShareRatioInterval(strata: readonly SharePair[], level: number): Interval {
  return exactIntervalOfLayers(layersOfShares(strata), level);
}

/** The rate ratio pooled over layers: the same estimate with the exposures in the place of the coverages. */
export function pooledRateRatio(strata: readonly RatePair[]): number | null {
  return ratioOfLayers(layersOfRates(strata));
}

/**
 * Its score interval. Where the equation has several roots and the score rejects 1, the limits are on the estimate's side of 1, so
 * that the rate difference never says otherwise.
 */
export function pooledRateRatioInterval(strata: readonly RatePair[], level: number): Interval {
  return scoreIntervalOfLayers(layersOfRates(strata), level, true);
}

/** Its exact interval. */
export function exactPooledRateRatioInterval(strata: readonly RatePair[], level: number): Interval {
  return exactIntervalOfLayers(layersOfRates(strata), level);
}

/** The estimate from layers of all cases with only the total of each group known. */
export function ratioOfLayers(layers: CaseLayers): number | null {
  if (layers.referenceCases === 0) return null;
  return layers.cases === 0 ? 0 : Math.exp(logRatioOfLayers(layers));
}

/** The score interval of the same, from the outermost roots; `ownSide` as for `lowerScoreLimit`. */
export function scoreIntervalOfLayers(layers: CaseLayers, level: number, ownSide = false): Interval {
  const low = lowerScoreLimit(layers, level, ownSide);
  const mirrored = lowerScoreLimit(swappedLayers(layers), level, ownSide);
  return { low, high: mirrored === 0 ? null : 1 / mirrored };
}

function exactIntervalOfLayers(layers: CaseLayers, level: number): Interval {
  checkWhole(layers.cases, layers.referenceCases, ...layers.layers.map(({ all }) => all));
  const low = exactLowerLimit(layers, level);
  const mirrored = exactLowerLimit(swappedLayers(layers), level);
  return { low, high: mirrored === 0 ? null : 1 / mirrored };
}

function exactLowerLimit(layers: CaseLayers, level: number): number {
  if (layers.cases === 0) return 0;
  const counts = layers.layers.map(({ all, odds }) => ({
    fewest: 0,
    most: all,
    mode: (t: number) => all * ((t * odds) / (1 + t * odds)),
    up: (u: number) => ((all - u) / (u + 1)) * odds,
  }));
  const guess = ratioOfLayers(layers) ?? lowerScoreLimit(layers, level, false);
  return lowerTailLimit(counts, layers.cases, guess, level);
}
