import type { AlarmQuestion, Question } from '../../../grammar/question.ts';
import { oneSample, ratesOf } from '../../report/alarm-rates.ts';
import { atAnotherPrevalence, outOf } from '../../report/natural-frequencies.ts';
import { fixed, plainPercent } from './numbers.ts';

/** The cautions and the questions of an alarm. */

/** "The prevalence decides: at 4% instead of 0.4%, about 56 of 100 alarms would be real." */
export function prevalenceDecides(question: Question): string {
  if (question.kind !== 'alarm') return '';
  const { falseAlarmRate, prevalence } = ratesOf(question);
  if (falseAlarmRate === 0)
    return 'The figures have no false alarm at all; a single one would lower the share of real alarms.';
  const other = question.prevalence?.share.precision === 'range' ? null : atAnotherPrevalence(question);
  if (other === null || other.value === 0)
    return 'The prevalence decides: the lower it is, the fewer of the alarms are real.';
  const base = outOf([other.value]);
  const here = oneSample(question) === null ? prevalenceText(question) : plainPercent(prevalence);
  return `The prevalence decides: at ${spelledLike(here, other.prevalence)} instead of ${here}, about ${fixed(Math.round(other.value * base), 0)} of ${fixed(base, 0)} alarms would be real.`;
}

/** "0.4% has to belong to the place where the alarm stands, and is taken as exact." */
export function prevalenceAsGiven(question: Question): string {
  if (question.kind !== 'alarm' || question.prevalence === null) return '';
  const sampled = question.prevalence.given.kind === 'counts';
  const exact = sampled || question.prevalence.share.precision === 'range' ? '' : ', and is taken as exact';
  return `${capitalPrevalence(question)} has to be that of the place where the alarm stands${exact}.`;
}

const capitalPrevalence = (question: AlarmQuestion) => `The prevalence (${prevalenceText(question)})`;

/** Another prevalence in the spelling of the typed one: `1 in 25` beside `1 in 250`. */
function spelledLike(typed: string, prevalence: number): string {
  const one = Number((1 / prevalence).toPrecision(12));
  return typed.startsWith('1 in ') && Number.isInteger(one)
    ? `1 in ${fixed(one, 0)}`
    : plainPercent(prevalence);
}

/** A prevalence as it was typed: `0.4%`, `1 in 250`, `40 of 10,000`. */
export function prevalenceText({ prevalence }: AlarmQuestion): string {
  if (prevalence === null) return '';
  const { given, share } = prevalence;
  switch (given.kind) {
    case 'share':
      return given.typed.text;
    case 'counts':
      return / of /.test(given.part.text) ? given.part.text : `${given.part.text} of ${given.whole.text}`;
    case 'cells':
      return share.text;
  }
}

/** The percentages of an alarm whose counts are worth asking for: "sensitivity 92% and specificity 97%". */
export function statedSides(question: AlarmQuestion): string {
  const side = (name: string, turned: string, { given }: AlarmQuestion['sensitivity']) =>
    given.kind === 'share' ? [`${given.turned ? turned : name} ${given.typed.text}`] : [];
  return [
    ...side('sensitivity', 'miss rate', question.sensitivity),
    ...side('specificity', 'false alarm rate', question.specificity),
  ].join(' and ');
}

/** "Where does the prevalence of 0.4% come from: which place, which time, how many were looked at?" */
export const prevalenceSource = (question: Question) =>
  question.kind === 'alarm'
    ? `Where does the prevalence of ${prevalenceText(question)} come from: which place, which time, how many were looked at?`
    : '';
