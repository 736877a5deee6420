import type { webApi } from '@slack/bolt';
import type { KnownBlock } from '@slack/types';
import type { OutgoingMessage } from '../answer/ports.ts';
import { outcomeOfFault } from './outcome.ts';
import type { Outcome } from './outcome.ts';

type Client = webApi.WebClient;
type Blocks = KnownBlock[];

/** The name of the metadata that carries a message's operation id. Everybody who can read the channel can read it. */
export const metadataType = 'divisor_message';

const attemptTime = 8_000;

/**
 * The one place where anything is said in Slack: one attempt, no links unfolded, no names linked, and on every post the id by
 * which it can be found again.
 */
export async function send(
  message: OutgoingMessage,
  client: Client,
  fetch: typeof globalThis.fetch,
): Promise<Outcome> {
  // Stored by us as Block Kit.
  const blocks = JSON.parse(message.blocks) as Blocks;
  const { channelId: channel, text } = message;
  const threaded = message.threadTs === null ? {} : { thread_ts: message.threadTs };
  try {
    switch (message.kind) {
      case 'post': {
        const { ts } = await client.chat.postMessage({
          channel,
          text,
          blocks,
          ...threaded,
          unfurl_links: false,
          unfurl_media: false,
          parse: 'none',
          link_names: false,
          metadata: { event_type: metadataType, event_payload: { op: message.op, v: 1 } },
        });
        return { kind: 'sent', ts: ts ?? null };
      }
      case 'ephemeral': {
        const { message_ts: ts } = await client.chat.postEphemeral({
          channel,
          user: message.userId,
          text,
          blocks,
          ...threaded,
          parse: 'none',
          link_names: false,
        });
        return { kind: 'sent', ts: ts ?? null };
      }
      case 'response':
        return await respond(message, blocks, fetch);
    }
  } catch (fault) {
    return outcomeOfFault(fault);
  }
}

/** Answers at the address that came with the request; it takes no part in channels and gives no time stamp back. */
async function respond(
  message: OutgoingMessage,
  blocks: Blocks,
  fetch: typeof globalThis.fetch,
): Promise<Outcome> {
  if (message.responseUrl === null) return { kind: 'refused', code: 'response_address_expired' };
  const answer = await fetch(message.responseUrl, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({
      response_type: 'ephemeral',
      replace_original: message.replaceOriginal,
      text: message.text,
      ...(blocks.length === 0 ? {} : { blocks }),
      ...(message.threadTs === null || message.replaceOriginal ? {} : { thread_ts: message.threadTs }),
    }),
    signal: AbortSignal.timeout(attemptTime),
  });
  if (answer.ok) return { kind: 'sent', ts: null };
  if (answer.status === 429)
    return { kind: 'wait', milliseconds: Number(answer.headers.get('retry-after') ?? 30) * 1000 };
  return answer.status >= 500
    ? { kind: 'ambiguous', code: `http_${answer.status}` }
    : { kind: 'refused', code: `http_${answer.status}` };
}

/** Whether a post whose answer was lost did arrive: found by its metadata, not there, or nobody may look. */
export type LookUp =
  | { readonly kind: 'found'; readonly ts: string }
  | { readonly kind: 'not-there' }
  | { readonly kind: 'cannot-look' }
  | { readonly kind: 'try-later' };

/** How long after the start of an attempt its post may be dated, in seconds: the attempt itself and clocks that differ. */
const lookUpSpan = 60;

/** Looks a message up by the operation id in its metadata. Needs membership and a history scope. */
export async function lookUp(message: OutgoingMessage, client: Client): Promise<LookUp> {
  const started = (message.startedAt ?? message.dueAt) / 1000;
  const common = {
    channel: message.channelId,
    // Slack lists the newest first: without an end, what came later would push the post off the page.
    oldest: (started - 5).toFixed(6),
    latest: (started + lookUpSpan).toFixed(6),
    inclusive: true,
    limit: 999,
    include_all_metadata: true,
  } as const;
  try {
    const { messages = [], has_more: more } =
      message.threadTs === null
        ? await client.conversations.history(common)
        : await client.conversations.replies({ ...common, ts: message.threadTs });
    const found = messages.find(({ metadata }) => {
      const payload: unknown = metadata?.event_payload;
      return typeof payload === 'object' && payload !== null && 'op' in payload && payload.op === message.op;
    });
    if (found?.ts !== undefined) return { kind: 'found', ts: found.ts };
    return more === true ? { kind: 'cannot-look' } : { kind: 'not-there' };
  } catch (fault) {
    return outcomeOfFault(fault).kind === 'refused' ? { kind: 'cannot-look' } : { kind: 'try-later' };
  }
}
