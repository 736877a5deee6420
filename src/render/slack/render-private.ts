import { placeExcerpt } from '../../../grammar/place-excerpt.ts';
import type { Diagnosis, HelpTopic } from '../../../grammar/question.ts';
import { helpText } from '../words/help.ts';
import { askPrefix } from './message.ts';
import type { SlackMessage } from './message.ts';
import { bold, box, buttons, escape, paragraph, plain } from './rich-text.ts';

/**
 * What the author of a bad line alone is told: what is wrong, where, and what would work. Suggestions with a label become
 * buttons (`ask_0` ...), whose value is `offerId`.
 */
export function renderRefusal(line: string, diagnosis: Diagnosis, offerId: string): SlackMessage {
  const { message, span, suggestions } = diagnosis;
  const excerpt = placeExcerpt(line, span);
  const offered = suggestions.flatMap(({ label }, index) => (label === null ? [] : [{ label, index }]));
  const lines = suggestions.map((suggestion) => suggestion.line);
  const place = line.length === 0 ? [] : [`${excerpt.line}\n${excerpt.marker}`];
  return {
    text: escape([message, ...place, ...lines.map((item) => `Try: ${item}`)].join('\n')),
    blocks: [
      paragraph(bold(message)),
      ...place.map(box),
      ...(lines.length === 0
        ? []
        : [paragraph(plain(lines.length === 1 ? 'Try:' : 'Try one of:')), box(lines.join('\n'))]),
      ...(offered.length === 0
        ? []
        : [
            buttons(
              'offers',
              offered.map(({ label, index }) => ({
                action: `${askPrefix}${index}`,
                text: label.slice(0, 75),
                value: offerId,
              })),
            ),
          ]),
    ],
  };
}

/** The help for a topic. */
export function renderHelp(topic: HelpTopic): SlackMessage {
  const { title, lines, examples } = helpText(topic);
  return {
    text: escape([title, ...lines, ...examples].join('\n')),
    blocks: [paragraph(bold(title)), paragraph(plain(lines.join('\n'))), box(examples.join('\n'))],
  };
}

/** What the asker alone is told when something outside the figure went wrong. */
export type Notice = 'not-in-channel' | 'could-not-post' | 'gone' | 'asked' | 'failed';

const notices = {
  'not-in-channel':
    'Divisor is not in this conversation, so the answer is shown to you alone. Invite it to have answers posted here.',
  'could-not-post':
    'The answer could not be posted here, or it is not certain that it was; it is not posted twice. Send the line again if it is missing.',
  gone: 'This is no longer here: it was taken before, or the check is not kept any more. Send the line again.',
  asked: 'Asked. The answer comes in a moment.',
  failed:
    'Something went wrong on our side, and the line was not answered. Nothing was posted. Please send it again.',
} satisfies Record<Notice, string>;

/** A notice for one person. */
export function renderNotice(notice: Notice): SlackMessage {
  const text = notices[notice];
  return { text: escape(text), blocks: [paragraph(plain(text))] };
}
