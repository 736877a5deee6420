import type { CstNode, IToken } from 'chevrotain';
import { typedSpan } from './fold.ts';
import type { Folded } from './fold.ts';
import type { Span } from './question.ts';
import { payloadOf } from './tags.ts';
import type { ClauseName, CountValue, ShareValue } from './tags.ts';
import type { WrittenNumber } from './numbers.ts';

/** The parse tree as plain values, with places in the typed line. Nothing is decided here. */

export interface Words {
  readonly text: string;
  readonly span: Span;
}

export interface ItemFigureCount {
  readonly kind: 'count';
  readonly count: CountValue;
  readonly countSpan: Span;
  readonly noun: Words | null;
  readonly total: { readonly written: WrittenNumber; readonly span: Span } | null;
  readonly eachCountedOnce: boolean;
  readonly exposure: ItemExposure | null;
}

export interface ItemExposure {
  readonly written: WrittenNumber;
  readonly unit: string | null;
  readonly connector: 'in' | 'per';
  readonly span: Span;
}

export interface ItemFigureShare {
  readonly kind: 'share';
  readonly share: ShareValue;
  readonly shareSpan: Span;
  readonly total: { readonly written: WrittenNumber; readonly span: Span } | null;
  readonly noun: Words | null;
}

export interface Item {
  /** The layer that the figure stands in, where a name and a colon stand before the group's own. */
  readonly layer: Words | null;
  readonly name: Words | null;
  readonly colon: boolean;
  /** Words between the name's colon and the figure: what a case is called, or the group's name behind a layer's. */
  readonly before: Words | null;
  readonly figure: ItemFigureCount | ItemFigureShare;
  readonly stated: { readonly share: ShareValue; readonly span: Span } | null;
  readonly after: Words | null;
  readonly span: Span;
}

export type TreePart =
  | {
      readonly kind: 'list';
      /** `change`: from the first figure to the second; `change-back`: the later figure stands first. */
      readonly head: 'cases' | 'coverage' | 'change' | 'change-back' | 'alarm' | null;
      /** What the alarm is called, where the line names it. */
      readonly name: Words | null;
      readonly items: readonly Item[];
      readonly span: Span;
    }
  | {
      readonly kind: 'clause';
      readonly name: ClauseName;
      readonly body: string;
      readonly number: WrittenNumber | null;
      readonly numbers: readonly WrittenNumber[];
      readonly span: Span;
    };

/** What the layers of a line are layers of: the words behind `by`. */
export function layersBy(tree: CstNode, folded: Folded): string | null {
  return wordsOf(tokens(tree, 'ByHead')[0], folded)?.text ?? null;
}

/** Turns a parse tree without errors into its parts. */
export function partsOfTree(tree: CstNode, folded: Folded): readonly TreePart[] {
  return nodes(tree, 'part').map((part) => partOf(part, folded));
}

const nodes = (node: CstNode, name: string) =>
  (node.children[name] ?? []).filter((child): child is CstNode => 'children' in child);
const tokens = (node: CstNode, name: string) =>
  (node.children[name] ?? []).filter((child): child is IToken => 'image' in child);
const spanOf = (token: IToken, folded: Folded) =>
  typedSpan(folded, token.startOffset, token.startOffset + token.image.length);
const joined = (spans: readonly Span[]): Span => ({
  from: Math.min(...spans.map(({ from }) => from)),
  to: Math.max(...spans.map(({ to }) => to)),
});

function partOf(node: CstNode, folded: Folded): TreePart {
  const [clause] = tokens(node, 'Clause');
  if (clause !== undefined) {
    const payload = payloadOf(clause);
    if (payload.kind !== 'clause') throw new Error('a clause tag carries no clause');
    return {
      kind: 'clause',
      name: payload.name,
      body: payload.body,
      number: payload.number,
      numbers: payload.numbers ?? [],
      span: spanOf(clause, folded),
    };
  }
  const [change] = tokens(node, 'ChangeHead');
  const heads = [
    ...tokens(node, 'CasesHead'),
    ...tokens(node, 'CoverageHead'),
    ...(change === undefined ? [] : [change]),
  ];
  const items = nodes(node, 'list')
    .flatMap((list) => nodes(list, 'item'))
    .map((item) => itemOf(item, folded));
  return {
    kind: 'list',
    head:
      node.children['CasesHead'] !== undefined
        ? 'cases'
        : node.children['CoverageHead'] !== undefined
          ? 'coverage'
          : node.children['AlarmHead'] !== undefined
            ? 'alarm'
            : change === undefined
              ? null
              : payloadOf(change).kind === 'text'
                ? 'change-back'
                : 'change',
    name: wordsOf(tokens(node, 'AlarmHead')[0], folded),
    items,
    span: joined([...heads.map((head) => spanOf(head, folded)), ...items.map(({ span }) => span)]),
  };
}

function itemOf(node: CstNode, folded: Folded): Item {
  const [figure] = nodes(node, 'figure');
  if (figure === undefined) throw new Error('an item without a figure');
  const [stated] = tokens(node, 'Stated');
  const statedShare = stated === undefined ? null : payloadOf(stated);
  const all = [...Object.values(node.children), ...Object.values(figure.children)]
    .flat()
    .filter((child): child is IToken => 'image' in child);
  const value = figureOf(figure, folded);
  const before = wordsOf(tokens(node, 'CaseNoun')[0], folded);
  return {
    layer: wordsOf(tokens(node, 'Layer')[0], folded),
    name: wordsOf(tokens(node, 'Name')[0], folded),
    colon: node.children['NameColon'] !== undefined,
    before,
    figure: value.kind === 'count' && value.noun === null ? { ...value, noun: before } : value,
    stated:
      stated === undefined || statedShare?.kind !== 'share'
        ? null
        : { share: statedShare.share, span: spanOf(stated, folded) },
    after: wordsOf(tokens(node, 'After')[0], folded),
    span: joined(all.map((token) => spanOf(token, folded))),
  };
}

function figureOf(node: CstNode, folded: Folded): ItemFigureCount | ItemFigureShare {
  const [cases] = tokens(node, 'Cases');
  const [share] = tokens(node, 'Share');
  const [totalToken] = tokens(node, 'Total');
  const totalPayload = totalToken === undefined ? null : payloadOf(totalToken);
  const total =
    totalToken === undefined || totalPayload?.kind !== 'count'
      ? null
      : { written: totalPayload.count.written, span: spanOf(totalToken, folded) };
  if (cases !== undefined) {
    const payload = payloadOf(cases);
    if (payload.kind !== 'count') throw new Error('a count tag carries no count');
    const [of] = tokens(node, 'OfSign');
    const [per] = tokens(node, 'PerSign');
    const [exposureToken] = tokens(node, 'Exposure');
    const exposure = exposureToken === undefined ? null : payloadOf(exposureToken);
    return {
      kind: 'count',
      count: payload.count,
      countSpan: spanOf(cases, folded),
      noun: wordsOf(tokens(node, 'CaseNoun')[0], folded),
      total,
      eachCountedOnce: of !== undefined && payloadOf(of).kind === 'text',
      exposure:
        exposureToken === undefined || exposure?.kind !== 'exposure'
          ? null
          : {
              written: exposure.number,
              unit: exposure.unit,
              connector: per !== undefined && payloadOf(per).kind === 'text' ? 'in' : 'per',
              span: spanOf(exposureToken, folded),
            },
    };
  }
  if (share === undefined) throw new Error('a figure without a number');
  const payload = payloadOf(share);
  if (payload.kind !== 'share') throw new Error('a share tag carries no share');
  return {
    kind: 'share',
    share: payload.share,
    shareSpan: spanOf(share, folded),
    total,
    noun: wordsOf(tokens(node, 'ShareNoun')[0], folded),
  };
}

function wordsOf(token: IToken | undefined, folded: Folded): Words | null {
  if (token === undefined) return null;
  const payload = payloadOf(token);
  return payload.kind === 'text' ? { text: payload.text, span: spanOf(token, folded) } : null;
}
