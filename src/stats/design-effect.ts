import { ArgumentError } from './argument-error.ts';

/**
 * Counts that come in clusters, as the counts that would carry the same information if they came singly: each divided by the
 * design effect. Estimates stay, intervals widen.
 *
 * @param counts cases, totals and exposures; never coverages, which stay as they are
 * @param designEffect 1 or above
 * @throws ArgumentError below 1 and for NaN
 *
 * Rao & Scott 1992 (Biometrics 48:577).
 */
export function dividedByDesignEffect(counts: readonly number[], designEffect: number): readonly number[] {
  if (!(designEffect >= 1 && designEffect < Infinity)) {
    throw new ArgumentError(
      'design-effect-out-of-range',
      `a design effect must be 1 or more, not ${designEffect}`,
    );
  }
  return designEffect === 1 ? counts : counts.map((count) => count / designEffect);
}
