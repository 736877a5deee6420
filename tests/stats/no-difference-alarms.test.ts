import { describe, expect, it } from 'vitest';
import {
  negativeLikelihoodRatioInterval,
  positiveLikelihoodRatioInterval,
} from '../../src/stats/likelihood-ratio.ts';
import {
  negativePredictiveValueInterval,
  positivePredictiveValueInterval,
} from '../../src/stats/predictive-values.ts';
import { levels } from './generated.ts';
import { allTables, enumerate, leavesOut } from './no-difference-tables.ts';

/** A prevalence beside each level, so that rare and common conditions both come up. */
const prevalences = new Map(levels.map((level, at) => [level, [0.001, 0.01, 0.1, 0.3, 0.5, 0.9][at] ?? NaN]));

describe('in all 739,600 tables of 1 to 40 affected and 1 to 40 unaffected people', () => {
  it('both likelihood ratios against 1, the positive predictive value against the prevalence and the negative one against the rest of it say "no difference" exactly where the (N-1) chi-squared does, at 50, 80, 90, 95, 99 and 99.99% with the prevalences 0.1, 1, 10, 30, 50 and 90%', () => {
    const { tables } = enumerate(false, (groups, level) => {
      const counts = {
        truePositives: groups.cases,
        affected: groups.total,
        falsePositives: groups.referenceCases,
        unaffected: groups.referenceTotal,
      };
      const prevalence = prevalences.get(level) ?? NaN;
      return {
        'LR+': leavesOut(positiveLikelihoodRatioInterval(counts, level), 1),
        'LR-': leavesOut(negativeLikelihoodRatioInterval(counts, level), 1),
        'positive predictive value': leavesOut(
          positivePredictiveValueInterval(counts, prevalence, level),
          prevalence,
        ),
        'negative predictive value': leavesOut(
          negativePredictiveValueInterval(counts, prevalence, level),
          1 - prevalence,
        ),
      };
    });
    expect(tables).toBe(allTables);
  }, 300_000);
});
