import { readFileSync } from 'node:fs';
import type { Interval } from '../../src/stats/interval.ts';

/** Two limits as the makers print them: 25 digits, `null` where there is none. */
export type Pair = readonly [string | null, string | null];

/** A file of tests/fixtures/reference. */
export const fixture = <T>(name: string) =>
  JSON.parse(readFileSync(new URL(`../fixtures/reference/${name}`, import.meta.url), 'utf8')) as T;

/** The error of a limit relative to `scale`; infinite where one of the two has a limit and the other none. */
export function errorOf(
  limit: number | null,
  expected: string | null,
  scale = Math.abs(Number(expected)),
): number {
  if (limit === null || expected === null) return limit === expected ? 0 : Infinity;
  const gap = Math.abs(limit - Number(expected));
  return gap === 0 ? 0 : gap / scale;
}

/** The row with the largest error, so that a failure names its table. */
export function worst<T>(
  rows: readonly T[],
  error: (row: T) => number,
): { readonly row: T | undefined; readonly error: number } {
  let found: { row: T | undefined; error: number } = { row: rows[0], error: -1 };
  for (const row of rows) {
    const at = error(row);
    if (!(at <= found.error)) found = { row, error: at };
  }
  return found;
}

/** The larger error of the two limits. */
export const both = (interval: Interval, [low, high]: Pair) =>
  Math.max(errorOf(interval.low, low), errorOf(interval.high, high));

/** The larger error of two difference limits, in units of the larger of the limit and the interval's width. */
export function differenceError(interval: Interval, [low, high]: Pair): number {
  const width = Number(high) - Number(low);
  return Math.max(
    errorOf(interval.low, low, Math.max(Math.abs(Number(low)), width)),
    errorOf(interval.high, high, Math.max(Math.abs(Number(high)), width)),
  );
}
