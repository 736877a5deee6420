import type { TwoGroups } from '../../src/stats/interval.ts';
import type { RatePair } from '../../src/stats/rate-ratio.ts';
import type { SharePair } from '../../src/stats/share-ratio.ts';

/** Cases and size of the group, then of the reference group. */
export type Four = readonly [number, number, number, number];

export const countLayers = (layers: readonly Four[]) =>
  layers.map(([cases, total, referenceCases, referenceTotal]): TwoGroups => ({
    cases,
    total,
    referenceCases,
    referenceTotal,
  }));

export const shareLayers = (layers: readonly Four[]) =>
  layers.map(([cases, coverage, referenceCases, referenceCoverage]): SharePair => ({
    cases,
    coverage,
    referenceCases,
    referenceCoverage,
  }));

export const rateLayers = (layers: readonly Four[]) =>
  layers.map(([cases, exposure, referenceCases, referenceExposure]): RatePair => ({
    cases,
    exposure,
    referenceCases,
    referenceExposure,
  }));
