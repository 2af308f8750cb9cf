import { mkdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import Sqlite from 'better-sqlite3';
import { drizzle, type BetterSQLite3Database } from 'drizzle-orm/better-sqlite3';
import { config } from '@/config.server';
import * as schema from './schema';

export type Database = BetterSQLite3Database<typeof schema> & { $client: Sqlite.Database };
/** What a transaction's callback is given; every query that may run inside one takes this. */
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

/** One connection a process, also when the same module is loaded twice (the built site beside the mail worker). */
const HOLDER = Symbol.for('foldwright.database');
const holder = globalThis as typeof globalThis & { [HOLDER]?: Database };

export const databaseFile = () => join(config.dataDir, 'foldwright.sqlite');

/** Opens a database file, or `:memory:`, or a serialized database. Does not migrate. */
export function openDatabase(file: string | Buffer): Database {
  if (typeof file === 'string' && file !== ':memory:') {
    if (process.env.FOLDWRIGHT_BUILDING)
      throw new Error('The build opened the database: a page must not be prerendered from it.');
    mkdirSync(dirname(file), { recursive: true });
  }
  const client = new Sqlite(file);
  client.pragma('journal_mode = WAL');
  client.pragma('synchronous = NORMAL');
  client.pragma('foreign_keys = ON');
  client.pragma('busy_timeout = 5000');
  return drizzle(client, { schema });
}

const current = (): Database => (holder[HOLDER] ??= openDatabase(databaseFile()));

/** Puts another database in place of the usual one, for tests. Gives back the one that was there. */
export function useDatabase(database: Database | undefined): Database | undefined {
  const before = holder[HOLDER];
  holder[HOLDER] = database;
  return before;
}

export function closeDatabase(): void {
  holder[HOLDER]?.$client.close();
  holder[HOLDER] = undefined;
}

/** The connection itself, for pragmas, FTS and `.immediate()` transactions. */
export const sqlite = (): Sqlite.Database => current().$client;

/**
 * The database, opened at its first use. Transactions are synchronous: a callback that awaits throws.
 * One that reads before it writes says so: `db.transaction(work, { behavior: 'immediate' })`.
 */
export const db: Database = new Proxy({} as Database, {
  get(_, key) {
    const database = current();
    const value: unknown = Reflect.get(database, key);
    return typeof value === 'function' ? value.bind(database) : value;
  },
});
