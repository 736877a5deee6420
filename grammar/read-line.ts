import type { LineLimits, LineReading } from './question.ts';

/** Reads one typed line. Pure, linear in the length of the line, and never throws whatever the line holds. */
export function readLine(line: string, limits: LineLimits): LineReading {
  void limits;
  return {
    kind: 'diagnosis',
    diagnosis: {
      id: 'empty-line',
      message: 'Not built yet.',
      span: { from: 0, to: line.length },
      suggestions: [],
    },
  };
}
