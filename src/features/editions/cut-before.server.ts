import type { Model, Sizing } from '@/engine';
import { editionHistory, getEdition, type Edition, type EditionNote } from './editions.server';
import { figureChanges, type FigureChanges } from './figure-changes';
import { modelOf } from './models.server';

/** What somebody who cut by an earlier edition finds changed. */
export interface CutBefore {
  readonly had: number;
  readonly changes: FigureChanges;
  /** The notes of every edition since, oldest first. */
  readonly notes: readonly EditionNote[];
}

/** What is different for the edition that `?had=2` names; null when it names no earlier edition of this project. */
export function cutBefore(
  edition: Edition,
  model: Model,
  { url, sizing }: { url: URL; sizing: Sizing },
): CutBefore | null {
  const asked = url.searchParams.get('had') ?? '';
  const had = /^[1-9]\d{0,5}$/.test(asked) ? Number(asked) : 0;
  const old = had > 0 && had < edition.n ? getEdition(edition.slug, had) : null;
  if (!old) return null;
  const notes = editionHistory(edition.projectId).filter(({ n }) => n > had && n <= edition.n);
  return {
    had,
    changes: figureChanges({ model: modelOf(old), writeUp: old.writeUp }, { model, writeUp: edition.writeUp }, sizing),
    notes: [...notes].reverse(),
  };
}
