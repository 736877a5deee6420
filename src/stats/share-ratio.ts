import { checkCaseCounts, checkCoverage } from './argument-error.ts';
import { caseOddsInterval, exactCaseOddsInterval, scaled } from './case-odds-interval.ts';
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
 * The same interval is the score interval of a rate ratio with c = T1/(T1 + T2) (Miettinen & Nurminen 1985). For
 * three or more groups it is conditional on the pair. Accuracy: 1e-14 relative.
 */
export function shareRatioInterval(pair: SharePair, level: number): Interval {
  check(pair);
  const { cases, referenceCases, coverage, referenceCoverage } = pair;
  return scaled(caseOddsInterval(cases, referenceCases, level), referenceCoverage / coverage);
}

/**
 * Exact interval of that ratio: the Clopper-Pearson limits of x1 of (x1 + x2), carried through the odds.
 *
 * @throws ArgumentError for cases that are not whole or coverages out of range
 */
export function exactShareRatioInterval(pair: SharePair, level: number): Interval {
  check(pair);
  const { cases, referenceCases, coverage, referenceCoverage } = pair;
  return scaled(exactCaseOddsInterval(cases, referenceCases, level), referenceCoverage / coverage);
}

function check({ cases, referenceCases, coverage, referenceCoverage }: SharePair): void {
  checkCaseCounts(cases, referenceCases);
  checkCoverage(coverage, referenceCoverage);
}
