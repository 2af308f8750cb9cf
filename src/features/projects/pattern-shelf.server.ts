import { drawFolded, evaluate, usualSizing } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { getPatternModel, listPatterns } from '@/features/patterns/patterns.server';

/** A pattern as the workroom offers it. */
export interface ShelfPattern {
  readonly slug: string;
  readonly name: string;
  readonly summary: string;
  readonly group: string;
  /** "inside length, inside width, inside height" */
  readonly asks: string;
  /** Folded, as SVG. */
  readonly folded: string;
}

let shelf: readonly ShelfPattern[] | null = null;

/** Every pattern with its folded picture. Patterns are part of the application, so they are drawn once. */
export function patternShelf(): readonly ShelfPattern[] {
  if (shelf !== null) return shelf;
  shelf = listPatterns().flatMap((pattern): ShelfPattern[] => {
    const model = getPatternModel(pattern.slug);
    if (model === undefined) return [];
    const figures = evaluate(model, usualSizing(model));
    return [
      {
        slug: pattern.slug,
        name: pattern.name,
        summary: pattern.summary,
        group: pattern.group,
        asks: pattern.measures
          .filter((measure) => measure.ask && !measure.ask.finer)
          .map((measure) => measure.name)
          .join(', '),
        folded: drawingSvg(drawFolded(model, figures, { width: 120, height: 104 }), { class: 'card-cream' }),
      },
    ];
  });
  return shelf;
}
