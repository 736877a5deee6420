import { crossDifference } from './null-test.ts';
import { sumOver, usableStrata } from './strata.ts';
import type { Strata } from './strata.ts';

/**
 * The Cochran-Mantel-Haenszel statistic without correction, the one null test behind pooled risk ratio, risk difference and odds
 * ratio: (sum (x1 - n1 x/N))^2 over sum n1 n2 x y/(N^2 (N - 1)). 0 where no layer has both cases and others.
 *
 * @returns to be held against z^2; with one layer it is the (N-1) chi-squared
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Mantel & Haenszel 1959 (Journal of the National Cancer Institute 22:719).
 */
export function cochranMantelHaenszel(strata: Strata): number {
  const usable = usableStrata(strata);
  const excess = sumOver(
    usable,
    (groups) => crossDifference(groups) / (groups.total + groups.referenceTotal),
  );
  const variance = sumOver(usable, ({ cases, total, referenceCases, referenceTotal }) => {
    const all = total + referenceTotal;
    const allCases = cases + referenceCases;
    return (total / all) * (referenceTotal / all) * (allCases / (all - 1)) * (all - allCases);
  });
  return variance === 0 ? 0 : (excess * excess) / variance;
}
