import { ArgumentError, checkCaseCounts, checkCoverage } from './argument-error.ts';
import type { CaseLayers } from './case-layers.ts';
import type { Interval } from './interval.ts';
import { ratioOfLayers, scoreIntervalOfLayers } from './pooled-share-ratio.ts';
import { sumOver } from './strata.ts';

/** All cases of a period and the group's share of the population then. */
export interface Period {
  readonly allCases: number;
  readonly coverage: number;
}

/**
 * The ratio per person where coverage changed from period to period: the root of x1 = sum N t o/(1 + t o), N all cases of a
 * period and o the odds of its coverage. Only the total of the group's own cases is needed, and any course of the risk is allowed.
 *
 * @param cases the group's cases over all periods, in [0, sum of all cases]
 * @returns `null` where all cases are the group's
 * @throws ArgumentError for counts or coverages out of range
 *
 * Farrington 1993 (International Journal of Epidemiology 22:742).
 */
export function coverageByPeriodRatio(cases: number, periods: readonly Period[]): number | null {
  return ratioOfLayers(layersOf(cases, periods));
}

/** Score interval of that ratio, as for pooled shares. Accuracy: 1e-11 relative. */
export function coverageByPeriodInterval(cases: number, periods: readonly Period[], level: number): Interval {
  return scoreIntervalOfLayers(layersOf(cases, periods), level);
}

function layersOf(cases: number, periods: readonly Period[]): CaseLayers {
  for (const { allCases, coverage } of periods) {
    checkCaseCounts(allCases);
    checkCoverage(coverage);
  }
  const sum = sumOver(periods, ({ allCases }) => allCases);
  if (!(cases >= 0 && cases <= sum)) {
    throw new ArgumentError('cases-out-of-range', `cases must be within 0 and ${sum}, not ${cases}`);
  }
  return {
    cases,
    referenceCases: sum - cases,
    layers: periods
      .filter(({ allCases }) => allCases > 0)
      .map(({ allCases, coverage }) => ({ all: allCases, odds: coverage / (1 - coverage) })),
  };
}
