import type { Quantity, SharesQuestion } from '../../grammar/question.ts';
import { cautionsFor } from './cautions.ts';
import { pairReadings, riskReading } from './counts-readings.ts';
import type { CountsRow } from './counts-readings.ts';
import { missingFor } from './missing.ts';
import { optionsOf } from './options.ts';
import { ratioVariants } from './ratio-variants.ts';
import { reading } from './reading.ts';
import type { Reading } from './reading.ts';
import type { Report } from './report.ts';
import {
  breakEvenReading,
  caseShareReading,
  populationFraction,
  shareRatioReadings,
} from './shares-readings.ts';
import { isUncertain, uncertainSharesReport } from './uncertain-shares-report.ts';

/**
 * Shares of cases beside shares of the population: the ratio per person without anybody's total. With `population` the
 * totals are known, and then every reading comes from the counts rows: the two families are never mixed, since they can
 * disagree about "no difference".
 */
export function sharesReport(question: SharesQuestion): Report {
  const { groups, reference, clauses } = question;
  const options = optionsOf(clauses);
  if (isUncertain(question)) return uncertainSharesReport(question, options);
  const others = groups.map((_, index) => index).filter((index) => index !== reference);
  const rows = rowsInPopulation(question);
  const population = groups.map(({ coverage, coverageImplied }, of) =>
    reading({
      id: 'population-share',
      of,
      estimate: coverage.value,
      whyNoInterval: 'given',
      roundingRange:
        coverage.low === coverage.high || coverageImplied ? null : { low: coverage.low, high: coverage.high },
    }),
  );
  const caseShares = groups.map((_, of) => caseShareReading(question, of, options, rows !== null));
  const readings: Reading[] = [
    ...caseShares,
    ...population,
    ...(rows === null ? [] : rows.map((row, of) => riskReading(row, of, options))),
    ...others.flatMap((of) => {
      const pair =
        rows === null
          ? shareRatioReadings(question, of, options)
          : pairReadings(rows, of, reference, options);
      return [
        ...pair,
        ...(groups.length === 2
          ? [...populationFraction(question, pair), ...breakEvenReading(question, of, options, rows !== null)]
          : []),
      ];
    }),
  ];
  return {
    question,
    level: options.level,
    readings,
    headline: 'risk-ratio',
    stated: [],
    cautions: cautionsFor(question, readings),
    missing: missingFor(question),
    variants: ratioVariants(
      question,
      readings.find(({ id }) => id === 'risk-ratio'),
      options,
    ),
  };
}

function rowsInPopulation({ groups, clauses: { population, exact } }: SharesQuestion): CountsRow[] | null {
  // Exact methods count whole outcomes, and coverage times population need not be whole.
  if (population === null || exact) return null;
  const rows = groups.map(({ cases, coverage }) => cases && { cases, total: times(coverage, population) });
  return rows.every((row) => row !== null) ? rows : null;
}

function times(coverage: Quantity, population: Quantity): Quantity {
  const low = coverage.low * population.low;
  const high = coverage.high * population.high;
  return {
    text: `${coverage.text} of ${population.text}`,
    value: coverage.value * population.value,
    low,
    high,
    precision: coverage.precision === 'range' || population.precision === 'range' ? 'range' : 'rounded',
    span: coverage.span,
  };
}
