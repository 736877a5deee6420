import { ArgumentError } from './argument-error.ts';
import { exactLowerLimit } from './clopper-pearson-interval.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';

/**
 * Cases (or shares of cases) of two groups beside their coverages, the groups' shares of the population. Cases in [0, no end],
 * coverages in (0, 1), both ends left out; for two groups that are everybody the coverages add up to 1.
 */
export interface SharePair {
  readonly cases: number;
  readonly referenceCases: number;
  readonly coverage: number;
  readonly referenceCoverage: number;
}

/**
 * The ratio per person from cases and coverage: x1/x2 times c2/c1.
 *
 * @returns `null` where the reference group has no case
 *
 * Orenstein et al. 1985 (Bulletin of the World Health Organization 63:1055); Farrington 1993 has the same estimate.
 */
export function shareRatio(pair: SharePair): number | null {
  check(pair);
  const { cases, referenceCases, coverage, referenceCoverage } = pair;
  return referenceCases === 0 ? null : (cases * referenceCoverage) / (referenceCases * coverage);
}

/**
 * Score interval of that ratio, coverage taken as exact: the odds of the Wilson limits of x1 of (x1 + x2), times c2/c1.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group, no upper limit without cases in the reference
 * @throws ArgumentError for cases or coverages out of range
 *
 * The same interval is the score interval of a rate ratio with c = T1/(T1 + T2) (Miettinen & Nurminen 1985). Closed form on
 * the odds scale, never through p/(1 - p): A = 2 x1 x2 + z^2 n, B = z root(n(z^2 n + 4 x1 x2)), lower 2 x1^2/(A + B), upper
 * (A + B)/(2 x2^2). For three or more groups it is conditional on the pair. Accuracy: 1e-14 relative.
 */
export function shareRatioInterval(pair: SharePair, level: number): Interval {
  check(pair);
  const { cases, referenceCases, coverage, referenceCoverage } = pair;
  const z = criticalValue(level);
  const all = cases + referenceCases;
  const sum =
    2 * cases * referenceCases +
    z * z * all +
    z * Math.sqrt(all * (z * z * all + 4 * cases * referenceCases));
  const scale = referenceCoverage / coverage;
  return {
    low: cases === 0 ? 0 : ((2 * cases * cases) / sum) * scale,
    high: referenceCases === 0 ? null : (sum / (2 * referenceCases * referenceCases)) * scale,
  };
}

/**
 * Exact interval of that ratio: the Clopper-Pearson limits of x1 of (x1 + x2), carried through the odds.
 *
 * @throws ArgumentError for cases that are not whole or coverages out of range
 */
export function exactShareRatioInterval(pair: SharePair, level: number): Interval {
  check(pair);
  const { cases, referenceCases, coverage, referenceCoverage } = pair;
  if (cases + referenceCases === 0) return { low: 0, high: null };
  const scale = referenceCoverage / coverage;
  const all = cases + referenceCases;
  const own = exactLowerLimit(cases, all, level);
  // The upper limit of this group's share is what the other group's lower limit leaves.
  const other = exactLowerLimit(referenceCases, all, level);
  return {
    low: own.limit === 0 ? 0 : (own.limit / own.rest) * scale,
    high: other.limit === 0 ? null : (other.rest / other.limit) * scale,
  };
}

function check({ cases, referenceCases, coverage, referenceCoverage }: SharePair): void {
  if (!(cases >= 0 && referenceCases >= 0 && cases + referenceCases <= 1e15)) {
    throw new ArgumentError(
      'cases-out-of-range',
      `cases must be 0 or more, not ${cases} and ${referenceCases}`,
    );
  }
  if (!(coverage > 0 && coverage < 1 && referenceCoverage > 0 && referenceCoverage < 1)) {
    throw new ArgumentError(
      'coverage-out-of-range',
      `coverages must be above 0 and below 1, not ${coverage} and ${referenceCoverage}`,
    );
  }
}
