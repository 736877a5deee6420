import { bracketedRoot } from './bracketed-root.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { multiplierRoot } from './multiplier-root.ts';
import { scoreThreshold, swapped } from './score-factor.ts';

/**
 * Score interval of the risk ratio p1/p2, with Miettinen and Nurminen's factor N/(N-1).
 *
 * @param groups cases in [0, total], totals in (0, 1e15], together above 1; need not be whole
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns limits in [0, no limit]; no cases in the group: lower limit 0; none in the reference: no upper limit
 * @throws ArgumentError for anything else
 *
 * Miettinen & Nurminen 1985 (Statistics in Medicine 4:213); Koopman 1984 is the same without the factor. Solved for the
 * Lagrange multiplier m of the constrained maximum, which is the same in both groups: the root in (0, x1) of
 * m^2 [y1/(n1(x1 - m)) + y2/(n2(x2 + m))] = k, an increasing function, and then the limit is
 * (x1 - m)(n2 + m)/((n1 - m)(x2 + m)). No nested root and nothing that cancels: the forms as printed lose up to half of the
 * digits for rare risks. The upper limit is one over the lower limit of the swapped groups, to the last bit.
 * Accuracy: 1e-12 relative against 40-digit values for cases and totals to 1e9 and all levels.
 */
export function riskRatioInterval(groups: TwoGroups, level: number): Interval {
  const threshold = scoreThreshold(groups, level);
  const mirrored = lowerLimit(swapped(groups), threshold);
  return { low: lowerLimit(groups, threshold), high: mirrored === 0 ? null : 1 / mirrored };
}

function lowerLimit(groups: TwoGroups, threshold: number): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  if (cases === 0) return 0;
  const others = total - cases;
  const referenceOthers = referenceTotal - referenceCases;
  const excess = (m: number, rest: number) =>
    m *
      m *
      ((others === 0 ? 0 : others / (total * rest)) +
        referenceOthers / (referenceTotal * (referenceCases + m))) -
    threshold;
  if (others === 0) {
    const atEnd = excess(cases, 0);
    // Everybody in the group is a case, and so many are still allowed at the limit: the group's own risk is then below 1.
    if (atEnd <= 0) return (total / (total - atEnd)) * ((referenceTotal + total) / (referenceCases + total));
    const m = bracketedRoot((each) => excess(each, 0), 0, cases, -threshold, atEnd);
    return (referenceTotal + m) / (referenceCases + m);
  }
  const { multiplier, rest } = multiplierRoot(excess, cases, -threshold);
  return (rest / (others + rest)) * ((referenceTotal + multiplier) / (referenceCases + multiplier));
}
