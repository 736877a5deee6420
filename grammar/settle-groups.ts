import { checkNames, namingOf, referenceOf } from './naming.ts';
import { diagnosis } from './diagnosis.ts';
import { grouped } from './numbers.ts';
import { areTimes, chosenByOutcome } from './labels.ts';
import { countFromShare, countQuantity, refused, settled, shareQuantity } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type {
  BareCountsGroup,
  CountsGroup,
  CountsQuestion,
  Question,
  Quantity,
  ReadingRemark,
  StatedGroup,
} from './question.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';
import { withoutWhole } from './whole.ts';
import { sameWatched, withoutWatched } from './watched.ts';

/** Counts: every group has its cases and its total. */
export function settleCounts(typedItems: readonly Item[], typedSetting: Setting): Settled<CountsQuestion> {
  const times = typedItems.map(withoutWatched);
  const apart = times.find(({ watched }) => !sameWatched(watched, times[0]?.watched ?? null));
  if (apart !== undefined) return refused(differentTimes(times, apart.item));
  const items = times.map(({ item }) => item);
  const setting = withPeriod(typedSetting, times[0]?.watched?.text ?? null);
  const naming = namingOf(items);
  const names = checkNames(items, naming.labels, setting);
  if (!names.ok) return names;
  const remarks: ReadingRemark[] = [...setting.remarks];
  const groups: CountsGroup[] = [];
  for (const [index, item] of items.entries()) {
    const group = countsGroup(item, naming.labels[index] ?? null, setting);
    if (!group.ok) return group;
    groups.push(group.value);
    remarks.push(...group.remarks);
  }
  const reference = referenceOf(naming.labels, setting);
  if (!reference.ok) return reference;
  const effect = setting.given.clauses.designEffect;
  const small = effect === null ? undefined : groups.find(({ total }) => total.low < effect.value);
  if (effect !== null && small !== undefined)
    return refused(diagnosis('design-effect-too-large', small.span, [effect.text, small.total.text]));
  const parts = withoutWhole(groups, naming.labels, setting);
  if (!parts.ok) return parts;
  const { groups: kept, reference: at } = parts.value;
  return settled({
    kind: 'counts',
    groups: kept,
    reference: kept.length === 1 ? 0 : (at ?? reference.value),
    chosenByOutcome: chosenByOutcome(naming.labels),
    clauses: setting.given.clauses,
    unit: naming.unit,
    caseNoun: naming.caseNoun,
    overTime: areTimes(naming.labels),
    remarks: [...remarks, ...parts.remarks],
  });
}

/** The time that all groups were watched for stands with the check as its period, unless one was given. */
function withPeriod(setting: Setting, text: string | null): Setting {
  const { given } = setting;
  if (text === null || given.clauses.period !== null) return setting;
  return { ...setting, given: { ...given, clauses: { ...given.clauses, period: text } } };
}

/** Groups watched for different times cannot be compared as shares; as rates per person and time they can. */
function differentTimes(times: readonly ReturnType<typeof withoutWatched>[], apart: Item) {
  const rows = times.map(({ item: { name, figure }, watched }) => {
    if (watched === null || figure.kind !== 'count' || figure.total === null) return null;
    const label = name === null ? '' : `${name.text}: `;
    return `${label}${figure.count.written.text} in ${grouped(figure.total.written.value * watched.amount)} person-${watched.unit}`;
  });
  const known = rows.filter((row) => row !== null);
  return diagnosis(
    'different-times',
    apart.span,
    times.map(({ watched }) => watched?.text ?? 'a time not said'),
    known.length === rows.length ? [known.join(' vs ')] : [],
  );
}

function countsGroup(item: Item, label: string | null, setting: Setting): Settled<CountsGroup> {
  const { figure, stated } = item;
  if (figure.total === null) {
    const text = setting.typed.slice(item.span.from, item.span.to).trim();
    return refused(
      diagnosis(label === null ? 'one-count' : 'second-total-missing', item.span, [label ?? text]),
    );
  }
  const total = countQuantity(
    { written: figure.total.written, suppressed: false },
    figure.total.span,
    setting.typed,
  );
  if (!total.ok) return total;
  const figureText = setting.typed.slice(item.span.from, item.span.to).trim();
  if (total.value.value === 0) return refused(diagnosis('total-zero', figure.total.span, [figureText]));
  const cases =
    figure.kind === 'count'
      ? countQuantity(figure.count, figure.countSpan, setting.typed)
      : countFromShare(figure.share, figure.shareSpan, total.value);
  if (!cases.ok) return cases;
  const tooMany =
    cases.value.precision === 'range'
      ? cases.value.low > total.value.low
      : cases.value.value > total.value.value;
  if (tooMany) {
    const span = { from: cases.value.span.from, to: total.value.span.to };
    const turned = `${setting.typed.slice(0, span.from)}${total.value.text} of ${cases.value.text}${setting.typed.slice(span.to)}`;
    return refused(
      diagnosis(
        'more-cases-than-people',
        span,
        [cases.value.text, total.value.text],
        cases.value.value > 0 ? [turned] : [],
      ),
    );
  }
  // No more cases than people: where a range would allow more, it ends at the total.
  const possible: Quantity = {
    ...cases.value,
    high: Math.min(cases.value.high, Math.max(total.value.low, cases.value.low)),
  };
  const held: Quantity =
    possible.precision === 'range' ? { ...possible, value: (possible.low + possible.high) / 2 } : possible;
  const once: readonly ReadingRemark[] =
    figure.kind === 'count' && figure.eachCountedOnce
      ? [
          {
            id: 'each-counted-once',
            text: setting.typed.slice(figure.countSpan.from, figure.total.span.to),
            readAs: '',
            span: item.span,
          },
        ]
      : [];
  return settled(
    {
      label,
      cases: held,
      total: total.value,
      stated: stated === null ? null : shareQuantity(stated.share, stated.span),
      span: item.span,
    },
    [...cases.remarks, ...total.remarks, ...once],
  );
}

/** Percentages or frequencies without counts. One alone has nothing to be compared with. */
export function settleStated(items: readonly Item[], setting: Setting): Settled<Question> {
  const nouns = items.map(({ figure }) => (figure.kind === 'share' ? (figure.noun?.text ?? null) : null));
  const naming = namingOf(items);
  const differ =
    new Set(nouns.map((noun) => noun?.toLowerCase())).size === nouns.length &&
    nouns.every((noun) => noun !== null);
  const labels = naming.labels.map((label, index) => label ?? (differ ? (nouns[index] ?? null) : null));
  const groups: StatedGroup[] = [];
  for (const [index, item] of items.entries()) {
    if (item.figure.kind !== 'share') throw new Error('a stated figure is a share');
    const { share, shareSpan } = item.figure;
    if (share.value > 1) return refused(diagnosis('share-above-one', shareSpan, [share.text]));
    groups.push({
      label: labels[index] ?? null,
      share: shareQuantity(share, shareSpan),
      form: share.form,
      span: item.span,
    });
  }
  const [only] = groups;
  if (groups.length === 1 && only !== undefined)
    return refused(
      diagnosis(
        'one-share',
        only.span,
        [only.share.text],
        [`${only.share.text} vs ...`, 'night shift: 18 of 1,204'],
      ),
    );
  const names = checkNames(items, labels, setting);
  if (!names.ok) return names;
  const reference = referenceOf(labels, setting);
  if (!reference.ok) return reference;
  return settled({
    kind: 'stated',
    groups,
    reference: reference.value,
    clauses: setting.given.clauses,
    unit: differ ? null : (naming.unit ?? nouns[0] ?? null),
    caseNoun: null,
    overTime: areTimes(labels),
    remarks: setting.remarks,
  });
}

/** Counts whose totals nobody stated. */
export function settleBareCounts(items: readonly Item[], setting: Setting): Settled<Question> {
  const naming = namingOf(items);
  const groups: BareCountsGroup[] = [];
  const remarks: ReadingRemark[] = [...setting.remarks];
  for (const [index, item] of items.entries()) {
    if (item.figure.kind !== 'count') throw new Error('a bare count is a count');
    const cases = countQuantity(item.figure.count, item.figure.countSpan, setting.typed);
    if (!cases.ok) return cases;
    remarks.push(...cases.remarks);
    groups.push({ label: naming.labels[index] ?? null, cases: cases.value, span: item.span });
  }
  const [only] = groups;
  if (groups.length === 1 && only !== undefined) {
    const name = only.label === null ? '' : `${only.label}: `;
    return refused(
      diagnosis(
        'one-count',
        only.span,
        [`${name}${only.cases.text}`],
        [`${name}${only.cases.text} of ... vs ... of ...`],
      ),
    );
  }
  const names = checkNames(items, naming.labels, setting);
  if (!names.ok) return names;
  const reference = referenceOf(naming.labels, setting);
  if (!reference.ok) return reference;
  return settled({
    kind: 'bare-counts',
    groups,
    reference: reference.value,
    clauses: setting.given.clauses,
    // Without totals the words behind a count can only say what is counted.
    unit: null,
    caseNoun: naming.caseNoun ?? naming.unit,
    overTime: areTimes(naming.labels),
    remarks: remarks,
  });
}
