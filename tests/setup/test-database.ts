import { afterEach } from 'vitest';
import { openDatabase, useDatabase, type Database } from '@/db/client.server';
import { migrateDatabase } from '@/db/migrate.server';

let migrated: Buffer | undefined;

/**
 * A migrated, empty database in memory that `db` stands for until the end of the test.
 * Called once in a test or a `beforeEach`; every call gives a fresh one.
 */
export function testDatabase(): Database {
  if (!migrated) {
    const template = openDatabase(':memory:');
    migrateDatabase(template);
    migrated = template.$client.serialize();
    template.$client.close();
  }
  const database = openDatabase(migrated);
  useDatabase(database);
  return database;
}

afterEach(() => {
  useDatabase(undefined)?.$client.close();
});
