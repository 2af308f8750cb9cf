import { randomUUID } from 'node:crypto';
import { and, count, eq, inArray, isNull } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { editions, projects, uploads, users } from '@/db/schema';
import { compilePattern, usualSizing, type Pattern } from '@/engine';
import { firstWriteUp } from './first-write-up';
import { TITLE_LIMIT, type OpenProject, type ProjectState } from './project';
import { freeSlug, slugOf } from './project-slug';
import { stageOf } from './project-stage';

/** Who asks: an author sees own projects alone, an admin all. */
export interface Asker {
  readonly id: string;
  readonly role: 'admin' | 'author' | 'reader';
}
export interface Version {
  readonly revision: number;
  readonly updatedAt: number;
}
export type SaveOutcome =
  | ({ readonly ok: true; readonly kept: { readonly id: string; readonly title: string } | null } & Version)
  | ({ readonly ok: false; readonly code: 'changed meanwhile' } & Version)
  | { readonly ok: false; readonly code: 'not found' | 'picture unknown' };

type Row = typeof projects.$inferSelect;

/** A project that the asker may work on; null when there is none, also when it is someone else's or deleted. */
export function openProject(id: string, asker: Asker): OpenProject | null {
  const row = mine(db, id, asker);
  if (row === null) return null;
  const author = db.select({ id: users.id, name: users.name }).from(users).where(eq(users.id, row.authorId)).get();
  return {
    id: row.id,
    slug: row.slug,
    revision: row.revision,
    updatedAt: row.updatedAt.getTime(),
    author: { id: row.authorId, name: author?.name ?? 'Unnamed' },
    stage: stageOf({ ...row, editions: editionsOf(db, id) }),
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
 * tells that version. `keepOther` first puts what stands there into a new draft, so that the save can be undone by hand.
 */
export function saveProject(
  id: string,
  asker: Asker,
  save: { readonly state: ProjectState; readonly revision: number; readonly keepOther?: boolean },
): SaveOutcome {
  return db.transaction(
    (tx): SaveOutcome => {
      const row = mine(tx, id, asker);
      if (row === null) return { ok: false, code: 'not found' };
      if (row.revision !== save.revision) {
        return { ok: false, code: 'changed meanwhile', revision: row.revision, updatedAt: row.updatedAt.getTime() };
      }
      const { hero, ...state } = save.state;
      if (hero !== null && hero !== row.heroUploadId && !ownsUpload(tx, hero, [row.authorId, asker.id]))
        return { ok: false, code: 'picture unknown' };
      let kept: { id: string; title: string } | null = null;
      if (save.keepOther === true) {
        const title = tailed(row.title, '(from the other tab)');
        kept = { id: insertProject(tx, row.authorId, { ...stateOf(row), title }).id, title };
      }
      const updatedAt = new Date();
      tx.update(projects)
        .set({ ...state, heroUploadId: hero, revision: row.revision + 1, updatedAt })
        .where(and(eq(projects.id, id), eq(projects.revision, row.revision)))
        .run();
      return { ok: true, revision: row.revision + 1, updatedAt: updatedAt.getTime(), kept };
    },
    { behavior: 'immediate' },
  );
}

/** A copy as a new draft of the same author: of what is stored, or of a state that was never stored. */
export function duplicateProject(
  id: string,
  asker: Asker,
  copy: { readonly state?: ProjectState; readonly tail?: string } = {},
): { readonly id: string; readonly title: string } | null {
  return db.transaction(
    (tx) => {
      const row = mine(tx, id, asker);
      if (row === null) return null;
      const state = copy.state ?? stateOf(row);
      const title = tailed(state.title, copy.tail ?? '(copy)');
      const hero = state.hero !== null && ownsUpload(tx, state.hero, [row.authorId, asker.id]) ? state.hero : null;
      return { id: insertProject(tx, row.authorId, { ...state, hero, title }).id, title };
    },
    { behavior: 'immediate' },
  );
}

/** Takes a project out of the workroom and off the site; `restoreProject` brings it back as it was. */
export function deleteProject(id: string, asker: Asker): boolean {
  if (mine(db, id, asker) === null) return false;
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
  if (mine(db, id, asker, { deleted: true }) === null) return false;
  db.update(projects).set({ deletedAt: null }).where(eq(projects.id, id)).run();
  return true;
}

export type MoveOutcome =
  | { readonly ok: true; readonly slug: string }
  | { readonly ok: false; readonly code: 'not found' | 'taken' | 'published' };

/** Gives a project another address. One that was published keeps its own: links to it are out. */
export function moveProject(id: string, asker: Asker, slug: string): MoveOutcome {
  return db.transaction(
    (tx): MoveOutcome => {
      const row = mine(tx, id, asker);
      if (row === null) return { ok: false, code: 'not found' };
      if (row.slug === slug) return { ok: true, slug };
      if (editionsOf(tx, id) > 0) return { ok: false, code: 'published' };
      if (slugTaken(tx, slug)) return { ok: false, code: 'taken' };
      tx.update(projects).set({ slug }).where(eq(projects.id, id)).run();
      return { ok: true, slug };
    },
    { behavior: 'immediate' },
  );
}

function mine(tx: Transaction | typeof db, id: string, asker: Asker, { deleted = false } = {}): Row | null {
  const row = tx.select().from(projects).where(eq(projects.id, id)).get();
  if (row === undefined || asker.role === 'reader') return null;
  if (asker.role !== 'admin' && row.authorId !== asker.id) return null;
  return row.deletedAt !== null && !deleted ? null : row;
}

const stateOf = (row: Row): ProjectState => ({
  title: row.title,
  summary: row.summary,
  minutes: row.minutes,
  hero: row.heroUploadId,
  pattern: row.pattern,
  sizing: row.sizing,
  writeUp: row.writeUp,
});

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
  return { id, slug };
}

const slugTaken = (tx: Transaction | typeof db, slug: string): boolean =>
  tx.select({ id: projects.id }).from(projects).where(eq(projects.slug, slug)).get() !== undefined;

const editionsOf = (tx: Transaction | typeof db, projectId: string): number =>
  tx.select({ n: count() }).from(editions).where(eq(editions.projectId, projectId)).get()?.n ?? 0;

const ownsUpload = (tx: Transaction | typeof db, id: string, owners: readonly string[]): boolean =>
  tx
    .select({ id: uploads.id })
    .from(uploads)
    .where(and(eq(uploads.id, id), inArray(uploads.ownerId, [...owners])))
    .get() !== undefined;

/** "Seed box (copy)"; a title at its limit loses letters, not the tail. */
const tailed = (title: string, tail: string): string =>
  `${title.replace(/ \((?:copy|from the other tab|from this tab)\)$/u, '').slice(0, TITLE_LIMIT - 1 - tail.length)} ${tail}`.trim();
