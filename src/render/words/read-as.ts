import type {
  AlarmQuestion,
  Quantity,
  Question,
  RatesQuestion,
  ReadingRemark,
} from '../../../grammar/question.ts';
import type { Report } from '../../report/report.ts';
import { alarmReadAs } from './alarm-read-as.ts';
import { coverageRead } from './coverage-words.ts';
import { casesAsTyped, one, plainLabel } from './labels.ts';
import { count, percent } from './numbers.ts';

/** A typed number as it was read: counts grouped, percentages and frequencies in their own spelling. */
export function quantityText(quantity: Quantity): string {
  if (quantity.precision === 'exact' && /^\d+$/.test(quantity.text)) return count(quantity.value);
  // A percentage of a total that several counts fit.
  return / of /.test(quantity.text) ? `${count(quantity.low)} to ${count(quantity.high)}` : quantity.text;
}

/** The second line of every answer: how the line was read. */
export function readAs(question: Question): string {
  if (question.kind === 'alarm') return alarmReadAs(question);
  const named = (index: number) => plainLabel(question, index);
  const reference = named(question.reference);
  const earlier = question.overTime && reference !== 'before' ? 'the earlier, ' : '';
  const against = question.groups.length > 1 ? `, compared with ${earlier}${reference}` : '';
  switch (question.kind) {
    case 'counts': {
      const unit = question.unit === null ? '' : ` ${question.unit}`;
      const rows = question.groups.map(
        ({ cases, total }, index) =>
          `${named(index)} ${quantityText(cases)} of ${quantityText(total)}${index === 0 ? unit : ''}`,
      );
      return `Read as: ${rows.join('; ')}${against}.`;
    }
    case 'shares': {
      const rows = question.groups.map(({ cases, caseShare }, index) => {
        const share =
          cases === null ? `${quantityText(caseShare)} of ${casesAsTyped(question)}` : quantityText(cases);
        const of =
          index === 0 && question.totalCases !== null && cases !== null
            ? ` of ${quantityText(question.totalCases)} ${casesAsTyped(question)}`
            : '';
        const held = coverageRead(question, index);
        return `${named(index)} ${share}${of}${held === '' ? '' : `, ${held}`}`;
      });
      if (question.unknownCases !== null)
        rows.push(`${quantityText(question.unknownCases)} of unknown group`);
      return `Read as: ${rows.join('; ')}${against}.`;
    }
    case 'stated':
      return `Read as: ${question.groups.map(({ share }, index) => `${named(index)} ${share.text}`).join('; ')}, as stated, without counts${against}.`;
    case 'strata': {
      const { by, layers } = question;
      const what = { counts: 'counts', rates: 'rates', shares: 'cases and coverage' }[
        layers[0]?.question.kind ?? 'counts'
      ];
      const names = layers.map(({ label }, index) => label ?? `layer ${index + 1}`).join(', ');
      return `Read as: ${question.groups.map((_, index) => named(index)).join(' and ')}, ${what} within ${layers.length} layers${by === null ? '' : ` of ${by}`} (${shortened(names)})${against}.`;
    }
    case 'rates': {
      const stated = question.groups.some(({ asStated }) => asStated) ? ', as stated, without counts' : '';
      return `Read as: ${question.groups.map((_, index) => `${named(index)} ${rateText(question, index)}`).join('; ')}${stated}${against}.`;
    }
    case 'bare-counts': {
      const what = question.overTime ? 'counts at two times' : 'counts without totals';
      return `Read as: ${question.groups.map(({ cases }, index) => `${named(index)} ${quantityText(cases)}`).join('; ')}, ${what}${against}.`;
    }
  }
}

/** A long list of names is cut: the table has all of them. */
const shortened = (names: string) => (names.length <= 80 ? names : `${names.slice(0, 79).trimEnd()}\u2026`);

/** "14 in 5,200 bus-days", "3 per 1,000 bus-days", "5 per week". */
export function rateText(question: RatesQuestion, index: number): string {
  const group = question.groups[index];
  if (group === undefined) return '';
  const noun = index === 0 && question.caseNoun !== null ? ` ${question.caseNoun}` : '';
  const over =
    group.exposure.value === 1 && group.connector === 'per'
      ? (one(question) ?? question.unit ?? '')
      : `${quantityText(group.exposure)}${question.unit === null ? '' : ` ${question.unit}`}`;
  return `${quantityText(group.cases)}${noun} ${group.connector} ${over}`;
}

/** A percentage that stood beside counts: "31 of 9,240 is 0.34%. The line has 3.4%." */
export function statedText(report: Report): string[] {
  const { question, stated } = report;
  if (question.kind === 'alarm') return alarmStated(question, stated);
  if (question.kind !== 'counts') return [];
  return stated.flatMap(({ group, stated: figure, computed, agrees }) => {
    const row = question.groups[group];
    if (row === undefined) return [];
    return [statedLine([row.cases, row.total], figure, computed, agrees)];
  });
}

function statedLine(
  [part, whole]: readonly [Quantity, Quantity],
  stated: Quantity,
  computed: number,
  agrees: boolean,
): string {
  const decimals = stated.text.split('.')[1]?.replace(/\D/g, '').length ?? 0;
  const gives = percentAt(computed, decimals);
  const counts = `${quantityText(part)} of ${quantityText(whole)} is ${gives}.`;
  return agrees ? `${counts} So has the line.` : `${counts} The line has ${stated.text}.`;
}

function alarmStated(question: AlarmQuestion, stated: Report['stated']): string[] {
  const sides = [question.sensitivity, question.specificity, question.prevalence];
  return stated.flatMap(({ group, stated: figure, computed, agrees }) => {
    const given = sides[group]?.given;
    return given?.kind === 'counts' ? [statedLine([given.part, given.whole], figure, computed, agrees)] : [];
  });
}

/** At the stated figure's own decimals, or more where it would otherwise read as 0. */
function percentAt(share: number, decimals: number): string {
  const text = (share * 100).toFixed(decimals);
  return share > 0 && Number(text) < 1 && Number(text) !== share * 100 ? percent(share, 'short') : `${text}%`;
}

/** How the line was read where that may surprise. */
export function remarksText(question: Question): string[] {
  return question.remarks.map(remarkText);
}

function remarkText({ id, text, readAs: value }: ReadingRemark): string {
  switch (id) {
    case 'decimal-comma':
    case 'indian-grouping':
    case 'count-from-percentage':
      return `${text} was read as ${value}.`;
    case 'whole-taken-apart':
      return `The whole, ${text}, contains the others; the rest is ${value}.`;
    case 'total-left-out':
      return `${text} is the sum of the others and was left out.`;
    case 'total-row-left-out':
      return `The row ${text} is the sum of the others and was left out.`;
    case 'footnote-dropped':
      return `The footnote mark on ${text} was left out: ${value}.`;
    case 'struck-out-dropped':
      return `Struck-out text was not read: ${text}.`;
    case 'emoji-dropped':
      return `${text} was left out.`;
    case 'words-left-out':
      return `\u201c${text}\u201d was left out.`;
    case 'number-in-label':
      return `${text} was read as part of the name: ${value}.`;
    case 'each-counted-once':
      return `${text}: each counted once.`;
    case 'about-taken-as-given':
      return `${text} was taken as ${value}.`;
    case 'different-times':
      return `The groups were watched for different times: ${text}.`;
  }
}
