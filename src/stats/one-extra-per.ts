import type { Interval } from './interval.ts';

/** One extra case for every K people, and its interval or, where the difference may be none, its two ranges through infinity. */
export interface OneExtraPer {
  /** 1/|difference|; `null` where the difference is 0. */
  readonly estimate: number | null;
  readonly interval: Interval | null;
  /** Where the difference's interval holds 0: one more for every K from `more.low` up, or one fewer from `fewer.low` up. */
  readonly ranges: { readonly more: Interval | null; readonly fewer: Interval | null } | null;
}

/**
 * @param difference risk or rate difference
 * @param limits its interval, or `null` where there is none
 *
 * Altman 1998 (BMJ 317:1309): the interval of a difference that spans 0 becomes two ranges, never one that leaves infinity out.
 */
export function oneExtraPer(difference: number, limits: Interval | null): OneExtraPer {
  const estimate = difference === 0 ? null : 1 / Math.abs(difference);
  const low = limits?.low ?? null;
  const high = limits?.high ?? null;
  if (low === null || high === null) return { estimate, interval: null, ranges: null };
  if (low > 0) return { estimate, interval: { low: 1 / high, high: 1 / low }, ranges: null };
  if (high < 0) return { estimate, interval: { low: -1 / low, high: -1 / high }, ranges: null };
  return {
    estimate,
    interval: null,
    ranges: {
      more: high > 0 ? { low: 1 / high, high: null } : null,
      fewer: low < 0 ? { low: -1 / low, high: null } : null,
    },
  };
}
