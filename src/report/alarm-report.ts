import type { AlarmQuestion, AlarmShare, Quantity } from '../../grammar/question.ts';
import { clopperPearsonInterval } from '../stats/clopper-pearson-interval.ts';
import type { Interval } from '../stats/interval.ts';
import { negativePredictiveValue, positivePredictiveValue } from '../stats/predictive-values.ts';
import type { AlarmRates } from '../stats/predictive-values.ts';
import { wilsonInterval } from '../stats/wilson-interval.ts';
import { countsBehind, oneSample, ratesFrom } from './alarm-rates.ts';
import type { RatesFrom } from './alarm-rates.ts';
import { cautionsFor } from './cautions.ts';
import { rangeOverCorners } from './corners.ts';
import { estimateOf, intervalOver } from './estimates.ts';
import { missingFor } from './missing.ts';
import { bothCounts, likelihoodRatioLimits, predictiveLimits } from './predictive-intervals.ts';
import type { AfterWhat, BothCounts } from './predictive-intervals.ts';
import { reading } from './reading.ts';
import type { AlarmReadingId, NoInterval, Reading, ReadingInterval } from './reading.ts';
import { usualLevel } from './report.ts';
import type { Report, StatedBeside } from './report.ts';

/**
 * An alarm: how many of its alarms are real, and what its silence is worth. From percentages only the range that rounding
 * allows; from counts an interval; four counts of one sample answer by themselves.
 */
export function alarmReport(question: AlarmQuestion): Report {
  const setup = setupOf(question);
  const readings = [
    predictive('positive-predictive-value', 'alarm', setup),
    predictive('negative-predictive-value', 'silence', setup),
    likelihoodRatio('likelihood-ratio-positive', 'alarm', setup),
    likelihoodRatio('likelihood-ratio-negative', 'silence', setup),
    shareReading('sensitivity', question.sensitivity, setup),
    shareReading('specificity', question.specificity, setup),
    prevalenceReading(setup),
  ];
  return {
    question,
    level: setup.level,
    readings,
    headline: 'positive-predictive-value',
    stated: statedBeside(question),
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}

/** The places of `stated`: which of the three shares a percentage stood beside. */
export const statedPlaces = ['sensitivity', 'specificity', 'prevalence'] as const;

interface Setup {
  readonly question: AlarmQuestion;
  readonly level: number;
  readonly exact: boolean;
  readonly from: RatesFrom;
  readonly both: BothCounts | null;
  readonly cells: ReturnType<typeof oneSample>;
}

function setupOf(question: AlarmQuestion): Setup {
  const affected = countsBehind(question.sensitivity.given);
  const unaffected = countsBehind(question.specificity.given);
  return {
    question,
    level: question.clauses.level?.value ?? usualLevel,
    exact: question.clauses.exact,
    from: ratesFrom(question),
    both: affected === null || unaffected === null ? null : bothCounts(affected, unaffected),
    cells: oneSample(question),
  };
}

/** An estimate with the range that the precision of its inputs allows. */
function measured(
  id: AlarmReadingId,
  { from }: Setup,
  value: (rates: AlarmRates) => number | null,
  quantities: readonly Quantity[] = from.quantities,
): Pick<Reading, 'id' | 'of' | 'estimate' | 'unbounded' | 'roundingRange'> {
  const at = (values: readonly number[]) => value(from.rates(values)) ?? NaN;
  return {
    id,
    of: 0,
    ...estimateOf(at(from.quantities.map((quantity) => quantity.value))),
    roundingRange: quantities.some(({ low, high }) => low !== high)
      ? rangeOverCorners(from.quantities, at)
      : null,
  };
}

function predictive(id: AlarmReadingId, after: AfterWhat, setup: Setup): Reading {
  const value = after === 'alarm' ? positivePredictiveValue : negativePredictiveValue;
  return reading({ ...measured(id, setup, value), ...predictiveInterval(after, setup) });
}

type WithInterval = Pick<Reading, 'interval' | 'whyNoInterval'>;
const none = (whyNoInterval: NoInterval): WithInterval => ({ interval: null, whyNoInterval });
const has = (interval: ReadingInterval): WithInterval => ({ interval, whyNoInterval: null });

function predictiveInterval(after: AfterWhat, setup: Setup): WithInterval {
  const { question, both, cells, level, exact } = setup;
  if (cells !== null) {
    const [caught, missed, falseAlarms, quiet] = cells;
    const pair = after === 'alarm' ? [caught, falseAlarms] : [quiet, missed];
    return has(shareInterval(pair, setup, ([right = NaN, wrong = NaN]) => [right, right + wrong]));
  }
  if (both === null || question.prevalence === null) return none('no-counts');
  if (exact) return none('no-exact-form');
  const { share, given } = question.prevalence;
  const sample = given.kind === 'counts' ? ([given.part, given.whole] as const) : null;
  return has(predictiveLimits(both, after, share, sample, level));
}

function likelihoodRatio(id: AlarmReadingId, after: AfterWhat, setup: Setup): Reading {
  const { both, level, exact, question } = setup;
  // The prevalence has no part in it.
  const sides = [question.sensitivity.share, question.specificity.share];
  const ratio = ({ sensitivity, falseAlarmRate }: AlarmRates) =>
    after === 'alarm' ? sensitivity / falseAlarmRate : (1 - sensitivity) / (1 - falseAlarmRate);
  return reading({
    ...measured(id, setup, ratio, sides),
    ...(both === null
      ? none('no-counts')
      : exact
        ? none('no-exact-form')
        : has(likelihoodRatioLimits(both, after, level))),
  });
}

/** The Wilson interval of a share, or with `exact` the Clopper-Pearson one, over the counts that it depends on. */
function shareInterval(
  quantities: readonly Quantity[],
  { level, exact }: Setup,
  rightOfAll: (values: readonly number[]) => readonly [right: number, all: number],
): ReadingInterval {
  const limits = exact ? clopperPearsonInterval : wilsonInterval;
  return intervalOver(quantities, level, exact ? 'clopper-pearson' : 'wilson', (values): Interval => {
    const [right, all] = rightOfAll(values);
    // Of nobody anything can be.
    return all === 0 ? { low: 0, high: 1 } : limits(right, all, level);
  });
}

function shareReading(id: AlarmReadingId, { share, given }: AlarmShare, setup: Setup): Reading {
  const counts = countsBehind(given);
  return reading({
    id,
    of: 0,
    estimate: share.value,
    roundingRange: share.low === share.high ? null : { low: share.low, high: share.high },
    ...(counts === null
      ? none(id !== 'prevalence' ? 'no-counts' : share.precision === 'range' ? 'range' : 'given')
      : has(
          shareInterval(counts.quantities, setup, ([first = NaN, second = NaN]) =>
            counts.rightOfAll(first, second),
          ),
        )),
  });
}

function prevalenceReading(setup: Setup): Reading {
  const { question, cells } = setup;
  if (question.prevalence !== null) return shareReading('prevalence', question.prevalence, setup);
  return reading({
    ...measured('prevalence', setup, ({ prevalence }) => prevalence),
    ...(cells === null
      ? none('no-counts')
      : has(
          shareInterval(cells, setup, ([caught = NaN, missed = NaN, falseAlarms = NaN, quiet = NaN]) => [
            caught + missed,
            caught + missed + falseAlarms + quiet,
          ]),
        )),
  });
}

function statedBeside({ sensitivity, specificity, prevalence }: AlarmQuestion): StatedBeside[] {
  return [sensitivity, specificity, prevalence].flatMap((side, group) => {
    if (side?.given.kind !== 'counts' || side.given.stated === null) return [];
    const { part, whole, stated } = side.given;
    const computed = part.value / whole.value;
    return [{ group, stated, computed, agrees: computed >= stated.low && computed <= stated.high }];
  });
}
