import { ArgumentError, checkCoverage } from './argument-error.ts';

/**
 * The fraction of a group's cases above what the reference group's rate would have given: 1 - 1/RR.
 *
 * @param ratio risk or rate ratio, above 0; below 1 the fraction is negative (see `preventedFraction`)
 * @returns `null` at a ratio of 0: the fraction has no lower end there
 * @throws ArgumentError for a negative ratio or NaN
 *
 * Miettinen 1974 (American Journal of Epidemiology 99:325). Increasing in the ratio, so limits carry over.
 */
export function attributableFraction(ratio: number): number | null {
  checkRatio(ratio);
  return ratio === 0 ? null : (ratio - 1) / ratio;
}

/** The fraction prevented, for a ratio below 1: 1 - RR. Decreasing in the ratio, so limits change places. */
export function preventedFraction(ratio: number): number {
  checkRatio(ratio);
  return 1 - ratio;
}

/**
 * The fraction of all cases above the reference group's rate, the other group's share of the population being known:
 * c(RR - 1)/(1 + c(RR - 1)).
 *
 * @param ratio risk or rate ratio, 0 or above; crude only, never an adjusted one
 * @param coverage the group's share of the population, in (0, 1)
 * @throws ArgumentError for anything else
 *
 * Levin 1953 (Acta Unio Internationalis Contra Cancrum 9:531). Increasing in the ratio alone, so its limits carry over exactly.
 */
export function populationAttributableFraction(ratio: number, coverage: number): number {
  checkRatio(ratio);
  checkCoverage(coverage);
  const excess = coverage * (ratio - 1);
  return excess / (1 + excess);
}

function checkRatio(ratio: number): void {
  if (!(ratio >= 0)) throw new ArgumentError('ratio-out-of-range', `a ratio must be 0 or more, not ${ratio}`);
}
