import type { Reading } from '../../report/reading.ts';
import { intervalNote } from './ratio-words.ts';

/** The sentence to post where the interval includes no difference: it claims none, nor that there is none. */
export const noneShown = (reading: Reading, rows: string) =>
  `${rows} These figures do not show a difference, nor that there is none (${intervalNote(reading).replace('interval', 'interval of the ratio')}).`;
