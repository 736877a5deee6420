import type { TwoGroups } from './interval.ts';

/**
 * What a two-by-two table's first cell would be with the same margins and the odds ratio t: the fitted count of the group's
 * cases, and the variance 1/(sum of the reciprocals of the four fitted cells).
 *
 * Gart 1970 (Biometrika 57:471); Cornfield 1956. Each cell is a root of its own quadratic, written without a subtraction.
 */
export function fittedTable(
  { cases, total, referenceCases, referenceTotal }: TwoGroups,
  t: number,
): { readonly cases: number; readonly variance: number } {
  const all = cases + referenceCases;
  const others = total + referenceTotal - all;
  const own = fittedCell(total, all, referenceTotal, t);
  const reciprocals =
    1 / own +
    1 / fittedCell(total, others, referenceTotal, 1 / t) +
    1 / fittedCell(referenceTotal, all, total, 1 / t) +
    1 / fittedCell(referenceTotal, others, total, t);
  return { cases: own, variance: 1 / reciprocals };
}

/** The cell in a row of `row` and a column of `column`, the other row holding `otherRow`, at the odds ratio t. */
function fittedCell(row: number, column: number, otherRow: number, t: number): number {
  const b = t * (row + column) + (otherRow - column);
  const gap = t * (row - column) - (otherRow - column);
  const root = Math.sqrt(gap * gap + 4 * t * row * otherRow);
  // Below, b < 0 comes only with t < 1 and a column longer than the other row.
  return b >= 0 ? (2 * t * row * column) / (b + root) : (root - b) / (2 * (1 - t));
}
