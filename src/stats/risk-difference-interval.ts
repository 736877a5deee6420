import { bracketedRoot } from './bracketed-root.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { crossDifference } from './null-test.ts';
import { scoreThreshold, swapped } from './score-factor.ts';

/**
 * Score interval of the risk difference p1 - p2, with Miettinen and Nurminen's factor N/(N-1).
 *
 * @param groups cases in [0, total], totals in (0, 1e15], together above 1; need not be whole
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits within [-1, 1], both always there
 * @throws ArgumentError for anything else
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213). The cubic as printed loses all digits for rare risks, so the
 * limit is found through the multiplier l of the constrained maximum: the root of l^2 V(l) = k with
 * V = q1(1 - q1)/n1 + q2(1 - q2)/n2, each q the root of a quadratic written without a subtraction; the limit is then
 * the estimate minus l V(l). Where a group is full or the reference empty, or all but so, V bends sharply at l = n1 (or n2); a
 * root beyond it is found as the distance from there, since forming l - n from l would lose half of the digits. The upper limit is
 * minus the lower limit of the swapped groups, to the last bit.
 * Accuracy: 1e-12 of the larger of the limit and the interval's width, against 40-digit values.
 */
export function riskDifferenceInterval(groups: TwoGroups, level: number): Interval {
  const threshold = scoreThreshold(groups, level);
  const high = -lowerLimit(swapped(groups), threshold);
  return { low: lowerLimit(groups, threshold), high: high === 0 ? 0 : high };
}

function lowerLimit(groups: TwoGroups, threshold: number): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const others = total - cases;
  if (cases === 0 && referenceCases === referenceTotal) return -1;
  /** V at l = corner + d. */
  const variance = (corner: number, d: number) =>
    spread(corner + d, corner - total + d, total, others) / total +
    spread(corner + d, corner - referenceTotal + d, referenceTotal, referenceCases) / referenceTotal;
  const excess = (corner: number) => (d: number) => (corner + d) ** 2 * variance(corner, d) - threshold;
  const corner = Math.max(0, ...[total, referenceTotal].filter((at) => excess(at)(0) < 0));
  const from = excess(corner);
  let high = corner === 0 ? Math.sqrt(threshold / Math.max(variance(0, 0), Number.MIN_VALUE)) : 1;
  if (!Number.isFinite(high) || high === 0) high = 1;
  while (from(high) < 0) high *= 2;
  const d = bracketedRoot(from, 0, high);
  const estimate = crossDifference(groups) / total / referenceTotal;
  return estimate - (corner + d) * variance(corner, d);
}

/**
 * q(1 - q) for the root q in [0, 1] of a group's quadratic under a constrained difference, with the multiplier l >= 0. `few` is x
 * for the reference group and y for the other (their quadratics are mirror images) and `beyond` is l - n, formed by the caller
 * without a subtraction.
 */
function spread(l: number, beyond: number, total: number, few: number): number {
  const root = Math.sqrt(beyond * beyond + 4 * l * few);
  const small = beyond < 0 ? (2 * few) / (root - beyond) : l === 0 ? few / total : (root + beyond) / (2 * l);
  const large = (2 * (total - few)) / (l + total + root);
  return small * large;
}
