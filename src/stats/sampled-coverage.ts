import { ArgumentError, checkCaseCounts, checkCases } from './argument-error.ts';
import type { Interval } from './interval.ts';
import { oddsRatioInterval } from './odds-ratio-interval.ts';
import { riskRatioInterval } from './risk-ratio-interval.ts';

/** Cases in two groups beside a sample of the population: `sampledInGroup` of `sampled` belong to the group. */
export interface SampledCoverage {
  readonly cases: number;
  readonly referenceCases: number;
  /** In [0, sampled]; need not be whole. */
  readonly sampledInGroup: number;
  /** Above 0; need not be whole (an effective sample). */
  readonly sampled: number;
}

/**
 * The ratio per person where coverage comes from a sample: x1/x2 times (n - m)/m.
 *
 * @returns `null` where the reference group has no case or nobody sampled belongs to the group
 * @throws ArgumentError where there is no case, or a number is out of range
 */
export function sampledCoverageRatio(from: SampledCoverage): number | null {
  check(from);
  const { cases, referenceCases, sampledInGroup, sampled } = from;
  if (referenceCases === 0 || sampledInGroup === 0) return null;
  return (cases / referenceCases) * ((sampled - sampledInGroup) / sampledInGroup);
}

/**
 * Score interval of that ratio: the odds ratio of x1 of (x1 + x2) cases against m of n people sampled, so that it carries the
 * sampling error of the coverage too.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 without cases in the group or where everybody sampled belongs to it, no upper limit without cases in
 *   the reference or where nobody sampled does
 * @throws ArgumentError where there is no case, or a number is out of range
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213). As the sample grows it tends to the interval for known coverage.
 */
export function sampledCoverageRatioInterval(from: SampledCoverage, level: number): Interval {
  check(from);
  const { cases, referenceCases, sampledInGroup, sampled } = from;
  return oddsRatioInterval(
    {
      cases,
      total: cases + referenceCases,
      referenceCases: sampledInGroup,
      referenceTotal: sampled,
    },
    level,
  );
}

/**
 * Interval of the fraction of all cases above the reference group's rate, coverage sampled: 1 minus the score limits of the
 * risk ratio of x2 of (x1 + x2) against (n - m) of n. It excludes 0 exactly where the ratio's interval excludes 1.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns no lower limit where everybody sampled belongs to the group
 * @throws ArgumentError as above
 *
 * Miettinen & Nurminen 1985, as above. Accuracy: 1e-12 of the larger of the limit and the width.
 */
export function sampledPopulationFractionInterval(from: SampledCoverage, level: number): Interval {
  check(from);
  const { cases, referenceCases, sampledInGroup, sampled } = from;
  const { low, high } = riskRatioInterval(
    {
      cases: referenceCases,
      total: cases + referenceCases,
      referenceCases: sampled - sampledInGroup,
      referenceTotal: sampled,
    },
    level,
  );
  return { low: high === null ? null : 1 - high, high: 1 - (low ?? 0) };
}

/**
 * The estimate of that fraction: 1 - [x2/(x1 + x2)]/[(n - m)/n]; `null` where everybody sampled belongs to the group. Miettinen
 * 1974 (American Journal of Epidemiology 99:325).
 */
export function sampledPopulationFraction(from: SampledCoverage): number | null {
  check(from);
  const { cases, referenceCases, sampledInGroup, sampled } = from;
  const others = sampled - sampledInGroup;
  if (others === 0) return null;
  return (cases * others - referenceCases * sampledInGroup) / ((cases + referenceCases) * others);
}

function check({ cases, referenceCases, sampledInGroup, sampled }: SampledCoverage): void {
  checkCaseCounts(cases, referenceCases);
  checkCases(sampledInGroup, sampled);
  if (cases + referenceCases === 0) throw new ArgumentError('no-cases', 'there must be a case in a group');
}
