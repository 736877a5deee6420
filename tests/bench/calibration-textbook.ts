import { criticalValue } from '../../src/stats/critical-value.ts';
import type { TwoGroups } from '../../src/stats/interval.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';
import { level } from './calibration-grid.ts';
import type { MaybeInterval } from './calibration-grid.ts';

/**
 * The common textbook intervals at 95%, to be measured beside the ones in use. `null` where a formula has none: a logarithm
 * of 0 or a division by it. They serve nothing else.
 */

const z = criticalValue(level);

const around = (estimate: number, variance: number): MaybeInterval =>
  Number.isFinite(variance)
    ? { low: estimate - z * Math.sqrt(variance), high: estimate + z * Math.sqrt(variance) }
    : null;
const onLogs = (ratio: number, variance: number): MaybeInterval =>
  Number.isFinite(variance)
    ? { low: ratio * Math.exp(-z * Math.sqrt(variance)), high: ratio * Math.exp(z * Math.sqrt(variance)) }
    : null;

/** Katz et al. 1978 (Biometrics 34:469): ln RR with the variance 1/x1 - 1/n1 + 1/x2 - 1/n2. */
export function logRiskRatio({ cases, total, referenceCases, referenceTotal }: TwoGroups): MaybeInterval {
  const variance = 1 / cases - 1 / total + 1 / referenceCases - 1 / referenceTotal;
  return onLogs(cases / total / (referenceCases / referenceTotal), variance);
}

/** The same with a half added to every count and total (Walter 1975, Biometrika 62:371). */
export const logRiskRatioWithHalves = (groups: TwoGroups) =>
  logRiskRatio({
    cases: groups.cases + 0.5,
    total: groups.total + 0.5,
    referenceCases: groups.referenceCases + 0.5,
    referenceTotal: groups.referenceTotal + 0.5,
  });

/** Wald: p1 - p2 with the variance p1(1 - p1)/n1 + p2(1 - p2)/n2. */
export function waldRiskDifference({
  cases,
  total,
  referenceCases,
  referenceTotal,
}: TwoGroups): MaybeInterval {
  const [own, reference] = [cases / total, referenceCases / referenceTotal];
  return around(own - reference, (own * (1 - own)) / total + (reference * (1 - reference)) / referenceTotal);
}

/** The same with a case and another one added to each group (Agresti & Caffo 2000, The American Statistician 54:280). */
export const agrestiCaffoRiskDifference = (groups: TwoGroups) =>
  waldRiskDifference({
    cases: groups.cases + 1,
    total: groups.total + 2,
    referenceCases: groups.referenceCases + 1,
    referenceTotal: groups.referenceTotal + 2,
  });

/** The square-and-add interval from the Wilson limits of the two risks (Newcombe 1998, Statistics in Medicine 17:873, method 10). */
export function newcombeRiskDifference(groups: TwoGroups): MaybeInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const own = wilsonInterval(cases, total, level);
  const reference = wilsonInterval(referenceCases, referenceTotal, level);
  const [risk, referenceRisk] = [cases / total, referenceCases / referenceTotal];
  const down = Math.hypot(risk - (own.low ?? NaN), (reference.high ?? NaN) - referenceRisk);
  const up = Math.hypot((own.high ?? NaN) - risk, referenceRisk - (reference.low ?? NaN));
  return { low: risk - referenceRisk - down, high: risk - referenceRisk + up };
}

/** Woolf 1955 (Annals of Human Genetics 19:251): ln OR with the sum of the reciprocals of the four cells. */
export function woolfOddsRatio({ cases, total, referenceCases, referenceTotal }: TwoGroups): MaybeInterval {
  const [others, referenceOthers] = [total - cases, referenceTotal - referenceCases];
  const variance = 1 / cases + 1 / others + 1 / referenceCases + 1 / referenceOthers;
  return onLogs((cases / others) * (referenceOthers / referenceCases), variance);
}

/** The same with a half added to every cell (Gart 1966, Journal of the Royal Statistical Society B 28:164). */
export const woolfOddsRatioWithHalves = (groups: TwoGroups) =>
  woolfOddsRatio({
    cases: groups.cases + 0.5,
    total: groups.total + 1,
    referenceCases: groups.referenceCases + 0.5,
    referenceTotal: groups.referenceTotal + 1,
  });

/** Wald: p with the variance p(1 - p)/n. */
export const waldRisk = (cases: number, total: number) =>
  around(cases / total, ((cases / total) * (1 - cases / total)) / total);

/** Wald with z^2/2 cases and as many others added (Agresti & Coull 1998, The American Statistician 52:119). */
export const agrestiCoullRisk = (cases: number, total: number) =>
  waldRisk(cases + (z * z) / 2, total + z * z);

/** x1/x2 times `factor`, its logarithm with the variance 1/x1 + 1/x2: the log-odds interval of shares, the log interval of rates. */
export const logRatio = (cases: number, referenceCases: number, factor: number) =>
  onLogs((cases / referenceCases) * factor, 1 / cases + 1 / referenceCases);

/** The same with a half added to either count. */
export const logRatioWithHalves = (cases: number, referenceCases: number, factor: number) =>
  logRatio(cases + 0.5, referenceCases + 0.5, factor);
