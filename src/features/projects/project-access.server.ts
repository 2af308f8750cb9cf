import { and, eq, isNull, or, sql, type SQL } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { coAuthors, projects } from '@/db/schema';
import type { Standing } from './project';

/** Who asks: an author sees own projects and those shared with them, an admin all. */
export interface Asker {
  readonly id: string;
  readonly role: 'admin' | 'author' | 'reader';
}
export type ProjectRow = typeof projects.$inferSelect;
export interface Opened {
  readonly row: ProjectRow;
  readonly standing: Standing;
}

/**
 * The one door to a project: null when there is none, when the asker has no part in it, or when it was deleted. `ownerOnly`
 * also keeps co-authors out: deleting, moving, withdrawing, inviting and mailings are the owner's.
 */
export function openRow(
  tx: Transaction | typeof db,
  id: string,
  asker: Asker,
  { deleted = false, ownerOnly = false } = {},
): Opened | null {
  if (asker.role === 'reader') return null;
  const row = tx.select().from(projects).where(eq(projects.id, id)).get();
  if (row === undefined || (row.deletedAt !== null && !deleted)) return null;
  const standing = standingOf(tx, row, asker);
  if (standing === null || (ownerOnly && standing === 'co-author')) return null;
  return { row, standing };
}

export const mayWorkOn = (id: string, asker: Asker): boolean => openRow(db, id, asker) !== null;
export const mayOwn = (id: string, asker: Asker): boolean => openRow(db, id, asker, { ownerOnly: true }) !== null;

/** The asker's own projects and those shared with them, none of them deleted. */
export function workedOnBy(asker: Asker): SQL | undefined {
  if (asker.role === 'reader') return sql`false`;
  const mine = or(
    eq(projects.authorId, asker.id),
    sql`exists (select 1 from ${coAuthors} where ${coAuthors.projectId} = ${projects.id} and ${coAuthors.userId} = ${asker.id} and ${coAuthors.state} = 'accepted')`,
  );
  return and(isNull(projects.deletedAt), asker.role === 'admin' ? undefined : mine);
}

function standingOf(tx: Transaction | typeof db, row: ProjectRow, asker: Asker): Standing | null {
  if (row.authorId === asker.id) return 'owner';
  if (asker.role === 'admin') return 'admin';
  const shared = tx
    .select({ id: coAuthors.id })
    .from(coAuthors)
    .where(and(eq(coAuthors.projectId, row.id), eq(coAuthors.userId, asker.id), eq(coAuthors.state, 'accepted')))
    .get();
  return shared === undefined ? null : 'co-author';
}
