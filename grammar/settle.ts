import { diagnosis, plainSuggestion } from './diagnosis.ts';
import { printCanonical } from './print-canonical.ts';
import { refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Question } from './question.ts';
import { settleAlarm } from './settle-alarm.ts';
import { settleBareCounts, settleCounts, settleStated } from './settle-groups.ts';
import { changeItems } from './settle-change.ts';
import { settleClauses } from './settle-clauses.ts';
import type { Setting } from './setting.ts';
import { areRates, settleRates } from './settle-rates.ts';
import { layersOf, loneLayer, settleStrata } from './settle-strata.ts';
import { settleShares } from './settle-shares.ts';
import type { SharesParts } from './settle-shares.ts';
import type { Item, ItemFigureShare, TreePart } from './tree.ts';
import { isUnknown } from './uncertain-shares.ts';

type List = Extract<TreePart, { kind: 'list' }>;

/** Decides which question a parsed line asks, and settles it: impossible figures are refused, never read as something else. */
export function settleLine(parts: readonly TreePart[], about: LineAbout): Settled<Question> {
  const { typed, mostGroups } = about;
  const lists = parts.filter((part): part is List => part.kind === 'list');
  const clauses = settleClauses(
    parts.filter((part) => part.kind === 'clause'),
    typed,
  );
  if (!clauses.ok) return clauses;
  const setting: Setting = { ...about, given: clauses.value };
  const items = lists.flatMap((list) => list.items);
  const [first] = items;
  if (first === undefined) return refused(diagnosis('clauses-only', { from: 0, to: typed.length }));
  const layers = layersOf(lists);
  if (layers !== null) return settleStrata(layers, about.by, setting);
  const beyond = items[mostGroups * 2];
  if (beyond !== undefined) return refused(diagnosis('too-many-groups', beyond.span, [String(mostGroups)]));
  return settleItems(lists, items, setting);
}

/** What is known of a line besides its parts. */
export interface LineAbout extends Omit<Setting, 'given'> {
  /** What its layers are layers of. */
  readonly by: string | null;
}

function settleItems(
  lists: readonly List[],
  typedItems: readonly Item[],
  setting: Setting,
): Settled<Question> {
  const alarm = lists.find(({ head }) => head === 'alarm');
  if (alarm !== undefined) return settleAlarm(typedItems, alarm.name, setting);
  const change = lists.find(({ head }) => head === 'change' || head === 'change-back');
  if (change !== undefined && lists.length > 1)
    return refused(diagnosis('change-of-two', change.span, [], ['from 412 to 530']));
  const changed = change === undefined ? settled(typedItems) : changeItems(change);
  if (!changed.ok) return changed;
  const [only] = lists;
  const lone = lists.length === 1 && only?.head === null ? loneLayer(changed.value) : null;
  if (lone !== null) return settleItems([], lone.items, amongLayer(setting, lone.name.text));
  const items = changed.value;
  const shares = sharesParts(lists, items, setting);
  if (shares !== null) return settleShares(shares, setting);
  if (areRates(items)) return settleRates(items, setting);
  const { ofCases } = setting.given;
  if (ofCases !== null) {
    const { span, text } = ofCases.quantity;
    return refused(diagnosis('clause-does-not-fit', span, [`of ${text} ${ofCases.noun ?? ''}`.trim()]));
  }
  const { trySpan } = setting.given;
  if (trySpan !== undefined) return refused(diagnosis('try-without-coverage', trySpan));
  const everyCount = items.every(({ figure }) => figure.kind === 'count');
  const everyShare = items.every(({ figure }) => figure.kind === 'share' && figure.total === null);
  if (everyShare) return stated(items, setting);
  const hasTotals = items.some(({ figure }) => figure.total !== null);
  if (everyCount && !hasTotals) return settleBareCounts(items, setting);
  return everyCount || items.every(({ figure }) => figure.total !== null)
    ? settleCounts(items, setting)
    : refused(mixture(items));
}

/** The name of a lone layer says who is counted, unless the line says so itself. */
function amongLayer(setting: Setting, name: string): Setting {
  const { given } = setting;
  return given.clauses.among !== null
    ? setting
    : { ...setting, given: { ...given, clauses: { ...given.clauses, among: name } } };
}

function mixture(items: readonly Item[]) {
  const odd = items.find(({ figure }) => figure.kind === 'share' && figure.total === null) ?? items[0];
  return diagnosis(
    'mixed-figures',
    odd?.span ?? { from: 0, to: 0 },
    [],
    ['night shift: 18 of 1,204 vs day shift: 9 of 2,377', '4.2% vs 2.6%'],
  );
}

/** The cases and the coverages of a line that has both, or `null`: then it is no question of shares. */
function sharesParts(lists: readonly List[], items: readonly Item[], setting: Setting): SharesParts | null {
  const casesHead = lists.filter(({ head }) => head === 'cases').flatMap((list) => list.items);
  const coverageHead = lists.filter(({ head }) => head === 'coverage').flatMap((list) => list.items);
  const rest = lists.filter(({ head }) => head === null).flatMap((list) => list.items);
  if (coverageHead.length > 0 || casesHead.length > 0) {
    return { cases: [...casesHead, ...rest], coverages: coverageHead, headed: true };
  }
  const unknown = items.filter(isUnknown);
  const paired = pairedShares(
    items.filter((item) => !isUnknown(item)),
    setting,
  );
  return paired === null ? null : { ...paired, cases: [...paired.cases, ...unknown] };
}

/** `no helmet: 44 of 75 injured, 38% of riders`, a line for each group or one line for one group. */
function pairedShares(items: readonly Item[], setting: Setting): SharesParts | null {
  const named = items.filter(({ name }) => name !== null);
  const isCoverage = ({ figure, name }: Item) =>
    figure.kind === 'share' && figure.noun !== null && name === null;
  const isCases = ({ figure }: Item) => figure.kind === 'share' && /^cases?$/i.test(figure.noun?.text ?? '');
  const coverages = items.filter((item) => isCoverage(item) && !isCases(item));
  const cases = items.filter((item) => !coverages.includes(item));
  const isCaseFigure = ({ figure }: Item) =>
    figure.total !== null || (figure.kind === 'share' && figure.noun !== null);
  if (coverages.length === 0 || cases.length !== coverages.length || !cases.every(isCaseFigure)) return null;
  const countFirst = cases.every(({ figure }) => figure.total !== null);
  const oneName = named.length === cases.length && (cases.length > 1 || named[0]?.colon === true);
  const hasCasesWord = cases.some(isCases);
  if (!countFirst && !oneName && !hasCasesWord && setting.given.ofCases === null) return null;
  const names = cases.map(({ name, after }) => name ?? after);
  return {
    cases,
    coverages: coverages.map((item, index) => ({ ...item, name: names[index] ?? null })),
    headed: false,
  };
}

/** P1: percentages of the same noun are two groups; of different nouns, they are never compared unasked. */
function stated(items: readonly Item[], setting: Setting): Settled<Question> {
  const figures = items.map(({ figure }) => figure as ItemFigureShare);
  const nouns = figures.map(({ noun }) => noun?.text ?? null);
  const lastWord = (text: string | null) => text?.split(' ').at(-1)?.toLowerCase().replace(/s$/, '') ?? null;
  const same = nouns.every((noun) => lastWord(noun) === lastWord(nouns[0] ?? null));
  if (same || items.length !== 2 || nouns.some((noun) => noun === null)) return settleStated(items, setting);
  return refused(twoReadings(items, figures, setting));
}

function twoReadings(items: readonly Item[], figures: readonly ItemFigureShare[], setting: Setting) {
  const [one, other] = figures;
  const [first, second] = items;
  if (one === undefined || other === undefined || first === undefined || second === undefined)
    throw new Error('two readings need two figures');
  const [ofOne, ofOther] = [one.noun?.text ?? '', other.noun?.text ?? ''];
  const name = first.name?.text ?? first.after?.text ?? 'this group';
  const asShares = settleShares(
    {
      cases: [{ ...first, name: { text: name, span: first.span }, after: null }],
      coverages: [{ ...second, name: { text: name, span: first.span }, after: null }],
      headed: false,
    },
    setting,
  );
  const asGroups = settleStated(
    [
      { ...first, name: { text: ofOne, span: first.span } },
      { ...second, name: { text: ofOther, span: second.span } },
    ],
    setting,
  );
  const offers = [
    ...(asShares.ok ? [{ line: printCanonical(asShares.value), label: 'That is what I mean' }] : []),
    ...(asGroups.ok ? [{ line: printCanonical(asGroups.value), label: 'No, two separate groups' }] : []),
  ];
  return diagnosis(
    'two-readings-shares',
    { from: first.span.from, to: second.span.to },
    [one.share.text, `the ${ofOne}`, other.share.text, `the ${ofOther}`].map((piece) =>
      piece.replace(/^the the /, 'the '),
    ),
    offers.length === 1 ? offers.map(({ line }) => plainSuggestion(line)) : offers,
  );
}
