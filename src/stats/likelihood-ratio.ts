import { checkCases } from './argument-error.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { riskRatioInterval } from './risk-ratio-interval.ts';

/** An alarm's four counts: alarms among those with the condition and among those without it. Totals above 0. */
export interface AlarmCounts {
  /** Alarms among the affected, in [0, affected]. */
  readonly truePositives: number;
  readonly affected: number;
  /** Alarms among the unaffected, in [0, unaffected]. */
  readonly falsePositives: number;
  readonly unaffected: number;
}

/**
 * How much an alarm multiplies the odds of the condition: sensitivity/(1 - specificity); `null` without a false alarm.
 *
 * @throws ArgumentError for counts out of range
 */
export function positiveLikelihoodRatio(counts: AlarmCounts): number | null {
  return ratioOf(alarms(counts));
}

/** How much silence multiplies them: (1 - sensitivity)/specificity; `null` where every unaffected one set off the alarm. */
export function negativeLikelihoodRatio(counts: AlarmCounts): number | null {
  return ratioOf(silences(counts));
}

/**
 * Score intervals of the likelihood ratios: they are risk ratios, of alarms (or silences) among the affected against the unaffected.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without a true alarm, no upper limit without a false one; for silences likewise
 * @throws ArgumentError for counts out of range
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213). Simel 1991 has the log interval of the same ratios.
 */
export function positiveLikelihoodRatioInterval(counts: AlarmCounts, level: number): Interval {
  return riskRatioInterval(alarms(counts), level);
}

/** The same for the negative likelihood ratio. */
export function negativeLikelihoodRatioInterval(counts: AlarmCounts, level: number): Interval {
  return riskRatioInterval(silences(counts), level);
}

const alarms = ({ truePositives, affected, falsePositives, unaffected }: AlarmCounts): TwoGroups => ({
  cases: truePositives,
  total: affected,
  referenceCases: falsePositives,
  referenceTotal: unaffected,
});

const silences = ({ truePositives, affected, falsePositives, unaffected }: AlarmCounts): TwoGroups => ({
  cases: affected - truePositives,
  total: affected,
  referenceCases: unaffected - falsePositives,
  referenceTotal: unaffected,
});

function ratioOf({ cases, total, referenceCases, referenceTotal }: TwoGroups): number | null {
  checkCases(cases, total);
  checkCases(referenceCases, referenceTotal);
  return referenceCases === 0 ? null : (cases / total) * (referenceTotal / referenceCases);
}
