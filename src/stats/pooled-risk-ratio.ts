import { constrainedRatio } from './constrained-ratio.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import { outermostRoot, upTo } from './outermost-root.ts';
import { riskRatioInterval } from './risk-ratio-interval.ts';
import { swapped } from './score-factor.ts';
import { mantelHaenszelWeight, sumOver, usableStrata, varianceFactor } from './strata.ts';
import type { Strata } from './strata.ts';

/**
 * The risk ratio pooled over layers with Mantel-Haenszel weights: sum x1 n2/N over sum x2 n1/N.
 *
 * @returns `null` where no layer has a case in the reference group
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Mantel & Haenszel 1959 (Journal of the National Cancer Institute 22:719); for risks Nurminen 1981.
 */
export function pooledRiskRatio(strata: Strata): number | null {
  const { own, reference } = sums(usableStrata(strata));
  return reference === 0 ? null : own / reference;
}

/**
 * Score interval of the pooled risk ratio: S(t) = sum w(p1 - t p2) over the root of sum w^2 f V(t), V at the estimates
 * constrained to the ratio t in each layer, f = N/(N - 1). At t = 1 it is the Cochran-Mantel-Haenszel statistic without
 * correction; with one layer it is the plain interval.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference; the outermost roots where
 *   the statistic is not monotone (layers with groups under 5)
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213), section on strata. Accuracy: 1e-11 relative.
 */
export function pooledRiskRatioInterval(strata: Strata, level: number): Interval {
  const usable = usableStrata(strata);
  const [only] = usable;
  if (only !== undefined && usable.length === 1) return riskRatioInterval(only, level);
  const z = criticalValue(level);
  const mirrored = lowerLimit(usable.map(swapped), z);
  return { low: lowerLimit(usable, z), high: mirrored === 0 ? null : 1 / mirrored };
}

function lowerLimit(strata: Strata, z: number): number {
  const { own, reference } = sums(strata);
  if (own === 0) return 0;
  const weighted = strata.map((groups) => ({
    groups,
    weight: mantelHaenszelWeight(groups) ** 2 * varianceFactor(groups),
  }));
  const excess = (logRatio: number) => {
    const t = Math.exp(logRatio);
    const variance = sumOver(weighted, ({ groups, weight }) => weight * constrainedRatio(groups, t).variance);
    return own - t * reference - z * Math.sqrt(variance);
  };
  // Without a case in the reference the estimate has no upper end; one case more gives a centre.
  const centre = Math.log(own / (reference === 0 ? own : reference));
  const root = outermostRoot(excess, upTo(centre));
  return root === null ? 0 : Math.exp(root);
}

const sums = (strata: Strata) => ({
  own: sumOver(
    strata,
    ({ cases, total, referenceTotal }) => cases * (referenceTotal / (total + referenceTotal)),
  ),
  reference: sumOver(
    strata,
    ({ referenceCases, total, referenceTotal }) => referenceCases * (total / (total + referenceTotal)),
  ),
});
