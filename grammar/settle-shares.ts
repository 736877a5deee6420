import { diagnosis } from './diagnosis.ts';
import { nameKey } from './labels.ts';
import {
  countQuantity,
  countsThatFit,
  exactCount,
  refused,
  restOf,
  settled,
  shareQuantity,
} from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Question, Quantity, ReadingRemark, SharesGroup, Span } from './question.ts';
import type { Setting } from './setting.ts';
import { checkNames, referenceOf } from './settle-groups.ts';
import type { Item } from './tree.ts';

/** The cases (or shares of cases) and the coverages of a line. `headed`: with the words `cases:` or `coverage:`. */
export interface SharesParts {
  readonly cases: readonly Item[];
  readonly coverages: readonly Item[];
  readonly headed: boolean;
}

interface Row {
  readonly label: string | null;
  readonly cases: Quantity | null;
  readonly caseShare: Quantity | null;
  readonly span: Span;
}

interface Rows {
  readonly rows: readonly Row[];
  readonly total: Quantity | null;
  readonly caseNoun: string | null;
}

/** Shares: cases by group beside each group's share of the population, the implied group and its coverage filled in. */
export function settleShares(parts: SharesParts, setting: Setting): Settled<Question> {
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
  const labels = groups.map(({ label }) => label);
  const names = checkNames(parts.cases, labels.slice(0, parts.cases.length), setting);
  if (!names.ok) return names;
  const reference = referenceOf(labels, setting);
  if (!reference.ok) return reference;
  const { population } = setting.given.clauses;
  if (population !== null && rows.value.total !== null && rows.value.total.value > population.value) {
    return refused(diagnosis('population-too-small', population.span, [population.text]));
  }
  return settled({
    kind: 'shares',
    groups,
    reference: reference.value,
    totalCases: rows.value.total,
    clauses: setting.given.clauses,
    unit: coverages.value.unit,
    caseNoun: rows.value.caseNoun,
    remarks: [...setting.remarks, ...rows.remarks],
  });
}

/** One row a group: counts by group, `44 of 75` for one group, or shares of cases. */
function caseRows(items: readonly Item[], setting: Setting): Settled<Rows> {
  const [first] = items;
  if (first === undefined)
    return refused(
      diagnosis(
        'cases-by-group',
        { from: 0, to: setting.typed.length },
        [],
        ['cases: no helmet 44, helmet 31; coverage: no helmet 38%'],
      ),
    );
  if (items.every(({ figure }) => figure.kind === 'count' && figure.total === null))
    return bareRows(items, setting);
  if (items.every(({ figure }) => figure.total !== null)) return countedRows(items, setting);
  if (items.every(({ figure }) => figure.kind === 'share')) return shareRows(items, setting);
  return refused(diagnosis('mixed-figures', first.span));
}

function bareRows(items: readonly Item[], setting: Setting): Settled<Rows> {
  const rows: Row[] = [];
  const remarks: ReadingRemark[] = [];
  for (const item of items) {
    if (item.figure.kind !== 'count') throw new Error('a bare row is a count');
    const cases = countQuantity(item.figure.count, item.figure.countSpan, setting.typed);
    if (!cases.ok) return cases;
    remarks.push(...cases.remarks);
    rows.push({
      label: item.name?.text ?? item.after?.text ?? null,
      cases: cases.value,
      caseShare: null,
      span: item.span,
    });
  }
  const total = setting.given.ofCases?.quantity ?? null;
  const sum = rows.reduce((all, { cases }) => all + (cases?.value ?? 0), 0);
  const [only] = rows;
  if (only !== undefined && rows.length === 1) {
    if (total === null) return refused(diagnosis('cases-by-group', only.span));
    const rest = total.value - (only.cases?.value ?? 0);
    if (rest < 0)
      return refused(diagnosis('more-cases-than-people', only.span, [only.cases?.text ?? '', total.text]));
    rows.push({
      label: null,
      cases: exactCount(rest, rest.toLocaleString('en-US'), only.span),
      caseShare: null,
      span: only.span,
    });
  }
  const known = rows.every(({ cases }) => cases?.precision !== 'range');
  const span = { from: items[0]?.span.from ?? 0, to: items.at(-1)?.span.to ?? 0 };
  const all =
    rows.length > items.length && total !== null
      ? total
      : known
        ? exactCount(sum, sum.toLocaleString('en-US'), span)
        : null;
  if (sum === 0) return refused(diagnosis('total-zero', span, ['No cases']));
  return settled(
    { rows: rows.map((row) => withShare(row, all)), total: all, caseNoun: nounOf(items, setting) },
    remarks,
  );
}

function nounOf(items: readonly Item[], setting: Setting): string | null {
  const typed = setting.given.ofCases?.noun ?? null;
  return (
    typed ??
    items
      .map(({ after, name }) => (name === null ? null : (after?.text ?? null)))
      .find((after) => after !== null) ??
    null
  );
}

/** The group's share of all cases, which is what its count says. */
function withShare(row: Row, total: Quantity | null): Row {
  if (row.cases === null || total === null || total.value === 0) return row;
  const share = row.cases.value / total.value;
  return {
    ...row,
    caseShare: {
      text: `${row.cases.text}/${total.text}`,
      value: share,
      low: share,
      high: share,
      precision: 'exact',
      span: row.span,
    },
  };
}

/** `44 of 75` for one group, the rest implied; with a row for each group all totals have to be the same. */
function countedRows(items: readonly Item[], setting: Setting): Settled<Rows> {
  const rows: Row[] = [];
  const remarks: ReadingRemark[] = [];
  let total: Quantity | null = null;
  for (const item of items) {
    const { figure } = item;
    if (figure.total === null) throw new Error('a counted row has a total');
    const all = countQuantity(
      { written: figure.total.written, suppressed: false },
      figure.total.span,
      setting.typed,
    );
    if (!all.ok) return all;
    if (all.value.value === 0)
      return refused(
        diagnosis('total-zero', figure.total.span, [setting.typed.slice(item.span.from, item.span.to)]),
      );
    const cases =
      figure.kind === 'count'
        ? countQuantity(figure.count, figure.countSpan, setting.typed)
        : fromShare(figure.share, figure.shareSpan, all.value);
    if (!cases.ok) return cases;
    if (cases.value.value > all.value.value)
      return refused(diagnosis('more-cases-than-people', item.span, [cases.value.text, all.value.text]));
    total ??= all.value;
    remarks.push(...cases.remarks, ...all.remarks);
    rows.push({
      label: item.name?.text ?? labelAfter(item),
      cases: cases.value,
      caseShare: null,
      span: item.span,
    });
  }
  const [only] = rows;
  if (only !== undefined && rows.length === 1 && total !== null && only.cases !== null) {
    const { cases } = only;
    const rest: Quantity = {
      text: (total.value - cases.value).toLocaleString('en-US'),
      value: total.value - cases.value,
      low: total.value - cases.high,
      high: total.value - cases.low,
      precision: cases.precision,
      span: only.span,
    };
    rows.push({ label: null, cases: rest, caseShare: null, span: only.span });
  }
  const named = items.some(({ name }) => name !== null);
  const noun =
    items
      .map(
        ({ after, figure }) =>
          (named ? after?.text : figure.kind === 'count' ? figure.noun?.text : null) ?? null,
      )
      .find((text) => text !== null) ?? null;
  return settled({ rows: rows.map((row) => withShare(row, total)), total, caseNoun: noun }, remarks);
}

const labelAfter = ({ after }: Item) => after?.text ?? null;

function shareRows(items: readonly Item[], setting: Setting): Settled<Rows> {
  const total = setting.given.ofCases?.quantity ?? null;
  const rows: Row[] = [];
  const remarks: ReadingRemark[] = [];
  for (const item of items) {
    if (item.figure.kind !== 'share') throw new Error('a share row is a share');
    const { share, shareSpan } = item.figure;
    if (share.value > 1) return refused(diagnosis('share-above-one', shareSpan, [share.text]));
    const caseShare = shareQuantity(share, shareSpan);
    const counted = total === null ? null : fromShare(share, shareSpan, total);
    if (counted !== null && !counted.ok) return counted;
    remarks.push(...(counted?.remarks ?? []));
    rows.push({
      label: item.name?.text ?? labelAfter(item),
      cases: counted?.value ?? null,
      caseShare,
      span: item.span,
    });
  }
  const low = rows.reduce((sum, { caseShare }) => sum + (caseShare?.low ?? 0), 0);
  if (low > 1 + 1e-9) {
    const adds = rows.reduce((sum, { caseShare }) => sum + (caseShare?.value ?? 0), 0);
    return refused(
      diagnosis('shares-add-up', rows[0]?.span ?? { from: 0, to: 0 }, [
        `${Number((adds * 100).toFixed(6))}%`,
      ]),
    );
  }
  const [only] = rows;
  if (only?.caseShare != null && rows.length === 1) {
    const { cases } = only;
    const rest =
      cases === null || total === null
        ? null
        : {
            ...cases,
            text: (total.value - cases.value).toLocaleString('en-US'),
            value: total.value - cases.value,
            low: total.value - cases.high,
            high: total.value - cases.low,
          };
    rows.push({ label: null, cases: rest, caseShare: restOf([only.caseShare], only.span), span: only.span });
  }
  const nouns = items.map(({ figure }) => (figure.kind === 'share' ? (figure.noun?.text ?? null) : null));
  const noun = setting.given.ofCases?.noun ?? nouns.find((text) => text !== null) ?? null;
  const exact = rows.every(({ cases }) => cases?.precision === 'exact');
  return settled(
    { rows: exact ? rows.map((row) => withShare(row, total)) : rows, total, caseNoun: noun },
    remarks,
  );
}

function fromShare(
  share: {
    readonly text: string;
    readonly value: number;
    readonly low: number;
    readonly high: number;
    readonly precision: Quantity['precision'];
    readonly form: 'percentage' | 'frequency';
  },
  span: Span,
  total: Quantity,
): Settled<Quantity> {
  if (share.value > 1) return refused(diagnosis('share-above-one', span, [share.text]));
  const fit = countsThatFit(share, total.value);
  if (fit === null) return refused(diagnosis('no-count-fits', span, [share.text, total.text]));
  const remark = (readAs: string): ReadingRemark => ({
    id: 'count-from-percentage',
    text: `${share.text} of ${total.text}`,
    readAs,
    span,
  });
  const text = (count: number) => count.toLocaleString('en-US');
  if (fit.low === fit.high) return settled(exactCount(fit.low, text(fit.low), span), [remark(text(fit.low))]);
  return settled(
    {
      text: `${share.text} of ${total.text}`,
      value: (fit.low + fit.high) / 2,
      low: fit.low,
      high: fit.high,
      precision: 'range',
      span,
    },
    [remark(`${text(fit.low)} to ${text(fit.high)}`)],
  );
}

interface Coverages {
  readonly byRow: readonly (Quantity | null)[];
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
  const byRow: (Quantity | null)[] = rows.map(() => null);
  let otherLabel: string | null = null;
  for (const item of coverages) {
    const { figure } = item;
    if (figure.kind !== 'share' || figure.total !== null || figure.share.precision === 'range') {
      return refused(diagnosis('not-yet-coverage', item.span));
    }
    const { share, shareSpan } = figure;
    if (share.value > 1) return refused(diagnosis('share-above-one', shareSpan, [share.text]));
    if (share.value <= 0 || share.value >= 1)
      return refused(diagnosis('coverage-at-end', shareSpan, [share.text]));
    const label = item.name?.text ?? (headed ? (item.after?.text ?? null) : null);
    const index =
      label === null
        ? coverages.length === 1
          ? 0
          : coverages.indexOf(item)
        : rows.findIndex((row) => row.label !== null && nameKey(row.label) === nameKey(label));
    if (index !== -1 && index < rows.length) {
      byRow[index] = shareQuantity(share, shareSpan);
      continue;
    }
    const implied = rows.findIndex((row) => row.label === null);
    if (implied !== -1 && rows.length === 2 && label !== null) {
      byRow[implied] = shareQuantity(share, shareSpan);
      otherLabel = label;
      continue;
    }
    return refused(
      diagnosis('coverage-unknown-group', item.name?.span ?? item.span, [names.join(' and '), label ?? '']),
    );
  }
  const open = byRow.filter((coverage) => coverage === null).length;
  if (open > 1) return refused(diagnosis('coverage-of-several', first.span));
  const nouns = coverages.map(({ figure }) => (figure.kind === 'share' ? (figure.noun?.text ?? null) : null));
  return settled({ byRow, otherLabel, unit: nouns.find((noun) => noun !== null) ?? null });
}

function groupsOf({ rows, total }: Rows, { byRow, otherLabel }: Coverages): SharesGroup[] {
  const typed = byRow.filter((coverage) => coverage !== null);
  return rows.map((row, index) => {
    const given = byRow[index] ?? null;
    const share = row.caseShare ?? shareWithin(row, rows, total);
    return {
      label: row.label ?? otherLabel,
      cases: row.cases,
      caseShare: share,
      coverage: given ?? restOf(typed, row.span),
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
