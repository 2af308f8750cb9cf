import { randomUUID } from 'node:crypto';
import { and, asc, eq } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { ownPatterns } from '@/db/schema';
import { keyOf, type Pattern } from '@/engine';

/** How many patterns one author may keep. */
export const MOST_PATTERNS = 100;

export interface OwnPattern {
  readonly id: string;
  readonly pattern: Pattern;
  readonly updatedAt: number;
}
export type KeepOutcome =
  | { readonly ok: true; readonly id: string; readonly replaced: boolean }
  | { readonly ok: false; readonly code: 'name taken' | 'too many' };

/** An author's own patterns, by name. */
export const listOwnPatterns = (ownerId: string): readonly OwnPattern[] =>
  db
    .select()
    .from(ownPatterns)
    .where(eq(ownPatterns.ownerId, ownerId))
    .orderBy(asc(ownPatterns.name))
    .all()
    .map(({ id, pattern, updatedAt }) => ({ id, pattern, updatedAt: updatedAt.getTime() }));

export const getOwnPattern = (id: string, ownerId: string): Pattern | undefined =>
  db
    .select({ pattern: ownPatterns.pattern })
    .from(ownPatterns)
    .where(and(eq(ownPatterns.id, id), eq(ownPatterns.ownerId, ownerId)))
    .get()?.pattern;

/** Keeps a pattern among the author's own. One of the same name is replaced only when that was asked for. */
export function keepPattern(
  pattern: Pattern,
  { ownerId, replace }: { readonly ownerId: string; readonly replace: boolean },
): KeepOutcome {
  return db.transaction(
    (tx): KeepOutcome => {
      const own = tx
        .select({ id: ownPatterns.id, name: ownPatterns.name })
        .from(ownPatterns)
        .where(eq(ownPatterns.ownerId, ownerId))
        .all();
      const same = own.find(({ name }) => keyOf(name) === keyOf(pattern.name));
      const kept = { name: pattern.name, pattern, updatedAt: new Date() };
      if (same !== undefined) {
        if (!replace) return { ok: false, code: 'name taken' };
        tx.update(ownPatterns).set(kept).where(eq(ownPatterns.id, same.id)).run();
        return { ok: true, id: same.id, replaced: true };
      }
      if (own.length >= MOST_PATTERNS) return { ok: false, code: 'too many' };
      const id = randomUUID();
      tx.insert(ownPatterns)
        .values({ id, ownerId, ...kept })
        .run();
      return { ok: true, id, replaced: false };
    },
    { behavior: 'immediate' },
  );
}

/** Takes a pattern off the shelf; projects made from it keep theirs. False when the author has none of that id. */
export const dropPattern = (id: string, ownerId: string): boolean =>
  db
    .delete(ownPatterns)
    .where(and(eq(ownPatterns.id, id), eq(ownPatterns.ownerId, ownerId)))
    .run().changes > 0;
