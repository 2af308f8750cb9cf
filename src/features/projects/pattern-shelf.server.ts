import { compilePattern, drawFolded, evaluate, usualSizing } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import { listPatterns } from '@/features/patterns/patterns.server';

/** A pattern as the workroom offers it. */
export interface ShelfPattern {
  readonly slug: string;
  readonly name: string;
  readonly summary: string;
  /** "inside length, inside width, inside height" */
  readonly asks: string;
  /** Folded, as SVG. */
  readonly folded: string;
}

let shelf: readonly ShelfPattern[] | null = null;

/** Every pattern with its folded picture. Patterns are part of the application, so they are drawn once. */
export function patternShelf(): readonly ShelfPattern[] {
  shelf ??= listPatterns().flatMap((pattern): ShelfPattern[] => {
    const compiled = compilePattern(pattern);
    if (!compiled.ok) return [];
    const figures = evaluate(compiled.value, usualSizing(compiled.value));
    return [{
      slug: pattern.slug,
      name: pattern.name,
      summary: pattern.summary,
      asks: pattern.measures.filter((measure) => measure.ask && !measure.ask.finer).map((measure) => measure.name).join(', '),
      folded: drawingSvg(drawFolded(compiled.value, figures, { width: 120, height: 104 }), { class: 'card-cream' }),
    }];
  });
  return shelf;
}
