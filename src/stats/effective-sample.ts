import { ArgumentError, checkCoverage } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';

/**
 * How large a simple sample would have given a share this interval: n* = c(1 - c)(2z/(U - L))^2.
 *
 * @param share c, with `low` < `share` < `high`, all in [0, 1]
 * @param level the level that the interval was given at, as a share, in [0.5, 0.9999]
 * @returns n*, not rounded; c n* of n* then stand for the sample (see sampled-coverage.ts)
 * @throws ArgumentError for anything else
 *
 * From the large-sample standard error of a share, root(c(1 - c)/n). Common practice ("effective sample size").
 */
export function effectiveSample(share: number, low: number, high: number, level: number): number {
  checkCoverage(share);
  const z = criticalValue(level);
  if (!(low >= 0 && low < share && share < high && high <= 1)) {
    throw new ArgumentError('limits-out-of-order', `${low}, ${share} and ${high} must rise within 0 and 1`);
  }
  return share * (1 - share) * ((2 * z) / (high - low)) ** 2;
}

/**
 * The same for a sample of n out of a population of M known people: n(M - 1)/(M - n), by the finite population correction.
 *
 * @returns `null` where everybody was asked: there is no sampling error left
 * @throws ArgumentError unless 0 < n <= M
 */
export function effectiveSampleOfFinite(sampled: number, population: number): number | null {
  if (!(sampled > 0 && sampled <= population && population < Infinity)) {
    throw new ArgumentError(
      'sample-out-of-range',
      `a sample must be above 0 and at most ${population}, not ${sampled}`,
    );
  }
  return sampled === population ? null : (sampled * (population - 1)) / (population - sampled);
}
