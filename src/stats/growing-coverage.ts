import { ArgumentError, checkCaseCounts } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';
import { caseOddsInterval } from './case-odds-interval.ts';
import type { Interval } from './interval.ts';
import { shareRatio, shareRatioInterval } from './share-ratio.ts';

/** Cases in two groups while the group's share of the population went steadily from `start` to `end`. */
export interface GrowingCoverage {
  readonly cases: number;
  readonly referenceCases: number;
  /** In [0, 1], not both 0 and not both 1; growth or fall. */
  readonly start: number;
  readonly end: number;
}

/** A ratio under one assumption. */
export interface RatioUnder {
  readonly estimate: number | null;
  readonly interval: Interval;
}

/**
 * The ratio per person if the risk outside the group stayed the same all the time: coverage then counts with its mean,
 * (start + end)/2.
 *
 * From E x1 : E x2 = R times the integrals of c and of 1 - c over time (person-time argument).
 */
export function ratioUnderConstantRisk(from: GrowingCoverage, level: number): RatioUnder {
  check(from);
  const { cases, referenceCases, start, end } = from;
  const coverage = (start + end) / 2;
  const pair = { cases, referenceCases, coverage, referenceCoverage: 1 - coverage };
  return { estimate: shareRatio(pair), interval: shareRatioInterval(pair, level) };
}

/**
 * The ratio per person if all cases came evenly over time: the R at which the mean over the coverage c of Rc/(1 - c + Rc) is
 * the group's share of the cases, with the same inverse of the share's Wilson limits.
 *
 * Closed form of the mean, with k = R - 1: (R/k)[1 - ln((1 + k end)/(1 + k start))/(k(end - start))]; written here as a function
 * that does not cancel near k = 0. Derived for this program and agreeing with quadrature; the limits are slightly wide, since
 * the share of the cases is a mixture over time.
 */
export function ratioUnderEvenCases(from: GrowingCoverage, level: number): RatioUnder {
  check(from);
  const { cases, referenceCases, start, end } = from;
  const limits = caseOddsInterval(cases, referenceCases, level);
  const inverse = (odds: number | null) => (odds === null ? null : ratioAt(odds, start, end));
  return {
    estimate: referenceCases === 0 ? null : inverse(cases / referenceCases),
    interval: { low: inverse(limits.low), high: inverse(limits.high) },
  };
}

/** The outermost limits under both assumptions. */
export function hullOfGrowth(one: Interval, other: Interval): Interval {
  return {
    low: one.low === null || other.low === null ? null : Math.min(one.low, other.low),
    high: one.high === null || other.high === null ? null : Math.max(one.high, other.high),
  };
}

function ratioAt(caseOdds: number, start: number, end: number): number {
  if (caseOdds === 0) return 0;
  const target = Math.log(caseOdds);
  const excess = (logRatio: number) => logShareOdds(logRatio, start, end) - target;
  // The share of cases that is even in time lies between those at the two coverages, taken as constant.
  const at = [start, end].map((coverage) => target + Math.log((1 - coverage) / coverage));
  let [low, high] = [Math.min(...at), Math.max(...at)];
  if (!Number.isFinite(low)) low = Math.min(target, high) - 1;
  if (!Number.isFinite(high)) high = Math.max(target, low) + 1;
  for (let step = 1e-9; excess(low) > 0; step *= 2) low -= step;
  for (let step = 1e-9; excess(high) < 0; step *= 2) high += step;
  return Math.exp(bracketedRoot(excess, low, high));
}

/** The log odds of the group's share of evenly spread cases, at this log ratio. */
function logShareOdds(logRatio: number, start: number, end: number): number {
  if (logRatio > 0) return -logShareOdds(-logRatio, 1 - start, 1 - end);
  const ratio = Math.exp(logRatio);
  const share = meanShare(ratio, start, end);
  return Math.log(share / (1 - share));
}

/**
 * The mean of Rc/(1 + kc) over c from start to end, R at most 1: with the mean coverage m, half the span h, a = 1 + km and
 * e = kh/a it is (R/a)[m - (h^2 k/a^2) G(e)], G(e) = (artanh(e)/e - 1)/e^2.
 */
function meanShare(ratio: number, start: number, end: number): number {
  const k = ratio - 1;
  const mean = (start + end) / 2;
  const half = (end - start) / 2;
  const a = 1 + k * mean;
  const e = (k * half) / a;
  return (ratio / a) * (mean - ((half * half * k) / (a * a)) * artanhRest(e));
}

/** (artanh(e)/e - 1)/e^2 = 1/3 + e^2/5 + e^4/7 + ... */
function artanhRest(e: number): number {
  const square = e * e;
  if (square > 0.1) return (Math.atanh(e) / e - 1) / square;
  let sum = 0;
  let power = 1;
  for (let odd = 3; power > 1e-18; odd += 2) {
    sum += power / odd;
    power *= square;
  }
  return sum;
}

function check({ cases, referenceCases, start, end }: GrowingCoverage): void {
  checkCaseCounts(cases, referenceCases);
  const sum = start + end;
  if (!(start >= 0 && start <= 1 && end >= 0 && end <= 1 && sum > 0 && sum < 2)) {
    throw new ArgumentError(
      'coverage-out-of-range',
      `coverages must be within 0 and 1 and not both 0 or both 1, not ${start} and ${end}`,
    );
  }
}
