import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cochranMantelHaenszel } from '../../src/stats/cochran-mantel-haenszel.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { nMinusOneChiSquared } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import {
  exactPooledOddsRatioInterval,
  pooledOddsRatio,
  pooledOddsRatioInterval,
} from '../../src/stats/pooled-odds-ratio.ts';
import {
  pooledRateDifference,
  pooledRateDifferenceInterval,
} from '../../src/stats/pooled-rate-difference.ts';
import {
  pooledRiskDifference,
  pooledRiskDifferenceInterval,
} from '../../src/stats/pooled-risk-difference.ts';
import { pooledRiskRatio, pooledRiskRatioInterval } from '../../src/stats/pooled-risk-ratio.ts';
import {
  exactPooledShareRatioInterval,
  pooledRateRatioInterval,
  pooledShareRatio,
  pooledShareRatioInterval,
} from '../../src/stats/pooled-share-ratio.ts';
import type { RatePair } from '../../src/stats/rate-ratio.ts';
import { rateDifferenceInterval, swappedRates } from '../../src/stats/rate-difference-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { swapped } from '../../src/stats/score-factor.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import type { Strata } from '../../src/stats/strata.ts';
import { caseCount, groups, level, pairs, runs, smallTables } from './generated.ts';
import { countLayers, rateLayers } from './pooled-layers.ts';
import type { Four } from './pooled-layers.ts';

const excludes = ({ low, high }: Interval, none: number) =>
  (low ?? -Infinity) > none || (high ?? Infinity) < none;

/** What risk ratio, difference and odds ratio say about "no difference". */
const verdicts = (layers: Strata, at: number) => [
  excludes(pooledRiskRatioInterval(layers, at), 1),
  excludes(pooledRiskDifferenceInterval(layers, at), 0),
  excludes(pooledOddsRatioInterval(layers, at), 1),
];

const strata = fc.array(groups, { minLength: 2, maxLength: 4 });
const randomStrata = strata.map((layers) =>
  layers.map(({ cases, total, referenceCases, referenceTotal }) => ({
    cases: cases % 1e6,
    total: 5 + (cases % 1e6) + ((total - cases) % 1e6),
    referenceCases: referenceCases % 1e6,
    referenceTotal: 5 + (referenceCases % 1e6) + ((referenceTotal - referenceCases) % 1e6),
  })),
);
const rate = fc
  .tuple(caseCount, fc.integer({ min: 1, max: 1e6 }), caseCount, fc.integer({ min: 1, max: 1e6 }))
  .map(([cases, exposure, referenceCases, referenceExposure]) => ({
    cases,
    exposure,
    referenceCases,
    referenceExposure,
  }));
const rates = fc.array(rate, { minLength: 2, maxLength: 4 });

/** (sum(x1 - n c))^2 / sum n c(1 - c), c the group's part of the exposure. */
function rateScore(layers: readonly RatePair[]): number {
  let [excess, variance] = [0, 0];
  for (const { cases, exposure, referenceCases, referenceExposure } of layers) {
    const part = exposure / (exposure + referenceExposure);
    excess += cases - (cases + referenceCases) * part;
    variance += (cases + referenceCases) * part * (1 - part);
  }
  return variance === 0 ? 0 : (excess * excess) / variance;
}

/** Every four counts from 0 to these. */
function* fourCounts([n11 = 0, n12 = 0, n21 = 0, n22 = 0]: readonly number[]): Generator<Four> {
  for (let a = 0; a <= n11; a += 1)
    for (let b = 0; b <= n12; b += 1)
      for (let c = 0; c <= n21; c += 1) for (let d = 0; d <= n22; d += 1) yield [a, b, c, d];
}

describe('the pooled readings about "no difference"', () => {
  it.each([
    [1, 1, 1, 1],
    [3, 1, 2, 4],
    [12, 1, 8, 1],
    [5, 5, 5, 5],
    [5, 7, 6, 5],
    [9, 5, 6, 6],
  ] as const)(
    'agree with each other and with the Cochran-Mantel-Haenszel test in every table of layers %i v %i and %i v %i at three levels',
    (...sizes: readonly number[]) => {
      let tables = 0;
      const [n11 = 0, n12 = 0, n21 = 0, n22 = 0] = sizes;
      for (const [a, b, c, d] of fourCounts(sizes)) {
        const layers = countLayers([
          [a, n11, b, n12],
          [c, n21, d, n22],
        ]);
        const statistic = cochranMantelHaenszel(layers);
        for (const at of [0.8, 0.95, 0.99]) {
          const expected = statistic > criticalValue(at) ** 2;
          const found = verdicts(layers, at);
          if (found.some((verdict) => verdict !== expected))
            throw new Error(`${JSON.stringify(layers)} at ${at}: ${found.join()} for ${expected}`);
          tables += 1;
        }
      }
      expect(tables).toBe(3 * sizes.reduce((product, size) => product * (size + 1), 1));
    },
    20_000,
  );

  it('agree with each other and with that test in random layers of groups to two millions at four levels', () => {
    fc.assert(
      fc.property(randomStrata, fc.constantFrom(0.5, 0.8, 0.95, 0.99), (strata, at) => {
        const statistic = cochranMantelHaenszel(strata);
        const threshold = criticalValue(at) ** 2;
        // Nearer than this the roundings of the statistic itself decide.
        if (Math.abs(statistic / threshold - 1) > 1e-9)
          expect(verdicts(strata, at)).toEqual([0, 1, 2].map(() => statistic > threshold));
      }),
      { numRuns: 1_000 },
    );
  });

  it('agree where the accepted ratios fall apart: 23/23 v 16/16 with 1/23 v 4/5, at 99.99%', () => {
    // 40-digit arithmetic: the score is -3.931 at the ratio 1, -3.855 at 1.05 and -4.104 at 1.2, z being 3.891.
    const layers = countLayers([
      [23, 23, 16, 16],
      [1, 23, 4, 5],
    ]);
    expect(verdicts(layers, 0.9999)).toEqual([true, true, true]);
  });

  it('are those of the (N-1) chi-squared where there is one layer', () => {
    fc.assert(
      fc.property(groups, (each) => {
        const plain = nMinusOneChiSquared(each);
        expect(Math.abs(cochranMantelHaenszel([each]) - plain)).toBeLessThanOrEqual(1e-9 * plain);
      }),
      runs,
    );
  });

  it('agree between rate ratio, rate difference and their score in small layers of very unequal exposure', () => {
    for (const [a, b, c, d] of fourCounts([3, 2, 3, 8])) {
      const layers = rateLayers([
        [a, 366, b, 2.12],
        [c, 30.3, d, 205.7],
      ]);
      for (const at of [0.8, 0.95, 0.99, 0.9999]) {
        const expected = rateScore(layers) > criticalValue(at) ** 2;
        expect(excludes(pooledRateRatioInterval(layers, at), 1), JSON.stringify([layers, at])).toBe(expected);
        expect(excludes(pooledRateDifferenceInterval(layers, at), 0), JSON.stringify([layers, at])).toBe(
          expected,
        );
      }
    }
  });

  it('agree between the rate ratio, the rate difference and their score in random layers', () => {
    fc.assert(
      fc.property(rates, fc.constantFrom(0.5, 0.8, 0.95, 0.99), (layers, at) => {
        const statistic = rateScore(layers);
        if (Math.abs(statistic / criticalValue(at) ** 2 - 1) < 1e-9) return;
        const expected = statistic > criticalValue(at) ** 2;
        expect([
          excludes(pooledRateRatioInterval(layers, at), 1),
          excludes(pooledRateDifferenceInterval(layers, at), 0),
        ]).toEqual([expected, expected]);
      }),
      { numRuns: 1_000 },
    );
  });
});

describe('swapping the groups in every layer', () => {
  it('inverts pooled risk ratios and odds ratios, negates pooled differences, to the last bit', () => {
    fc.assert(
      fc.property(strata, level, (each, at) => {
        const other = each.map(swapped);
        for (const interval of [pooledRiskRatioInterval, pooledOddsRatioInterval]) {
          const { low, high } = interval(each, at);
          const mirrored = interval(other, at);
          expect(mirrored.high).toBe(low === 0 ? null : 1 / (low ?? NaN));
          expect(high).toBe(mirrored.low === 0 ? null : 1 / (mirrored.low ?? NaN));
        }
        const { low, high } = pooledRiskDifferenceInterval(each, at);
        const mirrored = pooledRiskDifferenceInterval(other, at);
        expect((mirrored.low ?? NaN) + (high ?? NaN)).toBe(0);
        expect((mirrored.high ?? NaN) + (low ?? NaN)).toBe(0);
        expect(pooledRiskDifference(each) + pooledRiskDifference(other)).toBe(0);
      }),
      { numRuns: 500 },
    );
  });

  it('inverts exact odds ratios and negates rate differences to the last bit', () => {
    fc.assert(
      fc.property(fc.array(smallTables, { minLength: 2, maxLength: 4 }), rates, level, (each, layers, at) => {
        const { low, high } = exactPooledOddsRatioInterval(each, at);
        const mirrored = exactPooledOddsRatioInterval(each.map(swapped), at);
        expect(mirrored.high).toBe(low === 0 ? null : 1 / (low ?? NaN));
        expect(high).toBe(mirrored.low === 0 ? null : 1 / (mirrored.low ?? NaN));
        const difference = pooledRateDifferenceInterval(layers, at);
        const negated = pooledRateDifferenceInterval(layers.map(swappedRates), at);
        expect((negated.low ?? NaN) + (difference.high ?? NaN)).toBe(0);
        expect((negated.high ?? NaN) + (difference.low ?? NaN)).toBe(0);
        expect(pooledRateDifference(layers) + pooledRateDifference(layers.map(swappedRates))).toBe(0);
      }),
      { numRuns: 300 },
    );
  });

  it('inverts pooled ratios from shares, score and exact, but for a few roundings', () => {
    fc.assert(
      fc.property(fc.array(pairs, { minLength: 2, maxLength: 4 }), level, (each, at) => {
        const other = each.map(({ cases, referenceCases, coverage, referenceCoverage }) => ({
          cases: referenceCases,
          referenceCases: cases,
          coverage: referenceCoverage,
          referenceCoverage: coverage,
        }));
        for (const interval of [pooledShareRatioInterval, exactPooledShareRatioInterval]) {
          const { low } = interval(each, at);
          const { high } = interval(other, at);
          if (low === 0 || high === null) expect([low, high]).toEqual([0, null]);
          else expect(Math.abs((low ?? NaN) * high - 1)).toBeLessThan(1e-12);
        }
      }),
      { numRuns: 200 },
    );
  });
});

describe('one layer', () => {
  /** Equal limits, `null` included, but for this part of them. */
  const same = (found: Interval, plain: Interval, part = 0) => {
    for (const side of ['low', 'high'] as const) {
      const [limit, expected] = [found[side], plain[side]];
      if (limit === null || expected === null) expect(limit).toBe(expected);
      else expect(Math.abs(limit - expected)).toBeLessThanOrEqual(part * Math.abs(expected));
    }
  };

  it('gives the plain intervals of counts, also beside layers in which one of the groups has nobody', () => {
    const nobody = countLayers([
      [3, 20, 0, 0],
      [0, 0, 0, 7],
    ]);
    fc.assert(
      fc.property(groups, level, (each, at) => {
        same(pooledRiskRatioInterval([each, ...nobody], at), riskRatioInterval(each, at));
        same(pooledRiskDifferenceInterval([each, ...nobody], at), riskDifferenceInterval(each, at));
        same(pooledOddsRatioInterval([each, ...nobody], at), oddsRatioInterval(each, at));
      }),
      { numRuns: 500 },
    );
  });

  it('gives the exact conditional interval of the odds ratio', () => {
    fc.assert(
      fc.property(smallTables, level, (each, at) => {
        same(exactPooledOddsRatioInterval([each], at), conditionalOddsRatioInterval(each, at), 1e-12);
      }),
      { numRuns: 300 },
    );
  });

  it('gives the plain ratio from shares, score and exact, also as two layers of equal coverage', () => {
    fc.assert(
      fc.property(pairs, caseCount, caseCount, level, (each, more, referenceMore, at) => {
        const rest = { ...each, cases: more, referenceCases: referenceMore };
        const whole = {
          ...each,
          cases: each.cases + more,
          referenceCases: each.referenceCases + referenceMore,
        };
        for (const layers of [[whole], [each, rest]]) {
          same(pooledShareRatioInterval(layers, at), shareRatioInterval(whole, at), 1e-12);
          same(exactPooledShareRatioInterval(layers, at), exactShareRatioInterval(whole, at), 1e-12);
        }
      }),
      { numRuns: 200 },
    );
  });

  it('gives the plain rate difference', () => {
    fc.assert(
      fc.property(rate, level, (each, at) => {
        same(pooledRateDifferenceInterval([each], at), rateDifferenceInterval(each, at));
      }),
      { numRuns: 300 },
    );
  });
});

describe('every pooled interval', () => {
  const inOrder = (values: readonly (number | null)[]) => {
    const found = values.map((value) => value ?? Number.MAX_VALUE);
    found.slice(1).forEach((value, at) => {
      const before = found[at] ?? NaN;
      expect(value).toBeGreaterThanOrEqual(before - 1e-12 * Math.abs(before));
    });
  };

  it('holds its estimate, lies within that of the next level, and is no NaN', () => {
    fc.assert(
      fc.property(strata, fc.array(pairs, { minLength: 1, maxLength: 4 }), (each, layers) => {
        const found: [(at: number) => Interval, number | null][] = [
          [(at) => pooledRiskRatioInterval(each, at), pooledRiskRatio(each)],
          [(at) => pooledRiskDifferenceInterval(each, at), pooledRiskDifference(each)],
          [(at) => pooledOddsRatioInterval(each, at), pooledOddsRatio(each)],
          [(at) => pooledShareRatioInterval(layers, at), pooledShareRatio(layers)],
          [(at) => exactPooledShareRatioInterval(layers, at), pooledShareRatio(layers)],
        ];
        for (const [interval, estimate] of found) {
          const [narrow, wide] = [interval(0.8), interval(0.99)];
          if (estimate !== null) inOrder([wide.low, narrow.low, estimate, narrow.high, wide.high]);
          else inOrder([wide.low, narrow.low, narrow.high, wide.high]);
        }
      }),
      { numRuns: 200 },
    );
  });
});
