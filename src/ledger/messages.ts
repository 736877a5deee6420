import type { Kysely, Transaction } from 'kysely';
import type { Ids, OutgoingMessage, PlannedMessage } from '../answer/ports.ts';
import { outgoingOf } from './rows.ts';
import type { Tables } from './schema.ts';

/** Who and where a planned message is for. */
export interface MessagePlace {
  readonly requestId: string;
  readonly teamId: string;
  readonly channelId: string;
  readonly userId: string;
}

/** Plans messages in their order. Belongs in the transaction that closes what they answer. */
export async function planMessages(
  transaction: Transaction<Tables>,
  place: MessagePlace,
  messages: readonly PlannedMessage[],
  ids: Ids,
  now: number,
): Promise<void> {
  let previous: number | null = null;
  for (const { route, text, blocks } of messages) {
    const thread = route.kind === 'post' ? route.thread : null;
    const threadTs =
      thread === null
        ? (route as { readonly threadTs: string | null }).threadTs
        : thread.kind === 'thread'
          ? thread.ts
          : null;
    const inserted: { id: number } = await transaction
      .insertInto('outgoing')
      .values({
        op: ids.next(),
        request_id: place.requestId,
        team_id: place.teamId,
        channel_id: place.channelId,
        user_id: route.kind === 'ephemeral' ? route.userId : place.userId,
        kind: route.kind,
        thread_ts: threadTs,
        under: thread?.kind === 'under-previous' ? previous : null,
        replace_original: route.kind === 'response' && route.replaceOriginal ? 1 : 0,
        text,
        blocks,
        state: 'pending',
        attempts: 0,
        due_at: now,
        started_at: null,
        posted_ts: null,
        failure: null,
      })
      .returning('id')
      .executeTakeFirstOrThrow();
    previous = inserted.id;
  }
}

/** Messages that are neither sent nor given up, in the order in which they were planned. */
export async function openMessages(db: Kysely<Tables>): Promise<readonly OutgoingMessage[]> {
  const rows = await db
    .selectFrom('outgoing')
    .innerJoin('requests', 'requests.id', 'outgoing.request_id')
    .leftJoin('outgoing as root', 'root.id', 'outgoing.under')
    .selectAll('outgoing')
    .select(['requests.response_url as response_url', 'root.posted_ts as root_ts'])
    .where('outgoing.state', 'in', ['pending', 'ambiguous', 'sending'])
    .orderBy('outgoing.id')
    .limit(500)
    .execute();
  return rows.map(outgoingOf);
}

/** Gives a message up together with those planned under it. */
export async function giveUpWithReplies(
  transaction: Transaction<Tables>,
  id: number,
  reason: string,
): Promise<void> {
  await transaction
    .updateTable('outgoing')
    .set({ state: 'failed', failure: reason })
    .where((where) =>
      where.or([where('id', '=', id), where.and([where('under', '=', id), where('state', '!=', 'sent')])]),
    )
    .execute();
}
