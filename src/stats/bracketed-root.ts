import { ArgumentError } from './argument-error.ts';

/**
 * The root of a continuous function between two points at which it has opposite signs, to the limit of double precision.
 *
 * Chandrupatla 1997 (Advances in Engineering Software 28:145): inverse quadratic interpolation where it is safe, bisection
 * elsewhere. Infinite values at the ends are allowed; they only make the first steps bisections.
 *
 * @param f the function; must not return NaN inside the bracket
 * @param low, high the ends, `low < high`
 * @param atLow, atHigh the values there, of opposite sign or zero
 * @returns the root; the bracket has then shrunk to neighbouring doubles or the function is exactly zero
 * @throws ArgumentError if the ends do not bracket a root or the function returns NaN
 */
export function bracketedRoot(
  f: (x: number) => number,
  low: number,
  high: number,
  atLow: number = f(low),
  atHigh: number = f(high),
): number {
  if (atLow === 0) return low;
  if (atHigh === 0) return high;
  if (!(atLow < 0 !== atHigh < 0) || Number.isNaN(atLow) || Number.isNaN(atHigh)) {
    throw new ArgumentError(
      'no-bracket',
      `no change of sign between ${low} (${atLow}) and ${high} (${atHigh})`,
    );
  }
  // a is the newest point, b the one across the root, c the one before.
  let [a, fa, b, fb, c, fc] = [high, atHigh, low, atLow, low, atLow];
  let step = 0.5;
  for (;;) {
    const x = a + step * (b - a);
    if (x === a || x === b) return Math.abs(fa) < Math.abs(fb) ? a : b;
    const fx = f(x);
    if (Number.isNaN(fx)) throw new ArgumentError('undefined-value', `the function is undefined at ${x}`);
    if (fx === 0) return x;
    if (fx < 0 === fa < 0) {
      [c, fc] = [a, fa];
    } else {
      [c, fc] = [b, fb];
      [b, fb] = [a, fa];
    }
    [a, fa] = [x, fx];
    const best = Math.abs(fa) < Math.abs(fb) ? a : b;
    const smallest = (Number.EPSILON * Math.abs(best)) / Math.abs(b - a);
    if (smallest >= 0.5) return best;
    const xi = (a - b) / (c - b);
    const phi = (fa - fb) / (fc - fb);
    const interpolated =
      phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi
        ? (fa / (fb - fa)) * (fc / (fb - fc)) + (((c - a) / (b - a)) * (fa / (fc - fa)) * fb) / (fc - fb)
        : 0.5;
    step = Number.isFinite(interpolated) ? Math.min(1 - smallest, Math.max(smallest, interpolated)) : 0.5;
  }
}
