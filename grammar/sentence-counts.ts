import { isExposureWord } from './exposures.ts';
import { amountAt, isYear } from './sentence-amounts.ts';
import type { Mark } from './sentence-marks.ts';
import type { CountNode } from './sentence-node-types.ts';
import { phraseAt, subjectBefore } from './sentence-words.ts';

/** Words behind which a number is a name, not a count. */
const numbered =
  /^(?:route|ward|bus|line|page|level|pier|number|no\.?|week|day|age|aged|over|under|platform|pump|table|figure|chapter|section|room|channel|stage|phase|class|grade|section|step|item|check|form|at|before|after|since|until|by)$/i;
const month = /^(?:jan|feb|mar|apr|may|june?|july?|aug|sep|oct|nov|dec)[a-z]*$/i;

/** A count without its total; numbers that only name, date or measure something are none. */
export function countAt(marks: readonly Mark[], at: number, sentence: number): CountNode | null {
  const amount = amountAt(marks, at);
  if (amount === null || marks[amount.start]?.kind !== 'number' || isYear(amount)) return null;
  if (!Number.isInteger(amount.value)) return null;
  const before = marks[at - 1]?.text ?? '';
  if (numbered.test(before) || month.test(before) || month.test(marks[amount.end]?.text ?? '')) return null;
  if (['colon', 'slash', 'percent'].includes(marks[amount.end]?.kind ?? '')) return null;
  if (['slash', 'colon'].includes(marks[at - 1]?.kind ?? '') && marks[at - 2]?.kind === 'number') return null;
  const phrase = phraseAt(marks, amount.end);
  // `the 14 and the 15 bus`
  if (/^the$/i.test(before) && phrase.noun === '') return null;
  const [first = ''] = phrase.noun.split(' ');
  if (
    isExposureWord(first) ||
    month.test(first) ||
    /^(?:am|pm|ms|kg|g|cm|mm|m|euros?|pounds?|dollars?|degrees?)$/i.test(first)
  )
    return null;
  return {
    kind: 'count',
    amount,
    noun: phrase.noun,
    predicate: phrase.predicate,
    subject: subjectBefore(marks, at),
    start: amount.start,
    end: Math.max(amount.end, phrase.nounEnd),
    sentence,
  };
}
