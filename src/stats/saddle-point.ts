/**
 * ln n! - [ln root(2 pi n) + n ln n - n], the error of Stirling's formula, for any n above 0; n! stands for the gamma function
 * of n + 1 where n is not whole. Accuracy: about 5e-15 absolute.
 */
export function stirlingError(n: number): number {
  if (n < 16) return Number.isInteger(n) ? logFactorial(n) - stirling(n) : fromFurtherUp(n);
  const square = n * n;
  return (1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square) / n;
}

const stirling = (n: number) => 0.5 * Math.log(2 * Math.PI * n) + n * Math.log(n) - n;

function logFactorial(n: number): number {
  let product = 1;
  for (let i = 2; i <= n; i += 1) product *= i;
  return Math.log(product);
}

/** The same from where the series serves, stepping down by n! = (n + 1)!/(n + 1). */
function fromFurtherUp(n: number): number {
  let product = 1;
  let at = n;
  while (at < 16) {
    at += 1;
    product *= at;
  }
  return stirlingError(at) + stirling(at) - Math.log(product) - stirling(n);
}

/**
 * x ln(x/m) + m - x, without cancellation where x is near m. Both above 0.
 *
 * Loader 2000 (Fast and accurate computation of binomial probabilities), whose D0 this is.
 */
export function deviance(x: number, m: number): number {
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
