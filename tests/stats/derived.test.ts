import { describe, expect, it } from 'vitest';
import {
  attributableFraction,
  populationAttributableFraction,
  preventedFraction,
} from '../../src/stats/attributable-fraction.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import { oneExtraPer } from '../../src/stats/one-extra-per.ts';
import { shareRatio } from '../../src/stats/share-ratio.ts';

describe('what follows from a ratio', () => {
  it('has the values of Boice & Monson as printed by Rothman (attributable fraction 0.4611 at 1.855759) and VanderWeele & Ding 2017 (7.26 at 3.9, 3.0 at 1.8)', () => {
    expect(attributableFraction(1.855759)).toBeCloseTo(0.4611, 4);
    expect(hiddenCauseStrength(3.9)).toBeCloseTo(7.26, 2);
    expect(hiddenCauseStrengthAtLimit({ low: 1.8, high: 8.7 })).toBeCloseTo(3.0, 1);
    expect(hiddenCauseStrength(1 / 3.9)).toBeCloseTo(7.26, 2);
  });

  it('is 1 where the interval holds no difference, and nothing at a ratio of 0', () => {
    expect(hiddenCauseStrengthAtLimit({ low: 0.8, high: null })).toBe(1);
    expect(hiddenCauseStrength(0)).toBeNull();
    expect(attributableFraction(0)).toBeNull();
    expect(preventedFraction(0.25)).toBe(0.75);
  });

  it('gives 0.333333333333 (0.151072836463 to 0.5019721108) of all cases for 44 and 31 at 38% (design review)', () => {
    const through = (ratio: number) => populationAttributableFraction(ratio, 0.38);
    expect(
      through(shareRatio({ cases: 44, referenceCases: 31, coverage: 0.38, referenceCoverage: 0.62 }) ?? NaN),
    ).toBeCloseTo(1 / 3, 12);
    expect(through(1.46830884089)).toBeCloseTo(0.151072836463, 10);
    expect(through(3.65242021098)).toBeCloseTo(0.5019721108, 10);
  });

  it('runs through infinity as Altman 1998 prints it: 10% (-5% to 25%) is one for 10, from 4 up, or one fewer from 20 up', () => {
    const { estimate, interval, ranges } = oneExtraPer(0.1, { low: -0.05, high: 0.25 });
    expect(estimate).toBeCloseTo(10, 12);
    expect(interval).toBeNull();
    expect(ranges).toEqual({ more: { low: 4, high: null }, fewer: { low: 20, high: null } });
  });
});
