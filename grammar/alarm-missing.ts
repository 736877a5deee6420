import { cellOf, isShare, wordOf } from './alarm-sides.ts';
import type { Cell, Sided, Sides } from './alarm-sides.ts';
import { alarmWordNamed } from './alarm-words.ts';
import { diagnosis } from './diagnosis.ts';
import type { Diagnosis } from './question.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';

/** What an alarm still lacks, in words and with the line to complete. */

/** The line with the percent sign that is due behind each bare number: `sensitivity 92`, `sensitivity 0.92`. */
export function withPercentSigns(items: readonly Item[], { typed }: Setting): string[] {
  let line = typed;
  for (const item of items.toReversed()) {
    const { figure } = item;
    if (figure.kind !== 'count' || isShare(item) || cellOf(wordOf(item)) !== null) continue;
    const { value } = figure.count.written;
    const share = value <= 1 ? Number((value * 100).toFixed(10)) : value;
    if (figure.count.suppressed || share > 100) return [];
    const { from, to } = figure.countSpan;
    line = `${line.slice(0, from)}${share}%${line.slice(to)}`;
  }
  return [line.trim()];
}

/** What is missing, at the last figure (or at the one without a word), with the line to complete. */
export function missing(sides: Sides, items: readonly Item[], setting: Setting): Diagnosis {
  const unplaced = items.filter((item) => wordOf(item) === null);
  const lacking = lackingWords(sides);
  const place = unplaced[0] ?? items.at(-1);
  // As many figures without a word as words without a figure: they are offered in the order typed.
  const fits = unplaced.length === lacking.length && unplaced.every(isShare);
  const fillers = fits ? unplaced.map((item) => figureText(item, setting)) : [];
  const given = items
    .filter((item) => wordOf(item) !== null)
    .map((item) => `${item.name?.text ?? ''} ${figureText(item, setting)}`);
  const wanted = lacking.map((word, index) =>
    cellOf(alarmWordNamed(word)) !== null
      ? `${word} ...`
      : `${word} ${fillers[index] ?? (word === 'prevalence' ? '1 in ...' : '...%')}`,
  );
  const asGroups = items.map((item) => `${item.name?.text ?? ''}: ${figureText(item, setting)}`).join(' vs ');
  const everyday =
    items.length === 2 && unplaced.length === 0 && items.every((item) => cellOf(wordOf(item)) !== null);
  return diagnosis(
    'alarm-missing',
    place?.span ?? { from: 0, to: setting.typed.length },
    [
      lacking.length === 1
        ? lacking.join('')
        : `${lacking.slice(0, -1).join(', ')} and ${lacking.at(-1) ?? ''}`,
    ],
    [`alarm: ${[...given, ...wanted].join(', ')}`, ...(everyday ? [asGroups] : [])],
  );
}

function lackingWords(sides: Sides): string[] {
  const pair = (
    given: Sided | null,
    one: Cell | null,
    other: Cell | null,
    words: readonly [string, string, string],
  ) => {
    if (given !== null || (one !== null && other !== null)) return [];
    if (one === null && other === null) return [words[0]];
    return [one === null ? words[1] : words[2]];
  };
  const { sensitivity, specificity, prevalence, caught, missed, falseAlarms, quiet } = sides;
  const anyCell = [caught, missed, falseAlarms, quiet].some((cell) => cell !== null);
  const onlyCells = anyCell && sensitivity === null && specificity === null && prevalence === null;
  const found = [
    ...pair(sensitivity, caught, missed, ['sensitivity', 'caught', 'missed']),
    ...pair(specificity, falseAlarms, quiet, ['specificity', 'false alarms', 'quiet']),
  ];
  if (onlyCells)
    return found.flatMap((word) =>
      word === 'sensitivity'
        ? ['caught', 'missed']
        : word === 'specificity'
          ? ['false alarms', 'quiet']
          : [word],
    );
  return prevalence === null ? [...found, 'prevalence'] : found;
}

/** A figure as typed, with what is counted behind it. */
export const figureText = ({ figure, after }: Item, { typed }: Setting): string => {
  const span =
    figure.kind === 'count'
      ? { from: figure.countSpan.from, to: figure.total?.span.to ?? figure.countSpan.to }
      : { from: figure.shareSpan.from, to: figure.total?.span.to ?? figure.shareSpan.to };
  const text = typed.slice(span.from, span.to).trim();
  return after === null ? text : `${text}${text.endsWith('%') ? ' of' : ''} ${after.text}`;
};

/** `92% accurate`, `PPV 11%`: not one of the figures that an alarm takes. */
export function answerGiven(item: Item, items: readonly Item[], setting: Setting): Diagnosis {
  const place = item.name?.span ?? item.span;
  const word = setting.typed.slice(place.from, place.to).trim();
  const figure = figureText(item, setting);
  const frequency = items.find(
    ({ figure: each, name }) =>
      each.kind === 'share' &&
      each.share.form === 'frequency' &&
      (name === null || alarmWordNamed(name.text) === 'prevalence'),
  );
  const prevalence = frequency === undefined ? '1 in ...' : figureText(frequency, setting);
  const line = `alarm: sensitivity ...%, false alarm rate ...%, prevalence ${prevalence}`;
  return wordOf(item) === 'accuracy'
    ? diagnosis('alarm-accuracy', place, [`${figure} ${word}`], [line])
    : diagnosis('alarm-result', place, [word], [line]);
}
