import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { criticalValue } from '../../src/stats/critical-value.ts';
import type { TwoGroups } from '../../src/stats/interval.ts';
import { comparison, nMinusOneChiSquared, shareScoreStatistic } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { groups, level, runs } from './generated.ts';
import { leavesOut } from './no-difference-tables.ts';

describe('the readings about "no difference"', () => {
  const verdicts = (each: TwoGroups, at: number) => {
    const ratio = riskRatioInterval(each, at);
    const odds = oddsRatioInterval(each, at);
    const difference = riskDifferenceInterval(each, at);
    return [leavesOut(ratio, 1), leavesOut(odds, 1), leavesOut(difference, 0)];
  };

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
          const pair = { cases, referenceCases, coverage, referenceCoverage: 1 - coverage };
          expect(leavesOut(shareRatioInterval(pair, at), 1)).toBe(statistic > threshold);
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
