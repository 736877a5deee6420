/**
 * What a sentence under test claims: one figure in one measure, as it is worded. Shares, changes and points are plain numbers
 * (0.67, never 67); which group it is about, and what it agrees with, is not decided here.
 */

/**
 * What the figure is a figure of.
 * - `change`: 67% higher, a third fewer, cut by half.
 * - `ratio`: 1.8 times, twice, half as often.
 * - `times-more`: 3 times more, which some read as 3 times and others as 4 times as many.
 * - `points`: 0.6 percentage points higher.
 * - `share`: 1 in 50, 91% of cases, a 2% risk.
 * - `extra`: 11 more per 1,000, or one more for every 90.
 * - `percentage`: 67% and nothing beside it.
 * - `figure`: a number without a unit, 2.3.
 */
export type ClaimMeasure =
  'change' | 'ratio' | 'times-more' | 'points' | 'share' | 'extra' | 'percentage' | 'figure';

/** `at-most` stands for "up to", "no more than"; `below` for "less than half". */
export type Hedge = 'about' | 'nearly' | 'over' | 'at-least' | 'at-most' | 'below';

/** A number with what its own precision leaves open. */
export interface ClaimedNumber {
  readonly value: number;
  /** What rounds to it: half a unit of its last digit to either side; for a word (twice, a third) 5%. */
  readonly low: number;
  readonly high: number;
}

/** An interval that stood with the figure, in the measure of the figure. */
export interface ClaimedInterval {
  readonly low: ClaimedNumber;
  readonly high: ClaimedNumber;
  /** The level as a share, where it was said. */
  readonly level: number | null;
}

/** A figure in words. */
export interface FigureClaim extends ClaimedNumber {
  readonly kind: 'figure';
  readonly measure: ClaimMeasure;
  /** The piece of the sentence that it was read from. */
  readonly text: string;
  readonly direction: 'up' | 'down' | null;
  readonly hedge: Hedge | null;
  /** What the words say the figure is about: odds, a risk, a share of the cases. */
  readonly about: 'odds' | 'risk' | 'cases' | null;
  readonly interval: ClaimedInterval | null;
  /** Where the figure stands in the sentence. */
  readonly at: number;
}

/**
 * What was found in a sentence. `no-difference`: there is none; `shown`: it is significant; `not-shown`: it is not.
 * `none`: no figure that could be held against anything.
 */
export type Claim = FigureClaim | { readonly kind: 'no-difference' | 'shown' | 'not-shown' | 'none' };

/** The clause `says`: the sentence as typed, and what it claims. */
export interface SaysClause {
  readonly text: string;
  readonly claim: Claim;
}
