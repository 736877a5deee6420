import type { Reading } from '../../report/reading.ts';
import { levelText, limitsText } from './interval-text.ts';
import { ratio } from './numbers.ts';

/** "95% interval 1.5 to 3.7", or why there is none, for inside brackets. */
export function intervalNote(reading: Reading): string {
  const { interval, whyNoInterval } = reading;
  if (interval !== null)
    return `${levelText(interval.level)} interval ${limitsText(reading, interval, 'short')}`;
  switch (whyNoInterval) {
    case 'no-exact-form':
      return 'no exact interval for this reading';
    case 'no-case-number':
      return 'no interval without counts';
    case 'no-totals':
      return 'no interval without the totals';
    case 'counts-rows-only':
      return 'interval: see the risk ratio';
    case 'no-counts':
    case 'given':
    case 'range-given':
    case 'mean-of-growth':
    case 'mean-over-cases':
    case 'range':
    case 'spans-none':
    case 'no-cases-at-all':
    case 'too-large-for-exact':
    case null:
      return 'no interval without counts';
  }
}

/** "less than half as", for a ratio below 1: the nearest plain fraction and the side of it. */
function below(value: number): string {
  const steps: readonly (readonly [number, string])[] = [
    [1 / 10, 'a tenth as'],
    [1 / 5, 'a fifth as'],
    [1 / 4, 'a quarter as'],
    [1 / 3, 'a third as'],
    [1 / 2, 'half as'],
    [2 / 3, 'two thirds as'],
    [3 / 4, 'three quarters as'],
  ];
  for (const [step, words] of steps) {
    if (Math.abs(value - step) <= step * 0.02) return `about ${words}`;
    if (value < step) return `less than ${words}`;
  }
  return value < 0.9 ? 'less' : 'slightly less';
}

/** A ratio in words, in three pieces that go round the reference group: "less than half as often" "as" B "0.43 times". */
export interface Comparison {
  readonly words: string;
  readonly joiner: 'as' | 'than';
  /** The figure, where the words do not hold it. */
  readonly figure: string | null;
}

/** `manner` is "often" or "many cases". A ratio below 1 is said in words, with its figure to follow. */
export function comparison(value: number, manner: string): Comparison {
  const figure = `${ratio(value, 'short')} times`;
  if (value === 0) return { words: `0 times as ${manner}`, joiner: 'as', figure: null };
  if (value === 1) return { words: `exactly as ${manner}`, joiner: 'as', figure: null };
  if (value > 1) return { words: `${figure} as ${manner}`, joiner: 'as', figure: null };
  const words = below(value);
  if (words.endsWith(' as')) return { words: `${words} ${manner}`, joiner: 'as', figure };
  const many = /^many\b ?/.exec(manner);
  const rest = many === null ? `less ${manner}` : `fewer ${manner.slice(many[0].length)}`.trimEnd();
  return { words: words === 'less' ? rest : `slightly ${rest}`, joiner: 'than', figure };
}

/** "3.9 times as often as day shift (95% interval 1.8 to 9)". */
export function compared(
  reading: Reading,
  manner: string,
  reference: string,
  note = intervalNote(reading),
): string {
  const { words, joiner, figure } = comparison(reading.estimate ?? NaN, manner);
  return `${words} ${joiner} ${reference} (${figure === null ? '' : `${figure}, `}${note})`;
}

/** What figures whose interval includes no difference fit: "anything from 0.7 to 2.1 times". */
export function fits(reading: Reading): string {
  const low = reading.interval?.low ?? null;
  const high = reading.interval?.high ?? null;
  if ((low === null || low === 0) && high === null) return 'any ratio at all';
  if (low === null || low === 0) return `anything up to ${ratio(high ?? NaN, 'short')} times`;
  if (high === null) return `anything from ${ratio(low, 'short')} times upwards`;
  return `anything from ${ratio(low, 'short')} to ${ratio(high, 'short')} times`;
}

export const neitherShown = 'they do not show a difference, nor that there is none';

/** How much of the first line a notification shows. */
export const firstLineLength = 110;

/** Leaves the words "95% interval" out where the line would otherwise run past what a notification shows. */
export function shorten(line: string): string {
  return line.length <= firstLineLength ? line : line.replace(/[\d.]+% interval /, '');
}
