import { criticalValue } from '../../src/stats/critical-value.ts';
import type { Interval, TwoGroups } from '../../src/stats/interval.ts';
import { nMinusOneChiSquared } from '../../src/stats/null-test.ts';
import { levels } from './generated.ts';

/** The largest group of the enumerations. */
export const largest = 40;
/** All outcomes of one group of 1 to 40: 860 of them. */
export const outcomes = Array.from({ length: largest }, (_, at) => at + 1).flatMap((total) =>
  Array.from({ length: total + 1 }, (_, cases) => ({ cases, total })),
);
/** All pairs of them, which are all the tables. */
export const allTables = outcomes.length ** 2;

/** Whether an interval leaves out the value that stands for "no difference". */
export const leavesOut = ({ low, high }: Interval, none: number) =>
  (low !== null && low > none) || (high !== null && high < none);

export interface Enumerated {
  readonly tables: number;
  /** The relative distance from z^2 of the (N-1) chi-squared that came nearest to it. */
  readonly nearest: number;
}

/**
 * Runs through the tables at all six levels and holds what the readings say against the (N-1) chi-squared; the first that differs
 * is thrown with its table, level and name.
 *
 * @param folded only one of two tables that are each other with the groups exchanged
 * @param excludes by reading, whether its interval at this level leaves out "no difference"
 */
export function enumerate<Name extends string>(
  folded: boolean,
  excludes: (groups: TwoGroups, level: number) => Readonly<Record<Name, boolean | undefined>>,
): Enumerated {
  const thresholds = levels.map((level) => ({ level, threshold: criticalValue(level) ** 2 }));
  let tables = 0;
  let nearest = Infinity;
  outcomes.forEach(({ cases, total }, at) => {
    for (const reference of folded ? outcomes.slice(0, at + 1) : outcomes) {
      const groups = { cases, total, referenceCases: reference.cases, referenceTotal: reference.total };
      const statistic = nMinusOneChiSquared(groups);
      for (const { level, threshold } of thresholds) {
        const expected = statistic > threshold;
        nearest = Math.min(nearest, Math.abs(statistic / threshold - 1));
        const found = excludes(groups, level);
        for (const name in found)
          if (found[name] !== expected)
            throw new Error(
              `${name} of ${JSON.stringify(groups)} at ${level}: ${found[name]} for ${expected}`,
            );
      }
      tables += 1;
    }
  });
  return { tables, nearest };
}
