import { grouped } from './numbers.ts';
import { diagnosis } from './diagnosis.ts';
import {
  countFromShare,
  countQuantity,
  exactCount,
  refused,
  restOf,
  settled,
  shareQuantity,
} from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Quantity, ReadingRemark, Span } from './question.ts';
import type { Setting } from './setting.ts';
import type { Item } from './tree.ts';

/** A group's cases, and its share of all cases where that was typed. */
export interface Row {
  readonly label: string | null;
  readonly cases: Quantity | null;
  readonly caseShare: Quantity | null;
  readonly span: Span;
}

export interface Rows {
  readonly rows: readonly Row[];
  readonly total: Quantity | null;
  readonly caseNoun: string | null;
}

/** One row a group: counts by group, `44 of 75` for one group, or shares of cases. */
export function caseRows(items: readonly Item[], setting: Setting): Settled<Rows> {
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
      cases: exactCount(rest, grouped(rest), only.span),
      caseShare: null,
      span: only.span,
    });
  }
  const known = rows.every(({ cases }) => cases?.precision !== 'range');
  const span = { from: items[0]?.span.from ?? 0, to: items.at(-1)?.span.to ?? 0 };
  const all =
    rows.length > items.length && total !== null ? total : known ? exactCount(sum, grouped(sum), span) : null;
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
        : countFromShare(figure.share, figure.shareSpan, all.value);
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
      text: grouped(total.value - cases.value),
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
    const counted = total === null ? null : countFromShare(share, shareSpan, total);
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
            text: grouped(total.value - cases.value),
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
