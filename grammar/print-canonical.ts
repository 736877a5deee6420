import type { Question } from './question.ts';

/** The canonical spelling of a question. Reading it again gives the same question. */
export function printCanonical(question: Question): string {
  return question.kind;
}
