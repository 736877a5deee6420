import type { IToken } from 'chevrotain';
import { wordDigits, writtenNumber } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import * as token from './tokens.ts';

/** Numbers among the fine tokens of a part, in digits or in words. */

type Tokens = readonly IToken[];

export const is = (tokens: Tokens, at: number, type: IToken['tokenType']) => tokens[at]?.tokenType === type;

/** A whole power of ten from 10 to a million: the base of a stated frequency or rate. */
export const roundBase = (value: number) =>
  value >= 10 && value <= 1e6 && Number.isInteger(Math.log10(value));

/** A number with its magnitude word, at this place. */
export function numberAt(
  tokens: Tokens,
  at: number,
): { readonly number: WrittenNumber; readonly end: number } | null {
  const first = tokens[at];
  if (first === undefined || !is(tokens, at, token.NumberToken)) return null;
  const magnitude = is(tokens, at + 1, token.Magnitude) ? (tokens[at + 1]?.image ?? null) : null;
  return { number: writtenNumber(first.image, magnitude), end: magnitude === null ? at + 1 : at + 2 };
}

/** A number, or a number word beside a connector: `one in four`, `three of nine`. */
export function numberOrWordAt(tokens: Tokens, at: number) {
  const plain = numberAt(tokens, at);
  if (plain !== null) return plain;
  const first = tokens[at];
  if (first === undefined || !is(tokens, at, token.NumberWord)) return null;
  const digits = wordDigits(first.image);
  const magnitude = is(tokens, at + 1, token.Magnitude) ? (tokens[at + 1]?.image ?? null) : null;
  if (digits === null) return null;
  return {
    number: writtenNumber(String(Number(digits)), magnitude),
    end: magnitude === null ? at + 1 : at + 2,
  };
}
