import { describe, expect, it } from 'vitest';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';
import * as textbook from '../../src/stats/textbook-intervals.ts';

/**
 * Printed limits, compared at the digits printed. Sources: a = CAMIS Working Group, worked pages with printed output; b = Newcombe
 * 1998, Statistics in Medicine 17:857 and 17:873; c = Koopman 1984; d = Fagerland, Lydersen & Laake 2017; e = Gart & Thomas 1982.
 */
const groups = (cases: number, total: number, referenceCases: number, referenceTotal: number): TwoGroups => ({
  cases,
  total,
  referenceCases,
  referenceTotal,
});
const drug = groups(36, 154, 12, 77);
const perondi = groups(7, 34, 1, 34);
const contrast = groups(56, 70, 48, 80);

const ofTwo: readonly (readonly [
  string,
  (each: TwoGroups, level: number) => Interval | null,
  TwoGroups,
  string,
  string,
])[] = [
  ['log (a)', textbook.logRiskRatio, drug, '0.8288', '2.7149'],
  ['log (d)', textbook.logRiskRatio, perondi, '0.9096', '53.8695'],
  ['log with halves (a)', textbook.logRiskRatioWithHalves, drug, '0.8189', '2.6200'],
  ['log with halves (d)', textbook.logRiskRatioWithHalves, perondi, '0.9241', '27.0523'],
  ['Koopman (a)', textbook.koopmanRiskRatio, drug, '0.8492', '2.7287'],
  ['Koopman (c)', textbook.koopmanRiskRatio, groups(36, 40, 16, 80), '2.94', '7.15'],
  ['Koopman (d)', textbook.koopmanRiskRatio, perondi, '1.2209', '42.5757'],
  ['Wald difference (a)', textbook.waldRiskDifference, drug, '-0.0271', '0.1830'],
  ['Wald difference (b)', textbook.waldRiskDifference, contrast, '0.0575', '0.3425'],
  ['Wald difference, corrected (a)', textbook.waldRiskDifferenceCorrected, drug, '-0.0368', '0.1927'],
  ['Wald difference, corrected (b)', textbook.waldRiskDifferenceCorrected, contrast, '0.0441', '0.3559'],
  ['Agresti-Caffo (a)', textbook.agrestiCaffoRiskDifference, drug, '-0.0329', '0.1782'],
  ['Agresti-Caffo (d)', textbook.agrestiCaffoRiskDifference, perondi, '0.0116', '0.3217'],
  ['square-and-add (a)', textbook.newcombeRiskDifference, drug, '-0.0361', '0.1751'],
  ['square-and-add (b)', textbook.newcombeRiskDifference, contrast, '0.0524', '0.3339'],
  ['Mee (a)', textbook.meeRiskDifference, drug, '-0.0358', '0.1773'],
  ['Mee (b)', textbook.meeRiskDifference, groups(9, 10, 3, 10), '0.1821', '0.8370'],
  ['Woolf (a)', textbook.woolfOddsRatio, drug, '0.8043', '3.3952'],
  ['Woolf with halves (a)', textbook.woolfOddsRatioWithHalves, drug, '0.7938', '3.2818'],
  ['Cornfield (a)', textbook.cornfieldOddsRatio, drug, '0.8115', '3.3584'],
  ['Cornfield (e)', textbook.cornfieldOddsRatio, groups(28, 99, 23, 182), '1.476', '5.035'],
];
const ofOne: readonly (readonly [
  string,
  (cases: number, total: number, level: number) => Interval | null,
  number,
  number,
  string,
  string,
])[] = [
  ['Wald (a)', textbook.waldRisk, 36, 154, '0.1669', '0.3006'],
  ['Wald (b)', textbook.waldRisk, 81, 263, '0.2522', '0.3638'],
  ['Agresti-Coull (a)', textbook.agrestiCoullRisk, 36, 154, '0.1736', '0.3069'],
  ['Wilson, corrected (a)', textbook.wilsonCorrectedRisk, 36, 154, '0.1710', '0.3101'],
  ['Wilson, corrected (b)', textbook.wilsonCorrectedRisk, 15, 148, '0.0598', '0.1644'],
  ['Wilson, corrected (b)', textbook.wilsonCorrectedRisk, 0, 20, '0.0000', '0.2005'],
];

function printed(limits: Interval | null, low: string, high: string) {
  const digits = (text: string) => text.split('.')[1]?.length ?? 0;
  expect(limits?.low?.toFixed(digits(low))).toBe(low);
  expect(limits?.high?.toFixed(digits(high))).toBe(high);
}

describe('textbook intervals', () => {
  it.each(ofTwo)('%s as printed', (_, interval, two, low, high) => printed(interval(two, 0.95), low, high));
  it.each(ofOne)('%s as printed', (_, interval, cases, total, low, high) =>
    printed(interval(cases, total, 0.95), low, high),
  );

  it('of two counts with a factor between them are its log limits', () => {
    // Boice & Monson: 41 of 28,010 against 15 of 19,017 person-years: ln 1.8558 -+ 1.96 root(1/41 + 1/15), worked by hand.
    printed(textbook.logCaseRatio(41, 15, 19_017 / 28_010, 0.95), '1.0272', '3.3526');
  });

  it.each(ofTwo)('%s have no limits that are no numbers, whatever the cells', (_, interval) => {
    for (const each of [
      groups(0, 10, 0, 10),
      groups(10, 10, 0, 10),
      groups(0, 10, 5, 10),
      groups(10, 10, 10, 10),
      groups(1, 1e9, 3, 1e9),
    ]) {
      const limits = interval(each, 0.95);
      if (limits === null) continue;
      expect(Number.isFinite(limits.low) && Number.isFinite(limits.high)).toBe(true);
    }
  });
});
