import { checkCases, checkLevel, checkWhole } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { oddsRatioInterval } from './odds-ratio-interval.ts';
import { swapped } from './score-factor.ts';
import { smoothAbove, smoothTailSum } from './smooth-tail.ts';
import type { SteppedFactorial } from './smooth-tail.ts';

/**
 * Exact conditional interval of the odds ratio, central: each tail of the non-central hypergeometric distribution of the
 * group's cases, given all margins, holds half of what the level leaves.
 *
 * @param groups whole numbers, cases in [0, total], totals in [1, 1e15], together above 1
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns lower limit 0 where the cases are the fewest that the margins allow, no upper limit where they are the most
 * @throws ArgumentError for anything else
 *
 * Cornfield 1956 (Proc. 3rd Berkeley Symp. 4:135). The tails are sums of ratios outward from the observed count, all terms
 * positive; where all four cells pass 1e8 an integral takes the sum's place. Accuracy: 1e-12 relative against 40-digit values.
 */
export function conditionalOddsRatioInterval(groups: TwoGroups, level: number): Interval {
  checkLevel(level);
  check(groups);
  const mirrored = lowerLimit(swapped(groups), level);
  return { low: lowerLimit(groups, level), high: mirrored === 0 ? null : 1 / mirrored };
}

function lowerLimit(groups: TwoGroups, level: number): number {
  const { cases, referenceCases, referenceTotal } = groups;
  if (cases === 0 || referenceCases === referenceTotal) return 0;
  const half = (1 - level) / 2;
  const excess = (logOdds: number) => Math.log(upperTail(groups, Math.exp(logOdds)) / half);
  // The score limit is near; the bracket grows from it.
  const near = Math.log(oddsRatioInterval(groups, level).low ?? 1);
  let low = near - 0.5;
  let high = near + 0.5;
  for (let step = 0.5; excess(low) > 0; step *= 2) low -= step;
  for (let step = 0.5; excess(high) < 0; step *= 2) high += step;
  return Math.exp(bracketedRoot(excess, low, high));
}

/** P(X >= cases) at this odds ratio, given the margins. */
function upperTail({ cases, total, referenceCases, referenceTotal }: TwoGroups, oddsRatio: number): number {
  const allCases = cases + referenceCases;
  const ratioUp = (u: number) =>
    ((total - u) / (u + 1)) * ((allCases - u) / (referenceTotal - allCases + u + 1)) * oddsRatio;
  const cells = [
    { at: cases, step: 1 },
    { at: total - cases, step: -1 },
    { at: referenceCases, step: -1 },
    { at: referenceTotal - referenceCases, step: 1 },
  ] as const;
  const smooth = cells.every(({ at }) => at > smoothAbove);
  const above = smooth
    ? smoothTailSum(oddsRatio, cells) - 1
    : outward(cases, Math.min(total, allCases), 1, ratioUp);
  const below = smooth
    ? smoothTailSum(1 / oddsRatio, cells.map(turned)) - 1
    : outward(cases, Math.max(0, allCases - referenceTotal), -1, (u) => 1 / ratioUp(u - 1));
  // Written so that neither an endless sum above nor one below leaves the quotient undefined.
  return 1 / (1 + below / (1 + above));
}

/** The same cell on the way inward. */
const turned = ({ at, step }: SteppedFactorial): SteppedFactorial => ({ at, step: step === 1 ? -1 : 1 });

/** The sum of the products of ratios from `start` (left out) to `end`, in units of the term at `start`. */
function outward(start: number, end: number, direction: 1 | -1, ratio: (u: number) => number): number {
  let sum = 0;
  let term = 1;
  for (let u = start; u !== end; u += direction) {
    const factor = ratio(u);
    term *= factor;
    sum += term;
    if (factor < 1 && term < sum * 1e-18) break;
    if (sum === Infinity) break;
  }
  return sum;
}

function check({ cases, total, referenceCases, referenceTotal }: TwoGroups): void {
  checkCases(cases, total);
  checkCases(referenceCases, referenceTotal);
  checkWhole(cases, total, referenceCases, referenceTotal);
}
