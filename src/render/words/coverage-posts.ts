import type { SharesQuestion } from '../../../grammar/question.ts';
import type { Reading } from '../../report/reading.ts';
import { cases, label } from './labels.ts';
import { intervalNote } from './ratio-words.ts';

/** What is wanting for a ratio: cases in the reference group, or anybody of the group in the sample. */
export function wanting(question: SharesQuestion, of: number): string {
  const known = question.groups[of]?.known;
  return known?.kind === 'sample' && known.inGroup === 0
    ? `with nobody of ${label(question, of)} in the sample`
    : `without ${cases(question)} in ${label(question, question.reference)}`;
}

/** The interval, with what it allows for beyond chance. */
export const grantedNote = (reading: Reading) =>
  reading.interval?.unknownToEitherSide === true
    ? `${intervalNote(reading)} however they split`
    : intervalNote(reading);
