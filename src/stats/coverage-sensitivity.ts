import { checkCoverage } from './argument-error.ts';

/**
 * What a wrong coverage does to the ratio from cases and coverage: d ln R/dc = -1/(c(1 - c)), per unit of coverage. A hundredth
 * of it is the relative change of the ratio for one percentage point more.
 *
 * @param coverage in (0, 1)
 * @throws ArgumentError for anything else
 *
 * The derivative of ln[x1/x2 (1 - c)/c] (Orenstein et al. 1985 print the curves).
 */
export function coverageSensitivity(coverage: number): number {
  checkCoverage(coverage);
  return -1 / (coverage * (1 - coverage));
}
