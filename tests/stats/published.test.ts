import { describe, expect, it } from 'vitest';
import {
  attributableFraction,
  populationAttributableFraction,
  preventedFraction,
} from '../../src/stats/attributable-fraction.ts';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { chiSquaredUpperTail } from '../../src/stats/gamma-tail.ts';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { nMinusOneChiSquared } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { rateDifference } from '../../src/stats/rate-difference-interval.ts';
import { exactRateRatioInterval, rateRatio } from '../../src/stats/rate-ratio.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval, shareRatio } from '../../src/stats/share-ratio.ts';
import { fayFeuerInterval, standardisedRate } from '../../src/stats/standardised-rate.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';
import { fixture } from './error-of.ts';

/** How a figure was seen: in the source itself, quoted from it elsewhere, or not at all. */
interface Sourced {
  readonly id: string;
  readonly source: string;
  readonly seen: 'primary' | 'secondary' | 'memory';
  readonly note?: string;
}
type Printed = readonly (string | null)[];
type Values = readonly (number | null)[];

/** What each method makes of the numbers of a row and its level. */
const methods = {
  wilson: ([x, n], level) => limits(wilsonInterval(x, n, level)),
  clopperPearson: ([x, n], level) => limits(clopperPearsonInterval(x, n, level)),
  riskRatio: (input, level) => limits(riskRatioInterval(groupsOf(input), level)),
  riskDifference: (input, level) => limits(riskDifferenceInterval(groupsOf(input), level)),
  oddsRatio: (input, level) => limits(oddsRatioInterval(groupsOf(input), level)),
  conditionalOddsRatio: (input, level) => limits(conditionalOddsRatioInterval(groupsOf(input), level)),
  pearsonChiSquared: (input) => [pearson(input)],
  pearsonP: (input) => [chiSquaredUpperTail(pearson(input), 1)],
  garwood: ([events, exposure], level) => limits(garwoodInterval(events, exposure, level)),
  rateRatio: (input) => [rateRatio(ratesOf(input))],
  exactRateRatio: (input, level) => limits(exactRateRatioInterval(ratesOf(input), level)),
  rateDifference: (input) => [rateDifference(ratesOf(input))],
  attributableFraction: (input) => [attributableFraction(ratioOf(input))],
  exactAttributableFraction: (input, level) =>
    limits(exactRateRatioInterval(ratesOf(input), level)).map((limit) => attributableFraction(limit ?? NaN)),
  populationAttributableFraction: (input) => [
    populationAttributableFraction(ratioOf(input), input[1] / (input[1] + input[3])),
  ],
  preventedFraction: (input) => [preventedFraction(ratioOf(input))],
  hiddenCauseStrength: ([ratio]) => [hiddenCauseStrength(ratio)],
  hiddenCauseStrengthAtLimit: ([low, high]) => [hiddenCauseStrengthAtLimit({ low, high })],
} satisfies Record<string, (input: Four, level: number) => Values>;

/** A row has as many numbers as its method reads; the rest are NaN and would show. */
type Four = readonly [number, number, number, number];

const published = fixture<{
  readonly rows: readonly (Sourced & {
    readonly method: keyof typeof methods;
    readonly input: readonly number[];
    readonly level?: number;
    readonly printed: Printed;
  })[];
  readonly standardised: readonly (Sourced & {
    readonly layer: string;
    readonly per: number;
    readonly cases: readonly number[];
    readonly exposures: readonly number[];
    readonly weights: readonly number[];
    readonly printed: Printed;
  })[];
  readonly screening: readonly (Sourced & {
    readonly vaccinated: number;
    readonly cases: number;
    readonly effectiveness: string;
    readonly printed: readonly [string, string];
  })[];
  readonly curves: readonly (Sourced & {
    readonly coverage: number;
    readonly effectiveness: number;
    readonly share: string;
  })[];
  readonly mortalityRatios: readonly (Sourced & {
    readonly deaths: number;
    readonly smr: string;
    readonly printed: readonly [string, string];
  })[];
}>('published.json');

function limits({ low, high }: Interval): Values {
  return [low, high];
}

function groupsOf([cases, total, referenceCases, referenceTotal]: Four) {
  return { cases, total, referenceCases, referenceTotal };
}

function ratesOf([cases, exposure, referenceCases, referenceExposure]: Four) {
  return { cases, exposure, referenceCases, referenceExposure };
}

function ratioOf([cases, total, referenceCases, referenceTotal]: Four): number {
  return cases / total / (referenceCases / referenceTotal);
}

/** Pearson's chi-squared is the (N-1) chi-squared with N in the place of N - 1. */
function pearson(input: Four): number {
  const all = input[1] + input[3];
  return (nMinusOneChiSquared(groupsOf(input)) * all) / (all - 1);
}

/** Half a unit in the last printed place. */
const halfUnit = (printed: string) => 0.5 * 10 ** -(printed.split('.')[1]?.length ?? 0);

/** Right to the digits printed, and a hair more for figures that end in a 5. */
function asPrinted(values: Values, printed: Printed): void {
  expect(values.length).toBe(printed.length);
  values.forEach((value, at) => {
    const figure = printed[at] ?? null;
    if (value === null || figure === null) return expect(value).toBe(figure);
    expect(Math.abs(value - Number(figure)), `${value} for ${figure}`).toBeLessThanOrEqual(
      halfUnit(figure) * 1.0000002,
    );
  });
}

/** Right where an input was itself rounded in print: within what its two ends give, and half a unit of the figure's own. */
function betweenEnds(printed: string, values: readonly number[]): void {
  expect(Number(printed)).toBeGreaterThanOrEqual(Math.min(...values) - halfUnit(printed));
  expect(Number(printed)).toBeLessThanOrEqual(Math.max(...values) + halfUnit(printed));
}

const ends = (printed: string) => [Number(printed) - halfUnit(printed), Number(printed) + halfUnit(printed)];

/** The source as a title names it. */
const named = <T extends Sourced>(rows: readonly T[]) =>
  rows.map((row) => ({
    ...row,
    named: `${row.source}, ${{ primary: 'seen', secondary: 'seen quoted', memory: 'from memory' }[row.seen]}${row.note === undefined ? '' : `; ${row.note}`}`,
  }));

describe('printed figures come out to the digits printed', () => {
  it.each(named(published.rows))(
    '$method of $input: $printed ($named)',
    ({ method, input, level, printed }) => {
      const [a = NaN, b = NaN, c = NaN, d = NaN] = input;
      asPrinted(methods[method]([a, b, c, d], level ?? 0.95), printed);
    },
  );

  it.each(named(published.standardised))(
    'standardised rate, $layer, per $per: $printed ($named)',
    ({ per, cases, exposures, weights, printed }) => {
      const layers = cases.map((count, at) => ({
        cases: count,
        exposure: exposures[at] ?? NaN,
        weight: weights[at] ?? NaN,
      }));
      const { low, high } = fayFeuerInterval(layers, 0.95);
      const values = [standardisedRate(layers), low ?? NaN, high ?? NaN].map((value) => value * per);
      asPrinted(values.slice(0, printed.length), printed);
    },
  );
});

describe('the screening method against print', () => {
  // Coverage is not printed; it follows from the printed effectiveness, which was rounded.
  it.each(named(published.screening))(
    '$vaccinated of $cases cases vaccinated: effectiveness $effectiveness% ($printed) ($named)',
    ({ vaccinated, cases, effectiveness, printed: [low, high] }) => {
      const counts = { cases: vaccinated, referenceCases: cases - vaccinated };
      const intervals = ends(effectiveness).map((percent) => {
        const odds = vaccinated / (cases - vaccinated) / (1 - percent / 100);
        const coverage = odds / (1 + odds);
        return exactShareRatioInterval({ ...counts, coverage, referenceCoverage: 1 - coverage }, 0.95);
      });
      const percentOf = (limit: number | null) => 100 * (1 - (limit ?? NaN));
      betweenEnds(
        low,
        intervals.map((interval) => percentOf(interval.high)),
      );
      betweenEnds(
        high,
        intervals.map((interval) => percentOf(interval.low)),
      );
    },
  );

  it.each(named(published.curves))(
    'coverage $coverage and effectiveness $effectiveness: $share of the cases are vaccinated ($named)',
    ({ coverage, effectiveness, share }) => {
      const [least, most] = ends(share).map((cases) =>
        shareRatio({ cases, referenceCases: 1 - cases, coverage, referenceCoverage: 1 - coverage }),
      );
      expect(1 - effectiveness).toBeGreaterThanOrEqual(least ?? NaN);
      expect(1 - effectiveness).toBeLessThanOrEqual(most ?? NaN);
    },
  );
});

describe('standardised mortality ratios against print', () => {
  // Expected deaths are not printed; they follow from the printed ratio, which was rounded.
  it.each(named(published.mortalityRatios))(
    '$deaths deaths, ratio $smr: $printed ($named)',
    ({ deaths, smr, printed: [low, high] }) => {
      const intervals = ends(smr).map((ratio) => garwoodInterval(deaths, deaths / ratio, 0.95));
      betweenEnds(
        low,
        intervals.map((interval) => interval.low ?? NaN),
      );
      betweenEnds(
        high,
        intervals.map((interval) => interval.high ?? NaN),
      );
    },
  );
});
