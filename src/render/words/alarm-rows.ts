import type { AlarmGiven, AlarmQuestion, Question } from '../../../grammar/question.ts';
import { oneSample } from '../../report/alarm-rates.ts';
import type { AlarmReadingId } from '../../report/reading.ts';

/** The readings of an alarm in the working: their names, their formulas with the typed numbers, and where the method comes from. */

export const alarmReadingNames = {
  'positive-predictive-value': 'Positive predictive value, the share of alarms that are real',
  'negative-predictive-value': 'Negative predictive value, the share of quiet times without a real case',
  'likelihood-ratio-positive': 'Likelihood ratio of an alarm',
  'likelihood-ratio-negative': 'Likelihood ratio of silence',
  sensitivity: 'Sensitivity, the share of real cases that raise an alarm',
  specificity: 'Specificity, the share of the others that do not',
  prevalence: 'Prevalence, the share that are real cases',
} satisfies Record<AlarmReadingId, string>;

/** Where the estimate comes from, for a reading without an interval. */
export function alarmMethod(id: string): string {
  switch (id) {
    case 'positive-predictive-value':
    case 'negative-predictive-value':
      return 'Bayes (Altman & Bland 1994)';
    default:
      return '';
  }
}

/** The formula of a reading with the typed numbers in it. */
export function alarmFormula(question: Question, id: AlarmReadingId): string {
  if (question.kind !== 'alarm') return '';
  const [own, others] = [sideTexts(question.sensitivity.given), sideTexts(question.specificity.given)];
  const prevalence = prevalenceTexts(question);
  const cells = oneSample(question)?.map(({ text }) => text);
  const share = (one: string, other: string) => `${one} / (${one} + ${other})`;
  switch (id) {
    case 'positive-predictive-value':
      return cells === undefined
        ? share(`${own.right} x ${prevalence.right}`, `${others.wrong} x ${prevalence.wrong}`)
        : share(cells[0] ?? '', cells[2] ?? '');
    case 'negative-predictive-value':
      return cells === undefined
        ? share(`${others.right} x ${prevalence.wrong}`, `${own.wrong} x ${prevalence.right}`)
        : share(cells[3] ?? '', cells[1] ?? '');
    case 'likelihood-ratio-positive':
      return `${own.right} / (${others.wrong})`.replace('((', '(').replace('))', ')');
    case 'likelihood-ratio-negative':
      return `${own.wrong} / (${others.right})`.replace('((', '(').replace('))', ')');
    case 'sensitivity':
      return own.right;
    case 'specificity':
      return others.right;
    case 'prevalence':
      return prevalence.right;
  }
}

interface SideTexts {
  readonly right: string;
  readonly wrong: string;
}

function sideTexts(given: AlarmGiven): SideTexts {
  switch (given.kind) {
    case 'share':
      return turnedRound(plain(given.typed.text), given.turned);
    case 'counts':
      return turnedRound(countsText(given), given.turned);
    case 'cells': {
      const [right, wrong] = [given.right.text, given.wrong.text];
      return { right: `${right}/(${right} + ${wrong})`, wrong: `${wrong}/(${right} + ${wrong})` };
    }
  }
}

const turnedRound = (text: string, turned: boolean): SideTexts =>
  turned ? { right: `(1 - ${text})`, wrong: text } : { right: text, wrong: `(1 - ${text})` };

/** `46/50`; a percentage of a total that several counts fit stays as it is. */
const countsText = ({ part, whole }: Extract<AlarmGiven, { kind: 'counts' }>) =>
  / of /.test(part.text) ? `(${part.text})` : `${part.text}/${whole.text}`;

/** `1 in 250` is `1/250` in a formula; a range stands in brackets. */
const plain = (text: string) => (/ to |\d-\d/.test(text) ? `(${text})` : text.replace(/ (?:in|per) /, '/'));

function prevalenceTexts(question: AlarmQuestion): SideTexts {
  const cells = oneSample(question)?.map(({ text }) => text);
  if (cells !== undefined) {
    const [caught = '', missed = '', falseAlarms = '', quiet = ''] = cells;
    const all = `(${caught} + ${missed} + ${falseAlarms} + ${quiet})`;
    return { right: `(${caught} + ${missed})/${all}`, wrong: `(${falseAlarms} + ${quiet})/${all}` };
  }
  const given = question.prevalence?.given;
  return given === undefined ? { right: '', wrong: '' } : sideTexts(given);
}
