import { Migrator } from 'kysely';
import type { Kysely, Migration } from 'kysely';
import type { Tables } from './schema.ts';

const first: Migration = {
  async up(db: Kysely<unknown>) {
    await db.schema
      .createTable('requests')
      .addColumn('arrival', 'integer', (column) => column.primaryKey().autoIncrement())
      .addColumn('id', 'text', (column) => column.notNull().unique())
      .addColumn('team_id', 'text', (column) => column.notNull())
      .addColumn('body', 'text', (column) => column.notNull())
      .addColumn('response_url', 'text')
      .addColumn('state', 'text', (column) => column.notNull())
      .addColumn('failure', 'text')
      .addColumn('received_at', 'bigint', (column) => column.notNull())
      .execute();
    await db.schema.createIndex('requests_by_state').on('requests').columns(['state', 'arrival']).execute();
    await db.schema
      .createTable('request_keys')
      .addColumn('key', 'text', (column) => column.primaryKey())
      .addColumn('request_id', 'text', (column) => column.notNull().references('requests.id'))
      .execute();
    await db.schema
      .createTable('checks')
      .addColumn('id', 'text', (column) => column.primaryKey())
      .addColumn('team_id', 'text', (column) => column.notNull())
      .addColumn('channel_id', 'text', (column) => column.notNull())
      .addColumn('number', 'integer')
      .addColumn('line', 'text', (column) => column.notNull())
      .addColumn('canonical', 'text', (column) => column.notNull())
      .addColumn('kind', 'text', (column) => column.notNull())
      .addColumn('asked_by', 'text', (column) => column.notNull())
      .addColumn('request_id', 'text', (column) => column.notNull().references('requests.id'))
      .addColumn('created_at', 'bigint', (column) => column.notNull())
      .addUniqueConstraint('checks_number_in_channel', ['team_id', 'channel_id', 'number'])
      .execute();
    await db.schema
      .createTable('outgoing')
      .addColumn('id', 'integer', (column) => column.primaryKey().autoIncrement())
      .addColumn('op', 'text', (column) => column.notNull().unique())
      .addColumn('request_id', 'text', (column) => column.notNull().references('requests.id'))
      .addColumn('team_id', 'text', (column) => column.notNull())
      .addColumn('channel_id', 'text', (column) => column.notNull())
      .addColumn('user_id', 'text', (column) => column.notNull())
      .addColumn('kind', 'text', (column) => column.notNull())
      .addColumn('thread_ts', 'text')
      .addColumn('under', 'integer', (column) => column.references('outgoing.id'))
      .addColumn('replace_original', 'integer', (column) => column.notNull())
      .addColumn('text', 'text', (column) => column.notNull())
      .addColumn('blocks', 'text', (column) => column.notNull())
      .addColumn('state', 'text', (column) => column.notNull())
      .addColumn('attempts', 'integer', (column) => column.notNull())
      .addColumn('due_at', 'bigint', (column) => column.notNull())
      .addColumn('started_at', 'bigint')
      .addColumn('posted_ts', 'text')
      .addColumn('failure', 'text')
      .execute();
    await db.schema.createIndex('outgoing_by_state').on('outgoing').columns(['state', 'id']).execute();
    await db.schema
      .createTable('offers_taken')
      .addColumn('request_id', 'text', (column) => column.primaryKey().references('requests.id'))
      .addColumn('taken_at', 'bigint', (column) => column.notNull())
      .execute();
  },
};

/** An offer knows who took it, so that a request that is worked on again after a stop finds its own offer. */
const offerTaker: Migration = {
  async up(db: Kysely<unknown>) {
    await db.schema.alterTable('offers_taken').addColumn('taken_by', 'text').execute();
  },
};

/** Every change of the tables, oldest first. A migration that has landed is never edited. */
const migrations: Readonly<Record<string, Migration>> = {
  '0001-first': first,
  '0002-offer-taker': offerTaker,
};

/** Brings a database to the newest tables. */
export async function migrateToLatest(db: Kysely<Tables>): Promise<void> {
  const migrator = new Migrator({
    db,
    provider: { getMigrations: () => Promise.resolve({ ...migrations }) },
  });
  const { error } = await migrator.migrateToLatest();
  if (error !== undefined) throw new Error('the database could not be brought up to date', { cause: error });
}
