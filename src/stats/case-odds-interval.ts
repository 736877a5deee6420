import { exactLowerLimit } from './clopper-pearson-interval.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';

/**
 * Score interval of the odds x1 : x2 at which a case falls to the first of two groups: the Wilson limits of x1 of (x1 + x2), on
 * the odds scale. Ratios from shares of cases and rate ratios are these odds times what the groups' sizes give.
 *
 * @param cases, referenceCases 0 or above; need not be whole
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference
 *
 * Wilson 1927 (JASA 22:209). Closed form, never through p/(1 - p): A = 2 x1 x2 + z^2 n, B = z root(n(z^2 n + 4 x1 x2)), lower
 * 2 x1^2/(A + B), upper (A + B)/(2 x2^2). Accuracy: 1e-14 relative.
 */
export function caseOddsInterval(cases: number, referenceCases: number, level: number): Interval {
  const z = criticalValue(level);
  const all = cases + referenceCases;
  const sum =
    2 * cases * referenceCases +
    z * z * all +
    z * Math.sqrt(all * (z * z * all + 4 * cases * referenceCases));
  return {
    low: cases === 0 ? 0 : (2 * cases * cases) / sum,
    high: referenceCases === 0 ? null : sum / (2 * referenceCases * referenceCases),
  };
}

/** Exact interval of the same odds: the Clopper-Pearson limits of x1 of (x1 + x2). Whole numbers only. */
export function exactCaseOddsInterval(cases: number, referenceCases: number, level: number): Interval {
  const all = cases + referenceCases;
  if (all === 0) return { low: 0, high: null };
  const own = exactLowerLimit(cases, all, level);
  // The upper limit of this group's share is what the other group's lower limit leaves.
  const other = exactLowerLimit(referenceCases, all, level);
  return {
    low: own.limit === 0 ? 0 : own.limit / own.rest,
    high: other.limit === 0 ? null : other.rest / other.limit,
  };
}

/** Both limits times a positive factor. */
export const scaled = ({ low, high }: Interval, factor: number): Interval => ({
  low: low === null ? null : low * factor,
  high: high === null ? null : high * factor,
});
