import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import { cochranMantelHaenszel } from '../../src/stats/cochran-mantel-haenszel.ts';
import {
  rateRatioHomogeneity,
  riskRatioHomogeneity,
  shareRatioHomogeneity,
} from '../../src/stats/homogeneity.ts';
import { overallChiSquared, overallShareChiSquared } from '../../src/stats/overall-chi-squared.ts';
import { exactPooledOddsRatioInterval, pooledOddsRatioInterval } from '../../src/stats/pooled-odds-ratio.ts';
import {
  pooledRateDifference,
  pooledRateDifferenceInterval,
} from '../../src/stats/pooled-rate-difference.ts';
import { pooledRiskDifferenceInterval } from '../../src/stats/pooled-risk-difference.ts';
import { pooledRiskRatio, pooledRiskRatioInterval } from '../../src/stats/pooled-risk-ratio.ts';
import {
  exactPooledShareRatioInterval,
  pooledRateRatio,
  pooledRateRatioInterval,
  pooledShareRatio,
  pooledShareRatioInterval,
} from '../../src/stats/pooled-share-ratio.ts';
import { standardisedRiskRatioInterval } from '../../src/stats/standardised-risk-ratio.ts';
import { countLayers, rateLayers, shareLayers } from './pooled-layers.ts';

const two = countLayers([
  [3, 20, 5, 30],
  [1, 9, 0, 8],
]);
const nobody = countLayers([
  [3, 20, 0, 0],
  [0, 0, 5, 30],
]);

describe('layers that nobody may pass', () => {
  it.each([
    ['no layer', 'no-strata', () => pooledRiskRatio([])],
    ['no layer with people in both groups', 'no-strata', () => cochranMantelHaenszel(nobody)],
    ['no layer of rates', 'no-strata', () => pooledRateDifference([])],
    ['a level in percent', 'level-out-of-range', () => pooledRiskRatioInterval(two, 95)],
    ['a level of 0 for the difference', 'level-out-of-range', () => pooledRiskDifferenceInterval(two, 0)],
    ['a level of 0 for the exact form', 'level-out-of-range', () => exactPooledOddsRatioInterval(two, 0)],
    [
      'a case among nobody',
      'total-out-of-range',
      () => pooledRiskRatio([...two, ...countLayers([[1, 0, 3, 9]])]),
    ],
    [
      'more cases than people',
      'cases-out-of-range',
      () => pooledOddsRatioInterval([...two, ...countLayers([[1, 4, 10, 9]])], 0.95),
    ],
    [
      'a layer of one person',
      'total-out-of-range',
      () => pooledRiskRatio([...two, ...countLayers([[0.5, 0.5, 0, 0.5]])]),
    ],
    [
      'cases in parts for the exact odds ratio',
      'not-whole',
      () => exactPooledOddsRatioInterval(countLayers([[1.5, 4, 2, 9]]), 0.95),
    ],
    [
      'cases in parts for the exact ratio from shares',
      'not-whole',
      () => exactPooledShareRatioInterval(shareLayers([[1.5, 0.4, 2, 0.6]]), 0.95),
    ],
    [
      'more cases than an exact sum can have',
      'too-many-sums',
      () => exactPooledShareRatioInterval(shareLayers([[70_000, 0.4, 70_000, 0.6]]), 0.95),
    ],
    [
      'more tables than an exact sum can have',
      'too-many-sums',
      () => exactPooledOddsRatioInterval(countLayers([[2e5, 1e6, 3e5, 1e6]]), 0.95),
    ],
    [
      'a coverage of everybody',
      'coverage-out-of-range',
      () => pooledShareRatioInterval(shareLayers([[1, 1, 2, 0.5]]), 0.95),
    ],
    ['fewer cases than none', 'cases-out-of-range', () => pooledShareRatio(shareLayers([[-1, 0.4, 2, 0.6]]))],
    ['no exposure', 'exposure-out-of-range', () => pooledRateRatioInterval(rateLayers([[1, 0, 2, 9]]), 0.95)],
    ['endless exposure', 'exposure-out-of-range', () => pooledRateRatio(rateLayers([[1, Infinity, 2, 9]]))],
    [
      'fewer events than none',
      'cases-out-of-range',
      () => pooledRateDifferenceInterval(rateLayers([[-1, 3, 2, 9]]), 0.95),
    ],
    ['one group for all', 'too-few-groups', () => overallChiSquared([{ cases: 1, total: 4 }])],
    ['no group at all', 'too-few-groups', () => overallShareChiSquared([])],
    [
      'a group without size',
      'coverage-out-of-range',
      () =>
        overallShareChiSquared([
          { cases: 1, size: 0 },
          { cases: 1, size: 3 },
        ]),
    ],
  ])('%s is refused', (_, code, call) => {
    let thrown: unknown;
    try {
      call();
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(ArgumentError);
    expect(thrown).toHaveProperty('code', code);
  });
});

describe('layers that leave a figure undefined', () => {
  it('give no test whether ratios are alike where one layer is left or the pooled ratio has no end', () => {
    expect(riskRatioHomogeneity(two.slice(0, 1))).toBeNull();
    expect(
      riskRatioHomogeneity(
        countLayers([
          [3, 20, 0, 30],
          [1, 9, 0, 8],
        ]),
      ),
    ).toBeNull();
    expect(
      riskRatioHomogeneity(
        countLayers([
          [0, 20, 5, 30],
          [0, 9, 2, 8],
        ]),
      ),
    ).toBeNull();
    expect(
      shareRatioHomogeneity(
        shareLayers([
          [3, 0.4, 5, 0.6],
          [0, 0.4, 0, 0.6],
        ]),
      ),
    ).toBeNull();
    expect(
      rateRatioHomogeneity(
        rateLayers([
          [3, 4, 0, 6],
          [2, 4, 0, 6],
        ]),
      ),
    ).toBeNull();
  });

  it('give no standardised interval where a standardised risk is 0', () => {
    expect(standardisedRiskRatioInterval(countLayers([[0, 20, 5, 30]]), 'whole', 0.95)).toBeNull();
    expect(standardisedRiskRatioInterval(countLayers([[5, 20, 0, 30]]), 'whole', 0.95)).toBeNull();
  });

  it('give 0 to no limit without a case, and no estimate', () => {
    const none = shareLayers([
      [0, 0.4, 0, 0.6],
      [0, 0.2, 0, 0.8],
    ]);
    expect(pooledShareRatio(none)).toBeNull();
    expect(pooledShareRatioInterval(none, 0.95)).toEqual({ low: 0, high: null });
    expect(exactPooledShareRatioInterval(none, 0.95)).toEqual({ low: 0, high: null });
  });
});
