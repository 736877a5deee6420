import fc from 'fast-check';
import type { TwoGroups } from '../../src/stats/interval.ts';
import type { SharePair } from '../../src/stats/share-ratio.ts';

const group = fc
  .oneof(
    fc.integer({ min: 1, max: 30 }),
    fc.integer({ min: 1, max: 1_000_000 }),
    fc.integer({ min: 1, max: 1e9 }),
  )
  .chain((total) => fc.tuple(fc.integer({ min: 0, max: total }), fc.constant(total)));
export const groups = fc
  .tuple(group, group)
  .map(([[cases, total], [referenceCases, referenceTotal]]): TwoGroups => ({
    cases,
    total,
    referenceCases,
    referenceTotal,
  }));
export const levels = [0.5, 0.8, 0.9, 0.95, 0.99, 0.9999];
export const level = fc.constantFrom(...levels);
export const caseCount = fc.oneof(fc.integer({ min: 0, max: 30 }), fc.integer({ min: 0, max: 3_000 }));
export const share = fc.integer({ min: 1, max: 99 }).map((percent) => percent / 100);
export const pairs = fc
  .tuple(caseCount, caseCount, share, share)
  .map(([cases, referenceCases, coverage, referenceCoverage]): SharePair => ({
    cases,
    referenceCases,
    coverage,
    referenceCoverage,
  }));
/** Tables that the conditional method answers in no time. */
export const smallTables = fc
  .tuple(fc.integer({ min: 1, max: 60 }), fc.nat(), fc.integer({ min: 1, max: 60 }), fc.nat())
  .map(([total, first, referenceTotal, second]): TwoGroups => ({
    cases: first % (total + 1),
    total,
    referenceCases: second % (referenceTotal + 1),
    referenceTotal,
  }));
export const runs = { numRuns: 2_000 };
