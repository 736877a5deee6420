import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import { nMinusOneChiSquared } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

/** Values from R, SciPy and statsmodels; the makers beside the fixtures record the versions. */
const read = <T>(name: string) =>
  JSON.parse(readFileSync(new URL(`../fixtures/reference/${name}`, import.meta.url), 'utf8')) as T;
type Pair = readonly [number | string | null, number | string | null];
type Table = readonly [number, number, number, number];

const r = read<{
  single: { cases: number; total: number; level: number; wilson: Pair; clopperPearson: Pair }[];
  shares: { cases: number; referenceCases: number; coverage: number; level: number; exact: Pair }[];
  tables: { table: Table; conditional: Pair; nMinusOneChiSquared: number }[];
}>('r-limits.json');
const scipy = read<{
  quantiles: { level: number; z: string }[];
  single: { cases: number; total: number; level: number; wilson: Pair; beta: Pair; clopperPearson: Pair }[];
  tables: { table: Table; level: number; riskRatio: Pair; oddsRatio: Pair }[];
}>('scipy-limits.json');

const groupsOf = ([cases, total, referenceCases, referenceTotal]: Table) => ({
  cases,
  total,
  referenceCases,
  referenceTotal,
});

function near(
  { low, high }: { readonly low: number | null; readonly high: number | null },
  [expectedLow, expectedHigh]: Pair,
  relative: number,
): void {
  for (const [limit, expected] of [
    [low, expectedLow],
    [high, expectedHigh],
  ] as const) {
    const gap = Math.abs((limit ?? NaN) - Number(expected));
    expect(gap, `${limit} for ${expected}`).toBeLessThanOrEqual(
      relative * Math.max(Math.abs(Number(expected)), 1e-12),
    );
  }
}

describe('limits against R', () => {
  it.each(r.single)(
    'prop.test and binom.test: $cases of $total at $level',
    ({ cases, total, level, wilson, clopperPearson }) => {
      near(wilsonInterval(cases, total, level), wilson, 1e-9);
      near(clopperPearsonInterval(cases, total, level), clopperPearson, 1e-9);
    },
  );

  it.each(r.shares)(
    'poisson.test: $cases and $referenceCases, coverage $coverage, at $level',
    ({ cases, referenceCases, coverage, level, exact }) => {
      near(
        exactShareRatioInterval({ cases, referenceCases, coverage, referenceCoverage: 1 - coverage }, level),
        exact,
        1e-9,
      );
    },
  );

  it.each(r.tables)(
    'fisher.test (good to about three digits) and chisq.test: $table',
    ({ table, conditional, nMinusOneChiSquared: statistic }) => {
      near(conditionalOddsRatioInterval(groupsOf(table), 0.95), conditional, 5e-3);
      expect(Math.abs(nMinusOneChiSquared(groupsOf(table)) / statistic - 1)).toBeLessThan(1e-12);
    },
  );
});

describe('limits against SciPy and statsmodels', () => {
  it.each(scipy.quantiles)('norm.isf at $level', ({ level, z }) => {
    expect(Math.abs(criticalValue(level) / Number(z) - 1)).toBeLessThan(1e-12);
  });

  it.each(scipy.single)(
    'proportion_confint (wilson, beta) and binomtest (its search stops early): $cases of $total at $level',
    ({ cases, total, level, wilson, beta, clopperPearson }) => {
      near(wilsonInterval(cases, total, level), wilson, 1e-12);
      near(clopperPearsonInterval(cases, total, level), beta, 1e-12);
      near(clopperPearsonInterval(cases, total, level), clopperPearson, 1e-6);
    },
  );

  it.each(scipy.tables)(
    'confint_proportions_2indep (ratio and odds-ratio, score; its search stops early): $table at $level',
    ({ table, level, riskRatio, oddsRatio }) => {
      near(riskRatioInterval(groupsOf(table), level), riskRatio, 1e-5);
      near(oddsRatioInterval(groupsOf(table), level), oddsRatio, 1e-5);
    },
  );
});
