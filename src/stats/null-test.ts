import type { TwoGroups } from './interval.ts';

/** Which of two risks is higher. Decided by x1 n2 - x2 n1, in whole numbers where the inputs are whole. */
export type Comparison = 'higher' | 'lower' | 'same';

/**
 * x1 n2 - x2 n1: zero exactly where the two risks are the same. Whole inputs are multiplied as whole numbers, so that
 * 333333333 of 1e9 against 333333334 of 1000000003 is told apart; the result is the nearest double.
 */
export function crossDifference({ cases, total, referenceCases, referenceTotal }: TwoGroups): number {
  if ([cases, total, referenceCases, referenceTotal].every(Number.isSafeInteger)) {
    return Number(BigInt(cases) * BigInt(referenceTotal) - BigInt(referenceCases) * BigInt(total));
  }
  return cases * referenceTotal - referenceCases * total;
}

/** Whether the first group's risk is higher than, lower than or the same as the reference group's. */
export function comparison(groups: TwoGroups): Comparison {
  const difference = crossDifference(groups);
  return difference > 0 ? 'higher' : difference < 0 ? 'lower' : 'same';
}

/**
 * The (N-1) chi-squared of a two-by-two table: the one null test behind risk ratio, risk difference and odds ratio. Each of
 * their intervals excludes "no difference" exactly where this exceeds z squared.
 *
 * (N - 1)(x1 n2 - x2 n1)^2 / (n1 n2 (x1 + x2)(y1 + y2)), N the people in both groups. 0 where nobody or everybody is a case.
 * Campbell 2007 (Statistics in Medicine 26:3661).
 */
export function nMinusOneChiSquared(groups: TwoGroups): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const all = total + referenceTotal;
  const allCases = cases + referenceCases;
  if (allCases === 0 || allCases === all) return 0;
  const difference = crossDifference(groups);
  return ((difference / total / referenceTotal) * (difference / allCases) * (all - 1)) / (all - allCases);
}

/** The score statistic of shares and rates, squared: (x1 - nc)^2 / (nc(1 - c)), n all cases, c the first group's part of both coverages. */
export function shareScoreStatistic(cases: number, referenceCases: number, coverageOfPair: number): number {
  const all = cases + referenceCases;
  if (all === 0) return 0;
  const excess = cases - all * coverageOfPair;
  return (excess * excess) / (all * coverageOfPair * (1 - coverageOfPair));
}
