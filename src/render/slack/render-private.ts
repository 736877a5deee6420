import type { Diagnosis, HelpTopic } from '../../../grammar/question.ts';
import type { SlackMessage } from './message.ts';

/**
 * What the author of a bad line alone is told: what is wrong, where, and what would work. Suggestions with a label become
 * buttons (`ask_0` ...), whose value is `offerId`.
 */
export function renderRefusal(line: string, diagnosis: Diagnosis, offerId: string): SlackMessage {
  return { text: `stub refusal ${line} ${diagnosis.id} ${offerId}`, blocks: [] };
}

/** The help for a topic. */
export function renderHelp(topic: HelpTopic): SlackMessage {
  return { text: `stub help ${topic}`, blocks: [] };
}

/** What the asker alone is told when something outside the figure went wrong. */
export type Notice = 'not-in-channel' | 'could-not-post' | 'busy';

export function renderNotice(notice: Notice): SlackMessage {
  return { text: `stub notice ${notice}`, blocks: [] };
}
