import type { Generated } from 'kysely';

/** The rows as they lie in the database. Every table that belongs to a workspace says which. */

export interface RequestsTable {
  id: string;
  /** Order of arrival. */
  arrival: Generated<number>;
  team_id: string;
  body: string;
  response_url: string | null;
  state: 'open' | 'answered' | 'failed';
  failure: string | null;
  received_at: number;
}

export interface RequestKeysTable {
  key: string;
  request_id: string;
}

export interface ChecksTable {
  id: string;
  team_id: string;
  channel_id: string;
  number: number | null;
  line: string;
  canonical: string;
  kind: string;
  asked_by: string;
  request_id: string;
  created_at: number;
}

export interface OutgoingTable {
  id: Generated<number>;
  op: string;
  request_id: string;
  team_id: string;
  channel_id: string;
  user_id: string;
  kind: 'post' | 'ephemeral' | 'response';
  thread_ts: string | null;
  under: number | null;
  replace_original: number;
  text: string;
  blocks: string;
  state: 'pending' | 'sending' | 'ambiguous' | 'sent' | 'failed';
  attempts: number;
  due_at: number;
  started_at: number | null;
  posted_ts: string | null;
  failure: string | null;
}

export interface OffersTakenTable {
  request_id: string;
  taken_at: number;
  /** The request that took it. */
  taken_by: string | null;
}

export interface Tables {
  requests: RequestsTable;
  request_keys: RequestKeysTable;
  checks: ChecksTable;
  outgoing: OutgoingTable;
  offers_taken: OffersTakenTable;
}
