import { caseRows } from './case-rows.ts';
import type { Row, Rows } from './case-rows.ts';
import { diagnosis } from './diagnosis.ts';
import { nameKey } from './labels.ts';
import { refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Quantity, SharesGroup, SharesQuestion } from './question.ts';
import type { Setting } from './setting.ts';
import { completeEachOther, heldCoverage, restOfHeld } from './settle-coverage.ts';
import type { HeldCoverage } from './settle-coverage.ts';
import { checkNames, referenceOf } from './naming.ts';
import type { Item } from './tree.ts';
import { apartUnknown, checkForms } from './uncertain-shares.ts';

/** The cases (or shares of cases) and the coverages of a line. `headed`: with the words `cases:` or `coverage:`. */
export interface SharesParts {
  readonly cases: readonly Item[];
  readonly coverages: readonly Item[];
  readonly headed: boolean;
}

/** Shares: cases by group beside each group's share of the population, the implied group and its coverage filled in. */
export function settleShares(typed: SharesParts, setting: Setting): Settled<SharesQuestion> {
  const apart = apartUnknown(typed, setting);
  if (!apart.ok) return apart;
  const { parts, unknown } = apart.value;
  const rows = caseRows(parts.cases, setting);
  if (!rows.ok) return rows;
  const coverages = coverageRows(parts, rows.value.rows, setting);
  if (!coverages.ok) return coverages;
  const groups = groupsOf(rows.value, coverages.value);
  const sum = groups.reduce((total, { coverage }) => total + coverage.low, 0);
  const [firstCoverage] = parts.coverages;
  if (sum > 1 + 1e-9) {
    const adds = groups.reduce((total, { coverage }) => total + coverage.value, 0);
    return refused(
      diagnosis('coverage-adds-up', firstCoverage?.span ?? { from: 0, to: 0 }, [
        `${Number((adds * 100).toFixed(6))}%`,
      ]),
    );
  }
  if (groups.some(({ coverage, known }) => coverage.value <= 0 && known.kind !== 'sample')) {
    return refused(diagnosis('coverage-at-end', firstCoverage?.span ?? { from: 0, to: 0 }, ['100%']));
  }
  const labels = groups.map(({ label }) => label);
  const names = checkNames(parts.cases, labels.slice(0, parts.cases.length), setting);
  if (!names.ok) return names;
  const reference = referenceOf(labels, setting);
  if (!reference.ok) return reference;
  const forms = checkForms(groups, unknown, setting);
  if (!forms.ok) return forms;
  const { population } = setting.given.clauses;
  const short = groups.some(
    ({ cases, coverage }) =>
      population !== null && cases !== null && cases.high > coverage.low * population.low,
  );
  if (population !== null && short) {
    return refused(diagnosis('population-too-small', population.span, [population.text]));
  }
  const effect = setting.given.clauses.designEffect;
  if (
    population !== null &&
    effect !== null &&
    groups.some(({ coverage }) => coverage.low * population.low < effect.value)
  )
    return refused(diagnosis('design-effect-too-large', population.span, [effect.text, population.text]));
  return settled({
    kind: 'shares',
    groups,
    reference: reference.value,
    totalCases: rows.value.total,
    unknownCases: unknown,
    clauses: setting.given.clauses,
    unit: coverages.value.unit,
    // "cases" is what they are called where nobody says.
    caseNoun: /^cases?$/i.test(rows.value.caseNoun ?? '') ? null : rows.value.caseNoun,
    overTime: false,
    remarks: [...setting.remarks, ...rows.remarks],
  });
}

interface Coverages {
  readonly byRow: readonly (HeldCoverage | null)[];
  /** Groups that have coverage but no cases were refused; this is the name of the implied other group, where one was typed. */
  readonly otherLabel: string | null;
  readonly unit: string | null;
}

/** Coverage of each row; `null` where it is what remains. */
function coverageRows(
  { coverages, headed, cases }: SharesParts,
  rows: readonly Row[],
  setting: Setting,
): Settled<Coverages> {
  const [first] = coverages;
  const names = rows.map(({ label }) => label).filter((label) => label !== null);
  if (first === undefined) {
    const name = names[0] ?? 'the first group';
    const at = cases.at(-1)?.span ?? { from: 0, to: setting.typed.length };
    return refused(
      diagnosis('coverage-missing', at, [name], [`${setting.typed.trim()}; coverage: ${name} ...%`]),
    );
  }
  const byRow: (HeldCoverage | null)[] = rows.map(() => null);
  let otherLabel: string | null = null;
  for (const item of coverages) {
    const held = heldCoverage(item, setting);
    if (!held.ok) return held;
    const label = coverageLabel(item, headed, rows);
    const index =
      label === null
        ? coverages.length === 1
          ? 0
          : coverages.indexOf(item)
        : rows.findIndex((row) => row.label !== null && nameKey(row.label) === nameKey(label));
    if (index !== -1 && index < rows.length) {
      byRow[index] = held.value;
      continue;
    }
    const implied = rows.findIndex((row) => row.label === null);
    if (implied !== -1 && rows.length === 2 && label !== null) {
      byRow[implied] = held.value;
      otherLabel = label;
      continue;
    }
    return refused(
      diagnosis('coverage-unknown-group', item.name?.span ?? item.span, [names.join(' and '), label ?? '']),
    );
  }
  const [one, second] = byRow.filter((held) => held !== null);
  if (one !== undefined && second !== undefined && byRow.length === 2) {
    if (!completeEachOther(one, second)) return refused(diagnosis('coverage-two-forms', first.span));
    // What the second says follows from the first.
    if (one.known.kind !== 'given') byRow[1] = null;
  }
  const open = byRow.filter((coverage) => coverage === null).length;
  if (open > 1) return refused(diagnosis('coverage-of-several', first.span));
  const nouns = coverages.map((item) => {
    const { figure, after } = item;
    if (figure.kind === 'share' && figure.total === null) return figure.noun?.text ?? null;
    // "310 of 500 riders": what the words behind a sample name, unless they name the group.
    return coverageLabel(item, headed, rows) === after?.text ? null : (after?.text ?? null);
  });
  return settled({ byRow, otherLabel, unit: nouns.find((noun) => noun !== null) ?? null });
}

/** Whose coverage an item is: the words in front of it, or behind it; behind a sample only where they name a group. */
function coverageLabel({ name, after, figure }: Item, headed: boolean, rows: readonly Row[]): string | null {
  if (name !== null) return name.text;
  if (!headed || after === null) return null;
  const isGroup = rows.some(({ label }) => label !== null && nameKey(label) === nameKey(after.text));
  return figure.total === null || isGroup ? after.text : null;
}

function groupsOf({ rows, total }: Rows, { byRow, otherLabel }: Coverages): SharesGroup[] {
  const typed = byRow.filter((coverage) => coverage !== null);
  return rows.map((row, index) => {
    const given = byRow[index] ?? null;
    const { coverage, known } = given ?? restOfHeld(typed, row.span);
    const share = row.caseShare ?? shareWithin(row, rows, total);
    return {
      label: row.label ?? otherLabel,
      cases: row.cases,
      caseShare: share,
      coverage,
      known,
      coverageImplied: given === null,
      span: row.span,
    };
  });
}

/** A share of cases from counts one of which is only known to a range. */
function shareWithin(row: Row, rows: readonly Row[], total: Quantity | null): Quantity {
  const sum = (pick: (quantity: Quantity) => number) =>
    rows.reduce((all, { cases }) => all + (cases === null ? 0 : pick(cases)), 0);
  const own = row.cases;
  if (own === null) throw new Error('a row has neither cases nor a share');
  const low = own.low / (own.low + sum(({ high }) => high) - own.high);
  const high = own.high / (own.high + sum(({ low: least }) => least) - own.low);
  return {
    text: `${own.text}/${total?.text ?? '...'}`,
    value: own.value / sum(({ value }) => value),
    low,
    high,
    precision: 'range',
    span: row.span,
  };
}
