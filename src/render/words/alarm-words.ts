import { alarmFigures } from '../../../grammar/print-alarm.ts';
import type { AlarmQuestion } from '../../../grammar/question.ts';
import { oneSample, ratesOf } from '../../report/alarm-rates.ts';
import { naturalFrequencies, outOf } from '../../report/natural-frequencies.ts';
import type { Reading } from '../../report/reading.ts';
import { readingsOf } from '../../report/report.ts';
import type { AlarmReport } from '../../report/report.ts';
import { levelText, limitsText } from './interval-text.ts';
import { capital } from './labels.ts';
import { fixed, percent, ratio } from './numbers.ts';
import type { Avoid, Post } from './telling.ts';

/** An alarm in words: of so many alarms so many are real. */

const shortLength = 70;

/** "Of 100 alarms about 11 are real (95% interval 5 to 21)." */
export function alarmHeadline(report: AlarmReport): string {
  return `Of ${realAlarms(report, 'full')}.`;
}

/** The headline's figure in at most 70 characters, or `null` where it does not fit. */
export function alarmShortPost(report: AlarmReport): string | null {
  const text = `Of ${realAlarms(report, 'short')}.`;
  return text.length <= shortLength && predictive(report).estimate !== null ? text : null;
}

function predictive(report: AlarmReport): Reading {
  const [value] = readingsOf(report, 'positive-predictive-value');
  if (value === undefined) throw new Error('the report of an alarm has no predictive value');
  return value;
}

/** "100 alarms about 11 are real (...)"; without any alarm it is said that there is none. */
function realAlarms(report: AlarmReport, detail: 'full' | 'short'): string {
  const value = predictive(report);
  if (value.estimate === null) return 'no alarms nothing can be said: with these figures there is never one';
  const base = baseFor(value);
  const alarms = `${fixed(base, 0)} alarms`;
  if (isRanged(report.question)) {
    const { low, high } = value.roundingRange ?? { low: null, high: null };
    return `${alarms} about ${among(low ?? 0, base)} to ${among(high ?? 1, base)} are real, over the range given (${note(value, base, 'short')})`;
  }
  return `${alarms} ${many(value.estimate, base, 'are real', 'is real')} (${note(value, base, detail)})`;
}

/** "about 11 are real"; "none is real" and "all are real" only where that is exact. */
function many(share: number, base: number, plural: string, singular: string): string {
  if (share === 0) return `none ${singular}`;
  if (share === 1) return `all ${plural}`;
  const text = among(share, base);
  return text === '1' ? `about 1 ${singular}` : `about ${text} ${plural}`;
}

/** A share as a number out of the base; 0 and the whole base only where they are exact. */
function among(share: number, base: number): string {
  const rounded = Math.round(share * base);
  if (rounded === 0 && share > 0) return 'under 1';
  if (rounded === base && share < 1) return `over ${fixed(base - 1, 0)}`;
  return fixed(rounded, 0);
}

/** The base at which the estimate shows, and at which the limits do not fall together. */
function baseFor({ estimate, interval }: Reading): number {
  const share = estimate === 0 || estimate === 1 ? null : estimate;
  const near = [share, ...(share === null ? [interval?.high ?? null] : [])].filter((part) => part !== null);
  let base = outOf(near);
  const same = () =>
    interval !== null &&
    interval.low !== interval.high &&
    among(interval.low ?? 0, base) === among(interval.high ?? 1, base);
  while (same() && base < 1e6) base *= 10;
  return base;
}

/** "95% interval 5 to 21", or why there is none; with `full` also what rounding alone allows. */
function note({ interval, roundingRange, whyNoInterval }: Reading, base: number, detail: 'full' | 'short') {
  const span = (low: number | null, high: number | null) =>
    `${among(low ?? 0, base)} to ${among(high ?? 1, base)}`;
  if (interval !== null) return `${levelText(interval.level)} interval ${span(interval.low, interval.high)}`;
  const why =
    whyNoInterval === 'no-exact-form' ? 'no exact interval for this reading' : 'no interval without counts';
  const { low, high } = roundingRange ?? { low: null, high: null };
  const rounded = roundingRange !== null && among(low ?? 0, base) !== among(high ?? 1, base);
  return rounded && detail === 'full' ? `rounding allows ${span(low, high)}; ${why}` : why;
}

/** Whether one of the figures is a range, so that no single value stands for the whole. */
export function isRanged({ sensitivity, specificity, prevalence }: AlarmQuestion): boolean {
  return [sensitivity, specificity, prevalence].some((side) => side?.share.precision === 'range');
}

/** What is checked, as typed: "wells"; else the word for anything that goes past an alarm. */
const checked = ({ unit }: AlarmQuestion) => unit ?? 'checked';

/** The sentences that may be posted: alarms, silence, and the odds. */
export function alarmPosts(report: AlarmReport): readonly Post[] {
  return [...alarmsPost(report), ...silencePost(report), ...oddsPost(report)];
}

function alarmsPost(report: AlarmReport): Post[] {
  const { question } = report;
  const value = predictive(report);
  if (value.estimate === null) return [];
  const post = (text: string): Post[] => [{ reading: 'positive-predictive-value', text }];
  const base = outOf([value.estimate]);
  const about = `about ${among(value.estimate, base)} in ${fixed(base, 0)} (${note(value, base, 'short')}${fromCounts(question)})`;
  const cells = oneSample(question);
  if (isRanged(question)) return post(`${figures(question)}: of ${realAlarms(report, 'short')}.`);
  if (cells?.every(({ precision }) => precision === 'exact') === true) {
    const [caught = 0, missed = 0, falseAlarms = 0, quiet = 0] = cells.map(({ value: count }) => count);
    const sum = { cases: caught + missed, others: falseAlarms + quiet, alarms: caught + falseAlarms };
    return post(
      `Of ${fixed(sum.cases + sum.others, 0)} ${checked(question)}, ${fixed(sum.cases, 0)} were real cases and ${part(caught, sum.cases)} raised an alarm; of the ${fixed(sum.others, 0)} others, ${number(falseAlarms)} did too. So of ${fixed(sum.alarms, 0)} alarms ${number(caught)} were real, ${about}.`,
    );
  }
  const natural = naturalFrequencies(question);
  if (natural === null) return [];
  const { cases, caught, others, falseAlarms, alarms } = natural;
  return post(
    `Of ${fixed(natural.base, 0)} ${checked(question)}, ${fixed(cases, 0)} are real cases and ${part(caught, cases)} raise an alarm; of the ${fixed(others, 0)} others, ${number(falseAlarms)} do too. So of ${fixed(alarms, 0)} alarms ${number(caught)} are real, ${about}.`,
  );
}

const number = (count: number) => (count === 0 ? 'none' : fixed(count, 0));
const part = (count: number, all: number) => (count === all ? 'all of them' : `${number(count)} of them`);

/** ", from 50 real cases and 200 others": what an interval rests on, where the sentence does not say it already. */
function fromCounts({ sensitivity, specificity, prevalence }: AlarmQuestion): string {
  const [own, others] = [sensitivity.given, specificity.given].map((given) => {
    if (given.kind === 'share') return null;
    return given.kind === 'counts' ? given.whole.value : given.right.value + given.wrong.value;
  });
  if (prevalence === null || own == null || others == null) return '';
  return `, from ${fixed(own, 0)} real cases and ${fixed(others, 0)} others`;
}

const figures = (question: AlarmQuestion) => capital(alarmFigures(question));

/** The other side of the negative predictive value: how often silence hides a real case. */
function hidden(report: AlarmReport): Reading | null {
  const [value] = readingsOf(report, 'negative-predictive-value');
  if (value?.estimate == null) return null;
  const rest = (limit: number | null) => (limit === null ? null : 1 - limit);
  const { interval, roundingRange } = value;
  return {
    ...value,
    estimate: 1 - value.estimate,
    interval: interval && { ...interval, low: rest(interval.high), high: rest(interval.low) },
    roundingRange: roundingRange && { low: rest(roundingRange.high), high: rest(roundingRange.low) },
  };
}

function silencePost(report: AlarmReport): Post[] {
  const value = hidden(report);
  const { question } = report;
  if (value?.estimate == null) return [];
  return [
    {
      reading: 'negative-predictive-value',
      text: `${figures(question)}: ${silence(question, value, note(value, baseFor(value), 'short'))}.`,
    },
  ];
}

/** "of 10,000 quiet times about 3 hide a real case (...)". */
function silence(question: AlarmQuestion, value: Reading, remark: string): string {
  const base = baseFor(value);
  const share = value.estimate ?? NaN;
  const { unit } = question;
  const of = unit === null ? `${fixed(base, 0)} quiet times` : `${fixed(base, 0)} ${unit} without an alarm`;
  const words =
    unit === null ? ['hide a real case', 'hides a real case'] : ['are real cases', 'is a real case'];
  return `of ${of} ${many(share, base, words[0] ?? '', words[1] ?? '')} (${remark})`;
}

function oddsPost(report: AlarmReport): Post[] {
  const [value] = readingsOf(report, 'likelihood-ratio-positive');
  if (value?.estimate == null || value.estimate === 0) return [];
  const limits =
    value.interval === null
      ? note(value, 100, 'short')
      : `${levelText(value.interval.level)} interval ${limitsText(value, value.interval, 'short')}`;
  return [
    {
      reading: 'likelihood-ratio-positive',
      text: `${figures(report.question)}: after an alarm the odds of a real case are ${ratio(value.estimate, 'short')} times those before it (${limits}).`,
    },
  ];
}

/** What is better not posted: a share of real cases passed off as a share of alarms, and silence as safety. */
export function alarmAvoid(report: AlarmReport): readonly Avoid[] {
  const { sensitivity, falseAlarmRate } = ratesOf(report.question);
  const caught = percent(sensitivity, 'full');
  const falsely = percent(falseAlarmRate, 'full');
  const value = hidden(report);
  return [
    {
      because: `${caught} is the share of real cases that raise an alarm, not the share of alarms that are real.`,
      text: `The alarm is ${caught} right.`,
    },
    {
      because: `${falsely} is the share of the others that raise an alarm, not the share of alarms that are false.`,
      text: `${falsely} of the alarms are false.`,
    },
    ...(value?.estimate == null || value.estimate === 0
      ? []
      : [
          {
            because: `Silence can hide a real case: ${silence(report.question, value, note(value, baseFor(value), 'short'))}.`,
            text: 'No alarm, no case.',
          },
        ]),
  ];
}
