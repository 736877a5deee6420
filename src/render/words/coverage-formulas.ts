import type { Question, SharesGroup, SharesQuestion } from '../../../grammar/question.ts';
import type { Reading } from '../../report/reading.ts';
import { shareText } from './coverage-words.ts';
import { count } from './numbers.ts';

/** The formula of a reading whose coverage is not one number, or `null` where the usual one holds. */
export function coverageFormula(question: Question, { id, of, against }: Reading): string | null {
  if (question.kind !== 'shares') return null;
  const [own, other] = [question.groups[of], question.groups[against ?? question.reference]];
  if (own === undefined || other === undefined || own.known.kind === 'given') return null;
  switch (id) {
    case 'population-share':
      return shareFormula(own);
    case 'risk-ratio':
      return own.known.kind === 'periods'
        ? `the t at which sum(N t o / (1 + t o)) = ${caseText(own)}, N all cases of a ${own.known.by} and o = c/(1 - c) its coverage's odds`
        : `${caseText(own)}/${caseText(other)} x ${term(other)} / ${term(own)}`;
    case 'population-attributable-fraction':
      return own.known.kind === 'sample'
        ? `1 - ${allOf(question, other)} / ${term(other)}`
        : own.known.kind === 'periods'
          ? `sum of N c(ratio - 1) / (1 + c(ratio - 1)) over the sum of N, c the coverage of a ${own.known.by}`
          : null;
    default:
      return null;
  }
}

const caseText = ({ cases, caseShare }: SharesGroup) =>
  cases === null ? caseShare.text : cases.precision === 'exact' ? count(cases.value) : cases.text;

const allOf = ({ totalCases }: SharesQuestion, group: SharesGroup) =>
  `(${caseText(group)}${totalCases === null ? '' : `/${count(totalCases.value)}`})`;

/** The coverage that stands in the ratio's formula. */
function term(group: SharesGroup): string {
  const { known } = group;
  if (known.kind === 'sample') return `(${count(known.inGroup)}/${count(known.sampled)})`;
  return shareText(group);
}

function shareFormula(group: SharesGroup): string {
  const { known } = group;
  switch (known.kind) {
    case 'given':
    case 'interval':
      return shareText(group);
    case 'sample':
      return `${count(known.inGroup)}/${count(known.sampled)}`;
    case 'range':
      return `(${known.low.text} + ${known.high.text}) / 2`;
    case 'growth':
      return `(${known.start.text} + ${known.end.text}) / 2`;
    case 'periods': {
      const all = known.periods.reduce((sum, { allCases }) => sum + allCases, 0);
      return `(${known.periods.map(({ coverage, allCases }) => `${count(allCases)} x ${coverage.text}`).join(' + ')}) / ${count(all)}`;
    }
  }
}
