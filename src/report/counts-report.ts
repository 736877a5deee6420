import type { CountsQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { oddsRatioReading, pairReadings, riskReading } from './counts-readings.ts';
import { missingFor } from './missing.ts';
import { optionsOf } from './options.ts';
import type { Report, StatedBeside } from './report.ts';

/** Counts: the risk in each group, and each group against the reference. */
export function countsReport(question: CountsQuestion): Report {
  const { groups, reference, clauses, chosenByOutcome } = question;
  const options = optionsOf(clauses);
  const others = groups.map((_, index) => index).filter((index) => index !== reference);
  const readings = [
    ...groups.map((group, index) => riskReading(group, index, options)),
    ...others.flatMap((of) =>
      chosenByOutcome
        ? oddsRatioReading(groups, of, reference, options)
        : pairReadings(groups, of, reference, options),
    ),
  ];
  const headline = groups.length === 1 ? 'risk' : chosenByOutcome ? 'odds-ratio' : 'risk-ratio';
  return {
    question,
    level: options.level,
    readings,
    headline,
    stated: statedBeside(question),
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}

function statedBeside({ groups }: CountsQuestion): StatedBeside[] {
  return groups.flatMap(({ cases, total, stated }, group) => {
    if (stated === null) return [];
    const computed = cases.value / total.value;
    return [{ group, stated, computed, agrees: computed >= stated.low && computed <= stated.high }];
  });
}
