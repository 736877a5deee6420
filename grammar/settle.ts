import { diagnosis, plainSuggestion } from './diagnosis.ts';
import { printCanonical } from './print-canonical.ts';
import { refused } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Question, ReadingRemark } from './question.ts';
import { settleAlarm } from './settle-alarm.ts';
import { settleBareCounts, settleCounts, settleStated } from './settle-groups.ts';
import { settleClauses } from './settle-clauses.ts';
import type { Setting } from './setting.ts';
import { settleShares } from './settle-shares.ts';
import type { SharesParts } from './settle-shares.ts';
import type { Item, ItemFigureShare, TreePart } from './tree.ts';

type List = Extract<TreePart, { kind: 'list' }>;

/** Decides which question a parsed line asks, and settles it: impossible figures are refused, never read as something else. */
export function settleLine(
  parts: readonly TreePart[],
  typed: string,
  remarks: readonly ReadingRemark[],
  mostGroups: number,
): Settled<Question> {
  const lists = parts.filter((part): part is List => part.kind === 'list');
  const clauses = settleClauses(
    parts.filter((part) => part.kind === 'clause'),
    typed,
  );
  if (!clauses.ok) return clauses;
  const setting: Setting = { typed, given: clauses.value, remarks, mostGroups };
  const items = lists.flatMap((list) => list.items);
  const [first] = items;
  if (first === undefined) return refused(diagnosis('clauses-only', { from: 0, to: typed.length }));
  const beyond = items[mostGroups * 2];
  if (beyond !== undefined) return refused(diagnosis('too-many-groups', beyond.span, [String(mostGroups)]));
  return settleItems(lists, items, setting);
}

function settleItems(lists: readonly List[], items: readonly Item[], setting: Setting): Settled<Question> {
  const alarm = lists.find(({ head }) => head === 'alarm');
  if (alarm !== undefined) return settleAlarm(items, alarm.name, setting);
  const shares = sharesParts(lists, items, setting);
  if (shares !== null) return settleShares(shares, setting);
  const everyCount = items.every(({ figure }) => figure.kind === 'count');
  const everyShare = items.every(({ figure }) => figure.kind === 'share' && figure.total === null);
  if (everyShare) return stated(items, setting);
  const hasTotals = items.some(({ figure }) => figure.total !== null);
  if (everyCount && !hasTotals) return settleBareCounts(items, setting);
  return everyCount || items.every(({ figure }) => figure.total !== null)
    ? settleCounts(items, setting)
    : refused(mixture(items));
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
  return pairedShares(items, setting);
}

/** `no helmet: 44 of 75 injured, 38% of riders`, a line for each group or one line for one group. */
function pairedShares(items: readonly Item[], setting: Setting): SharesParts | null {
  const named = items.filter(({ name }) => name !== null);
  const isCoverage = ({ figure, name }: Item) =>
    figure.kind === 'share' && figure.noun !== null && name === null;
  const coverages = items.filter(isCoverage);
  const cases = items.filter((item) => !isCoverage(item));
  const isCaseFigure = ({ figure }: Item) =>
    figure.total !== null || (figure.kind === 'share' && figure.noun !== null);
  if (coverages.length === 0 || cases.length !== coverages.length || !cases.every(isCaseFigure)) return null;
  const countFirst = cases.every(({ figure }) => figure.total !== null);
  const oneName = named.length === cases.length && (cases.length > 1 || named[0]?.colon === true);
  const hasCasesWord = cases.some(
    ({ figure }) => figure.kind === 'share' && /^cases?$/i.test(figure.noun?.text ?? ''),
  );
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
