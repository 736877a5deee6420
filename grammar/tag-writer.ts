import type { IToken, TokenType } from 'chevrotain';
import { diagnosis } from './diagnosis.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import type { Diagnosis } from './question.ts';
import { endOffset, offset, textOf } from './tag-words.ts';
import type { Tagged, TagPayload } from './tags.ts';
import * as token from './tokens.ts';

/** Collects the tags of a line, and the first thing in it that cannot be. */
export class TagWriter {
  readonly tags: Tagged[] = [];
  fault: Diagnosis | null = null;
  readonly folded: Folded;

  constructor(folded: Folded) {
    this.folded = folded;
  }

  words(type: TokenType, tokens: readonly IToken[], from: number, to: number): void {
    let start = from;
    let end = to;
    const loose = (at: number) => {
      const kind = tokens[at]?.tokenType;
      return (
        kind === token.Comma ||
        kind === token.Open ||
        kind === token.Close ||
        kind === token.Question ||
        kind === token.Dash
      );
    };
    while (start < end && loose(start)) start += 1;
    while (end > start && loose(end - 1)) end -= 1;
    if (start >= end) return;
    const text = textOf(this.folded.text, tokens, start, end);
    if (text !== '') this.pushTokens(type, tokens, start, end, { kind: 'text', text });
  }

  pushTokens(
    type: TokenType,
    tokens: readonly IToken[],
    from: number,
    to: number,
    payload: TagPayload = { kind: 'none' },
  ): void {
    this.push(type, offset(tokens, from), endOffset(tokens, to), payload);
  }

  push(type: TokenType, startOffset: number, end: number, payload: TagPayload): void {
    this.tags.push({
      image: this.folded.text.slice(startOffset, end),
      startOffset,
      endOffset: Math.max(startOffset, end - 1),
      tokenType: type,
      tokenTypeIdx: type.tokenTypeIdx ?? 0,
      payload,
    });
  }

  refuse(
    id: Parameters<typeof diagnosis>[0],
    from: number,
    to: number,
    pieces: readonly string[] = [],
    suggestions: Parameters<typeof diagnosis>[3] = [],
  ): void {
    this.fault ??= diagnosis(id, typedSpan(this.folded, from, to), pieces, suggestions);
  }

  /** The typed line with one stretch written differently. */
  repaired(from: number, to: number, instead: string): string {
    const { typed } = this.folded;
    const span = typedSpan(this.folded, from, to);
    return `${typed.slice(0, span.from)}${instead}${typed.slice(span.to)}`.trim();
  }
}
