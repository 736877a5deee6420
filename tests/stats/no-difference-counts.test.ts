import { describe, expect, it } from 'vitest';
import {
  attributableFraction,
  populationAttributableFraction,
  preventedFraction,
} from '../../src/stats/attributable-fraction.ts';
import { hiddenCauseStrengthAtLimit } from '../../src/stats/hidden-cause-strength.ts';
import type { Interval } from '../../src/stats/interval.ts';
import { oddsRatioInterval } from '../../src/stats/odds-ratio-interval.ts';
import { oneExtraPer } from '../../src/stats/one-extra-per.ts';
import { riskDifferenceInterval } from '../../src/stats/risk-difference-interval.ts';
import { riskRatioInterval } from '../../src/stats/risk-ratio-interval.ts';
import { allTables, enumerate, leavesOut, outcomes } from './no-difference-tables.ts';

/** The limits of a fraction that grows with the ratio. */
const growing = ({ low, high }: Interval, fraction: (ratio: number) => number | null): Interval => ({
  low: low === null ? null : fraction(low),
  high: high === null ? null : fraction(high),
});
/** The limits of one that falls. */
const falling = ({ low, high }: Interval, fraction: (ratio: number) => number): Interval => ({
  low: high === null ? null : fraction(high),
  high: low === null ? null : fraction(low),
});
/** The ratio's limits with the groups exchanged. */
const inverted = ({ low, high }: Interval): Interval => ({
  low: high === null ? 0 : 1 / high,
  high: low === null || low === 0 ? null : 1 / low,
});
/** The group's share of the population for the share of all cases. */
const coverage = 0.38;
/** What is read off a ratio's limits. */
const readOff = (ratio: Interval) => [
  leavesOut(growing(ratio, attributableFraction), 0),
  leavesOut(falling(ratio, preventedFraction), 0),
  leavesOut(
    growing(ratio, (each) => populationAttributableFraction(each, coverage)),
    0,
  ),
  hiddenCauseStrengthAtLimit(ratio) !== 1,
];

describe('in all 739,600 tables of two groups of 1 to 40 people each, at 50, 80, 90, 95, 99 and 99.99%', () => {
  it('the risk ratio, the risk difference and the odds ratio, and what is read off them for either group (attributable, prevented and population fraction, hidden cause, one extra case per K people), say "no difference" exactly where the (N-1) chi-squared does; 370,230 tables are worked out, and each of the others is one of them with the groups exchanged, which changes no bit of the limits (properties.test.ts)', () => {
    const { tables, nearest } = enumerate(true, (groups, level) => {
      const ratio = riskRatioInterval(groups, level);
      const difference = riskDifferenceInterval(groups, level);
      const estimate = groups.cases / groups.total - groups.referenceCases / groups.referenceTotal;
      const [attributable, prevented, population, hidden] = readOff(ratio);
      const [otherAttributable, otherPrevented, otherPopulation, otherHidden] = readOff(inverted(ratio));
      return {
        'risk ratio': leavesOut(ratio, 1),
        'risk difference': leavesOut(difference, 0),
        'odds ratio': leavesOut(oddsRatioInterval(groups, level), 1),
        'one extra per': oneExtraPer(estimate, difference).interval !== null,
        'attributable fraction': attributable,
        'prevented fraction': prevented,
        'share of all cases': population,
        'hidden cause': hidden,
        'attributable fraction of the reference': otherAttributable,
        'prevented fraction of the reference': otherPrevented,
        'share of all cases of the reference': otherPopulation,
        'hidden cause of the reference': otherHidden,
      };
    });
    expect(tables).toBe((outcomes.length * (outcomes.length + 1)) / 2);
    expect(allTables).toBe(739_600);
    // No table comes so near to z^2 that roundings could decide.
    expect(nearest).toBeGreaterThan(3e-6);
  }, 300_000);
});
