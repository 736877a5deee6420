import { bracketedRoot } from './bracketed-root.ts';
import type { TwoGroups } from './interval.ts';
import { crossDifference } from './null-test.ts';
import { swapped } from './score-factor.ts';

/**
 * q(1 - q) for the root q in [0, 1] of a group's quadratic under a constrained difference, with the multiplier l >= 0. `few` is x
 * for the reference group and y for the other (their quadratics are mirror images) and `beyond` is l - n, formed by the caller
 * without a subtraction.
 */
export function spread(l: number, beyond: number, total: number, few: number): number {
  const root = Math.sqrt(beyond * beyond + 4 * l * few);
  const small = beyond < 0 ? (2 * few) / (root - beyond) : l === 0 ? few / total : (root + beyond) / (2 * l);
  const large = (2 * (total - few)) / (l + total + root);
  return small * large;
}

/**
 * q1(1 - q1)/n1 + q2(1 - q2)/n2 at the maximum likelihood estimates of two risks whose difference is d, in [-1, 1]; without the
 * factor N/(N - 1).
 *
 * Through the Lagrange multiplier l (Miettinen & Nurminen 1985, see risk-difference-interval.ts): l V(l) = (p1 - p2) - d, whose
 * left side grows with l.
 */
export function constrainedDifferenceVariance(groups: TwoGroups, d: number): number {
  const { total, referenceTotal } = groups;
  const distance = crossDifference(groups) / total / referenceTotal - d;
  return distance >= 0 ? varianceBelow(groups, distance) : varianceBelow(swapped(groups), -distance);
}

function varianceBelow(
  { cases, total, referenceCases, referenceTotal }: TwoGroups,
  distance: number,
): number {
  const others = total - cases;
  const variance = (l: number) =>
    spread(l, l - total, total, others) / total +
    spread(l, l - referenceTotal, referenceTotal, referenceCases) / referenceTotal;
  const atEstimate = variance(0);
  if (distance === 0) return atEstimate;
  const excess = (l: number) => l * variance(l) - distance;
  let high = atEstimate > 0 ? (2 * distance) / atEstimate : total + referenceTotal;
  while (excess(high) < 0) {
    high *= 2;
    // The difference of -1 that only "nobody against everybody" has: no spread is left.
    if (high > 1e150) return 0;
  }
  const l = bracketedRoot(excess, 0, high, -distance, excess(high));
  // Near a corner (a group full, or the reference empty) the quotient keeps the digits that l - n loses.
  return l * 4 > Math.min(total, referenceTotal) ? distance / l : variance(l);
}
