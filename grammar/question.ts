/**
 * What a line asks, once it has been read: plain values that can be printed, stored and tested.
 * Labels and nouns stand as they were typed. Positions are UTF-16 units of the typed line, `to` exclusive.
 */

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
  readonly onlyMe: boolean;
}

/** How the line was read where that may surprise the person who typed it. `text` is the typed piece it is about. */
export interface ReadingRemark {
  readonly id:
    | 'decimal-comma' // 0,4 was read as 0.4
    | 'indian-grouping' // 1,20,400 was read as 120,400
    | 'footnote-dropped' // 1,204¹ was read as 1,204
    | 'struck-out-dropped' // ~18~ was not read
    | 'emoji-dropped'
    | 'number-in-label' // route 14 200 of 5,200: 14 is part of the label
    | 'count-from-percentage' // 1.5% of 1,204 is 18
    | 'time-order' // the labels are ordered in time: the earlier is the reference
    | 'each-counted-once' // 14 in 5,200 crossings: each counted once
    | 'about-taken-as-given' // about 38% was taken as 38%
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
  /** All cases together, where it is known: the sum of the cases, or from `of 75 cases`. */
  readonly totalCases: Quantity | null;
}

export interface SharesGroup {
  /** `null` for the implied other group of `44 of 75 no helmet, coverage 38%`. */
  readonly label: string | null;
  /** `null` where only shares of cases were given and no number of cases. */
  readonly cases: Quantity | null;
  /** The group's share of all cases, in (0, 1) or at its ends where cases are 0 or all. */
  readonly caseShare: Quantity;
  /** The group's share of the population, in (0, 1), both ends left out. */
  readonly coverage: Quantity;
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
export type GroupedQuestion = CountsQuestion | SharesQuestion | StatedQuestion | BareCountsQuestion;
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
export type HelpTopic = 'overview' | QuestionKind;

/** What a typed line turned out to be. */
export type LineReading =
  | { readonly kind: 'question'; readonly question: Question }
  | { readonly kind: 'help'; readonly topic: HelpTopic }
  | { readonly kind: 'diagnosis'; readonly diagnosis: Diagnosis };

/** Longest line in UTF-16 units and most groups: 4,000 and 12 on the command line, 2,400 and 12 in Slack. */
export interface LineLimits {
  readonly characters: number;
  readonly groups: number;
}
