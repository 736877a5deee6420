import type { Selectable } from 'kysely';
import type { AskedRequest, OutgoingMessage, StoredCheck, StoredRequest } from '../answer/ports.ts';
import type { ChecksTable, OutgoingTable, RequestsTable } from './schema.ts';

/** From rows to what the house works with. */

export function requestOf(row: Selectable<RequestsTable>): StoredRequest {
  return {
    id: row.id,
    // Written by storeRequest alone, from a value of this type.
    request: JSON.parse(row.body) as AskedRequest,
    responseUrl: row.response_url,
    receivedAt: row.received_at,
  };
}

export function checkOf(row: Selectable<ChecksTable>): StoredCheck {
  return {
    id: row.id,
    teamId: row.team_id,
    channelId: row.channel_id,
    number: row.number,
    line: row.line,
    canonical: row.canonical,
    kind: row.kind,
    askedBy: row.asked_by,
    createdAt: row.created_at,
  };
}

export function outgoingOf(
  row: Selectable<OutgoingTable> & { readonly response_url: string | null; readonly root_ts: string | null },
): OutgoingMessage {
  return {
    id: row.id,
    op: row.op,
    requestId: row.request_id,
    teamId: row.team_id,
    channelId: row.channel_id,
    userId: row.user_id,
    kind: row.kind,
    threadTs: row.thread_ts ?? row.root_ts,
    under: row.under,
    replaceOriginal: row.replace_original === 1,
    responseUrl: row.response_url,
    text: row.text,
    blocks: row.blocks,
    state: row.state,
    attempts: row.attempts,
    dueAt: row.due_at,
    startedAt: row.started_at,
  };
}
