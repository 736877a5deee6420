/**
 * What a line asks, once it has been read: plain values that can be printed, stored and tested.
 * Labels and nouns stand as they were typed. Positions are UTF-16 units of the typed line, `to` exclusive.
 */

import type { SaysClause } from './claim.ts';

/** A place in the line as typed: UTF-16 units, `to` exclusive. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

/**
 * How a number came to be known.
 * - `exact`: typed in full (`1204`).
 * - `rounded`: its spelling or its source says it was rounded (`58.7%`, `12k`, `1.5% of 2,377`); `low` to `high` is what
 *   rounding allows, `value` the number as typed.
 * - `range`: the person gave a range, or the cell was suppressed (`10-12%`, `<5`); `value` is its middle.
 */
export type Precision = 'exact' | 'rounded' | 'range';

/** A number with what its spelling says about its precision. Shares are plain (0.587, never 58.7). */
export interface Quantity {
  /** The canonical spelling, with trailing zeros kept: `1204`, `58.70%`, `12k`, `1 in 250`, `<5`. */
  readonly text: string;
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly precision: Precision;
  readonly span: Span;
}

/** Clauses that any question may carry. `null` or `false` where none was given. */
export interface Clauses {
  /** Confidence level as a share, 0.5 to 0.9999, both ends included; `null`: 95%. `text` is its spelling, `90%`. */
  readonly level: { readonly value: number; readonly text: string } | null;
  /** The M of "extra cases per M people". */
  readonly per: number | null;
  /** The label named by `reference ...`, as typed there; already applied in the question's `reference`. */
  readonly reference: string | null;
  readonly population: Quantity | null;
  /** Who is counted: the divisor in words. */
  readonly among: string | null;
  readonly period: string | null;
  readonly source: string | null;
  readonly note: string | null;
  readonly exact: boolean;
  /** Events came repeated or in clusters: counts carry as much as this many times fewer that come singly; 1 or above. */
  readonly designEffect: { readonly value: number; readonly text: string } | null;
  /** These are all the cases there were, a whole register, not a sample. */
  readonly everyone: boolean;
  readonly onlyMe: boolean;
  /** Coverages to work the ratio out at, from `try 30%, 38%, 50%`; only for shares. */
  readonly tryCoverages?: readonly TypedShare[];
  /** The sentence under test. */
  readonly says?: SaysClause;
}

/** How the line was read where that may surprise the person who typed it. `text` is the typed piece it is about. */
export interface ReadingRemark {
  readonly id:
    | 'decimal-comma' // 0,4 was read as 0.4
    | 'indian-grouping' // 1,20,400 was read as 120,400
    | 'total-row-left-out' // a row "total" that is the sum of the others
    | 'footnote-dropped' // 1,204¹ was read as 1,204
    | 'struck-out-dropped' // ~18~ was not read
    | 'emoji-dropped'
    | 'number-in-label' // route 14 200 of 5,200: 14 is part of the label
    | 'count-from-percentage' // 1.5% of 1,204 is 18
    | 'each-counted-once' // 14 in 5,200 crossings: each counted once
    | 'about-taken-as-given' // about 38% was taken as 38%
    | 'whole-taken-apart' // a part against the whole that contains it: the rest was taken
    | 'total-left-out' // a group that is the sum of the others
    | 'words-left-out' // words beside an alarm's figures that say nothing about them
    | 'different-times'; // watched for different lengths of time
  readonly text: string;
  readonly readAs: string;
  readonly span: Span;
}

interface QuestionBase {
  readonly clauses: Clauses;
  /** What one of the total is called, as typed (`shifts`, `staff`, `riders`); `null` where the line does not say. */
  readonly unit: string | null;
  /** What a case is called, as typed (`incidents`, `injured`); `null` where the line does not say. */
  readonly caseNoun: string | null;
  /** The groups are two times of one thing: the reference is the earlier. */
  readonly overTime: boolean;
  readonly remarks: readonly ReadingRemark[];
}

/** `night shift: 18 of 1,204 vs day shift: 9 of 2,377`: one, two or more groups, each with its cases and its total. */
export interface CountsQuestion extends QuestionBase {
  readonly kind: 'counts';
  readonly groups: readonly CountsGroup[];
  /** Index of the group that the others are compared with; 0 where there is only one group. */
  readonly reference: number;
  /** The rows were chosen by outcome (`ill`/`well`, `cases`/`controls`): only the odds ratio means anything. */
  readonly chosenByOutcome: boolean;
}

export interface CountsGroup {
  readonly label: string | null;
  readonly cases: Quantity;
  readonly total: Quantity;
  /** A percentage that stood beside the counts, to be held against them: `31 of 9,240 (3.4%)`. */
  readonly stated: Quantity | null;
  readonly span: Span;
}

/**
 * `cases: no helmet 44, helmet 31; coverage: no helmet 38%`: cases by group, or shares of cases, beside each group's share
 * of the population. All groups are listed, also the one that was only implied, with its coverage filled in.
 */
export interface SharesQuestion extends QuestionBase {
  readonly kind: 'shares';
  readonly groups: readonly SharesGroup[];
  /** Index of the group that the others are compared with. */
  readonly reference: number;
  /** All cases together, where it is known: the sum of the cases, or from `of 75 cases`. Without those of unknown group. */
  readonly totalCases: Quantity | null;
  /** Cases whose group is not known, `unknown 12`: they may belong to either of the two groups. */
  readonly unknownCases: Quantity | null;
}

/** A share as it was typed, `20%`, with its value. */
export interface TypedShare {
  readonly text: string;
  readonly value: number;
}

/** One period of coverage that was given period by period, with all cases of that period. */
export interface CoveragePeriod {
  /** `Jan`; `null` where the periods stand without names. */
  readonly label: string | null;
  readonly coverage: TypedShare;
  readonly allCases: number;
}

/**
 * How a group's coverage is known. Anything but `given` is of two groups that are everybody; the implied group's is the
 * mirror image of the typed one's.
 * - `given`: one number, taken as it stands.
 * - `range`: `55-65%`, somewhere between two ends.
 * - `interval`: `38% (34 to 42)`, with an interval of its own; `level` is `null` where none was said.
 * - `sample`: `310 of 500`, counted in a sample of the population.
 * - `growth`: `from 20% to 60%`, it grew (or fell) while the cases were counted; 0% and 100% may be an end.
 * - `periods`: `Jan 20%, Feb 30%`, with all cases by period.
 */
export type CoverageKnown =
  | { readonly kind: 'given' }
  | { readonly kind: 'range'; readonly low: TypedShare; readonly high: TypedShare }
  | {
      readonly kind: 'interval';
      readonly low: TypedShare;
      readonly high: TypedShare;
      readonly level: TypedShare | null;
    }
  | { readonly kind: 'sample'; readonly inGroup: number; readonly sampled: number }
  | { readonly kind: 'growth'; readonly start: TypedShare; readonly end: TypedShare }
  | { readonly kind: 'periods'; readonly by: string; readonly periods: readonly CoveragePeriod[] };

export interface SharesGroup {
  /** `null` for the implied other group of `44 of 75 no helmet, coverage 38%`. */
  readonly label: string | null;
  /** `null` where only shares of cases were given and no number of cases. */
  readonly cases: Quantity | null;
  /** The group's share of all cases, in (0, 1) or at its ends where cases are 0 or all. */
  readonly caseShare: Quantity;
  /**
   * The group's share of the population, in (0, 1), both ends left out (a sample may have nobody or everybody in the group).
   * One number for what is not one: a range's middle, a sample's share, the mean of growth, the mean over the cases of periods.
   */
  readonly coverage: Quantity;
  readonly known: CoverageKnown;
  /** True where coverage was not typed but is what remains of 100%. */
  readonly coverageImplied: boolean;
  readonly span: Span;
}

/** `4.2% vs 2.6%`, `1 in 250 vs 1 in 400`: stated percentages or frequencies of the same noun, without counts. */
export interface StatedQuestion extends QuestionBase {
  readonly kind: 'stated';
  readonly groups: readonly StatedGroup[];
  readonly reference: number;
}

export interface StatedGroup {
  readonly label: string | null;
  /** The share, in [0, 1]. */
  readonly share: Quantity;
  readonly form: 'percentage' | 'frequency';
  readonly span: Span;
}

/** `night 18 vs day 9`: counts whose totals nobody stated. */
export interface BareCountsQuestion extends QuestionBase {
  readonly kind: 'bare-counts';
  readonly groups: readonly BareCountsGroup[];
  readonly reference: number;
}

export interface BareCountsGroup {
  readonly label: string | null;
  readonly cases: Quantity;
  readonly span: Span;
}

/** `depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days`: events over exposure, all in one unit (`unit`). */
export interface RatesQuestion extends QuestionBase {
  readonly kind: 'rates';
  readonly groups: readonly RatesGroup[];
  readonly reference: number;
}

export interface RatesGroup {
  readonly label: string | null;
  readonly cases: Quantity;
  /** How long, how far or how much was watched, above 0. */
  readonly exposure: Quantity;
  /** `per` a round base (`3 per 1,000 bus-days`): a stated rate, without counts behind it. */
  readonly asStated: boolean;
  readonly connector: 'in' | 'per';
  readonly span: Span;
}

/** `by age: under 40: night 3 of 900 vs day 40 of 9,000 | 40 and over: ...`: the same groups within layers. */
export interface StrataQuestion extends QuestionBase {
  readonly kind: 'strata';
  /** What the layers are layers of, as typed behind `by`; `null` where the line does not say. */
  readonly by: string | null;
  readonly layers: readonly Layer[];
  /** The groups, which are the same in every layer, in the order of the first. */
  readonly groups: readonly LayeredGroup[];
  readonly reference: number;
}

export interface Layer {
  readonly label: string | null;
  /** What the line asks within this layer; all layers ask the same kind, with the groups in the same order. */
  readonly question: CountsQuestion | SharesQuestion | RatesQuestion;
  readonly span: Span;
}

export interface LayeredGroup {
  readonly label: string | null;
}

/**
 * `alarm: sensitivity 92%, specificity 97%, prevalence 0.4%`: a test, a filter or an alert, how common real cases are, and so
 * how many of its alarms are real.
 */
export interface AlarmQuestion extends QuestionBase {
  readonly kind: 'alarm';
  /** What the alarm is called; `null` for a plain `alarm`. */
  readonly name: string | null;
  readonly sensitivity: AlarmShare;
  readonly specificity: AlarmShare;
  /** In (0, 1); `null` where all four counts come from one sample and nothing else was said: the sample has its own. */
  readonly prevalence: AlarmShare | null;
}

/** Sensitivity, specificity or prevalence as a share, and how it was given. */
export interface AlarmShare {
  readonly share: Quantity;
  readonly given: AlarmGiven;
}

/**
 * - `share`: a percentage or a frequency. `turned`: the other side was typed (`false alarm rate 3%` for a specificity of 97%).
 * - `counts`: `46 of 50`; `turned`: those that went wrong were counted (`false alarms 6 of 200`).
 * - `cells`: `caught 46, missed 4`, or `false alarms 30, quiet 920`.
 */
export type AlarmGiven =
  | { readonly kind: 'share'; readonly typed: Quantity; readonly turned: boolean }
  | {
      readonly kind: 'counts';
      readonly part: Quantity;
      readonly whole: Quantity;
      readonly turned: boolean;
      /** A percentage that stood beside the counts, to be held against them. */
      readonly stated: Quantity | null;
    }
  | { readonly kind: 'cells'; readonly right: Quantity; readonly wrong: Quantity };

export type Question = GroupedQuestion | AlarmQuestion;
/** The kinds that compare groups. */
export type GroupedQuestion =
  CountsQuestion | SharesQuestion | StatedQuestion | BareCountsQuestion | RatesQuestion | StrataQuestion;
export type QuestionKind = Question['kind'];

/** A line that would work, ready to send. `label` is what a button says where several are offered. */
export interface Suggestion {
  readonly line: string;
  readonly label: string | null;
}

/** What is wrong with a line: in words, with the place, and with lines that would work. Never a parser's vocabulary. */
export interface Diagnosis {
  /** From the catalogue in `messages.ts`. */
  readonly id: string;
  readonly message: string;
  /** Always inside the typed line (or at its end): `0 <= from <= to <= line.length`. */
  readonly span: Span;
  /** At most three. Where the line has two or three readings these are the readings, each with a button label. */
  readonly suggestions: readonly Suggestion[];
}

/** The help topics: the whole guide, or one kind of question. */
export type HelpTopic = 'overview' | QuestionKind | 'change';

/** What a typed line turned out to be. */
export type LineReading =
  | { readonly kind: 'question'; readonly question: Question }
  | { readonly kind: 'help'; readonly topic: HelpTopic }
  | { readonly kind: 'diagnosis'; readonly diagnosis: Diagnosis };

/** Longest line in UTF-16 units, most groups and most layers: 4,000, 12 and 60 on the command line, 2,400, 12 and 24 in Slack. */
export interface LineLimits {
  readonly characters: number;
  readonly groups: number;
  readonly layers: number;
}
