import { avoidLine } from '../words/avoid.ts';
import type { KnownBlock } from '@slack/types';
import { printCanonical } from '../../../grammar/print-canonical.ts';
import type { Report } from '../../report/report.ts';
import { insteadLine, postLine, shortLine, sideWorking, workingLine } from '../render-text.ts';
import { tell } from '../words/tell.ts';
import type { Telling } from '../words/telling.ts';
import { lackingText } from '../words/missing-words.ts';
import type { CheckContext, PartBehind, SlackMessage } from './message.ts';
import { bold, box, buttons, escape, list, paragraph, person, plain, quotation, table } from './rich-text.ts';
import { quoteOf } from './render-root.ts';
import { replyRoom } from './reply-room.ts';
import type { ReplyRoom } from './reply-room.ts';

/** Longest top-level text: Slack splits longer ones into several messages. */
const textLength = 3_900;

const buttonWords = {
  readings: { text: 'All readings', spoken: 'All readings of this figure' },
  working: { text: 'Working', spoken: 'Working: how each reading was worked out' },
  questions: { text: 'Questions to send', spoken: 'Questions to send to whoever gave the figure' },
  avoid: { text: 'Better not posted', spoken: 'Better not posted: what, and why' },
  other: { text: 'Not what I meant', spoken: 'Not what I meant: say the figure differently' },
} satisfies Record<PartBehind, { text: string; spoken: string }>;

/** The full answer, for the thread: at most 750 characters before the buttons for figures of usual length. */
export function renderReply(report: Report, context: CheckContext): SlackMessage {
  const words = tell(report);
  // Three or more groups, and layers, have a table instead; a large one and their sentences stand with the readings.
  const { table: shownTable, beside, said, cautions } = roomFor(report, words);
  const post = hasFirstPost(words) ? words.posts[0] : undefined;
  const lacking = lackingText(report);
  const careful = cautions.join(' ');
  const foot =
    context.number === null
      ? 'Only you see this answer; it has no number.'
      : `Check ${context.number}, asked by `;
  const asker = context.number === null ? [] : [person(context.askedBy), plain('.')];
  const blocks: KnownBlock[] = [
    paragraph(bold(words.headline)),
    paragraph(plain([words.readAs, ...words.remarks].join(' '))),
    ...(said === null ? [] : [paragraph(plain(said))]),
    ...beside.map((line) => paragraph(plain(line))),
    ...(post === undefined ? [] : [paragraph(bold('To post:')), quotation(postLine(post))]),
    paragraph(bold('Careful: '), plain(careful)),
    ...(shownTable === null ? [] : [table(shownTable)]),
    paragraph(plain([lacking, words.limits].filter((part) => part !== null).join(' '))),
    paragraph(plain(foot), ...asker),
    buttons(
      'parts',
      Object.entries(buttonWords).map(([part, { text, spoken }]) => ({
        action: `show_${part}`,
        text,
        spoken,
        value: context.checkId,
      })),
    ),
  ];
  const text = [
    words.headline,
    words.readAs,
    ...words.remarks,
    ...(said === null ? [] : [said]),
    ...beside,
    ...(post === undefined ? [] : [`To post: ${postLine(post)}`]),
    `Careful: ${careful}`,
    ...(shownTable ?? []).map((row) => row.join('; ')),
    ...(lacking === null ? [] : [lacking]),
    words.limits,
  ].join('\n');
  const end = context.number === null ? foot : `${foot}<@${context.askedBy}>.`;
  return { text: `${withinText(escape(text))}\n${end}`, blocks };
}

/**
 * Whether the first sentence to post stands in the answer. Three or more groups have a table instead, and a sentence that takes
 * something for granted needs the others beside it: those stand with the readings, as they do where a sentence is under test.
 */
const hasFirstPost = ({ table: rows, sides, says }: Telling) =>
  rows === null && says === null && !sides.some(({ topic }) => topic === 'growth' || topic === 'unknown');

/** What of the answer stands in the reply itself. */
const roomFor = (report: Report, words: Telling): ReplyRoom =>
  replyRoom(words, [
    words.headline,
    words.readAs,
    ...words.remarks,
    'Careful: ',
    lackingText(report) ?? '',
    words.limits,
  ]);

/** One of the parts behind the answer's buttons, for the person who pressed. */
export function renderPart(line: string, report: Report, part: PartBehind): SlackMessage {
  const words = tell(report);
  const { title, lines: all } = partLines(line, report, words, part);
  const lines = fitting(all);
  return {
    text: escape([title, ...lines].join('\n')),
    blocks: [
      paragraph(bold(title)),
      part === 'other' ? box(lines.join('\n')) : list(lines.map((item) => [plain(item)])),
    ],
  };
}

function partLines(
  line: string,
  report: Report,
  words: Telling,
  part: PartBehind,
): { title: string; lines: readonly string[] } {
  switch (part) {
    case 'readings': {
      const room = roomFor(report, words);
      return {
        title: 'All readings',
        lines: [
          ...room.behind,
          ...(room.table === null
            ? (words.table ?? []).map((row) => row.filter((cell) => cell !== '').join('; '))
            : []),
          ...words.rows.map(({ name, value }) => `${name}: ${value}`),
          ...words.sides.flatMap(({ title, line, table: rows }) => [
            ...(rows === null ? [line] : []),
            ...(rows ?? [])
              .slice(1)
              .map((cells) => `${title}, ${cells[0] ?? ''}: ${cells[1] ?? ''} (interval ${cells[2] ?? ''})`),
          ]),
          ...(words.says === null
            ? []
            : [...words.says.remarks.slice(1).map(({ text }) => text), ...insteadLine(words.says)]),
          ...words.posts.slice(hasFirstPost(words) ? 1 : 0).map((post) => `To post: ${postLine(post)}`),
          ...shortLine(words),
        ],
      };
    }
    case 'working':
      return { title: 'Working', lines: [...words.rows.map(workingLine), ...words.sides.map(sideWorking)] };
    case 'questions':
      return { title: 'Questions to send', lines: words.missing.map(({ text }) => text) };
    case 'avoid':
      return {
        title: 'Better not posted',
        lines: words.avoid.map(avoidLine),
      };
    case 'other':
      return {
        title: 'Not what you meant? This is how the line was read; change it and send it again.',
        lines: [
          `You typed: ${quoteOf(line)}`,
          `Read as:   ${printCanonical(report.question)}`,
          'help shows each kind of question with an example.',
        ],
      };
  }
}

/** As many lines as fit one message, and how many had to be left out. */
function fitting(lines: readonly string[]): readonly string[] {
  let room = textLength - 200;
  const kept = lines.filter((item) => {
    room -= escape(item).length + 1;
    return room > 0;
  });
  return kept.length === lines.length
    ? lines
    : [
        ...kept,
        `${lines.length - kept.length} more lines do not fit here; the command line prints them all.`,
      ];
}

/** Cuts a text at the last whole line that fits. */
function withinText(text: string): string {
  if (text.length <= textLength) return text;
  return text.slice(0, text.lastIndexOf('\n', textLength));
}
