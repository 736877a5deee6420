import type { IToken } from 'chevrotain';
import { coverageShareOf } from './coverage-forms.ts';
import { is, numberAt, numberOrWordAt, roundBase } from './number-tokens.ts';
import { fractionOf, group, writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import { eachFigure, isEach, rateAt } from './rate-figures.ts';
import type { RateFigure } from './rate-figures.ts';
import type { CountValue, ShareValue } from './tags.ts';
import * as token from './tokens.ts';

/** Finds the figures among the fine tokens of a part. A figure is `tokens[start]` up to, but without, `tokens[end]`. */

export type Figure =
  | { readonly kind: 'bare'; readonly start: number; readonly end: number; readonly count: CountValue }
  | {
      readonly kind: 'counts';
      readonly start: number;
      readonly end: number;
      readonly count: CountValue;
      /** What a case is called, between the count and its connector. */
      readonly noun: readonly [number, number] | null;
      readonly connector: number;
      readonly total: WrittenNumber;
      readonly totalAt: readonly [number, number];
      readonly eachCountedOnce: boolean;
    }
  | {
      readonly kind: 'share';
      readonly start: number;
      readonly end: number;
      readonly share: ShareValue;
      readonly ofNoun: boolean;
    }
  | {
      readonly kind: 'share-of';
      readonly start: number;
      readonly end: number;
      readonly share: ShareValue;
      readonly total: WrittenNumber;
      readonly totalAt: readonly [number, number];
    }
  | {
      readonly kind: 'dangling';
      readonly start: number;
      readonly end: number;
      readonly count: CountValue;
      readonly connector: number;
    }
  | RateFigure
  | {
      readonly kind: 'year';
      readonly start: number;
      readonly end: number;
      readonly count: WrittenNumber;
      readonly noun: readonly [number, number] | null;
      readonly year: string;
    };

type Tokens = readonly IToken[];

const mostNounWords = 6;

/** The figure that starts at this token, or `null`. Looks ahead at most a fixed number of tokens. */
export function figureAt(tokens: Tokens, at: number): Figure | null {
  const coverage = coverageShareOf(tokens[at]);
  if (coverage !== null) return shareWithTotal(tokens, at, coverage, at + 1);
  const fraction = fractionAt(tokens, at);
  if (fraction !== null) return fraction;
  const range = rangeAt(tokens, at);
  if (range !== null) return range;
  const suppressed =
    is(tokens, at, token.Less) || (is(tokens, at, token.FewerThan) && numberAt(tokens, at + 1) !== null);
  if (is(tokens, at, token.NumberWord)) {
    const worded = numberOrWordAt(tokens, at);
    const connected =
      worded !== null &&
      (is(tokens, worded.end, token.Of) || is(tokens, worded.end, token.In)) &&
      numberOrWordAt(tokens, worded.end + 1) !== null;
    return connected && worded !== null
      ? connectedFigure(tokens, at, { written: worded.number, suppressed: false }, worded.end)
      : null;
  }
  const dots = tokens[at]?.image === '..' && is(tokens, at + 1, token.Of);
  if (dots)
    return connectedFigure(tokens, at, { written: writtenNumber('5', null), suppressed: true }, at + 1);
  const found = numberAt(tokens, suppressed ? at + 1 : at);
  if (found === null) return null;
  if (!suppressed) {
    const share = shareAt(tokens, at, found.number, found.end);
    if (share !== null) return share;
  }
  return connectedFigure(tokens, at, { written: found.number, suppressed }, found.end);
}

/** A count and what follows it: its total, a base, an exposure, a year, or nothing. */
function connectedFigure(tokens: Tokens, start: number, count: CountValue, after: number): Figure {
  let at = after;
  while (at < after + mostNounWords && nounWord(tokens, at) && !isEach(tokens, at)) at += 1;
  if (isEach(tokens, at)) {
    const noun = at > after ? ([after, at] as const) : null;
    return eachFigure({ start, count, noun, connector: at }, tokens);
  }
  const connector = connectorAt(tokens, at);
  if (connector === null) return danglingOrBare(tokens, start, count, after);
  const noun = at > after ? ([after, at] as const) : null;
  const rate = rateAt(tokens, { start, count, noun, connector: at }, connector);
  if (rate !== null) return rate;
  const total = numberOrWordAt(tokens, at + 1);
  if (total === null) return danglingOrBare(tokens, start, count, after);
  const { number: base, end } = total;
  const pair = { start, end, count, noun, connector: at, total: base, totalAt: [at + 1, end] as const };
  if (connector === 'of') return { kind: 'counts', ...pair, eachCountedOnce: false };
  if (connector === 'in') {
    // `2 in 3 of late ferries` is a share of them, as two thirds is.
    const ofNoun = is(tokens, end, token.Of) && numberOrWordAt(tokens, end + 1) === null;
    if (count.written.value === 1 || roundBase(base.value) || ofNoun)
      return frequency(start, end, count.written, base, 'in', ofNoun);
    if (isYear(tokens[at + 1]?.image ?? '') && !nounWord(tokens, end)) {
      return { kind: 'year', start, end, count: count.written, noun, year: tokens[at + 1]?.image ?? '' };
    }
    return { kind: 'counts', ...pair, eachCountedOnce: true };
  }
  return frequency(start, end, count.written, base, 'per');
}

const nounWord = (tokens: Tokens, at: number) =>
  is(tokens, at, token.Word) ||
  is(tokens, at, token.CasesWord) ||
  (is(tokens, at, token.And) && is(tokens, at + 1, token.Word));

function connectorAt(tokens: Tokens, at: number): 'of' | 'in' | 'per' | null {
  if (is(tokens, at, token.Of) || is(tokens, at, token.Slash)) return 'of';
  if (is(tokens, at, token.In)) return 'in';
  // `18 incidents from 1,204 shifts`: behind what is counted, `from` says out of how many.
  if (is(tokens, at, token.From) && nounWord(tokens, at - 1) && numberAt(tokens, at + 1) !== null)
    return 'of';
  return is(tokens, at, token.Per) ? 'per' : null;
}

const isYear = (image: string) => /^(?:19|20)\d\d$/.test(image);

function danglingOrBare(tokens: Tokens, start: number, count: CountValue, after: number): Figure {
  const next = tokens[after + 1];
  const ends =
    next === undefined || [token.Versus, token.Against, token.Comma, token.Question].includes(next.tokenType);
  if (is(tokens, after, token.Of) && ends)
    return { kind: 'dangling', start, end: after + 1, count, connector: after };
  return { kind: 'bare', start, end: after, count };
}

/** `58.7%`, `5 per cent`, `3 per mille`, with what it is a share of. */
function shareAt(tokens: Tokens, start: number, number: WrittenNumber, after: number): Figure | null {
  const mille = is(tokens, after, token.PerMille);
  if (!mille && !is(tokens, after, token.Percent)) return null;
  const share = percentage(number, number, mille ? 1_000 : 100, mille ? '\u2030' : '%');
  return shareWithTotal(tokens, start, share, after + 1);
}

function shareWithTotal(tokens: Tokens, start: number, share: ShareValue, end: number): Figure {
  if (is(tokens, end, token.Of)) {
    const total = numberAt(tokens, end + 1);
    if (total !== null)
      return {
        kind: 'share-of',
        start,
        end: total.end,
        share,
        total: total.number,
        totalAt: [end + 1, total.end],
      };
    return { kind: 'share', start, end, share, ofNoun: true };
  }
  const sample =
    is(tokens, end, token.Open) &&
    /^n$/i.test(tokens[end + 1]?.image ?? '') &&
    is(tokens, end + 2, token.Equals)
      ? numberAt(tokens, end + 3)
      : null;
  if (sample !== null && is(tokens, sample.end, token.Close)) {
    return {
      kind: 'share-of',
      start,
      end: sample.end + 1,
      share,
      total: sample.number,
      totalAt: [end + 3, sample.end],
    };
  }
  return { kind: 'share', start, end, share, ofNoun: false };
}

/** `10-12%`: a range of percentages. */
function rangeAt(tokens: Tokens, at: number): Figure | null {
  const image = tokens[at]?.image ?? '';
  if (!is(tokens, at, token.Range) || !is(tokens, at + 1, token.Percent)) return null;
  const [low = '', high = ''] = image.split('-');
  const lower = writtenNumber(low, null);
  const upper = writtenNumber(high, null);
  if (lower.value > upper.value) return null;
  const share: ShareValue = {
    text: `${lower.text}-${upper.text}%`,
    value: (lower.value + upper.value) / 200,
    low: lower.value / 100,
    high: upper.value / 100,
    precision: 'range',
    form: 'percentage',
  };
  return shareWithTotal(tokens, at, share, at + 2);
}

/** `half of the injured`, `a third of 90`, `half vs a third`. */
function fractionAt(tokens: Tokens, at: number): Figure | null {
  const first = tokens[at];
  if (first === undefined || !is(tokens, at, token.FractionWord)) return null;
  const of = is(tokens, at + 1, token.Of);
  const [numerator, denominator] = fractionOf(first.image);
  // `two thirds` alone would have to be written `2 in 3`, which counts two of three.
  if (!of && (numerator !== 1 || !standsAlone(tokens, at))) return null;
  const share: ShareValue = {
    text: `${numerator} in ${denominator}`,
    value: numerator / denominator,
    low: numerator / denominator,
    high: numerator / denominator,
    precision: 'exact',
    form: 'frequency',
  };
  return of
    ? shareWithTotal(tokens, at, share, at + 1)
    : { kind: 'share', start: at, end: at + 1, share, ofNoun: false };
}

const joints: ReadonlySet<unknown> = new Set([token.Versus, token.Against, token.Colon, token.Comma]);

/** `half vs a third`: a fraction with nothing of its own on either side. */
const standsAlone = (tokens: Tokens, at: number) =>
  [at - 1, at + 1].every((place) => tokens[place] === undefined || joints.has(tokens[place]?.tokenType));

function percentage(number: WrittenNumber, spelled: WrittenNumber, base: number, sign: string): ShareValue {
  const half = 0.5 * 10 ** -number.decimals;
  return {
    text: `${spelled.text}${sign}`,
    value: number.value / base,
    low: Math.max(0, number.value - half) / base,
    high: number.value > base ? number.value / base : Math.min(base, number.value + half) / base,
    precision: 'rounded',
    form: 'percentage',
  };
}

function frequency(
  start: number,
  end: number,
  count: WrittenNumber,
  base: WrittenNumber,
  word: 'in' | 'per',
  ofNoun = false,
): Figure {
  // `1 in 250` was rounded in its base, `3 per 1,000` in its count.
  const byBase = count.value === 1 && word === 'in' && !roundBase(base.value);
  const half = 0.5 * 10 ** -(byBase ? base.decimals : count.decimals);
  const [low, high] = byBase
    ? [count.value / (base.value + half), count.value / Math.max(base.value - half, count.value)]
    : [Math.max(0, count.value - half) / base.value, Math.min(base.value, count.value + half) / base.value];
  const share: ShareValue = {
    text: `${group(count.text.replaceAll(',', ''))} ${word} ${base.text}`,
    value: count.value / base.value,
    low,
    high: Math.max(high, count.value / base.value),
    precision: 'rounded',
    form: 'frequency',
  };
  return { kind: 'share', start, end, share, ofNoun };
}
