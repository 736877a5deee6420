import { ArgumentError, checkCases, checkCoverage } from './argument-error.ts';
import { binomialProbability, binomialUpperTail } from './binomial-tail.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { criticalValue } from './critical-value.ts';
import { nMinusOneChiSquared } from './null-test.ts';

/** The ratios nearest to 1 that would have shown, and how they were found. */
export interface DetectableRatio {
  /** Above 1; `null` where not even a risk of 1 would have shown so often. */
  readonly above: number | null;
  /** Below 1; `null` where not even a risk of 0 would have shown so often. */
  readonly below: number | null;
  readonly method: 'enumeration' | 'normal-approximation';
}

/** Two groups as they are known before their cases: their sizes and the reference group's risk, in (0, 1). */
export interface PlannedGroups {
  readonly total: number;
  readonly referenceTotal: number;
  readonly referenceRisk: number;
}

/**
 * Could it have been seen? The smallest risk ratio that groups of these sizes would have shown (an interval on the right side of
 * 1) with the given frequency.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @param power how often it must show, in [0.75, 0.9999]; four times in five is 0.8
 * @throws ArgumentError for numbers out of range
 *
 * Up to 20,000 whole people a group: all outcomes of the (N-1) chi-squared test are enumerated, weights below 1e-18 left out. Above,
 * or where sizes are not whole, the normal approximation of that test:
 * p1 - p2 = z root(f p(1 - p)(1/n1 + 1/n2)) + zb root(p1(1 - p1)/n1 + p2(1 - p2)/n2), p the pooled risk.
 */
export function detectableRiskRatio(groups: PlannedGroups, level: number, power: number): DetectableRatio {
  const { total, referenceTotal, referenceRisk } = groups;
  checkCases(0, total);
  checkCases(0, referenceTotal);
  checkCoverage(referenceRisk);
  checkPower(power);
  const z = criticalValue(level);
  const counted =
    Number.isInteger(total) && Number.isInteger(referenceTotal) && Math.max(total, referenceTotal) <= 20_000;
  const odds = referenceRisk / (1 - referenceRisk);
  const find = (reference: Risk) =>
    counted
      ? byEnumeration(total, referenceTotal, reference, z, power)
      : byApproximation(total, referenceTotal, reference, z, criticalValue(2 * power - 1));
  const above = find(riskOf(odds));
  // Fewer cases in the group are more "others": the same test with both outcomes exchanged.
  const below = find(riskOf(1 / odds));
  return {
    above: above === null ? null : above.p / referenceRisk,
    below: below === null ? null : below.q / referenceRisk,
    method: counted ? 'enumeration' : 'normal-approximation',
  };
}

/**
 * The same for a ratio from shares of cases or from rates, given the number of all cases: the group's cases are then binomial, and
 * enumeration is always possible.
 *
 * @param allCases whole, above 0, at most 1e9
 * @param coverage the group's part of both coverages (or exposures), in (0, 1)
 */
export function detectableShareRatio(
  allCases: number,
  coverage: number,
  level: number,
  power: number,
): DetectableRatio {
  checkCases(0, allCases);
  checkCoverage(coverage);
  checkPower(power);
  if (!Number.isSafeInteger(allCases) || allCases > 1e9) {
    throw new ArgumentError('not-whole', `all cases must be whole and at most 1e9, not ${allCases}`);
  }
  const z = criticalValue(level);
  const find = (share: number, rest: number) => {
    const least = Math.floor(allCases * share + z * Math.sqrt(allCases * share * rest)) + 1;
    if (least > allCases) return null;
    // Fewer than `least` cases: as many others as are left.
    const missed = (logOdds: number) => {
      const { p, q } = riskOf(Math.exp(logOdds));
      return Math.log(binomialUpperTail(allCases - least + 1, allCases, q, p) / (1 - power));
    };
    const start = Math.log(share / rest);
    let high = start + 1;
    for (let step = 1; missed(high) > 0; step *= 2) high += step;
    const root = bracketedRoot((at) => -missed(at), start, high);
    return Math.exp(root) * (rest / share);
  };
  const above = find(coverage, 1 - coverage);
  const mirrored = find(1 - coverage, coverage);
  return { above, below: mirrored === null ? null : 1 / mirrored, method: 'enumeration' };
}

interface Risk {
  readonly p: number;
  readonly q: number;
}

const riskOf = (odds: number): Risk =>
  odds < 1
    ? { p: odds / (1 + odds), q: 1 / (1 + odds) }
    : { p: 1 / (1 + 1 / odds), q: 1 / odds / (1 + 1 / odds) };

/** The smallest risk above the reference's at which the test shows it often enough; `null` where there is none. */
function byEnumeration(
  total: number,
  referenceTotal: number,
  reference: Risk,
  z: number,
  power: number,
): Risk | null {
  const outcomes = probabilities(referenceTotal, reference);
  // For each outcome of the reference the fewest cases that show more; they rise together.
  let fewest = 0;
  const least = outcomes.weights.map((_, at) => {
    const referenceCases = outcomes.first + at;
    for (; fewest <= total; fewest += 1) {
      const groups = { cases: fewest, total, referenceCases, referenceTotal };
      const more = fewest * referenceTotal > referenceCases * total;
      if (more && nMinusOneChiSquared(groups) > z * z) break;
    }
    return fewest;
  });
  const shown = (own: Risk) => {
    const { first, weights } = probabilities(total, own);
    const atLeast = [...weights];
    for (let at = atLeast.length - 2; at >= 0; at -= 1) {
      atLeast[at] = (atLeast[at] ?? 0) + (atLeast[at + 1] ?? 0);
    }
    return outcomes.weights.reduce((sum, weight, at) => {
      const from = (least[at] ?? Infinity) - first;
      return sum + weight * (from <= 0 ? (atLeast[0] ?? 0) : (atLeast[from] ?? 0));
    }, 0);
  };
  if (least.every((cases) => cases > total)) return null;
  const excess = (logOdds: number) => shown(riskOf(Math.exp(logOdds))) - power;
  const start = Math.log(reference.p / reference.q);
  let high = start + 1;
  for (let step = 1; excess(high) < 0; step *= 2) {
    high += step;
    // A risk of 1 is not enough either.
    if (high > 700) return null;
  }
  return riskOf(Math.exp(bracketedRoot(excess, start, high)));
}

/** The binomial probabilities that matter, from the first of them on. */
function probabilities(
  n: number,
  { p, q }: Risk,
): { readonly first: number; readonly weights: readonly number[] } {
  const middle = Math.min(n, Math.round(n * p));
  const at = binomialProbability(middle, n, p, q);
  const above: number[] = [];
  let weight = at;
  for (let x = middle; x < n && weight > 1e-18; x += 1) {
    weight *= ((n - x) / (x + 1)) * (p / q);
    above.push(weight);
  }
  const below: number[] = [];
  weight = at;
  for (let x = middle; x > 0 && weight > 1e-18; x -= 1) {
    weight *= (x / (n - x + 1)) * (q / p);
    below.push(weight);
  }
  return { first: middle - below.length, weights: [...below.reverse(), at, ...above] };
}

function byApproximation(
  total: number,
  referenceTotal: number,
  reference: Risk,
  z: number,
  zPower: number,
): Risk | null {
  const all = total + referenceTotal;
  const excess = (logOdds: number) => {
    const own = riskOf(Math.exp(logOdds));
    const pooled = (own.p * total + reference.p * referenceTotal) / all;
    const rest = (own.q * total + reference.q * referenceTotal) / all;
    const none = (pooled * rest * all) / (all - 1);
    const under = z * Math.sqrt(none * (1 / total + 1 / referenceTotal));
    const spread = Math.sqrt((own.p * own.q) / total + (reference.p * reference.q) / referenceTotal);
    return own.p - reference.p - under - zPower * spread;
  };
  const start = Math.log(reference.p / reference.q);
  let high = start + 1;
  for (let step = 1; excess(high) < 0; step *= 2) {
    high += step;
    if (high > 700) return null;
  }
  return riskOf(Math.exp(bracketedRoot(excess, start, high)));
}

function checkPower(power: number): void {
  if (!(power >= 0.75 && power <= 0.9999)) {
    throw new ArgumentError('power-out-of-range', `a power must be within 0.75 and 0.9999, not ${power}`);
  }
}
