import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import Database from 'better-sqlite3';
import { Kysely, SqliteDialect } from 'kysely';
import type { Clock, Ids, Ledger } from '../answer/ports.ts';
import { queryLedger } from './query-ledger.ts';
import { migrateToLatest } from './migrations.ts';
import type { Tables } from './schema.ts';

/** Opens the ledger in a SQLite file, created on the spot; `:memory:` keeps it for this process alone. */
export async function openSqliteLedger(path: string, clock: Clock, ids: Ids): Promise<Ledger> {
  if (path !== ':memory:') mkdirSync(dirname(path), { recursive: true });
  const database = new Database(path);
  database.pragma('journal_mode = WAL');
  // A request is acknowledged only once it lies on the disk.
  database.pragma('synchronous = FULL');
  database.pragma('foreign_keys = ON');
  database.pragma('busy_timeout = 1500');
  const db = new Kysely<Tables>({ dialect: new SqliteDialect({ database }) });
  await migrateToLatest(db);
  return queryLedger(db, clock, ids);
}
