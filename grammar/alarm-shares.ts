import { diagnosis } from './diagnosis.ts';
import { countFromShare, countQuantity, refused, settled, shareQuantity } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { AlarmGiven, AlarmShare, Quantity, Span } from './question.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';

/** One figure as a share, the right way round. */
export function alarmShare(item: Item, turned: boolean, setting: Setting): Settled<AlarmShare> {
  const { figure } = item;
  if (figure.total !== null) return shareOfCounts(item, turned, setting);
  if (figure.kind !== 'share') throw new Error('a bare count is no share');
  if (figure.share.value > 1)
    return refused(diagnosis('share-above-one', figure.shareSpan, [figure.share.text]));
  const typed = shareQuantity(figure.share, figure.shareSpan);
  return settled({ share: turned ? turnedRound(typed) : typed, given: { kind: 'share', typed, turned } });
}

function turnedRound(typed: Quantity): Quantity {
  const value = Number((1 - typed.value).toFixed(15));
  return {
    ...typed,
    text: `${Number((value * 100).toFixed(6))}%`,
    value,
    low: Number((1 - typed.high).toFixed(15)),
    high: Number((1 - typed.low).toFixed(15)),
  };
}

function shareOfCounts(item: Item, turned: boolean, setting: Setting): Settled<AlarmShare> {
  const { figure, stated } = item;
  if (figure.total === null) throw new Error('counts have a total');
  const whole = countQuantity(
    { written: figure.total.written, suppressed: false },
    figure.total.span,
    setting.typed,
  );
  if (!whole.ok) return whole;
  const text = setting.typed.slice(item.span.from, item.span.to).trim();
  if (whole.value.low <= 0) return refused(diagnosis('total-zero', figure.total.span, [text]));
  const counted =
    figure.kind === 'count'
      ? countQuantity(figure.count, figure.countSpan, setting.typed)
      : countFromShare(figure.share, figure.shareSpan, whole.value);
  if (!counted.ok) return counted;
  const part = counted.value;
  if (part.precision === 'range' ? part.low > whole.value.low : part.value > whole.value.value) {
    const span = { from: part.span.from, to: whole.value.span.to };
    return refused(diagnosis('more-cases-than-people', span, [part.text, whole.value.text]));
  }
  const high = Math.min(part.high, Math.max(whole.value.low, part.low));
  const held: Quantity = {
    ...part,
    high,
    value: part.precision === 'range' ? (part.low + high) / 2 : part.value,
  };
  const given: AlarmGiven = {
    kind: 'counts',
    part: held,
    whole: whole.value,
    turned,
    stated: stated === null ? null : shareQuantity(stated.share, stated.span),
  };
  const direct = quotient(held, whole.value, item.span, (x, n) => x / n);
  return settled({ share: turned ? turnedRound(direct) : direct, given }, [
    ...counted.remarks,
    ...whole.remarks,
  ]);
}

/** A share from two counts, with what their own precision allows. */
export function quotient(
  one: Quantity,
  other: Quantity,
  span: Span,
  share: (one: number, other: number) => number,
): Quantity {
  const ends = [one.low, one.high].flatMap((x) => [other.low, other.high].map((y) => share(x, y)));
  const precision =
    one.precision === 'range' || other.precision === 'range'
      ? 'range'
      : one.precision === 'rounded' || other.precision === 'rounded'
        ? 'rounded'
        : 'exact';
  const value = share(one.value, other.value);
  return {
    text: `${Number((value * 100).toFixed(6))}%`,
    value,
    low: Math.min(...ends),
    high: Math.min(1, Math.max(...ends)),
    precision,
    span,
  };
}
