import type { RatesQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { missingFor } from './missing.ts';
import { optionsOf } from './options.ts';
import { exposureShown, ratePairReadings, rateReading } from './rates-readings.ts';
import type { Report } from './report.ts';

/** Rates: events over time, distance or another exposure, each group against the reference. */
export function ratesReport(question: RatesQuestion): Report {
  const { groups, reference, clauses } = question;
  const options = optionsOf(clauses);
  const per = clauses.per ?? exposureShown(groups);
  const others = groups.map((_, index) => index).filter((index) => index !== reference);
  const readings = [
    ...groups.map((group, of) => rateReading(group, of, per, options)),
    ...others.flatMap((of) => ratePairReadings(groups, of, reference, per, options)),
  ];
  return {
    question,
    level: options.level,
    readings,
    headline: groups.length === 1 ? 'rate' : 'rate-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}
