import type { StrataQuestion } from '../../../grammar/question.ts';
import type { Reading } from '../../report/reading.ts';
import { readingsOf, shownDirection } from '../../report/report.ts';
import type { Report } from '../../report/report.ts';
import { isReversed, pooledAndCrude } from '../../report/reversal.ts';
import { limitsText } from './interval-text.ts';
import { capital, cases, label, plainLabel } from './labels.ts';
import { noneShown } from './none-shown.ts';
import { fixed, ratio } from './numbers.ts';
import { manyPer } from './rate-words.ts';
import { compared, fits, intervalNote, shorten } from './ratio-words.ts';
import type { Post } from './telling.ts';

/** How the answer, its table and its sentences speak of groups within layers. */

/** "layer of age", "layer". */
export const layerWord = ({ by }: StrataQuestion) => (by === null ? 'layer' : `layer of ${by}`);

/** "under 40", "the first layer". */
export function layerName({ layers }: StrataQuestion, index: number): string {
  return layers[index]?.label ?? `layer ${index + 1}`;
}

/** "often", "many cases per rider", "many cases per bus-day": what the groups are compared in. */
function manner(question: StrataQuestion): string {
  const first = question.layers[0]?.question;
  return first === undefined || first.kind === 'counts' ? 'often' : manyPer(first);
}

function had(question: StrataQuestion): string {
  return question.layers[0]?.question.kind === 'counts' ? `had ${cases(question)}` : 'had';
}

/** A reversal is said first; else the pooled ratio. */
export function strataHeadline(report: Report, question: StrataQuestion, reading: Reading): string {
  const group = label(question, reading.of);
  const reference = label(question, reading.against ?? 0);
  if (isReversed(report.readings, reading.of)) {
    const { crude } = pooledAndCrude(report.readings, reading.of);
    if (shownDirection(report, reading) === 'none-shown')
      return `All together ${ratio(crude ?? 1, 'short')} times as often, but ${(crude ?? 1) > 1 ? 'below' : 'above'} 1 in every ${layerWord(question)}: within them no difference is shown.`;
    const [within, together] = (crude ?? 1) > 1 ? ['less', 'more'] : ['more', 'less'];
    return `${capital(group)} had ${cases(question)} ${within} often than ${reference} in every ${layerWord(question)}, but ${together} often all together.`;
  }
  if (shownDirection(report, reading) === 'none-shown')
    return reading.interval === null
      ? 'Within layers no difference is shown, nor that there is none: the ratio has no exact interval here.'
      : `Within layers ${fits(reading)} fits: no difference is shown, nor that there is none.`;
  if (reading.estimate === null)
    return `Within layers no ratio can be given: ${reference} has no ${cases(question)}.`;
  const within = question.by === null ? 'Within layers' : `Within layers of ${question.by}`;
  return shorten(`${within}, ${group} ${had(question)} ${compared(reading, manner(question), reference)}.`);
}

/** The sentences to post: pooled, with the crude counts beside it, and the crude ratio where it points the other way. */
export function strataPosts(report: Report, question: StrataQuestion): Post[] {
  return readingsOf(report, report.headline).flatMap((reading): Post[] => {
    if (reading.estimate === null || reading.against === null) return [];
    const reference = label(question, reading.against);
    const rows = together(question, reading);
    const layers = `${question.layers.length} layers${question.by === null ? '' : ` of ${question.by}`}`;
    const { crude } = pooledAndCrude(report.readings, reading.of);
    const reversed = isReversed(report.readings, reading.of);
    if (shownDirection(report, reading) === 'none-shown')
      return [
        {
          reading: reading.id,
          text: noneShown(reading, `${rows} Compared within ${layers}:`).replace('These', 'these'),
        },
      ];
    const crudely = crude === null ? '' : ` (all together ${ratio(crude, 'short')} times)`;
    const turned = reversed
      ? ` In every ${layerWord(question)} it is the other way round than all together.`
      : '';
    return [
      {
        reading: reading.id,
        text: `${rows} Compared within ${layers}, that is ${compared(reading, manner(question), reference, `${intervalNote(reading)}`)}${crudely}.${turned}`,
      },
    ];
  });
}

/** "Night: 83 of 2,900. Day: 46 of 9,100.", summed over the layers; nothing for shares, whose layers have no common divisor. */
function together(question: StrataQuestion, { of, against }: Reading): string {
  return [of, against ?? 0]
    .map((index) => {
      const own = summed(question, index);
      return own === '' ? '' : `${capital(label(question, index))}: ${own}.`;
    })
    .filter((text) => text !== '')
    .join(' ');
}

/** "83 of 2,900", "23 in 14,000 bus-days", "44 cases": one group over all layers. */
export function summed(question: StrataQuestion, index: number): string {
  let [x, base] = [0, 0];
  let hidden = false;
  for (const { question: layer } of question.layers) {
    const group = layer.groups[index];
    if (group === undefined || group.cases === null) return '';
    hidden ||= group.cases.precision === 'range';
    x += group.cases.value;
    base += 'total' in group ? group.total.value : 'exposure' in group ? group.exposure.value : 0;
  }
  if (hidden) return '';
  const unit = question.unit === null ? '' : ` ${question.unit}`;
  const first = question.layers[0]?.question.kind;
  if (first === 'shares') return `${fixed(x, 0)} ${question.caseNoun ?? 'cases'}`;
  return `${fixed(x, 0)} ${first === 'rates' ? 'in' : 'of'} ${fixed(base, 0)}${unit}`;
}

/** One row a layer, then all together and pooled. */
export function strataTable(report: Report, question: StrataQuestion): readonly (readonly string[])[] {
  const pairs = readingsOf(report, report.headline);
  return pairs.flatMap((pooled, place) => {
    const [own, reference] = [pooled.of, pooled.against ?? 0];
    const header = [
      capital(question.by ?? 'layer'),
      plainLabel(question, own),
      plainLabel(question, reference),
      'Ratio',
      'Interval',
    ];
    const within = report.readings.filter(({ layer, of }) => layer !== null && of === own);
    const rows = within.map((reading) => [
      layerName(question, reading.layer ?? 0),
      cell(question, reading.layer ?? 0, own),
      cell(question, reading.layer ?? 0, reference),
      ...valueCells(reading),
    ]);
    const crude = report.readings.find(
      ({ id, of }) => (id === 'crude-risk-ratio' || id === 'crude-rate-ratio') && of === own,
    );
    const all =
      crude === undefined
        ? []
        : [['All together', summed(question, own), summed(question, reference), ...valueCells(crude)]];
    return [
      ...(place === 0 || pairs.length > 1 ? [header] : []),
      ...rows,
      ...all,
      ['Within layers', '', '', ...valueCells(pooled)],
    ];
  });
}

function valueCells(reading: Reading): [string, string] {
  return [
    reading.estimate === null
      ? reading.unbounded
        ? 'no upper end'
        : 'no value'
      : ratio(reading.estimate, 'full'),
    reading.interval === null ? 'none' : limitsText(reading, reading.interval, 'full'),
  ];
}

function cell({ layers }: StrataQuestion, layer: number, index: number): string {
  const group = layers[layer]?.question.groups[index];
  if (group === undefined) return '';
  const x = group.cases === null ? '' : group.cases.text;
  if ('total' in group) return `${x} of ${group.total.text}`;
  if ('exposure' in group) return `${x} in ${group.exposure.text}`;
  return `${x}; ${group.coverage.text}`;
}
