import { isExposureWord } from './exposures.ts';
import { wordDigits, writtenNumber } from './numbers.ts';
import type { Mark } from './sentence-marks.ts';
import { isJoiner, isVerb } from './sentence-words.ts';

/** A number in a sentence: its spelling, its value, and where it stands among the marks, `end` exclusive. */
export interface Amount {
  readonly text: string;
  readonly value: number;
  readonly start: number;
  readonly end: number;
}

/** A figure of one group as it can stand on either side of a change: `412`, `4.4%`, `41 of 1,000`, `412 in 31 days`. */
export interface Side {
  readonly text: string;
  readonly value: number;
  readonly form: 'count' | 'percentage' | 'pair' | 'frequency' | 'rate';
  readonly start: number;
  readonly end: number;
}

/** The number at a mark, with its `million` or in words up to ninety, or `null`. */
export function amountAt(marks: readonly Mark[], at: number): Amount | null {
  const start = marks[at]?.kind === 'about' ? at + 1 : at;
  const mark = marks[start];
  if (mark === undefined) return null;
  if (mark.kind === 'number-word') {
    const digits = wordDigits(mark.text);
    return digits === null ? null : { text: digits, value: Number(digits), start, end: start + 1 };
  }
  if (mark.kind !== 'number') return null;
  const magnitude = marks[start + 1]?.kind === 'magnitude' ? (marks[start + 1]?.text ?? null) : null;
  const { value } = writtenNumber(mark.text, magnitude);
  if (!Number.isFinite(value)) return null;
  return {
    text: magnitude === null ? mark.text : `${mark.text} ${magnitude}`,
    value,
    start,
    end: start + (magnitude === null ? 1 : 2),
  };
}

const yearText = /^(?:19|20)\d\d$/;
export const isYear = ({ text }: Amount) => yearText.test(text);

const roundBase = (value: number) => value >= 10 && /^10+$/.test(String(value));

/** The unit of time or distance behind a number: `bus days`, `hours`. */
export function unitAfter(
  marks: readonly Mark[],
  at: number,
): { readonly text: string; readonly end: number } | null {
  const word = (place: number) => (marks[place]?.kind === 'word' ? (marks[place]?.text ?? '') : '');
  if (isExposureWord(word(at))) return { text: word(at), end: at + 1 };
  if (
    word(at) !== '' &&
    !isVerb(word(at)) &&
    !isJoiner(word(at)) &&
    isExposureWord(word(at + 1)) &&
    /s$/i.test(word(at + 1))
  )
    return { text: `${word(at)} ${word(at + 1)}`, end: at + 2 };
  return null;
}

/** What is counted between a number and its connector, at most four plain words: the `incidents` of `18 incidents out of 1,204`. */
export function nounBetween(
  marks: readonly Mark[],
  at: number,
): { readonly text: string; readonly end: number } {
  let end = at;
  while (end < at + 4) {
    const mark = marks[end];
    if (mark?.kind !== 'word' || isVerb(mark.text) || isJoiner(mark.text)) break;
    end += 1;
  }
  return {
    text: marks
      .slice(at, end)
      .map(({ text }) => text)
      .join(' '),
    end,
  };
}

/** The total behind `of`, `of the`, `/`: words such as `about` and `some` may stand before it. */
export function totalAfter(marks: readonly Mark[], at: number): Amount | null {
  const article = /^(?:the|all|our|its|their|these|those)$/i.test(marks[at]?.text ?? '') ? at + 1 : at;
  return amountAt(marks, article);
}

/** `N in M` and `N per M`: a frequency over a round base, a rate over a time or distance, otherwise counts. */
export function overAt(
  marks: readonly Mark[],
  amount: Amount,
): (Side & { readonly total: Amount | null; readonly noun: string }) | null {
  const noun = nounBetween(marks, amount.end);
  const connector = marks[noun.end];
  if (connector?.kind !== 'in' && connector?.kind !== 'per') return null;
  const base = amountAt(marks, noun.end + 1);
  const words = noun.text === '' ? '' : ` ${noun.text}`;
  const start = amount.start;
  if (base === null) return null;
  const unit = unitAfter(marks, base.end);
  const per = connector.kind;
  if (unit !== null)
    return {
      form: 'rate',
      text: `${amount.text}${words} ${per} ${base.text} ${unit.text}`,
      value: amount.value / base.value,
      start,
      end: unit.end,
      total: base,
      noun: noun.text,
    };
  if (
    noun.text === '' &&
    (roundBase(base.value) || amount.value === 1 || base.value < 20) &&
    !isYear(base) &&
    base.value > amount.value
  )
    return {
      form: 'frequency',
      text: `${amount.text} ${per} ${base.text}`,
      value: amount.value / base.value,
      start,
      end: base.end,
      total: base,
      noun: '',
    };
  if (per === 'per' || isYear(base) || base.value < amount.value) return null;
  return {
    form: 'pair',
    text: `${amount.text}${words} of ${base.text}`,
    value: amount.value,
    start,
    end: base.end,
    total: base,
    noun: noun.text,
  };
}

/** One side of a change, or `null`. */
export function sideAt(marks: readonly Mark[], at: number): Side | null {
  const amount = amountAt(marks, at);
  if (amount === null) return null;
  const { start, end, value } = amount;
  const next = marks[end];
  if (next?.kind === 'percent') {
    const sign = next.text === '\u2030' ? '\u2030' : '%';
    return { form: 'percentage', text: `${amount.text}${sign}`, value: value / 100, start, end: end + 1 };
  }
  if (next?.kind === 'of' || next?.kind === 'slash') {
    const total = totalAfter(marks, end + 1);
    if (total !== null)
      return { form: 'pair', text: `${amount.text} of ${total.text}`, value, start, end: total.end };
  }
  const over = overAt(marks, amount);
  if (over !== null) return over;
  return marks[start]?.kind === 'number' ? { form: 'count', text: amount.text, value, start, end } : null;
}
