import type { AlarmQuestion } from '../../grammar/question.ts';
import { positivePredictiveValue } from '../stats/predictive-values.ts';
import { oneSample, ratesOf } from './alarm-rates.ts';

/**
 * An alarm worked out on whole numbers: how many of so many are real cases, how many of those and of the others raise an alarm.
 * Each number is rounded once, from full precision; the sums are sums of what is shown.
 *
 * Gigerenzer & Hoffrage 1995 (Psychological Review 102:684): people reason rightly about these and wrongly about percentages.
 */
export interface NaturalFrequencies {
  readonly base: number;
  readonly cases: number;
  readonly caught: number;
  readonly others: number;
  readonly falseAlarms: number;
  readonly alarms: number;
}

/** Fewer than this many in one of the numbers would be too coarse to show the share. */
const aFew = 3;
const largestBase = 1e12;

/**
 * The smallest power of ten (from `per`, where the line has one, or 100) at which every number is at least a few and the whole
 * numbers show the same share of real alarms, out of `shownOutOf`, as the figures do; `null` where there is never an alarm.
 */
export function naturalFrequencies(question: AlarmQuestion, shownOutOf: number): NaturalFrequencies | null {
  const rates = ratesOf(question);
  const value = positivePredictiveValue(rates);
  if (value === null) return null;
  const shown = Math.round(value * shownOutOf);
  for (let base = question.clauses.per ?? 100; ; base *= 10) {
    const exact = [
      rates.prevalence * base,
      rates.sensitivity * rates.prevalence * base,
      rates.falseAlarmRate * (1 - rates.prevalence) * base,
    ];
    const [cases = 0, caught = 0, falseAlarms = 0] = exact.map(Math.round);
    const alarms = caught + falseAlarms;
    const fine =
      exact.every((number) => number === 0 || number >= aFew) &&
      // Whole numbers say "all" only where it is all.
      (caught === cases) === (rates.sensitivity === 1) &&
      Math.round((caught / alarms) * shownOutOf) === shown;
    if (fine || base >= largestBase)
      return { base, cases, caught, others: base - cases, falseAlarms, alarms };
  }
}

/** The four counts of one sample in the same form; `null` where they are not all there, or not exact. */
export function countedNumbers(question: AlarmQuestion): NaturalFrequencies | null {
  const cells = oneSample(question);
  if (cells === null || !cells.every(({ precision }) => precision === 'exact')) return null;
  const [caught, missed, falseAlarms, quiet] = cells;
  const cases = caught.value + missed.value;
  const others = falseAlarms.value + quiet.value;
  return {
    base: cases + others,
    cases,
    caught: caught.value,
    others,
    falseAlarms: falseAlarms.value,
    alarms: caught.value + falseAlarms.value,
  };
}

/** The M of "of M alarms": the smallest power of ten from 100 at which each share and its rest, where not 0, are a few. */
export function outOf(shares: readonly number[]): number {
  const parts = shares.flatMap((share) => [share, 1 - share]).filter((part) => part > 0);
  const smallest = Math.min(...parts);
  let base = 100;
  while (parts.length > 0 && smallest * base < aFew - 0.5 && base < largestBase) base *= 10;
  return base;
}

/** The same alarm where real cases are ten times as common, or a tenth as common where that would be too many. */
export function atAnotherPrevalence(
  question: AlarmQuestion,
): { readonly prevalence: number; readonly value: number } | null {
  const rates = ratesOf(question);
  const prevalence = rates.prevalence < 0.05 ? rates.prevalence * 10 : rates.prevalence / 10;
  const value = positivePredictiveValue({ ...rates, prevalence });
  return value === null ? null : { prevalence, value };
}
