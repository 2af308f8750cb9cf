import { randomUUID } from 'node:crypto';
import { desc, eq, inArray } from 'drizzle-orm';
import { db, type Transaction } from '@/db/client.server';
import { editions, projects, schedules, uploads, users } from '@/db/schema';
import type { ProjectState } from '@/features/projects/project';
import { openRow, type ProjectRow } from '@/features/projects/project-access.server';
import { proofList, type ProofItem } from '@/features/projects/proof';
import { keepStanding, stateOf } from '@/features/projects/revisions.server';
import { uploadsIn } from './uploads-in';

export interface PublishRequest {
  /** Who publishes: the project's owner, a co-author or an admin. */
  readonly by: string;
  /** The correction note: what changed and why it matters to someone who already cut. Needed from edition 2 on. */
  readonly note?: string;
  /** The revision that the author saw; another one means that the project was saved meanwhile. */
  readonly revision: number;
}
export type PublishRefusal =
  | { readonly code: 'not found' }
  | { readonly code: 'changed meanwhile'; readonly revision: number }
  | { readonly code: 'proof blocks'; readonly items: readonly ProofItem[] }
  | { readonly code: 'picture missing'; readonly uploads: readonly string[] }
  | { readonly code: 'note needed' }
  | { readonly code: 'note too long'; readonly limit: number }
  | { readonly code: 'nothing changed'; readonly n: number };
export type PublishOutcome =
  | { readonly ok: true; readonly edition: { readonly id: string; readonly n: number; readonly slug: string } }
  | { readonly ok: false; readonly refusal: PublishRefusal; readonly sentence: string };

export const NOTE_LIMIT = 2000;

/**
 * Freezes the project as it stands into its next edition: pattern, the author's sizing, write-up and pictures. One
 * immediate transaction, so that nothing can be saved between the check and the copy. Later edits never reach it. What was
 * withdrawn is readers' again; what was to be published later is not, since this came first.
 */
export function publishEdition(projectId: string, request: PublishRequest, now = Date.now()): PublishOutcome {
  return db.transaction(
    (tx): PublishOutcome => {
      const project = projectOf(tx, projectId, request.by);
      if (project === null) return refuse({ code: 'not found' });
      if (project.revision !== request.revision)
        return refuse({ code: 'changed meanwhile', revision: project.revision });
      const outcome = freeze(tx, { project, state: stateOf(project), ...request }, now);
      if (outcome.ok) {
        keepStanding(tx, project, 'published');
        tx.delete(schedules).where(eq(schedules.projectId, projectId)).run();
      }
      return outcome;
    },
    { behavior: 'immediate' },
  );
}

/** The project, if `by` may publish it now: rights are looked at when it is published, not only when it was planned. */
export function projectOf(tx: Transaction, projectId: string, by: string): ProjectRow | null {
  const person = tx.select().from(users).where(eq(users.id, by)).get();
  return person && !person.disabledAt ? (openRow(tx, projectId, person)?.row ?? null) : null;
}

/** What `freeze` would refuse, without making anything: asked when an edition is planned for later. */
export function hindranceTo(
  tx: Transaction,
  { project, state, revision, note = '' }: Omit<Freezing, 'by'>,
): PublishRefusal | null {
  const items = proofList(state).filter((item) => item.blocking);
  if (items.length > 0) return { code: 'proof blocks', items };
  const missing = picturesMissing(tx, state);
  if (missing.length > 0) return { code: 'picture missing', uploads: missing };
  const n = nextEdition(tx, project.id);
  if (n > 1 && project.publishedRevision === revision) return { code: 'nothing changed', n: n - 1 };
  if (n > 1 && note.trim() === '') return { code: 'note needed' };
  return note.trim().length > NOTE_LIMIT ? { code: 'note too long', limit: NOTE_LIMIT } : null;
}

interface Freezing extends PublishRequest {
  readonly project: ProjectRow;
  /** What the edition holds: `revision` of the project. */
  readonly state: ProjectState;
}

export function freeze(tx: Transaction, { project, state, revision, by, note }: Freezing, now: number): PublishOutcome {
  const hindrance = hindranceTo(tx, { project, state, revision, ...(note === undefined ? {} : { note }) });
  if (hindrance) return refuse(hindrance);
  const n = nextEdition(tx, project.id);
  const id = randomUUID();
  const { hero, ...frozen } = state;
  tx.insert(editions)
    .values({
      id,
      projectId: project.id,
      n,
      ...frozen,
      heroUploadId: hero,
      correctionNote: n === 1 ? '' : (note ?? '').trim(),
      publishedBy: by,
      publishedAt: new Date(now),
    })
    .run();
  tx.update(projects)
    .set({ publishedRevision: revision, withdrawnAt: null, withdrawnReason: '' })
    .where(eq(projects.id, project.id))
    .run();
  return { ok: true, edition: { id, n, slug: project.slug } };
}

function picturesMissing(tx: Transaction, { writeUp, hero }: ProjectState): readonly string[] {
  const pictures = uploadsIn(writeUp, hero);
  if (pictures.length === 0) return [];
  const kept = tx
    .select({ id: uploads.id })
    .from(uploads)
    .where(inArray(uploads.id, [...pictures]))
    .all();
  return pictures.filter((id) => !kept.some((upload) => upload.id === id));
}

function nextEdition(tx: Transaction, projectId: string): number {
  const newest = tx
    .select({ n: editions.n })
    .from(editions)
    .where(eq(editions.projectId, projectId))
    .orderBy(desc(editions.n))
    .limit(1)
    .get();
  return (newest?.n ?? 0) + 1;
}

function refuse(refusal: PublishRefusal): PublishOutcome {
  return { ok: false, refusal, sentence: explainRefusal(refusal) };
}

/** One sentence for the author: what was found and what to do. */
export function explainRefusal(refusal: PublishRefusal): string {
  switch (refusal.code) {
    case 'not found':
      return 'There is no such project among yours. Look for it in the workroom.';
    case 'changed meanwhile':
      return 'This project was saved somewhere else since you opened it. Load it again, look it over, then publish.';
    case 'proof blocks':
      return refusal.items.length === 1
        ? 'One item of the proof list keeps this from being published. Mend it, then publish.'
        : `${refusal.items.length} items of the proof list keep this from being published. Mend them, then publish.`;
    case 'picture missing':
      return 'The write-up shows a picture that is no longer stored. Put the picture in again or take it out, then publish.';
    case 'note needed':
      return 'A new edition needs a correction note. Say what changed and why it matters to someone who already cut.';
    case 'note too long':
      return `The correction note is longer than ${refusal.limit} characters. Shorten it; details can stand in the write-up.`;
    case 'nothing changed':
      return `Nothing has changed since edition ${refusal.n}, so there is nothing to publish.`;
  }
}
