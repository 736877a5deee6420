import type { Report } from '../../report/report.ts';
import type { CheckContext, SlackMessage } from './message.ts';

/** The root message of a check: who asked, the figure quoted as typed, and the answer in one sentence. */
export function renderRoot(line: string, report: Report, context: CheckContext): SlackMessage {
  return { text: `stub root ${line} ${report.question.kind} ${context.checkId}`, blocks: [] };
}
