import { diagnosis } from './diagnosis.ts';
import { conversion, unitKey, unitWritten } from './exposures.ts';
import { group as groupDigits } from './numbers.ts';
import { areTimes } from './labels.ts';
import { countQuantity, refused, settled } from './quantities.ts';
import type { Settled } from './quantities.ts';
import type { Quantity, RatesGroup, RatesQuestion, ReadingRemark } from './question.ts';
import type { Setting } from './setting.ts';
import { checkNames, namingOf, referenceOf } from './naming.ts';
import type { Item, ItemExposure, ItemFigureCount } from './tree.ts';

/** Rates: every group has its events and what they were counted over, all in one unit. */
export function settleRates(items: readonly Item[], setting: Setting): Settled<RatesQuestion> {
  const whole = withUnits(items);
  const naming = namingOf(whole);
  const names = checkNames(whole, naming.labels, setting);
  if (!names.ok) return names;
  const units = unitOf(whole, setting);
  if (!units.ok) return units;
  const groups: RatesGroup[] = [];
  const remarks: ReadingRemark[] = [...setting.remarks];
  for (const [index, item] of whole.entries()) {
    const group = rateGroup(item, naming.labels[index] ?? null, setting);
    if (!group.ok) return group;
    groups.push(group.value);
    remarks.push(...group.remarks);
  }
  const reference = referenceOf(naming.labels, setting);
  if (!reference.ok) return reference;
  return settled({
    kind: 'rates',
    groups,
    reference: groups.length === 1 ? 0 : reference.value,
    clauses: setting.given.clauses,
    unit: units.value,
    caseNoun: naming.caseNoun,
    overTime: areTimes(naming.labels),
    remarks: remarks,
  });
}

/** Whether figures are rates: each over an exposure, or over a number whose unit another one names. */
export const areRates = (items: readonly Item[]) =>
  items.some(({ figure }) => figure.kind === 'count' && figure.exposure !== null) &&
  items.every(
    ({ figure }) =>
      figure.kind === 'count' &&
      (figure.exposure !== null || (figure.total !== null && figure.eachCountedOnce)),
  );

/** `14 in 5,200 bus days vs 9 in 8,800`: the unit of one carries over to those that name none. */
function withUnits(items: readonly Item[]): readonly Item[] {
  const given = items.map(exposureOf).find((exposure) => exposure?.unit != null) ?? null;
  return items.map((item) => {
    const { figure } = item;
    if (figure.kind !== 'count' || given === null) return item;
    const exposure: ItemExposure | null =
      figure.exposure ??
      (figure.total === null
        ? null
        : { written: figure.total.written, unit: given.unit, connector: 'in', span: figure.total.span });
    if (exposure === null) return item;
    return {
      ...item,
      figure: { ...figure, total: null, exposure: { ...exposure, unit: exposure.unit ?? given.unit } },
    };
  });
}

const exposureOf = ({ figure }: Item) => (figure.kind === 'count' ? figure.exposure : null);

/** The unit of all exposures, written out; different ones are refused, with the conversion where there is one. */
function unitOf(items: readonly Item[], setting: Setting): Settled<string | null> {
  const [first] = items;
  const own = first === undefined ? null : (exposureOf(first)?.unit ?? null);
  for (const item of items) {
    const exposure = exposureOf(item);
    if (exposure === null || own === null || exposure.unit === null) continue;
    if (unitKey(exposure.unit) === unitKey(own)) continue;
    const factor = conversion(exposure.unit, own);
    const turned =
      factor === null
        ? null
        : `${groupDigits(String(Number((exposure.written.value * factor).toPrecision(12))))} ${own}`;
    const { typed } = setting;
    return refused(
      diagnosis(
        'units-differ',
        exposure.span,
        [own, exposure.unit],
        turned === null
          ? []
          : [`${typed.slice(0, exposure.span.from)}${turned}${typed.slice(exposure.span.to)}`],
      ),
    );
  }
  return settled(own === null ? null : unitWritten(own));
}

function rateGroup(item: Item, label: string | null, setting: Setting): Settled<RatesGroup> {
  const { figure } = item;
  if (figure.kind !== 'count' || figure.exposure === null)
    throw new Error('a rate is a count over an exposure');
  const asStated = isStated(figure, figure.exposure);
  const cases = asStated
    ? settled(statedCount(figure))
    : countQuantity(figure.count, figure.countSpan, setting.typed);
  if (!cases.ok) return cases;
  const exposure = exposureQuantity(figure.exposure, setting.typed);
  if (!exposure.ok) return exposure;
  return settled(
    {
      label,
      cases: cases.value,
      exposure: exposure.value,
      asStated,
      connector: figure.exposure.connector,
      span: item.span,
    },
    [...cases.remarks],
  );
}

/** `3 per 1,000 bus-days`, `5 a week`: over a round base, so the two numbers are no counts. */
const isStated = ({ count }: ItemFigureCount, { connector, written }: ItemExposure) =>
  !count.suppressed &&
  connector === 'per' &&
  written.precision === 'exact' &&
  (written.value === 1 || Number.isInteger(Math.log10(written.value)));

/** The number above the line of a stated rate: it may have decimals and was rounded at the last of them. */
function statedCount({ count: { written }, countSpan }: ItemFigureCount): Quantity {
  const half = 0.5 * 10 ** -written.decimals;
  return {
    text: written.text,
    value: written.value,
    low: Math.max(0, written.value - half),
    high: written.value + half,
    precision: 'rounded',
    span: countSpan,
  };
}

function exposureQuantity({ written, span }: ItemExposure, typed: string): Settled<Quantity> {
  const spelled = typed.slice(span.from, span.to).trim();
  if (!(written.value > 0)) return refused(diagnosis('exposure-zero', span, [spelled]));
  if (written.commas === 'decimal' || /^\d{1,3}(?:\.\d{3})+$/.test(written.text))
    return refused(diagnosis('decimal-or-thousands', span, [spelled]));
  if (written.value > 1e15) return refused(diagnosis('too-large', span, [spelled]));
  return settled({
    text: written.text,
    value: written.value,
    low: written.low,
    high: written.high,
    precision: written.precision,
    span,
  });
}
