import { answerLine, commandLineLimits } from '../../src/answer/answer-line.ts';
import type { Reading, ReadingId } from '../../src/report/reading.ts';
import type { Report } from '../../src/report/report.ts';

/** The report of a line that must be understood; a refusal fails the test with the message a person would see. */
export function reportFor(line: string): Report {
  const answer = answerLine(line, commandLineLimits);
  if (answer.kind === 'report') return answer.report;
  throw new Error(
    answer.kind === 'refusal'
      ? `${line}: ${answer.diagnosis.id}: ${answer.diagnosis.message}`
      : `${line}: ${answer.kind}`,
  );
}

/** The one reading of an id in the report of a line. */
export function readingFor(line: string, id: ReadingId, of = 0): Reading {
  const found = reportFor(line).readings.filter((reading) => reading.id === id && reading.of === of);
  if (found.length !== 1 || found[0] === undefined)
    throw new Error(`${line}: ${found.length} readings ${id} of group ${of}`);
  return found[0];
}
