import { describe, expect, it } from 'vitest';
import { cochranMantelHaenszel } from '../../src/stats/cochran-mantel-haenszel.ts';
import {
  rateRatioHomogeneity,
  riskRatioHomogeneity,
  shareRatioHomogeneity,
} from '../../src/stats/homogeneity.ts';
import type { Interval } from '../../src/stats/interval.ts';
import {
  exactPooledOddsRatioInterval,
  pooledOddsRatio,
  pooledOddsRatioInterval,
} from '../../src/stats/pooled-odds-ratio.ts';
import { pooledRateDifference } from '../../src/stats/pooled-rate-difference.ts';
import {
  pooledRiskDifference,
  pooledRiskDifferenceInterval,
} from '../../src/stats/pooled-risk-difference.ts';
import { pooledRiskRatio, pooledRiskRatioInterval } from '../../src/stats/pooled-risk-ratio.ts';
import {
  exactPooledShareRatioInterval,
  pooledRateRatio,
  pooledRateRatioInterval,
  pooledShareRatio,
  pooledShareRatioInterval,
} from '../../src/stats/pooled-share-ratio.ts';
import { fixture } from './error-of.ts';
import { countLayers, rateLayers, shareLayers } from './pooled-layers.ts';
import type { Four } from './pooled-layers.ts';

const twoLayers = countLayers([
  [9, 100, 6, 50],
  [63, 100, 5, 20],
]);
const ugdp = countLayers([
  [8, 106, 5, 120],
  [22, 98, 16, 85],
]);
const eightCentres = countLayers([
  [11, 36, 10, 37],
  [16, 20, 22, 32],
  [14, 19, 7, 19],
  [2, 16, 1, 17],
  [6, 17, 0, 12],
  [1, 11, 0, 10],
  [1, 5, 1, 9],
  [4, 6, 6, 7],
]);
const oesophagus = countLayers([
  [1, 1, 9, 115],
  [4, 9, 26, 190],
  [25, 46, 29, 167],
  [42, 76, 27, 166],
  [19, 55, 18, 106],
  [5, 13, 0, 31],
]);
const smokers = countLayers([
  [647, 1269, 2, 29],
  [41, 69, 19, 51],
]);
const doctors = rateLayers([
  [32, 52407, 2, 18790],
  [104, 43248, 12, 10673],
  [206, 28612, 28, 5710],
  [186, 12663, 28, 2585],
  [102, 5317, 31, 1462],
]);
const measles = shareLayers([
  [5, 0.7, 77, 0.3],
  [9, 0.709, 89, 0.291],
  [28, 0.76, 152, 0.24],
  [37, 0.81, 140, 0.19],
  [22, 0.837, 90, 0.163],
  [27, 0.845, 113, 0.155],
  [27, 0.831, 124, 0.169],
]);
const threeShares = shareLayers([
  [2, 0.3, 7, 0.7],
  [5, 0.5, 7, 0.5],
  [9, 0.8, 1, 0.2],
]);

/** Right to the digits printed: within half a unit of the last place, and a hair more. */
function printed(value: number | null | undefined, figure: string): void {
  const places = figure.split('.')[1]?.length ?? 0;
  expect(Math.abs((value ?? NaN) - Number(figure)), `${value} for ${figure}`).toBeLessThanOrEqual(
    0.50001 * 10 ** -places,
  );
}
const limits = ({ low, high }: Interval) => [low, high];
const printedAll = (values: readonly (number | null | undefined)[], figures: readonly string[]) => {
  expect(values.length).toBe(figures.length);
  figures.forEach((figure, at) => {
    printed(values[at], figure);
  });
};

/** The statistics review gives 12 digits, from 40- to 60-digit arithmetic that is not in this repository. */
describe('strata against the values of the design review', () => {
  it('two layers: one answer of RR 1.00774516876, RD 0.00195483928256 and OR 1.01349894926 upwards, and a statistic of 3.98', () => {
    printedAll(limits(pooledRiskRatioInterval(twoLayers, 0.95)), ['1.00774516876', '2.98425189157']);
    printedAll(limits(pooledRiskDifferenceInterval(twoLayers, 0.95)), ['0.00195483928256', '0.211102139038']);
    printedAll(limits(pooledOddsRatioInterval(twoLayers, 0.95)), ['1.01349894926', '4.75167591085']);
    printed(cochranMantelHaenszel(twoLayers), '3.98');
  });

  it('UGDP, two layers: RR and RD also agree with ratesci for R to ten digits, the conditional OR from the review alone', () => {
    printed(pooledRiskRatio(ugdp), '1.32555532416');
    printedAll(limits(pooledRiskRatioInterval(ugdp, 0.95)), ['0.802799220588', '2.20208486753']);
    printed(pooledRiskDifference(ugdp), '0.0349002693369');
    printedAll(limits(pooledRiskDifferenceInterval(ugdp, 0.95)), ['-0.0287092597947', '0.100269600544']);
    printed(pooledOddsRatio(ugdp), '1.40222571783');
    printedAll(limits(pooledOddsRatioInterval(ugdp, 0.95)), ['0.767069935987', '2.56212216598']);
  });

  it('eight centres: RR and RD also agree with ratesci for R to ten digits, the conditional OR from the review alone', () => {
    printed(pooledRiskRatio(eightCentres), '1.42445721832');
    printedAll(limits(pooledRiskRatioInterval(eightCentres, 0.95)), ['1.08326636256', '1.89580172497']);
    printed(pooledRiskDifference(eightCentres), '0.129870506571');
    printedAll(limits(pooledRiskDifferenceInterval(eightCentres, 0.95)), [
      '0.0299578678816',
      '0.228255473376',
    ]);
    printed(pooledOddsRatio(eightCentres), '2.1302908906');
    printedAll(limits(pooledOddsRatioInterval(eightCentres, 0.95)), ['1.18192427461', '3.83835368779']);
    const alike = riskRatioHomogeneity(eightCentres);
    printed(alike?.statistic, '10.1778880951');
    expect(alike?.degrees).toBe(7);
  });

  it('7 of 34 against 1 of 34: as one stratum the ratio is that of the plain counts, 7 (1.20856797509 to 43.0329722387)', () => {
    const one = countLayers([[7, 34, 1, 34]]);
    printed(pooledRiskRatio(one), '7.0');
    printedAll(limits(pooledRiskRatioInterval(one, 0.95)), ['1.20856797509', '43.0329722387']);
    printed(pooledOddsRatioInterval(one, 0.95).low, '1.24662236025');
  });

  it('British doctors: pooled rate ratio 1.42551854286 (1.15542714253 to 1.75874511712), at 90% 1.19500238554 to 1.70050077551', () => {
    printed(pooledRateRatio(doctors), '1.42551854286');
    printedAll(limits(pooledRateRatioInterval(doctors, 0.95)), ['1.15542714253', '1.75874511712']);
    printedAll(limits(pooledRateRatioInterval(doctors, 0.9)), ['1.19500238554', '1.70050077551']);
  });

  it('seven years of measles: ratio 0.0490089693422 (0.0412233782063 to 0.0582650226863), deviance 4.7532587749 on 6 df', () => {
    printed(pooledShareRatio(measles), '0.0490089693422');
    printedAll(limits(pooledShareRatioInterval(measles, 0.95)), ['0.0412233782063', '0.0582650226863']);
    const alike = shareRatioHomogeneity(measles);
    printed(alike?.statistic, '4.7532587749');
    expect(alike?.degrees).toBe(6);
  });

  it('shares of three layers: 0.897863298214 (0.42048182496 to 1.91410640159), exact 0.385163254455 to 2.09399751365', () => {
    printed(pooledShareRatio(threeShares), '0.897863298214');
    printedAll(limits(pooledShareRatioInterval(threeShares, 0.95)), ['0.42048182496', '1.91410640159']);
    printedAll(limits(exactPooledShareRatioInterval(threeShares, 0.95)), ['0.385163254455', '2.09399751365']);
  });

  it('of the three roots 0.0951948987405, 0.878742327214 and 1.02667272299 the lower limit is the outermost', () => {
    const three = shareLayers([
      [1, 0.06, 0, 0.94],
      [2, 0.94, 0, 0.06],
    ]);
    expect(pooledShareRatioInterval(three, 0.99).high).toBeNull();
    printed(pooledShareRatioInterval(three, 0.99).low, '0.0951948987405');
    // The other way round the limits change sides.
    const turned = three.map(({ cases, coverage, referenceCases, referenceCoverage }) => ({
      cases: referenceCases,
      coverage: referenceCoverage,
      referenceCases: cases,
      referenceCoverage: coverage,
    }));
    printed(1 / (pooledShareRatioInterval(turned, 0.99).high ?? NaN), '0.0951948987405');
  });
});

describe('strata against print', () => {
  it('UGDP: Mantel-Haenszel RR 1.3256 and RD 0.0349 (Rothman, Greenland & Lash 2008, Table 15-1, seen in the metafor test suite)', () => {
    printed(pooledRiskRatio(ugdp), '1.3256');
    printed(pooledRiskDifference(ugdp), '0.0349');
  });

  it('eight centres: Mantel-Haenszel RD 0.130 (Agresti 2013, p. 231, seen in the cicalc test suite)', () => {
    printed(pooledRiskDifference(eightCentres), '0.130');
  });

  it('lung cancer and smoking: RR 2.4751, RD 0.3294, statistic 24.920 (Fagerland, Lydersen & Laake 2017, ch. 10, seen in their test suite)', () => {
    printed(pooledRiskRatio(smokers), '2.4751');
    printed(pooledRiskDifference(smokers), '0.3294');
    printed(cochranMantelHaenszel(smokers), '24.920');
  });

  it('British doctors: Mantel-Haenszel rate difference 11.4392 per 10,000 (Rothman 2008, Table 15-2, seen in the metafor test suite)', () => {
    printed(10_000 * pooledRateDifference(doctors), '11.4392');
    expect(rateRatioHomogeneity(doctors)?.pValue).toBeLessThan(0.05);
  });

  it('measles: effectiveness 0.950991, p of the deviance 0.5758264 (Farrington 1993, seen as re-analysed by Hoehle 2021)', () => {
    printed(1 - (pooledShareRatio(measles) ?? NaN), '0.950991');
    printed(shareRatioHomogeneity(measles)?.pValue, '0.5758264');
  });

  it('oesophageal cancer: conditional OR 5.251, exact 3.572 to 7.758 but for a hair (Breslow & Day 1980, section 4.4, from memory)', () => {
    printed(pooledOddsRatio(oesophagus), '5.251');
    const { low, high } = exactPooledOddsRatioInterval(oesophagus, 0.95);
    printed(low, '3.572');
    // 7.7569 by 60-digit arithmetic; searches that stop at four digits print 7.758.
    expect(Math.abs((high ?? NaN) / 7.758 - 1)).toBeLessThan(2e-4);
  });
});

describe("strata against R's mantelhaen.test", () => {
  const { rows } = fixture<{
    readonly rows: readonly {
      readonly name: string;
      readonly layers: readonly Four[];
      readonly level: number;
      readonly chiSquared: number;
      readonly estimate: number | null;
      readonly exact: readonly [number, number | null];
    }[];
  }>('pooled-r.json');
  const near = (value: number | null, expected: number | null, digits: number) => {
    if (value === null || expected === null) expect(value).toBe(expected);
    else
      expect(Math.abs(value - expected), `${value} for ${expected}`).toBeLessThanOrEqual(digits * expected);
  };

  it.each(rows)(
    '$name at $level: the statistic without correction, the conditional OR and its exact limits (its search stops at about three digits)',
    ({ layers, level, chiSquared, estimate, exact: [low, high] }) => {
      const strata = countLayers(layers);
      near(cochranMantelHaenszel(strata), chiSquared, 1e-12);
      near(pooledOddsRatio(strata), estimate, 1e-3);
      const found = exactPooledOddsRatioInterval(strata, level);
      near(found.low, low, 1e-3);
      near(found.high, high, 1e-3);
    },
  );
});
