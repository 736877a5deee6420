import { constrainedRatio } from './constrained-ratio.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import type { Guarded } from './outermost-root.ts';
import { outermostRoot, smallestRoot } from './outermost-root.ts';
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
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213), section on strata. The statistic is not always monotone, as where one
 * layer is all cases: the limits are the outermost roots, but where the statistic rejects 1 itself, those on the estimate's side of
 * 1, so that no reading contradicts another. Accuracy: 1e-12 relative.
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
  const score = (logRatio: number): Guarded => {
    const t = Math.exp(logRatio);
    let [variance, atMost] = [0, 0];
    for (const { groups, weight } of weighted) {
      const constrained = constrainedRatio(groups, t);
      variance += weight * constrained.variance;
      atMost += (weight * constrained.risk * t) / groups.referenceTotal;
    }
    const value = own - t * reference - z * Math.sqrt(variance);
    // With the ratio times s the variance is at most s(variance - atMost) + s^2 atMost, as q1 grows and q2 falls.
    const factor = smallestRoot(
      (t * reference) ** 2 - z * z * atMost,
      2 * own * t * reference + z * z * (variance - atMost),
      own * own,
    );
    return { value, step: Math.log(factor) };
  };
  const far = score(0).value > 0 ? 0 : -600;
  const root = outermostRoot(score, far, reference === 0 ? 600 : Math.log(own / reference));
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
