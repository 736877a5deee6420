import type { AlarmQuestion, Question } from '../../grammar/question.ts';

/** What the line does not say and the source could: each becomes a question that can be forwarded. */
export type MissingId =
  | 'group-sizes' // shares: how many in each group, for a risk
  | 'case-number' // shares without the number of cases
  | 'counts-behind' // percentages without counts
  | 'totals' // counts without totals
  | 'second-group' // one group only
  | 'unknown-groups' // shares: which group the cases of unknown group belong to
  | 'cases-by-period' // coverage that grew: all cases, and coverage, period by period
  | 'everybody' // rows chosen by outcome: how many in all, ill and well, in each group
  | 'same-people' // shares: do cases and coverage belong to the same people, place and time
  | 'same-time' // counts: were the groups watched equally long, and could one be counted twice
  | 'counted-twice' // rates: did events come singly, or several at once or to the same people
  | 'other-differences' // layers: in what else do the groups differ
  | 'divisor-over-time' // a change of counts: did the number that it is out of change too
  | 'equally-long' // a change of counts: how long is each of the two times
  | 'prevalence-source' // alarm: which place and time the prevalence belongs to
  | 'taken-as-they-come' // alarm: four counts, and whether the sample was chosen by outcome
  | 'who-is-counted';

/** What to ask whoever gave the figure, most useful first. */
export function missingFor(question: Question): readonly MissingId[] {
  const who: readonly MissingId[] = question.clauses.among === null ? ['who-is-counted'] : [];
  switch (question.kind) {
    case 'counts':
      if (question.chosenByOutcome) return ['everybody', ...who];
      return [...(question.groups.length === 1 ? (['second-group'] as const) : []), 'same-time', ...who];
    case 'shares':
      return [
        ...(question.unknownCases === null ? [] : (['unknown-groups'] as const)),
        ...(question.groups.some(({ known }) => known.kind === 'growth')
          ? (['cases-by-period'] as const)
          : []),
        ...(question.groups.some(({ cases }) => cases === null) ? (['case-number'] as const) : []),
        ...(question.clauses.population === null ? (['group-sizes'] as const) : []),
        'same-people',
        ...who,
      ];
    case 'stated':
      return ['counts-behind', 'same-time', ...who];
    case 'rates':
      return [
        ...(question.groups.length === 1 ? (['second-group'] as const) : []),
        ...(question.groups.some(({ asStated }) => asStated) ? (['counts-behind'] as const) : []),
        'counted-twice',
        ...who,
      ];
    case 'strata':
      return ['other-differences', 'same-time', ...who];
    case 'alarm':
      return [...missingForAlarm(question), ...who];
    case 'bare-counts':
      if (question.overTime) return ['divisor-over-time', 'equally-long', ...who];
      return ['totals', 'same-time', ...who];
  }
}

function missingForAlarm({ sensitivity, specificity, prevalence }: AlarmQuestion): readonly MissingId[] {
  const stated = [sensitivity, specificity].some(({ given }) => given.kind === 'share');
  return [
    ...(stated ? (['counts-behind'] as const) : []),
    prevalence === null ? 'taken-as-they-come' : 'prevalence-source',
  ];
}
