import type { MissingId } from './sentence-drafts.ts';

/** What the reader of plain sentences says: two lines at most, in the words of a person in a hurry. */

const missingTexts = {
  coverage: (thing: string) => `what share of everybody is "${thing}"`,
  'second-group': () => 'a second group to compare with',
  total: () => 'out of how many',
  totals: () => 'out of how many, in each group',
  figures: () => 'how many there were in each group, out of how many, over which time',
  'which-figure': (count: string) => `which of the ${count} figures you mean`,
  'no-figure': () => 'a figure: how many out of how many, or a percentage',
} satisfies Record<MissingId, (detail: string) => string>;

/** What is missing, in words. */
export const missingText = (id: MissingId, detail = ''): string => missingTexts[id](detail);

/** The offer of one figure, with what it leaves out. */
export const confirmText = (found: string, missing: readonly string[], leftOut: string) =>
  `I found: ${found}. Missing: ${missing.length === 0 ? 'nothing' : missing.join('; ')}.${leftOut === '' ? '' : ` Left out: ${leftOut}.`} Is this what you ask?`;

/** The offer of several figures, numbered. */
export const chooseText = (figures: readonly string[], count: number) =>
  `I found ${count} figures. ${figures.map((figure, index) => `${index + 1}: ${figure}`).join('. ')}. Which one do you mean?`;

/** A figure with a gap. */
export const incompleteText = (found: string, missing: readonly string[]) =>
  `I found: ${found}. Missing: ${missing.join('; ')}.`;

/** A result without the figures behind it. */
export const resultAloneText = (claim: string) =>
  `"${claim}" is a result without its figures. Ask for: how many cases there were in each group, and how many people were in each group, over which time.`;
