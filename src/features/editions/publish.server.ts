import { randomUUID } from 'node:crypto';
import { desc, eq, inArray } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { editions, projects, uploads, users } from '@/db/schema';
import { proofList, type ProofItem } from '@/features/projects/proof';
import { uploadsIn } from './uploads-in';

export interface PublishRequest {
  /** Who publishes: the project's author or an admin. */
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
 * immediate transaction, so that nothing can be saved between the check and the copy. Later edits never reach it.
 */
export function publishEdition(projectId: string, request: PublishRequest, now = Date.now()): PublishOutcome {
  return db.transaction(
    (tx): PublishOutcome => {
      const project = tx.select().from(projects).where(eq(projects.id, projectId)).get();
      const by = tx.select().from(users).where(eq(users.id, request.by)).get();
      if (!project || project.deletedAt || !by || (by.role !== 'admin' && project.authorId !== by.id)) {
        return refuse({ code: 'not found' });
      }
      if (project.revision !== request.revision)
        return refuse({ code: 'changed meanwhile', revision: project.revision });

      const items = proofList(project).filter((item) => item.blocking);
      if (items.length > 0) return refuse({ code: 'proof blocks', items });

      const pictures = uploadsIn(project.writeUp, project.heroUploadId);
      const kept =
        pictures.length === 0
          ? []
          : tx
              .select({ id: uploads.id })
              .from(uploads)
              .where(inArray(uploads.id, [...pictures]))
              .all();
      const missing = pictures.filter((id) => !kept.some((upload) => upload.id === id));
      if (missing.length > 0) return refuse({ code: 'picture missing', uploads: missing });

      const newest = tx
        .select({ n: editions.n })
        .from(editions)
        .where(eq(editions.projectId, projectId))
        .orderBy(desc(editions.n))
        .limit(1)
        .get();
      const n = (newest?.n ?? 0) + 1;
      const note = n === 1 ? '' : (request.note ?? '').trim();
      if (n > 1 && project.publishedRevision === project.revision) return refuse({ code: 'nothing changed', n: n - 1 });
      if (n > 1 && note === '') return refuse({ code: 'note needed' });
      if (note.length > NOTE_LIMIT) return refuse({ code: 'note too long', limit: NOTE_LIMIT });

      const id = randomUUID();
      tx.insert(editions)
        .values({
          id,
          projectId,
          n,
          title: project.title,
          summary: project.summary,
          minutes: project.minutes,
          pattern: project.pattern,
          sizing: project.sizing,
          writeUp: project.writeUp,
          heroUploadId: project.heroUploadId,
          correctionNote: note,
          publishedBy: by.id,
          publishedAt: new Date(now),
        })
        .run();
      tx.update(projects).set({ publishedRevision: project.revision }).where(eq(projects.id, projectId)).run();
      return { ok: true, edition: { id, n, slug: project.slug } };
    },
    { behavior: 'immediate' },
  );
}

function refuse(refusal: PublishRefusal): PublishOutcome {
  return { ok: false, refusal, sentence: explainRefusal(refusal) };
}

/** One sentence for the author: what was found and what to do. */
function explainRefusal(refusal: PublishRefusal): string {
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
