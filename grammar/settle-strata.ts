import { diagnosis } from './diagnosis.ts';
import { nameKey } from './labels.ts';
import { refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { CountsQuestion, Layer, Question, RatesQuestion, SharesQuestion, Span } from './question.ts';
import type { Setting } from './setting.ts';
import { settleCounts } from './settle-groups.ts';
import { areRates, settleRates } from './settle-rates.ts';
import { settleShares } from './settle-shares.ts';
import type { Item, TreePart, Words } from './tree.ts';

type List = Extract<TreePart, { kind: 'list' }>;
type Layered = CountsQuestion | SharesQuestion | RatesQuestion;

/** A layer before it is settled: its name, the items of its groups, and their coverages where it has shares. */
export interface LayerItems {
  readonly name: Words | null;
  readonly items: readonly Item[];
  readonly coverages: readonly Item[] | null;
  readonly span: Span;
}

/**
 * The layers of a line, or `null` where it has none. Parts of two or more groups each are layers, where there are at least two of
 * them; so are pairs of cases and coverage under a layer's name of their own.
 */
export function layersOf(lists: readonly List[]): readonly LayerItems[] | null {
  if (lists.some(({ head }) => head !== null)) return null;
  return layersOfShares(lists) ?? layersOfGroups(lists);
}

function layersOfGroups(lists: readonly List[]): readonly LayerItems[] | null {
  const layered = lists.some(({ items }) => items.length > 1 || items.some(({ layer }) => layer !== null));
  const complete = ({ figure }: Item) =>
    figure.total !== null || (figure.kind === 'count' && figure.exposure !== null);
  if (lists.length < 2 || !layered || !lists.every(({ items }) => items.every(complete))) return null;
  return lists.map(({ items, span }) => ({ ...withoutLayer(items), coverages: null, span }));
}

/** `under 40: no helmet 12 of 32 cases, 30% of riders`: the coverage stands in a part of its own. */
function layersOfShares(lists: readonly List[]): readonly LayerItems[] | null {
  if (lists.length < 4 || lists.length % 2 === 1) return null;
  const pairs = lists.flatMap((list, at) => (at % 2 === 0 ? [[list, lists[at + 1]] as const] : []));
  const layers = pairs.map(([cases, coverage]): LayerItems | null => {
    const [item, second] = cases.items;
    const [share, other] = coverage?.items ?? [];
    if (item === undefined || second !== undefined || share === undefined || other !== undefined) return null;
    if (item.figure.total === null || share.figure.kind !== 'share' || share.name !== null) return null;
    const named = withoutLayer([item]);
    return named.name === null ? null : { ...named, coverages: [share], span: cases.span };
  });
  return layers.every((layer) => layer !== null) ? layers : null;
}

/** Takes the layer's name off the first item: `under 40: night: 3 of 900`, `under 40: night 3 of 900`, `under 40: 3 of 900`. */
export function withoutLayer(items: readonly Item[]): {
  readonly name: Words | null;
  readonly items: readonly Item[];
} {
  const [first, ...others] = items;
  if (first === undefined) return { name: null, items };
  if (first.layer !== null) return { name: first.layer, items: [{ ...first, layer: null }, ...others] };
  if (first.name === null || !first.colon) return { name: null, items };
  const alone = others.length > 0 && others.every(({ name }) => name === null);
  if (first.before === null && !alone) return { name: null, items };
  const { figure } = first;
  const own: Item = {
    ...first,
    name: first.before,
    before: null,
    colon: false,
    figure: figure.kind === 'count' && figure.noun === first.before ? { ...figure, noun: null } : figure,
  };
  return { name: first.name, items: [own, ...others] };
}

/**
 * One layer alone is no layers: its name says who is counted. `null` where the part has no layer's name of its own, as in
 * `night: incidents 18 of 1,204`.
 */
export function loneLayer(
  items: readonly Item[],
): { readonly name: Words; readonly items: readonly Item[] } | null {
  const [first, second] = items;
  if (first?.layer == null && (first?.before == null || second === undefined || second.colon)) return null;
  const { name, items: own } = withoutLayer(items);
  return name === null ? null : { name, items: own };
}

/** Settles the layers one by one; all must have the same groups and be of one kind. */
export function settleStrata(
  layers: readonly LayerItems[],
  by: string | null,
  setting: Setting,
): Settled<Question> {
  const beyond = layers[setting.mostLayers];
  if (beyond !== undefined)
    return refused(diagnosis('too-many-layers', beyond.span, [String(setting.mostLayers)]));
  const questions: Layer[] = [];
  for (const layer of layers) {
    const question = settleLayer(inOrder(layer, questions[0]?.question ?? null), setting);
    if (!question.ok) return question;
    questions.push({ label: layer.name?.text ?? null, question: question.value, span: layer.span });
  }
  const [first, ...others] = questions;
  if (first === undefined) throw new Error('layers were settled, but there is none');
  const twice = questions.find(({ label }, at) => {
    const key = label === null ? null : nameKey(label);
    return (
      key !== null &&
      questions.slice(0, at).some((other) => other.label !== null && nameKey(other.label) === key)
    );
  });
  if (twice !== undefined) return refused(diagnosis('same-layer-twice', twice.span, [twice.label ?? '']));
  const stated = questions.find(
    ({ question }) => question.kind === 'rates' && question.groups.some(({ asStated }) => asStated),
  );
  if (stated !== undefined) return refused(diagnosis('layers-as-stated', stated.span));
  const odd = others.find(({ question }) => !sameGroups(first.question, question));
  if (odd !== undefined)
    return refused(diagnosis('layers-differ', odd.span, [namesOf(first.question), namesOf(odd.question)]));
  return settled({
    kind: 'strata',
    by,
    layers: questions,
    groups: first.question.groups.map(({ label }) => ({ label })),
    reference: first.question.reference,
    clauses: setting.given.clauses,
    unit: first.question.unit,
    caseNoun: first.question.caseNoun,
    overTime: first.question.overTime,
    remarks: [...setting.remarks, ...questions.flatMap(({ question }) => question.remarks)],
  });
}

/** A layer with its groups in the order of the first layer's, where it names the same ones in another. */
function inOrder(layer: LayerItems, first: Layered | null): LayerItems {
  if (first === null) return layer;
  const keyOf = ({ name, after }: Item) => nameKey(name?.text ?? after?.text ?? '');
  const ordered = first.groups.map(({ label }) =>
    layer.items.find((item) => keyOf(item) === nameKey(label ?? '')),
  );
  const all = ordered.filter((item) => item !== undefined);
  return all.length === layer.items.length && new Set(all).size === all.length
    ? { ...layer, items: all }
    : layer;
}

function settleLayer(layer: LayerItems, setting: Setting): Settled<Layered> {
  const within = { ...setting, remarks: [] };
  if (layer.items.length < 2 && layer.coverages === null)
    return refused(diagnosis('layer-of-one', layer.span, [layer.name?.text ?? 'One layer']));
  if (layer.coverages !== null)
    return settleShares({ cases: layer.items, coverages: layer.coverages, headed: false }, within);
  return areRates(layer.items) ? settleRates(layer.items, within) : settleCounts(layer.items, within);
}

const sameGroups = (one: Layered, other: Layered) =>
  one.kind === other.kind &&
  one.unit === other.unit &&
  one.reference === other.reference &&
  one.groups.length === other.groups.length &&
  one.groups.every(({ label }, at) => {
    const second = other.groups[at]?.label ?? null;
    return label === null || second === null ? label === second : nameKey(label) === nameKey(second);
  });

const namesOf = ({ groups }: Layered) =>
  groups.map(({ label }, at) => label ?? (at === 0 ? 'the first group' : 'the second group')).join(' and ');
