import { checkCaseCounts } from './argument-error.ts';
import type { Interval } from './interval.ts';

/** What cases of unknown group can do to an estimate. */
export interface UnknownGroupBounds {
  /** If the unknown cases split like the known ones; `null` where nothing is known to split by, or undefined. */
  readonly likeTheKnown: number | null;
  /** The estimate with all unknown cases in the reference group, and with all of them in the other. `null`: no end there. */
  readonly estimates: Interval;
  /** The outermost limits of the two: what chance may add. */
  readonly limits: Interval;
}

/**
 * Worst-case bounds for cases whose group is unknown: all to one side, then to the other.
 *
 * @param cases, referenceCases, unknown 0 or above
 * @param estimate of the two counts of cases, increasing in the first and decreasing in the second
 * @param interval likewise
 * @throws ArgumentError for counts out of range
 *
 * Horowitz & Manski 2000 (JASA 95:77).
 */
export function unknownGroupBounds(
  { cases, referenceCases, unknown }: Record<'cases' | 'referenceCases' | 'unknown', number>,
  estimate: (cases: number, referenceCases: number) => number | null,
  interval: (cases: number, referenceCases: number) => Interval,
): UnknownGroupBounds {
  checkCaseCounts(cases, referenceCases, unknown);
  const known = cases + referenceCases;
  const part = (own: number) => own + (unknown * own) / known;
  return {
    likeTheKnown: known === 0 ? null : estimate(part(cases), part(referenceCases)),
    estimates: {
      low: estimate(cases, referenceCases + unknown),
      high: estimate(cases + unknown, referenceCases),
    },
    limits: {
      low: interval(cases, referenceCases + unknown).low,
      high: interval(cases + unknown, referenceCases).high,
    },
  };
}
