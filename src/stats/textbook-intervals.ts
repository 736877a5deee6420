import { bracketedRoot } from './bracketed-root.ts';
import { constrainedDifferenceVariance } from './constrained-difference.ts';
import { constrainedRatio } from './constrained-ratio.ts';
import { criticalValue } from './critical-value.ts';
import { fittedTable } from './fitted-table.ts';
import type { Interval, TwoGroups } from './interval.ts';
import { swapped } from './score-factor.ts';
import { wilsonInterval } from './wilson-interval.ts';

/**
 * Intervals that textbooks and other programs print, so that a published figure can be held against them. None of them is ever
 * shown as an interval of our own. Each takes a level as a share, in [0.5, 0.9999], and is `null` where its formula has none: a
 * logarithm of 0, a division by it, a root that is not there.
 */
export type TextbookInterval = Interval | null;

const finite = (low: number, high: number): TextbookInterval =>
  Number.isFinite(low) && Number.isFinite(high) ? { low, high } : null;

const around = (estimate: number, variance: number, level: number, more = 0): TextbookInterval => {
  const reach = criticalValue(level) * Math.sqrt(variance) + more;
  return finite(estimate - reach, estimate + reach);
};

const onLogs = (ratio: number, variance: number, level: number): TextbookInterval => {
  const reach = criticalValue(level) * Math.sqrt(variance);
  return finite(ratio * Math.exp(-reach), ratio * Math.exp(reach));
};

const withHalves = (groups: TwoGroups, toTotals: number): TwoGroups => ({
  cases: groups.cases + 0.5,
  total: groups.total + toTotals,
  referenceCases: groups.referenceCases + 0.5,
  referenceTotal: groups.referenceTotal + toTotals,
});

/** Katz et al. 1978 (Biometrics 34:469): ln RR with the variance 1/x1 - 1/n1 + 1/x2 - 1/n2. */
export function logRiskRatio(groups: TwoGroups, level: number): TextbookInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const variance = 1 / cases - 1 / total + 1 / referenceCases - 1 / referenceTotal;
  return onLogs(cases / total / (referenceCases / referenceTotal), variance, level);
}

/** The same with a half added to every count and total (Walter 1975, Biometrika 62:371). */
export const logRiskRatioWithHalves = (groups: TwoGroups, level: number) =>
  logRiskRatio(withHalves(groups, 0.5), level);

/** Koopman 1984 (Biometrics 40:513): the score interval of the risk ratio without the factor N/(N - 1). */
export function koopmanRiskRatio(groups: TwoGroups, level: number): TextbookInterval {
  if (groups.cases === 0 || groups.referenceCases === 0) return null;
  return finite(koopmanLower(groups, level), 1 / koopmanLower(swapped(groups), level));
}

/** The ratio t below the estimate at which p1 - t p2 is z root(V). */
function koopmanLower(groups: TwoGroups, level: number): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const z = criticalValue(level);
  const excess = (logRatio: number) => {
    const t = Math.exp(logRatio);
    const gap = cases / total - t * (referenceCases / referenceTotal);
    return gap - z * Math.sqrt(constrainedRatio(groups, t).variance);
  };
  const estimate = Math.log(cases / total / (referenceCases / referenceTotal));
  return rootBelow(excess, estimate);
}

/** Wald: p1 - p2 with the variance p1(1 - p1)/n1 + p2(1 - p2)/n2. */
export const waldRiskDifference = (groups: TwoGroups, level: number) => waldWith(groups, level, 0);

/** The same with Yates's correction (1/n1 + 1/n2)/2 (Fleiss 1981, Statistical methods for rates and proportions, 2nd ed., 29). */
export const waldRiskDifferenceCorrected = (groups: TwoGroups, level: number) =>
  waldWith(groups, level, (1 / groups.total + 1 / groups.referenceTotal) / 2);

function waldWith({ cases, total, referenceCases, referenceTotal }: TwoGroups, level: number, more: number) {
  const [own, reference] = [cases / total, referenceCases / referenceTotal];
  const variance = (own * (1 - own)) / total + (reference * (1 - reference)) / referenceTotal;
  return around(own - reference, variance, level, more);
}

/** The same with a case and another one added to each group (Agresti & Caffo 2000, The American Statistician 54:280). */
export const agrestiCaffoRiskDifference = (groups: TwoGroups, level: number) =>
  waldRiskDifference(
    {
      cases: groups.cases + 1,
      total: groups.total + 2,
      referenceCases: groups.referenceCases + 1,
      referenceTotal: groups.referenceTotal + 2,
    },
    level,
  );

/** The square-and-add interval from the Wilson limits of the two risks (Newcombe 1998, Statistics in Medicine 17:873, method 10). */
export function newcombeRiskDifference(groups: TwoGroups, level: number): TextbookInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const own = wilsonInterval(cases, total, level);
  const reference = wilsonInterval(referenceCases, referenceTotal, level);
  const [risk, referenceRisk] = [cases / total, referenceCases / referenceTotal];
  const down = Math.hypot(risk - (own.low ?? NaN), (reference.high ?? NaN) - referenceRisk);
  const up = Math.hypot((own.high ?? NaN) - risk, referenceRisk - (reference.low ?? NaN));
  return finite(risk - referenceRisk - down, risk - referenceRisk + up);
}

/** Mee 1984 (Biometrics 40:1175): the score interval of the risk difference without the factor N/(N - 1). */
export function meeRiskDifference(groups: TwoGroups, level: number): TextbookInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const inside = cases > 0 && cases < total && referenceCases > 0 && referenceCases < referenceTotal;
  if (!inside) return null;
  return finite(meeLower(groups, level), -meeLower(swapped(groups), level));
}

function meeLower(groups: TwoGroups, level: number): number {
  const z = criticalValue(level);
  const estimate = groups.cases / groups.total - groups.referenceCases / groups.referenceTotal;
  const excess = (d: number) => estimate - d - z * Math.sqrt(constrainedDifferenceVariance(groups, d));
  return bracketedRoot(excess, -1 + 1e-12, estimate);
}

/** Woolf 1955 (Annals of Human Genetics 19:251): ln OR with the sum of the reciprocals of the four cells. */
export function woolfOddsRatio(groups: TwoGroups, level: number): TextbookInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const [others, referenceOthers] = [total - cases, referenceTotal - referenceCases];
  const variance = 1 / cases + 1 / others + 1 / referenceCases + 1 / referenceOthers;
  return onLogs((cases / others) * (referenceOthers / referenceCases), variance, level);
}

/** The same with a half added to every cell (Gart 1966, Journal of the Royal Statistical Society B 28:164). */
export const woolfOddsRatioWithHalves = (groups: TwoGroups, level: number) =>
  woolfOddsRatio(withHalves(groups, 1), level);

/** Cornfield 1956 (Proceedings of the Third Berkeley Symposium 4:135): the score interval of the odds ratio without N/(N - 1). */
export function cornfieldOddsRatio(groups: TwoGroups, level: number): TextbookInterval {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const inside = cases > 0 && cases < total && referenceCases > 0 && referenceCases < referenceTotal;
  if (!inside) return null;
  return finite(cornfieldLower(groups, level), 1 / cornfieldLower(swapped(groups), level));
}

/** The odds ratio at which the cases exceed the fitted ones by z root(V). */
function cornfieldLower(groups: TwoGroups, level: number): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  const z = criticalValue(level);
  const excess = (logRatio: number) => {
    const fitted = fittedTable(groups, Math.exp(logRatio));
    return fitted.excess - z * Math.sqrt(fitted.variance);
  };
  const odds = (cases / (total - cases)) * ((referenceTotal - referenceCases) / referenceCases);
  return rootBelow(excess, Math.log(odds));
}

/** The root below an estimate on the log scale, of a function that is negative at the estimate. */
function rootBelow(excess: (logRatio: number) => number, estimate: number): number {
  let low = estimate - 1;
  while (excess(low) < 0) {
    low = estimate - 2 * (estimate - low);
    if (low < estimate - 700) return NaN;
  }
  return Math.exp(bracketedRoot(excess, low, estimate));
}

/** Wald: p with the variance p(1 - p)/n. */
export const waldRisk = (cases: number, total: number, level: number) =>
  around(cases / total, ((cases / total) * (1 - cases / total)) / total, level);

/** Wald with z^2/2 cases and as many others added (Agresti & Coull 1998, The American Statistician 52:119). */
export function agrestiCoullRisk(cases: number, total: number, level: number): TextbookInterval {
  const z = criticalValue(level);
  return waldRisk(cases + (z * z) / 2, total + z * z, level);
}

/** Wilson's limits with a continuity correction (Newcombe 1998, Statistics in Medicine 17:857, method 4). */
export function wilsonCorrectedRisk(cases: number, total: number, level: number): TextbookInterval {
  const z = criticalValue(level);
  const [risk, others] = [cases / total, total - cases];
  const spread = (sign: 1 | -1) => z * Math.sqrt(z * z - sign * 2 - 1 / total + 4 * risk * (others + sign));
  const bottom = 2 * (total + z * z);
  return finite(
    cases === 0 ? 0 : (2 * cases + z * z - 1 - spread(1)) / bottom,
    others === 0 ? 1 : (2 * cases + z * z + 1 + spread(-1)) / bottom,
  );
}

/**
 * x1/x2 times `factor`, its logarithm with the variance 1/x1 + 1/x2: the log-odds interval of shares (Farrington 1993,
 * International Journal of Epidemiology 22:742), the log interval of rates (Rothman & Greenland 1998, Modern Epidemiology, 2nd
 * ed., 240).
 */
export const logCaseRatio = (cases: number, referenceCases: number, factor: number, level: number) =>
  onLogs((cases / referenceCases) * factor, 1 / cases + 1 / referenceCases, level);

/** The same with a half added to either count. */
export const logCaseRatioWithHalves = (
  cases: number,
  referenceCases: number,
  factor: number,
  level: number,
) => logCaseRatio(cases + 0.5, referenceCases + 0.5, factor, level);
