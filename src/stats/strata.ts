import { ArgumentError, checkCases } from './argument-error.ts';
import type { TwoGroups } from './interval.ts';

/** Two groups, layer by layer. A layer in which one of the groups has nobody says nothing and drops out. */
export type Strata = readonly TwoGroups[];

/** The layers with people in both groups, checked. */
export function usableStrata(strata: Strata): Strata {
  for (const { cases, total, referenceCases, referenceTotal } of strata) {
    if (!(total === 0 && cases === 0)) checkCases(cases, total);
    if (!(referenceTotal === 0 && referenceCases === 0)) checkCases(referenceCases, referenceTotal);
  }
  const usable = strata.filter(({ total, referenceTotal }) => total > 0 && referenceTotal > 0);
  if (usable.length === 0) throw new ArgumentError('no-strata', 'no layer has people in both groups');
  if (!usable.every(({ total, referenceTotal }) => total + referenceTotal > 1)) {
    throw new ArgumentError('total-out-of-range', 'a layer must hold more than one person');
  }
  return usable;
}

/** The Mantel-Haenszel weight n1 n2/N of a layer. */
export const mantelHaenszelWeight = ({ total, referenceTotal }: TwoGroups) =>
  (total * referenceTotal) / (total + referenceTotal);

/** N/(N - 1). */
export const varianceFactor = ({ total, referenceTotal }: TwoGroups) =>
  (total + referenceTotal) / (total + referenceTotal - 1);

export const sumOver = <T>(items: readonly T[], value: (item: T) => number): number =>
  items.reduce((sum, item) => sum + value(item), 0);
