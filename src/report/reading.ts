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
  | 'rate'
  | 'rate-ratio'
  | 'rate-difference'
  | 'crude-risk-ratio'
  | 'crude-rate-ratio'
  | 'pooled-risk-ratio'
  | 'pooled-risk-difference'
  | 'pooled-odds-ratio'
  | 'pooled-rate-ratio'
  | 'pooled-rate-difference'
  | 'standardised-risk-ratio'
  | 'standardised-rate'
  | 'homogeneity'
  | 'overall-difference'
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
  | 'rate-score'
  | 'garwood'
  | 'rate-ratio-score'
  | 'exact-rate-ratio'
  | 'rate-difference-score'
  | 'equal-times-score'
  | 'pooled-score'
  | 'pooled-conditional-score'
  | 'pooled-conditional-exact'
  | 'pooled-shares-score'
  | 'pooled-shares-exact'
  | 'log-delta'
  | 'fay-feuer'
  | 'sampled-coverage' // coverage from a sample: the score interval of that odds ratio
  | 'sampled-coverage-fraction' // the same as a share of all cases: 1 minus a risk ratio
  | 'effective-sample' // coverage with an interval of its own, as from a sample that would have given it
  | 'effective-sample-fraction'
  | 'growing-coverage' // the wider of two assumptions about coverage that grew
  | 'coverage-by-period'
  | 'miettinen-nurminen-prevalence-odds'
  | 'mover-prevalence-odds'
  | 'as-given'; // an interval that came with the figure

/** Why a reading has no interval. */
export type NoInterval =
  | 'no-counts' // percentages without the counts behind them
  | 'no-totals' // counts without totals
  | 'no-case-number' // shares of cases without the number of cases
  | 'range' // given as a range, which stands in the place of an interval
  | 'given' // a figure taken as given, not estimated
  | 'range-given' // coverage as a range: the estimate is its middle
  | 'mean-of-growth' // coverage that grew: the estimate is the mean of its ends
  | 'mean-over-cases' // coverage by period: the estimate is its mean over all cases
  | 'no-exact-form' // `exact` was asked for, and this reading has no exact interval of the same family
  | 'spans-none' // one extra case per K: the difference's interval includes none, so K runs through infinity
  | 'too-large-for-exact' // layers with so many cases that exact limits would take too long
  | 'no-cases-at-all' // a standardised risk of 0 has no interval on the log scale
  | 'counts-rows-only'; // with `population` every interval comes from the counts rows

export interface ReadingInterval extends Interval {
  readonly level: number;
  readonly method: IntervalMethod;
  readonly envelope: boolean;
  /** What the counts were divided by before the limits were worked out; 1 where they stand as they are. */
  readonly designEffect: number;
  /** The outermost limits over all cases of unknown group on one side, then on the other. */
  readonly unknownToEitherSide?: boolean;
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
  /** The M of `extra-cases`; for rates and their differences, the exposure that they are shown for; else `null`. */
  readonly per: number | null;
  readonly ranges: OneExtraRanges | null;
  /** `hidden-cause-strength` at the limit nearer to no difference. */
  readonly atLimit: number | null;
  /** The exact limits that stand beside the interval where a group has fewer than five cases. */
  readonly exactBeside: Interval | null;
  /** Index of the layer that it is about; `null` where it is about no single one. */
  readonly layer: number | null;
  /** It is compared with all the other groups together, and `against` names none. */
  readonly rest: boolean;
  /** The wider limits that hold for several pairs at once, with how many pairs there are. */
  readonly atOnce: (Interval & { readonly pairs: number }) | null;
  /** The test behind a p value, which is then the estimate. */
  readonly test: { readonly name: string; readonly statistic: number; readonly degrees: number } | null;
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
    layer: parts.layer ?? null,
    rest: parts.rest ?? false,
    atOnce: parts.atOnce ?? null,
    test: parts.test ?? null,
  };
}
