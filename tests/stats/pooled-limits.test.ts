import { describe, expect, it } from 'vitest';
import { cochranMantelHaenszel } from '../../src/stats/cochran-mantel-haenszel.ts';
import {
  rateRatioHomogeneity,
  riskRatioHomogeneity,
  shareRatioHomogeneity,
} from '../../src/stats/homogeneity.ts';
import type { ChiSquaredTest } from '../../src/stats/homogeneity.ts';
import { overallChiSquared, overallShareChiSquared } from '../../src/stats/overall-chi-squared.ts';
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
  exactPooledRateRatioInterval,
  exactPooledShareRatioInterval,
  pooledRateRatio,
  pooledRateRatioInterval,
  pooledShareRatio,
  pooledShareRatioInterval,
} from '../../src/stats/pooled-share-ratio.ts';
import { standardisedRiskRatioInterval, standardisedRisks } from '../../src/stats/standardised-risk-ratio.ts';
import { both, differenceError, errorOf, fixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';
import { countLayers, rateLayers, shareLayers } from './pooled-layers.ts';
import type { Four } from './pooled-layers.ts';

interface Tested {
  readonly statistic: string;
  readonly degrees: number;
  readonly pValue: string;
}
interface Standardised {
  readonly risks: Pair;
  readonly ratio: string | null;
  readonly limits: Readonly<Record<string, Pair>>;
}
interface CaseLimits {
  readonly level: string;
  readonly score: Pair;
  readonly exact?: Pair;
}
interface CaseSet<Limits = CaseLimits> {
  readonly name: string;
  readonly layers: readonly Four[];
  readonly ratio: string | null;
  readonly alike: Tested | null;
  readonly limits: readonly Limits[];
}
interface Groups extends Tested {
  readonly groups: readonly (readonly [number, number])[];
}
/** Values from 60-digit arithmetic; see tests/fixtures/reference/make-pooled-limits.py, which records its versions. */
const reference = fixture<{
  readonly counts: readonly {
    readonly name: string;
    readonly layers: readonly Four[];
    readonly riskRatio: string | null;
    readonly riskDifference: string;
    readonly oddsRatio: string | null;
    readonly cochranMantelHaenszel: string;
    readonly alike: Tested | null;
    readonly standardised: Readonly<Record<'whole' | 'group' | 'reference', Standardised>>;
    readonly limits: readonly {
      readonly level: string;
      readonly riskRatio: Pair;
      readonly riskDifference: Pair;
      readonly oddsRatio: Pair;
      readonly exactOddsRatio: Pair | null;
    }[];
  }[];
  readonly shares: readonly CaseSet[];
  readonly rates: readonly (CaseSet<CaseLimits & { readonly difference: Pair }> & {
    readonly difference: string;
  })[];
  readonly overall: readonly Groups[];
  readonly overallShares: readonly Groups[];
}>('pooled-limits.json');

/** The bar is 1e-9; what is promised and held is this. */
const measured = 1e-12;

const { counts, shares, rates } = reference;
/** Each set of layers with each of its levels. */
const countRows = counts.flatMap(({ name, layers, limits }) =>
  limits.map((row) => ({ name, layers, ...row })),
);
const shareRows = shares.flatMap(({ name, layers, limits }) =>
  limits.map((row) => ({ name, layers, ...row })),
);
const rateRows = rates.flatMap(({ name, layers, limits }) => limits.map((row) => ({ name, layers, ...row })));

function hold<T>(rows: readonly T[], error: (row: T) => number, bar = measured): void {
  expect(rows.length).toBeGreaterThan(0);
  const found = worst(rows, error);
  expect(found.error, JSON.stringify(found.row)).toBeLessThan(bar);
}

/** The error of a statistic and its p value; infinite where the degrees of freedom differ, or one of the two has no test. */
function testError(found: ChiSquaredTest | null, expected: Tested | null): number {
  if (found === null || expected === null) return found === expected ? 0 : Infinity;
  if (found.degrees !== expected.degrees) return Infinity;
  return Math.max(errorOf(found.statistic, expected.statistic), errorOf(found.pValue, expected.pValue));
}

describe('pooled counts against 60-digit arithmetic (mpmath)', () => {
  it('cover every edge at five levels from 50% to 99.99%', () => {
    expect(new Set(countRows.map(({ level }) => level))).toEqual(
      new Set(['0.5', '0.8', '0.95', '0.99', '0.9999']),
    );
    const layers = counts.flatMap((set) => set.layers);
    expect(layers.some(([, n]) => n === 1)).toBe(true);
    expect(layers.some(([, , , n]) => n === 0)).toBe(true);
    expect(layers.some(([x, n]) => n === 1e6 && x > 3e5)).toBe(true);
    expect(counts.some((set) => set.layers.every(([x]) => x === 0))).toBe(true);
    expect(counts.some((set) => set.layers.every(([, , x]) => x === 0))).toBe(true);
    expect(counts.length).toBeGreaterThan(35);
  });

  it('are right for the estimates and the Cochran-Mantel-Haenszel statistic', () => {
    hold(counts, ({ layers, riskRatio }) => errorOf(pooledRiskRatio(countLayers(layers)), riskRatio));
    hold(counts, ({ layers, oddsRatio }) => errorOf(pooledOddsRatio(countLayers(layers)), oddsRatio));
    // A difference has no more digits than the risks that it comes from.
    hold(counts, ({ layers, riskDifference }) =>
      errorOf(
        pooledRiskDifference(countLayers(layers)),
        riskDifference,
        Math.max(Math.abs(Number(riskDifference)), 1e-9),
      ),
    );
    hold(counts, ({ layers, cochranMantelHaenszel: statistic }) =>
      errorOf(cochranMantelHaenszel(countLayers(layers)), statistic, Math.max(Number(statistic), 1e-12)),
    );
  });

  it('are right for the limits of the risk ratio', () => {
    hold(countRows, ({ layers, level, riskRatio }) =>
      both(pooledRiskRatioInterval(countLayers(layers), Number(level)), riskRatio),
    );
  });

  it('are right for the limits of the risk difference, in units of the larger of the limit and the width', () => {
    hold(countRows, ({ layers, level, riskDifference }) =>
      differenceError(pooledRiskDifferenceInterval(countLayers(layers), Number(level)), riskDifference),
    );
  });

  it('are right for the conditional score limits of the odds ratio, large layers by fitted counts', () => {
    hold(countRows, ({ layers, level, oddsRatio }) =>
      both(pooledOddsRatioInterval(countLayers(layers), Number(level)), oddsRatio),
    );
  });

  it('are right for the exact limits of the odds ratio', () => {
    hold(
      countRows.filter(({ exactOddsRatio }) => exactOddsRatio !== null),
      ({ layers, level, exactOddsRatio }) =>
        both(
          exactPooledOddsRatioInterval(countLayers(layers), Number(level)),
          exactOddsRatio ?? [null, null],
        ),
    );
  });

  it('are right for the test whether the risk ratios are alike, to fewer digits where next to all are cases', () => {
    const error = ({ layers, alike }: (typeof counts)[number]) =>
      testError(riskRatioHomogeneity(countLayers(layers)), alike);
    hold(counts, error, 1e-7);
    hold(
      counts.filter(({ name }) => !/all but full|in parts/.test(name)),
      error,
    );
  });

  it.each(['whole', 'group', 'reference'] as const)(
    'are right for risks standardised to the %s',
    (standard) => {
      hold(counts, ({ layers, standardised }) => {
        const { risk, referenceRisk, ratio } = standardisedRisks(countLayers(layers), standard);
        const expected = standardised[standard];
        return Math.max(
          both({ low: risk, high: referenceRisk }, expected.risks),
          errorOf(ratio, expected.ratio),
        );
      });
      hold(countRows, ({ name, layers, level }) => {
        const found = standardisedRiskRatioInterval(countLayers(layers), standard, Number(level));
        const expected = counts.find((set) => set.name === name)?.standardised[standard].limits[level];
        if (found === null || expected === undefined) return found === (expected ?? null) ? 0 : Infinity;
        return both(found, expected);
      });
    },
  );
});

describe('pooled shares and rates against 60-digit arithmetic (mpmath)', () => {
  it('cover coverages of one in a million and all but one in a million', () => {
    const coverages = shares.flatMap(({ layers }) => layers.map(([, coverage]) => coverage));
    expect(Math.min(...coverages)).toBe(1e-6);
    expect(Math.max(...coverages)).toBe(1 - 1e-6);
    expect(shares.length).toBeGreaterThan(30);
  });

  it('are right for the estimates', () => {
    hold(shares, ({ layers, ratio }) => errorOf(pooledShareRatio(shareLayers(layers)), ratio));
    hold(rates, ({ layers, ratio }) => errorOf(pooledRateRatio(rateLayers(layers)), ratio));
    hold(rates, ({ layers, difference }) => errorOf(pooledRateDifference(rateLayers(layers)), difference));
  });

  it('are right for the score limits of the ratio, the outermost root where there are several', () => {
    hold(shareRows, ({ layers, level, score }) =>
      both(pooledShareRatioInterval(shareLayers(layers), Number(level)), score),
    );
    hold(rateRows, ({ layers, level, score }) =>
      both(pooledRateRatioInterval(rateLayers(layers), Number(level)), score),
    );
  });

  it('are right for the exact limits of the ratio', () => {
    hold(
      shareRows.filter(({ exact }) => exact !== undefined),
      ({ layers, level, exact }) =>
        both(exactPooledShareRatioInterval(shareLayers(layers), Number(level)), exact ?? [null, null]),
    );
    hold(
      rateRows.filter(({ exact }) => exact !== undefined),
      ({ layers, level, exact }) =>
        both(exactPooledRateRatioInterval(rateLayers(layers), Number(level)), exact ?? [null, null]),
    );
  });

  it('are right for the limits of the rate difference, in units of the larger of the limit and the width', () => {
    hold(rateRows, ({ layers, level, difference }) =>
      differenceError(pooledRateDifferenceInterval(rateLayers(layers), Number(level)), difference),
    );
  });

  it('are right for the test whether the ratios are alike', () => {
    hold(shares, ({ layers, alike }) => testError(shareRatioHomogeneity(shareLayers(layers)), alike));
    hold(rates, ({ layers, alike }) => testError(rateRatioHomogeneity(rateLayers(layers)), alike));
  });
});

describe('the test whether several groups differ at all against 60-digit arithmetic (mpmath)', () => {
  it('is right for counts, also where next to all of a thousand million are cases', () => {
    hold(reference.overall, ({ groups, ...expected }) =>
      testError(overallChiSquared(groups.map(([cases, total]) => ({ cases, total }))), expected),
    );
  });

  it('is right for cases beside the sizes of their groups', () => {
    hold(reference.overallShares, ({ groups, ...expected }) =>
      testError(overallShareChiSquared(groups.map(([cases, size]) => ({ cases, size }))), expected),
    );
  });
});
