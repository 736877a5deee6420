import { checkWhole } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { lowerTailLimit } from './convolution-tail.ts';
import { criticalValue } from './critical-value.ts';
import { fittedTable } from './fitted-table.ts';
import { hypergeometricMoments, stepUp, supportOf } from './hypergeometric-moments.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { oddsRatioInterval } from './odds-ratio-interval.ts';
import { guardedCounts, outermostRoot } from './outermost-root.ts';
import { swapped } from './score-factor.ts';
import { sumOver, usableStrata, varianceFactor } from './strata.ts';
import type { Strata } from './strata.ts';

/**
 * The odds ratio pooled over layers: the conditional estimate, at which the cases of the group are as many as the non-central
 * hypergeometric distribution expects in all layers together.
 *
 * A layer with more than 10,000 possible tables, or with counts that are not whole, counts with Gart's fitted count instead.
 *
 * @returns `null` where it is undefined or has no upper end
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Gart 1970 (Biometrika 57:471); the estimate that R's exact mantelhaen.test prints.
 */
export function pooledOddsRatio(strata: Strata): number | null {
  const usable = usableStrata(strata);
  if (!aboveZero(usable.map(swapped))) return null;
  if (!aboveZero(usable)) return 0;
  return Math.exp(estimateOf(usable));
}

/**
 * Score interval of the pooled odds ratio: the excess of the group's cases over their conditional mean, over the root of the
 * conditional variance. At 1 it is the Cochran-Mantel-Haenszel statistic without correction, whichever way a layer counts, so
 * that it never contradicts the pooled risk ratio. One layer gives the plain interval, which is not conditional.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 where all layers have as few cases in the group as their margins allow, no upper limit where as many
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Gart 1970; Mehta, Patel & Gray 1985 (JASA 80:969). Large layers: Gart's fitted counts with the factor N/(N - 1), within 0.2% of
 * the conditional limits once all margins pass 500. Outermost roots, on the estimate's side of 1 where the statistic rejects 1: see
 * pooled-risk-ratio.ts. Accuracy: 1e-12 relative for either form.
 */
export function pooledOddsRatioInterval(strata: Strata, level: number): Interval {
  const usable = usableStrata(strata);
  const [only] = usable;
  if (only !== undefined && usable.length === 1) return oddsRatioInterval(only, level);
  const z = criticalValue(level);
  const mirrored = lowerLimit(usable.map(swapped), z);
  return { low: lowerLimit(usable, z), high: mirrored === 0 ? null : 1 / mirrored };
}

function lowerLimit(strata: Strata, z: number): number {
  if (!aboveZero(strata)) return 0;
  const score = (logRatio: number) => {
    const { gap, variance } = totals(strata, Math.exp(logRatio));
    return guardedCounts(gap, variance, z);
  };
  const far = score(0).value > 0 ? 0 : -600;
  const root = outermostRoot(score, far, aboveZero(strata.map(swapped)) ? estimateOf(strata) : 600);
  return root === null ? 0 : Math.exp(root);
}

/** Whether in some layer the margins would allow fewer cases in the group: the ratio is then above 0. */
const aboveZero = (strata: Strata) =>
  strata.some(({ cases, referenceCases, referenceTotal }) => cases > 0 && referenceCases < referenceTotal);

/** The log of the conditional estimate, which must be neither 0 nor without end. */
function estimateOf(strata: Strata): number {
  const gap = (logRatio: number) => -totals(strata, Math.exp(logRatio)).gap;
  let low = -0.5;
  let high = 0.5;
  for (let step = 0.5; gap(low) > 0; step *= 2) low -= step;
  for (let step = 0.5; gap(high) < 0; step *= 2) high += step;
  return bracketedRoot(gap, low, high);
}

function totals(strata: Strata, t: number): { readonly gap: number; readonly variance: number } {
  const each = strata.map((groups) =>
    countable(groups) ? hypergeometricMoments(groups, t) : fitted(groups, t),
  );
  return { gap: sumOver(each, ({ excess }) => excess), variance: sumOver(each, ({ variance }) => variance) };
}

function fitted(groups: TwoGroups, t: number): { readonly excess: number; readonly variance: number } {
  const { excess, variance } = fittedTable(groups, t);
  return { excess, variance: variance * varianceFactor(groups) };
}

/** Whether a layer's possible tables are counted one by one. */
function countable(groups: TwoGroups): boolean {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const { fewest, most } = supportOf(groups);
  return most - fewest < 10_000 && [cases, total, referenceCases, referenceTotal].every(Number.isSafeInteger);
}

/**
 * Exact interval of the pooled odds ratio, central: the tails of the sum of the layers' non-central hypergeometric counts. It may
 * disagree with the other readings about "no difference".
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @throws ArgumentError for counts that are not whole or out of range, or where the margins allow more than
 *   `mostExactSums` sums
 *
 * Gart 1970; Mehta, Patel & Gray 1985. With one layer it is the interval of conditional-odds-ratio-interval.ts.
 */
export function exactPooledOddsRatioInterval(strata: Strata, level: number): Interval {
  const usable = usableStrata(strata);
  usable.forEach(({ cases, total, referenceCases, referenceTotal }) => {
    checkWhole(cases, total, referenceCases, referenceTotal);
  });
  const mirrored = exactLowerLimit(usable.map(swapped), level);
  return { low: exactLowerLimit(usable, level), high: mirrored === 0 ? null : 1 / mirrored };
}

function exactLowerLimit(strata: Strata, level: number): number {
  if (!aboveZero(strata)) return 0;
  const guess = aboveZero(strata.map(swapped))
    ? Math.exp(estimateOf(strata))
    : lowerLimit(strata, criticalValue(level));
  const counts = strata.map((groups) => ({
    ...supportOf(groups),
    mode: (t: number) => fittedTable(groups, t).cases,
    up: stepUp(groups),
  }));
  const observed = sumOver(strata, ({ cases }) => cases);
  return lowerTailLimit(counts, observed, guess, level);
}
