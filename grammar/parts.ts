import type { IToken } from 'chevrotain';
import { CoverageForm } from './coverage-forms.ts';
import { figureAt } from './figures.ts';
import * as token from './tokens.ts';

/** A stretch of fine tokens between two breaks, without the breaks. */
export interface Part {
  readonly tokens: readonly IToken[];
  /** Offset in the folded text where the part ends. */
  readonly end: number;
}

const isJoint = (each: IToken | undefined) =>
  each?.tokenType === token.Versus || each?.tokenType === token.Against;

const breaks: ReadonlySet<unknown> = new Set([token.Newline, token.Semicolon, token.Bar]);

/**
 * Cuts a line into parts: at semicolons, bars and new lines, before `coverage` after a comma, and before a clause that follows a
 * figure without a semicolon (`level 90%`, `per 1,000` at the end, `only me`, `source https://...`), since on a phone the
 * semicolon sits two keyboards deep.
 */
export function partsOf(tokens: readonly IToken[], length: number): readonly Part[] {
  const parts: Part[] = [];
  let current: IToken[] = [];
  let seenFigure = false;
  const close = (end: number) => {
    if (current.length > 0) parts.push({ tokens: current, end });
    current = [];
  };
  for (let at = 0; at < tokens.length; at += 1) {
    const each = tokens[at];
    if (each === undefined) continue;
    // A line that breaks off at a `vs` goes on in the next.
    if (each.tokenType === token.Newline && (isJoint(tokens[at - 1]) || isJoint(tokens[at + 1]))) continue;
    if (breaks.has(each.tokenType)) {
      close(each.startOffset);
      seenFigure = false;
      continue;
    }
    if (separatesCoverage(tokens, at)) {
      close(each.startOffset);
      continue;
    }
    if (
      seenFigure &&
      current.length > 0 &&
      (each.tokenType === token.CoverageWord || startsLooseClause(tokens, at))
    ) {
      close(each.startOffset);
    }
    if (each.tokenType === token.NumberToken || each.tokenType === CoverageForm) seenFigure = true;
    current.push(each);
  }
  close(length);
  return parts;
}

/** `44 of 75, coverage 38%`, `44 of 75 cases, 38% of riders`: what follows the comma is coverage. */
function separatesCoverage(tokens: readonly IToken[], at: number): boolean {
  const type = tokens[at]?.tokenType;
  if (type !== token.Comma && type !== token.And) return false;
  if (tokens[at + 1]?.tokenType === token.CoverageWord) return true;
  if (type !== token.Comma) return false;
  const next = figureAt(tokens, at + 1);
  return next?.kind === 'share' && next.ofNoun;
}

function startsLooseClause(tokens: readonly IToken[], at: number): boolean {
  const type = tokens[at]?.tokenType;
  const next = tokens[at + 1]?.tokenType;
  switch (type) {
    case token.Level:
      return next === token.NumberToken && tokens[at + 2]?.tokenType === token.Percent;
    case token.Reference:
      return next !== undefined && completeBefore(tokens, at);
    case token.OnlyMe:
    case token.Exact:
      return endsPart(tokens, at + 1);
    case token.Source:
      return next === token.Address;
    case token.Per:
      return next === token.NumberToken && endsPart(tokens, at + 2) && completeBefore(tokens, at);
    default:
      return false;
  }
}

const endsPart = (tokens: readonly IToken[], at: number) => {
  const each = tokens[at];
  return each === undefined || breaks.has(each.tokenType) || startsLooseClause(tokens, at);
};

/** Whether a complete figure stands directly before, so that `per 1,000` is no part of it. */
function completeBefore(tokens: readonly IToken[], at: number): boolean {
  const before = tokens[at - 1]?.tokenType;
  if (before === token.Percent || before === token.Close || before === CoverageForm) return true;
  for (let back = at - 1; back >= Math.max(0, at - 8); back -= 1) {
    if (tokens[back]?.tokenType === token.NumberToken) {
      const connector = tokens[back - 1]?.tokenType;
      return connector === token.Of || connector === token.Slash;
    }
  }
  return false;
}
