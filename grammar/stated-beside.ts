import type { IToken } from 'chevrotain';
import { figureAt } from './figures.ts';
import type { Figure } from './figures.ts';
import type { ShareValue } from './tags.ts';
import * as token from './tokens.ts';

/** A percentage that stands beside counts, with its place in the folded text. */
export interface StatedShare {
  readonly share: ShareValue;
  readonly from: number;
  readonly to: number;
}

/**
 * Takes stated percentages out of a part: in brackets behind a count pair (`31 of 9,240 (3.4%)`, also behind its unit), or in front
 * of one in brackets (`3.4% (31 of 9,240)`). The map goes by the offset of the counts that each belongs to.
 */
export function withoutStated(tokens: readonly IToken[]): {
  readonly tokens: readonly IToken[];
  readonly stated: ReadonlyMap<number, StatedShare>;
} {
  const stated = new Map<number, StatedShare>();
  const taken = new Set<number>();
  let counts: Figure | null = null;
  for (let at = 0; at < tokens.length;) {
    const figure = figureAt(tokens, at);
    if (figure === null) {
      at += 1;
      continue;
    }
    const open = figure.start - 1;
    const bracketed = tokens[open]?.tokenType === token.Open && tokens[figure.end]?.tokenType === token.Close;
    if (figure.kind === 'share' && counts !== null && bracketed && wordsOnly(tokens, counts.end, open)) {
      stated.set(
        tokens[counts.start]?.startOffset ?? 0,
        statedAt(tokens, figure.share, figure.start, figure.end),
      );
      for (let place = open; place <= figure.end; place += 1) taken.add(place);
    }
    if (figure.kind === 'share' && tokens[figure.end]?.tokenType === token.Open) {
      const inside = figureAt(tokens, figure.end + 1);
      if (inside?.kind === 'counts' && tokens[inside.end]?.tokenType === token.Close) {
        stated.set(
          tokens[inside.start]?.startOffset ?? 0,
          statedAt(tokens, figure.share, figure.start, figure.end),
        );
        for (let place = figure.start; place <= figure.end; place += 1) taken.add(place);
        taken.add(inside.end);
      }
    }
    counts = figure.kind === 'counts' ? figure : null;
    at = figure.end;
  }
  return { tokens: taken.size === 0 ? tokens : tokens.filter((_, place) => !taken.has(place)), stated };
}

function statedAt(tokens: readonly IToken[], share: ShareValue, start: number, end: number): StatedShare {
  const [first, last] = [tokens[start], tokens[end - 1]];
  return {
    share,
    from: first?.startOffset ?? 0,
    to: last === undefined ? 0 : last.startOffset + last.image.length,
  };
}

const wordsOnly = (tokens: readonly IToken[], from: number, to: number) =>
  tokens.slice(from, to).every(({ tokenType }) => tokenType === token.Word);
