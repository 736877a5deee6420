import { createToken, Lexer } from 'chevrotain';
import type { IToken } from 'chevrotain';
import { writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import type { ShareValue } from './tags.ts';
import * as token from './tokens.ts';
import type { WrittenCoverage } from './written-coverage.ts';

/** Stands for several fine tokens that are one coverage; made by the pass below, never by the lexer. */
export const CoverageForm = createToken({ name: 'CoverageForm', pattern: Lexer.NA });

/** The share that a joined token stands for, or `null` for any other token. */
export function coverageShareOf(each: IToken | undefined): ShareValue | null {
  if (each?.tokenType !== CoverageForm) return null;
  // The library types a payload as anything; only this file makes one for this type.
  return each.payload as ShareValue;
}

type Tokens = readonly IToken[];

const breaks: ReadonlySet<unknown> = new Set([token.Newline, token.Semicolon, token.Bar]);
const numberTypes: ReadonlySet<unknown> = new Set([token.NumberToken, token.Range]);

/**
 * Joins the tokens of each coverage that is not one number into one: `55% to 65%`, `38% (34 to 42)`, `from 20% to 60%`. Only
 * behind the word `coverage`, up to the end of its part; an interval in brackets also in `44 of 75 injured, 38% (34 to 42) of
 * riders`. Everywhere else `from` and `to` mean something different.
 */
export function joinCoverageForms(tokens: Tokens): Tokens {
  // Most lines have none of this, and are their own answer.
  if (!tokens.some(({ tokenType }) => tokenType === token.CoverageWord || tokenType === token.Open))
    return tokens;
  const out: IToken[] = [];
  let inCoverage = false;
  let numbers = 0;
  for (let at = 0; at < tokens.length;) {
    const each = tokens[at];
    if (each === undefined) break;
    if (breaks.has(each.tokenType)) [inCoverage, numbers] = [false, 0];
    if (each.tokenType === token.CoverageWord) {
      const before = tokens[at - 1];
      inCoverage ||=
        numbers > 0 ||
        before === undefined ||
        breaks.has(before.tokenType) ||
        before.tokenType === token.Comma;
    }
    const found = inCoverage ? formAt(tokens, at) : numbers > 1 ? besideCounts(tokens, at) : null;
    if (found !== null) {
      out.push(joined(tokens, at, found));
      at = found.end;
      continue;
    }
    if (numberTypes.has(each.tokenType)) numbers += 1;
    out.push(each);
    at += 1;
  }
  return out;
}

/** A form that ends before `tokens[end]`. */
export interface FoundForm {
  readonly end: number;
  readonly text: string;
  readonly value: number;
  readonly coverage: WrittenCoverage;
}

/** One token in the place of several. */
export function joined(tokens: Tokens, start: number, { end, text, value, coverage }: FoundForm): IToken {
  const [first, last] = [tokens[start], tokens[end - 1]];
  if (first === undefined || last === undefined) throw new RangeError('a joined token needs tokens');
  const length = last.startOffset + last.image.length - first.startOffset;
  const share: ShareValue = {
    text,
    value,
    low: value,
    high: value,
    precision: coverage.kind === 'interval' ? 'exact' : 'range',
    form: 'percentage',
    coverage,
  };
  return {
    image: text.padEnd(length).slice(0, length),
    startOffset: first.startOffset,
    tokenType: CoverageForm,
    tokenTypeIdx: CoverageForm.tokenTypeIdx ?? 0,
    payload: share,
  };
}

const type = (tokens: Tokens, at: number) => tokens[at]?.tokenType;
const image = (tokens: Tokens, at: number) => tokens[at]?.image ?? '';
const grew =
  /^(?:grew|grown|grows|rose|risen|rises|fell|fallen|falls|went|up|down|dropped|increased|climbed)$/i;

function formAt(tokens: Tokens, at: number): FoundForm | null {
  // "about" in front of a range says no more than the range does.
  if (type(tokens, at) === token.About) return formAt(tokens, at + 1);
  if (grew.test(image(tokens, at)) && type(tokens, at + 1) === token.From) return growthAt(tokens, at + 1);
  if (type(tokens, at) === token.From) return growthAt(tokens, at);
  if (/^between$/i.test(image(tokens, at))) return pairAt(tokens, at + 1, token.And, 'range');
  const arrow = pairAt(tokens, at, token.Arrow, 'growth');
  if (arrow !== null) return arrow;
  const interval = ownIntervalAt(tokens, at);
  return interval ?? dashedAt(tokens, at) ?? pairAt(tokens, at, token.To, 'range');
}

const growthAt = (tokens: Tokens, at: number) => pairAt(tokens, at + 1, token.To, 'growth');

/** `20% to 60%`, `55 to 65%`: two numbers round a word, the second at least with its sign. */
function pairAt(
  tokens: Tokens,
  at: number,
  between: IToken['tokenType'],
  kind: 'range' | 'growth',
): FoundForm | null {
  const low = numberAt(tokens, at);
  if (low === null) return null;
  const middle = type(tokens, at + 1) === token.Percent ? at + 2 : at + 1;
  const high = type(tokens, middle) === between ? numberAt(tokens, middle + 1) : null;
  if (high === null || type(tokens, middle + 2) !== token.Percent) return null;
  return kind === 'range' ? range(low, high, middle + 3) : growth(low, high, middle + 3);
}

/** `55-65%`, `55%-65%`, `55 - 65%`. */
function dashedAt(tokens: Tokens, at: number): FoundForm | null {
  if (type(tokens, at) === token.Range && type(tokens, at + 1) === token.Percent) {
    const [low = '', high = ''] = image(tokens, at).split('-');
    return range(writtenNumber(low, null), writtenNumber(high, null), at + 2);
  }
  const low = numberAt(tokens, at);
  if (low === null) return null;
  const middle = type(tokens, at + 1) === token.Percent ? at + 2 : at + 1;
  if (/^-\d+(?:\.\d+)?$/.test(image(tokens, middle)) && type(tokens, middle + 1) === token.Percent)
    return range(low, writtenNumber(image(tokens, middle).slice(1), null), middle + 2);
  return type(tokens, middle) === token.Dash ? pairAt(tokens, at, token.Dash, 'range') : null;
}

/** `38% (34 to 42)`, also `(34-42%)`, `(95% CI 34 to 42)`, `(95% interval: 34% to 42%)`. */
function ownIntervalAt(tokens: Tokens, at: number): FoundForm | null {
  const value = numberAt(tokens, at);
  if (value === null || type(tokens, at + 1) !== token.Percent || type(tokens, at + 2) !== token.Open)
    return null;
  let next = at + 3;
  let level: WrittenNumber | null = null;
  if (type(tokens, next + 1) === token.Percent && isIntervalWord(image(tokens, next + 2))) {
    level = numberAt(tokens, next);
    next += 2;
  }
  while (isIntervalWord(image(tokens, next)) || type(tokens, next) === token.Colon) next += 1;
  const limits = limitsAt(tokens, next);
  if (limits === null || type(tokens, limits.end) !== token.Close) return null;
  const { low, high, end } = limits;
  const levelText = level === null ? '' : `${level.text}% interval `;
  return {
    end: end + 1,
    text: `${value.text}% (${levelText}${low.text}% to ${high.text}%)`,
    value: plainShare(value),
    coverage: { kind: 'interval', low, high, level },
  };
}

const isIntervalWord = (word: string) => /^(?:ci|interval|confidence|limits)$/i.test(word);

function limitsAt(
  tokens: Tokens,
  at: number,
): { readonly low: WrittenNumber; readonly high: WrittenNumber; readonly end: number } | null {
  const skipped = (place: number) => (type(tokens, place) === token.Percent ? place + 1 : place);
  if (type(tokens, at) === token.Range) {
    const [low = '', high = ''] = image(tokens, at).split('-');
    return { low: writtenNumber(low, null), high: writtenNumber(high, null), end: skipped(at + 1) };
  }
  const low = numberAt(tokens, at);
  if (low === null) return null;
  const middle = skipped(at + 1);
  if (/^-\d+(?:\.\d+)?$/.test(image(tokens, middle)))
    return { low, high: writtenNumber(image(tokens, middle).slice(1), null), end: skipped(middle + 1) };
  const between = [token.To, token.Dash, token.Comma, token.And].some(
    (each) => each === type(tokens, middle),
  );
  const high = between ? numberAt(tokens, middle + 1) : null;
  return high === null ? null : { low, high, end: skipped(middle + 2) };
}

/** `44 of 75 injured, 38% (34 to 42) of riders`: behind a count pair and a comma, with what it is a share of. */
function besideCounts(tokens: Tokens, at: number): FoundForm | null {
  if (type(tokens, at - 1) !== token.Comma) return null;
  const found = ownIntervalAt(tokens, at);
  return found !== null &&
    type(tokens, found.end) === token.Of &&
    type(tokens, found.end + 1) !== token.NumberToken
    ? found
    : null;
}

const range = (low: WrittenNumber, high: WrittenNumber, end: number): FoundForm => ({
  end,
  text: `${low.text}-${high.text}%`,
  value: Number(((low.value + high.value) / 200).toPrecision(15)),
  coverage: { kind: 'range', low, high },
});

const growth = (start: WrittenNumber, last: WrittenNumber, end: number): FoundForm => ({
  end,
  text: `from ${start.text}% to ${last.text}%`,
  value: Number(((start.value + last.value) / 200).toPrecision(15)),
  coverage: { kind: 'growth', start, end: last },
});

/** A percentage as a plain share, without the dust that dividing leaves. */
export const plainShare = ({ value }: WrittenNumber) => Number((value / 100).toPrecision(15));

function numberAt(tokens: Tokens, at: number): WrittenNumber | null {
  const each = tokens[at];
  return each?.tokenType === token.NumberToken ? writtenNumber(each.image, null) : null;
}
