import type { Reading } from './reading.ts';

/** The pooled ratio and the crude one of a pair of groups, where there are both. */
export function pooledAndCrude(
  readings: readonly Reading[],
  of: number,
): { readonly pooled: number | null; readonly crude: number | null } {
  const find = (ids: readonly Reading['id'][]) =>
    readings.find((each) => ids.includes(each.id) && each.of === of)?.estimate ?? null;
  return {
    pooled: find(['pooled-risk-ratio', 'pooled-rate-ratio']),
    crude: find(['crude-risk-ratio', 'crude-rate-ratio']),
  };
}

/** Whether the ratio lies on one side of 1 in every layer and on the other all together (Bickel et al. 1975; Julious & Mullee 1994). */
export function isReversed(readings: readonly Reading[], of: number): boolean {
  const { crude } = pooledAndCrude(readings, of);
  const within = readings
    .filter((each) => each.layer !== null && each.of === of)
    .map(({ estimate, unbounded }) => (unbounded ? Infinity : estimate));
  if (crude === null || crude === 1 || within.length < 2) return false;
  return within.every((ratio) => ratio !== null && (crude > 1 ? ratio < 1 : ratio > 1));
}
