import type { Layer, Quantity, StrataQuestion } from '../../grammar/question.ts';
import { rateRatioHomogeneity, riskRatioHomogeneity, shareRatioHomogeneity } from '../stats/homogeneity.ts';
import type { TwoGroups } from '../stats/interval.ts';
import {
  exactPooledOddsRatioInterval,
  pooledOddsRatio,
  pooledOddsRatioInterval,
} from '../stats/pooled-odds-ratio.ts';
import { pooledRateDifference, pooledRateDifferenceInterval } from '../stats/pooled-rate-difference.ts';
import { pooledRiskDifference, pooledRiskDifferenceInterval } from '../stats/pooled-risk-difference.ts';
import { pooledRiskRatio, pooledRiskRatioInterval } from '../stats/pooled-risk-ratio.ts';
import {
  exactPooledRateRatioInterval,
  exactPooledShareRatioInterval,
  pooledRateRatio,
  pooledRateRatioInterval,
  pooledShareRatio,
  pooledShareRatioInterval,
} from '../stats/pooled-share-ratio.ts';
import type { RatePair } from '../stats/rate-ratio.ts';
import type { SharePair } from '../stats/share-ratio.ts';
import { fayFeuerInterval, standardisedRate } from '../stats/standardised-rate.ts';
import { standardisedRisks, standardisedRiskRatioInterval } from '../stats/standardised-risk-ratio.ts';
import type { CountsOptions } from './counts-readings.ts';
import { alike, exactly, pairsOf, pooled } from './layer-pairs.ts';
import type { Limits, Place } from './layer-pairs.ts';
import { pairReadings } from './counts-readings.ts';
import { isRange } from './corners.ts';
import { ratioFollowers, relativeChange } from './ratio-followers.ts';
import { ratePairReadings } from './rates-readings.ts';
import { reading } from './reading.ts';
import { sumOf } from './sum-of.ts';
import { shareRatioReadings } from './shares-readings.ts';
import type { Reading } from './reading.ts';

/** The ratio of one pair of groups: in every layer, all together, pooled and standardised, and whether the layers are alike. */
export function layeredReadings(
  question: StrataQuestion,
  place: Place,
  per: number,
  options: CountsOptions,
): Reading[] {
  switch (question.layers[0]?.question.kind) {
    case 'counts':
      return countsReadings(question.layers, place, options);
    case 'rates':
      return ratesReadings(question.layers, place, per, options);
    case 'shares':
      return sharesReadings(question.layers, place, options);
    case undefined:
      return [];
  }
}

function countsReadings(layers: readonly Layer[], place: Place, options: CountsOptions): Reading[] {
  const pairs = pairsOf(layers, place, options, (own, reference, pick) =>
    'total' in own && 'total' in reference
      ? ({
          cases: pick.own(own.cases),
          total: pick.size(own.total),
          referenceCases: pick.reference(reference.cases),
          referenceTotal: pick.size(reference.total),
        } satisfies TwoGroups)
      : null,
  );
  const rows = [place.of, place.against].map((group) => ({
    cases: summed(layers, (layer) =>
      layer.question.kind === 'counts' ? layer.question.groups[group]?.cases : null,
    ),
    total: summed(layers, (layer) =>
      layer.question.kind === 'counts' ? layer.question.groups[group]?.total : null,
    ),
  }));
  const crude = pairReadings(rows, 0, 1, options)
    .filter(({ id }) => id === 'risk-ratio')
    .map((ratio) => ({ ...ratio, ...place, id: 'crude-risk-ratio' as const }));
  const pool = pooled(pairs, place, options);
  const ratio = pool({
    id: 'pooled-risk-ratio',
    estimate: pooledRiskRatio,
    limits: options.exact ? null : pooledRiskRatioInterval,
    method: 'pooled-score',
  });
  return [
    ratio,
    relativeChange(ratio),
    ...crude,
    pool({
      id: 'pooled-risk-difference',
      estimate: pooledRiskDifference,
      limits: options.exact ? null : pooledRiskDifferenceInterval,
      method: 'pooled-score',
    }),
    pool({
      id: 'pooled-odds-ratio',
      estimate: pooledOddsRatio,
      ...(options.exact
        ? exactly(pairs, exactPooledOddsRatioInterval, 'pooled-conditional-exact')
        : { limits: pooledOddsRatioInterval, method: 'pooled-conditional-score' }),
    }),
    pool({
      id: 'standardised-risk-ratio',
      estimate: (strata) => standardisedRisks(strata, 'whole').ratio,
      limits: (strata, level) => standardisedRiskRatioInterval(strata, 'whole', level),
      method: 'log-delta',
    }),
    ...alike(riskRatioHomogeneity(pairs.tested), place, 'Gart-Nam'),
    ...ratioFollowers(ratio),
    ...inLayers(layers, place, options),
  ];
}

function ratesReadings(
  layers: readonly Layer[],
  place: Place,
  per: number,
  options: CountsOptions,
): Reading[] {
  const pairs = pairsOf(layers, place, options, (own, reference, pick) =>
    'exposure' in own && 'exposure' in reference
      ? ({
          cases: pick.own(own.cases),
          exposure: pick.size(own.exposure),
          referenceCases: pick.reference(reference.cases),
          referenceExposure: pick.size(reference.exposure),
        } satisfies RatePair)
      : null,
  );
  const crude = pooled(
    {
      ...pairs,
      middle: [total(pairs.middle)],
      tested: [total(pairs.tested)],
      lowest: [total(pairs.lowest)],
      highest: [total(pairs.highest)],
    },
    place,
    options,
  );
  const pool = pooled(pairs, place, options);
  const { exact } = options;
  const own: Limits<RatePair> = exact
    ? exactly(pairs, exactPooledRateRatioInterval, 'pooled-shares-exact')
    : { limits: pooledRateRatioInterval, method: 'pooled-shares-score' };
  const ratio = pool({ id: 'pooled-rate-ratio', estimate: pooledRateRatio, ...own });
  return [
    ratio,
    relativeChange(ratio),
    crude({
      id: 'crude-rate-ratio',
      estimate: pooledRateRatio,
      ...own,
      method: exact ? 'exact-rate-ratio' : 'rate-ratio-score',
    }),
    pool({
      id: 'pooled-rate-difference',
      estimate: pooledRateDifference,
      limits: options.exact ? null : pooledRateDifferenceInterval,
      method: 'pooled-score',
      per,
    }),
    ...[place.of, place.against].map((of) => standardised(layers, of, per, options)),
    ...alike(rateRatioHomogeneity(pairs.tested), place, 'deviance'),
    ...ratioFollowers(ratio),
    ...inLayers(layers, place, options),
  ];
}

/** A group's rate as it would be if its layers were as large as those of all groups together. */
function standardised(
  layers: readonly Layer[],
  of: number,
  per: number,
  { level, designEffect }: CountsOptions,
): Reading {
  const weighted = layers.flatMap(({ question }) => {
    if (question.kind !== 'rates') return [];
    const weight = question.groups.reduce((sum, { exposure }) => sum + exposure.value, 0);
    const group = question.groups[of];
    return group === undefined ? [] : [{ cases: group.cases, exposure: group.exposure.value, weight }];
  });
  const at = (end: 'low' | 'high' | 'value', divisor: number) =>
    weighted.map(({ cases, exposure, weight }) => ({
      cases: (isRange(cases) ? cases[end] : cases.value) / divisor,
      exposure: exposure / divisor,
      weight,
    }));
  const limits = [at('low', designEffect), at('high', designEffect)].map((ends) =>
    fayFeuerInterval(ends, level),
  );
  return reading({
    id: 'standardised-rate',
    of,
    estimate: standardisedRate(at('value', 1)),
    interval: {
      low: limits[0]?.low ?? null,
      high: limits[1]?.high ?? null,
      level,
      method: 'fay-feuer',
      envelope: weighted.some(({ cases }) => isRange(cases)),
      designEffect,
    },
    per,
  });
}

const total = (pairs: readonly RatePair[]): RatePair =>
  pairs.reduce((sum, pair) => ({
    cases: sum.cases + pair.cases,
    exposure: sum.exposure + pair.exposure,
    referenceCases: sum.referenceCases + pair.referenceCases,
    referenceExposure: sum.referenceExposure + pair.referenceExposure,
  }));

function sharesReadings(layers: readonly Layer[], place: Place, options: CountsOptions): Reading[] {
  const pairs = pairsOf(layers, place, options, (own, reference, pick) =>
    'coverage' in own && 'coverage' in reference && own.cases !== null && reference.cases !== null
      ? ({
          cases: pick.own(own.cases),
          referenceCases: pick.reference(reference.cases),
          coverage: own.coverage.value,
          referenceCoverage: reference.coverage.value,
        } satisfies SharePair)
      : null,
  );
  const exact = options.exact && !pairs.hidden;
  const ratio = pooled(
    pairs,
    place,
    options,
  )({
    id: 'pooled-risk-ratio',
    estimate: pooledShareRatio,
    limits: exact ? exactPooledShareRatioInterval : pooledShareRatioInterval,
    method: exact ? 'pooled-shares-exact' : 'pooled-shares-score',
  });
  return [
    ratio,
    relativeChange(ratio),
    ...alike(shareRatioHomogeneity(pairs.tested), place, 'deviance'),
    ...ratioFollowers(ratio),
    ...inLayers(layers, place, options),
  ];
}

/** The ratio within every layer. */
function inLayers(layers: readonly Layer[], place: Place, options: CountsOptions): Reading[] {
  return layers.flatMap(({ question }, layer) =>
    ratioWithin(question, place, options).map((ratio) => ({ ...ratio, layer })),
  );
}

function ratioWithin(question: Layer['question'], { of, against }: Place, options: CountsOptions): Reading[] {
  switch (question.kind) {
    case 'counts':
      return pairReadings(question.groups, of, against, options).filter(({ id }) => id === 'risk-ratio');
    case 'rates':
      return ratePairReadings(question.groups, of, against, 1, options).filter(
        ({ id }) => id === 'rate-ratio',
      );
    case 'shares':
      return shareRatioReadings(question, of, options).filter(({ id }) => id === 'risk-ratio');
  }
}

/** The sum over all layers. */
const summed = (layers: readonly Layer[], pick: (layer: Layer) => Quantity | null | undefined): Quantity =>
  sumOf(layers.map(pick).filter((quantity) => quantity != null));
