import { constrainedDifferenceVariance } from './constrained-difference.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import { crossDifference } from './null-test.ts';
import { guardedDifference, outermostRoot } from './outermost-root.ts';
import { riskDifferenceInterval } from './risk-difference-interval.ts';
import { swapped } from './score-factor.ts';
import { mantelHaenszelWeight, sumOver, usableStrata, varianceFactor } from './strata.ts';
import type { Strata } from './strata.ts';

/**
 * The risk difference pooled over layers with Mantel-Haenszel weights n1 n2/N.
 *
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Mantel & Haenszel 1959 weights; Greenland & Robins 1985 (Biometrics 41:55) for the difference.
 */
export function pooledRiskDifference(strata: Strata): number {
  return pooled(usableStrata(strata));
}

/**
 * Score interval of the pooled risk difference: S(d) = sum w(p1 - p2 - d) over the root of sum w^2 f V(d), V at the estimates
 * constrained to the difference d in each layer, f = N/(N - 1). At d = 0 it is the Cochran-Mantel-Haenszel statistic without
 * correction; with one layer it is the plain interval.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns both limits, within [-1, 1]
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213), section on strata; Klingenberg 2014 (Statistics in Medicine 33:2968).
 * Outermost roots, on the estimate's side of 0 where the statistic rejects 0: see pooled-risk-ratio.ts. Accuracy: 1e-12 of the
 * larger of the limit and the width.
 */
export function pooledRiskDifferenceInterval(strata: Strata, level: number): Interval {
  const usable = usableStrata(strata);
  const [only] = usable;
  if (only !== undefined && usable.length === 1) return riskDifferenceInterval(only, level);
  const z = criticalValue(level);
  const high = -lowerLimit(usable.map(swapped), z);
  return { low: lowerLimit(usable, z), high: high === 0 ? 0 : high };
}

function lowerLimit(strata: Strata, z: number): number {
  const estimate = pooled(strata);
  const weights = sumOver(strata, mantelHaenszelWeight);
  const weighted = strata.map((groups) => ({
    groups,
    weight: mantelHaenszelWeight(groups) ** 2 * varianceFactor(groups),
  }));
  // A step in d moves the two risks by no more than itself together, and q(1 - q) by no more than q moves.
  const growth = sumOver(
    weighted,
    ({ groups, weight }) => weight / Math.min(groups.total, groups.referenceTotal),
  );
  const score = (d: number) => {
    const variance = sumOver(
      weighted,
      ({ groups, weight }) => weight * constrainedDifferenceVariance(groups, d),
    );
    return guardedDifference({ gap: weights * (estimate - d), slope: weights }, { variance, growth }, z);
  };
  return outermostRoot(score, score(0).value > 0 ? 0 : -1, estimate) ?? estimate;
}

const pooled = (strata: Strata) =>
  sumOver(strata, (groups) => crossDifference(groups) / (groups.total + groups.referenceTotal)) /
  sumOver(strata, mantelHaenszelWeight);
