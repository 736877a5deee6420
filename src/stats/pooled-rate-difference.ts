import { ArgumentError, checkExposure } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import { guardedDifference, outermostRoot } from './outermost-root.ts';
import { rateDifferenceInterval, swappedRates } from './rate-difference-interval.ts';
import type { RatePair } from './rate-ratio.ts';
import { sumOver } from './strata.ts';

/**
 * The rate difference pooled over layers with Mantel-Haenszel weights T1 T2/T, per unit of exposure.
 *
 * @throws ArgumentError for events or exposures out of range, or without a layer
 *
 * Greenland & Robins 1985 (Biometrics 41:55).
 */
export function pooledRateDifference(strata: readonly RatePair[]): number {
  check(strata);
  const weights = sumOver(strata, weightOf);
  return (
    sumOver(strata, ({ cases, exposure, referenceCases, referenceExposure }) => {
      const all = exposure + referenceExposure;
      return cases * (referenceExposure / all) - referenceCases * (exposure / all);
    }) / weights
  );
}

/**
 * Score interval of the pooled rate difference: sum w(r1 - r2 - d) over the root of sum w^2 V(d), V at the rates constrained to the
 * difference d in each layer. It excludes 0 exactly where the pooled rate ratio's interval excludes 1 (one test at 0).
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns both limits, always; the outermost roots where the statistic is not monotone, and where it rejects 0 itself those on
 *   the estimate's side of 0
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213), rates and section on strata. Accuracy: 1e-12 of the larger of the
 * limit and the width.
 */
export function pooledRateDifferenceInterval(strata: readonly RatePair[], level: number): Interval {
  check(strata);
  const [only] = strata;
  if (only !== undefined && strata.length === 1) return rateDifferenceInterval(only, level);
  const z = criticalValue(level);
  const high = -lowerLimit(strata.map(swappedRates), z);
  return { low: lowerLimit(strata, z), high: high === 0 ? 0 : high };
}

function lowerLimit(strata: readonly RatePair[], z: number): number {
  const estimate = pooledRateDifference(strata);
  const weights = sumOver(strata, weightOf);
  const growth = sumOver(strata, (pair) => weightOf(pair) ** 2 / pair.exposure);
  const score = (d: number) => {
    const variance = sumOver(strata, (pair) => weightOf(pair) ** 2 * constrainedVariance(pair, d));
    return guardedDifference({ gap: weights * (estimate - d), slope: weights }, { variance, growth }, z);
  };
  // From the estimate outward the variance grows by d/T2 at most: so far out, the score is above z.
  const outward = sumOver(strata, (pair) => weightOf(pair) ** 2 / pair.referenceExposure) / weights ** 2;
  const atEstimate = sumOver(
    strata,
    (pair) => (weightOf(pair) / weights) ** 2 * constrainedVariance(pair, estimate),
  );
  const far = score(0).value > 0 ? 0 : estimate - 2 * z * (z * outward + Math.sqrt(atEstimate));
  return outermostRoot(score, far, estimate) ?? estimate;
}

/** q1/T1 + q2/T2 at the rates constrained to q1 - q2 = d: the positive root of T q2^2 + (T d - x) q2 - x2 d = 0, d >= 0. */
function constrainedVariance(pair: RatePair, d: number): number {
  if (d < 0) return constrainedVariance(swappedRates(pair), -d);
  const { cases, exposure, referenceCases, referenceExposure } = pair;
  const all = exposure + referenceExposure;
  const b = cases + referenceCases - all * d;
  const root = Math.sqrt(b * b + 4 * all * referenceCases * d);
  const reference = b >= 0 ? (b + root) / (2 * all) : (2 * referenceCases * d) / (root - b);
  return (reference + d) / exposure + reference / referenceExposure;
}

const weightOf = ({ exposure, referenceExposure }: RatePair) =>
  (Math.min(exposure, referenceExposure) / (exposure + referenceExposure)) *
  Math.max(exposure, referenceExposure);

function check(strata: readonly RatePair[]): void {
  if (strata.length === 0) throw new ArgumentError('no-strata', 'there must be a layer');
  for (const { cases, exposure, referenceCases, referenceExposure } of strata) {
    checkExposure(cases, exposure);
    checkExposure(referenceCases, referenceExposure);
  }
}
