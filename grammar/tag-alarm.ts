import type { IToken } from 'chevrotain';
import { alarmPiecesOf } from './alarm-pieces.ts';
import type { AlarmPiece, AlarmPieces } from './alarm-pieces.ts';
import { alarmWordsIn, isAlarmName, isPlainAlarm } from './alarm-words.ts';
import type { FoundWord } from './alarm-words.ts';
import { clauseOf } from './clauses.ts';
import { figureAt } from './figures.ts';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { oddFigureIn } from './odd-figures.ts';
import { partsOf } from './parts.ts';
import type { Part } from './parts.ts';
import type { ReadingRemark } from './question.ts';
import { withoutStated } from './stated-beside.ts';
import type { StatedShare } from './stated-beside.ts';
import { endOffset, offset, strongSeparators, textOf } from './tag-words.ts';
import { TagWriter } from './tag-writer.ts';
import type { TaggedLine } from './tag.ts';
import * as tags from './tags.ts';
import * as token from './tokens.ts';

/** A tagged line that asks about an alarm. */
export interface AlarmLine extends TaggedLine {
  readonly remarks: readonly ReadingRemark[];
}

interface AlarmPart extends AlarmPieces {
  readonly tokens: readonly IToken[];
  readonly stated: ReadonlyMap<number, StatedShare>;
}

interface Head {
  readonly name: string | null;
  /** Whether the words in front of the colon say that this is an alarm. */
  readonly says: boolean;
  readonly from: number;
  readonly to: number;
  /** Tokens of the first part that belong to it. */
  readonly length: number;
}

/**
 * The tags of a line that asks about an alarm, or `null` where it asks something else. An alarm's figures are known by the words
 * beside them, never by their order; a line that compares (`vs`) is never one alarm.
 */
export function tagAlarm(fine: readonly IToken[], folded: Folded): AlarmLine | null {
  const says = isPlainAlarm(fine[0]?.image ?? '') && fine[1]?.tokenType === token.Colon;
  if (!says && alarmWordsIn(fine.map(({ image }) => image)).length === 0) return null;
  const parts = partsOf(fine, folded.text.length).map((part) => ({
    part,
    clause: clauseOf(part, folded.text),
  }));
  // A clause that cannot be read is told about in the usual way.
  if (parts.some(({ clause }) => clause !== null && clause.kind !== 'clause')) return null;
  const figureParts = parts.filter(({ clause }) => clause === null).map(({ part }) => part);
  const head = headOf(figureParts[0], folded);
  const read = figureParts.map((part, index) => alarmPart(part, index === 0 ? (head?.length ?? 0) : 0));
  const writer = new AlarmWriter(folded);
  const compares = read.some(({ tokens }) => tokens.some(({ tokenType }) => strongSeparators.has(tokenType)));
  if (compares) {
    if (!comparesAlarms(read)) return null;
    const [first, last] = [read[0]?.tokens[0], read.at(-1)?.tokens.at(-1)];
    writer.refuse('alarm-compared', first?.startOffset ?? 0, last === undefined ? 0 : endOf(last));
    return writer.line([]);
  }
  if (!isAlarm(read, head)) return null;
  return writer.write(
    read,
    head,
    parts.flatMap(({ part, clause }) => (clause?.kind === 'clause' ? [{ part, clause }] : [])),
  );
}

const endOf = (each: IToken) => each.startOffset + each.image.length;

function alarmPart(part: Part, start: number): AlarmPart {
  const { tokens, stated } = withoutStated(part.tokens);
  return { tokens, stated, ...alarmPiecesOf(tokens, start) };
}

/** `alarm:`, `water alarm:`: the words in front of a first colon, unless they are an alarm word themselves. */
function headOf(part: Part | undefined, folded: Folded): Head | null {
  if (part === undefined) return null;
  const { tokens } = part;
  const colon = tokens.findIndex(({ tokenType }) => tokenType === token.Colon);
  const [first] = tokens;
  const last = tokens[colon];
  if (colon < 1 || first === undefined || last === undefined) return null;
  const quoted = first.tokenType === token.Quoted && colon === 1;
  const row = tokens.slice(0, colon);
  const text = textOf(folded.text, tokens, 0, colon);
  const words = alarmWordsIn(row.map(({ image }) => image));
  const isWord = words.some(({ from, to }) => from === 0 && to === colon);
  if (!quoted && (isWord || (words.length > 0 && !isAlarmName(text)))) return null;
  // "unit 7 alarm" has a number, "46 caught:" a figure.
  const figures = row.flatMap((_, at) => figureAt(tokens, at) ?? []);
  if (!quoted && figures.some(({ kind }) => kind !== 'bare' || !isAlarmName(text))) return null;
  if (text === '') return null;
  return {
    name: !quoted && isPlainAlarm(text) ? null : text,
    says: isAlarmName(text),
    from: first.startOffset,
    to: endOf(last),
    length: colon + 1,
  };
}

const piecesIn = (read: readonly AlarmPart[]) => read.flatMap(({ pieces }) => pieces);
const wordsIn = (read: readonly AlarmPart[]) =>
  piecesIn(read).flatMap(({ word }) => (word === null ? [] : [word]));
const different = (words: readonly FoundWord[]) => new Set(words.map(({ word }) => word)).size;

/** `sensitivity 92%, specificity 97% vs sensitivity 90%, ...`: two alarms in one line. */
function comparesAlarms(read: readonly AlarmPart[]): boolean {
  const separators = read
    .flatMap(({ tokens }) => tokens)
    .filter(({ tokenType }) => strongSeparators.has(tokenType)).length;
  const pieces = piecesIn(read);
  // `tp 46 vs fp 30` are two counts; with a percentage, or with more figures than groups, it is an alarm.
  const alarm = pieces.length > separators + 1 || pieces.some(({ figure }) => figure.kind === 'share');
  return alarm && different(wordsIn(read).filter(({ technical }) => technical)) >= 2;
}

function isAlarm(read: readonly AlarmPart[], head: Head | null): boolean {
  const pieces = piecesIn(read);
  const words = wordsIn(read);
  if (pieces.length === 0) return false;
  // `alarm: 92%, 97%, 0.4%`: never read by their order.
  const nothingElse = words.length === 0 && read.every(({ leftovers }) => leftovers.length === 0);
  if (head?.says === true && head.name === null && nothingElse)
    return pieces.length > 1 && pieces.every(({ figure }) => figure.kind === 'share');
  const answers = words.filter(({ word }) => word === 'accuracy' || word === 'result');
  if (answers.length === 1) return true;
  const technical = words.some((word) => word.technical);
  const several = different(words) >= 2;
  // A plain "alarm:" says it by itself; "smoke test:" may be the name of a group.
  if (head?.says === true && words.length > 0 && (head.name === null || technical || several)) return true;
  if (several && technical) return true;
  if (several) return everydayAlarm(read, pieces, words);
  const [only] = pieces;
  return pieces.length === 1 && technical && only?.figure.kind === 'share';
}

/** `caught 46, missed 4`: words that may as well be names of groups, so nothing else may stand beside them. */
function everydayAlarm(
  read: readonly AlarmPart[],
  pieces: readonly AlarmPiece[],
  words: readonly FoundWord[],
): boolean {
  if (words.length < pieces.length || read.some(({ leftovers }) => leftovers.length > 0)) return false;
  const aboutRealCases = words.map(
    ({ word }) => word === 'caught' || word === 'missed' || word === 'sensitivity',
  );
  // `missed: 3 of 900, caught: 4 of 800` are two groups: one alarm has one total of real cases.
  const oneSide = aboutRealCases.every((about) => about === aboutRealCases[0]);
  return !(oneSide && pieces.every(({ figure }) => figure.kind === 'counts' || figure.kind === 'share-of'));
}

type WithTotal = Extract<AlarmPiece['figure'], { kind: 'counts' | 'share-of' }>;
type ClauseOfLine = {
  readonly part: Part;
  readonly clause: Extract<ReturnType<typeof clauseOf>, { kind: 'clause' }>;
};

class AlarmWriter extends TagWriter {
  line(remarks: readonly ReadingRemark[]): AlarmLine {
    return { tags: this.tags, fault: this.fault, hasFigure: true, remarks };
  }

  write(read: readonly AlarmPart[], head: Head | null, clauses: readonly ClauseOfLine[]): AlarmLine {
    const remarks: ReadingRemark[] = [];
    let name = head?.name ?? null;
    for (const part of read) {
      for (const [from, to] of part.leftovers) {
        const text = textOf(this.folded.text, part.tokens, from, to);
        if (
          /\d/.test(text) ||
          part.tokens.slice(from, to).some(({ tokenType }) => tokenType === token.NumberToken)
        )
          this.#unplaced(part, from, to, text);
        // "water alarm sensitivity 92%": its name without a colon.
        else if (
          name === null &&
          part === read[0] &&
          from === 0 &&
          isPlainAlarm(part.tokens[to]?.image ?? '')
        )
          name = `${text} ${part.tokens[to]?.image ?? ''}`;
        else remarks.push(this.#leftOut(part, from, to, text));
      }
    }
    this.push(
      tags.AlarmHeadTag,
      head?.from ?? 0,
      head?.to ?? 0,
      name === null ? { kind: 'none' } : { kind: 'text', text: name },
    );
    for (const part of read) for (const piece of part.pieces) this.#piece(piece, part.stated);
    for (const { part, clause } of clauses) {
      const start = part.tokens[0]?.startOffset ?? 0;
      this.push(tags.BreakTag, start, start, { kind: 'none' });
      this.push(tags.ClauseTag, start, part.end, clause);
    }
    return this.line(remarks);
  }

  #piece({ tokens, figure, word, unit }: AlarmPiece, stated: AlarmPart['stated']): void {
    const isUnitOf = word?.word === 'prevalence' && unit !== null;
    if (word !== null)
      this.pushTokens(tags.NameTag, tokens, word.from, word.to, { kind: 'text', text: word.word });
    this.#figure(tokens, figure);
    const beside = stated.get(offset(tokens, figure.start));
    if (beside !== undefined)
      this.push(tags.StatedTag, beside.from, beside.to, { kind: 'share', share: beside.share });
    if (isUnitOf) this.words(tags.AfterTag, tokens, ...unit);
  }

  #figure(tokens: readonly IToken[], figure: AlarmPiece['figure']): void {
    const { start, end } = figure;
    switch (figure.kind) {
      case 'bare':
        this.pushTokens(tags.CasesTag, tokens, start, end, { kind: 'count', count: figure.count });
        return;
      case 'dangling':
        this.pushTokens(tags.CasesTag, tokens, start, figure.connector, {
          kind: 'count',
          count: figure.count,
        });
        this.pushTokens(tags.OfTag, tokens, figure.connector, end);
        return;
      case 'counts':
        this.pushTokens(tags.CasesTag, tokens, start, figure.noun?.[0] ?? figure.connector, {
          kind: 'count',
          count: figure.count,
        });
        this.#total(tokens, figure);
        return;
      case 'share-of':
        this.pushTokens(tags.ShareTag, tokens, start, figure.totalAt[0] - 1, {
          kind: 'share',
          share: figure.share,
        });
        this.#total(tokens, figure);
        return;
      case 'share':
        this.pushTokens(tags.ShareTag, tokens, start, end, { kind: 'share', share: figure.share });
        return;
      default: {
        const [from, to] = [offset(tokens, start), endOffset(tokens, end)];
        this.refuse('unread-alarm', from, to, [this.folded.text.slice(from, to).trim()]);
      }
    }
  }

  #total(tokens: readonly IToken[], { total, totalAt }: WithTotal): void {
    this.pushTokens(tags.OfTag, tokens, totalAt[0] - 1, totalAt[0]);
    this.pushTokens(tags.TotalTag, tokens, ...totalAt, {
      kind: 'count',
      count: { written: total, suppressed: false },
    });
  }

  /** A number that belongs to no alarm word: said in the usual way where it is odd in itself. */
  #unplaced(part: AlarmPart, from: number, to: number, text: string): void {
    this.fault ??= oddFigureIn(part.tokens, this.folded);
    this.refuse('unread-alarm', offset(part.tokens, from), endOffset(part.tokens, to), [text]);
  }

  #leftOut(part: AlarmPart, from: number, to: number, text: string): ReadingRemark {
    const span = typedSpan(this.folded, offset(part.tokens, from), endOffset(part.tokens, to));
    return { id: 'words-left-out', text, readAs: '', span };
  }
}
