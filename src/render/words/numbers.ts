/**
 * The one place where numbers are rounded and written.
 *
 * `full` follows the rule of four (Cole 2015, BMJ 350:h1845): three significant digits, two where the leading digit is 4 or
 * more. `short`, for sentences to post, takes one digit less. A number is rounded once, from full precision.
 */
export type Digits = 'full' | 'short';

/** Groups of three with a comma: 1204 is `1,204`. Takes a plain decimal text, so that its digits stay as they were rounded. */
function group(text: string): string {
  const point = text.indexOf('.');
  const end = point === -1 ? text.length : point;
  if (end <= 3) return text;
  let out = text.slice(0, end % 3 || 3);
  for (let at = out.length; at < end; at += 3) out += `,${text.slice(at, at + 3)}`;
  return out + text.slice(end);
}

/** A number with a fixed count of decimals, grouped; a minus sign is the typographic one. */
export function fixed(value: number, decimals: number): string {
  const text = group(Math.abs(value).toFixed(decimals));
  return value < 0 && Number(value.toFixed(decimals)) !== 0 ? `\u2212${text}` : text;
}

/** A whole number, grouped; one that is not whole (coverage times population) is rounded and said to be about that. */
export function count(value: number): string {
  return Number.isInteger(value) ? fixed(value, 0) : `about ${fixed(value, value < 10 ? 1 : 0)}`;
}

/** How many decimals the rule of four gives a number. */
function decimalsFor(value: number, digits: Digits): number {
  const size = Math.abs(value);
  if (size === 0 || !Number.isFinite(size)) return 0;
  const less = digits === 'short' ? 1 : 0;
  const at = (x: number) => {
    const exponent = Math.floor(Math.log10(x) + 1e-12);
    const leading = x / 10 ** exponent;
    return Math.max(0, (leading >= 4 ? 2 : 3) - less - 1 - exponent);
  };
  // Rounding can carry a number over the step: 3.996 is 4.0, not 4.00.
  return at(Number(size.toFixed(Math.min(at(size), 100))) || size);
}

/**
 * A number by the rule of four that never rounds onto or across `divide`, the value that means "no difference": it gets up
 * to three digits more, and after that is said in words ("just above 1").
 */
export function beside(value: number, divide: number, digits: Digits): string {
  if (value === divide) return fixed(value, 0);
  const usual = decimalsFor(value, digits);
  for (let decimals = usual; decimals <= usual + 3; decimals += 1) {
    const rounded = Number(value.toFixed(Math.min(decimals, 100)));
    if (rounded !== divide && rounded > divide === value > divide) return fixed(value, decimals);
  }
  return `just ${value > divide ? 'above' : 'below'} ${fixed(divide, 0)}`;
}

/** A ratio, beside 1. */
export const ratio = (value: number, digits: Digits) => beside(value, 1, digits);

/** A share as per cent: three significant digits, two in sentences; 0% and 100% only where they are exact. */
export function percent(share: number, digits: Digits): string {
  return `${percentNumber(share, digits)}%`;
}

/** The same without zeros at the end: "4%", for a percentage that stands beside one as typed. */
export const plainPercent = (share: number) =>
  percent(share, 'short').replace(/\.0+%$|(\.\d*[1-9])0+%$/, '$1%');

/** The same without the sign. */
export function percentNumber(share: number, digits: Digits): string {
  const value = share * 100;
  if (value === 0 || share === 1) return fixed(value, 0);
  const significant = digits === 'full' ? 3 : 2;
  const exponent = Math.floor(Math.log10(Math.abs(value)) + 1e-12);
  let decimals = Math.max(0, significant - 1 - exponent);
  while (Math.abs(value) < 100 && Math.abs(Number(value.toFixed(decimals))) >= 100 && decimals < 12)
    decimals += 1;
  return fixed(value, decimals);
}

/** A difference of two shares in percentage points, beside 0. */
export const points = (difference: number, digits: Digits) => beside(difference * 100, 0, digits);

/** A plain amount (extra cases, one in K, hidden-cause strength), beside 0. */
export const amount = (value: number, digits: Digits) => beside(value, 0, digits);

/** A p value: two decimals, three below 0.1, and never 0. */
export const probability = (p: number) => (p < 0.001 ? 'below 0.001' : fixed(p, p < 0.1 ? 3 : 2));

/**
 * A ratio as a relative change in per cent, unsigned: exactly what the printed ratio says, so that 2.3 times is 130% and
 * never 132%.
 */
export function changePercent(value: number, digits: Digits): string {
  const text = ratio(value, digits);
  if (text.startsWith('just')) return 'just over 0%';
  const decimals = text.split('.')[1]?.length ?? 0;
  const change = Math.abs(Number(text.replaceAll(',', '')) - 1) * 100;
  return `${group(change.toFixed(Math.max(0, decimals - 2)))}%`;
}

/**
 * An estimate with its limits at one long precision for the working: at least four decimals, and five significant digits
 * for the smallest of them.
 */
export function working(values: readonly (number | null)[]): (value: number) => string {
  const sizes = values.filter((value) => value !== null && value !== 0).map((value) => Math.abs(value ?? 1));
  const smallest = sizes.length === 0 ? 1 : Math.min(...sizes);
  const decimals = Math.min(20, Math.max(0, 4 - Math.floor(Math.log10(smallest) + 1e-12)));
  return (value) => (value === 0 ? '0' : fixed(value, decimals));
}
