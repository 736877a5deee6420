import { checkCaseCounts, checkCoverage, checkExposure } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { criticalValue } from './critical-value.ts';
import { guardedCounts, outermostRoot } from './outermost-root.ts';
import type { RatePair } from './rate-ratio.ts';
import type { SharePair } from './share-ratio.ts';
import { sumOver } from './strata.ts';

/** All cases of a layer, and the odds at which one falls to the group if the ratio is 1: coverages or exposures, c : c'. */
export interface CaseLayer {
  readonly all: number;
  readonly odds: number;
}

/** Cases by layer with the total that fell to each group: all that the pooled ratio of shares or rates needs. */
export interface CaseLayers {
  readonly cases: number;
  readonly referenceCases: number;
  /** Layers without a case are left out. */
  readonly layers: readonly CaseLayer[];
}

/** Layers of cases and coverages. */
export function layersOfShares(strata: readonly SharePair[]): CaseLayers {
  for (const { cases, referenceCases, coverage, referenceCoverage } of strata) {
    checkCaseCounts(cases, referenceCases);
    checkCoverage(coverage, referenceCoverage);
  }
  return layersOf(
    strata.map(({ cases, referenceCases, coverage, referenceCoverage }) => ({
      cases,
      referenceCases,
      odds: coverage / referenceCoverage,
    })),
  );
}

/** Layers of events and exposures. */
export function layersOfRates(strata: readonly RatePair[]): CaseLayers {
  for (const { cases, referenceCases, exposure, referenceExposure } of strata) {
    checkExposure(cases, exposure);
    checkExposure(referenceCases, referenceExposure);
  }
  return layersOf(
    strata.map(({ cases, referenceCases, exposure, referenceExposure }) => ({
      cases,
      referenceCases,
      odds: exposure / referenceExposure,
    })),
  );
}

function layersOf(
  strata: readonly { readonly cases: number; readonly referenceCases: number; readonly odds: number }[],
): CaseLayers {
  return {
    cases: sumOver(strata, ({ cases }) => cases),
    referenceCases: sumOver(strata, ({ referenceCases }) => referenceCases),
    layers: strata
      .map(({ cases, referenceCases, odds }) => ({ all: cases + referenceCases, odds }))
      .filter(({ all }) => all > 0),
  };
}

/** The two groups with their roles exchanged. */
export const swappedLayers = ({ cases, referenceCases, layers }: CaseLayers): CaseLayers => ({
  cases: referenceCases,
  referenceCases: cases,
  layers: layers.map(({ all, odds }) => ({ all, odds: 1 / odds })),
});

/** How many more cases the group has than the ratio t would give it, and the binomial variance of its cases. */
export function caseExcess(
  { cases, layers }: CaseLayers,
  t: number,
): { readonly gap: number; readonly variance: number } {
  // Where most cases fall to the group, what falls to the other is subtracted, so that a small rest keeps its digits.
  let whole = cases;
  let parts = 0;
  let variance = 0;
  for (const { all, odds } of layers) {
    const own = (t * odds) / (1 + t * odds);
    const other = 1 / (1 + t * odds);
    if (own > 0.5) {
      whole -= all;
      parts += all * other;
    } else {
      parts -= all * own;
    }
    variance += all * own * other;
  }
  return { gap: whole + parts, variance };
}

/** The log of the ratio at which the group has as many cases as expected; both groups must have a case. */
export function logRatioOfLayers(layers: CaseLayers): number {
  const gap = (logRatio: number) => -caseExcess(layers, Math.exp(logRatio)).gap;
  const start = Math.log(layers.cases / layers.referenceCases);
  // The root lies between the ratios that the layers' odds would give one by one.
  const at = layers.layers.map(({ odds }) => start - Math.log(odds));
  let [low, high] = [Math.min(...at), Math.max(...at)];
  for (let step = 1e-12; gap(low) > 0; step *= 2) low -= step;
  for (let step = 1e-12; gap(high) < 0; step *= 2) high += step;
  return low === high ? low : bracketedRoot(gap, low, high);
}

/**
 * The lower score limit of the ratio: the outermost root.
 *
 * @param ownSide where the score rejects a ratio of 1, only the estimate's side of 1 is searched
 */
export function lowerScoreLimit(layers: CaseLayers, level: number, ownSide: boolean): number {
  const z = criticalValue(level);
  if (layers.cases === 0) return 0;
  const score = (logRatio: number) => {
    const { gap, variance } = caseExcess(layers, Math.exp(logRatio));
    return guardedCounts(gap, variance, z);
  };
  const far = ownSide && score(0).value > 0 ? 0 : -600;
  const root = outermostRoot(score, far, layers.referenceCases === 0 ? 600 : logRatioOfLayers(layers));
  return root === null ? 0 : Math.exp(root);
}
