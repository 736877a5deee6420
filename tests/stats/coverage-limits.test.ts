import { describe, expect, it } from 'vitest';
import { ArgumentError } from '../../src/stats/argument-error.ts';
import { populationAttributableFraction } from '../../src/stats/attributable-fraction.ts';
import { coverageByPeriodInterval, coverageByPeriodRatio } from '../../src/stats/coverage-by-period.ts';
import { coverageSensitivity } from '../../src/stats/coverage-sensitivity.ts';
import { dividedByDesignEffect } from '../../src/stats/design-effect.ts';
import { effectiveSample } from '../../src/stats/effective-sample.ts';
import {
  hullOfGrowth,
  ratioUnderConstantRisk,
  ratioUnderEvenCases,
} from '../../src/stats/growing-coverage.ts';
import type { RatioUnder } from '../../src/stats/growing-coverage.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { rateRatioInterval } from '../../src/stats/rate-ratio.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import {
  sampledCoverageRatio,
  sampledCoverageRatioInterval,
  sampledPopulationFraction,
  sampledPopulationFractionInterval,
} from '../../src/stats/sampled-coverage.ts';
import { shareRatio, shareRatioInterval } from '../../src/stats/share-ratio.ts';
import { unknownGroupBounds } from '../../src/stats/unknown-group-bounds.ts';
import { both, differenceError, errorOf, fixture, worst } from './error-of.ts';
import type { Pair } from './error-of.ts';

interface Under {
  readonly estimate: string | null;
  readonly limits: Pair;
}
/** Values from 40- to 120-digit arithmetic; see tests/fixtures/reference/make-coverage-limits.py, which records its versions. */
const reference = fixture<{
  readonly growing: readonly {
    readonly cases: readonly [number, number];
    readonly coverages: readonly [number, number];
    readonly level: string;
    readonly constant: Under;
    readonly even: Under;
  }[];
  readonly periods: readonly {
    readonly cases: number;
    readonly periods: readonly (readonly [number, number])[];
    readonly level: string;
    readonly ratio: string | null;
    readonly limits: Pair;
  }[];
  readonly sampled: readonly {
    readonly cases: readonly [number, number];
    readonly sample: readonly [number, number];
    readonly level: string;
    readonly ratio: string | null;
    readonly limits: Pair;
    readonly fraction: string | null;
    readonly fractionLimits: Pair;
  }[];
  readonly effective: readonly {
    readonly share: number;
    readonly limits: readonly [number, number];
    readonly level: string;
    readonly size: string;
  }[];
  readonly unknown: readonly {
    readonly cases: readonly [number, number, number];
    readonly coverage: number;
    readonly level: string;
    readonly likeTheKnown: string | null;
    readonly estimates: Pair;
    readonly limits: Pair;
  }[];
  readonly clusters: readonly {
    readonly designEffect: number;
    readonly level: string;
    readonly riskRatio: Pair;
    readonly oddsRatio: Pair;
    readonly shareRatio: Pair;
    readonly rateRatio: Pair;
  }[];
  readonly sensitivity: readonly { readonly coverage: number; readonly slope: string }[];
}>('coverage-limits.json');

/** The sharpest that values printed with 12 digits can be held to. */
const printed = 6e-12;
const shares = (cases: number, referenceCases: number, coverage: number) => ({
  cases,
  referenceCases,
  coverage,
  referenceCoverage: 1 - coverage,
});
const periodsOf = (periods: readonly (readonly [number, number])[]) =>
  periods.map(([allCases, coverage]) => ({ allCases, coverage }));
const sampleOf = (
  [cases, referenceCases]: readonly [number, number],
  [sampledInGroup, sampled]: readonly [number, number],
) => ({ cases, referenceCases, sampledInGroup, sampled });
const growthOf = (
  [cases, referenceCases]: readonly [number, number],
  [start, end]: readonly [number, number],
) => ({ cases, referenceCases, start, end });
const underError = ({ estimate, interval }: RatioUnder, expected: Under) =>
  Math.max(errorOf(estimate, expected.estimate), both(interval, expected.limits));
/** A fraction and its limits in units of the larger of the limit and the width; without a lower limit in those of the limit. */
const fractionError = (interval: Interval, limits: Pair) =>
  limits[0] === null ? both(interval, limits) : differenceError(interval, limits);
describe('coverage that grew or fell, against 40-digit arithmetic (mpmath)', () => {
  it('gives the ratio under a constant risk to 1e-13, for growth, fall, growth from 0, to 1 and of zero width, near 0 and near 1', () => {
    const found = worst(reference.growing, ({ cases, coverages, level, constant }) =>
      underError(ratioUnderConstantRisk(growthOf(cases, coverages), Number(level)), constant),
    );
    expect(reference.growing).toHaveLength(74);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-13);
  });

  it('gives the ratio under even cases to 1e-12 of what quadrature over the coverage gives, in the same cases', () => {
    const found = worst(reference.growing, ({ cases, coverages, level, even }) =>
      underError(ratioUnderEvenCases(growthOf(cases, coverages), Number(level)), even),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('gives one ratio under both assumptions where the growth has zero width', () => {
    const from = growthOf([8, 67], [0.3, 0.3]);
    const [constant, even] = [ratioUnderConstantRisk(from, 0.95), ratioUnderEvenCases(from, 0.95)];
    expect(even.estimate).toBeCloseTo(constant.estimate ?? NaN, 13);
    expect(even.interval.low).toBeCloseTo(constant.interval.low ?? NaN, 13);
    expect(even.interval.high).toBeCloseTo(constant.interval.high ?? NaN, 13);
  });

  it('gives the same ratio for a fall as for the growth the other way round, and one over it when the groups change places', () => {
    const from = growthOf([8, 67], [0.125, 0.75]);
    const { estimate, interval } = ratioUnderEvenCases(from, 0.95);
    const fall = ratioUnderEvenCases({ ...from, start: from.end, end: from.start }, 0.95);
    expect(fall.estimate).toBeCloseTo(estimate ?? NaN, 14);
    const swapped = ratioUnderEvenCases(growthOf([67, 8], [0.875, 0.25]), 0.95);
    expect(swapped.estimate).toBeCloseTo(1 / (estimate ?? NaN), 12);
    expect(swapped.interval.low).toBeCloseTo(1 / (interval.high ?? NaN), 12);
    expect(swapped.interval.high).toBeCloseTo(1 / (interval.low ?? NaN), 11);
  });

  it('has a hull that reaches as far as either assumption, and no end where one has none', () => {
    expect(hullOfGrowth({ low: 1, high: 4 }, { low: 2, high: 5 })).toEqual({ low: 1, high: 5 });
    expect(hullOfGrowth({ low: 0, high: null }, { low: 2, high: 5 })).toEqual({ low: 0, high: null });
    expect(hullOfGrowth({ low: 1, high: 4 }, { low: null, high: 3 })).toEqual({ low: null, high: 4 });
  });

  it('is 0.0830295801649 (0.0379296512881 to 0.190641813856) for 8 of 75 cases at 5 to 90%, 0.131971720346 by the mean and 0.0132669983416 by the closing coverage (design review, section 6)', () => {
    const from = growthOf([8, 67], [0.05, 0.9]);
    const even = { estimate: '0.0830295801649', limits: ['0.0379296512881', '0.190641813856'] } as const;
    expect(underError(ratioUnderEvenCases(from, 0.95), even)).toBeLessThan(printed);
    expect(errorOf(ratioUnderConstantRisk(from, 0.95).estimate, '0.131971720346')).toBeLessThan(printed);
    expect(errorOf(shareRatio(shares(8, 67, 0.9)), '0.0132669983416')).toBeLessThan(printed);
  });

  it('is 1.06028099946 (0.655357364912 to 1.71970368042) for 31 of 75 cases at 20 to 60%, 1.05681818182 by the mean (design review, section 6)', () => {
    const from = growthOf([31, 44], [0.2, 0.6]);
    const even = { estimate: '1.06028099946', limits: ['0.655357364912', '1.71970368042'] } as const;
    expect(underError(ratioUnderEvenCases(from, 0.95), even)).toBeLessThan(printed);
    expect(errorOf(ratioUnderConstantRisk(from, 0.95).estimate, '1.05681818182')).toBeLessThan(printed);
  });

  it.each([
    [0.2, 0.6, [1.09, 1.08, 1.07, 1.04, 1, 0.96, 0.92]],
    [0.05, 0.9, [1.67, 1.56, 1.41, 1.18, 1, 0.85, 0.69]],
  ])(
    'is overstated by the mean coverage from %d to %d, where cases are even, by the factors %j at ratios of 0.05 to 5 to 0.006 (design review, section 2.3)',
    (start, end, factors) => {
      [0.05, 0.1, 0.2, 0.5, 1, 2, 5].forEach((ratio, at) => {
        // Cases that a Riemann sum over 100,000 coverages gives the group and the rest.
        let own = 0;
        for (let i = 0; i < 100_000; i += 1) {
          const coverage = start + ((end - start) * (i + 0.5)) / 100_000;
          own += (ratio * coverage) / (1 - coverage + ratio * coverage);
        }
        const from = growthOf([own, 100_000 - own], [start, end]);
        expect(ratioUnderEvenCases(from, 0.95).estimate).toBeCloseTo(ratio, 7);
        const factor = (ratioUnderConstantRisk(from, 0.95).estimate ?? NaN) / ratio;
        expect(Math.abs(factor - (factors[at] ?? NaN))).toBeLessThan(0.006);
      });
    },
  );
});

describe('coverage by period, against 60-digit arithmetic (mpmath)', () => {
  it('has ratios and outermost score limits to 1e-12, for one period, equal coverages, coverages near 0 and 1, no event on one side and three roots', () => {
    const found = worst(reference.periods, ({ cases, periods, level, ratio, limits }) =>
      Math.max(
        errorOf(coverageByPeriodRatio(cases, periodsOf(periods)), ratio),
        both(coverageByPeriodInterval(cases, periodsOf(periods), Number(level)), limits),
      ),
    );
    expect(reference.periods).toHaveLength(108);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('is 1.58184345731 (0.983070730129 to 2.54520825508) for 31 of 75 cases at 20, 30, 45 and 60%, against 1.525 by case-weighted, 1.114 by mean and 0.470 by closing coverage (design review, section 6)', () => {
    const rows = [
      [30, 0.2],
      [25, 0.3],
      [12, 0.45],
      [8, 0.6],
    ] as const;
    const periods = periodsOf(rows);
    expect(errorOf(coverageByPeriodRatio(31, periods), '1.58184345731')).toBeLessThan(printed);
    expect(
      both(coverageByPeriodInterval(31, periods, 0.95), ['0.983070730129', '2.54520825508']),
    ).toBeLessThan(printed);
    const weighted = rows.reduce((sum, [cases, coverage]) => sum + (cases * coverage) / 75, 0);
    expect(shareRatio(shares(31, 44, weighted))).toBeCloseTo(1.525, 3);
    expect(shareRatio(shares(31, 44, 0.3875))).toBeCloseTo(1.114, 3);
    expect(shareRatio(shares(31, 44, 0.6))).toBeCloseTo(0.47, 3);
  });

  it('leaves out periods in which nobody or everybody belonged to the group, with their cases', () => {
    const telling = periodsOf([
      [30, 0.2],
      [25, 0.5],
    ]);
    const more = [{ allCases: 7, coverage: 0 }, ...telling, { allCases: 4, coverage: 1 }];
    expect(coverageByPeriodRatio(24, more)).toBe(coverageByPeriodRatio(20, telling));
    expect(coverageByPeriodInterval(24, more, 0.95)).toEqual(coverageByPeriodInterval(20, telling, 0.95));
    expect(coverageByPeriodRatio(0, [{ allCases: 7, coverage: 0 }])).toBeNull();
    expect(coverageByPeriodInterval(0, [{ allCases: 7, coverage: 0 }], 0.95)).toEqual({ low: 0, high: null });
  });
});

describe('sampled coverage, against 120-digit arithmetic (mpmath)', () => {
  it('has ratios and score limits to 1e-12, with samples of 0 of n and n of n, of one person and of a million', () => {
    const found = worst(reference.sampled, ({ cases, sample, level, ratio, limits }) => {
      const from = sampleOf(cases, sample);
      return Math.max(
        errorOf(sampledCoverageRatio(from), ratio),
        both(sampledCoverageRatioInterval(from, Number(level)), limits),
      );
    });
    expect(reference.sampled).toHaveLength(75);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('has fractions of all cases to 1e-12, their limits in units of the larger of the limit and the width', () => {
    const found = worst(reference.sampled, ({ cases, sample, level, fraction, fractionLimits }) => {
      const from = sampleOf(cases, sample);
      return Math.max(
        errorOf(sampledPopulationFraction(from), fraction),
        fractionError(sampledPopulationFractionInterval(from, Number(level)), fractionLimits),
      );
    });
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('is 1.41727216716 to 3.78342320264, and of all cases 0.141415641155 to 0.505731641441, for 44 and 31 with 190 of 500 sampled (design review, section 6)', () => {
    const from = sampleOf([44, 31], [190, 500]);
    expect(both(sampledCoverageRatioInterval(from, 0.95), ['1.41727216716', '3.78342320264'])).toBeLessThan(
      printed,
    );
    expect(
      both(sampledPopulationFractionInterval(from, 0.95), ['0.141415641155', '0.505731641441']),
    ).toBeLessThan(printed);
  });

  it('says "no difference" in the ratio exactly where it says so in the fraction, in 4,752 small samples at 80 and 95%', () => {
    let compared = 0;
    for (let cases = 1; cases <= 8; cases += 1)
      for (let own = 0; own <= cases; own += 1)
        for (let sampled = 1; sampled <= 9; sampled += 1)
          for (let inGroup = 0; inGroup <= sampled; inGroup += 1)
            for (const level of [0.8, 0.95]) {
              const from = sampleOf([own, cases - own], [inGroup, sampled]);
              const ratio = sampledCoverageRatioInterval(from, level);
              const fraction = sampledPopulationFractionInterval(from, level);
              expect((fraction.low ?? -1) > 0, JSON.stringify(from)).toBe((ratio.low ?? 0) > 1);
              expect((fraction.high ?? 1) < 0, JSON.stringify(from)).toBe((ratio.high ?? 2) < 1);
              compared += 1;
            }
    expect(compared).toBe(4752);
  });

  it('tends to the interval for known coverage as the sample grows', () => {
    const { low, high } = sampledCoverageRatioInterval(sampleOf([44, 31], [0.38e12, 1e12]), 0.95);
    const known = shareRatioInterval(shares(44, 31, 0.38), 0.95);
    expect(low).toBeCloseTo(known.low ?? NaN, 9);
    expect(high).toBeCloseTo(known.high ?? NaN, 9);
  });
});

describe('coverages that are themselves estimates, against 60-digit arithmetic (mpmath)', () => {
  it('stand for samples of the right size to 1e-13, for shares near 0 and near 1 too', () => {
    const found = worst(reference.effective, ({ share, limits: [low, high], level, size }) =>
      errorOf(effectiveSample(share, low, high, Number(level)), size),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-13);
  });

  it('make 38% (34 to 42) a sample of 565.65481, with which 44 and 31 give 1.42290327382 to 3.7684734614 (design review, section 4)', () => {
    const size = effectiveSample(0.38, 0.34, 0.42, 0.95);
    expect(size).toBeCloseTo(565.65481, 5);
    const interval = sampledCoverageRatioInterval(sampleOf([44, 31], [0.38 * size, size]), 0.95);
    expect(both(interval, ['1.42290327382', '3.7684734614'])).toBeLessThan(printed);
  });

  it('have an envelope of 1.24276216794 to 4.34547907455 where 34 to 42% is a range without a level (design review, section 4)', () => {
    const low = shareRatioInterval(shares(44, 31, 0.42), 0.95).low;
    const high = shareRatioInterval(shares(44, 31, 0.34), 0.95).high;
    expect(both({ low, high }, ['1.24276216794', '4.34547907455'])).toBeLessThan(printed);
  });
});

describe('a coverage that may be wrong', () => {
  it('has the slope -1/(c(1 - c)) of the log ratio, to 1e-14 of numerical differentiation at 40 digits', () => {
    const found = worst(reference.sensitivity, ({ coverage, slope }) =>
      errorOf(coverageSensitivity(coverage), slope),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-14);
  });

  it('lowers the ratio by 4.2% a point at 38%, 11% at 90%, 21% at 95% and all of it at 99% (design review, section 4)', () => {
    const perPoint = [0.38, 0.9, 0.95, 0.99].map((coverage) => -coverageSensitivity(coverage) / 100);
    [0.042, 0.11, 0.21, 1.01].forEach((expected, at) => {
      expect(perPoint[at]).toBeCloseTo(expected, expected < 0.1 ? 3 : 2);
    });
  });

  it('gives 2.41673931997, 2.31578947368 and 2.2200165426 for 44 and 31 at 37, 38 and 39% (design review, section 4)', () => {
    const ratios = [0.37, 0.38, 0.39].map((coverage) => shareRatio(shares(44, 31, coverage)));
    ['2.41673931997', '2.31578947368', '2.2200165426'].forEach((expected, at) => {
      expect(errorOf(ratios[at] ?? null, expected)).toBeLessThan(printed);
    });
  });

  it('leaves 44 and 31 at 38% a share of all cases of 0.333333333333 (0.151072836463 to 0.5019721108) (design review, section 6)', () => {
    const { low, high } = shareRatioInterval(shares(44, 31, 0.38), 0.95);
    expect(both({ low, high }, ['1.46830884089', '3.65242021098'])).toBeLessThan(printed);
    const through = (ratio: number | null) => populationAttributableFraction(ratio ?? NaN, 0.38);
    expect(both({ low: through(low), high: through(high) }, ['0.151072836463', '0.5019721108'])).toBeLessThan(
      printed,
    );
  });
});

describe('cases of unknown group', () => {
  const bounds = (
    [cases, referenceCases, unknown]: readonly [number, number, number],
    coverage: number,
    level: number,
  ) =>
    unknownGroupBounds(
      { cases, referenceCases, unknown },
      (own, other) => shareRatio(shares(own, other, coverage)),
      (own, other) => shareRatioInterval(shares(own, other, coverage), level),
    );

  it('have worst-case bounds to 1e-13 of 60-digit arithmetic, with nothing known and nothing unknown', () => {
    const found = worst(reference.unknown, (row) => {
      const { likeTheKnown, estimates, limits } = bounds(row.cases, row.coverage, Number(row.level));
      return Math.max(
        errorOf(likeTheKnown, row.likeTheKnown),
        both(estimates, row.estimates),
        both(limits, row.limits),
      );
    });
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-13);
  });

  it('split like the known in proportion: 15 beside 44 and 31 are 8.8 and 6.2', () => {
    const { likeTheKnown } = unknownGroupBounds(
      { cases: 44, referenceCases: 31, unknown: 15 },
      (own, other) => own * 1000 + other,
      () => ({ low: null, high: null }),
    );
    expect(likeTheKnown).toBeCloseTo(52837.2, 8);
  });

  it('give 1.56064073227 to 3.10526315789, and 1.03529267447 to 4.78036972844 with chance, for 44, 31 and 15 unknown at 38% (design review, section 4)', () => {
    const { likeTheKnown, estimates, limits } = bounds([44, 31, 15], 0.38, 0.95);
    expect(errorOf(likeTheKnown, '2.31578947368')).toBeLessThan(printed);
    expect(both(estimates, ['1.56064073227', '3.10526315789'])).toBeLessThan(printed);
    expect(both(limits, ['1.03529267447', '4.78036972844'])).toBeLessThan(printed);
  });
});

describe('cases that come in clusters', () => {
  const groupsOf = (designEffect: number) => {
    const [cases = NaN, total = NaN, referenceCases = NaN, referenceTotal = NaN] = dividedByDesignEffect(
      [18, 1204, 9, 2377],
      designEffect,
    );
    return { cases, total, referenceCases, referenceTotal };
  };
  const ratesOf = (designEffect: number) => {
    const [cases = NaN, exposure = NaN, referenceCases = NaN, referenceExposure = NaN] =
      dividedByDesignEffect([14, 5200, 9, 8800], designEffect);
    return { cases, exposure, referenceCases, referenceExposure };
  };
  const sharesOf = (designEffect: number) => {
    const [cases = NaN, referenceCases = NaN] = dividedByDesignEffect([44, 31], designEffect);
    return shares(cases, referenceCases, 0.38);
  };

  it('widen the intervals of risk, odds, share and rate ratios as 60-digit arithmetic has it, to 1e-12', () => {
    const found = worst(reference.clusters, (row) => {
      const level = Number(row.level);
      const divided = groupsOf(row.designEffect);
      return Math.max(
        both(riskRatioInterval(divided, level), row.riskRatio),
        both(oddsRatioInterval(divided, level), row.oddsRatio),
        both(shareRatioInterval(sharesOf(row.designEffect), level), row.shareRatio),
        both(rateRatioInterval(ratesOf(row.designEffect), level), row.rateRatio),
      );
    });
    expect(reference.clusters).toHaveLength(9);
    expect(found.error, JSON.stringify(found.row)).toBeLessThan(1e-12);
  });

  it('give 1.26177206848 to 4.250277067 for 44 and 31 at 38% with a design effect of 1.8 (design review, section 4)', () => {
    const divided = sharesOf(1.8);
    expect(both(shareRatioInterval(divided, 0.95), ['1.26177206848', '4.250277067'])).toBeLessThan(printed);
    expect(shareRatio(divided)).toBeCloseTo(44 / 31 / (0.38 / 0.62), 12);
  });
});

describe('coverages that cannot be', () => {
  const periods = periodsOf([
    [30, 0.2],
    [4, 1],
    [7, 0],
  ]);
  const sample = sampleOf([44, 31], [190, 500]);
  it.each([
    [
      'more cases than the periods with coverage have',
      'cases-out-of-range',
      () => coverageByPeriodRatio(35, periods),
    ],
    ['fewer cases than where all are covered', 'cases-out-of-range', () => coverageByPeriodRatio(3, periods)],
    [
      'a coverage by period in percent',
      'coverage-out-of-range',
      () => coverageByPeriodRatio(1, [{ allCases: 3, coverage: 20 }]),
    ],
    [
      'a growth from 0 to 0',
      'coverage-out-of-range',
      () => ratioUnderEvenCases(growthOf([8, 67], [0, 0]), 0.95),
    ],
    [
      'a growth from 1 to 1',
      'coverage-out-of-range',
      () => ratioUnderEvenCases(growthOf([8, 67], [1, 1]), 0.95),
    ],
    [
      'a growth beyond 1',
      'coverage-out-of-range',
      () => ratioUnderEvenCases(growthOf([8, 67], [0.5, 1.01]), 0.95),
    ],
    ['a coverage of 1 that may be wrong', 'coverage-out-of-range', () => coverageSensitivity(1)],
    [
      'more people in the group than sampled',
      'cases-out-of-range',
      () => sampledCoverageRatio({ ...sample, sampledInGroup: 501 }),
    ],
    [
      'a sample of nobody',
      'total-out-of-range',
      () => sampledCoverageRatio({ ...sample, sampledInGroup: 0, sampled: 0 }),
    ],
    ['a sample beside no case', 'no-cases', () => sampledPopulationFraction(sampleOf([0, 0], [190, 500]))],
    ['limits that do not rise', 'limits-out-of-order', () => effectiveSample(0.38, 0.4, 0.42, 0.95)],
    ['a design effect below 1', 'design-effect-out-of-range', () => dividedByDesignEffect([1, 2], 0.5)],
  ])('%s: refused with the code %s', (_, code, call) => {
    expect(call).toThrow(ArgumentError);
    expect(call).toThrow(expect.objectContaining({ code }));
  });
});
