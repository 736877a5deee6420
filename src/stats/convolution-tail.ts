import { ArgumentError, checkLevel } from './argument-error.ts';
import { bracketedRoot } from './bracketed-root.ts';

/** A count of whole outcomes whose weights are coefficients times t^u, t the ratio in question. */
export interface TiltedCount {
  readonly fewest: number;
  readonly most: number;
  /** A count near the mode at the ratio t. */
  readonly mode: (t: number) => number;
  /** The weight of u + 1 over that of u at t = 1. */
  readonly up: (u: number) => number;
}

/** More values than this of a sum are refused: with fifty layers they take about half a second. */
export const mostExactSums = 100_000;

/** A weight below this part of the largest shows in no limit. */
const negligible = 1e-40;

/**
 * The exact lower limit of a ratio t from the sum of independent counts: the t at which a sum of at least `observed` has half of
 * the probability that the level leaves. The tail grows with t, so there is one root.
 *
 * The counts' weights at a guess of t are convolved; another t only multiplies the weight of a sum s by (t/guess)^s. Weights that
 * are negligible at the guess are left out, so the root is the next guess until it hardly moves.
 *
 * @param counts at least one, with `mostExactSums` values of their sum at most
 * @param observed the sum seen, above the fewest possible
 * @param guess a ratio near the estimate or the limit, above 0
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @throws ArgumentError for more
 *
 * Clopper & Pearson 1934 for one binomial count; Mehta, Patel & Gray 1985 (JASA 80:969) for strata. Accuracy: 1e-12 relative.
 */
export function lowerTailLimit(
  counts: readonly TiltedCount[],
  observed: number,
  guess: number,
  level: number,
): number {
  checkLevel(level);
  const sums = counts.reduce((sum, { fewest, most }) => sum + most - fewest, 1);
  if (!(sums <= mostExactSums)) {
    throw new ArgumentError(
      'too-many-sums',
      `an exact sum may have ${mostExactSums} values at most, not ${sums}`,
    );
  }
  for (let t = guess; ;) {
    const total = counts.map((count) => weightsOf(count, t)).reduce(convolve);
    const shift = shiftToTail(total, observed, (1 - level) / 2);
    t *= Math.exp(shift);
    // Nothing was left out, or the weights at the ends changed by less than a factor of e.
    if (total.weights.length === sums || Math.abs(shift) * total.weights.length < 1) return t;
  }
}

interface Weights {
  readonly first: number;
  readonly weights: Float64Array;
}

/** By how much ln t must change for a sum of at least `observed` to have the probability `half`. */
function shiftToTail({ first, weights }: Weights, observed: number, half: number): number {
  const excess = (shift: number) => {
    let [above, below] = [0, 0];
    weights.forEach((weight, at) => {
      // Relative to the observed sum, so that no power overflows where it matters.
      const away = first + at - observed;
      const tilted = weight * Math.exp(away * shift);
      if (away >= 0) above += tilted;
      else below += tilted;
    });
    return -Math.log((1 + below / above) * half);
  };
  let step = 1 / weights.length;
  let [low, high] = [-step, step];
  for (; excess(low) > 0; step *= 2) low -= step;
  for (; excess(high) < 0; step *= 2) high += step;
  return bracketedRoot(excess, low, high);
}

function weightsOf({ fewest, most, mode, up }: TiltedCount, t: number): Weights {
  const start = Math.min(most, Math.max(fewest, Math.round(mode(t))));
  const above: number[] = [];
  let weight = 1;
  for (let u = start; u < most; u += 1) {
    weight *= up(u) * t;
    if (weight < negligible) break;
    above.push(weight);
  }
  const below: number[] = [];
  weight = 1;
  for (let u = start; u > fewest; u -= 1) {
    weight /= up(u - 1) * t;
    if (weight < negligible) break;
    below.push(weight);
  }
  return { first: start - below.length, weights: Float64Array.from([...below.reverse(), 1, ...above]) };
}

function convolve(one: Weights, other: Weights): Weights {
  const weights = new Float64Array(one.weights.length + other.weights.length - 1);
  // Index loops over typed arrays: callbacks would take eight times as long.
  for (let i = 0; i < one.weights.length; i += 1) {
    const a = one.weights[i] ?? 0;
    for (let j = 0; j < other.weights.length; j += 1) {
      weights[i + j] = (weights[i + j] ?? 0) + a * (other.weights[j] ?? 0);
    }
  }
  const largest = weights.reduce((most, weight) => Math.max(most, weight), 0);
  const shown = (weight: number) => weight >= largest * negligible;
  const from = weights.findIndex(shown);
  const kept = weights.slice(from, weights.findLastIndex(shown) + 1);
  return { first: one.first + other.first + from, weights: kept.map((weight) => weight / largest) };
}
