import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import {
  attributableFraction,
  populationAttributableFraction,
  preventedFraction,
} from '../../src/stats/attributable-fraction.ts';
import { bracketedRoot } from '../../src/stats/bracketed-root.ts';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';
import { comparison, nMinusOneChiSquared, shareScoreStatistic } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { oneExtraPer } from '../../src/stats/one-extra-per.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { swapped } from '../../src/stats/score-factor.ts';
import { shareRatio, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

const group = fc
  .integer({ min: 1, max: 1_000_000 })
  .chain((total) => fc.tuple(fc.integer({ min: 0, max: total }), fc.constant(total)));
const groups = fc
  .tuple(group, group)
  .map(([[cases, total], [referenceCases, referenceTotal]]): TwoGroups => ({
    cases,
    total,
    referenceCases,
    referenceTotal,
  }));
const level = fc.constantFrom(0.5, 0.8, 0.9, 0.95, 0.99, 0.9999);
const runs = { numRuns: 2_000 };
const limitsOf = ({ low, high }: Interval) => [low, high];

describe('swapping the groups', () => {
  it('inverts ratio intervals to the last bit', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        for (const interval of [riskRatioInterval, oddsRatioInterval]) {
          const { low, high } = interval(each, at);
          const mirrored = interval(swapped(each), at);
          expect(mirrored.high).toBe(low === 0 ? null : 1 / (low ?? NaN));
          expect(high).toBe(mirrored.low === 0 ? null : 1 / (mirrored.low ?? NaN));
        }
      }),
      runs,
    );
  });

  it('negates difference intervals to the last bit', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        const { low, high } = riskDifferenceInterval(each, at);
        const mirrored = riskDifferenceInterval(swapped(each), at);
        expect((mirrored.low ?? NaN) + (high ?? NaN)).toBe(0);
        expect((mirrored.high ?? NaN) + (low ?? NaN)).toBe(0);
      }),
      runs,
    );
  });
});

describe('every interval', () => {
  it('holds its estimate, within its natural bounds, and is no NaN and no infinity', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        const { cases, total, referenceCases, referenceTotal } = each;
        const difference = cases / total - referenceCases / referenceTotal;
        const { low, high } = riskDifferenceInterval(each, at);
        expect(low).toBeGreaterThanOrEqual(-1);
        expect(high).toBeLessThanOrEqual(1);
        expect((low ?? NaN) - 1e-12).toBeLessThanOrEqual(difference);
        expect((high ?? NaN) + 1e-12).toBeGreaterThanOrEqual(difference);
        if (referenceCases > 0) {
          const ratio = (cases * referenceTotal) / (referenceCases * total);
          const limits = riskRatioInterval(each, at);
          expect((limits.low ?? NaN) * (1 - 1e-12)).toBeLessThanOrEqual(ratio);
          if (cases > 0) expect((limits.high ?? NaN) * (1 + 1e-12)).toBeGreaterThanOrEqual(ratio);
        }
        for (const limit of [
          low,
          high,
          ...limitsOf(oddsRatioInterval(each, at)),
          ...limitsOf(wilsonInterval(cases, total, at)),
        ]) {
          if (limit !== null) expect(Number.isFinite(limit)).toBe(true);
        }
      }),
      runs,
    );
  });

  it('of a higher level holds that of a lower level', () => {
    fc.assert(
      fc.property(groups, (each) => {
        for (const interval of [riskRatioInterval, oddsRatioInterval, riskDifferenceInterval]) {
          const narrow = interval(each, 0.9);
          const wide = interval(each, 0.99);
          expect(wide.low ?? -Infinity).toBeLessThanOrEqual(narrow.low ?? -Infinity);
          expect(wide.high ?? Infinity).toBeGreaterThanOrEqual(narrow.high ?? Infinity);
        }
      }),
      runs,
    );
  });

  it('rises with the cases of the group', () => {
    for (let total = 1; total <= 12; total += 1) {
      for (let referenceCases = 0; referenceCases <= 9; referenceCases += 1) {
        for (let cases = 0; cases < total; cases += 1) {
          const at = (x: number) =>
            riskRatioInterval({ cases: x, total, referenceCases, referenceTotal: 9 }, 0.95);
          expect(at(cases + 1).low ?? NaN).toBeGreaterThanOrEqual(at(cases).low ?? NaN);
          expect(at(cases + 1).high ?? Infinity).toBeGreaterThanOrEqual(at(cases).high ?? Infinity);
        }
      }
    }
  });

  it('of exact limits is at least as wide as its level says at the observed count: it holds the estimate', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 2_000 }), fc.nat(), level, (total, seed, at) => {
        const cases = seed % (total + 1);
        const { low, high } = clopperPearsonInterval(cases, total, at);
        expect(low).toBeLessThanOrEqual(cases / total);
        expect(high).toBeGreaterThanOrEqual(cases / total);
      }),
      { numRuns: 300 },
    );
  });
});

describe('the readings about "no difference"', () => {
  const verdicts = (each: TwoGroups, at: number) => {
    const ratio = riskRatioInterval(each, at);
    const odds = oddsRatioInterval(each, at);
    const difference = riskDifferenceInterval(each, at);
    const excludes = (low: number | null, high: number | null, none: number) =>
      (low ?? -Infinity) > none || (high ?? Infinity) < none;
    return [
      excludes(ratio.low, ratio.high, 1),
      excludes(odds.low, odds.high, 1),
      excludes(difference.low, difference.high, 0),
    ];
  };

  it('agree with each other and with the (N-1) chi-squared in every table to 16 by 16 at two levels', () => {
    let tables = 0;
    for (const at of [0.8, 0.95]) {
      const threshold = criticalValue(at) ** 2;
      for (let total = 1; total <= 16; total += 1)
        for (let referenceTotal = 1; referenceTotal <= 16; referenceTotal += 1)
          for (let cases = 0; cases <= total; cases += 1)
            for (let referenceCases = 0; referenceCases <= referenceTotal; referenceCases += 1) {
              const each = { cases, total, referenceCases, referenceTotal };
              const expected = nMinusOneChiSquared(each) > threshold;
              const found = verdicts(each, at);
              if (found.some((verdict) => verdict !== expected))
                throw new Error(`${JSON.stringify(each)} at ${at}: ${found.join()} for ${expected}`);
              tables += 1;
            }
    }
    expect(tables).toBe(2 * 152 ** 2);
  });

  it('agree in random larger tables at six levels', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        const [ratio, odds, difference] = verdicts(each, at);
        expect(odds).toBe(ratio);
        expect(difference).toBe(ratio);
      }),
      runs,
    );
  });

  it('agree for shares with the score statistic of the cases', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 500 }),
        fc.integer({ min: 0, max: 500 }),
        fc.integer({ min: 1, max: 99 }),
        level,
        (cases, referenceCases, percent, at) => {
          fc.pre(cases + referenceCases > 0);
          const coverage = percent / 100;
          const statistic = shareScoreStatistic(cases, referenceCases, coverage);
          const threshold = criticalValue(at) ** 2;
          fc.pre(Math.abs(statistic / threshold - 1) > 1e-9);
          const { low, high } = shareRatioInterval(
            { cases, referenceCases, coverage, referenceCoverage: 1 - coverage },
            at,
          );
          expect((low ?? 0) > 1 || (high ?? Infinity) < 1).toBe(statistic > threshold);
        },
      ),
      runs,
    );
  });

  it('are decided in whole numbers: 333333333 of 1e9 is told from 333333334 of 1000000003', () => {
    // 333333333 x 1000000003 - 333333334 x 1e9 = -1, which doubles cannot hold beside their products.
    expect(
      comparison({ cases: 333333333, total: 1e9, referenceCases: 333333334, referenceTotal: 1000000003 }),
    ).toBe('lower');
    expect(comparison({ cases: 1, total: 3, referenceCases: 333333333, referenceTotal: 999999999 })).toBe(
      'same',
    );
  });
});

describe('what follows from a ratio', () => {
  it('has the values of Boice & Monson as printed by Rothman (attributable fraction 0.4611 at 1.855759) and VanderWeele & Ding 2017 (7.26 at 3.9, 3.0 at 1.8)', () => {
    expect(attributableFraction(1.855759)).toBeCloseTo(0.4611, 4);
    expect(hiddenCauseStrength(3.9)).toBeCloseTo(7.26, 2);
    expect(hiddenCauseStrengthAtLimit({ low: 1.8, high: 8.7 })).toBeCloseTo(3.0, 1);
    expect(hiddenCauseStrength(1 / 3.9)).toBeCloseTo(7.26, 2);
  });

  it('is 1 where the interval holds no difference, and nothing at a ratio of 0', () => {
    expect(hiddenCauseStrengthAtLimit({ low: 0.8, high: null })).toBe(1);
    expect(hiddenCauseStrength(0)).toBeNull();
    expect(attributableFraction(0)).toBeNull();
    expect(preventedFraction(0.25)).toBe(0.75);
  });

  it('gives 0.333333333333 (0.151072836463 to 0.5019721108) of all cases for 44 and 31 at 38% (design review)', () => {
    const through = (ratio: number) => populationAttributableFraction(ratio, 0.38);
    expect(
      through(shareRatio({ cases: 44, referenceCases: 31, coverage: 0.38, referenceCoverage: 0.62 }) ?? NaN),
    ).toBeCloseTo(1 / 3, 12);
    expect(through(1.46830884089)).toBeCloseTo(0.151072836463, 10);
    expect(through(3.65242021098)).toBeCloseTo(0.5019721108, 10);
  });

  it('runs through infinity as Altman 1998 prints it: 10% (-5% to 25%) is one for 10, from 4 up, or one fewer from 20 up', () => {
    const { estimate, interval, ranges } = oneExtraPer(0.1, { low: -0.05, high: 0.25 });
    expect(estimate).toBeCloseTo(10, 12);
    expect(interval).toBeNull();
    expect(ranges).toEqual({ more: { low: 4, high: null }, fewer: { low: 20, high: null } });
  });
});

describe('arguments that nobody may pass', () => {
  it.each([
    ['level-out-of-range', () => criticalValue(0.49)],
    ['level-out-of-range', () => criticalValue(NaN)],
    ['cases-out-of-range', () => wilsonInterval(5, 4, 0.95)],
    [
      'cases-out-of-range',
      () => riskRatioInterval({ cases: -1, total: 4, referenceCases: 1, referenceTotal: 4 }, 0.95),
    ],
    ['total-out-of-range', () => wilsonInterval(0, 0, 0.95)],
    [
      'total-out-of-range',
      () => riskRatioInterval({ cases: 0, total: 0.38, referenceCases: 0, referenceTotal: 0.62 }, 0.95),
    ],
    ['not-whole', () => clopperPearsonInterval(1.5, 4, 0.95)],
    [
      'coverage-out-of-range',
      () => shareRatio({ cases: 1, referenceCases: 1, coverage: 1, referenceCoverage: 0.5 }),
    ],
    ['ratio-out-of-range', () => hiddenCauseStrength(NaN)],
    ['no-bracket', () => bracketedRoot((x) => x + 10, 0, 1)],
  ])('are refused with the code %s', (code, call) => {
    try {
      call();
    } catch (error) {
      expect(error).toBeInstanceOf(ArgumentError);
      expect((error as ArgumentError).code).toBe(code);
      return;
    }
    throw new Error('nothing was thrown');
  });
});
