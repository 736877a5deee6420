import { wordDigits } from './numbers.ts';
import type { ClaimedNumber, Hedge } from './claim.ts';

/** The words that sentences under test are made of, as pieces of patterns, and what they mean. All in lower case. */

const digits = '\\d{1,3}(?:,\\d{3})+(?:\\.\\d+)?|\\d+[.,]\\d+|\\d+|\\.\\d+';
const words =
  'one|two|three|four|five|six|seven|eight|nine|ten|eleven|twelve|twenty|thirty|forty|fifty|sixty|seventy|eighty|ninety';

/** A number in digits or as a word, not inside another one. */
export const numeral = `(?<![\\d.,a-z])(?:${digits}|(?:${words})(?![a-z]))`;
export const percentSign = '(?: ?%| ?per ?cent| ?pct| pc)(?![a-z])';
/** Only directly behind "a", "one" and the like, or alone for a half. */
export const fraction =
  '(?:(?:a |one |by )?half|(?:a |one )(?:third|quarter|fifth|tenth)|two[- ]thirds|three[- ]quarters)(?![a-z])';

export const upWords =
  '(?:higher|more|greater|larger|bigger|worse|likelier|riskier|extra|additional|above|up|rise|rises|rose|risen|rising|increase|increases|increased|grew|growth|grown|gain|gained|jump|jumped|climb|climbed|surge|surged)(?![a-z])';
export const downWords =
  '(?:lower|less|fewer|smaller|safer|below|down|fall|falls|fell|fallen|drop|drops|dropped|decrease|decreases|decreased|decline|declines|declined|cut|cuts|cutting|reduce|reduces|reduced|reduction|shrank|slump|slumped)(?![a-z])';

const hedges: readonly (readonly [Hedge, string])[] = [
  ['at-most', 'up to|at most|no more than|not more than|as much as|as many as|a maximum of'],
  ['at-least', 'at least|no less than|not less than|no fewer than|a minimum of'],
  ['over', '(?:well |just |slightly |far )?(?:over|more than|above|greater than|upwards of)|in excess of'],
  ['nearly', 'nearly|almost|close to|just under|just below|not quite|approaching'],
  ['below', '(?:well |far )?(?:under|below|less than|fewer than|lower than)'],
  ['about', 'about|around|roughly|approximately|approx\\.?|some|circa|ca\\.?|~|more or less'],
];
export const hedgeWords = hedges.map(([, spellings]) => spellings).join('|');
const hedgePatterns = hedges.map(
  ([hedge, spellings]) => [hedge, new RegExp(`(?:^|[^a-z])(?:${spellings}) ?(?:a |an )?$`)] as const,
);

/** The hedge that ends a stretch of text, or `null`. */
export function hedgeAtEnd(text: string): Hedge | null {
  return hedgePatterns.find(([, pattern]) => pattern.test(text))?.[0] ?? null;
}

/** How far a word may be off: twice, half, a third. */
const wordTolerance = 0.05;

/** A number that a word stands for. */
export const wordNumber = (value: number): ClaimedNumber => ({
  value,
  low: value * (1 - wordTolerance),
  high: value * (1 + wordTolerance),
});

/**
 * A number as spelled, with what rounds to it. Zeros at the end of a whole number may be rounding too: 290% stands for 285% to
 * 295%. How much they may leave open depends on what the number is: a change in per cent follows from a ratio with one decimal,
 * and may then be off by 5; a limit may be rounded to its first digit.
 */
export function claimedNumber(spelled: string, what: 'change' | 'limit' | 'other'): ClaimedNumber {
  const plain = plainDigits(spelled);
  const value = Number(plain);
  const decimals = plain.split('.')[1]?.length ?? 0;
  const trailing = decimals > 0 || value === 0 ? 0 : (/0*$/.exec(plain)?.[0].length ?? 0);
  const most = {
    change: Math.min(value * 0.2, Math.max(5, value / 16)),
    limit: Infinity,
    other: value * 0.05,
  }[what];
  const half = trailing === 0 ? 0.5 * 10 ** -decimals : Math.max(0.5, Math.min(0.5 * 10 ** trailing, most));
  return { value, low: value - half, high: value + half };
}

const rangeStart = new RegExp(`(${numeral})(?: ?%| times)?(?: to | and | or | ?- ?)$`);

/** The number before `from` where the two are a range: 2 to 3 times. */
export function rangeBefore(text: string, from: number): string | null {
  return rangeStart.exec(text.slice(Math.max(0, from - 40), from))?.[1] ?? null;
}

/** Thousands without their commas, a decimal comma as a point, a number word in digits. */
function plainDigits(spelled: string): string {
  const word = wordDigits(spelled);
  if (word !== null) return word;
  if (/^\d{1,3}(?:,\d{3})+(?:\.\d+)?$/.test(spelled)) return spelled.replaceAll(',', '');
  return spelled.replace(',', '.');
}

/** The same number in another unit; a negative factor turns its limits round. */
export const scaledNumber = ({ value, low, high }: ClaimedNumber, factor: number): ClaimedNumber =>
  factor < 0
    ? { value: value * factor, low: high * factor, high: low * factor }
    : { value: value * factor, low: low * factor, high: high * factor };

/** A fraction in words. */
export function fractionValue(spelled: string): number {
  if (/thirds/.test(spelled)) return 2 / 3;
  if (/quarters/.test(spelled)) return 3 / 4;
  if (/third/.test(spelled)) return 1 / 3;
  if (/quarter/.test(spelled)) return 1 / 4;
  if (/fifth/.test(spelled)) return 1 / 5;
  return /tenth/.test(spelled) ? 1 / 10 : 1 / 2;
}

/** `direction` of what stands around a figure: behind it within two words, or before it with at most "by", "of" and a hedge between. */
export function directionAround(text: string, from: number, to: number): 'up' | 'down' | null {
  const behind = directionBehind(text, to);
  if (behind !== null) return behind;
  const before = text.slice(Math.max(0, from - 80), from);
  if (upBefore.test(before)) return 'up';
  return downBefore.test(before) ? 'down' : null;
}

const between = '(?:[a-z]+ly |relative |absolute )?(?:risk |rate |in )?';
const upBehind = new RegExp(`^[ -]*${between}${upWords}`);
const downBehind = new RegExp(`^[ -]*${between}${downWords}`);
/** The direction of a word directly behind a figure. */
export function directionBehind(text: string, to: number): 'up' | 'down' | null {
  const rest = text.slice(to, to + 60);
  if (upBehind.test(rest)) return 'up';
  return downBehind.test(rest) ? 'down' : null;
}

const lead = (verbs: string) =>
  new RegExp(
    `(?<![a-z])${verbs}(?: (?:by|of))?(?: (?:[a-z]+ ){0,5}(?:by|of))? ?(?:${hedgeWords})? ?(?:an? )?$`,
  );
const upBefore = lead(upWords);
const downBefore = lead(downWords);
