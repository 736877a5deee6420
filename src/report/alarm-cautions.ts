import type { AlarmQuestion, AlarmShare } from '../../grammar/question.ts';

type AlarmCaution = 'prevalence-decides' | 'few-cases' | 'prevalence-as-given';

/** The cautions of an alarm: the prevalence decides, so it has to be the one of the place where the alarm stands. */
export function alarmCautions({
  sensitivity,
  specificity,
  prevalence,
}: AlarmQuestion): readonly AlarmCaution[] {
  const counts = [rightCount(sensitivity), wrongCount(specificity)];
  return [
    'prevalence-decides',
    ...(counts.some((count) => count !== null && count < 5) ? (['few-cases'] as const) : []),
    ...(prevalence === null ? [] : (['prevalence-as-given'] as const)),
  ];
}

/** How many were on the right side (real cases caught), as far as counts were given. */
function rightCount({ given }: AlarmShare): number | null {
  switch (given.kind) {
    case 'share':
      return null;
    case 'counts':
      return given.turned ? given.whole.value - given.part.value : given.part.value;
    case 'cells':
      return given.right.value;
  }
}

/** How many were on the wrong side (false alarms), as far as counts were given. */
function wrongCount({ given }: AlarmShare): number | null {
  switch (given.kind) {
    case 'share':
      return null;
    case 'counts':
      return given.turned ? given.part.value : given.whole.value - given.part.value;
    case 'cells':
      return given.wrong.value;
  }
}
