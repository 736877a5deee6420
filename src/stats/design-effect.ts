import { ArgumentError } from './argument-error.ts';
import type { TwoGroups } from './interval.ts';
import type { RatePair } from './rate-ratio.ts';
import type { SharePair } from './share-ratio.ts';

/**
 * Counts that come in clusters, as the counts that would carry the same information if they came singly: cases and totals
 * divided by the design effect. Estimates stay, intervals widen.
 *
 * @param designEffect 1 or above
 * @throws ArgumentError below 1 and for NaN
 *
 * Rao & Scott 1992 (Biometrics 48:577).
 */
export function groupsDividedByDesignEffect(groups: TwoGroups, designEffect: number): TwoGroups {
  check(designEffect);
  return {
    cases: groups.cases / designEffect,
    total: groups.total / designEffect,
    referenceCases: groups.referenceCases / designEffect,
    referenceTotal: groups.referenceTotal / designEffect,
  };
}

/** The same for rates: events and exposures divided by the design effect. */
export function ratesDividedByDesignEffect(rates: RatePair, designEffect: number): RatePair {
  check(designEffect);
  return {
    cases: rates.cases / designEffect,
    exposure: rates.exposure / designEffect,
    referenceCases: rates.referenceCases / designEffect,
    referenceExposure: rates.referenceExposure / designEffect,
  };
}

/** The same for cases beside coverages: coverages are no counts and stay. */
export function sharesDividedByDesignEffect(pair: SharePair, designEffect: number): SharePair {
  check(designEffect);
  return {
    ...pair,
    cases: pair.cases / designEffect,
    referenceCases: pair.referenceCases / designEffect,
  };
}

/** The design effect of clusters of one size m with the correlation rho inside them: 1 + (m - 1) rho (Kish 1965, Survey Sampling). */
export function designEffectOfClusters(size: number, correlation: number): number {
  if (!(size >= 1 && size < Infinity && correlation >= 0 && correlation <= 1)) {
    throw new ArgumentError(
      'cluster-out-of-range',
      `a cluster of ${size} with the correlation ${correlation} cannot be`,
    );
  }
  return 1 + (size - 1) * correlation;
}

/** The design effect of incidents that hit m1, m2, ... people each: sum m^2 / sum m (Kegler 2007). */
export function designEffectOfIncidents(sizes: readonly number[]): number {
  if (sizes.length === 0 || !sizes.every((size) => size >= 1 && size < Infinity)) {
    throw new ArgumentError('cluster-out-of-range', 'every incident must have hit at least one');
  }
  const sum = sizes.reduce((total, size) => total + size, 0);
  return sizes.reduce((total, size) => total + size * size, 0) / sum;
}

function check(designEffect: number): void {
  if (!(designEffect >= 1 && designEffect < Infinity)) {
    throw new ArgumentError(
      'design-effect-out-of-range',
      `a design effect must be 1 or more, not ${designEffect}`,
    );
  }
}
