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
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';
import { comparison, nMinusOneChiSquared, shareScoreStatistic } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { oneExtraPer } from '../../src/stats/one-extra-per.ts';
import { rateDifferenceInterval, swappedRates } from '../../src/stats/rate-difference-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { swapped } from '../../src/stats/score-factor.ts';
import { exactShareRatioInterval, shareRatio, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import type { SharePair } from '../../src/stats/share-ratio.ts';
import { fayFeuerInterval } from '../../src/stats/standardised-rate.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

const group = fc
  .oneof(
    fc.integer({ min: 1, max: 30 }),
    fc.integer({ min: 1, max: 1_000_000 }),
    fc.integer({ min: 1, max: 1e9 }),
  )
  .chain((total) => fc.tuple(fc.integer({ min: 0, max: total }), fc.constant(total)));
const groups = fc
  .tuple(group, group)
  .map(([[cases, total], [referenceCases, referenceTotal]]): TwoGroups => ({
    cases,
    total,
    referenceCases,
    referenceTotal,
  }));
const levels = [0.5, 0.8, 0.9, 0.95, 0.99, 0.9999];
const level = fc.constantFrom(...levels);
const caseCount = fc.oneof(fc.integer({ min: 0, max: 30 }), fc.integer({ min: 0, max: 3_000 }));
const share = fc.integer({ min: 1, max: 99 }).map((percent) => percent / 100);
const pairs = fc
  .tuple(caseCount, caseCount, share, share)
  .map(([cases, referenceCases, coverage, referenceCoverage]): SharePair => ({
    cases,
    referenceCases,
    coverage,
    referenceCoverage,
  }));
/** Tables that the conditional method answers in no time. */
const smallTables = fc
  .tuple(fc.integer({ min: 1, max: 60 }), fc.nat(), fc.integer({ min: 1, max: 60 }), fc.nat())
  .map(([total, first, referenceTotal, second]): TwoGroups => ({
    cases: first % (total + 1),
    total,
    referenceCases: second % (referenceTotal + 1),
    referenceTotal,
  }));
/** A risk of 0, of 1, or one that is no smaller than a whole case of 1e15. */
const part = fc.oneof(fc.constantFrom(0, 1, 1 - 2 ** -53), fc.double({ min: 1e-15, max: 1, noNaN: true }));
/** A few roundings, relative. */
const hair = 1e-15;
const runs = { numRuns: 2_000 };

/** Within the bounds, and round the estimate where there is one. */
function holds({ low, high }: Interval, estimate: number, least: number, most: number): void {
  expect(low).not.toBeNull();
  expect(low).toBeGreaterThanOrEqual(least);
  if (high !== null) {
    expect(Number.isFinite(high)).toBe(true);
    expect(high).toBeLessThanOrEqual(most);
  }
  if (Number.isNaN(estimate)) return;
  const slack = Number.isFinite(estimate) ? 8 * hair * Math.abs(estimate) : 0;
  expect(low).toBeLessThanOrEqual(estimate + slack);
  expect(high ?? Infinity).toBeGreaterThanOrEqual(estimate - slack);
}

/** Each level's interval lies within that of the next. */
function nested(interval: (at: number) => Interval): void {
  const found = levels.map(interval);
  found.slice(1).forEach((wide, at) => {
    const narrow = found[at];
    expect(wide.low).toBeLessThanOrEqual(narrow?.low ?? NaN);
    expect(wide.high ?? Infinity).toBeGreaterThanOrEqual(narrow?.high ?? Infinity);
  });
}

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

describe('swapping the groups of other readings', () => {
  it('inverts exact odds ratios to the last bit', () => {
    fc.assert(
      fc.property(smallTables, level, (each, at) => {
        const { low, high } = conditionalOddsRatioInterval(each, at);
        const mirrored = conditionalOddsRatioInterval(swapped(each), at);
        expect(mirrored.high).toBe(low === 0 ? null : 1 / (low ?? NaN));
        expect(high).toBe(mirrored.low === 0 ? null : 1 / (mirrored.low ?? NaN));
      }),
      { numRuns: 300 },
    );
  });

  it('negates rate differences to the last bit', () => {
    fc.assert(
      fc.property(caseCount, caseCount, share, share, level, (cases, referenceCases, first, second, at) => {
        const pair = { cases, exposure: first, referenceCases, referenceExposure: second };
        const { low, high } = rateDifferenceInterval(pair, at);
        const mirrored = rateDifferenceInterval(swappedRates(pair), at);
        expect((mirrored.low ?? NaN) + (high ?? NaN)).toBe(0);
        expect((mirrored.high ?? NaN) + (low ?? NaN)).toBe(0);
      }),
      runs,
    );
  });

  it('inverts ratios from shares, score and exact, but for a few roundings', () => {
    fc.assert(
      fc.property(pairs, level, (pair, at) => {
        const { cases, referenceCases, coverage, referenceCoverage } = pair;
        const other = {
          cases: referenceCases,
          referenceCases: cases,
          coverage: referenceCoverage,
          referenceCoverage: coverage,
        };
        for (const interval of [shareRatioInterval, exactShareRatioInterval]) {
          const { low } = interval(pair, at);
          const { high } = interval(other, at);
          if (low === 0 || high === null) expect([low, high]).toEqual([0, null]);
          else expect(Math.abs((low ?? NaN) * high - 1)).toBeLessThan(10 * hair);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('every interval', () => {
  it('holds its estimate, within its natural bounds, and is no NaN and no infinity', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        const { cases, total, referenceCases, referenceTotal } = each;
        const others = total - cases;
        const referenceOthers = referenceTotal - referenceCases;
        const difference =
          Number(BigInt(cases) * BigInt(referenceTotal) - BigInt(referenceCases) * BigInt(total)) /
          total /
          referenceTotal;
        holds(riskDifferenceInterval(each, at), difference, -1, 1);
        holds(riskRatioInterval(each, at), (cases / referenceCases) * (referenceTotal / total), 0, Infinity);
        holds(
          oddsRatioInterval(each, at),
          (cases / others) * (referenceOthers / referenceCases),
          0,
          Infinity,
        );
        holds(wilsonInterval(cases, total, at), cases / total, 0, 1);
      }),
      runs,
    );
  });

  it('of shares and of exact limits holds its estimate', () => {
    fc.assert(
      fc.property(pairs, smallTables, level, (pair, each, at) => {
        holds(shareRatioInterval(pair, at), shareRatio(pair) ?? NaN, 0, Infinity);
        holds(exactShareRatioInterval(pair, at), shareRatio(pair) ?? NaN, 0, Infinity);
        holds(clopperPearsonInterval(each.cases, each.total, at), each.cases / each.total, 0, 1);
        const { cases, total, referenceCases, referenceTotal } = each;
        holds(
          conditionalOddsRatioInterval(each, at),
          (cases / (total - cases)) * ((referenceTotal - referenceCases) / referenceCases),
          0,
          Infinity,
        );
      }),
      { numRuns: 500 },
    );
  });

  it('of a higher level holds that of a lower level, through all six levels', () => {
    fc.assert(
      fc.property(groups, (each) => {
        nested((at) => riskRatioInterval(each, at));
        nested((at) => oddsRatioInterval(each, at));
        nested((at) => riskDifferenceInterval(each, at));
        nested((at) => wilsonInterval(each.cases, each.total, at));
      }),
      { numRuns: 1_000 },
    );
    fc.assert(
      fc.property(pairs, smallTables, (pair, each) => {
        nested((at) => shareRatioInterval(pair, at));
        nested((at) => exactShareRatioInterval(pair, at));
        nested((at) => clopperPearsonInterval(each.cases, each.total, at));
        nested((at) => conditionalOddsRatioInterval(each, at));
      }),
      { numRuns: 200 },
    );
  });

  it('takes cases and totals that are not whole', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1.01, max: 1e6, noNaN: true }),
        part,
        fc.double({ min: 1.01, max: 1e6, noNaN: true }),
        part,
        level,
        (total, first, referenceTotal, second, at) => {
          const each = {
            cases: total * first,
            total,
            referenceCases: referenceTotal * second,
            referenceTotal,
          };
          for (const interval of [riskRatioInterval, oddsRatioInterval, riskDifferenceInterval]) {
            const { low, high } = interval(each, at);
            expect(low).not.toBeNull();
            expect((high ?? Infinity) > (low ?? NaN)).toBe(true);
          }
        },
      ),
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

  it('agree with each other and with the (N-1) chi-squared in random tables to a total of 1e9 at six levels', () => {
    fc.assert(
      fc.property(groups, level, (each, at) => {
        const statistic = nMinusOneChiSquared(each);
        const threshold = criticalValue(at) ** 2;
        const found = verdicts(each, at);
        // Nearer than this the roundings of the statistic itself decide.
        if (Math.abs(statistic / threshold - 1) > 1e-12)
          expect(found).toEqual(found.map(() => statistic > threshold));
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
    ['level-out-of-range', () => wilsonInterval(1, 4, 0.99991)],
    ['level-out-of-range', () => clopperPearsonInterval(1, 4, 95)],
    [
      'level-out-of-range',
      () => conditionalOddsRatioInterval({ cases: 1, total: 4, referenceCases: 1, referenceTotal: 4 }, 0),
    ],
    ['cases-out-of-range', () => wilsonInterval(NaN, 4, 0.95)],
    [
      'cases-out-of-range',
      () => riskDifferenceInterval({ cases: 1, total: 4, referenceCases: 5, referenceTotal: 4 }, 0.95),
    ],
    [
      'cases-out-of-range',
      () => shareRatioInterval({ cases: -1, referenceCases: 1, coverage: 0.5, referenceCoverage: 0.5 }, 0.95),
    ],
    ['total-out-of-range', () => wilsonInterval(1, Infinity, 0.95)],
    [
      'total-out-of-range',
      () => oddsRatioInterval({ cases: 1, total: 4, referenceCases: 0, referenceTotal: NaN }, 0.95),
    ],
    [
      'not-whole',
      () =>
        conditionalOddsRatioInterval({ cases: 1, total: 4.5, referenceCases: 1, referenceTotal: 4 }, 0.95),
    ],
    [
      'not-whole',
      () =>
        exactShareRatioInterval(
          { cases: 0.5, referenceCases: 1, coverage: 0.5, referenceCoverage: 0.5 },
          0.95,
        ),
    ],
    ['not-whole', () => garwoodInterval(1.5, 1, 0.95)],
    ['exposure-out-of-range', () => garwoodInterval(1, 0, 0.95)],
    ['weight-out-of-range', () => fayFeuerInterval([{ cases: 1, exposure: 1, weight: -1 }], 0.95)],
    ['weight-out-of-range', () => fayFeuerInterval([], 0.95)],
    ['coverage-out-of-range', () => populationAttributableFraction(2, 0)],
    ['ratio-out-of-range', () => attributableFraction(-1)],
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
    ['undefined-value', () => bracketedRoot((x) => (x === 0 ? -1 : x === 1 ? 1 : NaN), 0, 1)],
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
