import { and, count, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { editions, projects, slugRedirects, users } from '@/db/schema';
import { openRow, type Asker } from '@/features/projects/project-access.server';

export const REASON_LIMIT = 500;

export interface Withdrawn {
  readonly title: string;
  readonly author: string;
  readonly reason: string;
  readonly at: Date;
}

/** Takes a published project back from readers, with a reason for its page. False: nothing of the asker's is published. */
export function withdraw(projectId: string, asker: Asker, reason: string, now = Date.now()): boolean {
  if (openRow(db, projectId, asker, { ownerOnly: true }) === null) return false;
  const published = db.select({ n: count() }).from(editions).where(eq(editions.projectId, projectId)).get();
  if ((published?.n ?? 0) === 0) return false;
  db.update(projects)
    .set({ withdrawnAt: new Date(now), withdrawnReason: reason })
    .where(eq(projects.id, projectId))
    .run();
  return true;
}

/** Shows the newest edition to readers again, as it was. True also when it was not withdrawn. */
export function putBack(projectId: string, asker: Asker): boolean {
  if (openRow(db, projectId, asker, { ownerOnly: true }) === null) return false;
  db.update(projects).set({ withdrawnAt: null, withdrawnReason: '' }).where(eq(projects.id, projectId)).run();
  return true;
}

/** What the page of a withdrawn project says; null for every other address. */
export function withdrawnAt(slug: string): Withdrawn | null {
  const row = db
    .select({ title: editions.title, reason: projects.withdrawnReason, at: projects.withdrawnAt, name: users.name })
    .from(projects)
    .innerJoin(users, eq(projects.authorId, users.id))
    .innerJoin(editions, eq(editions.projectId, projects.id))
    .where(and(eq(projects.slug, slug), isNull(projects.deletedAt), isNotNull(projects.withdrawnAt)))
    .orderBy(desc(editions.n))
    .limit(1)
    .get();
  return row?.at ? { title: row.title, author: row.name ?? 'Unnamed', reason: row.reason, at: row.at } : null;
}

/** Where a project that readers knew at this address is now; null when it never was here. */
export function movedTo(slug: string): string | null {
  const row = db
    .select({ slug: projects.slug })
    .from(slugRedirects)
    .innerJoin(projects, eq(slugRedirects.projectId, projects.id))
    .where(and(eq(slugRedirects.slug, slug), isNull(projects.deletedAt)))
    .get();
  return row?.slug ?? null;
}

/**
 * What stands at an address below /projects instead of a project's page: the new address of one that moved, with the same
 * rest and query, or the page that says that it was withdrawn. Null: the address itself knows.
 */
export function insteadOf({ pathname, search }: URL): { readonly moved: string } | { readonly shown: string } | null {
  const [, slug = '', rest = ''] = /^\/projects\/([a-z0-9-]+)(\/.*)?$/.exec(pathname) ?? [];
  if (slug === '') return null;
  const now = movedTo(slug);
  if (now !== null) return { moved: `/projects/${now}${rest}${search}` };
  return (rest === '' || rest === '/') && withdrawnAt(slug) !== null ? { shown: `/withdrawn/${slug}` } : null;
}
