import type { IToken } from 'chevrotain';
import { writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import * as token from './tokens.ts';

/** What events are counted over: times, distances and, after `per`, anything. How such units are found, compared and converted. */

type Tokens = readonly IToken[];

const timeOrDistance =
  /^(?:seconds?|secs?|minutes?|mins?|hours?|hrs?|h|days?|nights?|weeks?|months?|quarters?|years?|yrs?|km|kilomet(?:re|er)s?|miles?|mi)$/i;
const glued =
  /^(\d[\d,]*(?:\.\d+)?(?:k|m|bn)?)(h|hrs?|hours?|d|days?|weeks?|months?|years?|yrs?|km|mi|miles?)$/i;

/** Whether a word is a unit of time or distance, also as the last part of a longer one: `bus-days`. */
export const isExposureWord = (word: string) => timeOrDistance.test(word.split('-').at(-1) ?? '');

/** The same in the plural or abbreviated: the `day` of `18/1204 day shift` is a name, the `days` of `18/1204 days` a unit. */
const isManyExposure = (word: string) => isExposureWord(word) && /(?:s|h|hr|km|mi)$/i.test(word);

/** Where the unit of an exposure stands, or `null` where none does. After `in` only times and distances are units. */
export function unitAt(
  tokens: Tokens,
  at: number,
  connector: 'in' | 'per' | 'one',
): readonly [number, number] | null {
  const word = (place: number) =>
    tokens[place]?.tokenType === token.Word ? (tokens[place]?.image ?? '') : '';
  if (word(at) === '') return perAt(tokens, at, connector);
  const isUnit = connector === 'in' ? isManyExposure : isExposureWord;
  if (isUnit(word(at))) return [at, at + 1];
  if (word(at + 1) !== '' && isUnit(word(at + 1))) return [at, at + 2];
  return connector === 'per' ? [at, at + 1] : null;
}

/** `3 per 1,000 per year`: a second `per` is part of the unit. */
function perAt(
  tokens: Tokens,
  at: number,
  connector: 'in' | 'per' | 'one',
): readonly [number, number] | null {
  const second =
    connector === 'per' &&
    (tokens[at]?.tokenType === token.Per || /^(?:a|an|each|every)$/i.test(tokens[at]?.image ?? '')) &&
    tokens[at + 1]?.tokenType === token.Word;
  return second ? [at, at + 2] : null;
}

/** `5200h`: a number with its unit glued to it. */
export function gluedExposure(
  image: string,
): { readonly number: WrittenNumber; readonly unit: string } | null {
  const found = glued.exec(image);
  if (found?.[1] === undefined || found[2] === undefined) return null;
  return { number: writtenNumber(found[1], null), unit: found[2] };
}

const fullNames: readonly (readonly [RegExp, string])[] = [
  [/^(?:secs?|seconds?)$/, 'second'],
  [/^(?:mins?|minutes?)$/, 'minute'],
  [/^(?:h|hrs?|hours?)$/, 'hour'],
  [/^(?:d|days?)$/, 'day'],
  [/^(?:nights?)$/, 'night'],
  [/^(?:weeks?)$/, 'week'],
  [/^(?:months?)$/, 'month'],
  [/^(?:quarters?)$/, 'quarter'],
  [/^(?:yrs?|years?)$/, 'year'],
  [/^(?:km|kilomet(?:re|er)s?)$/, 'km'],
  [/^(?:mi|miles?)$/, 'mile'],
];

/** A unit as compared with another: `hrs` and `hours` are one, and so are `bus days` and `bus-days`. */
export function unitKey(unit: string): string {
  const words = unit.toLowerCase().split(/[\s-]+/);
  const last = words.pop() ?? '';
  const full = fullNames.find(([pattern]) => pattern.test(last))?.[1];
  return [...words, full ?? (last.length > 2 ? last.replace(/s$/, '') : last)].join(' ');
}

/** A unit written out in the plural where its abbreviation was typed: `h` is `hours`. */
export function unitWritten(unit: string): string {
  if (/^(?:per|a|an|each|every) /i.test(unit)) return unit.replace(/^(?:an?|each|every) /i, 'per ');
  const words = unit.split(' ');
  const last = words.pop() ?? '';
  const full = fullNames.find(([pattern]) => pattern.test(last.toLowerCase()))?.[1];
  const plural = full === undefined || full === 'km' ? (full ?? last) : `${full}s`;
  return [...words, plural].join(' ');
}

/** A unit for one of it: `5 per week`. */
export const unitOfOne = (unit: string) => (/[^s]s$/i.test(unit) ? unit.slice(0, -1) : unit);

/** How many of the smallest unit of its scale one unit is. Months and years have no fixed number of days. */
const scales: Readonly<Record<string, readonly [string, number]>> = {
  second: ['time', 1],
  minute: ['time', 60],
  hour: ['time', 3_600],
  day: ['time', 86_400],
  week: ['time', 604_800],
  month: ['calendar', 1],
  quarter: ['calendar', 3],
  year: ['calendar', 12],
};

/** How many of the unit `to` one of the unit `from` is, or `null` where the one cannot be turned into the other. */
export function conversion(from: string, to: string): number | null {
  const [fromWords, toWords] = [unitKey(from).split(' '), unitKey(to).split(' ')];
  const own = scales[fromWords.pop() ?? ''];
  const other = scales[toWords.pop() ?? ''];
  if (own === undefined || other === undefined || own[0] !== other[0]) return null;
  return fromWords.join(' ') === toWords.join(' ') ? own[1] / other[1] : null;
}
