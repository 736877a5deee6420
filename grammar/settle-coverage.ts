import { plainShare } from './coverage-forms.ts';
import { diagnosis } from './diagnosis.ts';
import { grouped } from './numbers.ts';
import type { WrittenNumber } from './numbers.ts';
import { countFromShare, countQuantity, refused, restOf, settled, shareQuantity } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { CoverageKnown, Quantity, Span, TypedShare } from './question.ts';
import type { Setting } from './setting.ts';
import type { ShareValue } from './tags.ts';
import type { Item } from './tree.ts';
import type { WrittenCoverage } from './written-coverage.ts';

/** A coverage and how it is known. */
export interface HeldCoverage {
  readonly coverage: Quantity;
  readonly known: CoverageKnown;
}

type Written<Kind extends WrittenCoverage['kind']> = Extract<WrittenCoverage, { kind: Kind }>;

/** The coverage that an item gives, one number or not; what cannot be is refused with its place. */
export function heldCoverage({ figure, stated, span }: Item, setting: Setting): Settled<HeldCoverage> {
  if (figure.total !== null) {
    const total = countQuantity(
      { written: figure.total.written, suppressed: false },
      figure.total.span,
      setting.typed,
    );
    if (!total.ok) return total;
    if (total.value.value === 0)
      return refused(diagnosis('total-zero', figure.total.span, ['A sample of 0']));
    if (figure.kind === 'share' && figure.share.coverage !== undefined)
      return refused(diagnosis('mixed-figures', span));
    const counted =
      figure.kind === 'count'
        ? countQuantity(figure.count, figure.countSpan, setting.typed)
        : countFromShare(figure.share, figure.shareSpan, total.value);
    if (!counted.ok) return counted;
    const place = figure.kind === 'count' ? figure.countSpan : figure.shareSpan;
    const at = { from: place.from, to: figure.total.span.to };
    if (figure.kind === 'share' && counted.value.precision !== 'exact') {
      const line = `${setting.typed.slice(0, at.from)}${grouped(Math.round(counted.value.value))} of ${total.value.text}`;
      return refused(diagnosis('sample-as-count', at, [figure.share.text, total.value.text], [line]));
    }
    return sample(counted.value, total.value, stated?.share ?? null, at);
  }
  if (figure.kind !== 'share') return refused(diagnosis('coverage-no-share', span));
  const { share, shareSpan } = figure;
  const { coverage } = share;
  if (coverage === undefined)
    return share.precision === 'range'
      ? range({ low: plainEnd(share.low), high: plainEnd(share.high) }, share, shareSpan, setting)
      : given(share, shareSpan);
  switch (coverage.kind) {
    case 'range':
      return range({ low: end(coverage.low), high: end(coverage.high) }, share, shareSpan, setting);
    case 'interval':
      return interval(coverage, share, shareSpan);
    case 'growth':
      return growth(coverage, share, shareSpan, setting);
    case 'periods':
      return periods(coverage, share, shareSpan);
  }
}

const end = (written: WrittenNumber): TypedShare => ({
  text: `${written.text}%`,
  value: plainShare(written),
});
const plainEnd = (value: number): TypedShare => ({ text: percentText(value), value });
const percentText = (share: number) => `${Number((share * 100).toFixed(10))}%`;

function given(share: ShareValue, span: Span): Settled<HeldCoverage> {
  if (share.value > 1) return refused(diagnosis('share-above-one', span, [share.text]));
  if (share.value <= 0 || share.value >= 1) return refused(diagnosis('coverage-at-end', span, [share.text]));
  return settled({ coverage: shareQuantity(share, span), known: { kind: 'given' } });
}

/** Somewhere between two ends, neither of which may leave nobody. */
function range(
  { low, high }: { readonly low: TypedShare; readonly high: TypedShare },
  share: ShareValue,
  span: Span,
  { typed }: Setting,
): Settled<HeldCoverage> {
  if (high.value > 1) return refused(diagnosis('share-above-one', span, [high.text]));
  if (low.value > 1) return refused(diagnosis('share-above-one', span, [low.text]));
  if (low.value >= high.value) {
    const turned = low.value === high.value ? low.text : `${high.text} to ${low.text}`;
    const line = `${typed.slice(0, span.from)}${turned}${typed.slice(span.to)}`;
    return refused(diagnosis('coverage-upside-down', span, [low.text, high.text], [line]));
  }
  if (low.value <= 0) return refused(diagnosis('range-at-end', span, [low.text]));
  if (high.value >= 1) return refused(diagnosis('range-at-end', span, [high.text]));
  const value = Number(((low.value + high.value) / 2).toPrecision(15));
  const coverage: Quantity = {
    text: share.text,
    value,
    low: low.value,
    high: high.value,
    precision: 'range',
    span,
  };
  return settled({ coverage, known: { kind: 'range', low, high } });
}

/** One number with an interval of its own, which has to hold it. */
function interval(
  { low, high, level }: Written<'interval'>,
  share: ShareValue,
  span: Span,
): Settled<HeldCoverage> {
  const [least, most] = [end(low), end(high)];
  const value = percentText(share.value);
  if (most.value > 1) return refused(diagnosis('share-above-one', span, [most.text]));
  if (share.value <= 0 || share.value >= 1) return refused(diagnosis('coverage-at-end', span, [value]));
  if (!(least.value < share.value && share.value < most.value))
    return refused(diagnosis('interval-without-value', span, [value, least.text, most.text]));
  const at = level === null ? null : end(level);
  if (at !== null && !(at.value >= 0.5 && at.value <= 0.9999))
    return refused(diagnosis('level-out-of-range', span, [at.text]));
  return settled({
    coverage: {
      text: share.text,
      value: share.value,
      low: share.value,
      high: share.value,
      precision: 'exact',
      span,
    },
    known: { kind: 'interval', low: least, high: most, level: at },
  });
}

/** Grew or fell while the cases were counted. One end may be 0% or 100%. */
function growth(
  { start, end: last }: Written<'growth'>,
  share: ShareValue,
  span: Span,
  { typed }: Setting,
): Settled<HeldCoverage> {
  const [from, to] = [end(start), end(last)];
  const over = [from, to].find(({ value }) => value > 1);
  if (over !== undefined) return refused(diagnosis('share-above-one', span, [over.text]));
  if (from.value === to.value) {
    const atEnd = from.value === 0 || from.value === 1;
    const line = `${typed.slice(0, span.from)}${from.text}${typed.slice(span.to)}`.trim();
    return refused(
      atEnd
        ? diagnosis('growth-at-one-end', span, [from.text])
        : diagnosis('growth-without-change', span, [from.text], [line]),
    );
  }
  return settled({
    coverage: {
      text: share.text,
      value: share.value,
      low: Math.min(from.value, to.value),
      high: Math.max(from.value, to.value),
      precision: 'range',
      span,
    },
    known: { kind: 'growth', start: from, end: to },
  });
}

/** Counted in a sample: nobody or everybody of it may belong to the group, since the other end still bounds the ratio. */
function sample(
  counted: Quantity,
  total: Quantity,
  beside: ShareValue | null,
  span: Span,
): Settled<HeldCoverage> {
  const text = `${counted.precision === 'exact' ? counted.text : grouped(counted.value)} of ${total.text}`;
  if (counted.precision !== 'exact' || total.precision !== 'exact')
    return refused(diagnosis('not-whole', span, [text]));
  if (counted.value > total.value)
    return refused(diagnosis('more-cases-than-people', span, [counted.text, total.text]));
  const value = counted.value / total.value;
  if (beside !== null && !(value >= beside.low - 1e-12 && value <= beside.high + 1e-12)) {
    const gives = `${Number((value * 100).toPrecision(3))}%`;
    return refused(diagnosis('sample-and-percentage', span, [text, gives, beside.text]));
  }
  return settled({
    coverage: { text, value, low: value, high: value, precision: 'exact', span },
    known: { kind: 'sample', inGroup: counted.value, sampled: total.value },
  });
}

/** Period by period, with all cases of each. */
function periods(
  { by, periods: typed }: Written<'periods'>,
  share: ShareValue,
  span: Span,
): Settled<HeldCoverage> {
  for (const { coverage, coverageAt, allCases, casesAt } of typed) {
    const held = end(coverage);
    if (held.value > 1) return refused(diagnosis('share-above-one', coverageAt, [held.text]));
    if (held.value <= 0 || held.value >= 1)
      return refused(diagnosis('period-at-end', coverageAt, [held.text]));
    if (allCases.commas === 'decimal' || !Number.isInteger(allCases.value) || allCases.precision !== 'exact')
      return refused(diagnosis('not-whole', casesAt, [allCases.text]));
    if (allCases.value > 1e15) return refused(diagnosis('too-large', casesAt, [allCases.text]));
  }
  const ends = typed.map(({ coverage }) => plainShare(coverage));
  return settled({
    coverage: {
      text: share.text,
      value: share.value,
      low: Math.min(...ends),
      high: Math.max(...ends),
      precision: 'range',
      span,
    },
    known: {
      kind: 'periods',
      by,
      periods: typed.map(({ label, coverage, allCases }) => ({
        label,
        coverage: end(coverage),
        allCases: allCases.value,
      })),
    },
  });
}

/** The other group's coverage: the mirror image of how the one is known. */
export function restOfHeld(typed: readonly HeldCoverage[], span: Span): HeldCoverage {
  const [only] = typed;
  const coverage = restOf(
    typed.map((held) => held.coverage),
    span,
  );
  if (only === undefined || typed.length > 1 || only.known.kind === 'given')
    return { coverage, known: { kind: 'given' } };
  const known = mirrored(only.known);
  return {
    coverage: { ...coverage, text: mirroredText(known, coverage.value), precision: only.coverage.precision },
    known,
  };
}

function mirroredText(known: CoverageKnown, value: number): string {
  switch (known.kind) {
    case 'given':
    case 'interval':
      return percentText(value);
    case 'range':
      return `${known.low.text.replace('%', '')}-${known.high.text}`;
    case 'sample':
      return `${grouped(known.inGroup)} of ${grouped(known.sampled)}`;
    case 'growth':
      return `from ${known.start.text} to ${known.end.text}`;
    case 'periods':
      return `by ${known.by}`;
  }
}

const restEnd = ({ text, value }: TypedShare): TypedShare => {
  const decimals = text.split('.')[1]?.replace(/\D/g, '').length ?? 0;
  const rest = Number((1 - value).toFixed(15));
  return { text: `${(rest * 100).toFixed(decimals)}%`, value: rest };
};

function mirrored(known: CoverageKnown): CoverageKnown {
  switch (known.kind) {
    case 'given':
      return known;
    case 'range':
      return { ...known, low: restEnd(known.high), high: restEnd(known.low) };
    case 'interval':
      return { ...known, low: restEnd(known.high), high: restEnd(known.low) };
    case 'sample':
      return { ...known, inGroup: known.sampled - known.inGroup };
    case 'growth':
      return { ...known, start: restEnd(known.start), end: restEnd(known.end) };
    case 'periods':
      return {
        ...known,
        periods: known.periods.map((period) => ({ ...period, coverage: restEnd(period.coverage) })),
      };
  }
}

/** Whether two typed coverages are each other's mirror image, so that one of them says everything. */
export function completeEachOther(one: HeldCoverage, other: HeldCoverage): boolean {
  const known = mirrored(one.known);
  if (known.kind !== other.known.kind) return false;
  const near = (a: number, b: number) => Math.abs(a - b) < 1e-9;
  switch (known.kind) {
    case 'given':
      return true;
    case 'sample':
      return (
        other.known.kind === 'sample' &&
        known.inGroup === other.known.inGroup &&
        known.sampled === other.known.sampled
      );
    case 'range':
    case 'interval':
      return (
        (other.known.kind === 'range' || other.known.kind === 'interval') &&
        near(one.coverage.value + other.coverage.value, 1) &&
        near(known.low.value, other.known.low.value) &&
        near(known.high.value, other.known.high.value)
      );
    case 'growth':
      return (
        other.known.kind === 'growth' &&
        near(known.start.value, other.known.start.value) &&
        near(known.end.value, other.known.end.value)
      );
    case 'periods':
      return false;
  }
}
