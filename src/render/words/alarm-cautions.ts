import type { AlarmQuestion, Question } from '../../../grammar/question.ts';
import { oneSample, ratesOf } from '../../report/alarm-rates.ts';
import { atAnotherPrevalence, outOf } from '../../report/natural-frequencies.ts';
import { fixed, percent } from './numbers.ts';

/** The cautions and the questions of an alarm. */

/** "The prevalence decides: at 4% instead of 0.4%, about 56 of 100 alarms would be real." */
export function prevalenceDecides(question: Question): string {
  if (question.kind !== 'alarm') return '';
  const { falseAlarmRate, prevalence } = ratesOf(question);
  if (falseAlarmRate === 0)
    return 'The figures have no false alarm at all; a single one would lower the share of real alarms.';
  const other = atAnotherPrevalence(question);
  if (other === null) return 'The prevalence decides how many of the alarms are real.';
  const base = outOf([other.value]);
  const here = oneSample(question) === null ? prevalenceText(question) : percent(prevalence, 'short');
  return `The prevalence decides: at ${percent(other.prevalence, 'short')} instead of ${here}, about ${fixed(Math.round(other.value * base), 0)} of ${fixed(base, 0)} alarms would be real.`;
}

/** "0.4% has to belong to the place where the alarm stands, and is taken as exact." */
export function prevalenceAsGiven(question: Question): string {
  if (question.kind !== 'alarm' || question.prevalence === null) return '';
  const sampled = question.prevalence.given.kind === 'counts';
  const exact = sampled || question.prevalence.share.precision === 'range' ? '' : ', and is taken as exact';
  return `${capitalPrevalence(question)} has to be that of the place where the alarm stands${exact}.`;
}

const capitalPrevalence = (question: AlarmQuestion) => `The prevalence (${prevalenceText(question)})`;

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
