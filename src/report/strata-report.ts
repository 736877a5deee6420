import type { StrataQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { missingFor } from './missing.ts';
import { optionsOf } from './options.ts';
import { exposureShown } from './rates-readings.ts';
import type { Report } from './report.ts';
import { layeredReadings } from './strata-readings.ts';

/** The same groups within layers: every layer, all together, pooled and standardised. */
export function strataReport(question: StrataQuestion): Report {
  const { groups, reference, clauses, layers } = question;
  const options = optionsOf(clauses);
  const rates = layers.flatMap((layer) => (layer.question.kind === 'rates' ? layer.question.groups : []));
  const per = clauses.per ?? exposureShown(rates);
  const readings = groups.flatMap((_, of) =>
    of === reference ? [] : layeredReadings(question, { of, against: reference }, per, options),
  );
  return {
    question,
    level: options.level,
    readings,
    headline: rates.length > 0 ? 'pooled-rate-ratio' : 'pooled-risk-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
  };
}
