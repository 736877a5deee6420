import type { AlarmQuestion, Quantity, Question, ReadingRemark } from '../../../grammar/question.ts';
import type { Report } from '../../report/report.ts';
import { alarmReadAs } from './alarm-read-as.ts';
import { casesAsTyped, plainLabel, population } from './labels.ts';
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
      const rows = question.groups.map(({ cases, caseShare, coverage }, index) => {
        const share =
          cases === null ? `${quantityText(caseShare)} of ${casesAsTyped(question)}` : quantityText(cases);
        const of =
          index === 0 && question.totalCases !== null && cases !== null
            ? ` of ${quantityText(question.totalCases)} ${casesAsTyped(question)}`
            : '';
        return `${named(index)} ${share}${of}, ${coverage.text}${index === 0 ? ` of ${population(question)}` : ''}`;
      });
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
