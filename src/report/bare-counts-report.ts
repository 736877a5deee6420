import type { BareCountsQuestion } from '../../grammar/question.ts';
import { exactRateRatioInterval, rateRatioInterval } from '../stats/rate-ratio.ts';
import { cautionsFor } from './cautions.ts';
import { rangeOverCorners } from './corners.ts';
import { estimateOf, intervalOver } from './estimates.ts';
import { missingFor } from './missing.ts';
import { relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import { usualLevel } from './report.ts';
import type { Report } from './report.ts';

/**
 * Counts whose totals nobody stated: how many times as many. Two counts of one thing at two times have an interval too, as
 * two rates over times of equal length; counts of two groups have none.
 */
export function bareCountsReport(question: BareCountsQuestion): Report {
  const { groups, reference, clauses } = question;
  const level = clauses.level?.value ?? usualLevel;
  const readings = groups.flatMap(({ cases }, of) => {
    const other = groups[reference];
    if (of === reference || other === undefined) return [];
    const counts = [cases, other.cases];
    const ratio = reading({
      id: 'count-ratio',
      of,
      against: reference,
      ...estimateOf(cases.value / other.cases.value),
      interval: question.overTime
        ? intervalOver(
            counts,
            level,
            clauses.exact ? 'exact-rate-ratio' : 'equal-times-score',
            ([x = NaN, y = NaN]) => {
              const pair = { cases: x, exposure: 1, referenceCases: y, referenceExposure: 1 };
              return clauses.exact ? exactRateRatioInterval(pair, level) : rateRatioInterval(pair, level);
            },
          )
        : null,
      whyNoInterval: question.overTime ? null : 'no-totals',
      roundingRange: rangeOverCorners(counts, ([x = NaN, y = NaN]) => x / y),
    });
    return [ratio, relativeChange(ratio)];
  });
  return {
    question,
    level,
    readings,
    headline: 'count-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}
