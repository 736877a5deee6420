import { printCanonical } from '../../grammar/print-canonical.ts';
import { readLine } from '../../grammar/read-line.ts';
import type { Diagnosis, HelpTopic, LineLimits } from '../../grammar/question.ts';
import { reportOf } from '../report/report-of.ts';
import type { Report } from '../report/report.ts';

/** What the house says to one typed line. */
export type Answer =
  | { readonly kind: 'report'; readonly line: string; readonly report: Report; readonly canonical: string }
  | { readonly kind: 'help'; readonly line: string; readonly topic: HelpTopic }
  | { readonly kind: 'refusal'; readonly line: string; readonly diagnosis: Diagnosis };

export const commandLineLimits: LineLimits = { characters: 4_000, groups: 12, layers: 60 };
export const slackLimits: LineLimits = { characters: 2_400, groups: 12, layers: 24 };

/** Answers one typed line. Pure: no clock, no chance, no environment, no network. Never throws whatever the line holds. */
export function answerLine(line: string, limits: LineLimits): Answer {
  const reading = readLine(line, limits);
  switch (reading.kind) {
    case 'question':
      return {
        kind: 'report',
        line,
        report: reportOf(reading.question),
        canonical: printCanonical(reading.question),
      };
    case 'help':
      return { kind: 'help', line, topic: reading.topic };
    case 'diagnosis':
      return { kind: 'refusal', line, diagnosis: reading.diagnosis };
  }
}
