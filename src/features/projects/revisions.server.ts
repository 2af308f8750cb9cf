import { and, desc, eq, inArray, lt } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { type projects, revisions, users } from '@/db/schema';
import type { ProjectState } from './project';
import { openRow, type Asker, type ProjectRow } from './project-access.server';
import { thinned } from './thinning';

export type RevisionKind = (typeof revisions.$inferSelect)['kind'];
export interface Revision {
  readonly n: number;
  readonly kind: RevisionKind;
  readonly savedBy: { readonly id: string; readonly name: string } | null;
  readonly savedAt: Date;
  readonly state: ProjectState;
}

const THIN_EVERY = 20;

/** Keeps a state under its number; of a number that is kept already only the kind is raised. */
export function keepRevision(
  tx: Transaction | typeof db,
  projectId: string,
  kept: {
    readonly n: number;
    readonly state: ProjectState;
    readonly by: string | null;
    readonly at: Date;
    readonly kind?: RevisionKind;
  },
): void {
  const { n, state, by, at, kind = 'saved' } = kept;
  const row = { projectId, n, state, kind, savedBy: by, savedAt: at };
  if (kind === 'saved') tx.insert(revisions).values(row).onConflictDoNothing().run();
  else
    tx.insert(revisions)
      .values(row)
      .onConflictDoUpdate({ target: [revisions.projectId, revisions.n], set: { kind } })
      .run();
  if (n % THIN_EVERY === 0) thin(tx, projectId, at.getTime());
}

function thin(tx: Transaction | typeof db, projectId: string, now: number): void {
  const marks = tx
    .select({ n: revisions.n, kind: revisions.kind, savedBy: revisions.savedBy, savedAt: revisions.savedAt })
    .from(revisions)
    .where(eq(revisions.projectId, projectId))
    .all()
    .map((mark) => ({ ...mark, savedAt: mark.savedAt.getTime() }));
  const gone = thinned(marks, now);
  if (gone.length > 0)
    tx.delete(revisions)
      .where(and(eq(revisions.projectId, projectId), inArray(revisions.n, [...gone])))
      .run();
}

/** What stands in the project now, kept as well when nothing of it was kept before. */
export function keepStanding(tx: Transaction | typeof db, row: ProjectRow, kind: RevisionKind = 'saved'): void {
  keepRevision(tx, row.id, { n: row.revision, state: stateOf(row), by: row.authorId, at: row.updatedAt, kind });
}

/** Kept revisions before number `before`, newest first; null when the project is not the asker's. */
export function listRevisions(
  projectId: string,
  asker: Asker,
  { limit, before }: { readonly limit: number; readonly before?: number },
): readonly Revision[] | null {
  if (openRow(db, projectId, asker) === null) return null;
  return select()
    .where(and(eq(revisions.projectId, projectId), before === undefined ? undefined : lt(revisions.n, before)))
    .orderBy(desc(revisions.n))
    .limit(limit)
    .all()
    .map(toRevision);
}

/** One kept revision; null when it was not kept or the project is not the asker's. */
export function getRevision(projectId: string, n: number, asker: Asker): Revision | null {
  if (openRow(db, projectId, asker) === null) return null;
  const row = select()
    .where(and(eq(revisions.projectId, projectId), eq(revisions.n, n)))
    .get();
  return row ? toRevision(row) : null;
}

const select = () =>
  db
    .select({ revision: revisions, name: users.name, userId: users.id })
    .from(revisions)
    .leftJoin(users, eq(revisions.savedBy, users.id));

const toRevision = ({
  revision: { n, kind, savedAt, state },
  name,
  userId,
}: NonNullable<ReturnType<ReturnType<typeof select>['get']>>): Revision => ({
  n,
  kind,
  savedBy: userId === null ? null : { id: userId, name: name ?? 'Unnamed' },
  savedAt,
  state,
});

export const stateOf = (row: typeof projects.$inferSelect): ProjectState => ({
  title: row.title,
  summary: row.summary,
  minutes: row.minutes,
  hero: row.heroUploadId,
  pattern: row.pattern,
  sizing: row.sizing,
  writeUp: row.writeUp,
});
