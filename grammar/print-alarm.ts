import type { AlarmGiven, AlarmQuestion, AlarmShare } from './question.ts';

/** The canonical spelling of an alarm's figures, without its name: as they were given, each behind its word. */
export function alarmFigures({ sensitivity, specificity, prevalence, unit }: AlarmQuestion): string {
  return [
    sideText(sensitivity.given, sides.sensitivity),
    sideText(specificity.given, sides.specificity),
    ...(prevalence === null ? [] : [`prevalence ${prevalenceText(prevalence, unit)}`]),
  ].join(', ');
}

/** The words for one side of an alarm, with what they mean when the other side was typed. */
interface SideWords {
  readonly own: string;
  readonly turned: string;
  readonly cells: readonly [right: string, wrong: string];
}

const sides: { readonly sensitivity: SideWords; readonly specificity: SideWords } = {
  sensitivity: { own: 'sensitivity', turned: 'miss rate', cells: ['caught', 'missed'] },
  specificity: { own: 'specificity', turned: 'false alarm rate', cells: ['quiet', 'false alarms'] },
};

function sideText(given: AlarmGiven, { own, turned, cells }: SideWords): string {
  switch (given.kind) {
    case 'share':
      return `${given.turned ? turned : own} ${given.typed.text}`;
    case 'counts':
      return `${given.turned ? turned : own} ${countsText(given)}`;
    case 'cells': {
      const [right, wrong] = [`${cells[0]} ${given.right.text}`, `${cells[1]} ${given.wrong.text}`];
      // Alarms stand first in both pairs: caught and missed, false alarms and quiet.
      return own === 'sensitivity' ? `${right}, ${wrong}` : `${wrong}, ${right}`;
    }
  }
}

/** `46 of 50`, with a percentage that stood beside it. */
function countsText({ part, whole, stated }: Extract<AlarmGiven, { kind: 'counts' }>): string {
  const counts = / of /.test(part.text) ? part.text : `${part.text} of ${whole.text}`;
  return stated === null ? counts : `${counts} (${stated.text})`;
}

function prevalenceText({ given }: AlarmShare, unit: string | null): string {
  if (given.kind === 'cells') throw new Error('a prevalence has no cells of its own');
  const figure = given.kind === 'share' ? given.typed.text : countsText(given);
  if (unit === null) return figure;
  return /[%\u2030]$/.test(figure) ? `${figure} of ${unit}` : `${figure} ${unit}`;
}
