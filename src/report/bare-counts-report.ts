import type { BareCountsQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { rangeOverCorners } from './corners.ts';
import { estimateOf } from './estimates.ts';
import { missingFor } from './missing.ts';
import { relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import { usualLevel } from './report.ts';
import type { Report } from './report.ts';

/** Counts whose totals nobody stated: how many times as many, and no more than that. */
export function bareCountsReport(question: BareCountsQuestion): Report {
  const { groups, reference, clauses } = question;
  const readings = groups.flatMap(({ cases }, of) => {
    const other = groups[reference];
    if (of === reference || other === undefined) return [];
    const ratio = reading({
      id: 'count-ratio',
      of,
      against: reference,
      ...estimateOf(cases.value / other.cases.value),
      whyNoInterval: 'no-totals',
      roundingRange: rangeOverCorners([cases, other.cases], ([x = NaN, y = NaN]) => x / y),
    });
    return [ratio, relativeChange(ratio)];
  });
  return {
    question,
    level: clauses.level?.value ?? usualLevel,
    readings,
    headline: 'count-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}
