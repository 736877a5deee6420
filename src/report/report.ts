import type { Question } from '../../grammar/question.ts';

/** Everything that can fairly be said about a question, in numbers and ids; no words. */
export interface Report {
  readonly question: Question;
}

/** Works out the report of a question. */
export function report(question: Question): Report {
  return { question };
}
