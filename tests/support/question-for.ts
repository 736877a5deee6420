import type { LineReading, Question } from '../../grammar/question.ts';
import { readLine } from '../../grammar/read-line.ts';
import { commandLineLimits } from '../../src/answer/answer-line.ts';

export const read = (line: string): LineReading => readLine(line, commandLineLimits);

/** The question of a line that must be understood; a refusal fails the test with the message a person would see. */
export function questionFor(line: string): Question {
  const reading = read(line);
  if (reading.kind === 'question') return reading.question;
  throw new Error(
    `${line}: ${reading.kind === 'diagnosis' ? `${reading.diagnosis.id}: ${reading.diagnosis.message}` : reading.kind}`,
  );
}

/** A question without places and remarks, for comparing two spellings of one figure. */
export const bare = (value: Question): unknown =>
  JSON.parse(
    JSON.stringify(value, (key, each: unknown) => (key === 'span' || key === 'remarks' ? undefined : each)),
  );
