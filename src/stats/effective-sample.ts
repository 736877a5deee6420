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
