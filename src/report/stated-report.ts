import type { StatedQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { rangeOverCorners } from './corners.ts';
import { perFor, scaledCases } from './counts-readings.ts';
import { estimateOf } from './estimates.ts';
import { missingFor } from './missing.ts';
import { relativeChange } from './ratio-followers.ts';
import { reading } from './reading.ts';
import type { Reading } from './reading.ts';
import { usualLevel } from './report.ts';
import type { Report } from './report.ts';

/** Stated percentages or frequencies without counts: no interval can be had, only the range that rounding allows. */
export function statedReport(question: StatedQuestion): Report {
  const { groups, reference, clauses } = question;
  const others = groups.map((_, index) => index).filter((index) => index !== reference);
  const readings: Reading[] = [
    ...groups.map(({ share }, of) =>
      reading({
        id: 'risk',
        of,
        estimate: share.value,
        whyNoInterval: 'no-counts',
        roundingRange: rangeOverCorners([share], ([p = NaN]) => p),
      }),
    ),
    ...others.flatMap((of) => pair(question, of)),
  ];
  return {
    question,
    level: clauses.level?.value ?? usualLevel,
    readings,
    headline: 'percentage-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}

function pair({ groups, reference, clauses }: StatedQuestion, of: number): Reading[] {
  const group = groups[of];
  const other = groups[reference];
  if (group === undefined || other === undefined) return [];
  const shares = [group.share, other.share];
  const common = { of, against: reference, whyNoInterval: 'no-counts' } as const;
  const ratio = reading({
    ...common,
    id: 'percentage-ratio',
    ...estimateOf(group.share.value / other.share.value),
    roundingRange: rangeOverCorners(shares, ([p = NaN, q = NaN]) => p / q),
  });
  const difference = reading({
    ...common,
    id: 'percentage-difference',
    estimate: group.share.value - other.share.value,
    roundingRange: rangeOverCorners(shares, ([p = NaN, q = NaN]) => p - q),
  });
  const per = clauses.per ?? perFor(shares.map(({ value }) => value));
  return [ratio, relativeChange(ratio), difference, scaledCases(difference, per)];
}
