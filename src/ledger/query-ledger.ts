import type { Kysely } from 'kysely';
import type { Clock, Ids, Ledger } from '../answer/ports.ts';
import { giveUpWithReplies, openMessages, planMessages } from './messages.ts';
import { checkOf, requestOf } from './rows.ts';
import type { Tables } from './schema.ts';

/** How long an address for answering the asker alone lives. */
const responseUrlLife = 30 * 60_000;

/** The ledger over a typed query builder; the database behind it is the caller's choice. */
export function queryLedger(db: Kysely<Tables>, clock: Clock, ids: Ids): Ledger {
  return {
    storeRequest: (keys, request, responseUrl) =>
      db.transaction().execute(async (transaction) => {
        const seen =
          keys.length === 0
            ? undefined
            : await transaction
                .selectFrom('request_keys')
                .select('key')
                .where('key', 'in', [...keys])
                .executeTakeFirst();
        if (seen !== undefined) return false;
        const id = ids.next();
        await transaction
          .insertInto('requests')
          .values({
            id,
            team_id: request.teamId,
            body: JSON.stringify(request),
            response_url: responseUrl,
            state: 'open',
            failure: null,
            received_at: clock.now(),
          })
          .execute();
        if (keys.length === 0) return true;
        await transaction
          .insertInto('request_keys')
          .values(keys.map((key) => ({ key, request_id: id })))
          .execute();
        return true;
      }),

    async nextRequest() {
      const row = await db
        .selectFrom('requests')
        .selectAll()
        .where('state', '=', 'open')
        .orderBy('arrival')
        .limit(1)
        .executeTakeFirst();
      return row === undefined ? null : requestOf(row);
    },

    async requestById(id) {
      const row = await db.selectFrom('requests').selectAll().where('id', '=', id).executeTakeFirst();
      return row === undefined ? null : requestOf(row);
    },

    async checkById(id) {
      const row = await db.selectFrom('checks').selectAll().where('id', '=', id).executeTakeFirst();
      return row === undefined ? null : checkOf(row);
    },

    answerRequest: (stored, draft, compose) =>
      db.transaction().execute(async (transaction) => {
        const now = clock.now();
        let check = null;
        if (draft !== null) {
          const { numbered, ...kept } = draft;
          const last = await transaction
            .selectFrom('checks')
            .select(({ fn }) => fn.max('number').as('number'))
            .where('team_id', '=', draft.teamId)
            .where('channel_id', '=', draft.channelId)
            .executeTakeFirst();
          check = {
            ...kept,
            id: ids.next(),
            number: numbered ? Number(last?.number ?? 0) + 1 : null,
            createdAt: now,
          };
          await transaction
            .insertInto('checks')
            .values({
              id: check.id,
              team_id: check.teamId,
              channel_id: check.channelId,
              number: check.number,
              line: check.line,
              canonical: check.canonical,
              kind: check.kind,
              asked_by: check.askedBy,
              request_id: stored.id,
              created_at: now,
            })
            .execute();
        }
        const { teamId, channelId, userId } = stored.request;
        await planMessages(
          transaction,
          { requestId: stored.id, teamId, channelId, userId },
          compose(check),
          ids,
          now,
        );
        await transaction
          .updateTable('requests')
          .set({ state: 'answered' })
          .where('id', '=', stored.id)
          .execute();
      }),

    failRequest: (stored, code, messages) =>
      db.transaction().execute(async (transaction) => {
        const { teamId, channelId, userId } = stored.request;
        await planMessages(
          transaction,
          { requestId: stored.id, teamId, channelId, userId },
          messages,
          ids,
          clock.now(),
        );
        await transaction
          .updateTable('requests')
          .set({ state: 'failed', failure: code })
          .where('id', '=', stored.id)
          .execute();
      }),

    takeOffer: (requestId, takenBy) =>
      db.transaction().execute(async (transaction) => {
        await transaction
          .insertInto('offers_taken')
          .values({ request_id: requestId, taken_at: clock.now(), taken_by: takenBy })
          .onConflict((conflict) => conflict.doNothing())
          .execute();
        const { taken_by } = await transaction
          .selectFrom('offers_taken')
          .select('taken_by')
          .where('request_id', '=', requestId)
          .executeTakeFirstOrThrow();
        return taken_by === takenBy;
      }),

    openMessages: () => openMessages(db),

    async startSending(id) {
      const { numUpdatedRows } = await db
        .updateTable('outgoing')
        .set(({ eb }) => ({ state: 'sending', attempts: eb('attempts', '+', 1), started_at: clock.now() }))
        .where('id', '=', id)
        .where('state', '=', 'pending')
        .executeTakeFirst();
      return Number(numUpdatedRows) === 1;
    },

    async markSent(id, ts) {
      await db.updateTable('outgoing').set({ state: 'sent', posted_ts: ts }).where('id', '=', id).execute();
    },

    async markAmbiguous(id, dueAt) {
      await db
        .updateTable('outgoing')
        .set({ state: 'ambiguous', due_at: dueAt })
        .where('id', '=', id)
        .execute();
    },

    async postpone(id, dueAt) {
      await db
        .updateTable('outgoing')
        .set({ state: 'pending', due_at: dueAt })
        .where('id', '=', id)
        .execute();
    },

    giveUp: (id, reason, instead) =>
      db.transaction().execute(async (transaction) => {
        const row = await transaction
          .selectFrom('outgoing')
          .selectAll()
          .where('id', '=', id)
          .executeTakeFirstOrThrow();
        await giveUpWithReplies(transaction, id, reason);
        const place = {
          requestId: row.request_id,
          teamId: row.team_id,
          channelId: row.channel_id,
          userId: row.user_id,
        };
        await planMessages(transaction, place, instead, ids, clock.now());
      }),

    async recover() {
      await db
        .updateTable('outgoing')
        .set({ state: 'ambiguous', due_at: clock.now() })
        .where('state', '=', 'sending')
        .execute();
    },

    async forgetExpired() {
      await db
        .updateTable('requests')
        .set({ response_url: null })
        .where('response_url', 'is not', null)
        .where('received_at', '<', clock.now() - responseUrlLife)
        .execute();
    },

    async counts() {
      const requests = await db
        .selectFrom('requests')
        .select(['state', ({ fn }) => fn.countAll().as('count')])
        .groupBy('state')
        .execute();
      const outgoing = await db
        .selectFrom('outgoing')
        .select(['state', ({ fn }) => fn.countAll().as('count')])
        .groupBy('state')
        .execute();
      return Object.fromEntries([
        ...requests.map(({ state, count }) => [`requests_${state}`, Number(count)] as const),
        ...outgoing.map(({ state, count }) => [`messages_${state}`, Number(count)] as const),
      ]);
    },

    close: () => db.destroy(),
  };
}
