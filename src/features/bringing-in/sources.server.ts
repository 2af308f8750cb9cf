import { randomUUID } from 'node:crypto';
import { and, count, desc, eq, sql } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { sourceTexts } from '@/db/schema';
import { mayWorkOn, type Asker } from '@/features/projects/project-access.server';
import { MOST_SOURCES, type KeptSource, type SourceKind } from './source';

const COLUMNS = {
  id: sourceTexts.id,
  name: sourceTexts.name,
  kind: sourceTexts.kind,
  characters: sql<number>`length(${sourceTexts.text})`,
  createdAt: sourceTexts.createdAt,
};

/** The originals of a project, newest first, without their text. */
export function listSources(projectId: string, asker: Asker): readonly KeptSource[] {
  if (!mayWorkOn(projectId, asker)) return [];
  return db
    .select(COLUMNS)
    .from(sourceTexts)
    .where(eq(sourceTexts.projectId, projectId))
    .orderBy(desc(sourceTexts.createdAt), desc(sourceTexts.id))
    .all()
    .map((row) => ({ ...row, kind: row.kind as SourceKind, createdAt: row.createdAt.getTime() }));
}

/** The text of an original, as it was brought in; null when this project has none of that id. */
export function sourceText(projectId: string, id: string, asker: Asker): string | null {
  if (!mayWorkOn(projectId, asker)) return null;
  return db.select({ text: sourceTexts.text }).from(sourceTexts).where(at(projectId, id)).get()?.text ?? null;
}

/** Keeps an original; one that is kept already is not kept twice. Null when the project has too many. */
export function keepSource(
  projectId: string,
  asker: Asker,
  source: { readonly name: string; readonly kind: SourceKind; readonly text: string },
): { readonly id: string } | null {
  if (!mayWorkOn(projectId, asker)) return null;
  return db.transaction(
    (tx) => {
      const same = tx
        .select({ id: sourceTexts.id })
        .from(sourceTexts)
        .where(and(eq(sourceTexts.projectId, projectId), eq(sourceTexts.text, source.text)))
        .get();
      if (same) return same;
      const kept =
        tx.select({ n: count() }).from(sourceTexts).where(eq(sourceTexts.projectId, projectId)).get()?.n ?? 0;
      if (kept >= MOST_SOURCES) return null;
      const id = randomUUID();
      tx.insert(sourceTexts)
        .values({ id, projectId, ...source })
        .run();
      return { id };
    },
    { behavior: 'immediate' },
  );
}

/** False when this project has none of that id. */
export function forgetSource(projectId: string, id: string, asker: Asker): boolean {
  if (!mayWorkOn(projectId, asker)) return false;
  return db.delete(sourceTexts).where(at(projectId, id)).run().changes > 0;
}

const at = (projectId: string, id: string) => and(eq(sourceTexts.projectId, projectId), eq(sourceTexts.id, id));
