import { cpSync, existsSync, mkdtempSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { closeDatabase, databaseFile, db, openDatabase, sqlite } from '@/db/client.server';
import { migrateDatabase } from '@/db/migrate.server';
import { testDatabase } from '../setup/test-database';

const temporary = () => mkdtempSync(join(tmpdir(), 'foldwright-migrations-'));

/** The migrations of the repository and one more. */
function migrationsWith(sql: string): string {
  const folder = join(temporary(), 'drizzle');
  cpSync('drizzle', folder, { recursive: true });
  const file = join(folder, 'meta/_journal.json');
  const journal = JSON.parse(readFileSync(file, 'utf8'));
  journal.entries.push({ idx: 999, version: '6', when: Date.UTC(2090, 0), tag: '0999_more', breakpoints: true });
  writeFileSync(file, JSON.stringify(journal));
  writeFileSync(join(folder, '0999_more.sql'), sql);
  return folder;
}

const ADD_PERSON =
  "INSERT INTO user (id, email, email_key) VALUES ('u', 'ada@quilletlane.example', 'ada@quilletlane.example')";
const ADD_ACCOUNT = "INSERT INTO account VALUES ('u', 'email', 'email', '1')";
const REBUILD_USER = [
  'PRAGMA foreign_keys=OFF;',
  'CREATE TABLE __new_user AS SELECT * FROM user;',
  'DROP TABLE user;',
  'ALTER TABLE __new_user RENAME TO user;',
  'CREATE UNIQUE INDEX user_id ON user (id);',
].join('--> statement-breakpoint\n');

describe('migrating', () => {
  it('does nothing the second time', () => {
    const database = openDatabase(':memory:');
    expect(migrateDatabase(database).applied).toBeGreaterThan(0);
    expect(migrateDatabase(database)).toEqual({ applied: 0, backup: null });
  });

  it('keeps the children of a table that a migration rebuilds', () => {
    const database = testDatabase();
    sqlite().exec(`${ADD_PERSON}; ${ADD_ACCOUNT}`);
    migrateDatabase(database, { folder: migrationsWith(REBUILD_USER) });
    expect(sqlite().prepare('SELECT count(*) FROM account').pluck().get()).toBe(1);
    expect(sqlite().pragma('foreign_keys', { simple: true })).toBe(1);
  });

  it('refuses a migration that leaves a reference to nothing', () => {
    const database = testDatabase();
    sqlite().exec(`${ADD_PERSON}; ${ADD_ACCOUNT}`);
    expect(() => migrateDatabase(database, { folder: migrationsWith('DELETE FROM user;') })).toThrow(
      'After migrating, 1 references lead nowhere (account → user). The copy made before: none.',
    );
  });

  it('copies a database that holds data before it changes it', () => {
    const folder = temporary();
    const database = openDatabase(join(folder, 'a.sqlite'));
    expect(migrateDatabase(database, { backups: join(folder, 'backups') }).backup).toBeNull();
    database.$client.exec(ADD_PERSON);
    const more = migrationsWith('CREATE TABLE more (id INTEGER);');
    const { applied, backup } = migrateDatabase(database, { folder: more, backups: join(folder, 'backups') });
    expect(applied).toBe(1);
    expect(readdirSync(join(folder, 'backups'))).toHaveLength(1);
    const copy = openDatabase(backup ?? '');
    expect(copy.$client.prepare('SELECT id FROM user').pluck().all()).toEqual(['u']);
    expect(copy.$client.prepare("SELECT 1 FROM sqlite_master WHERE name = 'more'").get()).toBeUndefined();
  });

  it('keeps what stands in each project as its first revision', () => {
    const before = join(temporary(), 'drizzle');
    cpSync('drizzle', before, { recursive: true });
    const file = join(before, 'meta/_journal.json');
    const journal = JSON.parse(readFileSync(file, 'utf8'));
    journal.entries = journal.entries.filter(({ idx }: { idx: number }) => idx < 5);
    writeFileSync(file, JSON.stringify(journal));
    const database = openDatabase(':memory:');
    migrateDatabase(database, { folder: before });
    database.$client.exec(ADD_PERSON);
    database.$client.exec(`
      INSERT INTO project (id, author_id, slug, title, minutes, pattern, sizing, write_up, revision, updated_at)
        VALUES ('p', 'u', 'box', 'A “box”', 20, '{"a":[1]}', '{"units":"in"}', '{"version":1}', 48, 1700000000000)`);
    migrateDatabase(database);
    const kept = database.$client.prepare('SELECT n, state, kind, saved_by, saved_at FROM revision').all();
    expect(kept).toEqual([{ n: 48, kind: 'saved', saved_by: 'u', saved_at: 1700000000000, state: expect.any(String) }]);
    expect(JSON.parse((kept[0] as { state: string }).state)).toEqual({
      title: 'A “box”',
      summary: '',
      minutes: 20,
      hero: null,
      pattern: { a: [1] },
      sizing: { units: 'in' },
      writeUp: { version: 1 },
    });
  });

  it('refuses data from a newer version', () => {
    const database = testDatabase();
    migrateDatabase(database, { folder: migrationsWith('CREATE TABLE more (id INTEGER);') });
    expect(() => migrateDatabase(database)).toThrow(
      'The data was written by a newer version of Foldwright: start that version, or restore an older copy.',
    );
  });
});

describe('the database', () => {
  it('opens at the first use and not before', () => {
    expect(existsSync(databaseFile())).toBe(false);
    migrateDatabase();
    expect(existsSync(databaseFile())).toBe(true);
    expect(sqlite().pragma('journal_mode', { simple: true })).toBe('wal');
    closeDatabase();
  });

  it('is not opened by a build', () => {
    process.env.FOLDWRIGHT_BUILDING = '1';
    expect(() => db.$client).toThrow('The build opened the database: a page must not be prerendered from it.');
    delete process.env.FOLDWRIGHT_BUILDING;
  });

  it('refuses to change or delete an edition', () => {
    testDatabase();
    sqlite().exec(ADD_PERSON);
    sqlite().exec(`
      INSERT INTO project (id, author_id, slug, title, pattern, sizing, write_up) VALUES ('p', 'u', 'box', 'Box', '{}', '{}', '{}');
      INSERT INTO edition (id, project_id, n, title, summary, pattern, sizing, write_up, published_by)
        VALUES ('e', 'p', 1, 'Box', '', '{}', '{}', '{}', 'u')`);
    expect(() => sqlite().exec("UPDATE edition SET title = 'Other'")).toThrow('an edition never changes');
    expect(() => sqlite().exec('DELETE FROM edition')).toThrow('an edition is never deleted');
  });

  it.each([
    ['queued', true],
    ['leased', true],
    ['in_flight', true],
    ['unknown', true],
    ['accepted', false],
    ['rejected', false],
    ['suppressed', false],
    ['cancelled', false],
    ['expired', false],
  ])('a delivery that is %s may change: %s', (state, may) => {
    testDatabase();
    sqlite().exec(ADD_PERSON);
    sqlite().exec(`
      INSERT INTO project (id, author_id, slug, title, pattern, sizing, write_up) VALUES ('p', 'u', 'box', 'Box', '{}', '{}', '{}');
      INSERT INTO mailing (id, project_id, edition, author_id, subject, greeting, excerpt) VALUES ('m', 'p', 1, 'u', '', '', '');
      INSERT INTO subscriber (id, email, email_key, state, leave_token) VALUES ('s', 'a@b.example', 'a@b.example', 'confirmed', 't');
      INSERT INTO delivery (mailing_id, subscriber_id, email_key, state, message_id) VALUES ('m', 's', 'a@b.example', '${state}', '1')`);
    const change = () => sqlite().exec("UPDATE delivery SET state = 'queued'");
    if (may) expect(change).not.toThrow();
    else expect(change).toThrow('a delivery that has ended never changes');
  });
});
