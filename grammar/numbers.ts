import type { Precision } from './question.ts';

/** A number as it was written: its digits, and what its spelling says about its precision. */
export interface WrittenNumber {
  /** Canonical spelling: `1,204`, `58.70`, `12k`, `1.2 million`. */
  readonly text: string;
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly precision: Precision;
  /** Read as decimals behind a comma (`0,4`), or as groups of two (`1,20,400`). */
  readonly commas: 'none' | 'thousands' | 'indian' | 'decimal';
  /** Decimal places as typed, before any suffix moved the point. */
  readonly decimals: number;
}

/** Above this a number is refused: no count of people or events is larger. */
export const largestNumber = 1e15;

const suffixes: Readonly<Record<string, number>> = {
  k: 3,
  m: 6,
  bn: 9,
  hundred: 2,
  thousand: 3,
  million: 6,
  billion: 9,
};

/**
 * Reads a number token and its magnitude word. A comma with three digits after it every time groups thousands; groups of two
 * then three are Indian grouping; any other comma is a decimal comma. Suffixes move the decimal point in the digits, since
 * multiplying would make fractions of a person (2.01k as 2009.9999999999998).
 */
export function writtenNumber(spelling: string, magnitude: string | null): WrittenNumber {
  const typed = spelling.toLowerCase().trim().replace(/\.$/, '');
  const suffix = /(?:k|m|bn)$/.exec(typed)?.[0] ?? null;
  const digits = suffix === null ? typed : typed.slice(0, -suffix.length);
  const { plain, commas } = withoutCommas(digits);
  const shift =
    (suffix === null ? 0 : (suffixes[suffix] ?? 0)) +
    (magnitude === null ? 0 : (suffixes[magnitude.toLowerCase()] ?? 0));
  const decimals = plain.split('.')[1]?.length ?? 0;
  const value = Number(movePoint(plain, shift));
  const rounded = shift > 0;
  const half = rounded ? 0.5 * 10 ** (shift - decimals) : 0;
  const exact = !rounded || half < 1;
  return {
    text: `${group(plain)}${suffix ?? ''}${magnitude === null ? '' : ` ${magnitude.toLowerCase()}`}`,
    value,
    low: exact ? value : value - half,
    high: exact ? value : value + half,
    precision: exact ? 'exact' : 'rounded',
    commas,
    decimals,
  };
}

function withoutCommas(digits: string): { plain: string; commas: WrittenNumber['commas'] } {
  if (!digits.includes(',')) return { plain: digits.startsWith('.') ? `0${digits}` : digits, commas: 'none' };
  if (/^\d{1,3}(?:,\d{3})+(?:\.\d+)?$/.test(digits))
    return { plain: digits.replaceAll(',', ''), commas: 'thousands' };
  if (/^\d{1,2}(?:,\d{2})+,\d{3}$/.test(digits))
    return { plain: digits.replaceAll(',', ''), commas: 'indian' };
  if (/^\d+,\d+$/.test(digits)) return { plain: digits.replace(',', '.'), commas: 'decimal' };
  return { plain: digits.replaceAll(',', ''), commas: 'decimal' };
}

/** Moves the decimal point of a plain decimal text to the right. */
function movePoint(plain: string, places: number): string {
  const [whole = '0', fraction = ''] = plain.split('.');
  if (places === 0) return plain;
  const padded = fraction.padEnd(places, '0');
  return `${whole}${padded.slice(0, places)}.${padded.slice(places)}0`;
}

/** Groups of three with a comma, decimals untouched. */
export function group(plain: string): string {
  const point = plain.indexOf('.');
  const end = point === -1 ? plain.length : point;
  if (end <= 3) return plain;
  let out = plain.slice(0, end % 3 || 3);
  for (let at = out.length; at < end; at += 3) out += `,${plain.slice(at, at + 3)}`;
  return out + plain.slice(end);
}

/** A whole number with its groups of three. */
export const grouped = (value: number) => group(String(value));

const words: Readonly<Record<string, number>> = {
  one: 1,
  two: 2,
  three: 3,
  four: 4,
  five: 5,
  six: 6,
  seven: 7,
  eight: 8,
  nine: 9,
  ten: 10,
  eleven: 11,
  twelve: 12,
  twenty: 20,
  thirty: 30,
  forty: 40,
  fifty: 50,
  sixty: 60,
  seventy: 70,
  eighty: 80,
  ninety: 90,
  dozen: 12,
};

/** The digits of a number word, or `null`. */
export const wordDigits = (word: string): string | null => {
  const value = words[word.toLowerCase()];
  return value === undefined ? null : String(value);
};

const fractions: readonly (readonly [RegExp, number, number])[] = [
  [/half/i, 1, 2],
  [/two thirds/i, 2, 3],
  [/third/i, 1, 3],
  [/three/i, 3, 4],
  [/quarter/i, 1, 4],
  [/fifth/i, 1, 5],
  [/tenth/i, 1, 10],
];

/** A fraction in words as numerator and denominator. */
export function fractionOf(spelling: string): readonly [number, number] {
  const found = fractions.find(([pattern]) => pattern.test(spelling));
  if (found === undefined) throw new Error(`not a fraction: ${spelling}`);
  return [found[1], found[2]];
}
