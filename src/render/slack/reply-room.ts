import { restColumn } from '../words/group-table.ts';
import type { SaysTold, Telling } from '../words/telling.ts';

/** What of an answer stands in the reply itself; everything else stands behind "All readings". */
export interface ReplyRoom {
  readonly table: Telling['table'];
  /** Ratios that stand side by side, one sentence each. */
  readonly beside: readonly string[];
  /** What is said about the sentence under test. */
  readonly said: string | null;
  readonly cautions: readonly string[];
  /** What had to give way to the sentence under test. */
  readonly behind: readonly string[];
}

/** How many characters an answer may have before its buttons. */
const replyLength = 750;
/** Room for the number of the check and who asked. */
const footLength = 40;
/** How many characters of a table the answer itself shows; a larger one stands behind "All readings". */
const tableLength = 330;

/** The table as the answer shows it, or `null` where it is too large. */
export function tableShown({ table: rows }: Telling): Telling['table'] {
  if (rows === null) return null;
  // The last column of a wide table stands with the readings.
  const narrow = rows.map((row) => (rows[0]?.at(-1) === restColumn ? row.slice(0, -1) : row));
  return narrow.flat().join('').length <= tableLength ? narrow : null;
}

/**
 * Decides what stands in the reply. Where a sentence is under test it takes the room of others, in this order: its own quotation
 * (the line that was asked stands above), the table, what stands side by side, the second caution, and its own remark.
 */
export function replyRoom(words: Telling, fixed: readonly string[]): ReplyRoom {
  // What one point more does stands with the readings.
  const beside = words.sides.filter(({ table: rows }) => rows !== null).map(({ line }) => line);
  const cautions = words.cautions.map(({ text }) => text);
  const whole: ReplyRoom = { table: tableShown(words), beside, said: null, cautions, behind: [] };
  const { says } = words;
  if (says === null) return whole;
  const quoted = { ...whole, said: `The line says \u201c${shortened(says.text)}\u201d. ${says.short}` };
  const unquoted = { ...whole, said: standing(says.short) };
  const plain = { ...unquoted, table: null };
  const alone = { ...plain, beside: [], behind: beside };
  const oneCaution = { ...alone, cautions: cautions.slice(0, 1), behind: [...beside, ...cautions.slice(1)] };
  const least = {
    ...oneCaution,
    said: standing(says.line),
    behind: [...oneCaution.behind, ...firstRemark(says)],
  };
  const taken = fixed.join(' ').length + footLength;
  const fits = ({ table, beside: lines, said, cautions: kept }: ReplyRoom) =>
    taken + [...(table ?? []).flat(), ...lines, said ?? '', ...kept].join(' ').length <= replyLength;
  return [quoted, unquoted, plain, alone, oneCaution].find(fits) ?? least;
}

const firstRemark = ({ remarks }: SaysTold) => remarks.slice(0, 1).map(({ text }) => text);

/** As much of a sentence under test as there is room for beside what it agrees with. */
const shortened = (text: string) => (text.length <= 60 ? text : `${text.slice(0, 59).trimEnd()}\u2026`);

/** The same without the sentence in front of it. */
const standing = (text: string) =>
  text
    .replace(/^As worded it agrees/, 'As worded the sentence agrees')
    .replace(/^It (repeats|is)\b/, 'The sentence $1')
    .replace(/^There is no figure in it\b/, 'There is no figure in the sentence')
    .replace(/measures what it says, so it could/, 'measures what the sentence says, so it could');
