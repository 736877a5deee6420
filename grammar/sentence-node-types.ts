import type { Amount, Side } from './sentence-amounts.ts';
import type { Phrase } from './sentence-words.ts';

/** The figures that are found in a plain sentence, each as it stands. */

interface NodeBase {
  /** Among the marks, `end` exclusive. */
  readonly start: number;
  readonly end: number;
  /** Which sentence of the message it stands in. */
  readonly sentence: number;
}

/** `44 of 75`: a count and its total. */
export interface PairNode extends NodeBase {
  readonly kind: 'pair';
  readonly cases: Amount & { readonly share: boolean };
  readonly total: Amount;
  readonly caseNoun: string;
  /** What one of the total is called, with what is said of it. */
  readonly phrase: Phrase;
  /** The words in front: `on night shifts`. */
  readonly subject: string | null;
  /** `most of the injured` stood in front. */
  readonly mostOf: boolean;
}

/** `38% of riders`, `a third of incidents`, `one in four riders`. */
export interface ShareNode extends NodeBase {
  readonly kind: 'share';
  readonly text: string;
  readonly percentage: boolean;
  /** `null`: the sentence does not say what it is a share of. */
  readonly noun: string | null;
  readonly predicate: readonly string[];
  readonly subject: string | null;
  /** The word `coverage` stood in front. */
  readonly coverage: boolean;
}

/** `from 412 to 530`, `530, up from 412`. */
export interface ChangeNode extends NodeBase {
  readonly kind: 'change';
  readonly earlier: Side;
  readonly later: Side;
  /** The years that stand beside the two. */
  readonly times: readonly [string, string] | null;
  readonly subject: string | null;
}

/** `14 incidents in 5,200 bus-days`. */
export interface RateNode extends NodeBase {
  readonly kind: 'rate';
  readonly text: string;
  readonly subject: string | null;
  readonly phrase: Phrase;
}

/** `18 incidents`: a count without its total. */
export interface CountNode extends NodeBase {
  readonly kind: 'count';
  readonly amount: Amount;
  readonly noun: string;
  readonly predicate: readonly string[];
  readonly subject: string | null;
}

/** `4 times more`, `up 29%`: a result, not a figure. */
export interface ClaimNode extends NodeBase {
  readonly kind: 'claim';
}

export type SentenceNode = PairNode | ShareNode | ChangeNode | RateNode | CountNode | ClaimNode;
