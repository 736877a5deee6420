import type { IToken } from 'chevrotain';
import { changeIn } from './change.ts';
import { clauseOf } from './clauses.ts';
import { figureAt } from './figures.ts';
import { oddFigureIn } from './odd-figures.ts';
import type { Figure } from './figures.ts';
import type { Folded } from './fold.ts';
import { partsOf } from './parts.ts';
import { withoutByHead } from './by-head.ts';
import { writeFigure } from './tag-figure.ts';
import { TagWriter } from './tag-writer.ts';
import { withoutStated } from './stated-beside.ts';
import type { StatedShare } from './stated-beside.ts';
import type { Part } from './parts.ts';
import type { Diagnosis } from './question.ts';
import {
  endOffset,
  hasColon,
  hasWords,
  isTimeWords,
  lastIndexOf,
  lastOfEachItem,
  leadStart,
  offset,
  separatorIn,
  strongSeparators,
  textOf,
  trimEnd,
  withoutDash,
  wordsText,
} from './tag-words.ts';
import * as tags from './tags.ts';
import type { Tagged } from './tags.ts';
import * as token from './tokens.ts';

/** The tagged line, or the first thing in it that cannot be. */
export interface TaggedLine {
  readonly tags: readonly Tagged[];
  readonly fault: Diagnosis | null;
  /** Whether the line holds any number at all. */
  readonly hasFigure: boolean;
}

/** Settles in one linear pass what each fine token stands for: part of a name, of a figure, of a clause, or between groups. */
export function tagLine(fine: readonly IToken[], folded: Folded): TaggedLine {
  const pass = new TaggingPass(folded);
  const { head: by, tokens: figures } = withoutByHead(fine);
  if (by !== null) pass.words(tags.ByHeadTag, by, 1, by.length - 1);
  const parts = partsOf(figures, folded.text.length);
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

class TaggingPass extends TagWriter {
  part(part: Part, head: 'cases' | 'coverage' | null, hasCoverage: boolean): void {
    const clause = head === null ? clauseOf(part, this.folded.text) : null;
    const [first] = part.tokens;
    if (first === undefined) return;
    if (clause !== null) {
      switch (clause.kind) {
        case 'clause':
          this.push(tags.ClauseTag, first.startOffset, part.end, clause);
          return;
        case 'no-value':
          this.refuse('clause-without-value', first.startOffset, part.end, [clause.word, clause.example]);
          return;
      }
    }
    this.fault ??= oddFigureIn(part.tokens, this.folded);
    const change = head === null ? changeIn(part.tokens) : null;
    if (change !== null) {
      if (change.further !== null) {
        const { startOffset, image } = change.further;
        this.refuse('change-of-two', startOffset, startOffset + image.length, [], ['from 412 to 530']);
      }
      const from = change.sign.startOffset;
      const payload =
        change.order === 'back' ? ({ kind: 'text', text: 'back' } as const) : ({ kind: 'none' } as const);
      this.push(tags.ChangeHeadTag, from, from + change.sign.image.length, payload);
    }
    const { tokens, stated } = withoutStated(change?.tokens ?? part.tokens);
    const { figures, used } = this.#figuresOf(tokens);
    const isHead =
      head === 'coverage' ||
      (head === 'cases' && (hasCoverage || !figures.some(({ kind }) => kind === 'counts')));
    let start = 0;
    if (isHead) {
      start = tokens[1]?.tokenType === token.Colon ? 2 : 1;
      const last = tokens[start - 1];
      this.push(
        head === 'cases' ? tags.CasesHeadTag : tags.CoverageHeadTag,
        first.startOffset,
        (last ?? first).startOffset + (last ?? first).image.length,
        { kind: 'none' },
      );
    }
    this.#list(
      tokens,
      start,
      figures.filter((figure) => figure.start >= start),
      used,
      stated,
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

  #list(
    tokens: readonly IToken[],
    start: number,
    figures: readonly Figure[],
    connected: boolean,
    stated: ReadonlyMap<number, StatedShare>,
  ): void {
    const [firstFigure] = figures;
    if (firstFigure === undefined) {
      this.words(tags.AfterTag, tokens, start, tokens.length);
      return;
    }
    if (connected) this.#looseTotal(tokens, figures);
    this.#loneYears(tokens, figures);
    const before =
      hasWords(tokens, leadStart(tokens, start), firstFigure.start) ||
      hasColon(tokens, start, firstFigure.start);
    const trailing = wordsText(tokens, figures.at(-1)?.end ?? tokens.length, tokens.length);
    this.#lead(tokens, leadStart(tokens, start), firstFigure.start);
    figures.forEach((figure, index) => {
      const previous = figures[index - 1];
      if (previous !== undefined) this.#gap(tokens, previous, figure, before, trailing);
      writeFigure(this, tokens, figure);
      const beside = stated.get(offset(tokens, figure.start));
      if (beside !== undefined)
        this.push(tags.StatedTag, beside.from, beside.to, { kind: 'share', share: beside.share });
    });
    const last = figures.at(-1);
    if (last === undefined) return;
    const end = trimEnd(tokens, last.end);
    const separator = tokens.findIndex(
      (each, at) => at >= last.end && at < end && strongSeparators.has(each.tokenType),
    );
    this.#after(tokens, last, separator === -1 ? end : separator);
    if (separator !== -1) this.#missingGroup(tokens, separator, end);
  }

  /** Behind a last `vs` there is nothing, only words, or a count without its total. */
  #missingGroup(tokens: readonly IToken[], separator: number, end: number): void {
    const number = tokens.findIndex(
      (each, at) => at > separator && at < end && each.tokenType === token.NumberToken,
    );
    const [from, to] = [offset(tokens, separator), endOffset(tokens, end)];
    const word = tokens[separator]?.image ?? '';
    if (number === -1) {
      this.refuse('group-missing', from, to, [`"${word}"`], [`${this.repaired(from, to, word)} ... of ...`]);
      return;
    }
    const name = textOf(this.folded.text, tokens, separator + 1, number)
      .replace(/:$/, '')
      .trim();
    const place = offset(tokens, number);
    this.refuse(
      'second-total-missing',
      place,
      to,
      [name === '' ? 'The second group' : name],
      [`${this.repaired(to, to, '')} of ...`],
    );
  }

  /** Words before the first figure are its name. */
  #lead(tokens: readonly IToken[], from: number, to: number): void {
    const colon = lastIndexOf(tokens, from, to, token.Colon);
    if (colon === -1) {
      this.words(tags.NameTag, tokens, from, withoutDash(tokens, from, to));
      return;
    }
    const earlier = lastIndexOf(tokens, from, colon, token.Colon);
    if (earlier !== -1) this.words(tags.LayerTag, tokens, from, earlier);
    this.words(tags.NameTag, tokens, earlier === -1 ? from : earlier + 1, colon);
    this.pushTokens(tags.NameColonTag, tokens, colon, colon + 1);
    this.words(tags.CaseNounTag, tokens, colon + 1, to);
  }

  /** What stands between two figures: the words after the one, a separator, and the name of the next. */
  #gap(tokens: readonly IToken[], previous: Figure, next: Figure, before: boolean, trailing: string): void {
    const [from, to] = [previous.end, next.start];
    const split = separatorIn(tokens, from, to);
    if (split !== -1) {
      this.#after(tokens, previous, split);
      this.pushTokens(tags.SeparatorTag, tokens, split, split + 1);
      this.#lead(tokens, split + 1, to);
      return;
    }
    if (isTimeWords(tokens.slice(from, to))) {
      this.#after(tokens, previous, to);
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
      this.words(tags.ShareNounTag, tokens, from, to);
      return;
    }
    while (from < to && (tokens[from]?.tokenType === token.Open || tokens[from]?.tokenType === token.Close))
      from += 1;
    if (tokens[from]?.tokenType === token.Per && from < to && to < tokens.length) {
      const [start, end] = [offset(tokens, from), endOffset(tokens, to)];
      this.refuse(
        'per-in-the-middle',
        start,
        end,
        [this.folded.text.slice(start, end)],
        [`${this.repaired(start, end, '').replace(/ {2,}/g, ' ')}; ${this.folded.text.slice(start, end)}`],
      );
    }
    this.words(tags.AfterTag, tokens, from, to);
  }

  /** `412 in 2023 vs 530 in 2024` names two times; one year alone, or twice the same, may as well be that many people. */
  #loneYears(tokens: readonly IToken[], figures: readonly Figure[]): void {
    const [first, ...others] = figures.filter((figure) => figure.kind === 'year');
    if (first === undefined || new Set([first, ...others].map(({ year }) => year)).size > 1) return;
    const [from, to] = [offset(tokens, first.start), endOffset(tokens, first.end)];
    const count = first.count.text;
    this.refuse(
      'year-or-people',
      from,
      to,
      [first.year],
      [
        `${first.year}: ${count} vs ...: ...`,
        `${count} of ${first.year.replace(/^(\d)/, '$1,')} vs ... of ...`,
      ],
    );
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
      const joined = `${figure.total.text},${rest.image}`;
      const to = endOffset(tokens, figure.end + 2);
      this.refuse('joined-number', from, to, [joined], [this.repaired(from, to, joined)]);
    }
  }
}
