import { drawFolded, evaluate, usualSizing, type Model, type Pattern } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { readPattern } from '@/features/patterns/load-pattern';
import { listOwnPatterns } from '@/features/patterns/own-patterns.server';
import { getPatternModel, listPatterns } from '@/features/patterns/patterns.server';

/** A pattern as the workroom offers it. */
export interface ShelfPattern {
  /** What a new project is asked for by: the slug of one of ours, the id of an author's own. */
  readonly slug: string;
  readonly name: string;
  readonly summary: string;
  readonly group: string;
  /** "inside length, inside width, inside height" */
  readonly asks: string;
  /** Folded, as SVG. */
  readonly folded: string;
  /** The author's own: the handbook does not tell of it. */
  readonly own: boolean;
}

let shelf: readonly ShelfPattern[] | null = null;

/** Every pattern with its folded picture. Patterns are part of the application, so they are drawn once. */
export function patternShelf(): readonly ShelfPattern[] {
  shelf ??= listPatterns().flatMap((pattern): ShelfPattern[] => {
    const model = getPatternModel(pattern.slug);
    return model === undefined ? [] : [shown(pattern, model, { slug: pattern.slug, own: false })];
  });
  return shelf;
}

const MOST_KEPT = 300;
const drawn = new Map<string, ShelfPattern>();

/** An author's own patterns, drawn again only when they changed. */
export function ownShelf(ownerId: string): readonly ShelfPattern[] {
  return listOwnPatterns(ownerId).flatMap(({ id, pattern, updatedAt }) => {
    const key = `${id} ${updatedAt}`;
    const known = drawn.get(key);
    if (known !== undefined) return [known];
    const read = readPattern(pattern);
    // What an older version of ours wrote may not read any more: its file can still be fetched.
    if (!read.ok) return [];
    if (drawn.size >= MOST_KEPT) drawn.clear();
    const own = shown(pattern, read.value.model, { slug: id, own: true });
    drawn.set(key, own);
    return [own];
  });
}

function shown(pattern: Pattern, model: Model, as: Pick<ShelfPattern, 'slug' | 'own'>): ShelfPattern {
  const figures = evaluate(model, usualSizing(model));
  return {
    ...as,
    name: pattern.name,
    summary: pattern.summary,
    group: pattern.group,
    asks: pattern.measures
      .filter((measure) => measure.ask && !measure.ask.finer)
      .map((measure) => measure.name)
      .join(', '),
    folded: drawingSvg(drawFolded(model, figures, { width: 120, height: 104 }), { class: 'card-cream' }),
  };
}
