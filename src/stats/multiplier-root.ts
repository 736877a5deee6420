import { bracketedRoot } from './bracketed-root.ts';

/** A root beside what it leaves of its bound, so that the smaller of the two keeps all its digits. */
export interface MultiplierAndRest {
  readonly multiplier: number;
  readonly rest: number;
}

/**
 * The root m in (0, bound) of a function that increases from below 0 to infinity at the bound: the Lagrange multiplier of a
 * constrained maximum. Near the bound the limits hang on bound - m, which formed from m would lose its digits wherever a group
 * has next to no cases, or next to nothing else (7 cases among 7.000000000000001 people, 7% of 100 as doubles); the
 * smaller of the two is therefore the unknown.
 *
 * @param excess the function of m and of bound - m
 * @param bound above 0
 * @param atZero its limit at m = 0, where the form itself may be 0 times infinity; below 0
 * @throws ArgumentError if the function does not change its sign in between
 */
export function multiplierRoot(
  excess: (multiplier: number, rest: number) => number,
  bound: number,
  atZero: number,
): MultiplierAndRest {
  const half = bound / 2;
  const atHalf = excess(half, half);
  if (atHalf < 0) {
    const rest = bracketedRoot((d) => excess(bound - d, d), 0, half, Infinity, atHalf);
    return { multiplier: bound - rest, rest };
  }
  const multiplier = bracketedRoot((m) => excess(m, bound - m), 0, half, atZero, atHalf);
  return { multiplier, rest: bound - multiplier };
}
