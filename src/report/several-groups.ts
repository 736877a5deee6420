import type { CountsGroup, GroupedQuestion, RatesGroup, SharesGroup } from '../../grammar/question.ts';
import type { ChiSquaredTest } from '../stats/homogeneity.ts';
import { overallChiSquared, overallShareChiSquared } from '../stats/overall-chi-squared.ts';
import { shareRatioInterval } from '../stats/share-ratio.ts';
import { pairReadings } from './counts-readings.ts';
import type { CountsOptions } from './counts-readings.ts';
import { ratePairReadings } from './rates-readings.ts';
import { estimateOf, intervalOver } from './estimates.ts';
import { reading } from './reading.ts';
import type { Reading } from './reading.ts';
import { sumOf } from './sum-of.ts';

/** What three or more groups need besides their ratios against the reference. */
export interface SeveralGroups {
  /** Whether the groups differ at all, asked before any pair. */
  readonly overall: Reading | null;
  /** Each group against all the others together; none where the others are not known to be everybody else. */
  readonly againstRest: readonly Reading[];
}

const none: SeveralGroups = { overall: null, againstRest: [] };

/** Nothing for two groups: the pair says it all. */
export function severalGroups(question: GroupedQuestion, options: CountsOptions): SeveralGroups {
  if (question.groups.length < 3) return none;
  switch (question.kind) {
    case 'counts':
      return question.chosenByOutcome ? none : ofCounts(question.groups, options);
    case 'rates':
      return question.groups.some(({ asStated }) => asStated) ? none : ofRates(question.groups, options);
    case 'shares':
      return ofShares(question.groups, options);
    case 'stated':
    case 'bare-counts':
    case 'strata':
      return none;
  }
}

function ofCounts(groups: readonly CountsGroup[], options: CountsOptions): SeveralGroups {
  const sizes = groups.map(({ cases, total }) => ({
    cases: cases.value / options.designEffect,
    total: total.value / options.designEffect,
  }));
  return {
    overall: overall(overallChiSquared(sizes)),
    againstRest: groups.flatMap((group, of) => {
      const rest = groups.filter((other) => other !== group);
      const rows = [
        group,
        { cases: sumOf(rest.map(({ cases }) => cases)), total: sumOf(rest.map(({ total }) => total)) },
      ];
      return asRest(pairReadings(rows, 0, 1, options), 'risk-ratio', of);
    }),
  };
}

function ofRates(groups: readonly RatesGroup[], options: CountsOptions): SeveralGroups {
  const sizes = groups.map(({ cases, exposure }) => ({
    cases: cases.value / options.designEffect,
    size: exposure.value,
  }));
  return {
    overall: overall(overallShareChiSquared(sizes)),
    againstRest: groups.flatMap((group, of) => {
      const others = groups.filter((other) => other !== group);
      const rest: RatesGroup = {
        ...group,
        cases: sumOf(others.map(({ cases }) => cases)),
        exposure: sumOf(others.map(({ exposure }) => exposure)),
      };
      return asRest(ratePairReadings([group, rest], 0, 1, 1, options), 'rate-ratio', of);
    }),
  };
}

/** From shares only where the coverages add up to everybody, within their rounding. */
function ofShares(groups: readonly SharesGroup[], options: CountsOptions): SeveralGroups {
  const low = groups.reduce((sum, { coverage }) => sum + coverage.low, 0);
  const high = groups.reduce((sum, { coverage }) => sum + coverage.high, 0);
  const cases = groups.map((group) => group.cases);
  if (!cases.every((quantity) => quantity !== null) || low > 1 + 1e-9 || high < 1 - 1e-9) return none;
  const { level, designEffect } = options;
  const sizes = groups.map(({ coverage }, at) => ({
    cases: (cases[at]?.value ?? 0) / designEffect,
    size: coverage.value,
  }));
  return {
    overall: overall(overallShareChiSquared(sizes)),
    againstRest: groups.flatMap(({ coverage }, of): Reading[] => {
      const own = cases[of];
      if (own === undefined) return [];
      const rest = sumOf(cases.filter((_, at) => at !== of));
      const held = { coverage: coverage.value, referenceCoverage: 1 - coverage.value };
      const ratio = (own.value * held.referenceCoverage) / (rest.value * held.coverage);
      return [
        reading({
          id: 'risk-ratio',
          of,
          ...estimateOf(ratio),
          rest: true,
          interval: intervalOver(
            [own, rest],
            level,
            'wilson-share-odds',
            ([x = NaN, y = NaN]) => shareRatioInterval({ cases: x, referenceCases: y, ...held }, level),
            designEffect,
          ),
        }),
      ];
    }),
  };
}

const asRest = (readings: readonly Reading[], id: Reading['id'], of: number): Reading[] =>
  readings.filter((each) => each.id === id).map((each) => ({ ...each, of, against: null, rest: true }));

const overall = ({ statistic, degrees, pValue }: ChiSquaredTest): Reading =>
  reading({
    id: 'overall-difference',
    of: 0,
    estimate: pValue,
    test: { name: 'chi-squared', statistic, degrees },
  });

/**
 * The level at which the intervals of several pairs hold all at once as often as one of them at `level`: 1 - (1 - level)/k
 * (Bonferroni; Agresti et al. 2008, Statistics in Medicine 27:2870). `null` for one pair, or where the level would pass 99.99%.
 */
export function levelForAll(level: number, pairs: number): number | null {
  const value = 1 - (1 - level) / pairs;
  return pairs < 2 || value > 0.9999 ? null : value;
}
