import { checkLevel } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';

/** A count of whole outcomes whose weights are coefficients times t^u, t the ratio in question. */
export interface TiltedCount {
  readonly fewest: number;
  readonly most: number;
  /** A count near the mode at the first guess of t. */
  readonly start: number;
  /** The weight of u + 1 over that of u at t = 1. */
  readonly up: (u: number) => number;
}

/**
 * The exact lower limit of a ratio t from the sum of independent counts: the t at which a sum of at least `observed` has half of
 * the probability that the level leaves.
 *
 * The counts' weights at a guess of t are convolved once; another t only multiplies the weight of a sum s by (t/guess)^s. The tail
 * grows with t, so there is one root. Weights below 1e-120 of the largest are left out; they cannot show in any limit.
 *
 * @param counts at least one
 * @param observed the sum seen, above the fewest possible
 * @param guess of the limit, above 0
 * @param level confidence level as a share, in [0.5, 0.9999]
 *
 * Clopper & Pearson 1934 for one binomial count; Mehta, Patel & Gray 1985 (JASA 80:969) for strata. Accuracy: 1e-11 relative.
 */
export function lowerTailLimit(
  counts: readonly TiltedCount[],
  observed: number,
  guess: number,
  level: number,
): number {
  checkLevel(level);
  const half = (1 - level) / 2;
  const total = counts.map((count) => weightsOf(count, guess)).reduce(convolve);
  const excess = (shift: number) => {
    let [above, below] = [0, 0];
    total.weights.forEach((weight, at) => {
      const s = total.first + at;
      // Relative to the observed sum, so that no power overflows where it matters.
      const tilted = weight * Math.exp((s - observed) * shift);
      if (s >= observed) above += tilted;
      else below += tilted;
    });
    return -Math.log((1 + below / above) * half);
  };
  // Steps that change the end weights by a factor of e, so that no power can overflow.
  const first = 1 / total.weights.length;
  let [low, high] = [-first, first];
  for (let step = first; excess(low) > 0; step *= 2) low -= step;
  for (let step = first; excess(high) < 0; step *= 2) high += step;
  return guess * Math.exp(bracketedRoot(excess, low, high));
}

interface Weights {
  readonly first: number;
  readonly weights: readonly number[];
}

function weightsOf({ fewest, most, start, up }: TiltedCount, t: number): Weights {
  const above: number[] = [];
  let weight = 1;
  for (let u = start; u < most; u += 1) {
    weight *= up(u) * t;
    if (weight < 1e-120) break;
    above.push(weight);
  }
  const below: number[] = [];
  weight = 1;
  for (let u = start; u > fewest; u -= 1) {
    weight /= up(u - 1) * t;
    if (weight < 1e-120) break;
    below.push(weight);
  }
  return { first: start - below.length, weights: [...below.reverse(), 1, ...above] };
}

function convolve(one: Weights, other: Weights): Weights {
  const weights = new Array<number>(one.weights.length + other.weights.length - 1).fill(0);
  one.weights.forEach((a, i) => {
    other.weights.forEach((b, j) => {
      weights[i + j] = (weights[i + j] ?? 0) + a * b;
    });
  });
  const largest = weights.reduce((most, weight) => Math.max(most, weight), 0);
  const shown = (weight: number) => weight >= largest * 1e-120;
  const from = weights.findIndex(shown);
  const kept = weights.slice(from, weights.findLastIndex(shown) + 1);
  return { first: one.first + other.first + from, weights: kept.map((weight) => weight / largest) };
}
