import type { ReceiverEvent } from '@slack/bolt';
import type { StoredMessage } from './message-store.ts';
import { appId, botPerson, teamId } from './workspace.ts';

/** The bodies that Slack delivers, made of what a person typed or pressed on the page. */
type Body = ReceiverEvent['body'];

/** Slack hands over what was typed with these three characters escaped. */
const escaped = (line: string) =>
  line.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');

/** A line as the bot is called in it, by command or by name; people who leave the call out get it supplied. */
export const typedLine = (line: string): string =>
  line.replace(/^\s*(?:\/divisor|@divisor)(?![\w-])\s?/i, '');

/** Whether a line calls the bot by name, which works everywhere; the command works outside threads only. */
export const isMention = (line: string): boolean => /^\s*@divisor(?![\w-])/i.test(line);

/** The text of a message that calls the bot by name. */
export const mentionText = (line: string): string => `<@${botPerson.id}> ${escaped(typedLine(line))}`;

export interface CommandParts {
  readonly person: string;
  readonly channel: string;
  readonly line: string;
  readonly triggerId: string;
  readonly responseUrl: string;
}

export const commandBody = ({ person, channel, line, triggerId, responseUrl }: CommandParts): Body => ({
  command: '/divisor',
  text: escaped(typedLine(line)),
  api_app_id: appId,
  team_id: teamId,
  channel_id: channel,
  user_id: person,
  trigger_id: triggerId,
  response_url: responseUrl,
  is_enterprise_install: 'false',
});

/** A message in which the bot is called by name. */
export const mentionBody = (message: StoredMessage, eventId: string): Body => ({
  type: 'event_callback',
  api_app_id: appId,
  team_id: teamId,
  event_id: eventId,
  event_time: Math.floor(Number(message.ts)),
  event: {
    type: 'app_mention',
    user: message.user,
    text: message.text,
    ts: message.ts,
    channel: message.channel,
    event_ts: message.ts,
    ...threaded(message),
  },
});

export interface Button {
  readonly blockId: string;
  readonly actionId: string;
  readonly value: string;
}

export interface PressParts {
  readonly person: string;
  readonly message: StoredMessage;
  readonly button: Button;
  readonly triggerId: string;
  readonly responseUrl: string;
}

export const pressBody = ({ person, message, button, triggerId, responseUrl }: PressParts): Body => ({
  type: 'block_actions',
  api_app_id: appId,
  team: { id: teamId },
  user: { id: person, team_id: teamId },
  channel: { id: message.channel },
  container: {
    type: 'message',
    message_ts: message.ts,
    channel_id: message.channel,
    is_ephemeral: message.onlyFor !== null,
    ...threaded(message),
  },
  // Slack hands over no content of a message that only one person sees.
  ...(message.onlyFor === null
    ? {
        message: {
          type: 'message',
          ts: message.ts,
          text: message.text,
          blocks: message.blocks,
          ...threaded(message),
        },
      }
    : {}),
  state: { values: {} },
  trigger_id: triggerId,
  response_url: responseUrl,
  actions: [
    {
      type: 'button',
      action_id: button.actionId,
      block_id: button.blockId,
      value: button.value,
      action_ts: message.ts,
    },
  ],
});

const threaded = ({ threadTs }: StoredMessage) => (threadTs === null ? {} : { thread_ts: threadTs });

type Block = Readonly<Record<string, unknown>>;

/** A message's button, in a row of them or beside a section's text. */
export function buttonIn(blocks: readonly unknown[], actionId: string): Button | undefined {
  for (const block of blocks as readonly Block[]) {
    const beside = block['accessory'];
    const row = Array.isArray(block['elements']) ? (block['elements'] as readonly unknown[]) : [];
    for (const element of [...row, beside] as readonly (Block | undefined)[]) {
      if (element?.['type'] !== 'button' || element['action_id'] !== actionId) continue;
      const { block_id: blockId } = block;
      const { value } = element;
      return {
        actionId,
        blockId: typeof blockId === 'string' ? blockId : '',
        value: typeof value === 'string' ? value : '',
      };
    }
  }
  return undefined;
}
