import { ArgumentError, checkCases, checkCoverage } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';
import type { PlannedGroups } from './detectable-ratio.ts';

/**
 * How many times larger both groups would have to be to show a given risk ratio with the given frequency.
 *
 * @param groups their present sizes and the reference group's risk
 * @param ratio the risk ratio to be shown, not 1; 2 for a doubling
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @param power how often it must show, in [0.75, 0.9999]
 * @returns the factor; below 1 where the groups are larger than needed; `null` where the ratio would take the risk above 1
 * @throws ArgumentError for numbers out of range
 *
 * Normal approximation of the score test: (p1 - p2)^2 k = [z root(p(1 - p)(1/n1 + 1/n2)) + zb root(p1(1 - p1)/n1 + p2(1 - p2)/n2)]^2, p
 * the pooled risk (Fleiss, Levin & Paik 2003, Statistical Methods for Rates and Proportions, ch. 4, without correction).
 */
export function growthNeeded(
  groups: PlannedGroups,
  ratio: number,
  level: number,
  power: number,
): number | null {
  const { total, referenceTotal, referenceRisk } = groups;
  checkCases(0, total);
  checkCases(0, referenceTotal);
  checkCoverage(referenceRisk);
  const zPower = powerQuantile(power);
  const z = criticalValue(level);
  checkRatio(ratio);
  const risk = ratio * referenceRisk;
  if (risk > 1) return null;
  const pooled = (risk * total + referenceRisk * referenceTotal) / (total + referenceTotal);
  const none = Math.sqrt(pooled * (1 - pooled) * (1 / total + 1 / referenceTotal));
  const some = Math.sqrt(
    (risk * (1 - risk)) / total + (referenceRisk * (1 - referenceRisk)) / referenceTotal,
  );
  return ((z * none + zPower * some) / (risk - referenceRisk)) ** 2;
}

/**
 * How many cases in all it takes to show a given ratio from shares of cases (or of rates) with the given frequency.
 *
 * @param coverage the group's part of both coverages (or exposures), in (0, 1)
 * @returns not rounded
 *
 * Normal approximation of the score test of the group's share of the cases, s = cR/(1 - c + cR) against c.
 */
export function casesNeeded(coverage: number, ratio: number, level: number, power: number): number {
  checkCoverage(coverage);
  checkRatio(ratio);
  const zPower = powerQuantile(power);
  const z = criticalValue(level);
  const weighted = coverage * ratio;
  const share = weighted / (1 - coverage + weighted);
  const none = Math.sqrt(coverage * (1 - coverage));
  const some = Math.sqrt(share * (1 - share));
  // share - coverage, without the subtraction.
  const gap = (coverage * (1 - coverage) * (ratio - 1)) / (1 - coverage + weighted);
  return ((z * none + zPower * some) / gap) ** 2;
}

function powerQuantile(power: number): number {
  if (!(power >= 0.75 && power <= 0.9999)) {
    throw new ArgumentError('power-out-of-range', `a power must be within 0.75 and 0.9999, not ${power}`);
  }
  return criticalValue(2 * power - 1);
}

function checkRatio(ratio: number): void {
  if (!(ratio > 0 && ratio < Infinity && ratio !== 1)) {
    throw new ArgumentError(
      'ratio-out-of-range',
      `a ratio to be shown must be above 0 and not 1, not ${ratio}`,
    );
  }
}
