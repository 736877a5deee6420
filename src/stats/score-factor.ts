import { ArgumentError, checkCases } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';
import type { TwoGroups } from './interval.ts';

/**
 * What the squared score statistic of two groups is held against: k = z^2 N/(N - 1), Miettinen & Nurminen's 1985 factor taken
 * to the other side. Also refuses groups that cannot be. N must be above 1: two groups of one person each are the smallest table.
 */
export function scoreThreshold(groups: TwoGroups, level: number): number {
  checkCases(groups.cases, groups.total);
  checkCases(groups.referenceCases, groups.referenceTotal);
  const z = criticalValue(level);
  const all = groups.total + groups.referenceTotal;
  if (!(all > 1)) {
    throw new ArgumentError('total-out-of-range', `two groups must hold more than one person, not ${all}`);
  }
  return (z * z * all) / (all - 1);
}

/** The two groups with their roles exchanged. */
export const swapped = ({ cases, total, referenceCases, referenceTotal }: TwoGroups): TwoGroups => ({
  cases: referenceCases,
  total: referenceTotal,
  referenceCases: cases,
  referenceTotal: total,
});
