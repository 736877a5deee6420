import type { Interval } from '../stats/interval.ts';

/** Two limits; `null` where there is none on that side. */
export type Limits = Interval;

/** What a reading measures. The ids are fixed: other programs lean on them. */
export type ReadingId =
  | 'risk'
  | 'risk-difference'
  | 'risk-ratio'
  | 'relative-change'
  | 'odds-ratio'
  | 'extra-cases'
  | 'one-extra-per'
  | 'case-share'
  | 'population-share'
  | 'break-even-coverage'
  | 'attributable-fraction'
  | 'prevented-fraction'
  | 'population-attributable-fraction'
  | 'count-ratio'
  | 'percentage-ratio'
  | 'percentage-difference'
  | 'hidden-cause-strength'
  | AlarmReadingId;

/** The readings of an alarm. */
export type AlarmReadingId =
  | 'sensitivity'
  | 'specificity'
  | 'prevalence'
  | 'positive-predictive-value'
  | 'negative-predictive-value'
  | 'likelihood-ratio-positive'
  | 'likelihood-ratio-negative';

/** How an interval was worked out. An `envelope` is the outermost limits over every value that a range or a suppressed cell allows. */
export type IntervalMethod =
  | 'wilson'
  | 'clopper-pearson'
  | 'miettinen-nurminen'
  | 'conditional-exact'
  | 'wilson-share-odds'
  | 'clopper-pearson-share-odds'
  | 'miettinen-nurminen-prevalence-odds'
  | 'mover-prevalence-odds';

/** Why a reading has no interval. */
export type NoInterval =
  | 'no-counts' // percentages without the counts behind them
  | 'no-totals' // counts without totals
  | 'no-case-number' // shares of cases without the number of cases
  | 'range' // given as a range, which stands in the place of an interval
  | 'given' // a figure taken as given, not estimated
  | 'no-exact-form' // `exact` was asked for, and this reading has no exact interval of the same family
  | 'spans-none' // one extra case per K: the difference's interval includes none, so K runs through infinity
  | 'counts-rows-only'; // with `population` every interval comes from the counts rows

export interface ReadingInterval extends Interval {
  readonly level: number;
  readonly method: IntervalMethod;
  readonly envelope: boolean;
}

/** Two ranges that run through infinity: one extra case for every K at least `more` or, the other way, at least `fewer`. */
export interface OneExtraRanges {
  readonly more: Interval | null;
  readonly fewer: Interval | null;
}

/** One fair reading of the figure. Shares and ratios are plain numbers at full precision, never per cent. */
export interface Reading {
  readonly id: ReadingId;
  /** Index of the group it is about. */
  readonly of: number;
  /** Index of the group it is compared with, or `null` for a reading of one group. */
  readonly against: number | null;
  /** `null`: undefined (0 against 0) or, with `unbounded`, without an upper end (5 against 0). */
  readonly estimate: number | null;
  readonly unbounded: boolean;
  readonly interval: ReadingInterval | null;
  readonly whyNoInterval: NoInterval | null;
  /** What the rounding of the inputs alone allows; `null` where nothing was rounded. */
  readonly roundingRange: Interval | null;
  /** The M of `extra-cases`, else `null`. */
  readonly per: number | null;
  readonly ranges: OneExtraRanges | null;
  /** `hidden-cause-strength` at the limit nearer to no difference. */
  readonly atLimit: number | null;
  /** The exact limits that stand beside the interval where a group has fewer than five cases. */
  readonly exactBeside: Interval | null;
}

/** A reading with everything that was not given left empty. Written out, since spreading costs more than the statistics do. */
export function reading(parts: Pick<Reading, 'id' | 'of' | 'estimate'> & Partial<Reading>): Reading {
  return {
    id: parts.id,
    of: parts.of,
    against: parts.against ?? null,
    estimate: parts.estimate,
    unbounded: parts.unbounded ?? false,
    interval: parts.interval ?? null,
    whyNoInterval: parts.whyNoInterval ?? null,
    roundingRange: parts.roundingRange ?? null,
    per: parts.per ?? null,
    ranges: parts.ranges ?? null,
    atLimit: parts.atLimit ?? null,
    exactBeside: parts.exactBeside ?? null,
  };
}
