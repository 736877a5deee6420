import { describe, expect, it } from 'vitest';
import { directionOf } from '../../src/report/report.ts';
import type { Reading } from '../../src/report/reading.ts';
import type { RatioVariant, RatioVariants } from '../../src/report/ratio-variants.ts';
import { readingFor, reportFor } from '../support/report-for.ts';

/** Outside values: the design review's 40-digit arithmetic, unless a test says otherwise. */

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

/** Estimate and limits to twelve printed digits. */
function holds(
  { estimate, interval }: Pick<Reading, 'estimate' | 'interval'>,
  values: readonly [number, number, number],
) {
  close(estimate, values[0]);
  close(interval?.low, values[1]);
  close(interval?.high, values[2]);
}

const cases = 'cases: no helmet 44, helmet 31; coverage: ';

function variantsOf(line: string, topic: RatioVariants['topic']): RatioVariants {
  const found = reportFor(line).variants?.find((each) => each.topic === topic);
  if (found === undefined) throw new Error(`${line}: nothing about ${topic}`);
  return found;
}

function variant(line: string, topic: RatioVariants['topic'], id: RatioVariant['id']): RatioVariant {
  const found = variantsOf(line, topic).rows.find((row) => row.id === id);
  if (found === undefined) throw new Error(`${line}: no ${id}`);
  return found;
}

describe('coverage from a sample', () => {
  const line = `${cases}no helmet 190 of 500`;

  it('44, 31 and 190 of 500: 2.31578947368 (1.41727216716 to 3.78342320264)', () => {
    holds(readingFor(line, 'risk-ratio'), [2.31578947368, 1.41727216716, 3.78342320264]);
    expect(readingFor(line, 'risk-ratio').interval?.method).toBe('sampled-coverage');
  });

  it('has its share of all cases from a risk ratio: 1/3 (0.141415641155 to 0.505731641441)', () => {
    holds(readingFor(line, 'population-attributable-fraction'), [1 / 3, 0.141415641155, 0.505731641441]);
  });

  it('is the same said of the other group', () => {
    holds(
      readingFor(`${cases}helmet 310 of 500`, 'risk-ratio'),
      [2.31578947368, 1.41727216716, 3.78342320264],
    );
  });

  it('in which nobody is of the group has a lower limit and no ratio; with everybody in it, the ratio 0', () => {
    const none = readingFor(`${cases}no helmet 0 of 500`, 'risk-ratio');
    expect(none).toMatchObject({ estimate: null, unbounded: true, interval: { high: null } });
    expect(none.interval?.low).toBeGreaterThan(1);
    expect(directionOf(none)).toBe('higher');
    expect(readingFor(`${cases}no helmet 500 of 500`, 'risk-ratio')).toMatchObject({
      estimate: 0,
      interval: { low: 0 },
    });
  });

  it('with exact has the conditional limits of that odds ratio', () => {
    const exact = readingFor(`${line}; exact`, 'risk-ratio');
    const counts = readingFor('a: 44 of 75 vs b: 190 of 500; exact', 'odds-ratio');
    expect(exact.interval).toMatchObject({
      low: counts.interval?.low,
      high: counts.interval?.high,
      method: 'conditional-exact',
    });
    expect(readingFor(`${line}; exact`, 'population-attributable-fraction')).toMatchObject({
      interval: null,
      whyNoInterval: 'no-exact-form',
    });
  });

  it('of two hidden counts, which may both be none, has no limit on either side', () => {
    expect(readingFor('cases: a <5, b <5; coverage: a 310 of 500', 'risk-ratio').interval).toMatchObject({
      low: 0,
      high: null,
    });
  });

  it('tends to the answer for one coverage as the sample grows', () => {
    const large = readingFor(`${cases}no helmet 380,000,000 of 1,000,000,000`, 'risk-ratio');
    close(large.interval?.low, 1.46830884089, 5);
    close(large.interval?.high, 3.65242021098, 5);
  });
});

describe('coverage with an interval of its own', () => {
  it('38% (34 to 42): 2.31578947368 (1.42290327382 to 3.7684734614)', () => {
    holds(
      readingFor(`${cases}no helmet 38% (34 to 42)`, 'risk-ratio'),
      [2.31578947368, 1.42290327382, 3.7684734614],
    );
  });

  it('is as good as a sample whatever the level of the answer: its own level is 95% unless it says so', () => {
    const usual = readingFor(`${cases}no helmet 38% (34 to 42); level 90%`, 'risk-ratio');
    const said = readingFor(`${cases}no helmet 38% (95% CI 34 to 42); level 90%`, 'risk-ratio');
    const narrower = readingFor(`${cases}no helmet 38% (99% CI 34 to 42); level 90%`, 'risk-ratio');
    expect(usual.interval).toEqual(said.interval);
    expect(narrower.interval?.low).toBeGreaterThan(usual.interval?.low ?? NaN);
  });
});

describe('coverage as a range', () => {
  it('has its middle as estimate and the outermost limits: 34 to 42% gives 1.24276216794 to 4.34547907455', () => {
    const ratio = readingFor(`${cases}no helmet 34-42%`, 'risk-ratio');
    holds(ratio, [2.31578947368, 1.24276216794, 4.34547907455]);
    expect(ratio.interval?.envelope).toBe(true);
  });

  it('keeps apart what the range alone does to the estimate', () => {
    const { roundingRange } = readingFor(`${cases}no helmet 34-42%`, 'risk-ratio');
    close(roundingRange?.low, ((44 / 31) * 58) / 42);
    close(roundingRange?.high, ((44 / 31) * 66) / 34);
  });

  it('carries the share of all cases over both ends', () => {
    const at = (coverage: number) =>
      readingFor(`${cases}no helmet ${coverage}%`, 'population-attributable-fraction').interval;
    const { interval } = readingFor(`${cases}no helmet 34-42%`, 'population-attributable-fraction');
    close(interval?.low, at(42)?.low ?? NaN);
    close(interval?.high, at(34)?.high ?? NaN);
  });
});

describe('coverage that grew', () => {
  const far = 'cases: helmet 8, no helmet 67; coverage: helmet from 5% to 90%';
  const near = 'cases: helmet 31, no helmet 44; coverage: helmet from 20% to 60%';

  it('8 of 75, 5 to 90%: even 0.0830295801649 (0.0379296512881 to 0.190641813856), mean 0.131971720346, closing 0.0132669983416', () => {
    holds(variantAsReading(far, 'even-cases'), [0.0830295801649, 0.0379296512881, 0.190641813856]);
    close(variant(far, 'growth', 'constant-risk').estimate, 0.131971720346);
    close(variant(far, 'growth', 'closing-coverage').estimate, 0.0132669983416);
  });

  it('31 of 75, 20 to 60%: even 1.06028099946 (0.655357364912 to 1.71970368042), mean 1.05681818182', () => {
    holds(variantAsReading(near, 'even-cases'), [1.06028099946, 0.655357364912, 1.71970368042]);
    close(variant(near, 'growth', 'constant-risk').estimate, 1.05681818182);
  });

  it('has its estimate at constant risk and the wider of both intervals', () => {
    for (const line of [far, near]) {
      const ratio = readingFor(line, 'risk-ratio');
      const [constant, even] = [
        variant(line, 'growth', 'constant-risk'),
        variant(line, 'growth', 'even-cases'),
      ];
      close(ratio.estimate, constant.estimate ?? NaN, 14);
      expect(ratio.interval?.low).toBe(Math.min(constant.interval?.low ?? NaN, even.interval?.low ?? NaN));
      expect(ratio.interval?.high).toBe(Math.max(constant.interval?.high ?? NaN, even.interval?.high ?? NaN));
      expect(ratio.interval?.method).toBe('growing-coverage');
    }
  });

  it('or fell, is the same with its ends exchanged, but for the closing coverage', () => {
    const fell = 'cases: helmet 31, no helmet 44; coverage: helmet from 60% to 20%';
    close(readingFor(fell, 'risk-ratio').interval?.low, 0.655357364912);
    close(variant(fell, 'growth', 'closing-coverage').estimate, ((31 / 44) * 80) / 20);
  });

  it('may begin at 0%, and at 100% has no closing answer', () => {
    expect(
      readingFor('cases: helmet 8, no helmet 67; coverage: helmet from 0% to 40%', 'risk-ratio').interval
        ?.low,
    ).toBeGreaterThan(0);
    const full = variantsOf('cases: helmet 8, no helmet 67; coverage: helmet from 40% to 100%', 'growth');
    expect(full.rows.map(({ id }) => id)).toEqual(['constant-risk', 'even-cases']);
  });

  it('without a number of cases has both estimates and no interval', () => {
    const { rows } = variantsOf('helmet: 40% of cases; coverage from 20% to 60%', 'growth');
    expect(rows.map(({ interval }) => interval)).toEqual([null, null, null]);
    close(rows[0]?.estimate, 1);
    close(rows[1]?.estimate, 1);
  });

  it('asks for the cases by month first', () => {
    expect(reportFor(near).missing[0]).toBe('cases-by-period');
    expect(reportFor(near).cautions).toContain('coverage-changed');
  });
});

function variantAsReading(line: string, id: RatioVariant['id']): Pick<Reading, 'estimate' | 'interval'> {
  const { estimate, interval } = variant(line, 'growth', id);
  return {
    estimate,
    interval: interval && {
      ...interval,
      level: 0.95,
      method: 'growing-coverage',
      envelope: false,
      designEffect: 1,
    },
  };
}

describe('coverage by period', () => {
  const line = 'helmet: 31 of 75; coverage by month: 20%, 30%, 45%, 60%; cases by month: 30, 25, 12, 8';

  it('20, 30, 45, 60% with 30, 25, 12, 8 cases and 31 of 75: 1.58184345731 (0.983070730129 to 2.54520825508)', () => {
    holds(readingFor(line, 'risk-ratio'), [1.58184345731, 0.983070730129, 2.54520825508]);
    expect(readingFor(line, 'risk-ratio').interval?.method).toBe('coverage-by-period');
  });

  it('has no break-even coverage, since there is not one', () => {
    expect(reportFor(line).readings.some(({ id }) => id === 'break-even-coverage')).toBe(false);
  });

  it('with the same coverage all the time is the answer for one coverage', () => {
    const same = readingFor(
      'no helmet: 44 of 75; coverage by month: 38%, 38%; cases by month: 30, 45',
      'risk-ratio',
    );
    holds(same, [2.31578947368, 1.46830884089, 3.65242021098]);
    const fraction = readingFor(
      'no helmet: 44 of 75; coverage by month: 38%, 38%; cases by month: 30, 45',
      'population-attributable-fraction',
    );
    holds(fraction, [1 / 3, 0.151072836463, 0.5019721108]);
  });
});

describe('cases of unknown group', () => {
  const line = 'cases: no helmet 44, helmet 31, unknown 15; coverage: no helmet 38%';

  it('44, 31, 15: 1.56064073227 to 3.10526315789, with chance 1.03529267447 to 4.78036972844', () => {
    close(variant(line, 'unknown', 'all-in-reference').estimate, 1.56064073227);
    close(variant(line, 'unknown', 'all-in-group').estimate, 3.10526315789);
    close(variant(line, 'unknown', 'like-the-known').estimate, 2.31578947368);
    holds(readingFor(line, 'risk-ratio'), [2.31578947368, 1.03529267447, 4.78036972844]);
  });

  it('widen every reading alike: the break-even coverage too, and the share of all cases', () => {
    const ratio = readingFor(line, 'risk-ratio').interval;
    const odds = (limit: number | null | undefined) =>
      ((limit ?? NaN) / (1 - (limit ?? NaN))) * (0.62 / 0.38);
    const breakEven = readingFor(line, 'break-even-coverage').interval;
    close(odds(breakEven?.low), ratio?.low ?? NaN);
    close(odds(breakEven?.high), ratio?.high ?? NaN);
    const other = readingFor(line, 'case-share', 1).interval;
    close(other?.low, 1 - (breakEven?.high ?? NaN));
    const fraction = readingFor(line, 'population-attributable-fraction').interval;
    close(fraction?.low, (0.38 * ((ratio?.low ?? NaN) - 1)) / (1 + 0.38 * ((ratio?.low ?? NaN) - 1)));
  });

  it('go together with a sampled coverage', () => {
    const sampled = 'cases: no helmet 44, helmet 31, unknown 15; coverage: no helmet 190 of 500';
    const low = readingFor('cases: no helmet 44, helmet 46; coverage: no helmet 190 of 500', 'risk-ratio');
    const high = readingFor('cases: no helmet 59, helmet 31; coverage: no helmet 190 of 500', 'risk-ratio');
    expect(readingFor(sampled, 'risk-ratio').interval).toMatchObject({
      low: low.interval?.low,
      high: high.interval?.high,
      unknownToEitherSide: true,
    });
  });

  it('have a caution, and the first question asks for their group', () => {
    expect(reportFor(line).cautions).toEqual(['base-rate', 'unknown-group']);
    expect(reportFor(line).missing[0]).toBe('unknown-groups');
  });
});

describe('other coverages', () => {
  it('one point more or less: 37, 38, 39% give 2.41673931997, 2.31578947368, 2.2200165426', () => {
    const { rows, slope } = variantsOf(`${cases}no helmet 38%`, 'sensitivity');
    expect(rows.map(({ coverage }) => coverage)).toEqual([0.37, 0.38, 0.39]);
    [2.41673931997, 2.31578947368, 2.2200165426].forEach((value, at) => close(rows[at]?.estimate, value));
    close(slope, -1 / (0.38 * 0.62));
  });

  it('goes by the coverage that was typed, and up where that is the other group\u2019s', () => {
    const { rows, slope, coverageOf } = variantsOf(`${cases}helmet 62%`, 'sensitivity');
    expect(coverageOf).toBe(1);
    expect(rows.map(({ coverage }) => coverage)).toEqual([0.61, 0.62, 0.63]);
    close(rows[2]?.estimate, 2.41673931997);
    close(slope, 1 / (0.38 * 0.62));
  });

  it('leaves out what no coverage can be, and stands with no coverage that is not one number', () => {
    expect(variantsOf(`${cases}no helmet 0.5%`, 'sensitivity').rows).toHaveLength(2);
    for (const form of ['34-42%', '190 of 500', '38% (34 to 42)', 'from 20% to 60%'])
      expect(
        reportFor(`${cases}no helmet ${form}`).variants?.some(({ topic }) => topic === 'sensitivity'),
      ).toBe(false);
  });

  it('tried are each what the line would say with that coverage', () => {
    const { rows } = variantsOf(`${cases}no helmet 38%; try 30%, 38%, 50%`, 'tried');
    for (const [at, coverage] of [30, 38, 50].entries()) {
      const alone = readingFor(`${cases}no helmet ${coverage}%`, 'risk-ratio');
      close(rows[at]?.estimate, alone.estimate ?? NaN, 13);
      close(rows[at]?.interval?.low, alone.interval?.low ?? NaN, 13);
      close(rows[at]?.interval?.high, alone.interval?.high ?? NaN, 13);
    }
  });

  it('tried without a number of cases have no interval', () => {
    const { rows } = variantsOf('no helmet: 58.7% of cases, 38% of riders; try 30%, 50%', 'tried');
    expect(rows.map(({ interval }) => interval)).toEqual([null, null]);
  });
});
