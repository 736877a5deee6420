import { alarmFigures } from '../../../grammar/print-alarm.ts';
import type { AlarmQuestion } from '../../../grammar/question.ts';
import { oneSample } from '../../report/alarm-rates.ts';
import { plainPercent } from './numbers.ts';

/** What an alarm is called in the answer. */
export const alarmName = ({ name }: AlarmQuestion) => name ?? 'this alarm';

/** "Read as: water alarm, sensitivity 92%, false alarm rate 3% (specificity 97%), prevalence 0.4% of wells." */
export function alarmReadAs(question: AlarmQuestion): string {
  const { specificity, sensitivity, name } = question;
  const turned = [
    ...(sensitivity.given.kind !== 'cells' && sensitivity.given.turned
      ? [`sensitivity ${plainPercent(sensitivity.share.value)}`]
      : []),
    ...(specificity.given.kind !== 'cells' && specificity.given.turned
      ? [`specificity ${plainPercent(specificity.share.value)}`]
      : []),
  ];
  const also = turned.length === 0 ? '' : ` (so ${turned.join(', ')})`;
  const sample = oneSample(question) === null ? '' : ', all from one sample';
  return `Read as: ${name ?? 'alarm'}, ${alarmFigures(question)}${also}${sample}.`;
}
