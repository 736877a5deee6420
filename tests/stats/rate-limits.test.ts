import { describe, expect, it } from 'vitest';
import { chiSquaredUpperTail, gammaLowerTail, gammaUpperTail } from '../../src/stats/gamma-tail.ts';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { rateDifferenceInterval } from '../../src/stats/rate-difference-interval.ts';
import { rateRatioInterval } from '../../src/stats/rate-ratio.ts';
import { rateScoreInterval } from '../../src/stats/rate-score-interval.ts';
import { fayFeuerInterval, standardisedRate } from '../../src/stats/standardised-rate.ts';
import { both, differenceError, errorOf, fixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';

interface Rates {
  readonly single: readonly {
    readonly events: number;
    readonly level: string;
    readonly garwood?: Pair;
    readonly score: Pair;
  }[];
  readonly pairs: readonly {
    readonly table: readonly [number, number, number, number];
    readonly level: string;
    readonly difference: Pair;
    readonly ratio?: Pair;
  }[];
  readonly standardised: readonly {
    readonly layers: readonly (readonly [number, number, number])[];
    readonly level: string;
    readonly limits: readonly [string, string, string];
  }[];
  readonly gammaTails: readonly {
    readonly shape: number;
    readonly x: number;
    readonly lower: string;
    readonly upper: string;
  }[];
  readonly chiSquaredTails: readonly {
    readonly statistic: number;
    readonly degrees: number;
    readonly upper: string;
  }[];
}
const reference = fixture<Rates>('rate-limits.json');

const pairOf = ([cases, exposure, referenceCases, referenceExposure]: Rates['pairs'][number]['table']) => ({
  cases,
  exposure,
  referenceCases,
  referenceExposure,
});

describe('limits of rates against 60-digit arithmetic (mpmath)', () => {
  it('are right for a single rate, exact (Garwood)', () => {
    const rows = reference.single.filter(({ garwood }) => garwood !== undefined);
    const found = worst(rows, ({ events, level, garwood }) =>
      both(garwoodInterval(events, 1, Number(level)), garwood ?? [null, null]),
    );
    expect(rows.length).toBeGreaterThan(70);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('are right for a single rate, score', () => {
    const found = worst(
      reference.single.filter(({ events }) => events > 0),
      ({ events, level, score }) => both(rateScoreInterval(events, 1, Number(level)), score),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
    expect(rateScoreInterval(0, 1, 0.95).low).toBe(0);
  });

  it('are right for rate ratios', () => {
    const rows = reference.pairs.filter(({ ratio }) => ratio !== undefined);
    const found = worst(rows, ({ table, level, ratio }) =>
      both(rateRatioInterval(pairOf(table), Number(level)), ratio ?? [null, null]),
    );
    expect(rows.length).toBeGreaterThan(40);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('are right for rate differences, in units of the larger of the limit and the width', () => {
    const found = worst(reference.pairs, ({ table, level, difference }) =>
      differenceError(rateDifferenceInterval(pairOf(table), Number(level)), difference),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('are right for standardised rates (Fay-Feuer)', () => {
    const found = worst(reference.standardised, ({ layers, level, limits: [rate, low, high] }) => {
      const weighted = layers.map(([cases, exposure, weight]) => ({ cases, exposure, weight }));
      return Math.max(
        errorOf(standardisedRate(weighted), rate),
        both(fayFeuerInterval(weighted, Number(level)), [low, high]),
      );
    });
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-11);
  });
});

describe('distribution functions against 60-digit arithmetic over the domain used', () => {
  it('hold for both tails of the gamma distribution', () => {
    const found = worst(reference.gammaTails, ({ shape, x, lower, upper }) =>
      Math.max(
        Math.abs(gammaLowerTail(shape, x) - Number(lower)) / Math.max(Number(lower), x < shape ? 0 : 0.5),
        Math.abs(gammaUpperTail(shape, x) - Number(upper)) / Math.max(Number(upper), x > shape + 1 ? 0 : 0.5),
      ),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('hold for p values of chi-squared statistics', () => {
    const found = worst(reference.chiSquaredTails, ({ statistic, degrees, upper }) =>
      errorOf(chiSquaredUpperTail(statistic, degrees), upper),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
    expect(chiSquaredUpperTail(0, 3)).toBe(1);
  });
});
