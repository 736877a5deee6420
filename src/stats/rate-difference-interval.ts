import { checkExposure } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import type { RatePair } from './rate-ratio.ts';

/** The rate difference x1/T1 - x2/T2, per unit of exposure. */
export function rateDifference({ cases, exposure, referenceCases, referenceExposure }: RatePair): number {
  checkExposure(cases, exposure);
  checkExposure(referenceCases, referenceExposure);
  // Divided in an order that does not change with the groups' roles, so that swapping them changes the sign and no digit.
  return (
    (cases * referenceExposure - referenceCases * exposure) /
    Math.max(exposure, referenceExposure) /
    Math.min(exposure, referenceExposure)
  );
}

/**
 * Score interval of the rate difference, per unit of exposure.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns both limits, always
 * @throws ArgumentError for events or exposures out of range
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213), solved for the multiplier m of the constrained maximum: the root in
 * (0, T2) of m^2 [x1/(T1(T1 + m)) + x2/(T2(T2 - m))] = z^2; the limit is the estimate minus m times the bracket. Without
 * events in the reference and without a root, the reference rate is 0 < q2 at the limit and the closed form holds. The upper
 * limit is minus the lower limit of the swapped groups. It excludes 0 exactly where the rate ratio's interval excludes 1.
 * Accuracy: 1e-12 of the larger of the limit and the interval's width.
 */
export function rateDifferenceInterval(pair: RatePair, level: number): Interval {
  const estimate = rateDifference(pair);
  const z = criticalValue(level);
  const high = -(lowerDistance(swappedRates(pair), z) + -estimate);
  return { low: estimate + lowerDistance(pair, z), high: high === 0 ? 0 : high };
}

/** The two groups with their roles exchanged. */
export const swappedRates = ({ cases, exposure, referenceCases, referenceExposure }: RatePair): RatePair => ({
  cases: referenceCases,
  exposure: referenceExposure,
  referenceCases: cases,
  referenceExposure: exposure,
});

/** How far the lower limit lies from the estimate; negative or 0. */
function lowerDistance({ cases, exposure, referenceCases, referenceExposure }: RatePair, z: number): number {
  const variance = (m: number) =>
    cases / (exposure * (exposure + m)) +
    (referenceCases === 0 ? 0 : referenceCases / (referenceExposure * (referenceExposure - m)));
  const excess = (m: number) => m * m * variance(m) - z * z;
  if (referenceCases === 0) {
    const atEnd = excess(referenceExposure);
    if (atEnd < 0) {
      // m stops at T2 and the reference group's rate takes up the rest.
      const own = referenceExposure * variance(referenceExposure);
      return -own + atEnd / referenceExposure;
    }
    const m = bracketedRoot(excess, 0, referenceExposure, -z * z, atEnd);
    return -m * variance(m);
  }
  const m = bracketedRoot(excess, 0, referenceExposure, -z * z, Infinity);
  return -m * variance(m);
}
