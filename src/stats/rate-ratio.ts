import { checkExposure } from './argument-error.ts';
import { caseOddsInterval, exactCaseOddsInterval, scaled } from './case-odds-interval.ts';
import type { Interval } from './interval.ts';

/** Events over exposures in a group and in its reference group. Events 0 or above, exposures above 0, in one unit. */
export interface RatePair {
  readonly cases: number;
  readonly exposure: number;
  readonly referenceCases: number;
  readonly referenceExposure: number;
}

/** The rate ratio (x1/T1)/(x2/T2); `null` where the reference group has no event. */
export function rateRatio(pair: RatePair): number | null {
  check(pair);
  const { cases, exposure, referenceCases, referenceExposure } = pair;
  return referenceCases === 0 ? null : (cases / referenceCases) * (referenceExposure / exposure);
}

/**
 * Score interval of the rate ratio: the odds of the Wilson limits of x1 of (x1 + x2), times T2/T1.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without events in the group, no upper limit without events in the reference
 * @throws ArgumentError for events or exposures out of range
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213). Accuracy: 1e-14 relative.
 */
export function rateRatioInterval(pair: RatePair, level: number): Interval {
  check(pair);
  return scaled(
    caseOddsInterval(pair.cases, pair.referenceCases, level),
    pair.referenceExposure / pair.exposure,
  );
}

/** Exact conditional interval of the rate ratio, central, from the Clopper-Pearson limits of the same share; whole events only. */
export function exactRateRatioInterval(pair: RatePair, level: number): Interval {
  check(pair);
  return scaled(
    exactCaseOddsInterval(pair.cases, pair.referenceCases, level),
    pair.referenceExposure / pair.exposure,
  );
}

function check({ cases, exposure, referenceCases, referenceExposure }: RatePair): void {
  checkExposure(cases, exposure);
  checkExposure(referenceCases, referenceExposure);
}
