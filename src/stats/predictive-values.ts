import { ArgumentError } from './argument-error.ts';
import type { Interval } from './interval.ts';
import { negativeLikelihoodRatioInterval, positiveLikelihoodRatioInterval } from './likelihood-ratio.ts';
import type { AlarmCounts } from './likelihood-ratio.ts';

/** An alarm's accuracy as shares in [0, 1], and how common the condition is, in (0, 1). */
export interface AlarmRates {
  readonly sensitivity: number;
  /** The share of the unaffected that set off the alarm all the same: 1 - specificity. */
  readonly falseAlarmRate: number;
  readonly prevalence: number;
}

/**
 * How likely the condition is after an alarm: Bayes' theorem.
 *
 * @returns `null` where no alarm can be
 * @throws ArgumentError for shares out of range
 */
export function positivePredictiveValue({
  sensitivity,
  falseAlarmRate,
  prevalence,
}: AlarmRates): number | null {
  checkShares(sensitivity, falseAlarmRate, prevalence);
  const real = sensitivity * prevalence;
  const alarms = real + falseAlarmRate * (1 - prevalence);
  return alarms === 0 ? null : real / alarms;
}

/** How likely the absence of the condition is after silence; `null` where silence cannot be. */
export function negativePredictiveValue({
  sensitivity,
  falseAlarmRate,
  prevalence,
}: AlarmRates): number | null {
  checkShares(sensitivity, falseAlarmRate, prevalence);
  const right = (1 - falseAlarmRate) * (1 - prevalence);
  const silences = right + (1 - sensitivity) * prevalence;
  return silences === 0 ? null : right / silences;
}

/**
 * Interval of the positive predictive value at a known prevalence: the score limits of LR+ carried through the prevalence's odds o,
 * o LR/(1 + o LR). It excludes the prevalence exactly where the limits of LR+ exclude 1.
 *
 * @param prevalence from outside the counts, in (0, 1); for four counts from one sample at the natural prevalence use the Wilson
 *   interval of true positives among alarms instead
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits in [0, 1]: 0 without a true alarm, 1 without a false one
 * @throws ArgumentError for numbers out of range
 *
 * Miettinen & Nurminen 1985; with the log interval of LR+ in its place it is Mercaldo, Lau & Zhou 2007 (Statistics in Medicine
 * 26:2170).
 */
export function positivePredictiveValueInterval(
  counts: AlarmCounts,
  prevalence: number,
  level: number,
): Interval {
  checkShares(0, 0, prevalence);
  const { low, high } = positiveLikelihoodRatioInterval(counts, level);
  const through = (ratio: number) => (ratio * prevalence) / (ratio * prevalence + (1 - prevalence));
  return { low: through(low ?? 0), high: high === null ? 1 : through(high) };
}

/** The same for the negative predictive value: 1/(1 + o LR-), which falls as LR- rises. It excludes 1 - prevalence where LR- excludes 1. */
export function negativePredictiveValueInterval(
  counts: AlarmCounts,
  prevalence: number,
  level: number,
): Interval {
  checkShares(0, 0, prevalence);
  const { low, high } = negativeLikelihoodRatioInterval(counts, level);
  const through = (ratio: number) => (1 - prevalence) / (1 - prevalence + ratio * prevalence);
  return { low: high === null ? 0 : through(high), high: through(low ?? 0) };
}

function checkShares(sensitivity: number, falseAlarmRate: number, prevalence: number): void {
  const share = (value: number) => value >= 0 && value <= 1;
  if (!(share(sensitivity) && share(falseAlarmRate) && prevalence > 0 && prevalence < 1)) {
    throw new ArgumentError(
      'share-out-of-range',
      `sensitivity ${sensitivity}, false alarms ${falseAlarmRate} and prevalence ${prevalence} must be shares`,
    );
  }
}
