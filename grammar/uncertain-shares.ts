import { diagnosis } from './diagnosis.ts';
import { nameKey } from './labels.ts';
import { grouped } from './numbers.ts';
import { countQuantity, refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Quantity, SharesGroup } from './question.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';

/** Names that a list of cases keeps for those whose group nobody knows. */
const unknownName =
  /^(?:\?|unknown|unknowns|not known|not recorded|unrecorded|not stated|unspecified|unknown group|group unknown|status unknown|unknown status)$/i;

/** Whether an item is the cases of unknown group: a bare count with such a name. */
export function isUnknown({ name, after, figure }: Item): boolean {
  const label = name?.text ?? after?.text ?? '';
  return figure.kind === 'count' && figure.total === null && unknownName.test(label.trim());
}

interface Parts {
  readonly cases: readonly Item[];
  readonly coverages: readonly Item[];
}

/** Takes the cases of unknown group out of the list of cases, unless they have a coverage and so are a group like any other. */
export function apartUnknown<T extends Parts>(
  parts: T,
  setting: Setting,
): Settled<{ readonly parts: T; readonly unknown: Quantity | null }> {
  const covered = new Set(parts.coverages.map(({ name, after }) => nameKey(name?.text ?? after?.text ?? '')));
  const apart = parts.cases.filter(
    (item) => isUnknown(item) && !covered.has(nameKey(item.name?.text ?? item.after?.text ?? '')),
  );
  const [item, second] = apart;
  const odd = parts.cases.find(
    ({ name, figure }) =>
      name !== null &&
      unknownName.test(name.text) &&
      !covered.has(nameKey(name.text)) &&
      (figure.kind !== 'count' || figure.total !== null),
  );
  if (odd !== undefined) return refused(diagnosis('unknown-not-counted', odd.span));
  if (item === undefined) return settled({ parts, unknown: null });
  const label = item.name?.text ?? item.after?.text ?? '';
  if (second !== undefined) return refused(diagnosis('same-name-twice', second.span, [label]));
  // "44 of 87, unknown 12": the 87 may hold the 12 or not.
  const totalled = parts.cases.some(({ figure }) => figure.total !== null || figure.kind === 'share');
  if (totalled || item.figure.kind !== 'count') return refused(diagnosis('unknown-not-counted', item.span));
  const cases = countQuantity(item.figure.count, item.figure.countSpan, setting.typed);
  if (!cases.ok) return cases;
  if (cases.value.precision === 'range') return refused(diagnosis('unknown-not-counted', item.span));
  const rest = { ...parts, cases: parts.cases.filter((each) => !apart.includes(each)) };
  // None of unknown group is as good as not mentioning them.
  const unknown = cases.value.value === 0 ? null : cases.value;
  return settled({ parts: rest, unknown }, cases.remarks);
}

/** What coverage that is not one number, and cases of unknown group, do not go together with. */
export function checkForms(
  groups: readonly SharesGroup[],
  unknown: Quantity | null,
  setting: Setting,
): Settled<null> {
  const form = groups.find(({ known, coverageImplied }) => known.kind !== 'given' && !coverageImplied);
  const { trySpan } = setting.given;
  if (trySpan !== undefined && groups.length !== 2)
    return refused(diagnosis('coverage-form-of-several', trySpan));
  if (form === undefined && unknown === null && trySpan === undefined) return settled(null);
  const place = form?.coverage.span ?? unknown?.span ?? { from: 0, to: 0 };
  if (groups.length !== 2)
    return refused(diagnosis(form === undefined ? 'unknown-not-counted' : 'coverage-form-of-several', place));
  const { population } = setting.given.clauses;
  if (population !== null) {
    const { from, to } = population.span;
    const without = `${setting.typed.slice(0, from).replace(/[;|\s]+$/, '')}${setting.typed.slice(to)}`;
    return refused(diagnosis('population-and-form', population.span, [population.text], [without.trim()]));
  }
  if (setting.given.clauses.designEffect !== null) return refused(diagnosis('design-effect-and-form', place));
  const kind = form?.known.kind;
  if (setting.given.clauses.exact && (kind === 'interval' || kind === 'growth' || kind === 'periods')) {
    const without = setting.typed.replace(/[;|\s]*\bexact(?=\s*(?:[;|\n]|$))/i, '');
    return refused(diagnosis('exact-and-form', place, [], [without.trim()]));
  }
  const counted = groups.map(({ cases }) => cases).filter((cases) => cases !== null);
  if (unknown !== null && counted.length < groups.length)
    return refused(diagnosis('unknown-not-counted', unknown.span));
  if (form?.known.kind !== 'periods') return settled(null);
  if (unknown !== null || counted.length < 2 || counted.some(({ precision }) => precision !== 'exact'))
    return refused(diagnosis('periods-need-counts', place));
  const byPeriod = form.known.periods.reduce((sum, { allCases }) => sum + allCases, 0);
  const byGroup = counted.reduce((sum, { value }) => sum + value, 0);
  if (byPeriod !== byGroup)
    return refused(diagnosis('periods-do-not-add-up', place, [grouped(byPeriod), grouped(byGroup)]));
  return settled(null);
}
