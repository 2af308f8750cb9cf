import { randomUUID } from 'node:crypto';
import { and, count, eq, inArray, isNull, ne, or } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { editions, projects, revisions, slugRedirects, uploads, users } from '@/db/schema';
import { compilePattern, usualSizing, type Pattern } from '@/engine';
import { firstWriteUp } from './first-write-up';
import { TITLE_LIMIT, type OpenProject, type ProjectState } from './project';
import { openRow, type Asker, type ProjectRow } from './project-access.server';
import { freeSlug, slugOf } from './project-slug';
import { stageOf } from './project-stage';
import { keepRevision, keepStanding, stateOf, type RevisionKind } from './revisions.server';

export type { Asker } from './project-access.server';
export interface Version {
  readonly revision: number;
  readonly updatedAt: number;
}
export type SaveOutcome =
  | ({ readonly ok: true } & Version)
  | ({ readonly ok: false; readonly code: 'changed meanwhile' } & Version)
  | { readonly ok: false; readonly code: 'not found' | 'picture unknown' };

/** A project that the asker may work on; null when there is none, also when it is someone else's or deleted. */
export function openProject(id: string, asker: Asker): OpenProject | null {
  const opened = openRow(db, id, asker);
  if (opened === null) return null;
  const { row, standing } = opened;
  const author = db.select({ id: users.id, name: users.name }).from(users).where(eq(users.id, row.authorId)).get();
  return {
    id: row.id,
    slug: row.slug,
    revision: row.revision,
    updatedAt: row.updatedAt.getTime(),
    author: { id: row.authorId, name: author?.name ?? 'Unnamed' },
    standing,
    stage: stageOf({ ...row, editions: editionsOf(db, id) }),
    withdrawn: row.withdrawnAt === null ? null : row.withdrawnReason,
    state: stateOf(row),
  };
}

/** A new project of the asker's from a pattern, with the pattern's usual size and order of making. */
export function createProject(
  pattern: Pattern,
  { title, asker }: { readonly title: string; readonly asker: Asker },
): { readonly id: string; readonly slug: string } {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(`The pattern ${pattern.slug} does not compile: it must not be offered.`);
  return insertProject(db, asker.id, {
    title,
    summary: '',
    minutes: null,
    hero: null,
    pattern,
    sizing: usualSizing(compiled.value),
    writeUp: firstWriteUp(pattern),
  });
}

/**
 * Saves a state over the revision that it was made from. When another save came between, nothing is written and the answer
 * tells that version. `setAside` is a state that gives way to this one: it is kept as a revision of its own before it.
 */
export function saveProject(
  id: string,
  asker: Asker,
  save: {
    readonly state: ProjectState;
    readonly revision: number;
    readonly kind?: RevisionKind;
    readonly setAside?: ProjectState;
  },
): SaveOutcome {
  return db.transaction(
    (tx): SaveOutcome => {
      const row = openRow(tx, id, asker)?.row;
      if (row === undefined) return { ok: false, code: 'not found' };
      if (row.revision !== save.revision) {
        return { ok: false, code: 'changed meanwhile', revision: row.revision, updatedAt: row.updatedAt.getTime() };
      }
      const { hero, ...state } = save.state;
      if (hero !== null && hero !== row.heroUploadId && !mayShow(tx, hero, { row, asker }))
        return { ok: false, code: 'picture unknown' };
      keepStanding(tx, row);
      const updatedAt = new Date();
      let revision = row.revision + 1;
      if (save.setAside !== undefined) {
        keepRevision(tx, id, { n: revision, state: save.setAside, by: asker.id, at: updatedAt, kind: 'set aside' });
        revision += 1;
      }
      tx.update(projects)
        .set({ ...state, heroUploadId: hero, revision, updatedAt })
        .where(and(eq(projects.id, id), eq(projects.revision, row.revision)))
        .run();
      keepRevision(tx, id, { n: revision, state: save.state, by: asker.id, at: updatedAt, kind: save.kind ?? 'saved' });
      return { ok: true, revision, updatedAt: updatedAt.getTime() };
    },
    { behavior: 'immediate' },
  );
}

/** Saves a kept revision once more as the newest; the one that stood there stays kept as well. */
export function restoreRevision(
  id: string,
  asker: Asker,
  { n, revision }: { readonly n: number; readonly revision: number },
): SaveOutcome {
  const kept = openRow(db, id, asker)
    ? db
        .select({ state: revisions.state })
        .from(revisions)
        .where(and(eq(revisions.projectId, id), eq(revisions.n, n)))
        .get()
    : undefined;
  if (kept === undefined) return { ok: false, code: 'not found' };
  return saveProject(id, asker, { state: kept.state, revision, kind: 'restored' });
}

/** A copy as a new draft of whoever asks: of what is stored, or of a state that was never stored. */
export function duplicateProject(
  id: string,
  asker: Asker,
  copy: { readonly state?: ProjectState; readonly tail?: string } = {},
): { readonly id: string; readonly title: string } | null {
  return db.transaction(
    (tx) => {
      const row = openRow(tx, id, asker)?.row;
      if (row === undefined) return null;
      const state = copy.state ?? stateOf(row);
      const title = tailed(state.title, copy.tail ?? '(copy)');
      const hero = state.hero !== null && mayShow(tx, state.hero, { row, asker }) ? state.hero : null;
      // A co-author's copy is theirs; an admin's stays with whoever the original belongs to.
      const owner = asker.role === 'admin' ? row.authorId : asker.id;
      return { id: insertProject(tx, owner, { ...state, hero, title }).id, title };
    },
    { behavior: 'immediate' },
  );
}

/** Takes a project out of the workroom and off the site; `restoreProject` brings it back as it was. */
export function deleteProject(id: string, asker: Asker): boolean {
  if (openRow(db, id, asker, { ownerOnly: true }) === null) return false;
  return (
    db
      .update(projects)
      .set({ deletedAt: new Date() })
      .where(and(eq(projects.id, id), isNull(projects.deletedAt)))
      .run().changes > 0
  );
}

/** Brings a deleted project back. True also when it was not deleted: an undo pressed twice does no harm. */
export function restoreProject(id: string, asker: Asker): boolean {
  if (openRow(db, id, asker, { deleted: true, ownerOnly: true }) === null) return false;
  db.update(projects).set({ deletedAt: null }).where(eq(projects.id, id)).run();
  return true;
}

export type MoveOutcome =
  | { readonly ok: true; readonly slug: string }
  | { readonly ok: false; readonly code: 'not found' | 'taken' };

/** Gives a project another address. What was published at the old one is found at the new one from then on. */
export function moveProject(id: string, asker: Asker, slug: string): MoveOutcome {
  return db.transaction(
    (tx): MoveOutcome => {
      const row = openRow(tx, id, asker, { ownerOnly: true })?.row;
      if (row === undefined) return { ok: false, code: 'not found' };
      if (row.slug === slug) return { ok: true, slug };
      if (slugTaken(tx, slug, id)) return { ok: false, code: 'taken' };
      tx.delete(slugRedirects).where(eq(slugRedirects.slug, slug)).run();
      if (editionsOf(tx, id) > 0) tx.insert(slugRedirects).values({ slug: row.slug, projectId: id }).run();
      tx.update(projects).set({ slug }).where(eq(projects.id, id)).run();
      return { ok: true, slug };
    },
    { behavior: 'immediate' },
  );
}

function insertProject(
  tx: Transaction | typeof db,
  authorId: string,
  { hero, ...state }: ProjectState,
): { readonly id: string; readonly slug: string } {
  const id = randomUUID();
  const slug = freeSlug(slugOf(state.title), (candidate) => slugTaken(tx, candidate));
  const now = new Date();
  tx.insert(projects)
    .values({ id, authorId, slug, ...state, heroUploadId: hero, createdAt: now, updatedAt: now })
    .run();
  keepRevision(tx, id, { n: 1, state: { hero, ...state }, by: authorId, at: now });
  return { id, slug };
}

/** Addresses that other projects have, and those that they had and readers may still hold. */
const slugTaken = (tx: Transaction | typeof db, slug: string, forProject = ''): boolean =>
  tx.select({ id: projects.id }).from(projects).where(eq(projects.slug, slug)).get() !== undefined ||
  tx
    .select({ slug: slugRedirects.slug })
    .from(slugRedirects)
    .where(and(eq(slugRedirects.slug, slug), ne(slugRedirects.projectId, forProject)))
    .get() !== undefined;

const editionsOf = (tx: Transaction | typeof db, projectId: string): number =>
  tx.select({ n: count() }).from(editions).where(eq(editions.projectId, projectId)).get()?.n ?? 0;

/** A picture of the owner's or the asker's own, or one that was put into this project by whoever may. */
const mayShow = (
  tx: Transaction | typeof db,
  id: string,
  { row, asker }: { readonly row: ProjectRow; readonly asker: Asker },
): boolean =>
  tx
    .select({ id: uploads.id })
    .from(uploads)
    .where(
      and(eq(uploads.id, id), or(inArray(uploads.ownerId, [row.authorId, asker.id]), eq(uploads.projectId, row.id))),
    )
    .get() !== undefined;

/** "Seed box (copy)"; a title at its limit loses letters, not the tail. */
const tailed = (title: string, tail: string): string =>
  `${title.replace(/ \((?:copy|from this tab)\)$/u, '').slice(0, TITLE_LIMIT - 1 - tail.length)} ${tail}`.trim();
