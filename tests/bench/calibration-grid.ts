import { binomialProbability } from '../../src/stats/binomial-tail.ts';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';

/** The level of every interval. */
export const level = 0.95;
/** People in either group, and numbers of cases where shares of them are read. */
export const sizes = [10, 15, 30, 60, 200] as const;
/** 37 risks: ten from 0.1% to 6.3% in fifths of a decade, 10% to 97.5% in steps of 3.5 points, and 99%. */
export const risks = [
  ...[0.001, 0.0016, 0.0025, 0.004, 0.0063, 0.01, 0.016, 0.025, 0.04, 0.063],
  ...Array.from({ length: 26 }, (_, at) => (100 + 35 * at) / 1000),
  0.99,
];
/** True ratios of the readings from shares of cases. */
export const ratios = [0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 20] as const;
/** Expected events of either group of a rate ratio: the risks times 200, from 0.2 to 198. */
export const expectedEvents = risks.map((risk) => 200 * risk);
/** Above it no count of events is looked at; all of them together have less than 1e-12. */
const mostEvents = 320;

/** An interval, or none where a method gives none: it then holds nothing. */
export type MaybeInterval = Interval | null;

/** How often the interval of a cell of the grid holds the truth. */
export interface Cell {
  readonly held: number;
  readonly where: string;
  /** The smallest of the expected counts of cases and of others. */
  readonly leastExpected: number;
}
export interface Calibration {
  readonly cells: number;
  readonly mean: number;
  readonly lowest: number;
  readonly where: string;
}

const percent = (share: number) => `${Number((100 * share).toPrecision(12))}%`;
const holds = (interval: MaybeInterval, truth: number) =>
  interval !== null && (interval.low ?? -Infinity) <= truth && truth <= (interval.high ?? Infinity);

/** Mean and lowest over the cells; of cells that are mirror images, equal but for roundings, the first is named. */
export function summary(cells: readonly Cell[]): Calibration {
  const [first] = cells;
  if (first === undefined) throw new Error('a grid without a cell');
  const least = cells.reduce((lowest, cell) => (cell.held < lowest.held - 1e-9 ? cell : lowest), first);
  return {
    cells: cells.length,
    mean: cells.reduce((sum, { held }) => sum + held, 0) / cells.length,
    lowest: least.held,
    where: least.where,
  };
}

/** The cells in which at least three cases and three others are expected in every group. */
export const wellFilled = (cells: readonly Cell[]) =>
  cells.filter(({ leastExpected }) => leastExpected >= 3 - 1e-9);

/** Every outcome of two groups of people, at every pair of sizes and of risks: 34,225 cells. */
export function twoGroupCells(
  interval: (groups: TwoGroups) => MaybeInterval,
  truth: (risk: number, referenceRisk: number) => number,
): readonly Cell[] {
  const weights = new Map(sizes.map((size) => [size, risks.map((risk) => binomialWeights(size, risk))]));
  return sizes.flatMap((total) =>
    sizes.flatMap((referenceTotal) => {
      const outcomes = tableOf(total + 1, referenceTotal + 1, (cases, referenceCases) =>
        interval({ cases, total, referenceCases, referenceTotal }),
      );
      return risks.flatMap((risk, at) =>
        risks.map((referenceRisk, referenceAt) => ({
          held: heldShare(
            outcomes,
            weights.get(total)?.[at] ?? [],
            weights.get(referenceTotal)?.[referenceAt] ?? [],
            truth(risk, referenceRisk),
          ),
          where: `${total} v ${referenceTotal} people, ${percent(risk)} v ${percent(referenceRisk)}`,
          leastExpected: Math.min(leastOf(total, risk), leastOf(referenceTotal, referenceRisk)),
        })),
      );
    }),
  );
}

/** Every outcome of one group: 185 cells. */
export function oneGroupCells(interval: (cases: number, total: number) => MaybeInterval): readonly Cell[] {
  return sizes.flatMap((total) => {
    const outcomes = Array.from({ length: total + 1 }, (_, cases) => interval(cases, total));
    return risks.map((risk) => ({
      held: heldOf(outcomes, binomialWeights(total, risk), risk),
      where: `${total} people, ${percent(risk)}`,
      leastExpected: leastOf(total, risk),
    }));
  });
}

/** Every way in which all cases can fall to two groups of known coverage, at every coverage and true ratio: 1,665 cells. */
export function shareCells(
  interval: (cases: number, referenceCases: number, coverage: number) => MaybeInterval,
): readonly Cell[] {
  return sizes.flatMap((all) =>
    risks.flatMap((coverage) => {
      const outcomes = Array.from({ length: all + 1 }, (_, cases) => interval(cases, all - cases, coverage));
      return ratios.map((ratio) => {
        const share = (coverage * ratio) / (1 - coverage + coverage * ratio);
        return {
          held: heldOf(outcomes, binomialWeights(all, share), ratio),
          where: `${all} cases, coverage ${percent(coverage)}, ratio ${ratio}`,
          leastExpected: leastOf(all, share),
        };
      });
    }),
  );
}

/** Every pair of Poisson counts over equal exposures, at every pair of expected events: 1,369 cells. */
export function rateCells(
  interval: (cases: number, referenceCases: number) => MaybeInterval,
): readonly Cell[] {
  const outcomes = tableOf(mostEvents + 1, mostEvents + 1, interval);
  const weights = expectedEvents.map(poissonWeights);
  return expectedEvents.flatMap((expected, at) =>
    expectedEvents.map((referenceExpected, referenceAt) => ({
      held: heldShare(outcomes, weights[at] ?? [], weights[referenceAt] ?? [], expected / referenceExpected),
      where: `${Number(expected.toPrecision(12))} v ${Number(referenceExpected.toPrecision(12))} events expected`,
      leastExpected: Math.min(expected, referenceExpected),
    })),
  );
}

const leastOf = (total: number, risk: number) => Math.min(total * risk, total * (1 - risk));

/** The limits of all outcomes of two counts, row by row; NaN, which holds nothing, where there is no interval. */
interface Outcomes {
  readonly columns: number;
  readonly low: Float64Array;
  readonly high: Float64Array;
}

function tableOf(
  rows: number,
  columns: number,
  interval: (first: number, second: number) => MaybeInterval,
): Outcomes {
  const found = { columns, low: new Float64Array(rows * columns), high: new Float64Array(rows * columns) };
  for (let at = 0; at < rows * columns; at += 1) {
    const each = interval(Math.floor(at / columns), at % columns);
    found.low[at] = each === null ? NaN : (each.low ?? -Infinity);
    found.high[at] = each === null ? NaN : (each.high ?? Infinity);
  }
  return found;
}

type Weights = readonly number[] | Float64Array;

function heldShare(
  { columns, low, high }: Outcomes,
  own: Weights,
  reference: Weights,
  truth: number,
): number {
  let held = 0;
  for (let row = 0, at = 0; row < own.length; row += 1) {
    let ofRow = 0;
    for (let column = 0; column < columns; column += 1, at += 1)
      if ((low[at] ?? NaN) <= truth && truth <= (high[at] ?? NaN)) ofRow += reference[column] ?? 0;
    held += ofRow * (own[row] ?? 0);
  }
  return held;
}

const heldOf = (outcomes: readonly MaybeInterval[], weights: Weights, truth: number) =>
  outcomes.reduce((sum, each, at) => sum + (holds(each, truth) ? (weights[at] ?? 0) : 0), 0);

const binomialWeights = (total: number, risk: number) =>
  Float64Array.from({ length: total + 1 }, (_, cases) => binomialProbability(cases, total, risk, 1 - risk));

function poissonWeights(expected: number): Weights {
  const weights = new Float64Array(mostEvents + 1);
  weights[0] = Math.exp(-expected);
  for (let count = 1; count <= mostEvents; count += 1)
    weights[count] = (weights[count - 1] ?? 0) * (expected / count);
  return weights;
}
