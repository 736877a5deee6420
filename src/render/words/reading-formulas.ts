import type { Question } from '../../../grammar/question.ts';
import type { Reading } from '../../report/reading.ts';
import { alarmFormula } from './alarm-rows.ts';
import { coverageFormula } from './coverage-formulas.ts';
import { fixed } from './numbers.ts';
import { quantityText } from './read-as.ts';
import { summed } from './strata-words.ts';

/** The formula with the typed numbers in it. */
export function formulaOf(asked: Question, reading: Reading): string {
  const question =
    reading.layer === null || asked.kind !== 'strata'
      ? asked
      : (asked.layers[reading.layer]?.question ?? asked);
  const own = parts(question, reading.of);
  const other = reading.against === null ? null : parts(question, reading.against);
  const pair = reading.rest
    ? `${own.risk} / (all the others together)`
    : other === null
      ? ''
      : `${own.risk} / (${other.risk})`;
  const special = coverageFormula(question, reading);
  if (special !== null) return special;
  switch (reading.id) {
    case 'risk':
    case 'rate':
      return own.risk;
    case 'case-share':
    case 'break-even-coverage':
      return own.share;
    case 'population-share':
      return own.coverage;
    case 'risk-ratio':
      if (reading.rest && question.kind === 'shares')
        return `${own.share} against all the others together, with ${own.coverage}`;
      return question.kind === 'shares'
        ? `${own.share} / (${other?.share ?? ''}) x ${other?.coverage ?? ''} / ${own.coverage}`
        : pair;
    case 'count-ratio':
    case 'percentage-ratio':
    case 'rate-ratio':
      return pair;
    case 'crude-risk-ratio':
    case 'crude-rate-ratio':
      return asked.kind === 'strata'
        ? `the sums: ${summed(asked, reading.of)}; ${summed(asked, reading.against ?? 0)}`
        : '';
    case 'pooled-risk-ratio':
      return asked.kind === 'strata' && asked.layers[0]?.question.kind === 'shares'
        ? 'the root t of sum(x1 - n t o/(1 + t o)), o the odds of coverage'
        : 'sum(x1 n2/N) / sum(x2 n1/N)';
    case 'pooled-rate-ratio':
      return 'the root t of sum(x1 - n t o/(1 + t o)), o = T1/T2';
    case 'pooled-risk-difference':
      return 'sum(x1 n2/N - x2 n1/N) / sum(n1 n2/N)';
    case 'pooled-rate-difference':
      return 'sum(x1 T2/T - x2 T1/T) / sum(T1 T2/T)';
    case 'pooled-odds-ratio':
      return 'the root t of sum(x1 - E(x1; t)), E given the margins';
    case 'standardised-rate':
      return 'sum(w x/T) / sum(w), w the exposure of all groups in the layer';
    case 'standardised-risk-ratio':
      return 'sum(N p1) / sum(N p2), N both groups of the layer';
    case 'overall-difference':
    case 'homogeneity':
      return reading.test === null
        ? ''
        : `chi-squared ${fixed(reading.test.statistic, 2)} on ${reading.test.degrees} df`;
    case 'relative-change':
      return 'ratio - 1';
    case 'risk-difference':
    case 'percentage-difference':
    case 'rate-difference':
      return `${own.risk} - ${other?.risk ?? ''}`;
    case 'odds-ratio':
      return `${own.odds} / (${other?.odds ?? ''})`;
    case 'extra-cases':
      return `${fixed(reading.per ?? 0, 0)} x the difference`;
    case 'one-extra-per':
      return '1 / the difference';
    case 'attributable-fraction':
      return '1 - 1/ratio';
    case 'prevented-fraction':
      return '1 - ratio';
    case 'population-attributable-fraction':
      return 'c(ratio - 1) / (1 + c(ratio - 1)), c the coverage';
    case 'hidden-cause-strength':
      return 'ratio + root(ratio (ratio - 1)), the ratio inverted first if below 1';
    case 'sensitivity':
    case 'specificity':
    case 'prevalence':
    case 'positive-predictive-value':
    case 'negative-predictive-value':
    case 'likelihood-ratio-positive':
    case 'likelihood-ratio-negative':
      return alarmFormula(question, reading.id);
  }
}

interface FormulaParts {
  readonly risk: string;
  readonly share: string;
  readonly coverage: string;
  readonly odds: string;
}

function parts(question: Question, index: number): FormulaParts {
  const empty = { risk: '', share: '', coverage: '', odds: '' };
  switch (question.kind) {
    case 'counts': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      const [x, n] = [quantityText(group.cases), quantityText(group.total)];
      return { ...empty, risk: `${x}/${n}`, odds: `${x}/${fixed(group.total.value - group.cases.value, 0)}` };
    }
    case 'shares': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      const coverage = group.coverageImplied
        ? `(1 - ${restOf(question, index)})`
        : quantityText(group.coverage);
      const share =
        group.cases === null
          ? quantityText(group.caseShare)
          : `${quantityText(group.cases)}/${question.totalCases === null ? '' : quantityText(question.totalCases)}`;
      return {
        ...empty,
        share,
        coverage,
        risk:
          group.cases === null
            ? share
            : `${quantityText(group.cases)}/(${coverage} x ${population(question)})`,
      };
    }
    case 'stated': {
      const group = question.groups[index];
      return { ...empty, risk: group === undefined ? '' : group.share.text };
    }
    case 'strata':
      return empty;
    case 'rates': {
      const group = question.groups[index];
      if (group === undefined) return empty;
      return { ...empty, risk: `${quantityText(group.cases)}/${quantityText(group.exposure)}` };
    }
    case 'alarm':
      return empty;
    case 'bare-counts': {
      const group = question.groups[index];
      return { ...empty, risk: group === undefined ? '' : quantityText(group.cases) };
    }
  }
}

const population = (question: Question) =>
  question.clauses.population === null ? '' : quantityText(question.clauses.population);

function restOf(question: Question, index: number): string {
  if (question.kind !== 'shares') return '';
  return question.groups
    .filter((_, other) => other !== index)
    .map(({ coverage }) => quantityText(coverage))
    .join(' - ');
}
