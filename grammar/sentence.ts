import { fold, typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import { printCanonical } from './print-canonical.ts';
import type { LineReading, Question, QuestionKind, Span } from './question.ts';
import { figuresOf } from './sentence-figures.ts';
import type { FigureDraft, MissingId } from './sentence-drafts.ts';
import { marksOf } from './sentence-marks.ts';
import type { Mark } from './sentence-marks.ts';
import { missingText } from './sentence-messages.ts';
import { hasOddNames } from './sentence-names.ts';
import { nodesOf } from './sentence-nodes.ts';
import type { SentenceNode } from './sentence-node-types.ts';

/** What a found piece is. */
export type FoundRole = 'cases' | 'total' | 'share' | 'coverage' | 'rate' | 'change' | 'count' | 'claim';

/** A piece of a figure as it stands in the message: UTF-16 units of the typed line, `to` exclusive. */
export interface FoundPiece extends Span {
  readonly text: string;
  readonly role: FoundRole;
}

/** One figure of a message, with the question that asks it; `question` is `null` where something is missing. */
export interface SentenceFigure {
  readonly question: { readonly kind: QuestionKind | 'change'; readonly canonical: string } | null;
  /** The canonical line, or the line with `...` where something is missing. */
  readonly draft: string;
  readonly missing: readonly MissingId[];
  /** What it was read from, in short: `44 of 75 (injured), 38% (riders)`. */
  readonly shown: string;
  readonly span: Span;
  readonly instead: { readonly line: string; readonly label: string } | null;
}

/** What was found in a message. */
export interface SentenceReading {
  readonly found: readonly FoundPiece[];
  /** The figures that ask something, in the order of the message; else the one that lacks the least. */
  readonly figures: readonly SentenceFigure[];
  readonly missing: readonly { readonly id: MissingId; readonly text: string }[];
  /** Figures that ask nothing by themselves, beside others that do. */
  readonly leftOut: readonly string[];
  /** How many figures there are, also those beyond what was taken apart. */
  readonly count: number;
}

/** Reads a line strictly. Handed in, since the strict reader in its turn falls back on sentences. */
export type StrictReader = (line: string) => LineReading;

/** Beyond this many figures a message is not taken apart further. */
const mostFigures = 6;

/** Finds the figures of a message as it stands. Pure, linear in its length, and never throws whatever it holds. */
export function readSentence(message: string, strict: StrictReader): SentenceReading {
  const folded = fold(message);
  const marks = marksOf(folded);
  const nodes = nodesOf(marks);
  const claims = nodes.filter(({ kind }) => kind === 'claim');
  const all = figuresOf(marks, nodes);
  const drafts = all.slice(0, mostFigures);
  const claim = claims.length === 1 && drafts.length === 1 ? typedText(folded, marks, claims[0]) : null;
  const figures = drafts.map((draft) => settled(draft, claim, strict, folded, marks));
  const asked = figures.filter(({ question }) => question !== null);
  const kept = asked.length > 0 ? asked : figures.slice(0, 1);
  const count = kept.length + all.length - drafts.length;
  return {
    found: foundPieces(folded, marks, nodes, drafts),
    figures: kept,
    missing: missingOf(kept, nodes, count),
    leftOut: figures.filter((figure) => !kept.includes(figure)).map(({ shown }) => shown),
    count,
  };
}

function missingOf(figures: readonly SentenceFigure[], nodes: readonly SentenceNode[], count: number) {
  const said = (id: MissingId, detail = '') => ({ id, text: missingText(id, detail) });
  const [first] = figures;
  if (first === undefined) return [nodes.length === 0 ? said('no-figure') : said('figures')];
  if (figures.length > 1) return [said('which-figure', String(count))];
  return first.missing.map((id) => said(id, id === 'coverage' ? groupOf(first.draft) : ''));
}

const groupOf = (draft: string) => draft.slice(0, Math.max(0, draft.indexOf(':')));

function settled(
  draft: FigureDraft,
  claim: string | null,
  strict: StrictReader,
  folded: Folded,
  marks: readonly Mark[],
): SentenceFigure {
  const question = questionOf(draft, claim, strict);
  const first = draft.nodes[0]?.start ?? 0;
  const last = Math.max(...draft.nodes.map(({ end }) => end));
  const { instead } = draft;
  const kept = instead !== null && strict(instead.line).kind === 'question' ? instead : null;
  return {
    question: question === null ? null : { kind: kindOf(question), canonical: printCanonical(question) },
    draft:
      question === null
        ? draft.draft === ''
          ? (draft.lines.at(-1) ?? '')
          : draft.draft
        : printCanonical(question),
    missing: question === null && draft.missing.length === 0 ? ['figures'] : draft.missing,
    shown: [
      ...draft.nodes.map(shownText),
      ...(claim === null ? [] : [`"${claim.replaceAll('"', "'")}"`]),
    ].join(', '),
    span: spanOf(folded, marks, first, last),
    instead: kept,
  };
}

/** The first line that is understood as it is meant; with the claim under test where that is understood too. */
function questionOf(draft: FigureDraft, claim: string | null, strict: StrictReader): Question | null {
  for (const line of draft.lines) {
    const said = claim === null ? [line] : [`${line}; says "${claim.replaceAll('"', "'")}"`, line];
    for (const each of said) {
      const reading = strict(each);
      if (
        reading.kind === 'question' &&
        draft.kinds.includes(reading.question.kind) &&
        readsBack(reading.question, strict)
      )
        return reading.question;
    }
  }
  return null;
}

/** Whether the line that is offered asks the very same when it is sent. */
function readsBack(question: Question, strict: StrictReader): boolean {
  const canonical = printCanonical(question);
  const again = strict(canonical);
  return (
    again.kind === 'question' &&
    printCanonical(again.question) === canonical &&
    // Else the offer would be met with another offer.
    !hasOddNames(again.question, canonical)
  );
}

const kindOf = (question: Question) =>
  question.overTime && question.kind !== 'strata' ? 'change' : question.kind;

function spanOf(folded: Folded, marks: readonly Mark[], start: number, end: number): Span {
  return typedSpan(folded, marks[start]?.from ?? 0, marks[Math.max(start, end - 1)]?.to ?? 0);
}

function typedText(folded: Folded, marks: readonly Mark[], node: SentenceNode | undefined): string | null {
  if (node === undefined) return null;
  const { from, to } = spanOf(folded, marks, node.start, node.end);
  return folded.typed.slice(from, to);
}

/** What a found piece is shown as in the offer. */
function shownText(node: SentenceNode): string {
  const about = (noun: string | null) => (noun === null || noun === '' ? '' : ` (${noun.slice(0, 24)})`);
  switch (node.kind) {
    case 'pair':
      return `${node.cases.text} of ${node.total.text}${about(node.phrase.noun)}`;
    case 'share':
      return `${node.text}${about(node.noun === null ? null : `of ${node.noun}`)}`;
    case 'change':
      return `from ${node.earlier.text} to ${node.later.text}${about(node.subject)}`;
    case 'rate':
      return node.text;
    case 'count':
      return `${node.amount.text}${about(node.noun)}`;
    case 'claim':
      return '';
  }
}

/** Every piece that was found, whether a question came of it or not. */
function foundPieces(
  folded: Folded,
  marks: readonly Mark[],
  nodes: readonly SentenceNode[],
  drafts: readonly FigureDraft[],
): FoundPiece[] {
  const coverages = new Set(
    drafts
      .filter(({ kinds }) => kinds.includes('shares'))
      .flatMap(({ coverage }) => (coverage === null ? [] : [coverage])),
  );
  const piece = (start: number, end: number, role: FoundRole): FoundPiece => {
    const { from, to } = spanOf(folded, marks, start, end);
    return { text: folded.typed.slice(from, to), from, to, role };
  };
  return nodes.flatMap((node) => {
    switch (node.kind) {
      case 'pair':
        return [
          piece(node.cases.start, node.cases.end, 'cases'),
          piece(node.total.start, node.total.end, 'total'),
        ].sort((one, other) => one.from - other.from);
      case 'share':
        return [piece(node.start, node.end, node.coverage || coverages.has(node) ? 'coverage' : 'share')];
      case 'count':
        return [piece(node.amount.start, node.amount.end, 'count')];
      default:
        return [piece(node.start, node.end, node.kind)];
    }
  });
}
