import { faultInMessage, isMetadata } from './message-limits.ts';
import type { MessageStore, StoredMessage } from './message-store.ts';
import { isTrue, listOf, textOf } from './wire.ts';
import type { Fields } from './wire.ts';
import { botId, botPerson, teamId } from './workspace.ts';

export type Answer = Readonly<Record<string, unknown>>;
type Method = (fields: Fields) => Answer;

export interface WebApiParts {
  readonly store: MessageStore;
  /** Whether the bot is a member of the channel. */
  readonly isMember: (channel: string) => boolean;
}

const refused = (error: string): Answer => ({ ok: false, error });

/** The methods of Slack's Web API that this bot uses, over a message store, with Slack's error codes. */
export function webApi({ store, isMember }: WebApiParts): Readonly<Record<string, Method>> {
  const post = (fields: Fields, onlyFor: string | null): StoredMessage | string => {
    const channel = textOf(fields['channel']);
    if (!isMember(channel)) return channel === '' ? 'channel_not_found' : 'not_in_channel';
    const blocks = listOf(fields['blocks']);
    const fault = faultInMessage(textOf(fields['text']), blocks);
    if (fault !== null) return fault;
    if (!isMetadata(fields['metadata'])) return 'invalid_metadata_format';
    return store.add({
      channel,
      threadTs: textOf(fields['thread_ts']) || null,
      user: botPerson.id,
      text: textOf(fields['text']),
      blocks,
      metadata: fields['metadata'] ?? null,
      onlyFor,
    });
  };
  return {
    'auth.test': () => ({
      ok: true,
      url: 'https://harrowmere.example/',
      team: 'Harrowmere',
      user: 'divisor',
      team_id: teamId,
      user_id: botPerson.id,
      bot_id: botId,
    }),
    'chat.postMessage': (fields) => {
      const stored = post(fields, null);
      return typeof stored === 'string'
        ? refused(stored)
        : { ok: true, channel: stored.channel, ts: stored.ts, message: shown(stored) };
    },
    'chat.postEphemeral': (fields) => {
      const user = textOf(fields['user']);
      if (user === '') return refused('invalid_arguments');
      const stored = post(fields, user);
      return typeof stored === 'string' ? refused(stored) : { ok: true, message_ts: stored.ts };
    },
    'chat.update': (fields) => updated(fields, store),
    'conversations.history': (fields) =>
      isMember(textOf(fields['channel']))
        ? page(
            fields,
            visible(store, fields)
              .filter(({ threadTs }) => threadTs === null)
              .reverse(),
          )
        : refused('not_in_channel'),
    'conversations.replies': (fields) => {
      const [channel, root] = [textOf(fields['channel']), textOf(fields['ts'])];
      if (!isMember(channel)) return refused('not_in_channel');
      const inThread = ({ ts, threadTs }: StoredMessage) => ts === root || threadTs === root;
      const known = store.messages.some((message) => message.channel === channel && inThread(message));
      return known ? page(fields, visible(store, fields).filter(inThread)) : refused('thread_not_found');
    },
  };
}

/** Only the bot's own messages, and none that only one person sees. Old blocks go where none are given; metadata stays. */
function updated(fields: Fields, store: MessageStore): Answer {
  const [channel, ts, text] = [textOf(fields['channel']), textOf(fields['ts']), textOf(fields['text'])];
  const message = store.find(channel, ts);
  if (message === undefined || message.onlyFor !== null) return refused('message_not_found');
  if (message.user !== botPerson.id) return refused('cant_update_message');
  const blocks = listOf(fields['blocks']);
  const fault = faultInMessage(text, blocks);
  if (fault !== null) return refused(fault);
  if (!isMetadata(fields['metadata'])) return refused('invalid_metadata_format');
  store.replace(ts, (old) => ({ ...old, text, blocks, metadata: fields['metadata'] ?? old.metadata }));
  return { ok: true, channel, ts, text };
}

/** What can be looked up in a channel within the times asked for, oldest first. */
function visible(store: MessageStore, fields: Fields): StoredMessage[] {
  const inclusive = isTrue(fields['inclusive']);
  const oldest = Number(textOf(fields['oldest']) || 0);
  const latest = Number(textOf(fields['latest']) || Infinity);
  return store.messages.filter(({ channel, onlyFor, ts }) => {
    const at = Number(ts);
    return (
      channel === fields['channel'] &&
      onlyFor === null &&
      (inclusive ? at >= oldest && at <= latest : at > oldest && at < latest)
    );
  });
}

const usualLimit = 100;

function page(fields: Fields, messages: readonly StoredMessage[]): Answer {
  const limit = Number(fields['limit'] ?? usualLimit) || usualLimit;
  const withMetadata = isTrue(fields['include_all_metadata']);
  return {
    ok: true,
    has_more: messages.length > limit,
    messages: messages.slice(0, limit).map((message) => ({
      ...shown(message),
      ...(withMetadata && message.metadata !== null ? { metadata: message.metadata } : {}),
    })),
  };
}

const shown = ({ ts, threadTs, user, text, blocks }: StoredMessage): Answer => ({
  type: 'message',
  ts,
  ...(threadTs === null ? {} : { thread_ts: threadTs }),
  user,
  text,
  ...(blocks.length === 0 ? {} : { blocks }),
  ...(user === botPerson.id ? { bot_id: botId } : {}),
});
