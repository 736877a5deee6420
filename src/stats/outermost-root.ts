import { bracketedRoot } from './bracketed-root.ts';

/** A function's value beside a step towards the estimate within which it cannot fall from there to 0. */
export interface Guarded {
  readonly value: number;
  readonly step: number;
}

/**
 * The first point at which a function falls to 0 on the way from a far end up to the estimate. Stratified score statistics are
 * not always monotone; the limit of an interval is then the outermost of the roots.
 *
 * No step is longer than the function allows or, where that is less, a 1024th of what is left of the way (of 1 at most): only
 * roots in pairs nearer together than that can be passed over.
 *
 * @param f positive at the far end
 * @param far, near the ends, `far < near`
 * @returns the root to the limit of double precision; `null` where the function is positive all the way
 */
export function outermostRoot(f: (x: number) => Guarded, far: number, near: number): number | null {
  let [x, at] = [far, f(far)];
  if (at.value <= 0) return far;
  while (x < near) {
    const next = Math.min(near, x + Math.max(at.step, Math.min(1, near - x) / 1024));
    const atNext = f(next);
    if (atNext.value <= 0) return bracketedRoot((each) => f(each).value, x, next, at.value, atNext.value);
    if (next === x) return x;
    [x, at] = [next, atNext];
  }
  return null;
}

/**
 * gap - z root(variance), a function of ln t, for a sum of independent yes-or-no counts whose odds grow with t: binomial and
 * hypergeometric counts are such sums. `gap` falls by the variance, and the variance grows by its own size at most.
 */
export function guardedCounts(gap: number, variance: number, z: number): Guarded {
  const value = gap - z * Math.sqrt(variance);
  const most = (2 * (gap + variance)) / (z + Math.sqrt(z * z + 4 * (gap + variance)));
  return { value, step: variance > 0 ? 2 * Math.log(most / Math.sqrt(variance)) : 1 };
}

/** gap - z root(variance), where a step d takes `slope` d from the gap and adds at most `growth` d to the variance. */
export function guardedDifference(
  { gap, slope }: { readonly gap: number; readonly slope: number },
  { variance, growth }: { readonly variance: number; readonly growth: number },
  z: number,
): Guarded {
  const value = gap - z * Math.sqrt(variance);
  const rest = value * (gap + z * Math.sqrt(variance));
  return { value, step: smallestRoot(slope * slope, 2 * gap * slope + z * z * growth, rest) };
}

/** The smallest positive root of a x^2 - b x + c = 0, c above 0. */
export const smallestRoot = (a: number, b: number, c: number) =>
  (2 * c) / (b + Math.sqrt(Math.max(0, b * b - 4 * a * c)));
