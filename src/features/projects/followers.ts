import { formulasOfPiece, type Pattern } from '@/engine';
import { formulasOfMeasure, namesIn, namesOf } from './formula-names';

export interface Lit {
  /** The measure or choice that was selected. */
  readonly selected: string;
  /** The measures that follow it, however far, in the order of the pattern. */
  readonly followers: readonly string[];
  /** The selected name and its followers: whatever uses one of these changes when the selected one does. */
  readonly names: ReadonlySet<string>;
  /** The pieces that use any of `names`. */
  readonly pieces: readonly string[];
}

/** What changes when the measure (or choice) called `selected` changes. */
export function litBy(pattern: Pattern, selected: string): Lit {
  const names = namesOf(pattern);
  const uses = pattern.measures.map((measure) => ({
    name: measure.name,
    uses: new Set(formulasOfMeasure(measure).flatMap((formula) => namesIn(formula, names).map((span) => span.name))),
  }));
  const lit = new Set([selected]);
  for (let grown = true; grown; ) {
    grown = false;
    for (const measure of uses) {
      if (lit.has(measure.name) || ![...measure.uses].some((name) => lit.has(name))) continue;
      lit.add(measure.name);
      grown = true;
    }
  }
  return {
    selected,
    followers: pattern.measures.map((measure) => measure.name).filter((name) => name !== selected && lit.has(name)),
    names: lit,
    pieces: pattern.pieces
      .filter((piece) => formulasOfPiece(piece).some((formula) => usesAny(formula, names, lit)))
      .map((piece) => piece.name),
  };
}

/** Whether a formula uses one of the lit names. */
export const usesAny = (formula: string, names: readonly string[], lit: ReadonlySet<string>): boolean =>
  namesIn(formula, names).some((span) => lit.has(span.name));
