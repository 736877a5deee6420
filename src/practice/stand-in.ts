import { faultInMessage } from './message-limits.ts';
import type { MessageStore, StoredMessage } from './message-store.ts';
import { botId, botPerson, teamId } from './workspace.ts';

/**
 * A stand-in for Slack's Web API, in this process: it takes what the real client sends and answers as Slack does, over a
 * message store. The practice room hands its `fetch` to the bot's client; the tests put a server in front of it.
 */
export interface StandIn {
  readonly fetch: typeof globalThis.fetch;
  /** The address at which one person may be answered alone, as it comes with a command or a button. */
  responseUrl(place: ResponsePlace): string;
}

export interface ResponsePlace {
  readonly channel: string;
  readonly user: string;
  /** The message whose button was pressed, if any. */
  readonly messageTs: string | null;
}

export interface StandInOptions {
  readonly store: MessageStore;
  /** Whether the bot is a member of the channel. */
  readonly isMember: (channel: string) => boolean;
  /** Where response addresses begin. */
  readonly origin: string;
}

type Answer = Readonly<Record<string, unknown>>;
type Fields = Readonly<Record<string, unknown>>;

const text = (value: unknown): string => (typeof value === 'string' ? value : '');

/** At most this many answers at one response address, within half an hour; only the first is kept here. */
const mostResponses = 5;

export function createStandIn({ store, isMember, origin }: StandInOptions): StandIn {
  const places: { place: ResponsePlace; uses: number }[] = [];
  const post = (fields: Fields, onlyFor: string | null): StoredMessage | string => {
    const channel = text(fields['channel']);
    if (!isMember(channel)) return channel === '' ? 'channel_not_found' : 'not_in_channel';
    const blocks = listOf(fields['blocks']);
    const fault = faultInMessage(text(fields['text']), blocks);
    if (fault !== null) return fault;
    return store.add({
      channel,
      threadTs: text(fields['thread_ts']) || null,
      user: botPerson.id,
      text: text(fields['text']),
      blocks,
      metadata: fields['metadata'] ?? null,
      onlyFor,
    });
  };
  const methods: Readonly<Record<string, (fields: Fields) => Answer>> = {
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
        ? { ok: false, error: stored }
        : { ok: true, channel: stored.channel, ts: stored.ts, message: shown(stored) };
    },
    'chat.postEphemeral': (fields) => {
      const stored = post(fields, text(fields['user']));
      return typeof stored === 'string' ? { ok: false, error: stored } : { ok: true, message_ts: stored.ts };
    },
    'conversations.history': (fields) => found(fields, (message) => message.threadTs === null),
    'conversations.replies': (fields) =>
      found(fields, (message) => message.threadTs === fields['ts'] || message.ts === fields['ts']),
  };
  const found = (fields: Fields, wanted: (message: StoredMessage) => boolean): Answer => {
    const channel = text(fields['channel']);
    if (!isMember(channel)) return { ok: false, error: 'not_in_channel' };
    const oldest = Number(text(fields['oldest']) || 0);
    const withMetadata = fields['include_all_metadata'] === 'true' || fields['include_all_metadata'] === true;
    const messages = store.messages
      .filter(
        (message) =>
          message.channel === channel &&
          message.onlyFor === null &&
          Number(message.ts) >= oldest &&
          wanted(message),
      )
      .slice(-Number(text(fields['limit']) || 100));
    return {
      ok: true,
      has_more: false,
      messages: messages.map((message) => ({
        ...shown(message),
        ...(withMetadata ? { metadata: message.metadata } : {}),
      })),
    };
  };
  const respond = (address: string, fields: Fields): Response => {
    const entry = places[Number(address)];
    if (entry === undefined) return new Response('no_such_address', { status: 404 });
    entry.uses += 1;
    if (entry.uses > mostResponses) return new Response('used_url', { status: 404 });
    const { channel, user, messageTs } = entry.place;
    const blocks = listOf(fields['blocks']);
    const fault = faultInMessage(text(fields['text']), blocks);
    if (fault !== null) return new Response(fault, { status: 400 });
    if (fields['replace_original'] === true && messageTs !== null) {
      store.replace(messageTs, (message) => ({ ...message, text: text(fields['text']), blocks }));
      return new Response('ok');
    }
    store.add({
      channel,
      threadTs: text(fields['thread_ts']) || null,
      user: botPerson.id,
      text: text(fields['text']),
      blocks,
      metadata: null,
      onlyFor: fields['response_type'] === 'in_channel' ? null : user,
    });
    return new Response('ok');
  };
  return {
    fetch: (input, init) => {
      const request = new Request(input, init);
      return request.text().then((body) => {
        const { pathname } = new URL(request.url);
        const fields = fieldsOf(body, request.headers.get('content-type') ?? '');
        const response = /^\/response\/(\d+)$/.exec(pathname);
        if (response !== null) return respond(response[1] ?? '', fields);
        const method = methods[pathname.replace(/^.*\/api\//, '')];
        return Response.json(method === undefined ? { ok: false, error: 'unknown_method' } : method(fields));
      });
    },
    responseUrl(place) {
      places.push({ place, uses: 0 });
      return `${origin}/response/${places.length - 1}`;
    },
  };
}

const shown = ({ ts, threadTs, text: said, blocks }: StoredMessage): Answer => ({
  type: 'message',
  ts,
  ...(threadTs === null ? {} : { thread_ts: threadTs }),
  text: said,
  blocks,
  bot_id: botId,
});

/** The fields of a call: JSON, or a form in which nested values are JSON texts. */
function fieldsOf(body: string, contentType: string): Fields {
  if (contentType.includes('application/json')) return JSON.parse(body) as Fields;
  return Object.fromEntries([...new URLSearchParams(body)].map(([name, value]) => [name, nested(value)]));
}

function nested(value: string): unknown {
  if (!/^[[{]/.test(value)) return value;
  try {
    return JSON.parse(value) as unknown;
  } catch {
    return value;
  }
}

const listOf = (value: unknown): readonly unknown[] =>
  Array.isArray(value) ? (value as readonly unknown[]) : [];
