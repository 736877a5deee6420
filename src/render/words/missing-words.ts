import type { Question } from '../../../grammar/question.ts';
import type { MissingId } from '../../report/missing.ts';
import type { Report } from '../../report/report.ts';
import { prevalenceSource, statedSides } from './alarm-cautions.ts';
import { cases, casesAsTyped, plainLabel, population } from './labels.ts';
import { quantityText } from './read-as.ts';

/** A question that can be forwarded as it stands to whoever gave the figure. */
export function missingText(question: Question, id: MissingId): string {
  switch (id) {
    case 'group-sizes':
      return `How many are counted in all (${population(question)}), and in each group? With that the risk itself can be given.`;
    case 'case-number':
      return `How many ${casesAsTyped(question)} are there in all? With that the ratio gets an interval.`;
    case 'counts-behind':
      return `Which counts are behind ${shares(question)}: how many, out of how many?`;
    case 'prevalence-source':
      return prevalenceSource(question);
    case 'taken-as-they-come':
      return 'Were these taken as they came, or were real cases picked out? If they were picked, the prevalence has to come from elsewhere.';
    case 'totals':
      if (question.kind === 'alarm') return 'Out of how many?';
      return `Out of how many? ${question.groups.map((group, index) => `${plainLabel(question, index)} ${'cases' in group && group.cases !== null ? quantityText(group.cases) : ''} of ...`).join(', ')}`;
    case 'second-group':
      return 'What is it to be compared with: how many, out of how many, in a second group?';
    case 'unknown-groups':
      return `Which group do the ${unknownCount(question)} ${casesAsTyped(question)} of unknown group belong to?`;
    case 'cases-by-period':
      return `How many ${casesAsTyped(question)} were there in each month, all groups together, and what was the coverage then? With that the ratio needs no assumption.`;
    case 'everybody':
      return 'How many were there in all in each group, with and without the outcome? With that a risk can be given.';
    case 'same-people':
      return `Are the ${cases(question)} and the coverage about the same people, place and time?`;
    case 'same-time':
      return `Were the groups watched for the same time, and could one be counted twice?`;
    case 'counted-twice':
      return `Could one be counted twice, or several ${cases(question)} come at once?`;
    case 'other-differences':
      return 'In what else do the groups differ, and are there figures for it?';
    case 'divisor-over-time':
      return 'How many were counted in all, at each of the two times? With that a risk can be given.';
    case 'equally-long':
      return 'How long was each of the two times?';
    case 'who-is-counted':
      return 'Who exactly is counted, where, and over what time?';
  }
}

const unknownCount = (question: Question) =>
  question.kind === 'shares' && question.unknownCases !== null ? quantityText(question.unknownCases) : '';

function shares(question: Question): string {
  if (question.kind === 'rates') return 'the rates';
  if (question.kind === 'alarm') return statedSides(question);
  if (question.kind !== 'stated') return 'the percentages';
  return question.groups.map(({ share }) => share.text).join(' and ');
}

/** What the answer cannot say for want of a number, in one sentence; `null` where nothing is wanting. */
export function lackingText({ question, missing }: Report): string | null {
  const [first] = missing;
  switch (first) {
    case 'group-sizes':
      return `No risk without the number of ${question.unit ?? 'people'}.`;
    case 'case-number':
      return `No interval without the number of ${casesAsTyped(question)}.`;
    case 'unknown-groups':
      return `Knowing the group of the ${unknownCount(question)} would narrow this.`;
    case 'cases-by-period':
      return 'Give cases by month to settle it.';
    case 'counts-behind':
      return `No interval without the counts behind the ${question.kind === 'rates' ? 'rates' : 'percentages'}.`;
    case 'totals':
      return 'No ratio of risks without the totals.';
    case 'divisor-over-time':
      return 'No risk without the totals of both times.';
    case 'second-group':
      return 'No comparison without a second group.';
    case 'everybody':
      return 'No risk without the numbers of everybody, ill and well.';
    default:
      return null;
  }
}
