import { diagnosis } from './diagnosis.ts';
import { isTimeName } from './labels.ts';
import { refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Item, TreePart } from './tree.ts';

type List = Extract<TreePart, { kind: 'list' }>;

/** The two figures of a change, the earlier first, named `before` and `after` unless they name their own times. */
export function changeItems(list: List): Settled<readonly Item[]> {
  const [first, second, third] = list.items;
  if (first === undefined || second === undefined || third !== undefined)
    return refused(
      diagnosis(
        'change-of-two',
        list.span,
        [],
        ['from 412 to 530', 'before: 41 of 1,000 vs after: 52 of 1,100'],
      ),
    );
  if (isBareYear(first) && isBareYear(second)) {
    const pieces = [first, second].map(({ figure }) =>
      figure.kind === 'count' ? figure.count.written.text : '',
    );
    return refused(diagnosis('years-or-counts', list.span, pieces, [`from ${pieces.join(' to ')}`]));
  }
  const [earlier, later] = list.head === 'change-back' ? [second, first] : [first, second];
  const subject = list.head === 'change-back' ? later.name : first.name;
  const named = (item: Item, fallback: string): Item => {
    const own = item.after !== null && isTimeName(item.after.text) ? item.after : null;
    return {
      ...item,
      name: own ?? { text: fallback, span: item.span },
      after: own === null ? item.after : null,
      colon: true,
      figure:
        item.figure.kind === 'count' ? { ...item.figure, noun: item.figure.noun ?? subject } : item.figure,
    };
  };
  return settled([named(earlier, 'before'), named(later, 'after')]);
}

/** `2019`, typed without a comma and without anything else. */
const isBareYear = ({ figure, after }: Item) =>
  figure.kind === 'count' &&
  figure.total === null &&
  figure.exposure === null &&
  after === null &&
  /^(?:19|20)\d\d$/.test(String(figure.count.written.value)) &&
  figure.countSpan.to - figure.countSpan.from === 4;
