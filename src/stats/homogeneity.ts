import type { RatePair } from './rate-ratio.ts';
import type { SharePair } from './share-ratio.ts';
import { constrainedRatio } from './constrained-ratio.ts';
import { chiSquaredUpperTail } from './gamma-tail.ts';
import { pooledRateRatio, pooledShareRatio } from './pooled-share-ratio.ts';
import { pooledRiskRatio } from './pooled-risk-ratio.ts';
import { deviance } from './saddle-point.ts';
import { sumOver, usableStrata, varianceFactor } from './strata.ts';
import type { Strata } from './strata.ts';

/** A test statistic that is about chi-squared where all is alike. Both tests miss most real differences between layers. */
export interface ChiSquaredTest {
  readonly statistic: number;
  readonly degrees: number;
  readonly pValue: number;
}

/**
 * Are the layers' risk ratios alike? Q = sum (p1 - R p2)^2/(f V) at the pooled risk ratio R, on one degree of freedom less than
 * there are layers; V at the risks constrained to R, f = N/(N - 1).
 *
 * @returns `null` for fewer than two layers that say anything, or where R is 0 or undefined
 * @throws ArgumentError for counts out of range
 *
 * Gart & Nam 1988 (Biometrics 44:323), there without f.
 */
export function riskRatioHomogeneity(strata: Strata): ChiSquaredTest | null {
  const usable = usableStrata(strata).filter(({ cases, referenceCases }) => cases + referenceCases > 0);
  const ratio = pooledRiskRatio(strata);
  if (usable.length < 2 || ratio === null || ratio === 0) return null;
  const statistic = sumOver(usable, (groups) => {
    const { cases, total, referenceCases, referenceTotal } = groups;
    const gap = cases / total - ratio * (referenceCases / referenceTotal);
    return gap === 0 ? 0 : (gap * gap) / (constrainedRatio(groups, ratio).variance * varianceFactor(groups));
  });
  return testOf(statistic, usable.length - 1);
}

/**
 * Are the layers' ratios from shares and coverages alike? The deviance of the pooled ratio.
 *
 * @returns `null` for fewer than two layers with cases, or where the pooled ratio is 0 or has no upper end
 *
 * Farrington 1993 (International Journal of Epidemiology 22:742).
 */
export function shareRatioHomogeneity(strata: readonly SharePair[]): ChiSquaredTest | null {
  return devianceTest(
    strata.map(({ cases, referenceCases, coverage, referenceCoverage }) => ({
      cases,
      referenceCases,
      odds: coverage / referenceCoverage,
    })),
    pooledShareRatio(strata),
  );
}

/** The same for rates. */
export function rateRatioHomogeneity(strata: readonly RatePair[]): ChiSquaredTest | null {
  return devianceTest(
    strata.map(({ cases, referenceCases, exposure, referenceExposure }) => ({
      cases,
      referenceCases,
      odds: exposure / referenceExposure,
    })),
    pooledRateRatio(strata),
  );
}

function devianceTest(
  layers: readonly { readonly cases: number; readonly referenceCases: number; readonly odds: number }[],
  ratio: number | null,
): ChiSquaredTest | null {
  const usable = layers.filter(({ cases, referenceCases }) => cases + referenceCases > 0);
  if (usable.length < 2 || ratio === null || ratio === 0) return null;
  const statistic = sumOver(usable, ({ cases, referenceCases, odds }) => {
    const all = cases + referenceCases;
    const own = (all * ratio * odds) / (1 + ratio * odds);
    const other = all / (1 + ratio * odds);
    return 2 * (part(cases, own) + part(referenceCases, other));
  });
  return testOf(statistic, usable.length - 1);
}

// x ln(x/e) + e - x; what is added sums to 0 over a layer, and without it the parts of a rare and a common count would cancel.
const part = (observed: number, expected: number) =>
  observed === 0 ? expected : deviance(observed, expected);

function testOf(statistic: number, degrees: number): ChiSquaredTest {
  return { statistic, degrees, pValue: chiSquaredUpperTail(statistic, degrees) };
}
