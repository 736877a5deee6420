import type { TwoGroups } from './interval.ts';

/**
 * What a two-by-two table's first cell would be with the same margins and the odds ratio t: the fitted count of the group's
 * cases, by how much the observed one exceeds it, and the variance 1/(sum of the reciprocals of the four fitted cells).
 *
 * Gart 1970 (Biometrika 57:471); Cornfield 1956. Each cell is a root of its own quadratic, written without a subtraction.
 */
export function fittedTable(
  { cases, total, referenceCases, referenceTotal }: TwoGroups,
  t: number,
): { readonly cases: number; readonly excess: number; readonly variance: number } {
  const all = cases + referenceCases;
  const others = total + referenceTotal - all;
  const own = fittedCell(total, all, referenceTotal, t);
  const cells = [
    { observed: cases, fitted: own, sign: 1 },
    { observed: total - cases, fitted: fittedCell(total, others, referenceTotal, 1 / t), sign: -1 },
    { observed: referenceCases, fitted: fittedCell(referenceTotal, all, total, 1 / t), sign: -1 },
    {
      observed: referenceTotal - referenceCases,
      fitted: fittedCell(referenceTotal, others, total, t),
      sign: 1,
    },
  ];
  // All cells differ by as much from what is fitted; the smallest keeps the digits of it.
  const { observed, fitted, sign } = cells.reduce((least, cell) =>
    cell.observed < least.observed ? cell : least,
  );
  return {
    cases: own,
    excess: sign * (observed - fitted),
    variance: 1 / cells.reduce((sum, cell) => sum + 1 / cell.fitted, 0),
  };
}

/** The cell in a row of `row` and a column of `column`, the other row holding `otherRow`, at the odds ratio t. */
function fittedCell(row: number, column: number, otherRow: number, t: number): number {
  const b = t * (row + column) + (otherRow - column);
  const gap = t * (row - column) - (otherRow - column);
  // Not the root of a sum of squares, which would overflow far from 1.
  const root = Math.hypot(gap, 2 * Math.sqrt(t * row * otherRow));
  // Below, b < 0 comes only with t < 1 and a column longer than the other row.
  return b >= 0 ? (2 * t * row * column) / (b + root) : (root - b) / (2 * (1 - t));
}
