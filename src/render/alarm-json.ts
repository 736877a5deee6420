import type { AlarmQuestion, AlarmShare, Quantity } from '../../grammar/question.ts';

/** The parts of an alarm as they stand in the JSON report: plain shares, with the counts behind them where they were given. */
export function alarmParts({ name, sensitivity, specificity, prevalence }: AlarmQuestion) {
  return {
    name,
    sensitivity: shareParts(sensitivity),
    specificity: shareParts(specificity),
    prevalence: prevalence === null ? null : shareParts(prevalence),
  };
}

function shareParts({ share, given }: AlarmShare) {
  return { share: share.value, ...rangeOf(share), ...countsParts(given) };
}

/** Counts by what they count: those on the right side (caught, quiet), the others (missed, false alarms), or all. */
function countsParts(given: AlarmShare['given']) {
  switch (given.kind) {
    case 'share':
      return {};
    case 'counts':
      return { [given.turned ? 'wrong' : 'right']: given.part.value, all: given.whole.value };
    case 'cells':
      return { right: given.right.value, wrong: given.wrong.value };
  }
}

const rangeOf = ({ low, high }: Quantity) => (low === high ? {} : { range: { low, high } });
