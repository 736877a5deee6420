import type { IToken } from 'chevrotain';
import { diagnosis } from './diagnosis.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import type { MessageId } from './messages.ts';
import { group } from './numbers.ts';
import type { Diagnosis } from './question.ts';
import * as token from './tokens.ts';

/** Finds what looks like a figure and is none that can be read: money, dates, negative numbers, measurements, other kinds of question. */

type Tokens = readonly IToken[];

interface Odd {
  readonly id: MessageId;
  readonly from: number;
  readonly to: number;
  readonly pieces: readonly string[];
  readonly suggestions: readonly string[];
}

const measured = /^\d[\d.,]*(?:ms|s|sec|kg|g|km|m|cm|mm|mb|gb|px|ml|l|\u00b0c|db)$/i;
const unitOfMeasure =
  /^(?:ms|sec|seconds?|kg|km|cm|mm|mb|gb|px|ml|litres?|metres?|degrees?|days?|weeks?|months?|hours?|minutes?)$/i;
/** Units in which nothing is counted, whatever stands around them. */
const neverCounted = /^(?:ms|kg|cm|mm|mb|gb|px|ml|litres?|degrees?)$/i;
const unitOfMoney = /^(?:dollars?|euros?|cents|pence|eur|usd|gbp)$/i;
const exponent = /^(?:\d+(?:\.\d+)?e[+-]?\d+|0x[\da-f]+)$/i;

/** The first such thing in a part, as a diagnosis with a line to send instead. */
export function oddFigureIn(tokens: Tokens, folded: Folded): Diagnosis | null {
  for (let at = 0; at < tokens.length; at += 1) {
    const odd = oddAt(tokens, at, folded);
    if (odd === null) continue;
    const last = tokens[odd.to - 1] ?? tokens[odd.from];
    const first = tokens[odd.from];
    if (first === undefined || last === undefined) continue;
    return diagnosis(
      odd.id,
      typedSpan(folded, first.startOffset, last.startOffset + last.image.length),
      odd.pieces,
      odd.suggestions,
    );
  }
  return null;
}

function oddAt(tokens: Tokens, at: number, folded: Folded): Odd | null {
  const each = tokens[at];
  if (each === undefined) return null;
  const type = (place: number) => tokens[place]?.tokenType;
  const image = (place: number) => tokens[place]?.image ?? '';
  const is = (place: number, wanted: IToken['tokenType']) => type(place) === wanted;
  const odd = (
    id: MessageId,
    to: number,
    pieces: readonly string[] = [],
    suggestions: readonly string[] = [],
  ): Odd => ({ id, from: at, to, pieces, suggestions });
  const number = is(at, token.NumberToken);
  if (
    each.tokenType === token.Other &&
    /[\u00a3$\u20ac\u00a5]/.test(each.image) &&
    is(at + 1, token.NumberToken)
  ) {
    return odd(
      'money',
      at + 2,
      [`${each.image}${image(at + 1)}`],
      ['over the budget: 18 of 1,204 vs ... of ...'],
    );
  }
  if (is(at, token.Of) && /^(?:them|which|whom|these|those)$/i.test(image(at + 1)))
    return totalFirst(tokens, at, odd);
  if (is(at, token.Word)) {
    if (unitOfMoney.test(each.image) && is(at - 1, token.NumberToken) && !hasConnector(tokens)) {
      return odd(
        'money',
        at + 1,
        [`${image(at - 1)} ${each.image}`],
        ['over the budget: 18 of 1,204 vs ... of ...'],
      );
    }
    if (
      unitOfMeasure.test(each.image) &&
      is(at - 1, token.NumberToken) &&
      (!hasConnector(tokens) || neverCounted.test(each.image))
    ) {
      return odd(
        'measurement',
        at + 1,
        [`${image(at - 1)} ${each.image}`],
        [`"over ${image(at - 1)} ${each.image}": 31 of 910 vs ... of ...`],
      );
    }
    if (/^[\u00a3\u20ac\u00a5]\.?\d/.test(each.image)) {
      return odd('money', at + 1, [each.image], ['over the budget: 18 of 1,204 vs ... of ...']);
    }
    if (/^-\d/.test(each.image)) return odd('negative', at + 1, [each.image]);
    if (/^(?:nan|inf|infinity)$/i.test(each.image) && (is(at - 1, token.Of) || is(at + 1, token.Of)))
      return odd('not-a-number', at + 1, [each.image]);
    if (exponent.test(each.image)) return odd('not-a-number', at + 1, [each.image]);
    if (measured.test(each.image) && !is(at - 1, token.Slash)) {
      return odd('measurement', at + 1, [each.image], ['slower than 300 ms: 31 of 91,000 vs ... of ...']);
    }
  }
  if (
    number &&
    is(at + 1, token.Slash) &&
    is(at + 2, token.NumberToken) &&
    is(at + 3, token.Slash) &&
    is(at + 4, token.NumberToken)
  ) {
    const [x, n] = [image(at), image(at + 2)];
    return odd(
      'date-in-figure',
      at + 5,
      [`${x}/${n}/${image(at + 4)}`],
      [`${x} of ${n} vs ... of ${image(at + 4)}`],
    );
  }
  if (
    number &&
    isPlainDigits(image(at)) &&
    is(at + 1, token.NumberToken) &&
    !is(at - 1, token.Of) &&
    !hasConnector(tokens)
  ) {
    return odd('two-numbers', at + 2, [image(at), image(at + 1)], [rowsWithOf(folded, each.startOffset)]);
  }
  if (
    is(at, token.Of) &&
    at === 0 &&
    is(1, token.NumberToken) &&
    tokens.slice(2).some(({ tokenType }, index) => tokenType === token.NumberToken && index > 0)
  ) {
    const second = tokens.slice(2).find(({ tokenType }) => tokenType === token.NumberToken);
    const noun = tokens.slice(2).find(({ tokenType }) => tokenType === token.Word)?.image ?? '';
    if (second !== undefined && !hasConnector(tokens.slice(2)))
      return odd('total-first', 2, [image(1)], [`${second.image} of ${image(1)} ${noun}`.trim()]);
  }
  return null;
}

/** Rows of a name and two numbers with "of" between the numbers: all of them where every line is one, else the one at a place. */
function rowsWithOf({ text }: Folded, place: number): string {
  const row = (line: string) => /^(.*?)(\d[\d,]*) +(\d[\d,]*)\s*$/.exec(line);
  const withOf = (line: string) => {
    const [, name = '', count = '', total = ''] = row(line) ?? [];
    return `${name.trim()} ${count} of ${total}`.trim();
  };
  const lines = text.split('\n').filter((line) => line.trim() !== '');
  if (lines.every((line) => row(line) !== null)) return lines.map(withOf).join('; ');
  return withOf(text.slice(text.lastIndexOf('\n', place - 1) + 1).split(/[\n;|]/)[0] ?? '');
}

/** `75 injured, 44 of them no helmet`: the total is the first number, the count the one beside "of them". */
function totalFirst(
  tokens: Tokens,
  at: number,
  odd: (id: MessageId, to: number, pieces?: readonly string[], suggestions?: readonly string[]) => Odd,
): Odd | null {
  const numbers = tokens.filter(({ tokenType }) => tokenType === token.NumberToken);
  const [total, count] = numbers;
  if (total === undefined || count === undefined) return null;
  const rest = tokens
    .slice(at + 2)
    .filter(({ tokenType }) => tokenType === token.Word)
    .map(({ image: word }) => word);
  return odd(
    'total-first',
    at + 2,
    [total.image],
    [`${rest.length === 0 ? '' : `${rest.join(' ')}: `}${count.image} of ${total.image}`],
  );
}

const isPlainDigits = (text: string) => /^[\d,]+$/.test(text);
const connectors: ReadonlySet<unknown> = new Set([token.Of, token.Slash, token.In, token.Per, token.Percent]);
const hasConnector = (tokens: Tokens) => tokens.some(({ tokenType }) => connectors.has(tokenType));

/**
 * Joins numbers that an ordinary space cut into groups of three (`1 204`), where a figure is due: at the start of a part or behind
 * a colon, a connector or a separator. Behind a word the space may as well stand between a name and its figure.
 */
export function joinSpacedNumbers(tokens: Tokens): readonly IToken[] {
  const out: IToken[] = [];
  const due: ReadonlySet<unknown> = new Set([
    token.Of,
    token.Slash,
    token.Colon,
    token.In,
    token.Per,
    token.Versus,
    token.Against,
    token.Comma,
    token.From,
    token.To,
    token.Newline,
    token.Semicolon,
    token.Bar,
    token.Open,
  ]);
  for (let at = 0; at < tokens.length; at += 1) {
    const each = tokens[at];
    if (each === undefined) continue;
    const before = out.at(-1);
    if (
      each.tokenType !== token.NumberToken ||
      !/^\d{1,3}$/.test(each.image) ||
      (before !== undefined && !due.has(before.tokenType))
    ) {
      out.push(each);
      continue;
    }
    let digits = each.image;
    let end = at + 1;
    let next = tokens[end];
    while (
      next?.tokenType === token.NumberToken &&
      /^\d{3}$/.test(next.image) &&
      adjacent(tokens[end - 1], next)
    ) {
      digits += next.image;
      end += 1;
      next = tokens[end];
    }
    // The image keeps the length of what was typed, so that its place stays right.
    const last = tokens[end - 1];
    const length =
      last === undefined ? each.image.length : last.startOffset + last.image.length - each.startOffset;
    out.push(end === at + 1 ? each : { ...each, image: group(digits).padEnd(length) });
    at = end - 1;
  }
  return out;
}

const adjacent = (one: IToken | undefined, other: IToken) =>
  one !== undefined && one.startOffset + one.image.length + 1 === other.startOffset;
