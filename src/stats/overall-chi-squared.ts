import { ArgumentError, checkCaseCounts, checkCases, checkCoverage } from './argument-error.ts';
import { chiSquaredUpperTail } from './gamma-tail.ts';
import type { ChiSquaredTest } from './homogeneity.ts';
import { sumOver } from './strata.ts';

/** Cases among a group's total. */
export interface GroupCases {
  readonly cases: number;
  readonly total: number;
}

/**
 * Do the risks of several groups differ at all? Pearson's chi-squared times (N - 1)/N, on one degree of freedom less than there
 * are groups; with two groups it is the (N-1) chi-squared of the pairs.
 *
 * @param groups two or more, cases in [0, total]
 * @throws ArgumentError for counts out of range or fewer than two groups
 *
 * Pearson 1900; the factor as in Campbell 2007 (Statistics in Medicine 26:3661). Asked first, before the pairs: of 12 equal groups
 * the highest against the lowest excludes 1 in 72% of data sets.
 */
export function overallChiSquared(groups: readonly GroupCases[]): ChiSquaredTest {
  groups.forEach(({ cases, total }) => {
    checkCases(cases, total);
  });
  const all = sumOver(groups, ({ total }) => total);
  const allCases = sumOver(groups, ({ cases }) => cases);
  const others = sumOver(groups, ({ cases, total }) => total - cases);
  // Cases and others lie as far from what is expected; the rarer of the two keeps its digits.
  const [rare, of] = allCases <= others ? [allCases, casesOf] : [others, othersOf];
  const gaps = sumOver(groups, (group) => (of(group) - group.total * (rare / all)) ** 2 / group.total);
  const statistic = rare === 0 ? 0 : (gaps / rare) * (all / (all - rare)) * (all - 1);
  return testOf(statistic, groups.length);
}

/**
 * Do the risks per person of several groups differ at all, from their cases and shares of the population (or exposures)?
 * sum (x - n s)^2/(n s), s the group's part of all coverages; with two groups it is the square of the shares' score statistic.
 *
 * @param groups two or more, sizes above 0 in one unit
 */
export function overallShareChiSquared(
  groups: readonly { readonly cases: number; readonly size: number }[],
): ChiSquaredTest {
  checkCaseCounts(...groups.map(({ cases }) => cases));
  const all = sumOver(groups, ({ cases }) => cases);
  const sizes = sumOver(groups, ({ size }) => size);
  if (groups.length > 1) checkCoverage(...groups.map(({ size }) => size / sizes));
  const statistic =
    all === 0
      ? 0
      : sumOver(groups, ({ cases, size }) => {
          const expected = (all * size) / sizes;
          return (cases - expected) ** 2 / expected;
        });
  return testOf(statistic, groups.length);
}

const casesOf = ({ cases }: GroupCases) => cases;
const othersOf = ({ cases, total }: GroupCases) => total - cases;

function testOf(statistic: number, groups: number): ChiSquaredTest {
  if (groups < 2) throw new ArgumentError('too-few-groups', 'there must be two groups or more');
  return { statistic, degrees: groups - 1, pValue: chiSquaredUpperTail(statistic, groups - 1) };
}
