import { alarmWordNamed } from './alarm-words.ts';
import type { AlarmWord } from './alarm-words.ts';
import type { AlarmShare, Quantity } from './question.ts';
import type { Item } from './tree.ts';

/** The figures of an alarm, each at most once. */
export interface Sides {
  readonly sensitivity: Sided | null;
  readonly specificity: Sided | null;
  readonly prevalence: Sided | null;
  readonly caught: Cell | null;
  readonly missed: Cell | null;
  readonly falseAlarms: Cell | null;
  readonly quiet: Cell | null;
}

export interface Sided {
  readonly value: AlarmShare;
  readonly word: AlarmWord;
}
export interface Cell {
  readonly count: Quantity;
}

/** What the word beside a figure says that it is. */
export const wordOf = ({ name }: Item): AlarmWord | null => alarmWordNamed(name?.text ?? null);

/** Whether a figure is a share of something (`92%`, `46 of 50`), not a bare count. */
export const isShare = ({ figure }: Item) => figure.kind === 'share' || figure.total !== null;

/** The cell of the table that a word counts, or `null` for a share. */
export function cellOf(word: AlarmWord | null): 'caught' | 'missed' | 'falseAlarms' | 'quiet' | null {
  switch (word) {
    case 'caught':
    case 'missed':
    case 'quiet':
      return word;
    case 'false alarms':
      return 'falseAlarms';
    default:
      return null;
  }
}
