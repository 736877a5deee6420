import type { Quantity, Question, ReadingRemark } from '../../../grammar/question.ts';
import type { Report } from '../../report/report.ts';
import { coverageRead } from './coverage-words.ts';
import { casesAsTyped, plainLabel } from './labels.ts';
import { count, percent } from './numbers.ts';

/** A typed number as it was read: counts grouped, percentages and frequencies in their own spelling. */
export function quantityText(quantity: Quantity): string {
  if (quantity.precision === 'exact' && /^\d+$/.test(quantity.text)) return count(quantity.value);
  // A percentage of a total that several counts fit.
  return / of /.test(quantity.text) ? `${count(quantity.low)} to ${count(quantity.high)}` : quantity.text;
}

/** The second line of every answer: how the line was read. */
export function readAs(question: Question): string {
  const named = (index: number) => plainLabel(question, index);
  const against = question.groups.length > 1 ? `, compared with ${named(question.reference)}` : '';
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
    case 'bare-counts':
      return `Read as: ${question.groups.map(({ cases }, index) => `${named(index)} ${quantityText(cases)}`).join('; ')}, counts without totals${against}.`;
  }
}

/** A percentage that stood beside counts: "31 of 9,240 is 0.34%. The line has 3.4%." */
export function statedText(report: Report): string[] {
  const { question, stated } = report;
  if (question.kind !== 'counts') return [];
  return stated.flatMap(({ group, stated: figure, computed, agrees }) => {
    const row = question.groups[group];
    if (row === undefined) return [];
    const decimals = figure.text.split('.')[1]?.replace(/\D/g, '').length ?? 0;
    const gives = percentAt(computed, decimals);
    const counts = `${quantityText(row.cases)} of ${quantityText(row.total)} is ${gives}.`;
    return [agrees ? `${counts} So has the line.` : `${counts} The line has ${figure.text}.`];
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
    case 'footnote-dropped':
      return `The footnote mark on ${text} was left out: ${value}.`;
    case 'struck-out-dropped':
      return `Struck-out text was not read: ${text}.`;
    case 'emoji-dropped':
      return `${text} was left out.`;
    case 'number-in-label':
      return `${text} was read as part of the name: ${value}.`;
    case 'time-order':
      return `The earlier, ${value}, is what the other is compared with.`;
    case 'each-counted-once':
      return `${text}: each counted once.`;
    case 'about-taken-as-given':
      return `${text} was taken as ${value}.`;
    case 'different-times':
      return `The groups were watched for different times: ${text}.`;
  }
}
