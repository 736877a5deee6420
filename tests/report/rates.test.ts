import { describe, expect, it } from 'vitest';
import { readingFor, reportFor } from '../support/report-for.ts';

const close = (value: number | null | undefined, expected: number, digits = 10) =>
  expect((value ?? NaN) / expected).toBeCloseTo(1, digits);

describe('rates', () => {
  const depots = 'depot A: 14 in 5,200 bus-days vs depot B: 9 in 8,800 bus-days';

  it('give the values of the design review for 14 in 5,200 and 9 in 8,800 (40-digit arithmetic)', () => {
    const ratio = readingFor(depots, 'rate-ratio');
    close(ratio.estimate, 2.63247863248);
    close(ratio.interval?.low, 1.1656212478);
    close(ratio.interval?.high, 5.94527919216);
    const difference = readingFor(depots, 'rate-difference');
    close(difference.interval?.low, 0.000273059495725);
    close(difference.interval?.high, 0.00357106941228);
  });

  it('with exact have the limits of Garwood: 0 in 1 year is at most 3.6889 (-ln 0.025)', () => {
    const rate = readingFor('harbour: 0 in 1 year; exact', 'rate');
    // `0 per year` would be a stated rate; `in 1 year` counts.
    expect(rate.interval?.method).toBe('garwood');
    close(rate.interval?.high, -Math.log(0.025));
  });

  it('of more than 1e9 events have no exact limits, and say so', () => {
    const rate = readingFor('2,000,000,000 in 5 days vs 3 in 5 days; exact', 'rate');
    expect(rate).toMatchObject({ interval: null, whyNoInterval: 'too-large-for-exact' });
  });

  it('as stated have no interval, and say what rounding alone allows: 3 and 2 per 1,000 give 2.5/2.5 to 3.5/1.5', () => {
    const ratio = readingFor('3 per 1,000 bus-days vs 2 per 1,000 bus-days', 'rate-ratio');
    expect(ratio.interval).toBeNull();
    close(ratio.roundingRange?.low, 1);
    close(ratio.roundingRange?.high, 3.5 / 1.5);
  });

  it('are shown for the smallest power of ten that gives at least 1, or for what the line says after per', () => {
    expect(readingFor(depots, 'rate').per).toBe(1_000);
    expect(readingFor(`${depots}; per 10,000`, 'rate').per).toBe(10_000);
    expect(readingFor('14 in 2 days vs 9 in 3 days', 'rate').per).toBe(1);
  });
});

describe('a change', () => {
  it('of counts over two times has the rate ratio of the two lengths, of counts alone the count ratio', () => {
    const lengths = reportFor('from 412 in 31 days to 530 in 28 days');
    expect(lengths.headline).toBe('rate-ratio');
    close(
      readingFor('from 412 in 31 days to 530 in 28 days', 'rate-ratio', 1).estimate,
      530 / 28 / (412 / 31),
    );
    expect(reportFor('from 412 to 530').headline).toBe('count-ratio');
  });

  it('of counts alone has the score interval of two equal times: odds of the Wilson limits of 530 of 942', () => {
    const ratio = readingFor('from 412 to 530', 'count-ratio', 1);
    // Wilson limits of 530/942 by R 4.2 prop.test(530, 942, correct = FALSE): 0.530765, 0.594014, in closed form below.
    const z = 1.959963984540054;
    const [n, p] = [942, 530 / 942];
    const middle = (p + (z * z) / (2 * n)) / (1 + (z * z) / n);
    const half = (z / (1 + (z * z) / n)) * Math.sqrt((p * (1 - p)) / n + (z * z) / (4 * n * n));
    close(ratio.interval?.low, (middle - half) / (1 - middle + half));
    close(ratio.interval?.high, (middle + half) / (1 - middle - half));
  });

  it('of two groups of counts without totals still has no interval', () => {
    expect(readingFor('night 18 vs day 9', 'count-ratio').interval).toBeNull();
  });

  it('of percentages says the points, of totals every reading of counts', () => {
    close(readingFor('from 4.4% to 5.2%', 'percentage-difference', 1).estimate, 0.008);
    close(readingFor('from 41 of 1,000 to 52 of 1,100', 'risk-ratio', 1).estimate, 52 / 1_100 / (41 / 1_000));
  });
});
