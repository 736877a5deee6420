import { ArgumentError } from './argument-error.ts';
import { criticalValue } from './critical-value.ts';
import type { Interval } from './interval.ts';
import { sumOver, usableStrata } from './strata.ts';
import type { Strata } from './strata.ts';

/** Which people's layers serve as weights: both groups together, the group's, or the reference group's. */
export type StandardPopulation = 'whole' | 'group' | 'reference';

export interface StandardisedRisks {
  readonly risk: number;
  readonly referenceRisk: number;
  /** `null` where the reference's standardised risk is 0. */
  readonly ratio: number | null;
}

/**
 * Both groups' risks as they would be in one standard population, and their ratio.
 *
 * @throws ArgumentError for counts out of range, or where no layer has people in both groups
 *
 * Direct standardisation, common practice (Rothman, Modern Epidemiology). With the group's own layers as the standard the ratio is
 * the standardised morbidity ratio.
 */
export function standardisedRisks(strata: Strata, standard: StandardPopulation): StandardisedRisks {
  const layers = weighted(strata, standard);
  const risk = sumOver(layers, ({ share, p1 }) => share * p1);
  const referenceRisk = sumOver(layers, ({ share, p2 }) => share * p2);
  return { risk, referenceRisk, ratio: referenceRisk === 0 ? null : risk / referenceRisk };
}

/**
 * Interval of that ratio on the log scale, weights taken as known.
 *
 * @param level confidence level as a share, in [0.5, 0.9999]
 * @returns `null` where a standardised risk is 0: this interval has no form for it
 *
 * Delta method: the variance of ln ratio is sum w^2 p(1 - p)/n over the squared standardised risk, for both groups. Not of the
 * score family; it may disagree with the pooled ratio about "no difference" in small layers.
 */
export function standardisedRiskRatioInterval(
  strata: Strata,
  standard: StandardPopulation,
  level: number,
): Interval | null {
  const z = criticalValue(level);
  const { risk, referenceRisk, ratio } = standardisedRisks(strata, standard);
  if (ratio === null || ratio === 0) return null;
  const layers = weighted(strata, standard);
  const own = sumOver(layers, ({ share, p1, groups: { cases, total } }) => {
    return (share * share * p1 * ((total - cases) / total)) / total;
  });
  const reference = sumOver(layers, ({ share, p2, groups: { referenceCases, referenceTotal } }) => {
    return (share * share * p2 * ((referenceTotal - referenceCases) / referenceTotal)) / referenceTotal;
  });
  const reach = z * Math.sqrt(own / (risk * risk) + reference / (referenceRisk * referenceRisk));
  return { low: ratio * Math.exp(-reach), high: ratio * Math.exp(reach) };
}

function weighted(strata: Strata, standard: StandardPopulation) {
  const usable = usableStrata(strata);
  const size = (groups: Strata[number]) => {
    switch (standard) {
      case 'whole':
        return groups.total + groups.referenceTotal;
      case 'group':
        return groups.total;
      case 'reference':
        return groups.referenceTotal;
      default:
        throw new ArgumentError(
          'unknown-standard',
          `no standard population of this name: ${String(standard)}`,
        );
    }
  };
  const all = sumOver(usable, size);
  return usable.map((groups) => ({
    groups,
    share: size(groups) / all,
    p1: groups.cases / groups.total,
    p2: groups.referenceCases / groups.referenceTotal,
  }));
}
