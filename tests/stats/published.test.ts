import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { exactShareRatioInterval, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

interface Row {
  readonly method:
    | 'wilson'
    | 'clopperPearson'
    | 'riskRatio'
    | 'riskDifference'
    | 'oddsRatio'
    | 'conditionalOddsRatio'
    | 'exactRateRatio';
  readonly input: readonly number[];
  readonly printed: readonly [string | null, string | null];
  readonly source: string;
}
const rows = JSON.parse(
  readFileSync(new URL('../fixtures/reference/published.json', import.meta.url), 'utf8'),
) as readonly Row[];

function limitsOf({ method, input }: Row): Interval {
  const [a = NaN, b = NaN, c = NaN, d = NaN] = input;
  const groups = { cases: a, total: b, referenceCases: c, referenceTotal: d };
  switch (method) {
    case 'wilson':
      return wilsonInterval(a, b, 0.95);
    case 'clopperPearson':
      return clopperPearsonInterval(a, b, 0.95);
    case 'riskRatio':
      return riskRatioInterval(groups, 0.95);
    case 'riskDifference':
      return riskDifferenceInterval(groups, 0.95);
    case 'oddsRatio':
      return oddsRatioInterval(groups, 0.95);
    case 'conditionalOddsRatio':
      return conditionalOddsRatioInterval(groups, 0.95);
    case 'exactRateRatio':
      return exactShareRatioInterval(
        { cases: a, referenceCases: c, coverage: b / (b + d), referenceCoverage: d / (b + d) },
        0.95,
      );
  }
}

/** Right to the digits printed: within half a unit in the last place (and a hair for figures that end in a 5). */
function asPrinted(limit: number | null, printed: string | null): void {
  if (printed === null) return expect(limit).toBeNull();
  const decimals = printed.split('.')[1]?.length ?? 0;
  expect(Math.abs((limit ?? NaN) - Number(printed)), `${limit} for ${printed}`).toBeLessThanOrEqual(
    0.5000001 * 10 ** -decimals,
  );
}

describe('printed intervals come out to the digits printed', () => {
  it.each(rows)('$method of $input: $printed ($source)', (row) => {
    const { low, high } = limitsOf(row);
    asPrinted(low, row.printed[0]);
    asPrinted(high, row.printed[1]);
  });
});

describe('the screening method against print', () => {
  /** Campbell et al. 2012, Emerging Infectious Diseases, Table 5: VE from exact limits of vaccinated cases of all cases. Coverage is not printed; it follows from the printed VE. */
  const campbell = [
    [28, 29, -41.3, -5679, 76.6],
    [88, 108, 90.4, 83.4, 94.1],
    [463, 500, 72.1, 59.9, 80.1],
    [26, 33, 91.0, 75.4, 96.2],
    [2, 4, 97.7, 67.6, 99.8],
    [118, 146, 90.5, 85.1, 93.8],
    [491, 529, 69.3, 56.1, 78.0],
  ] as const;

  it.each(campbell)(
    '%i of %i cases vaccinated: VE %d%% (%d to %d), Campbell 2012',
    (vaccinated, all, effectiveness, low, high) => {
      const cases = { cases: vaccinated, referenceCases: all - vaccinated };
      // The printed VE was rounded to 0.05 points either way; a printed limit must lie between those of its two ends.
      const ends = [effectiveness - 0.05, effectiveness + 0.05].map((percent) => {
        const ratio = 1 - percent / 100;
        const coverageOdds = vaccinated / (all - vaccinated) / ratio;
        const coverage = coverageOdds / (1 + coverageOdds);
        return exactShareRatioInterval({ ...cases, coverage, referenceCoverage: 1 - coverage }, 0.95);
      });
      const between = (printed: number, limits: readonly (number | null)[], decimals: number) => {
        const values = limits.map((limit) => 100 * (1 - (limit ?? NaN)));
        const half = 0.5 * 10 ** -decimals;
        expect(printed).toBeGreaterThanOrEqual(Math.min(...values) - half);
        expect(printed).toBeLessThanOrEqual(Math.max(...values) + half);
      };
      between(
        low,
        ends.map(({ high: limit }) => limit),
        Number.isInteger(low) ? 0 : 1,
      );
      between(
        high,
        ends.map(({ low: limit }) => limit),
        1,
      );
    },
  );

  it('at coverage c and VE v has the share of cases c(1-v)/(1-cv): 0.09, 0.29, 0.47, 0.66, 0.31, 0.32 (Orenstein 1985, from memory)', () => {
    const pairs = [
      [0.5, 0.9],
      [0.8, 0.9],
      [0.9, 0.9],
      [0.95, 0.9],
      [0.9, 0.95],
      [0.7, 0.8],
    ] as const;
    const printed = [0.09, 0.29, 0.47, 0.66, 0.31, 0.32];
    pairs.forEach(([coverage, effectiveness], at) => {
      const share = printed[at] ?? NaN;
      const { low, high } = shareRatioInterval(
        {
          cases: (share - 0.005) * 1e6,
          referenceCases: (1 - share + 0.005) * 1e6,
          coverage,
          referenceCoverage: 1 - coverage,
        },
        0.5,
      );
      const upper = shareRatioInterval(
        {
          cases: (share + 0.005) * 1e6,
          referenceCases: (1 - share - 0.005) * 1e6,
          coverage,
          referenceCoverage: 1 - coverage,
        },
        0.5,
      );
      expect(1 - effectiveness).toBeGreaterThanOrEqual(low ?? NaN);
      expect(1 - effectiveness).toBeLessThanOrEqual(upper.high ?? NaN);
      expect(high).not.toBeNull();
    });
  });
});
