import type { AlarmQuestion, GroupedQuestion, Quantity, Question } from '../../grammar/question.ts';
import type { DetectableRatio } from '../stats/detectable-ratio.ts';
import type { CautionId } from './cautions.ts';
import type { MissingId } from './missing.ts';
import type { RatioVariants } from './ratio-variants.ts';
import type { Reading, ReadingId } from './reading.ts';
import type { Says } from './said.ts';

/** A percentage that stood beside counts, held against them. */
export interface StatedBeside {
  readonly group: number;
  readonly stated: Quantity;
  /** What the counts give, as a share. */
  readonly computed: number;
  /** True if the counts round to the stated figure at its own precision. */
  readonly agrees: boolean;
}

/** What the two groups show about each other. `none-shown`: the interval includes no difference. */
export type Direction = 'higher' | 'lower' | 'same' | 'none-shown' | 'undefined';

/** What figures of this size could have shown: asked where they do not show a difference. */
export interface CouldShow extends DetectableRatio {
  /** How many times as many cases it would take to show a doubling as often; `null` where no doubling is possible. */
  readonly growthForDoubling: number | null;
}

/** Everything that can fairly be said about a question, in numbers and ids; no words. */
export interface Report {
  readonly question: Question;
  readonly level: number;
  readonly readings: readonly Reading[];
  /** Each of three or more groups against all the others together. */
  readonly againstRest?: readonly Reading[];
  /** What figures of this size could have shown, where they show no difference. */
  readonly couldShow?: CouldShow | null;
  /** The reading that answers "per person". */
  readonly headline: ReadingId;
  readonly stated: readonly StatedBeside[];
  /** Most important first. */
  readonly cautions: readonly CautionId[];
  readonly missing: readonly MissingId[];
  /** Ratios that stand beside the headline's, each under an assumption of its own. */
  readonly variants?: readonly RatioVariants[];
  /** The sentence under test, held against the readings. */
  readonly says?: Says | null;
}

/** A report of a question that compares groups, and one of an alarm. */
export interface GroupedReport extends Report {
  readonly question: GroupedQuestion;
}
export interface AlarmReport extends Report {
  readonly question: AlarmQuestion;
}

/** The level used where the line names none: 95%, common practice. */
export const usualLevel = 0.95;

/** The readings of one id, in the order of the groups. */
export function readingsOf(report: Report, id: ReadingId): readonly Reading[] {
  return report.readings.filter((reading) => reading.id === id);
}

/** Which way a ratio reading points, as far as its interval shows one. */
export function directionOf(reading: Reading): Direction {
  const { estimate, interval, unbounded } = reading;
  if (interval !== null) {
    const above = interval.low !== null && interval.low > 1;
    const below = interval.high !== null && interval.high < 1;
    if (!above && !below) return 'none-shown';
    return above ? 'higher' : 'lower';
  }
  if (unbounded) return 'higher';
  if (estimate === null) return 'undefined';
  return estimate > 1 ? 'higher' : estimate < 1 ? 'lower' : 'same';
}

/** Which way the figures point. With `exact` a ratio of counts has no interval of its own; the odds ratio's exact one then decides. */
export function shownDirection(report: Report, ratioReading: Reading): Direction {
  if (ratioReading.whyNoInterval !== 'no-exact-form') return directionOf(ratioReading);
  const odds = [...readingsOf(report, 'odds-ratio'), ...readingsOf(report, 'pooled-odds-ratio')].find(
    ({ of }) => of === ratioReading.of,
  );
  // Without limits nothing is shown, whichever way the estimate points.
  return odds?.interval == null ? 'none-shown' : directionOf(odds);
}
