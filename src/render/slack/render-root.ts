import type { Report } from '../../report/report.ts';
import { tell } from '../words/tell.ts';
import type { CheckContext, SlackMessage } from './message.ts';
import { bold, escape, paragraph, person, plain, quotation } from './rich-text.ts';

/** How much of a long line is quoted; the whole of it is in the ledger. */
const quoteLength = 600;

/** The root message of a check: who asked, the figure quoted as typed, and the answer in one sentence. */
export function renderRoot(line: string, report: Report, context: CheckContext): SlackMessage {
  const { headline } = tell(report);
  const figure = quoteOf(line);
  const number = context.number === null ? 'Check' : `Check ${context.number}`;
  return {
    text: `${escape(headline)}\n${number}, asked by <@${context.askedBy}>: ${escape(figure)}`,
    blocks: [
      paragraph(plain(`${number}, asked by `), person(context.askedBy)),
      quotation(figure),
      paragraph(bold(headline)),
    ],
  };
}

/** A typed line as it is quoted: without its ends' spaces, and cut where it is very long. */
export function quoteOf(line: string): string {
  const trimmed = line.trim();
  return trimmed.length <= quoteLength ? trimmed : `${trimmed.slice(0, quoteLength - 1)}\u2026`;
}
