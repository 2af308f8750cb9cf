import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { and, count, desc, eq, isNull } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { draftLinks, projects } from '@/db/schema';
import { openRow, type Asker, type ProjectRow } from './project-access.server';
import type { DraftLink } from './sharing';

const MOST_OPEN = 20;
const TOKEN = /^[\w-]{43}$/;
const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex');

/** The links of a project, newest first, without what stands in them. */
export function listDraftLinks(projectId: string, asker: Asker): readonly DraftLink[] {
  if (openRow(db, projectId, asker) === null) return [];
  return db
    .select()
    .from(draftLinks)
    .where(eq(draftLinks.projectId, projectId))
    .orderBy(desc(draftLinks.createdAt))
    .all()
    .map(({ id, label, createdAt, revokedAt }) => ({
      id,
      label,
      createdAt: createdAt.getTime(),
      revokedAt: revokedAt?.getTime() ?? null,
    }));
}

/** A new link. Only its hash is kept, so `token` is told this once; null when there are too many or it is not theirs. */
export function makeDraftLink(projectId: string, asker: Asker, label: string): { readonly token: string } | null {
  if (openRow(db, projectId, asker) === null) return null;
  const open = and(eq(draftLinks.projectId, projectId), isNull(draftLinks.revokedAt));
  if ((db.select({ n: count() }).from(draftLinks).where(open).get()?.n ?? 0) >= MOST_OPEN) return null;
  const token = randomBytes(32).toString('base64url');
  db.insert(draftLinks)
    .values({ id: randomUUID(), projectId, tokenHash: hashOf(token), label })
    .run();
  return { token };
}

/** Makes a link stop working, at once and for good. True also when it had stopped before. */
export function revokeDraftLink(projectId: string, id: string, asker: Asker): boolean {
  if (openRow(db, projectId, asker) === null) return false;
  const which = and(eq(draftLinks.projectId, projectId), eq(draftLinks.id, id));
  if (db.select({ id: draftLinks.id }).from(draftLinks).where(which).get() === undefined) return false;
  db.update(draftLinks)
    .set({ revokedAt: new Date() })
    .where(and(which, isNull(draftLinks.revokedAt)))
    .run();
  return true;
}

/** The project behind a link that works; null for every other link, and when the project was deleted. */
export function projectBehindLink(token: string): ProjectRow | null {
  if (!TOKEN.test(token)) return null;
  const row = db
    .select({ project: projects })
    .from(draftLinks)
    .innerJoin(projects, eq(draftLinks.projectId, projects.id))
    .where(and(eq(draftLinks.tokenHash, hashOf(token)), isNull(draftLinks.revokedAt), isNull(projects.deletedAt)))
    .get();
  return row?.project ?? null;
}
