import { checkCoverage } from './argument-error.ts';

/**
 * What a wrong coverage does to the ratio from cases and coverage: d ln R/dc = -1/(c(1 - c)), per unit of coverage. A hundredth
 * of it is, to first order, the relative change of the ratio for one percentage point more: -4.2% at a coverage of 38%, where
 * the whole point gives -4.1%; beyond 95% the point itself is too large a step for it.
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
