import type { IToken } from 'chevrotain';
import { alarmFigureAt } from './alarm-figures.ts';
import { alarmWordsIn, isFiller, isUnit } from './alarm-words.ts';
import type { FoundWord } from './alarm-words.ts';
import type { Figure } from './figures.ts';
import * as token from './tokens.ts';

/** Finds which figure of a part belongs to which alarm word: the word stands before its figure or behind it. */

type Tokens = readonly IToken[];

/** A figure with the word that says what it is; places are indices of the part's tokens. */
export interface AlarmPiece {
  readonly tokens: Tokens;
  readonly figure: Figure;
  readonly word: FoundWord | null;
  /** What is counted, behind a figure: `0.4% of wells`. */
  readonly unit: readonly [number, number] | null;
}

export interface AlarmPieces {
  readonly pieces: readonly AlarmPiece[];
  /** Alarm words without a figure. */
  readonly loose: readonly FoundWord[];
  /** Stretches that nothing here places. */
  readonly leftovers: readonly (readonly [number, number])[];
}

interface Chunk {
  readonly runs: (readonly [number, number])[];
  readonly figures: Figure[];
}

/** The figures of a part from `start` on, each with its word. */
export function alarmPiecesOf(tokens: Tokens, start: number): AlarmPieces {
  const pieces: AlarmPiece[] = [];
  const loose: FoundWord[] = [];
  const taken = new Set<number>();
  let pending: FoundWord | null = null;
  for (const chunk of chunksOf(tokens, start)) {
    const words = chunk.runs.map((run) => wordsOf(tokens, run));
    const before = (words[0] ?? []).length > 0;
    const used = new Set<FoundWord>();
    chunk.figures.forEach((figure, index) => {
      const beside = before ? words[index]?.at(-1) : words[index + 1]?.[0];
      const word: FoundWord | null = beside ?? (index === 0 ? pending : null);
      if (word !== null) used.add(word);
      for (let at = figure.start; at < figure.end; at += 1) taken.add(at);
      const unit = unitOf(tokens, chunk.runs[index + 1] ?? [figure.end, figure.end]);
      pieces.push({ tokens, figure, word, unit });
    });
    if (pending !== null && !used.has(pending)) loose.push(pending);
    const free = words.flat().filter((word) => !used.has(word));
    pending = chunk.figures.length === 0 && free.length === 1 ? (free[0] ?? null) : null;
    if (pending === null) loose.push(...free);
    for (const { from, to } of words.flat()) for (let at = from; at < to; at += 1) taken.add(at);
  }
  if (pending !== null) loose.push(pending);
  for (const { word, unit } of pieces) {
    if (unit === null || word?.word !== 'prevalence') continue;
    for (let at = unit[0]; at < unit[1]; at += 1) taken.add(at);
  }
  return { pieces, loose, leftovers: leftoversOf(tokens, start, taken) };
}

/** Cuts a part at commas, slashes and "and"; a figure is never cut. */
function chunksOf(tokens: Tokens, start: number): Chunk[] {
  const chunks: Chunk[] = [];
  let chunk: Chunk = { runs: [], figures: [] };
  let from = start;
  const close = (at: number) => {
    chunk.runs.push([from, at]);
    chunks.push(chunk);
    chunk = { runs: [], figures: [] };
    from = at + 1;
  };
  for (let at = start; at < tokens.length;) {
    const figure = alarmFigureAt(tokens, at);
    if (figure !== null) {
      chunk.runs.push([from, at]);
      chunk.figures.push(figure);
      from = figure.end;
      at = figure.end;
      continue;
    }
    if (cuts.has(tokens[at]?.tokenType)) close(at);
    at += 1;
  }
  close(tokens.length);
  return chunks;
}

const cuts: ReadonlySet<unknown> = new Set([token.Comma, token.And, token.Ampersand, token.Slash]);

function wordsOf(tokens: Tokens, [from, to]: readonly [number, number]): FoundWord[] {
  return alarmWordsIn(tokens.slice(from, to).map(({ image }) => image)).map((word) => ({
    ...word,
    from: word.from + from,
    to: word.to + from,
  }));
}

/** Words directly behind a figure, or behind its "of", that name what is counted. */
function unitOf(tokens: Tokens, [from, to]: readonly [number, number]): readonly [number, number] | null {
  const type = tokens[from]?.tokenType;
  const start =
    from < to && (type === token.Of || type === token.In || type === token.Among) ? from + 1 : from;
  const row = tokens.slice(start, to);
  const alarm = wordsOf(tokens, [start, to])[0]?.from ?? to;
  const stop = row.findIndex(({ tokenType, image }) => tokenType !== token.Word || isFiller(image));
  const end = Math.min(alarm, stop === -1 ? to : start + stop);
  const text = tokens
    .slice(start, end)
    .map(({ image }) => image)
    .join(' ');
  return end > start && isUnit(text) ? [start, end] : null;
}

function leftoversOf(tokens: Tokens, start: number, taken: ReadonlySet<number>): [number, number][] {
  const found: [number, number][] = [];
  for (let at = start; at < tokens.length; at += 1) {
    const each = tokens[at];
    if (each === undefined || taken.has(at) || cuts.has(each.tokenType) || isFiller(each.image)) continue;
    const last = found.at(-1);
    if (last !== undefined && last[1] === at) last[1] = at + 1;
    else found.push([at, at + 1]);
  }
  return found;
}
