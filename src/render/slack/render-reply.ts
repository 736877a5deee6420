import type { Report } from '../../report/report.ts';
import type { CheckContext, PartBehind, SlackMessage } from './message.ts';

/** The full answer, for the thread. */
export function renderReply(line: string, report: Report, context: CheckContext): SlackMessage {
  return { text: `stub reply ${line} ${report.question.kind} ${context.checkId}`, blocks: [] };
}

/** One of the parts behind the answer's buttons, for the person who pressed. */
export function renderPart(line: string, report: Report, part: PartBehind): SlackMessage {
  return { text: `stub ${part} ${line} ${report.question.kind}`, blocks: [] };
}
