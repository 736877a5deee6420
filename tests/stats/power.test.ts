import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import { detectableRiskRatio, detectableShareRatio } from '../../src/stats/detectable-ratio.ts';
import type { DetectableRatio } from '../../src/stats/detectable-ratio.ts';
import { casesNeeded, growthNeeded } from '../../src/stats/size-needed.ts';
import { errorOf, fixture, worst } from './error-of.ts';

interface Asked {
  readonly level: string;
  readonly power: number;
}
interface Found extends Asked {
  readonly above: string | null;
  readonly below: string | null;
}
/** Values by full enumeration and root finding; see tests/fixtures/reference/make-power.py, which records its versions. */
const reference = fixture<{
  readonly riskRatios: readonly (Found & {
    readonly groups: readonly [number, number, number];
    readonly exact: boolean;
  })[];
  readonly shareRatios: readonly (Found & { readonly cases: number; readonly coverage: number })[];
  readonly growths: readonly (Asked & {
    readonly groups: readonly [number, number, number];
    readonly ratio: number;
    readonly growth: string;
    readonly statsmodels: number;
    /** How often the ratio shows in groups so much larger, by enumeration. */
    readonly shown?: number;
  })[];
  readonly cases: readonly (Asked & {
    readonly coverage: number;
    readonly ratio: number;
    readonly cases: string;
    /** The same on average over numbers of cases from a tenth fewer to a tenth more. */
    readonly shown?: number;
  })[];
}>('power.json');

const plan = ([total, referenceTotal, referenceRisk]: readonly [number, number, number]) => ({
  total,
  referenceTotal,
  referenceRisk,
});
const bothSides = ({ above, below }: DetectableRatio, expected: Found) =>
  Math.max(errorOf(above, expected.above), errorOf(below, expected.below));

describe('the smallest ratios that would have shown, by full enumeration in Python', () => {
  const inGroups = () =>
    reference.riskRatios.map((row) => ({
      row,
      answer: detectableRiskRatio(plan(row.groups), Number(row.level), row.power),
    }));
  const enumerated = () => inGroups().filter(({ answer }) => answer.method === 'enumeration');

  it('are met to 1e-11 by risk ratios of groups of 1 to 900, where every outcome was put to the test in whole numbers', () => {
    const rows = enumerated().filter(({ row }) => row.exact);
    const found = worst(rows, ({ row, answer }) => bothSides(answer, row));
    expect(rows).toHaveLength(18);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-11);
  });

  it('are met to 1e-9 by risk ratios of groups of 150 to 20,000', () => {
    const rows = enumerated().filter(({ row }) => !row.exact);
    const found = worst(rows, ({ row, answer }) => bothSides(answer, row));
    expect(rows).toHaveLength(6);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-9);
  });

  it('are met to 0.2% of the distance from 1 where more than 30 on each side of the mean are usual and the normal approximation is used', () => {
    const rows = inGroups().filter(({ answer }) => answer.method === 'normal-approximation');
    const found = worst(rows, ({ row, answer }) =>
      Math.max(
        errorOf((answer.above ?? NaN) - 1, String(Number(row.above) - 1)),
        errorOf((answer.below ?? NaN) - 1, String(Number(row.below) - 1)),
      ),
    );
    expect(rows).toHaveLength(2);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(0.002);
  });

  it('are met to 1e-11 by ratios from shares of cases and from rates, for 1 to 1,000,000 cases', () => {
    const found = worst(reference.shareRatios, (row) =>
      bothSides(detectableShareRatio(row.cases, row.coverage, Number(row.level), row.power), row),
    );
    expect(reference.shareRatios).toHaveLength(14);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-11);
  });
});

describe('how many it takes to show a ratio', () => {
  it('is what root finding in the normal approximation gives, to 1e-12', () => {
    const groups = worst(reference.growths, (row) =>
      errorOf(growthNeeded(plan(row.groups), row.ratio, Number(row.level), row.power), row.growth),
    );
    const cases = worst(reference.cases, (row) =>
      errorOf(casesNeeded(row.coverage, row.ratio, Number(row.level), row.power), row.cases),
    );
    expect(groups.error, JSON.stringify(groups.row)).toBeLessThan(1e-12);
    expect(cases.error, JSON.stringify(cases.row)).toBeLessThan(1e-12);
  });

  it('is what statsmodels gives for two groups, to 1e-9', () => {
    const found = worst(reference.growths, (row) =>
      errorOf(
        growthNeeded(plan(row.groups), row.ratio, Number(row.level), row.power),
        String(row.statsmodels),
      ),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-9);
  });

  it('is the 76.7 a group that R prints in the help of power.prop.test for 50% and 75% at a power of 90%', () => {
    const growth = growthNeeded({ total: 1, referenceTotal: 1, referenceRisk: 0.5 }, 1.5, 0.95, 0.9);
    expect(growth).toBeCloseTo(76.7, 1);
  });

  it('shows ratios of 1/2 and 2 in 79 to 81 of 100 enumerated studies where 80 were asked for and the smaller group has 40 people or more', () => {
    const usual = ({ ratio, power }: { readonly ratio: number; readonly power: number }) =>
      (ratio === 2 || ratio === 0.5) && power === 0.8;
    const groups = reference.growths
      .filter(usual)
      .flatMap(({ groups, ratio, level, power, growth, shown }) => {
        const ours = growthNeeded(plan(groups), ratio, Number(level), power) ?? NaN;
        // The enumerated groups are those of `growth`.
        expect(ours).toBeCloseTo(Number(growth), 9);
        return Math.min(groups[0], groups[1]) * ours > 40 && shown !== undefined ? [shown] : [];
      });
    const cases = reference.cases.filter(usual).flatMap(({ shown }) => shown ?? []);
    expect([groups.length, cases.length]).toEqual([8, 7]);
    expect(Math.min(...groups, ...cases)).toBeGreaterThan(0.79);
    expect(Math.max(...groups, ...cases)).toBeLessThan(0.81);
  });

  it('is never answered where the ratio would take the risk above 1', () => {
    expect(growthNeeded({ total: 50, referenceTotal: 50, referenceRisk: 0.6 }, 2, 0.95, 0.8)).toBeNull();
    expect(growthNeeded({ total: 50, referenceTotal: 50, referenceRisk: 0.5 }, 2, 0.95, 0.8)).toBeGreaterThan(
      0,
    );
  });
});

describe('what could have been seen', () => {
  it('counts people of a coverage times a population as the nearest whole people', () => {
    expect(
      detectableRiskRatio({ total: 468.92, referenceTotal: 765.08, referenceRisk: 0.2 }, 0.95, 0.8),
    ).toEqual(detectableRiskRatio({ total: 469, referenceTotal: 765, referenceRisk: 0.2 }, 0.95, 0.8));
    expect(detectableShareRatio(41.6, 0.38, 0.95, 0.8)).toEqual(detectableShareRatio(42, 0.38, 0.95, 0.8));
    expect(
      detectableRiskRatio({ total: 0.2, referenceTotal: 0.3, referenceRisk: 0.2 }, 0.95, 0.8).above,
    ).toBeNull();
  });

  it('is nothing without a case', () => {
    expect(detectableShareRatio(0, 0.38, 0.95, 0.8)).toMatchObject({ above: null, below: null });
  });

  it('inverts when the groups of a share change places', () => {
    const own = detectableShareRatio(75, 0.375, 0.95, 0.8);
    const other = detectableShareRatio(75, 0.625, 0.95, 0.8);
    expect(own.above).toBeCloseTo(1 / (other.below ?? NaN), 12);
    expect(own.below).toBeCloseTo(1 / (other.above ?? NaN), 12);
  });

  it('is answered for groups of a thousand million, for a million million beside 60 and for 1e15 cases, common or rare, within three seconds together', () => {
    const groups = [0.3, 1e-3, 1e-6, 1e-9, 1 - 1e-6].map((referenceRisk) => ({
      total: 1e9,
      referenceTotal: 1e9,
      referenceRisk,
    }));
    groups.push({ total: 1e12, referenceTotal: 60, referenceRisk: 0.3 });
    groups.push({ total: 60, referenceTotal: 1e12, referenceRisk: 0.3 });
    const start = performance.now();
    for (const each of groups) expect(detectableRiskRatio(each, 0.95, 0.8).above).toBeGreaterThan(1);
    for (const coverage of [0.3, 1e-6]) {
      expect(detectableShareRatio(1e15, coverage, 0.95, 0.8).above).toBeGreaterThan(1);
    }
    expect(performance.now() - start).toBeLessThan(3000);
  });
});

describe('questions of power that cannot be', () => {
  const groups = { total: 50, referenceTotal: 50, referenceRisk: 0.2 };
  it.each([
    ['a power below 0.75', 'power-out-of-range', () => detectableRiskRatio(groups, 0.95, 0.5)],
    ['a power of 1', 'power-out-of-range', () => detectableShareRatio(75, 0.38, 0.95, 1)],
    ['a power in percent', 'power-out-of-range', () => casesNeeded(0.38, 2, 0.95, 80)],
    ['a ratio of 1', 'ratio-out-of-range', () => growthNeeded(groups, 1, 0.95, 0.8)],
    ['a ratio of 0', 'ratio-out-of-range', () => casesNeeded(0.38, 0, 0.95, 0.8)],
    [
      'a reference without a case',
      'coverage-out-of-range',
      () => detectableRiskRatio({ ...groups, referenceRisk: 0 }, 0.95, 0.8),
    ],
    ['an empty group', 'total-out-of-range', () => detectableRiskRatio({ ...groups, total: 0 }, 0.95, 0.8)],
    ['a coverage of 1', 'coverage-out-of-range', () => detectableShareRatio(75, 1, 0.95, 0.8)],
  ])('%s: refused with the code %s', (_, code, call) => {
    expect(call).toThrow(ArgumentError);
    expect(call).toThrow(expect.objectContaining({ code }));
  });
});
