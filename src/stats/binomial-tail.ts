import { deviance, stirlingError } from './saddle-point.ts';
import { smoothAbove, smoothTailSum } from './smooth-tail.ts';

/**
 * Upper tail of the binomial distribution in relative accuracy: P(X >= x) for X of n with probability p, as the probability
 * of the observed count times a sum of ratios outward from it, in which every term is positive.
 *
 * @param x whole, in [1, n]
 * @param n whole, in [1, 1e15]
 * @param p in (0, 1); `q` is 1 - p, passed so that neither is formed by a subtraction
 *
 * The probability of the count by the saddle point of Loader 2000 (Fast and accurate computation of binomial probabilities).
 * Meant for p below x/n, as it is for limits: the terms then fall. Where both x and n - x pass 1e8 an integral takes the sum's place.
 * Accuracy: about 1e-14 relative.
 */
export function binomialUpperTail(x: number, n: number, p: number, q: number): number {
  return binomialProbability(x, n, p, q) * tailInUnits(x, n, p / q);
}

/** P(X >= x) in units of P(X = x). */
function tailInUnits(x: number, n: number, odds: number): number {
  if (Math.min(x, n - x) > smoothAbove) {
    return smoothTailSum(odds, [
      { at: x, step: 1 },
      { at: n - x, step: -1 },
    ]);
  }
  let sum = 1;
  let term = 1;
  for (let i = x; i < n; i += 1) {
    term *= ((n - i) / (i + 1)) * odds;
    sum += term;
    if (term < sum * 1e-18) break;
  }
  return sum;
}

/** P(X = x), with p and q as above; x in [0, n]. */
export function binomialProbability(x: number, n: number, p: number, q: number): number {
  if (x === 0) return Math.exp(n * (p < 0.1 ? Math.log1p(-p) : Math.log(q)));
  if (x === n) return Math.exp(n * (q < 0.1 ? Math.log1p(-q) : Math.log(p)));
  const others = n - x;
  const exponent =
    stirlingError(n) -
    stirlingError(x) -
    stirlingError(others) -
    deviance(x, n * p) -
    deviance(others, n * q);
  return Math.exp(exponent) * Math.sqrt(n / (2 * Math.PI * x * others));
}
