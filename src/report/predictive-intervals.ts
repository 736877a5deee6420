import type { Quantity } from '../../grammar/question.ts';
import type { Interval } from '../stats/interval.ts';
import {
  negativeLikelihoodRatio,
  negativeLikelihoodRatioInterval,
  positiveLikelihoodRatio,
  positiveLikelihoodRatioInterval,
} from '../stats/likelihood-ratio.ts';
import type { AlarmCounts } from '../stats/likelihood-ratio.ts';
import { moverRatioInterval } from '../stats/mover-ratio-interval.ts';
import {
  negativePredictiveValueInterval,
  positivePredictiveValueInterval,
} from '../stats/predictive-values.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import type { CountsBehind } from './alarm-rates.ts';
import { intervalOver } from './estimates.ts';
import type { ReadingInterval } from './reading.ts';

/** Intervals of an alarm whose sensitivity and specificity come from counts. */

/** Counts behind both sides, as quantities and as the methods take them. */
export interface BothCounts {
  readonly quantities: readonly Quantity[];
  readonly counts: (values: readonly number[]) => AlarmCounts;
}

export function bothCounts(affected: CountsBehind, unaffected: CountsBehind): BothCounts {
  return {
    quantities: [...affected.quantities, ...unaffected.quantities],
    counts: ([a = NaN, b = NaN, c = NaN, d = NaN]) => {
      const [caught, cases] = affected.rightOfAll(a, b);
      const [quiet, others] = unaffected.rightOfAll(c, d);
      return {
        truePositives: caught,
        affected: cases,
        falsePositives: others - quiet,
        unaffected: others,
      };
    },
  };
}

/** Which of the two: how likely a real case is after an alarm, or how likely none is after silence. */
export type AfterWhat = 'alarm' | 'silence';

/** Miettinen-Nurminen limits of a likelihood ratio. */
export function likelihoodRatioLimits(both: BothCounts, after: AfterWhat, level: number): ReadingInterval {
  const limits = after === 'alarm' ? positiveLikelihoodRatioInterval : negativeLikelihoodRatioInterval;
  return intervalOver(both.quantities, level, 'miettinen-nurminen', (values) =>
    limits(both.counts(values), level),
  );
}

/**
 * Limits of a predictive value at a prevalence from outside: those of the likelihood ratio through the prevalence's odds. A
 * prevalence from a sample brings its own Wilson limits in, by variance recovery on logs (Zou & Donner 2008).
 */
export function predictiveLimits(
  both: BothCounts,
  after: AfterWhat,
  prevalence: Quantity,
  sample: readonly [Quantity, Quantity] | null,
  level: number,
): ReadingInterval {
  if (sample === null) {
    const limits = after === 'alarm' ? positivePredictiveValueInterval : negativePredictiveValueInterval;
    return intervalOver(
      [...both.quantities, prevalence],
      level,
      'miettinen-nurminen-prevalence-odds',
      (values) => limits(both.counts(values), values[4] ?? NaN, level),
    );
  }
  return intervalOver([...both.quantities, ...sample], level, 'mover-prevalence-odds', (values) =>
    sampledLimits(both.counts(values), after, [values[4] ?? NaN, values[5] ?? NaN], level),
  );
}

function sampledLimits(
  counts: AlarmCounts,
  after: AfterWhat,
  [cases, total]: readonly [number, number],
  level: number,
): Interval {
  const alarm = after === 'alarm';
  const ratio = (alarm ? positiveLikelihoodRatio : negativeLikelihoodRatio)(counts);
  const limits = (alarm ? positiveLikelihoodRatioInterval : negativeLikelihoodRatioInterval)(counts, level);
  const share = wilsonInterval(cases, total, level);
  const against = (prevalence: number) => (1 - prevalence) / prevalence;
  const [most, least] = [against(share.low ?? 0), against(share.high ?? 1)];
  // Where a cell is empty the ratio has no logarithm: then the outermost ends of both, which is wider.
  const odds: Interval =
    ratio === null || ratio === 0
      ? { low: (limits.low ?? 0) / most, high: limits.high === null ? null : limits.high / least }
      : moverRatioInterval(
          { estimate: ratio, ...limits },
          { estimate: (total - cases) / cases, low: least, high: most },
        );
  const real = (x: number) => x / (1 + x);
  const none = (x: number) => 1 / (1 + x);
  return alarm
    ? { low: real(odds.low ?? 0), high: odds.high === null ? 1 : real(odds.high) }
    : { low: odds.high === null ? 0 : none(odds.high), high: none(odds.low ?? 0) };
}
