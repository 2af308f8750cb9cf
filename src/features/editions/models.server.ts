import { compilePattern, evaluate, planSheets, type Figures, type Model, type Pattern, type SheetPlan } from '@/engine';
import { USUAL_STOCK } from '@/features/sheets/cut-from';
import type { Edition } from './editions.server';

/** Editions never change, so what follows from one alone is worked out once. */
const KEPT = 200;
const models = new Map<string, Model>();
const atAuthorsSize = new Map<string, AuthorsFigures>();

export interface AuthorsFigures {
  readonly model: Model;
  readonly figures: Figures;
  readonly plan: SheetPlan;
}

/** An edition's pattern, compiled. The proof list let it through, so that it does not compile is our own fault. */
export function modelOf(edition: {
  readonly id: string;
  readonly slug: string;
  readonly n: number;
  readonly pattern: Pattern;
}): Model {
  return kept(models, edition.id, () => {
    const compiled = compilePattern(edition.pattern);
    if (!compiled.ok) {
      const codes = compiled.faults.map(({ code, where }) => `${code} at ${where}`).join('; ');
      throw new Error(`Edition ${edition.n} of ${edition.slug} does not compile: ${codes}`);
    }
    return compiled.value;
  });
}

/** Everything at the author's size: what cards, the feed and previews say. */
export function authorsFigures(edition: Edition): AuthorsFigures {
  return kept(atAuthorsSize, edition.id, () => {
    const model = modelOf(edition);
    const figures = evaluate(model, edition.sizing);
    return { model, figures, plan: planSheets(figures, { stock: USUAL_STOCK }) };
  });
}

function kept<T>(cache: Map<string, T>, id: string, make: () => T): T {
  const found = cache.get(id) ?? make();
  // Taken out and put back, the newest asked for is the last to go.
  cache.delete(id);
  cache.set(id, found);
  const oldest = cache.keys().next().value;
  if (cache.size > KEPT && oldest !== undefined) cache.delete(oldest);
  return found;
}
