import { createHash } from 'node:crypto';
import type { AskedRequest } from '../answer/ports.ts';

/** A request as Slack delivered it, made ready for storing: what was asked, the keys by which a second delivery is known. */
export interface Incoming {
  readonly request: AskedRequest;
  readonly keys: readonly string[];
  readonly responseUrl: string | null;
}

type Body = Readonly<Record<string, unknown>>;

const text = (value: unknown): string => (typeof value === 'string' ? value : '');
const record = (value: unknown): Body => (typeof value === 'object' && value !== null ? (value as Body) : {});

/**
 * Reads a delivery, or returns `null` where it is nothing that this bot answers. Tokens and trigger ids go no further: the
 * keys are digests, since a trigger id lets its bearer open windows.
 */
export function incomingOf(body: Body, envelopeId: string | null): Incoming | null {
  const found = commandOf(body) ?? mentionOf(body) ?? buttonOf(body);
  if (found === null) return null;
  const keys = [...found.keys, ...(envelopeId === null ? [] : [`envelope ${envelopeId}`])];
  return { ...found, keys: keys.map((key) => createHash('sha256').update(key).digest('hex')) };
}

/** The key of one gesture of a person; none without a trigger id, since an empty one would make all of them the same. */
function gesture(kind: string, teamId: string, body: Body): readonly string[] {
  const trigger = text(body['trigger_id']);
  return trigger === '' ? [] : [`${kind} ${teamId} ${trigger}`];
}

function commandOf(body: Body): Incoming | null {
  if (text(body['command']) === '') return null;
  return {
    request: {
      kind: 'command',
      teamId: text(body['team_id']),
      channelId: text(body['channel_id']),
      userId: text(body['user_id']),
      text: text(body['text']),
    },
    keys: gesture('command', text(body['team_id']), body),
    responseUrl: text(body['response_url']) || null,
  };
}

/** A mention by a person. An edit comes again under the same time stamp and is therefore no new question; other bots are not answered. */
function mentionOf(body: Body): Incoming | null {
  const event = record(body['event']);
  if (text(event['type']) !== 'app_mention' || text(event['bot_id']) !== '' || text(event['user']) === '')
    return null;
  const [teamId, channelId, ts] = [text(body['team_id']), text(event['channel']), text(event['ts'])];
  return {
    request: {
      kind: 'mention',
      teamId,
      channelId,
      userId: text(event['user']),
      text: text(event['text']),
      threadTs: text(event['thread_ts']) || ts,
    },
    keys: [`mention ${teamId} ${channelId} ${ts}`],
    responseUrl: null,
  };
}

function buttonOf(body: Body): Incoming | null {
  if (text(body['type']) !== 'block_actions') return null;
  const [action] = Array.isArray(body['actions']) ? (body['actions'] as unknown[]).map(record) : [];
  if (action === undefined) return null;
  const teamId = text(record(body['team'])['id']) || text(record(body['user'])['team_id']);
  const container = record(body['container']);
  const message = record(body['message']);
  return {
    request: {
      kind: 'button',
      teamId,
      channelId: text(record(body['channel'])['id']) || text(container['channel_id']),
      userId: text(record(body['user'])['id']),
      action: text(action['action_id']),
      value: text(action['value']),
      threadTs: text(container['thread_ts']) || text(message['thread_ts']) || null,
    },
    keys: gesture('button', teamId, body),
    responseUrl: text(body['response_url']) || null,
  };
}
