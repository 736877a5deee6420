import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { rateDifferenceInterval, swappedRates } from '../../src/stats/rate-difference-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { swapped } from '../../src/stats/score-factor.ts';
import { exactShareRatioInterval, shareRatio, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';
import { caseCount, groups, level, levels, pairs, runs, share, smallTables } from './generated.ts';

/** A risk of 0, of 1, or one that is no smaller than a whole case of 1e15. */
const part = fc.oneof(fc.constantFrom(0, 1, 1 - 2 ** -53), fc.double({ min: 1e-15, max: 1, noNaN: true }));
/** A few roundings, relative. */
const hair = 1e-15;
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
