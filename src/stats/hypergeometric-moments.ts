import { fittedTable } from './fitted-table.ts';
import type { TwoGroups } from './interval.ts';

/** The fewest and the most cases that a group can have with these margins. */
export const supportOf = ({ cases, total, referenceCases, referenceTotal }: TwoGroups) => ({
  fewest: Math.max(0, cases + referenceCases - referenceTotal),
  most: Math.min(total, cases + referenceCases),
});

/** The weight of u + 1 cases in the group over that of u with these margins, at an odds ratio of 1. */
export const stepUp = ({ cases, total, referenceCases, referenceTotal }: TwoGroups) => {
  const all = cases + referenceCases;
  return (u: number) => ((total - u) / (u + 1)) * ((all - u) / (referenceTotal - all + u + 1));
};

/**
 * How far the observed cases lie above their mean, and the variance, in the non-central hypergeometric distribution with odds
 * ratio t, all margins given. Whole numbers.
 *
 * Summed outward from a count near the mode, all weights positive (Liao & Rosen 2001, The American Statistician 55:366, for the
 * idea). Accuracy: 1e-13 relative for the variance.
 */
export function hypergeometricMoments(
  groups: TwoGroups,
  t: number,
): { readonly excess: number; readonly variance: number } {
  const { fewest, most } = supportOf(groups);
  const up = stepUp(groups);
  const start = Math.min(most, Math.max(fewest, Math.round(fittedTable(groups, t).cases)));
  let [sum, first, second] = [1, 0, 0];
  const add = (u: number, weight: number) => {
    const away = u - start;
    sum += weight;
    first += weight * away;
    second += weight * away * away;
    return weight * away * away > second * 1e-18 || weight > sum * 1e-18;
  };
  let weight = 1;
  for (let u = start; u < most; u += 1) {
    weight *= up(u) * t;
    if (!add(u + 1, weight)) break;
  }
  weight = 1;
  for (let u = start; u > fewest; u -= 1) {
    weight /= up(u - 1) * t;
    if (!add(u - 1, weight)) break;
  }
  const mean = first / sum;
  return { excess: groups.cases - start - mean, variance: second / sum - mean * mean };
}
