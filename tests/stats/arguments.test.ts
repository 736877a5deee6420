import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import {
  attributableFraction,
  populationAttributableFraction,
} from '../../src/stats/attributable-fraction.ts';
import { bracketedRoot } from '../../src/stats/bracketed-root.ts';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { hiddenCauseStrength } from '../../src/stats/hidden-cause-strength.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval, shareRatio, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { fayFeuerInterval } from '../../src/stats/standardised-rate.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

describe('arguments that nobody may pass', () => {
  it.each([
    ['a level below 0.5', 'level-out-of-range', () => criticalValue(0.49)],
    ['a level that is no number', 'level-out-of-range', () => criticalValue(NaN)],
    ['a level above 0.9999', 'level-out-of-range', () => wilsonInterval(1, 4, 0.99991)],
    ['a level in percent', 'level-out-of-range', () => clopperPearsonInterval(1, 4, 95)],
    [
      'a level of 0',
      'level-out-of-range',
      () => conditionalOddsRatioInterval({ cases: 1, total: 4, referenceCases: 1, referenceTotal: 4 }, 0),
    ],
    ['cases that are no number', 'cases-out-of-range', () => wilsonInterval(NaN, 4, 0.95)],
    [
      'more reference cases than people',
      'cases-out-of-range',
      () => riskDifferenceInterval({ cases: 1, total: 4, referenceCases: 5, referenceTotal: 4 }, 0.95),
    ],
    [
      'shares of fewer cases than none',
      'cases-out-of-range',
      () => shareRatioInterval({ cases: -1, referenceCases: 1, coverage: 0.5, referenceCoverage: 0.5 }, 0.95),
    ],
    ['an endless total', 'total-out-of-range', () => wilsonInterval(1, Infinity, 0.95)],
    [
      'a reference total that is no number',
      'total-out-of-range',
      () => oddsRatioInterval({ cases: 1, total: 4, referenceCases: 0, referenceTotal: NaN }, 0.95),
    ],
    [
      'a total in parts for the exact odds ratio',
      'not-whole',
      () =>
        conditionalOddsRatioInterval({ cases: 1, total: 4.5, referenceCases: 1, referenceTotal: 4 }, 0.95),
    ],
    [
      'cases in parts for the exact ratio from shares',
      'not-whole',
      () =>
        exactShareRatioInterval(
          { cases: 0.5, referenceCases: 1, coverage: 0.5, referenceCoverage: 0.5 },
          0.95,
        ),
    ],
    ['events in parts for the exact rate', 'not-whole', () => garwoodInterval(1.5, 1, 0.95)],
    ['an exposure of 0', 'exposure-out-of-range', () => garwoodInterval(1, 0, 0.95)],
    [
      'one weight below 0',
      'weight-out-of-range',
      () =>
        fayFeuerInterval(
          [
            { cases: 1, exposure: 1, weight: 2 },
            { cases: 1, exposure: 1, weight: -1 },
          ],
          0.95,
        ),
    ],
    ['no layers', 'weight-out-of-range', () => fayFeuerInterval([], 0.95)],
    ['a coverage of 0', 'coverage-out-of-range', () => populationAttributableFraction(2, 0)],
    ['a ratio below 0', 'ratio-out-of-range', () => attributableFraction(-1)],
    ['more cases than people', 'cases-out-of-range', () => wilsonInterval(5, 4, 0.95)],
    [
      'fewer cases than none',
      'cases-out-of-range',
      () => riskRatioInterval({ cases: -1, total: 4, referenceCases: 1, referenceTotal: 4 }, 0.95),
    ],
    ['a total of 0', 'total-out-of-range', () => wilsonInterval(0, 0, 0.95)],
    [
      'two groups of one person in all',
      'total-out-of-range',
      () => riskRatioInterval({ cases: 0, total: 0.38, referenceCases: 0, referenceTotal: 0.62 }, 0.95),
    ],
    ['cases in parts for the exact risk', 'not-whole', () => clopperPearsonInterval(1.5, 4, 0.95)],
    [
      'a coverage of 1',
      'coverage-out-of-range',
      () => shareRatio({ cases: 1, referenceCases: 1, coverage: 1, referenceCoverage: 0.5 }),
    ],
    ['a ratio that is no number', 'ratio-out-of-range', () => hiddenCauseStrength(NaN)],
    ['ends that bracket no root', 'no-bracket', () => bracketedRoot((x) => x + 10, 0, 1)],
    [
      'a function without a value in between',
      'undefined-value',
      () => bracketedRoot((x) => (x === 0 ? -1 : x === 1 ? 1 : NaN), 0, 1),
    ],
  ])('%s: refused with the code %s', (_, code, call) => {
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
