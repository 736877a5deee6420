import type { IToken, TokenType } from 'chevrotain';
import { clauseOf, unquoted } from './clauses.ts';
import { diagnosis } from './diagnosis.ts';
import { figureAt } from './figures.ts';
import type { Figure } from './figures.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { partsOf } from './parts.ts';
import type { Part } from './parts.ts';
import type { Diagnosis } from './question.ts';
import * as tags from './tags.ts';
import type { Tagged, TagPayload } from './tags.ts';
import * as token from './tokens.ts';

/** The tagged line, or the first thing in it that cannot be. */
export interface TaggedLine {
  readonly tags: readonly Tagged[];
  readonly fault: Diagnosis | null;
  /** Whether the line holds any number at all. */
  readonly hasFigure: boolean;
}

const separators: ReadonlySet<unknown> = new Set([
  token.Versus,
  token.Against,
  token.And,
  token.Comma,
  token.Arrow,
  token.Slash,
  token.Ampersand,
]);
const strongSeparators: ReadonlySet<unknown> = new Set([token.Versus, token.Against, token.Arrow]);

/** Settles in one linear pass what each fine token stands for: part of a name, of a figure, of a clause, or between groups. */
export function tagLine(fine: readonly IToken[], folded: Folded): TaggedLine {
  const pass = new TaggingPass(folded);
  const parts = partsOf(fine, folded.text.length);
  const heads = parts.map((part) => headOf(part));
  const hasCoverage =
    heads.includes('coverage') || fine.some(({ tokenType }) => tokenType === token.CoverageWord);
  parts.forEach((part, index) => {
    if (index > 0)
      pass.push(tags.BreakTag, part.tokens[0]?.startOffset ?? 0, part.tokens[0]?.startOffset ?? 0, {
        kind: 'none',
      });
    pass.part(part, heads[index] ?? null, hasCoverage);
  });
  return {
    tags: pass.tags,
    fault: pass.fault,
    hasFigure: fine.some(({ tokenType }) => tokenType === token.NumberToken || tokenType === token.Range),
  };
}

/** `cases: ...` and `coverage: ...`, with or without the colon. */
function headOf({ tokens }: Part): 'cases' | 'coverage' | null {
  const first = tokens[0]?.tokenType;
  if (first === token.CoverageWord) return 'coverage';
  return first === token.CasesWord && tokens[1]?.tokenType === token.Colon ? 'cases' : null;
}

class TaggingPass {
  readonly tags: Tagged[] = [];
  fault: Diagnosis | null = null;
  readonly #folded: Folded;

  constructor(folded: Folded) {
    this.#folded = folded;
  }

  part(part: Part, head: 'cases' | 'coverage' | null, hasCoverage: boolean): void {
    const clause = head === null ? clauseOf(part, this.#folded.text) : null;
    const [first] = part.tokens;
    if (first === undefined) return;
    if (clause !== null) {
      switch (clause.kind) {
        case 'clause':
          this.push(tags.ClauseTag, first.startOffset, part.end, clause);
          return;
        case 'no-value':
          this.#refuse('clause-without-value', first.startOffset, part.end, [clause.word, clause.example]);
          return;
        case 'not-yet':
          this.#refuse('not-yet-clause', first.startOffset, first.startOffset + first.image.length, [
            clause.word,
          ]);
          return;
      }
    }
    const { figures, used } = this.#figuresOf(part.tokens);
    const isHead =
      head === 'coverage' ||
      (head === 'cases' && (hasCoverage || !figures.some(({ kind }) => kind === 'counts')));
    let start = 0;
    if (isHead) {
      start = part.tokens[1]?.tokenType === token.Colon ? 2 : 1;
      const last = part.tokens[start - 1];
      this.push(
        head === 'cases' ? tags.CasesHeadTag : tags.CoverageHeadTag,
        first.startOffset,
        (last ?? first).startOffset + (last ?? first).image.length,
        { kind: 'none' },
      );
    }
    this.#list(
      part,
      start,
      figures.filter((figure) => figure.start >= start),
      used,
    );
  }

  /** The figures of a part. Bare numbers count only where the part has nothing better; else they belong to names. */
  #figuresOf(tokens: readonly IToken[]): { figures: Figure[]; used: boolean } {
    const all: Figure[] = [];
    for (let at = 0; at < tokens.length;) {
      const figure = figureAt(tokens, at);
      if (figure === null) at += 1;
      else {
        all.push(figure);
        at = figure.end;
      }
    }
    const connected = all.some(({ kind }) => kind !== 'bare');
    if (!connected) return { figures: lastOfEachItem(all, tokens), used: false };
    return { figures: all.filter(({ kind }) => kind !== 'bare'), used: true };
  }

  #list(part: Part, start: number, figures: readonly Figure[], connected: boolean): void {
    const { tokens } = part;
    const [firstFigure] = figures;
    if (firstFigure === undefined) {
      this.#words(tags.AfterTag, tokens, start, tokens.length);
      return;
    }
    if (connected) this.#looseTotal(tokens, figures);
    const before =
      hasWords(tokens, leadStart(tokens, start), firstFigure.start) ||
      hasColon(tokens, start, firstFigure.start);
    const trailing = wordsText(tokens, figures.at(-1)?.end ?? tokens.length, tokens.length);
    this.#lead(tokens, leadStart(tokens, start), firstFigure.start);
    figures.forEach((figure, index) => {
      const previous = figures[index - 1];
      if (previous !== undefined) this.#gap(tokens, previous, figure, before, trailing);
      this.#figure(tokens, figure, previous);
    });
    const last = figures.at(-1);
    if (last !== undefined) this.#after(tokens, last, trimEnd(tokens, last.end));
  }

  /** Words before the first figure are its name. */
  #lead(tokens: readonly IToken[], from: number, to: number): void {
    const colon = lastIndexOf(tokens, from, to, token.Colon);
    if (colon === -1) {
      this.#words(tags.NameTag, tokens, from, withoutDash(tokens, from, to));
      return;
    }
    const earlier = lastIndexOf(tokens, from, colon, token.Colon);
    if (earlier !== -1) this.#refuse('not-yet-layers', offset(tokens, from), endOffset(tokens, colon));
    this.#words(tags.NameTag, tokens, from, colon);
    this.#push(tags.NameColonTag, tokens, colon, colon + 1);
    this.#words(tags.CaseNounTag, tokens, colon + 1, to);
  }

  /** What stands between two figures: the words after the one, a separator, and the name of the next. */
  #gap(tokens: readonly IToken[], previous: Figure, next: Figure, before: boolean, trailing: string): void {
    const [from, to] = [previous.end, next.start];
    const split = separatorIn(tokens, from, to);
    if (split !== -1) {
      this.#after(tokens, previous, split);
      this.#push(tags.SeparatorTag, tokens, split, split + 1);
      this.#lead(tokens, split + 1, to);
      return;
    }
    if (hasColon(tokens, from, to) || before) {
      const unit =
        trailing !== '' &&
        wordsText(tokens, from, from + trailing.split(' ').length).toLowerCase() === trailing.toLowerCase()
          ? trailing.split(' ').length
          : 0;
      this.#after(tokens, previous, from + unit);
      this.#lead(tokens, from + unit, to);
      return;
    }
    this.#after(tokens, previous, to);
  }

  /** Words after a figure, up to `to`: the noun of a percentage, a stated percentage in brackets, a unit or a name. */
  #after(tokens: readonly IToken[], figure: Figure, to: number): void {
    let from = figure.end;
    if (figure.kind === 'share' && figure.ofNoun) {
      from += 1;
      this.#words(tags.ShareNounTag, tokens, from, to);
      return;
    }
    while (from < to && (tokens[from]?.tokenType === token.Open || tokens[from]?.tokenType === token.Close))
      from += 1;
    this.#words(tags.AfterTag, tokens, from, to);
  }

  #figure(tokens: readonly IToken[], figure: Figure, previous: Figure | undefined): void {
    switch (figure.kind) {
      case 'bare':
        this.#push(tags.CasesTag, tokens, figure.start, figure.end, { kind: 'count', count: figure.count });
        return;
      case 'dangling':
        this.#push(tags.CasesTag, tokens, figure.start, figure.connector, {
          kind: 'count',
          count: figure.count,
        });
        this.#push(tags.OfTag, tokens, figure.connector, figure.connector + 1);
        return;
      case 'counts':
        this.#push(
          tags.CasesTag,
          tokens,
          figure.start,
          figure.noun === null ? figure.connector : figure.noun[0],
          { kind: 'count', count: figure.count },
        );
        if (figure.noun !== null) this.#words(tags.CaseNounTag, tokens, ...figure.noun);
        this.#push(
          tags.OfTag,
          tokens,
          figure.connector,
          figure.connector + 1,
          figure.eachCountedOnce ? { kind: 'text', text: 'in' } : { kind: 'none' },
        );
        this.#push(tags.TotalTag, tokens, ...figure.totalAt, {
          kind: 'count',
          count: { written: figure.total, suppressed: false },
        });
        return;
      case 'share-of':
        this.#push(tags.ShareTag, tokens, figure.start, figure.totalAt[0] - 1, {
          kind: 'share',
          share: figure.share,
        });
        this.#push(tags.OfTag, tokens, figure.totalAt[0] - 1, figure.totalAt[0]);
        this.#push(tags.TotalTag, tokens, ...figure.totalAt, {
          kind: 'count',
          count: { written: figure.total, suppressed: false },
        });
        return;
      case 'share': {
        const beside = previous?.kind === 'counts' && this.#isBeside(tokens, previous.end, figure.start);
        this.#push(beside ? tags.StatedTag : tags.ShareTag, tokens, figure.start, figure.end, {
          kind: 'share',
          share: figure.share,
        });
        return;
      }
      case 'rate':
        this.#refuse('not-yet-rate', offset(tokens, figure.start), endOffset(tokens, figure.end));
        return;
      case 'year':
        this.#refuse('year-or-people', offset(tokens, figure.start), endOffset(tokens, figure.end), [
          figure.year,
        ]);
        return;
    }
  }

  /** `31 of 9,240 (3.4%)`: a percentage with nothing but a bracket between it and the counts. */
  #isBeside(tokens: readonly IToken[], from: number, to: number): boolean {
    for (let at = from; at < to; at += 1) if (tokens[at]?.tokenType !== token.Open) return false;
    return to > from;
  }

  /** A total that was cut by a space after its comma: `18 of 1, 204`. */
  #looseTotal(tokens: readonly IToken[], figures: readonly Figure[]): void {
    for (const figure of figures) {
      const comma = tokens[figure.end];
      const rest = tokens[figure.end + 1];
      if (
        figure.kind !== 'counts' ||
        comma?.tokenType !== token.Comma ||
        rest?.tokenType !== token.NumberToken
      )
        continue;
      if (
        !/^\d{3}$/.test(rest.image) ||
        figure.total.text.length > 3 ||
        figureAt(tokens, figure.end + 1)?.kind !== 'bare'
      )
        continue;
      const from = offset(tokens, figure.totalAt[0]);
      this.#refuse('joined-number', from, endOffset(tokens, figure.end + 2), [
        `${figure.total.text},${rest.image}`,
      ]);
    }
  }

  #words(type: TokenType, tokens: readonly IToken[], from: number, to: number): void {
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
    const text = textOf(this.#folded.text, tokens, start, end);
    if (text !== '') this.#push(type, tokens, start, end, { kind: 'text', text });
  }

  #push(
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
      image: this.#folded.text.slice(startOffset, end),
      startOffset,
      endOffset: Math.max(startOffset, end - 1),
      tokenType: type,
      tokenTypeIdx: type.tokenTypeIdx ?? 0,
      payload,
    });
  }

  #refuse(
    id: Parameters<typeof diagnosis>[0],
    from: number,
    to: number,
    pieces: readonly string[] = [],
  ): void {
    this.fault ??= diagnosis(id, typedSpan(this.#folded, from, to), pieces);
  }
}

const offset = (tokens: readonly IToken[], at: number) => tokens[at]?.startOffset ?? 0;
const endOffset = (tokens: readonly IToken[], at: number) => {
  const last = tokens[at - 1];
  return last === undefined ? 0 : last.startOffset + last.image.length;
};

/** Words as one text: the quoted part where there is one, else as typed with single spaces, without a full stop at the end. */
function textOf(folded: string, tokens: readonly IToken[], from: number, to: number): string {
  const quoted = tokens.slice(from, to).find(({ tokenType }) => tokenType === token.Quoted);
  if (quoted !== undefined && to - from === 1) return unquoted(quoted.image);
  const text = folded
    .slice(offset(tokens, from), endOffset(tokens, to))
    .replace(/\s+/g, ' ')
    .replace(/"/g, "'");
  return text.replace(/[.\s]+$/, '');
}

const wordsText = (tokens: readonly IToken[], from: number, to: number) =>
  tokens
    .slice(from, to)
    .map(({ image }) => image)
    .join(' ')
    .replace(/[.?\s]+$/, '');

/** Leaves "is", "are" and "can I say" at the start of a question out of the name. */
function leadStart(tokens: readonly IToken[], start: number): number {
  return /^(?:is|are|was|were)$/i.test(tokens[start]?.image ?? '') && tokens.length > start + 1
    ? start + 1
    : start;
}

/** `night - 18 of 1,204`: a dash between name and figure acts as a colon. */
const withoutDash = (tokens: readonly IToken[], from: number, to: number) =>
  to > from && tokens[to - 1]?.tokenType === token.Dash ? to - 1 : to;

/** Leaves "significant", "had an incident?" and the like alone, but a question mark at the end out. */
function trimEnd(tokens: readonly IToken[], from: number): number {
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
const hasWords = (tokens: readonly IToken[], from: number, to: number) => tokens.slice(from, to).some(isWord);
const hasColon = (tokens: readonly IToken[], from: number, to: number) =>
  lastIndexOf(tokens, from, to, token.Colon) !== -1;

function lastIndexOf(tokens: readonly IToken[], from: number, to: number, type: TokenType): number {
  for (let at = to - 1; at >= from; at -= 1) if (tokens[at]?.tokenType === type) return at;
  return -1;
}

/** Where two groups meet: a `vs` or an arrow if there is one, else the first comma, slash or `and`. */
function separatorIn(tokens: readonly IToken[], from: number, to: number): number {
  let weak = -1;
  for (let at = from; at < to; at += 1) {
    const type = tokens[at]?.tokenType;
    if (strongSeparators.has(type)) return at;
    if (weak === -1 && separators.has(type)) weak = at;
  }
  return weak;
}

/**
 * In a list of bare counts (`no helmet 44, two doses 31`) the last number of an item is its figure, unless only words follow
 * the first (`44 no helmet`).
 */
function lastOfEachItem(figures: readonly Figure[], tokens: readonly IToken[]): Figure[] {
  return figures.filter((figure, index) => {
    const next = figures[index + 1];
    if (next === undefined) return true;
    const between = tokens.slice(figure.end, next.start);
    return between.some(({ tokenType }) => separators.has(tokenType));
  });
}
