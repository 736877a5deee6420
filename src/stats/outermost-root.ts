import { bracketedRoot } from './bracketed-root.ts';

/**
 * The outermost of the points at which a function first falls to 0 on the way inward from a far end. Stratified score
 * statistics are not always monotone, and the limit of an interval is then the outermost root.
 *
 * @param f positive at the far end
 * @param points from the far end inward; steps of the scan, between which one crossing is assumed
 * @returns the root to the limit of double precision, or `null` where the function is positive at every point
 */
export function outermostRoot(f: (x: number) => number, points: Iterable<number>): number | null {
  let before: readonly [number, number] | null = null;
  for (const x of points) {
    const value = f(x);
    if (value <= 0) {
      if (before === null) return x;
      const [farX, farValue] = before;
      return farX < x
        ? bracketedRoot(f, farX, x, farValue, value)
        : bracketedRoot(f, x, farX, value, farValue);
    }
    before = [x, value];
  }
  return null;
}

/**
 * Points on a log scale from far below a centre up to it: distances from 100 shrink by a fifteenth a step down to a hundredth,
 * then halve; beyond the centre they double. Broken sets of accepted values have been found only at distances of order 1.
 */
export function* upTo(centre: number): Generator<number> {
  for (let distance = 100; distance > 1e-16; distance *= distance > 0.01 ? 0.935 : 0.5)
    yield centre - distance;
  yield centre;
  for (let distance = 1; distance < 200; distance *= 2) yield centre + distance;
}
