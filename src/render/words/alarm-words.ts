import { alarmFigures } from '../../../grammar/print-alarm.ts';
import type { AlarmQuestion } from '../../../grammar/question.ts';
import { ratesOf } from '../../report/alarm-rates.ts';
import { countedNumbers, naturalFrequencies, outOf } from '../../report/natural-frequencies.ts';
import type { Reading } from '../../report/reading.ts';
import { readingsOf } from '../../report/report.ts';
import type { AlarmReport } from '../../report/report.ts';
import { dependsOnRange, isRanged } from './alarm-rows.ts';
import { levelText, limitsText } from './interval-text.ts';
import { capital } from './labels.ts';
import { asCounted, forExample, inNaturalNumbers } from './natural-words.ts';
import { fixed, plainPercent, ratio } from './numbers.ts';
import type { Avoid, Post } from './telling.ts';

/** An alarm in words: of so many alarms so many are real. */

const shortLength = 70;

/** "Of 100 alarms about 11 are real (95% interval 5 to 21)." */
export function alarmHeadline(report: AlarmReport): string {
  return predictive(report).estimate === null
    ? 'With these figures there is never an alarm, so none can be real or false.'
    : `Of ${realAlarms(report, 'full')}.`;
}

/** The headline's figure in at most 70 characters, or `null` where it does not fit. */
export function alarmShortPost(report: AlarmReport): string | null {
  const { estimate, roundingRange } = predictive(report);
  // "None" and "all" from a rounded percentage need what rounding allows beside them.
  if (estimate === null || ((estimate === 0 || estimate === 1) && roundingRange !== null)) return null;
  const text = `Of ${realAlarms(report, 'short')}.`;
  return text.length <= shortLength ? text : null;
}

function predictive(report: AlarmReport): Reading {
  const [value] = readingsOf(report, 'positive-predictive-value');
  if (value === undefined) throw new Error('the report of an alarm has no predictive value');
  return value;
}

/** "100 alarms about 11 are real (...)". */
function realAlarms(report: AlarmReport, detail: 'full' | 'short'): string {
  const value = predictive(report);
  const base = baseFor(value);
  const alarms = `${fixed(base, 0)} alarms`;
  const spread = isRanged(report.question) ? spreadOf(value, base) : null;
  if (spread !== null) {
    return `${alarms} about ${spread} are real, over all that the figures allow (${note(value, base, 'short')})`;
  }
  return `${alarms} ${many(value.estimate ?? NaN, base, 'are real', 'is real')} (${note(value, base, detail)})`;
}

/** "6 to 24": what a range allows, where its ends differ. */
function spreadOf({ roundingRange }: Reading, base: number): string | null {
  if (roundingRange === null) return null;
  const [low, high] = [among(roundingRange.low ?? 0, base), among(roundingRange.high ?? 1, base)];
  return low === high ? null : `${low} to ${high}`;
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
function baseFor({ estimate, interval, roundingRange }: Reading): number {
  const share = estimate === 0 || estimate === 1 ? null : estimate;
  const near = [share, ...(share === null ? [(interval ?? roundingRange)?.high ?? null] : [])].filter(
    (part) => part !== null,
  );
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

/** What is checked, as typed: "wells"; else the word for anything that goes past an alarm. */
const checked = ({ unit, clauses }: AlarmQuestion) => clauses.among ?? unit ?? 'checked';

/** The sentences that may be posted: alarms, silence, and the odds. */
export function alarmPosts(report: AlarmReport): readonly Post[] {
  return [...alarmsPost(report), ...silencePost(report), ...oddsPost(report)];
}

function alarmsPost(report: AlarmReport): Post[] {
  const { question } = report;
  const value = predictive(report);
  const share = value.estimate;
  if (share === null) return [];
  const post = (text: string): Post[] => [{ reading: 'positive-predictive-value', text }];
  const base = baseFor(value);
  // Whole numbers would need one value for each figure.
  if (isRanged(question)) return post(`${figures(question)}: of ${realAlarms(report, 'short')}.`);
  const counted = countedNumbers(question);
  const numbers = counted ?? naturalFrequencies(question, base);
  if (numbers === null) return [];
  const about = share === 0 || share === 1 ? '' : `, about ${among(share, base)} in ${fixed(base, 0)}`;
  const remark = `${note(value, base, 'full')}${value.interval === null ? '' : fromCounts(question)}`;
  const verbs = counted === null ? forExample : asCounted;
  return post(`${inNaturalNumbers(numbers, checked(question), verbs)}${about} (${remark}).`);
}

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
      text: `${figures(question)}: ${silence(question, value, note(value, baseFor(value), 'full'))}.`,
    },
  ];
}

/** "of 10,000 quiet times about 3 hide a real case (...)". */
function silence(question: AlarmQuestion, value: Reading, remark: string): string {
  const base = baseFor(value);
  const { unit } = question;
  const of = unit === null ? `${fixed(base, 0)} quiet times` : `${fixed(base, 0)} ${unit} without an alarm`;
  const words =
    unit === null ? ['hide a real case', 'hides a real case'] : ['are real cases', 'is a real case'];
  const spread = isRanged(question) ? spreadOf(value, base) : null;
  const count =
    spread === null
      ? many(value.estimate ?? NaN, base, words[0] ?? '', words[1] ?? '')
      : `about ${spread} ${words[0] ?? ''}`;
  return `of ${of} ${count} (${remark})`;
}

function oddsPost(report: AlarmReport): Post[] {
  const [value] = readingsOf(report, 'likelihood-ratio-positive');
  if (
    value?.estimate == null ||
    value.estimate === 0 ||
    value.estimate === 1 ||
    dependsOnRange(report.question, value.id)
  )
    return [];
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
  const caught = plainPercent(sensitivity);
  const falsely = plainPercent(falseAlarmRate);
  const value = hidden(report);
  return [
    ...(sensitivity === 0
      ? []
      : [
          {
            because: `${caught} is the share of real cases that raise an alarm, not the share of alarms that are real.`,
            text: `The alarm is ${caught} right.`,
          },
        ]),
    ...(falseAlarmRate === 0
      ? []
      : [
          {
            because: `${falsely} is the share of the others that raise an alarm, not the share of alarms that are false.`,
            text: `${falsely} of the alarms are false.`,
          },
        ]),
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
