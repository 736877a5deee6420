import {
  attributableFraction,
  populationAttributableFraction,
  preventedFraction,
} from '../../src/stats/attributable-fraction.ts';
import { bracketedRoot } from '../../src/stats/bracketed-root.ts';
import { clopperPearsonInterval } from '../../src/stats/clopper-pearson-interval.ts';
import { cochranMantelHaenszel } from '../../src/stats/cochran-mantel-haenszel.ts';
import { conditionalOddsRatioInterval } from '../../src/stats/conditional-odds-ratio-interval.ts';
import { constrainedDifferenceVariance } from '../../src/stats/constrained-difference.ts';
import { constrainedRatio } from '../../src/stats/constrained-ratio.ts';
import { criticalValue } from '../../src/stats/critical-value.ts';
import { fittedTable } from '../../src/stats/fitted-table.ts';
import { chiSquaredUpperTail } from '../../src/stats/gamma-tail.ts';
import { garwoodInterval } from '../../src/stats/garwood-interval.ts';
import { hiddenCauseStrength, hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import { riskRatioHomogeneity, shareRatioHomogeneity } from '../../src/stats/homogeneity.ts';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';
import { negativeLikelihoodRatio, positiveLikelihoodRatio } from '../../src/stats/likelihood-ratio.ts';
import { nMinusOneChiSquared } from '../../src/stats/null-test.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { oneExtraPer } from '../../src/stats/one-extra-per.ts';
import {
  exactPooledOddsRatioInterval,
  pooledOddsRatio,
  pooledOddsRatioInterval,
} from '../../src/stats/pooled-odds-ratio.ts';
import { pooledRateDifference } from '../../src/stats/pooled-rate-difference.ts';
import { pooledRiskDifference } from '../../src/stats/pooled-risk-difference.ts';
import { pooledRiskRatio } from '../../src/stats/pooled-risk-ratio.ts';
import { pooledShareRatio } from '../../src/stats/pooled-share-ratio.ts';
import {
  negativePredictiveValue,
  positivePredictiveValue,
  positivePredictiveValueInterval,
} from '../../src/stats/predictive-values.ts';
import { rateDifference } from '../../src/stats/rate-difference-interval.ts';
import { exactRateRatioInterval, rateRatio, rateRatioInterval } from '../../src/stats/rate-ratio.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { sampledCoverageRatio } from '../../src/stats/sampled-coverage.ts';
import { swapped } from '../../src/stats/score-factor.ts';
import { fayFeuerInterval, standardisedRate } from '../../src/stats/standardised-rate.ts';
import { standardisedRisks } from '../../src/stats/standardised-risk-ratio.ts';
import { wilsonInterval } from '../../src/stats/wilson-interval.ts';

/** A row of numbers as a method reads them; those that it does not read are NaN and would show. */
export type Four = readonly [number, number, number, number];
/** What comes out; `null` where there is no limit. */
export type Values = readonly (number | null)[];
type Method = (input: { readonly first: Four; readonly all: readonly Four[] }, level: number) => Values;

/**
 * What src/stats makes of the numbers of a published example, by the name under which tests/fixtures/reference/published.json asks
 * for it. Koopman's, Mee's and Cornfield's limits and Gart and Nam's Q without the factor N/(N - 1) are not in src/stats: they are
 * found here from its constrained estimates, so that these too are held to printed figures.
 */
const methods = {
  risk: ({ first: [cases, total] }) => [standardisedRate([{ cases, exposure: total, weight: 1 }])],
  wilson: ({ first: [cases, total] }, level) => limits(wilsonInterval(cases, total, level)),
  clopperPearson: ({ first: [cases, total] }, level) => limits(clopperPearsonInterval(cases, total, level)),
  riskRatio: ({ first }, level) => limits(riskRatioInterval(groupsOf(first), level)),
  pooledRiskRatio: ({ all }) => [pooledRiskRatio(all.map(groupsOf))],
  koopman: ({ first }, level) => mirroredRatio(koopmanLower, groupsOf(first), level),
  riskDifference: ({ first }, level) => limits(riskDifferenceInterval(groupsOf(first), level)),
  pooledRiskDifference: ({ all }) => [pooledRiskDifference(all.map(groupsOf))],
  mee: ({ first }, level) => [meeLower(groupsOf(first), level), -meeLower(swapped(groupsOf(first)), level)],
  oneExtraPer: ({ first: [difference, low, high] }) => {
    const { estimate, ranges } = oneExtraPer(difference, { low, high });
    return [estimate, ranges?.more?.low ?? null, ranges?.fewer?.low ?? null];
  },
  oneExtraPerEstimate: ({ first: [difference] }) => [oneExtraPer(difference, null).estimate],
  oddsRatio: ({ first }, level) => limits(oddsRatioInterval(groupsOf(first), level)),
  crossProductRatio: ({ first: [cases, total, sampledInGroup, sampled] }) => [
    sampledCoverageRatio({ cases, referenceCases: total - cases, sampledInGroup, sampled }),
  ],
  cornfield: ({ first }, level) => mirroredRatio(cornfieldLower, groupsOf(first), level),
  conditionalOddsRatio: ({ first }, level) => limits(conditionalOddsRatioInterval(groupsOf(first), level)),
  pooledOddsRatio: ({ all }) => [pooledOddsRatio(all.map(groupsOf))],
  pooledOddsRatioInterval: ({ all }, level) => limits(pooledOddsRatioInterval(all.map(groupsOf), level)),
  exactPooledOddsRatio: ({ all }, level) => limits(exactPooledOddsRatioInterval(all.map(groupsOf), level)),
  fisherUpperP: ({ first }) => [fisherUpperP(groupsOf(first))],
  fisherLowerP: ({ first }) => [fisherUpperP(swapped(groupsOf(first)))],
  pearsonChiSquared: ({ first }) => [pearson(first)],
  pearsonP: ({ first }) => [chiSquaredUpperTail(pearson(first), 1)],
  cochranMantelHaenszel: ({ all }) => [cochranMantelHaenszel(all.map(groupsOf))],
  riskRatioHomogeneity: ({ all }) => {
    const test = riskRatioHomogeneity(all.map(groupsOf));
    return [test?.statistic ?? null, test?.pValue ?? null];
  },
  gartNamQ: ({ all }) => [gartNamQ(all.map(groupsOf))],
  standardisedRisks: ({ all }) => {
    const { risk, referenceRisk } = standardisedRisks(all.map(groupsOf), 'whole');
    return [risk, referenceRisk];
  },
  pooledShareEffectiveness: ({ all }) => [1 - (pooledShareRatio(all.map(sharesOf)) ?? NaN)],
  shareRatioHomogeneityP: ({ all }) => [shareRatioHomogeneity(all.map(sharesOf))?.pValue ?? null],
  garwood: ({ first: [events, exposure] }, level) => limits(garwoodInterval(events, exposure, level)),
  rateRatio: ({ first }) => [rateRatio(ratesOf(first))],
  rateRatioScore: ({ first }, level) => limits(rateRatioInterval(ratesOf(first), level)),
  exactRateRatio: ({ first }, level) => limits(exactRateRatioInterval(ratesOf(first), level)),
  rateDifference: ({ first }) => [rateDifference(ratesOf(first))],
  pooledRateDifference: ({ all }) => [pooledRateDifference(all.map(ratesOf))],
  standardisedRate: ({ all }) => [standardisedRate(all.map(weightedOf))],
  fayFeuer: ({ all }, level) => [
    standardisedRate(all.map(weightedOf)),
    ...limits(fayFeuerInterval(all.map(weightedOf), level)),
  ],
  attributableFraction: ({ first }) => [attributableFraction(ratioOf(first))],
  attributableFractionInterval: ({ first }, level) =>
    limits(riskRatioInterval(groupsOf(first), level)).map((limit) => attributableFraction(limit ?? NaN)),
  exactAttributableFraction: ({ first }, level) =>
    limits(exactRateRatioInterval(ratesOf(first), level)).map((limit) => attributableFraction(limit ?? NaN)),
  populationAttributableFraction: ({ first }) => [
    populationAttributableFraction(ratioOf(first), shareOf(first)),
  ],
  populationAttributableFractionInterval: ({ first }, level) =>
    limits(riskRatioInterval(groupsOf(first), level)).map((limit) =>
      populationAttributableFraction(limit ?? NaN, shareOf(first)),
    ),
  preventedFraction: ({ first }) => [preventedFraction(ratioOf(first))],
  hiddenCauseStrength: ({ first: [ratio] }) => [hiddenCauseStrength(ratio)],
  hiddenCauseStrengthOfCounts: ({ first }) => [hiddenCauseStrength(ratioOf(first))],
  hiddenCauseStrengthAtLimit: ({ first: [low, high] }) => [hiddenCauseStrengthAtLimit({ low, high })],
  positiveLikelihoodRatio: ({ first }) => [positiveLikelihoodRatio(alarmsOf(first))],
  negativeLikelihoodRatio: ({ first }) => [negativeLikelihoodRatio(alarmsOf(first))],
  positivePredictiveValue: ({ first: [sensitivity, falseAlarmRate, prevalence] }) => [
    positivePredictiveValue({ sensitivity, falseAlarmRate, prevalence }),
  ],
  positivePredictiveValueOfCounts: ({ first, all }) => [positivePredictiveValue(alarmRatesOf(first, all[1]))],
  negativePredictiveValueOfCounts: ({ first, all }) => [negativePredictiveValue(alarmRatesOf(first, all[1]))],
  positivePredictiveValueInterval: ({ first, all }, level) =>
    limits(positivePredictiveValueInterval(alarmsOf(first), quotient(all[1]), level)),
} satisfies Record<string, Method>;
export type MethodName = keyof typeof methods;

/** Names that say more than the words they are made of. */
const fuller: Partial<Record<MethodName, string>> = {
  risk: 'cases over people (or events over what is expected)',
  wilson: 'the Wilson interval',
  clopperPearson: 'the Clopper-Pearson interval',
  riskRatio: 'the score interval of the risk ratio',
  pooledRiskRatio: 'the risk ratio, pooled where there are layers,',
  koopman: "Koopman's interval of the risk ratio",
  riskDifference: 'the score interval of the risk difference',
  pooledRiskDifference: 'the risk difference, pooled where there are layers,',
  mee: "Mee's interval of the risk difference",
  oneExtraPer: 'one extra case per K people, with both ranges,',
  oneExtraPerEstimate: 'one extra case per K people',
  oddsRatio: 'the score interval of the odds ratio',
  crossProductRatio: 'the odds ratio',
  cornfield: "Cornfield's interval of the odds ratio",
  conditionalOddsRatio: 'the exact interval of the odds ratio',
  pooledOddsRatio: 'the conditional odds ratio',
  exactPooledOddsRatio: 'the exact interval of the pooled odds ratio',
  fisherUpperP: "Fisher's p value for more cases",
  fisherLowerP: "Fisher's p value for fewer cases",
  cochranMantelHaenszel: 'the Cochran-Mantel-Haenszel statistic',
  riskRatioHomogeneity: "Gart and Nam's test of like risk ratios",
  gartNamQ: "Gart and Nam's Q",
  pooledShareEffectiveness: 'effectiveness pooled over layers of shares',
  shareRatioHomogeneityP: 'the p value of like ratios from shares',
  garwood: 'the Garwood interval',
  rateRatioScore: 'the score interval of the rate ratio',
  exactRateRatio: 'the exact interval of the rate ratio',
  fayFeuer: 'the standardised rate with its Fay-Feuer interval',
};
export const nameOf = (method: MethodName) =>
  fuller[method] ?? `the ${method.replaceAll(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`)}`;

/** What the method gives, times `per`. */
export function valuesOf(
  method: MethodName,
  input: readonly (readonly number[])[],
  level = 0.95,
  per = 1,
): Values {
  const all = input.map(([a = NaN, b = NaN, c = NaN, d = NaN]): Four => [a, b, c, d]);
  const [first = [NaN, NaN, NaN, NaN]] = all;
  return methods[method]({ first, all }, level).map((value) => (value === null ? null : value * per));
}

function limits({ low, high }: Interval): Values {
  return [low, high];
}

function groupsOf([cases, total, referenceCases, referenceTotal]: Four): TwoGroups {
  return { cases, total, referenceCases, referenceTotal };
}

const sharesOf = ([cases, referenceCases, coverage, referenceCoverage]: Four) => ({
  cases,
  referenceCases,
  coverage,
  referenceCoverage,
});
const ratesOf = ([cases, exposure, referenceCases, referenceExposure]: Four) => ({
  cases,
  exposure,
  referenceCases,
  referenceExposure,
});
const weightedOf = ([cases, exposure, weight]: Four) => ({ cases, exposure, weight });
const alarmsOf = ([truePositives, affected, falsePositives, unaffected]: Four) => ({
  truePositives,
  affected,
  falsePositives,
  unaffected,
});
const ratioOf = ([cases, total, referenceCases, referenceTotal]: Four) =>
  cases / total / (referenceCases / referenceTotal);
/** The group's part of both totals. */
const shareOf = ([, total, , referenceTotal]: Four) => total / (total + referenceTotal);
const quotient = ([part, whole]: Four = [NaN, NaN, NaN, NaN]) => part / whole;
const alarmRatesOf = ([true_, affected, false_, unaffected]: Four, prevalence: Four | undefined) => ({
  sensitivity: true_ / affected,
  falseAlarmRate: false_ / unaffected,
  prevalence: quotient(prevalence),
});

/** Pearson's chi-squared is the (N-1) chi-squared with N in the place of N - 1. */
function pearson(input: Four): number {
  const all = input[1] + input[3];
  return (nMinusOneChiSquared(groupsOf(input)) * all) / (all - 1);
}

/** The p at which the exact lower limit of level 1 - 2p is 1: Fisher's one-sided p value for more cases in the group. */
const fisherUpperP = (groups: TwoGroups) =>
  bracketedRoot((p) => Math.log(conditionalOddsRatioInterval(groups, 1 - 2 * p).low ?? NaN), 0.0001, 0.25);

/** Gart & Nam 1988: sum (p1 - R p2)^2/V, without the factor N/(N - 1). */
const gartNamQ = (strata: readonly TwoGroups[]) => {
  const ratio = pooledRiskRatio(strata) ?? NaN;
  return strata.reduce((sum, groups) => {
    const gap = groups.cases / groups.total - ratio * (groups.referenceCases / groups.referenceTotal);
    return sum + (gap * gap) / constrainedRatio(groups, ratio).variance;
  }, 0);
};

type Lower = (groups: TwoGroups, level: number) => number;
const mirroredRatio = (lower: Lower, groups: TwoGroups, level: number): Values => {
  const mirrored = lower(swapped(groups), level);
  return [lower(groups, level), mirrored === 0 ? null : 1 / mirrored];
};

/** Koopman 1984: the ratio t at which p1 - t p2 is z root(V), without the factor N/(N - 1). */
function koopmanLower(groups: TwoGroups, level: number): number {
  const { cases, total, referenceCases, referenceTotal } = groups;
  if (cases === 0) return 0;
  const z = criticalValue(level);
  const excess = (logRatio: number) => {
    const t = Math.exp(logRatio);
    const gap = cases / total - t * (referenceCases / referenceTotal);
    return gap - z * Math.sqrt(constrainedRatio(groups, t).variance);
  };
  const far = Math.log(cases / total / ((referenceCases === 0 ? 1e-9 : referenceCases) / referenceTotal));
  return Math.exp(bracketedRoot(excess, -20, Math.max(far, -19)));
}

/** Mee 1984: the difference d at which p1 - p2 - d is z root(V), without the factor N/(N - 1). */
function meeLower(groups: TwoGroups, level: number): number {
  const z = criticalValue(level);
  const estimate = groups.cases / groups.total - groups.referenceCases / groups.referenceTotal;
  const excess = (d: number) => estimate - d - z * Math.sqrt(constrainedDifferenceVariance(groups, d));
  // At an estimate with no spread the excess is 0; the limit lies below.
  return bracketedRoot(excess, -1 + 1e-12, Math.min(estimate - 1e-9, 1 - 1e-9));
}

/** Cornfield 1956: the odds ratio at which the cases exceed the fitted ones by z root(V), without the factor N/(N - 1). */
function cornfieldLower(groups: TwoGroups, level: number): number {
  if (groups.cases === 0) return 0;
  const z = criticalValue(level);
  const excess = (logRatio: number) => {
    const fitted = fittedTable(groups, Math.exp(logRatio));
    return groups.cases - fitted.cases - z * Math.sqrt(fitted.variance);
  };
  return Math.exp(bracketedRoot(excess, -20, 20));
}
