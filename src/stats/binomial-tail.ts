/**
 * Upper tail of the binomial distribution in relative accuracy: P(X >= x) for X of n with probability p, as the probability
 * of the observed count times a sum of ratios outward from it, in which every term is positive.
 *
 * @param x whole, in [1, n]
 * @param n whole, in [1, 1e15]
 * @param p in (0, 1); `q` is 1 - p, passed so that neither is formed by a subtraction
 *
 * The probability of the count by the saddle point of Loader 2000 (Fast and accurate computation of binomial probabilities).
 * Quick where p is below x/n, as it is for limits; above, the sum runs over the bulk of the distribution.
 * Accuracy: about 1e-14 relative.
 */
export function binomialUpperTail(x: number, n: number, p: number, q: number): number {
  const odds = p / q;
  let sum = 1;
  let term = 1;
  for (let i = x; i < n; i += 1) {
    term *= ((n - i) / (i + 1)) * odds;
    sum += term;
    if (term < sum * 1e-18) break;
  }
  return binomialProbability(x, n, p, q) * sum;
}

/** P(X = x), with p and q as above. */
function binomialProbability(x: number, n: number, p: number, q: number): number {
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

/** ln n! - [ln root(2 pi n) + n ln n - n], for whole n above 0. */
function stirlingError(n: number): number {
  if (n < 16) return logFactorial(n) - (0.5 * Math.log(2 * Math.PI * n) + n * Math.log(n) - n);
  const square = n * n;
  return (1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square) / n;
}

function logFactorial(n: number): number {
  let product = 1;
  for (let i = 2; i <= n; i += 1) product *= i;
  return Math.log(product);
}

/** x ln(x/m) + m - x, without cancellation where x is near m. */
function deviance(x: number, m: number): number {
  if (Math.abs(x - m) >= 0.1 * (x + m)) return x * Math.log(x / m) + m - x;
  const v = (x - m) / (x + m);
  let sum = (x - m) * v;
  let odd = 2 * x * v;
  const square = v * v;
  for (let j = 1; ; j += 1) {
    odd *= square;
    const next = sum + odd / (2 * j + 1);
    if (next === sum) return next;
    sum = next;
  }
}
