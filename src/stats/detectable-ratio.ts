import { checkCaseCounts, checkCoverage } from './argument-error.ts';
import { binomialProbability, binomialUpperTail } from './binomial-tail.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { criticalValue } from './critical-value.ts';
import { checkPower, growthNeeded } from './size-needed.ts';
import type { PlannedGroups } from './size-needed.ts';

/** The ratios nearest to 1 that would have shown, and how they were found. */
export interface DetectableRatio {
  /** Above 1; `null` where no ratio, however large, would have shown so often. */
  readonly above: number | null;
  /** Below 1; `null` where not even 0 would have shown so often. */
  readonly below: number | null;
  readonly method: 'enumeration' | 'normal-approximation';
}

/**
 * Could it have been seen? The risk ratios nearest to 1 that groups of these sizes would have shown (an interval on the right
 * side of 1) with the given frequency.
 *
 * @param groups sizes are rounded to whole people, and to one at least
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @param power how often it must show, in [0.75, 0.9999]; four times in five is 0.8
 * @throws ArgumentError for numbers out of range
 *
 * Method: all outcomes of the (N-1) chi-squared test (Campbell 2007) are enumerated, for the reference's risk as given; weights
 * below 1e-16 are left out. The normal approximation of size-needed.ts stands in where the standard deviation of each group's
 * cases passes 30 (it is then within 0.2% of the ratio's distance from 1), or 20 s1 + s2 passes 10,000 (too many outcomes).
 */
export function detectableRiskRatio(groups: PlannedGroups, level: number, power: number): DetectableRatio {
  const approximate = approximately(groups, level, power);
  const { referenceRisk } = groups;
  const total = Math.max(1, Math.round(groups.total));
  const referenceTotal = Math.max(1, Math.round(groups.referenceTotal));
  const reference = { p: referenceRisk, q: 1 - referenceRisk };
  const spread = (n: number, risk: number) => Math.sqrt(n * risk * (1 - risk));
  const own = spread(total, (approximate.above ?? 1) * referenceRisk);
  const other = spread(referenceTotal, referenceRisk);
  if (Math.min(own, other) > 30 || 20 * own + other > 10_000) return approximate;
  const z = criticalValue(level);
  const above = smallestRisk(total, referenceTotal, reference, z, power);
  // Fewer cases in the group are more "others": the same test with both outcomes exchanged.
  const below = smallestRisk(total, referenceTotal, { p: reference.q, q: reference.p }, z, power);
  return {
    above: above === null ? null : above.p / referenceRisk,
    below: below === null ? null : below.q / referenceRisk,
    method: 'enumeration',
  };
}

/**
 * The same for a ratio from shares of cases or from rates, given the number of all cases: the group's cases are then binomial, and
 * the tail beyond the score test's limit is always summed, never approximated.
 *
 * @param allCases in [0, 1e15], rounded to whole cases; without any there is nothing to show, on either side
 * @param coverage the group's part of both coverages (or exposures), in (0, 1)
 */
export function detectableShareRatio(
  allCases: number,
  coverage: number,
  level: number,
  power: number,
): DetectableRatio {
  checkCaseCounts(allCases);
  checkCoverage(coverage);
  checkPower(power);
  const [all, z, rest] = [Math.round(allCases), criticalValue(level), 1 - coverage];
  const above = smallestShareRatio(all, coverage, rest, z, power);
  const mirrored = smallestShareRatio(all, rest, coverage, z, power);
  return { above, below: mirrored === null ? null : 1 / mirrored, method: 'enumeration' };
}

function smallestShareRatio(
  all: number,
  share: number,
  rest: number,
  z: number,
  power: number,
): number | null {
  const fewest = Math.floor(all * share + z * Math.sqrt(all * share * rest)) + 1;
  if (fewest > all) return null;
  // It does not show where so many others are left.
  const excess = (logOdds: number) => {
    const { p, q } = riskOf(logOdds);
    return Math.log((1 - power) / binomialUpperTail(all - fewest + 1, all, q, p));
  };
  const start = Math.log(share / rest);
  return Math.exp(rootFrom(start, excess)) * (rest / share);
}

interface Risk {
  readonly p: number;
  readonly q: number;
}

function riskOf(logOdds: number): Risk {
  const odds = Math.exp(-Math.abs(logOdds));
  const [few, many] = [odds / (1 + odds), 1 / (1 + odds)];
  return logOdds < 0 ? { p: few, q: many } : { p: many, q: few };
}

/** Where an increasing function passes 0 to the right of a start. At no difference a test shows in 69% at most (Cantelli, z of 50%). */
function rootFrom(start: number, excess: (x: number) => number): number {
  let high = start + 1;
  for (let step = 1; excess(high) < 0; step *= 2) high += step;
  return bracketedRoot(excess, start, high);
}

/** The smallest risk above the reference's at which the test shows it often enough; `null` where there is none. */
function smallestRisk(
  total: number,
  referenceTotal: number,
  reference: Risk,
  z: number,
  power: number,
): Risk | null {
  const { first, weights } = outcomes(referenceTotal, reference);
  let sum = 0;
  const atMost = weights.map((weight) => (sum += weight));
  const all = total + referenceTotal;
  const k = (z * z * total * referenceTotal) / (all - 1);
  /** How often the reference has so few cases that so many in the group show: the smaller root in x2 of chi-squared = z^2. */
  const shownWith = (cases: number) => {
    const others = total - cases;
    const allCases =
      (cases * cases * all) / (cases * total + k / 2 + Math.sqrt(k * (cases * others + k / 4)));
    const most = Math.ceil(allCases - cases) - 1 - first;
    return most < 0 ? 0 : (atMost[most] ?? 1);
  };
  if (shownWith(total) < power) return null;
  const excess = (logOdds: number) => {
    const own = outcomes(total, riskOf(logOdds));
    return own.weights.reduce((shown, weight, at) => shown + weight * shownWith(own.first + at), -power);
  };
  return riskOf(rootFrom(Math.log(reference.p / reference.q), excess));
}

/** The binomial probabilities that matter, from the first of them on. */
function outcomes(
  n: number,
  { p, q }: Risk,
): { readonly first: number; readonly weights: readonly number[] } {
  const middle = Math.min(n, Math.round(n * p));
  const at = binomialProbability(middle, n, p, q);
  const above: number[] = [];
  for (let [x, weight] = [middle, at]; x < n && weight > 1e-16; x += 1) {
    weight *= ((n - x) / (x + 1)) * (p / q);
    above.push(weight);
  }
  const below: number[] = [];
  for (let [x, weight] = [middle, at]; x > 0 && weight > 1e-16; x -= 1) {
    weight *= (x / (n - x + 1)) * (q / p);
    below.push(weight);
  }
  return { first: middle - below.length, weights: [...below.reverse(), at, ...above] };
}

/** The ratios at which the groups, as they are, are just large enough. */
function approximately(groups: PlannedGroups, level: number, power: number): DetectableRatio {
  const excess = (ratio: number) => (growthNeeded(groups, ratio, level, power) ?? 0) - 1;
  const [least, most] = [1e-300, 1 / groups.referenceRisk];
  return {
    above: excess(most) > 0 ? null : bracketedRoot(excess, 1, most, Infinity),
    below: excess(least) > 0 ? null : bracketedRoot(excess, least, 1, undefined, Infinity),
    method: 'normal-approximation',
  };
}
