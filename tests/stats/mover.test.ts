import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import { caseOddsInterval } from '../../src/stats/case-odds-interval.ts';
import { moverRatioInterval } from '../../src/stats/mover-ratio-interval.ts';
import { both, fixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';

type Three = readonly [number, number | null, number | null];

/** Ratios of two estimates, from the formula at 60 digits; see tests/fixtures/reference/make-coverage-limits.py, which records its versions. */
const { mover } = fixture<{
  readonly mover: readonly {
    readonly numerator: Three;
    readonly denominator: Three;
    readonly limits: Pair;
  }[];
}>('coverage-limits.json');
const estimated = ([estimate, low, high]: Three) => ({ estimate, low, high });

describe('MOVER limits of a ratio (Zou & Donner 2008)', () => {
  it('are those of 60-digit arithmetic (mpmath) to 1e-13, with ends of 0, missing ends and no width', () => {
    const found = worst(mover, ({ numerator, denominator, limits }) =>
      both(moverRatioInterval(estimated(numerator), estimated(denominator)), limits),
    );
    expect(mover).toHaveLength(10);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-13);
  });

  it('are 1.42553696052 to 3.77119843987 for 44 and 31 at 38% (34 to 42) (design review, section 4)', () => {
    const odds = { estimate: 44 / 31, ...caseOddsInterval(44, 31, 0.95) };
    const coverage = { estimate: 0.38 / 0.62, low: 0.34 / 0.66, high: 0.42 / 0.58 };
    expect(both(moverRatioInterval(odds, coverage), ['1.42553696052', '3.77119843987'])).toBeLessThan(6e-12);
  });

  it.each([
    ['an estimate outside its limits', { estimate: 5, low: 1, high: 4 }],
    ['an estimate of 0', { estimate: 0, low: 0, high: 4 }],
  ])('refuse %s', (_, numerator) => {
    const call = () => moverRatioInterval(numerator, { estimate: 5, low: 1, high: 6 });
    expect(call).toThrow(ArgumentError);
    expect(call).toThrow(expect.objectContaining({ code: 'limits-out-of-order' }));
  });
});
