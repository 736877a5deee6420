import { describe, expect, it } from 'vitest';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import type { TwoGroups } from '../../src/stats/interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';
import { both, differenceError, errorOf, fixture as readFixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';

/** Values from direct inversion at 120 digits; see tests/fixtures/reference/make-score-limits.py, which records its versions. */
interface Fixture {
  readonly criticalValues: readonly { readonly level: string; readonly z: string }[];
  readonly tables: readonly ScoreRow[];
  /** Cases and totals that are not whole. */
  readonly inParts: readonly ScoreRow[];
  readonly single: readonly {
    readonly cases: number;
    readonly total: number;
    readonly level: string;
    readonly wilson: Pair;
    readonly clopperPearson: Pair;
  }[];
  readonly shares: readonly {
    readonly cases: readonly [number, number];
    readonly coverages: readonly [number, number];
    readonly level: string;
    readonly score: Pair;
    readonly exact: Pair;
  }[];
  readonly conditional: readonly {
    readonly table: readonly [number, number, number, number];
    readonly level: string;
    readonly limits: Pair;
  }[];
}
interface ScoreRow {
  readonly table: readonly [number, number, number, number];
  readonly level: string;
  readonly riskRatio: Pair;
  readonly oddsRatio: Pair;
  readonly riskDifference: Pair;
}
interface LargeSingle {
  readonly cases: number;
  readonly total: number;
  readonly level: string;
  readonly limits: Pair;
}
const fixture = readFixture<Fixture>('score-limits.json');

const groupsOf = ([cases, total, referenceCases, referenceTotal]: readonly [
  number,
  number,
  number,
  number,
]): TwoGroups => ({
  cases,
  total,
  referenceCases,
  referenceTotal,
});

/** The bar is 1e-9; what is promised and held is this. */
const measured = 1e-12;

describe('limits against 120-digit arithmetic (mpmath)', () => {
  it('cover at least 300 tables with every edge', () => {
    const tables = fixture.tables.map(({ table }) => table);
    expect(fixture.tables.length).toBeGreaterThanOrEqual(300);
    expect(tables.some(([x]) => x === 0)).toBe(true);
    expect(tables.some(([x, n]) => x === n)).toBe(true);
    expect(tables.some(([, n]) => n === 1)).toBe(true);
    expect(tables.some(([x]) => x === 1e9)).toBe(true);
    expect(new Set(fixture.tables.map(({ level }) => level))).toEqual(
      new Set(['0.5', '0.8', '0.9', '0.95', '0.99', '0.9999']),
    );
  });

  it('are right for the critical value', () => {
    const found = worst(fixture.criticalValues, ({ level, z }) => errorOf(criticalValue(Number(level)), z));
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-13);
  });

  describe.each([
    ['whole counts', fixture.tables],
    ['counts in parts, down to what a rounding leaves', fixture.inParts],
  ])('of %s', (_, tables) => {
    it('are right for the risk ratio', () => {
      const found = worst(tables, ({ table, level, riskRatio }) =>
        both(riskRatioInterval(groupsOf(table), Number(level)), riskRatio),
      );
      expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
    });

    it('are right for the odds ratio', () => {
      const found = worst(tables, ({ table, level, oddsRatio }) =>
        both(oddsRatioInterval(groupsOf(table), Number(level)), oddsRatio),
      );
      expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
    });

    it('are right for the risk difference, in units of the larger of the limit and the width', () => {
      const found = worst(tables, ({ table, level, riskDifference }) =>
        differenceError(riskDifferenceInterval(groupsOf(table), Number(level)), riskDifference),
      );
      expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
    });
  });

  it('are right for a single risk: Wilson', () => {
    const found = worst(fixture.single, ({ cases, total, level, wilson }) =>
      both(wilsonInterval(cases, total, Number(level)), wilson),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
  });

  it('are right for a single risk: Clopper-Pearson, to a total of 1e9', () => {
    const found = worst(fixture.single, ({ cases, total, level, clopperPearson }) =>
      both(clopperPearsonInterval(cases, total, Number(level)), clopperPearson),
    );
    expect(fixture.single.filter(({ total }) => total === 1e9).length).toBeGreaterThan(20);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
  });

  it('are right for the exact conditional odds ratio', () => {
    const found = worst(fixture.conditional, ({ table, level, limits }) =>
      both(conditionalOddsRatioInterval(groupsOf(table), Number(level)), limits),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
  });

  it('are right, and there at once, for exact limits of counts up to 1e15, whose tails have millions of terms', () => {
    const large = readFixture<Pick<Fixture, 'conditional'> & { readonly single: readonly LargeSingle[] }>(
      'large-exact-limits.json',
    );
    const single = worst(large.single, ({ cases, total, level, limits }) =>
      both(clopperPearsonInterval(cases, total, Number(level)), limits),
    );
    expect(single.error, JSON.stringify(single.row)).toBeLessThan(measured);
    const conditional = worst(large.conditional, ({ table, level, limits }) =>
      both(conditionalOddsRatioInterval(groupsOf(table), Number(level)), limits),
    );
    expect(conditional.error, JSON.stringify(conditional.row)).toBeLessThan(measured);
  });

  it.each([
    ['score', shareRatioInterval],
    ['exact', exactShareRatioInterval],
  ] as const)('are right for the ratio from shares and coverage: %s', (method, interval) => {
    const found = worst(fixture.shares, ({ cases, coverages, level, [method]: limits }) => {
      const [own, reference] = cases;
      const [coverage, referenceCoverage] = coverages;
      return both(
        interval({ cases: own, referenceCases: reference, coverage, referenceCoverage }, Number(level)),
        limits,
      );
    });
    expect(fixture.shares.length).toBeGreaterThan(60);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(measured);
  });
});

/** From the statistics review (40- to 60-digit arithmetic), 12 digits, 95% unless said. */
describe('limits against the values of the design review', () => {
  const close = (value: number | null, expected: number) =>
    expect(Math.abs((value ?? NaN) / expected - 1)).toBeLessThan(2e-11);

  it('44 and 31 cases, coverage 38%: ratio 2.31578947368 (1.46830884089 to 3.65242021098)', () => {
    const { low, high } = shareRatioInterval(
      { cases: 44, referenceCases: 31, coverage: 0.38, referenceCoverage: 0.62 },
      0.95,
    );
    close(low, 1.46830884089);
    close(high, 3.65242021098);
  });

  it('18 of 1,204 against 9 of 2,377: risk ratio, difference and odds ratio', () => {
    const groups = groupsOf([18, 1204, 9, 2377]);
    const ratio = riskRatioInterval(groups, 0.95);
    const difference = riskDifferenceInterval(groups, 0.95);
    const odds = oddsRatioInterval(groups, 0.95);
    [ratio.low, ratio.high].forEach((limit, at) => close(limit, [1.81452906747, 8.59232546177][at] ?? NaN));
    [difference.low, difference.high].forEach((limit, at) =>
      close(limit, [0.00486855273718, 0.0199591315724][at] ?? NaN),
    );
    [odds.low, odds.high].forEach((limit, at) => close(limit, [1.82399267531, 8.74089465873][at] ?? NaN));
  });

  it('three dose groups are compared in pairs: 0.313636363636 (0.188822132436 to 0.5209546536)', () => {
    const { low, high } = shareRatioInterval(
      { cases: 23, referenceCases: 40, coverage: 0.55, referenceCoverage: 0.3 },
      0.95,
    );
    close(low, 0.188822132436);
    close(high, 0.5209546536);
  });
});
