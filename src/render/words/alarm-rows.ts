import type { AlarmGiven, AlarmQuestion, AlarmShare, Question } from '../../../grammar/question.ts';
import { oneSample } from '../../report/alarm-rates.ts';
import type { AlarmReadingId, Reading, ReadingId } from '../../report/reading.ts';
import { limitsText } from './interval-text.ts';

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
      return `${own.right} / ${bracketed(others.wrong)}`;
    case 'likelihood-ratio-negative':
      return `${own.wrong} / ${bracketed(others.right)}`;
    case 'sensitivity':
      return alone(own.right);
    case 'specificity':
      return alone(others.right);
    case 'prevalence':
      return alone(prevalence.right);
  }
}

/** A share by itself: without brackets, a range with the word for the value taken. */
function alone(text: string): string {
  const bare = text.replace(/^\(([^()]*)\)$/, '$1');
  return isSpan(bare) ? `the middle of ${bare}` : bare;
}

/** Brackets around what is itself a quotient, where it has none yet. */
const bracketed = (text: string) => (/^\([^()]*\)$/.test(text) || !text.includes('/') ? text : `(${text})`);

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

const isSpan = (text: string) => / to |\d-\d/.test(text);

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

const isRange = (side: AlarmShare | null) => side?.share.precision === 'range';

/** Whether one of the figures is a range, so that no single value stands for the whole. */
export const isRanged = ({ sensitivity, specificity, prevalence }: AlarmQuestion) =>
  isRange(sensitivity) || isRange(specificity) || isRange(prevalence);

/** Whether a reading comes from a figure that is a range. */
export function dependsOnRange(question: AlarmQuestion, id: ReadingId): boolean {
  switch (id) {
    case 'sensitivity':
    case 'specificity':
    case 'prevalence':
      return isRange(question[id]);
    case 'likelihood-ratio-positive':
    case 'likelihood-ratio-negative':
      return isRange(question.sensitivity) || isRange(question.specificity);
    default:
      return isRanged(question);
  }
}

/** What rounding or a range allows a reading, where it shows at the digits printed. */
export function alarmRangePart(question: AlarmQuestion, reading: Reading): string | null {
  if (reading.roundingRange === null) return null;
  const text = limitsText(reading, reading.roundingRange, 'full');
  if (/^(.+) to \1$/.test(text)) return null;
  return dependsOnRange(question, reading.id)
    ? `at the middle of what is given, which allows ${text}`
    : `rounding alone allows ${text}`;
}
