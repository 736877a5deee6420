import { ArgumentError, checkCaseCounts, checkCoverage } from './argument-error.ts';
import type { CaseLayers } from './case-layers.ts';
import type { Interval } from './interval.ts';
import { ratioOfLayers, scoreIntervalOfLayers } from './pooled-share-ratio.ts';
import { sumOver } from './strata.ts';

/** All cases of a period, 0 or above, and the group's share of the population then, in [0, 1]. */
export interface Period {
  readonly allCases: number;
  readonly coverage: number;
}

/**
 * The ratio per person where coverage changed from period to period: the root of x1 = sum N t o/(1 + t o), N all cases of a
 * period and o the odds of its coverage. Only the total of the group's own cases is needed, and any course of the risk is allowed.
 *
 * A period in which nobody or everybody belonged to the group says nothing about the ratio: it drops out with its cases, which
 * then were the reference group's or the group's.
 *
 * @param cases the group's cases over all periods: at least those of the periods with coverage 1, at most those of all with
 *   coverage above 0
 * @returns `null` where the reference group has no case in the other periods
 * @throws ArgumentError for counts or coverages out of range
 *
 * Farrington 1993 (International Journal of Epidemiology 22:742).
 */
export function coverageByPeriodRatio(cases: number, periods: readonly Period[]): number | null {
  return ratioOfLayers(layersOf(cases, periods));
}

/**
 * Score interval of that ratio, as for pooled shares.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference; the outermost roots where
 *   the equation has several
 *
 * Accuracy: 1e-12 relative. With one coverage in all periods it is the interval of share-ratio.ts.
 */
export function coverageByPeriodInterval(cases: number, periods: readonly Period[], level: number): Interval {
  return scoreIntervalOfLayers(layersOf(cases, periods), level);
}

function layersOf(cases: number, periods: readonly Period[]): CaseLayers {
  for (const { allCases, coverage } of periods) {
    checkCaseCounts(allCases);
    if (coverage !== 0 && coverage !== 1) checkCoverage(coverage);
  }
  const telling = periods.filter(({ allCases, coverage }) => allCases > 0 && coverage > 0 && coverage < 1);
  const most = sumOver(telling, ({ allCases }) => allCases);
  const certain = sumOver(periods, ({ allCases, coverage }) => (coverage === 1 ? allCases : 0));
  if (!(cases >= certain && cases <= certain + most)) {
    throw new ArgumentError(
      'cases-out-of-range',
      `cases must be within ${certain} and ${certain + most}, not ${cases}`,
    );
  }
  return {
    cases: cases - certain,
    referenceCases: certain + most - cases,
    layers: telling.map(({ allCases, coverage }) => ({ all: allCases, odds: coverage / (1 - coverage) })),
  };
}
