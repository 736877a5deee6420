import type { AlarmGiven, AlarmQuestion, AlarmShare, Quantity } from '../../grammar/question.ts';
import type { AlarmRates } from '../stats/predictive-values.ts';

/** An alarm's figures as the methods take them. */

/** Two counts behind sensitivity or specificity, and how to read from them who went right, of how many. */
export interface CountsBehind {
  readonly quantities: readonly [Quantity, Quantity];
  readonly rightOfAll: (first: number, second: number) => readonly [right: number, all: number];
}

/** The counts behind a share, or `null` where only the share was given. */
export function countsBehind(given: AlarmGiven): CountsBehind | null {
  switch (given.kind) {
    case 'share':
      return null;
    case 'counts':
      return {
        quantities: [given.part, given.whole],
        rightOfAll: given.turned ? (part, whole) => [whole - part, whole] : (part, whole) => [part, whole],
      };
    case 'cells':
      return {
        quantities: [given.right, given.wrong],
        rightOfAll: (right, wrong) => [right, right + wrong],
      };
  }
}

/** A share and what is left of 1, as functions of the quantities that were typed: neither is ever got by subtraction twice. */
export interface Side {
  readonly quantities: readonly Quantity[];
  readonly right: (values: readonly number[]) => number;
  readonly wrong: (values: readonly number[]) => number;
}

export function sideOf({ given }: AlarmShare): Side {
  const counts = countsBehind(given);
  if (counts !== null) {
    const of = ([first = NaN, second = NaN]: readonly number[]) => counts.rightOfAll(first, second);
    return {
      quantities: counts.quantities,
      right: (values) => of(values)[0] / of(values)[1],
      wrong: (values) => (of(values)[1] - of(values)[0]) / of(values)[1],
    };
  }
  if (given.kind !== 'share') throw new Error('cells and counts are counts');
  const own = ([share = NaN]: readonly number[]) => share;
  const rest = ([share = NaN]: readonly number[]) => 1 - share;
  return {
    quantities: [given.typed],
    right: given.turned ? rest : own,
    wrong: given.turned ? own : rest,
  };
}

/** The four cells of one sample: caught, missed, false alarms, quiet; `null` where the prevalence comes from elsewhere. */
export function oneSample({
  sensitivity,
  specificity,
  prevalence,
}: AlarmQuestion): readonly [Quantity, Quantity, Quantity, Quantity] | null {
  if (prevalence !== null || sensitivity.given.kind !== 'cells' || specificity.given.kind !== 'cells')
    return null;
  const [affected, unaffected] = [sensitivity.given, specificity.given];
  return [affected.right, affected.wrong, unaffected.wrong, unaffected.right];
}

/** What the three rates depend on, and the rates at values for it. */
export interface RatesFrom {
  readonly quantities: readonly Quantity[];
  readonly rates: (values: readonly number[]) => AlarmRates;
}

/** The rates as a function of everything that was typed. */
export function ratesFrom(question: AlarmQuestion): RatesFrom {
  const [affected, unaffected] = [sideOf(question.sensitivity), sideOf(question.specificity)];
  const first = affected.quantities.length;
  const both = [...affected.quantities, ...unaffected.quantities];
  const outside = question.prevalence?.share;
  return {
    quantities: outside === undefined ? both : [...both, outside],
    rates: (values) => {
      const [own, others] = [values.slice(0, first), values.slice(first, both.length)];
      return {
        sensitivity: affected.right(own),
        falseAlarmRate: unaffected.wrong(others),
        prevalence: outside === undefined ? sampleShare(own, others) : (values[both.length] ?? NaN),
      };
    },
  };
}

/** Real cases among all four cells. */
function sampleShare(own: readonly number[], others: readonly number[]): number {
  const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
  return sum(own) / (sum(own) + sum(others));
}

/** The rates at the values as given; of a range, at its middle. */
export function ratesOf(question: AlarmQuestion): AlarmRates {
  const { quantities, rates } = ratesFrom(question);
  return rates(quantities.map(({ value }) => value));
}
