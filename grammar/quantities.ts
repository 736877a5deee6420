import { diagnosis } from './diagnosis.ts';
import { grouped, largestNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import type { Diagnosis, Quantity, ReadingRemark, Span } from './question.ts';
import type { CountValue, ShareValue } from './tags.ts';

/** A value or what is wrong with it. */
export type Settled<T> =
  | { readonly ok: true; readonly value: T; readonly remarks: readonly ReadingRemark[] }
  | { readonly ok: false; readonly fault: Diagnosis };

export const settled = <T>(value: T, remarks: readonly ReadingRemark[] = []): Settled<T> => ({
  ok: true,
  value,
  remarks,
});
export const refused = (fault: Diagnosis): Settled<never> => ({ ok: false, fault });

/** A count of people or events: whole, not negative, not above the largest. `typed` is the line as typed, for repairs. */
export function countQuantity(
  { written, suppressed }: CountValue,
  span: Span,
  typed: string,
): Settled<Quantity> {
  if (suppressed) {
    const most = written.value - 1;
    if (!Number.isInteger(most) || most < 0) return refused(diagnosis('not-whole', span, [written.text]));
    return settled({
      text: `<${written.text}`,
      value: most / 2,
      low: 0,
      high: most,
      precision: 'range',
      span,
    });
  }
  const whole = wholeNumber(written, span, typed);
  if (!whole.ok) return whole;
  return settled(
    {
      text: written.text,
      value: written.value,
      low: written.low,
      high: written.high,
      precision: written.precision,
      span,
    },
    whole.remarks,
  );
}

function wholeNumber(written: WrittenNumber, span: Span, typed: string): Settled<null> {
  const spelled = typed.slice(span.from, span.to).trim();
  if (written.value > largestNumber) return refused(diagnosis('too-large', span, [spelled]));
  if (!Number.isInteger(written.value) || written.commas === 'decimal') {
    const replace = (text: string) => `${typed.slice(0, span.from)}${text}${typed.slice(span.to)}`;
    if (written.commas === 'decimal') {
      const apart = spelled.replace(/,(?=\d)/g, ', ');
      return refused(diagnosis('decimal-or-thousands', span, [spelled], [replace(apart)]));
    }
    if (/^\d{1,3}(?:\.\d{3})+$/.test(spelled))
      return refused(
        // All of them at once: a line with one such number usually has several.
        diagnosis(
          'decimal-or-thousands',
          span,
          [spelled],
          [typed.replace(/\b\d{1,3}(?:\.\d{3})+\b/g, (text) => text.replaceAll('.', ','))],
        ),
      );
    return refused(diagnosis('not-whole', span, [spelled]));
  }
  if (written.commas === 'indian')
    return settled(null, [{ id: 'indian-grouping', text: spelled, readAs: String(written.value), span }]);
  return settled(null);
}

/** A share as a quantity with its place. */
export const shareQuantity = (share: ShareValue, span: Span): Quantity => ({
  text: share.text,
  value: share.value,
  low: share.low,
  high: share.high,
  precision: share.precision,
  span,
});

/** An exact whole number that nobody typed in full. */
export const exactCount = (value: number, text: string, span: Span): Quantity => ({
  text,
  value,
  low: value,
  high: value,
  precision: 'exact',
  span,
});

/** What is left of 100%: the range turns round with the share. */
export function restOf(shares: readonly Quantity[], span: Span): Quantity {
  const sum = shares.reduce((total, { value }) => total + value, 0);
  const decimals = Math.max(...shares.map(({ text }) => text.split('.')[1]?.replace(/\D/g, '').length ?? 0));
  const low = shares.reduce((total, quantity) => total + quantity.high, 0);
  const high = shares.reduce((total, quantity) => total + quantity.low, 0);
  const value = Number((1 - sum).toFixed(15));
  return {
    text: `${(value * 100).toFixed(shares.some(({ text }) => / in | per /.test(text)) ? 2 : decimals)}%`,
    value,
    low: Math.max(0, 1 - low),
    high: Math.min(1, 1 - high),
    precision: 'rounded',
    span,
  };
}

/** The whole counts out of `total` that round to a share: the smallest and the largest, or `null` where none does. */
export function countsThatFit(
  share: ShareValue,
  total: number,
): { readonly low: number; readonly high: number } | null {
  // A hair of tolerance, since 58.65% is no exact double; it is far below one count.
  const hair = Math.max(1e-9, total * 1e-15);
  const low = Math.ceil(share.low * total - hair);
  const high = Math.floor(share.high * total + hair);
  return low > high ? null : { low, high };
}

/** `1.5% of 1,204` is 18; `0.4% of 2,377` is 9 or 10; `58.1% of 75` is no count at all, which is said. */
export function countFromShare(share: ShareValue, span: Span, total: Quantity): Settled<Quantity> {
  if (share.value > 1) return refused(diagnosis('share-above-one', span, [share.text]));
  const fit = countsThatFit(share, total.value);
  if (fit === null) return refused(diagnosis('no-count-fits', span, [share.text, total.text]));
  const remark = (readAs: string): ReadingRemark => ({
    id: 'count-from-percentage',
    text: `${share.text} of ${total.text}`,
    readAs,
    span,
  });
  const text = (count: number) => grouped(count);
  if (fit.low === fit.high) return settled(exactCount(fit.low, text(fit.low), span), [remark(text(fit.low))]);
  return settled(
    {
      text: `${share.text} of ${total.text}`,
      value: (fit.low + fit.high) / 2,
      low: fit.low,
      high: fit.high,
      precision: 'range',
      span,
    },
    [remark(`${text(fit.low)} to ${text(fit.high)}`)],
  );
}
