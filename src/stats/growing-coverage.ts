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
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @throws ArgumentError for cases or coverages out of range
 *
 * From E x1 : E x2 = R times the integrals of c and of 1 - c over time (person-time argument). Accuracy: 1e-13 relative.
 */
export function ratioUnderConstantRisk(from: GrowingCoverage, level: number): RatioUnder {
  check(from);
  const { cases, referenceCases, start, end } = from;
  const pair = {
    cases,
    referenceCases,
    coverage: middle(start, end),
    referenceCoverage: middle(1 - start, 1 - end),
  };
  return { estimate: shareRatio(pair), interval: shareRatioInterval(pair, level) };
}

/**
 * The ratio per person if all cases came evenly over time: the R at which the mean over the coverage c of Rc/(1 - c + Rc) is
 * the group's share of the cases, with the same inverse of the share's Wilson limits.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns estimate 0 and lower limit 0 without cases in the group, no estimate and no upper limit without cases in the reference
 * @throws ArgumentError for cases or coverages out of range
 *
 * Closed form of the mean, with k = R - 1: (R/k)[1 - ln((1 + k end)/(1 + k start))/(k(end - start))], which cancels near k = 0 and
 * near coverages of 0 and 1; written below so that it does not. Derived for this program and held to quadrature; the limits
 * are slightly wide, since the share of the cases is a mixture over time. Accuracy: 1e-12 relative.
 */
export function ratioUnderEvenCases(from: GrowingCoverage, level: number): RatioUnder {
  check(from);
  const { cases, referenceCases, start, end } = from;
  const limits = caseOddsInterval(cases, referenceCases, level);
  const course = courseOf(start, end);
  const inverse = (odds: number | null) => (odds === null ? null : ratioAt(odds, course));
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

/** A group's share of the population beside what it leaves of 1, so that neither is formed by a subtraction later. */
interface Part {
  readonly own: number;
  readonly rest: number;
}
interface Course {
  readonly start: Part;
  readonly end: Part;
  readonly mean: Part;
  readonly halfSpan: number;
}

function courseOf(start: number, end: number): Course {
  const part = (coverage: number) => ({ own: coverage, rest: 1 - coverage });
  const mean = { own: middle(start, end), rest: middle(1 - start, 1 - end) };
  return { start: part(start), end: part(end), mean, halfSpan: (end - start) / 2 };
}

const exchanged = ({ own, rest }: Part): Part => ({ own: rest, rest: own });

/** The same as the other group sees it. */
const swappedCourse = ({ start, end, mean, halfSpan }: Course): Course => ({
  start: exchanged(start),
  end: exchanged(end),
  mean: exchanged(mean),
  halfSpan: -halfSpan,
});

/** The ratio at which evenly spread cases fall to the group at these odds. */
function ratioAt(caseOdds: number, course: Course): number {
  if (caseOdds === 0) return 0;
  const target = Math.log(caseOdds);
  const excess = (logRatio: number) => logCaseOdds(logRatio, course) - target;
  // What the mean coverage would give; a few doublings lead from there to the root.
  const near = target - Math.log(course.mean.own / course.mean.rest);
  let [low, high] = [near - 1e-9, near + 1e-9];
  for (let step = 0.1; excess(low) > 0; step *= 2) low -= step;
  for (let step = 0.1; excess(high) < 0; step *= 2) high += step;
  return Math.exp(bracketedRoot(excess, low, high));
}

/**
 * The log of the odds s/(1 - s) at which evenly spread cases fall to the group, at this log ratio. For R at most 1, with the mean
 * coverage m, half the span h, w = 1 - c + Rc, e = (R - 1)h/w(m) and q = (1 - R)(h/w(m))^2 (artanh(e)/e - 1)/e^2 they are
 * R(m + q)/(1 - m - Rq), and the difference leaves at least half of 1 - m.
 */
function logCaseOdds(logRatio: number, course: Course): number {
  // Above 1 the groups change places.
  if (logRatio > 0) return -logCaseOdds(-logRatio, swappedCourse(course));
  const { start, end, mean, halfSpan } = course;
  const ratio = Math.exp(logRatio);
  const weight = ({ own, rest }: Part) => rest + ratio * own;
  const reach = halfSpan / weight(mean);
  const e = Math.expm1(logRatio) * reach;
  const artanh = Math.log(weight(end) / weight(start)) / 2;
  const q = -Math.expm1(logRatio) * reach * reach * artanhRest(e, artanh);
  return logRatio + Math.log((mean.own + q) / (mean.rest - ratio * q));
}

/** (artanh(e)/e - 1)/e^2 = 1/3 + e^2/5 + e^4/7 + ... */
function artanhRest(e: number, artanh: number): number {
  const square = e * e;
  if (square > 0.1) return (artanh / e - 1) / square;
  let sum = 0;
  let power = 1;
  for (let odd = 3; power > 1e-18; odd += 2) {
    sum += power / odd;
    power *= square;
  }
  return sum;
}

const middle = (one: number, other: number) => (one + other) / 2;

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
