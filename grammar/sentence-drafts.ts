import type { QuestionKind } from './question.ts';
import type { SentenceNode } from './sentence-node-types.ts';

/** What a figure of a sentence lacks. */
export type MissingId =
  'coverage' | 'second-group' | 'total' | 'totals' | 'figures' | 'which-figure' | 'no-figure';

/** A figure put together from what stands in a sentence. */
export interface FigureDraft {
  readonly nodes: readonly SentenceNode[];
  /** Lines that ask it, the fullest first: the first that the reader of lines understands as one of `kinds` is taken. */
  readonly lines: readonly string[];
  readonly kinds: readonly QuestionKind[];
  /** The line with `...` where something is missing; empty where nothing is. */
  readonly draft: string;
  readonly missing: readonly MissingId[];
  /** Which of the pieces is a share of everybody. */
  readonly coverage: SentenceNode | null;
  /** Another way to take the same words. */
  readonly instead: { readonly line: string; readonly label: string } | null;
}

export const quoted = (name: string) => `"${name.replaceAll('"', "'")}"`;
export const named = (name: string | null) => (name === null ? '' : `${quoted(name)}: `);

/** A finished figure: nothing is missing. */
export const complete = (
  nodes: readonly SentenceNode[],
  kinds: readonly QuestionKind[],
  lines: readonly string[],
  instead: FigureDraft['instead'] = null,
): FigureDraft => ({ nodes, lines, kinds, draft: '', missing: [], coverage: null, instead });
