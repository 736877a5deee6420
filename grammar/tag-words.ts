import type { IToken, TokenType } from 'chevrotain';
import { unquoted } from './clauses.ts';
import type { Figure } from './figures.ts';
import * as token from './tokens.ts';

/** Questions about stretches of fine tokens that the tagging pass asks: what is a word, where two groups meet, what a name says. */

export const separators: ReadonlySet<unknown> = new Set([
  token.Versus,
  token.Against,
  token.And,
  token.Comma,
  token.Arrow,
  token.Slash,
  token.Ampersand,
]);
export const strongSeparators: ReadonlySet<unknown> = new Set([token.Versus, token.Against, token.Arrow]);

export const offset = (tokens: readonly IToken[], at: number) => tokens[at]?.startOffset ?? 0;
export const endOffset = (tokens: readonly IToken[], at: number) => {
  const last = tokens[at - 1];
  return last === undefined ? 0 : last.startOffset + last.image.length;
};

/** Words as one text: the quoted part where there is one, else as typed with single spaces, without a full stop at the end. */
export function textOf(folded: string, tokens: readonly IToken[], from: number, to: number): string {
  const quoted = tokens.slice(from, to).find(({ tokenType }) => tokenType === token.Quoted);
  if (quoted !== undefined && to - from === 1) return unquoted(quoted.image);
  const text = folded
    .slice(offset(tokens, from), endOffset(tokens, to))
    .replace(/\s+/g, ' ')
    .replace(/"/g, "'");
  return text.replace(/[.\s]+$/, '');
}

export const wordsText = (tokens: readonly IToken[], from: number, to: number) =>
  tokens
    .slice(from, to)
    .map(({ image }) => image)
    .join(' ')
    .replace(/[.?\s]+$/, '');

/** Leaves "is", "are" and "can I say" at the start of a question out of the name. */
export function leadStart(tokens: readonly IToken[], start: number): number {
  return /^(?:is|are|was|were)$/i.test(tokens[start]?.image ?? '') && tokens.length > start + 1
    ? start + 1
    : start;
}

/** `night - 18 of 1,204`: a dash between name and figure acts as a colon. */
export const withoutDash = (tokens: readonly IToken[], from: number, to: number) =>
  to > from && tokens[to - 1]?.tokenType === token.Dash ? to - 1 : to;

/** Leaves "significant", "had an incident?" and the like alone, but a question mark at the end out. */
export function trimEnd(tokens: readonly IToken[], from: number): number {
  let end = tokens.length;
  while (
    end > from &&
    (tokens[end - 1]?.tokenType === token.Question ||
      /^(?:significant(?:ly)?|ok|different)$/i.test(tokens[end - 1]?.image ?? ''))
  )
    end -= 1;
  return end;
}

const isWord = (each: IToken | undefined) =>
  each !== undefined &&
  !separators.has(each.tokenType) &&
  ![token.Colon, token.Open, token.Close, token.Dash, token.Question].includes(each.tokenType);
export const hasWords = (tokens: readonly IToken[], from: number, to: number) =>
  tokens.slice(from, to).some(isWord);
export const hasColon = (tokens: readonly IToken[], from: number, to: number) =>
  lastIndexOf(tokens, from, to, token.Colon) !== -1;

export function lastIndexOf(tokens: readonly IToken[], from: number, to: number, type: TokenType): number {
  for (let at = to - 1; at >= from; at -= 1) if (tokens[at]?.tokenType === type) return at;
  return -1;
}

/** Where two groups meet: a `vs` or an arrow if there is one, else the first comma, slash or `and`. */
export function separatorIn(tokens: readonly IToken[], from: number, to: number): number {
  let weak = -1;
  for (let at = from; at < to; at += 1) {
    const type = tokens[at]?.tokenType;
    if (strongSeparators.has(type)) return at;
    if (weak === -1 && separators.has(type)) weak = at;
  }
  return weak;
}

/** `412 last year 530 this year`: the words between two counts name the time of the first. */
export const isTimeWords = (between: readonly IToken[]) =>
  between.length === 2 &&
  /^(?:last|this|previous) (?:year|month|week|quarter|season|summer|winter)$/i.test(
    between.map(({ image }) => image).join(' '),
  );

/** `before 412 after 530`: the word in front of a count names its time. */
const isTime = ({ start }: Figure, tokens: readonly IToken[]) =>
  /^(?:before|earlier|previously)$/i.test(tokens[start - 1]?.image ?? '');

/**
 * In a list of bare counts (`no helmet 44, two doses 31`) the last number of an item is its figure, unless only words follow
 * the first (`44 no helmet`).
 */
export function lastOfEachItem(figures: readonly Figure[], tokens: readonly IToken[]): Figure[] {
  return figures.filter((figure, index) => {
    const next = figures[index + 1];
    if (next === undefined) return true;
    const between = tokens.slice(figure.end, next.start);
    return (
      isTimeWords(between) ||
      isTime(figure, tokens) ||
      between.some(({ tokenType }) => separators.has(tokenType))
    );
  });
}
