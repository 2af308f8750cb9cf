import { existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import { readMigrationFiles } from 'drizzle-orm/migrator';
import { config } from '@/config.server';
import { db, type Database } from './client.server';

const KEPT_BACKUPS = 5;
const TABLE = '__drizzle_migrations';

export interface Migrated {
  /** How many migrations were applied. */
  readonly applied: number;
  /** The copy made before, when there was something to lose. */
  readonly backup: string | null;
}

/**
 * Brings the database to the newest schema; calling it again does nothing.
 * A database that holds data is copied to DATA_DIR/backups first; the newest five copies are kept.
 * Throws when the data comes from a newer version, or when a migration leaves a broken reference.
 */
export function migrateDatabase(
  database: Database = db,
  { folder = join(config.root, 'drizzle'), backups = join(config.dataDir, 'backups') as string | null } = {},
): Migrated {
  const client = database.$client;
  const known = readMigrationFiles({ migrationsFolder: folder });
  const done = appliedMigrations(database);
  const newest = known.at(-1)?.folderMillis ?? 0;
  if (done.some((at) => at > newest)) {
    throw new Error(
      'The data was written by a newer version of Foldwright: start that version, or restore an older copy.',
    );
  }
  const pending = known.filter((migration) => migration.folderMillis > (done.at(-1) ?? 0)).length;
  if (pending === 0) return { applied: 0, backup: null };

  const backup = done.length > 0 && backups && !client.memory ? copyDatabase(database, backups) : null;
  // Inside the migrator's transaction this pragma does nothing, and a rebuilt table would take its children with it.
  client.pragma('foreign_keys = OFF');
  try {
    migrate(database, { migrationsFolder: folder });
  } finally {
    client.pragma('foreign_keys = ON');
  }
  const broken = client.pragma('foreign_key_check') as { table: string; parent: string }[];
  if (broken.length > 0) {
    const first = `${broken[0]?.table} → ${broken[0]?.parent}`;
    throw new Error(
      `After migrating, ${broken.length} references lead nowhere (${first}). The copy made before: ${backup ?? 'none'}.`,
    );
  }
  return { applied: pending, backup };
}

/** When each applied migration was made, oldest first. */
function appliedMigrations({ $client }: Database): number[] {
  const table = $client.prepare("SELECT 1 FROM sqlite_master WHERE type = 'table' AND name = ?").get(TABLE);
  if (!table) return [];
  return $client.prepare(`SELECT created_at FROM ${TABLE} ORDER BY created_at`).pluck().all().map(Number);
}

function copyDatabase({ $client }: Database, folder: string): string {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, `before-migration-${new Date().toISOString().replace(/[:.]/g, '-')}.sqlite`);
  if (existsSync(file)) rmSync(file);
  $client.prepare('VACUUM INTO ?').run(file);
  const copies = readdirSync(folder)
    .filter((name) => name.startsWith('before-migration-'))
    .sort();
  for (const name of copies.slice(0, -KEPT_BACKUPS)) rmSync(join(folder, name));
  return file;
}
