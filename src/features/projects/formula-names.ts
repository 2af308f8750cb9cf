import { keyOf, type Pattern } from '@/engine';

export interface NameSpan {
  readonly name: string;
  readonly from: number;
  readonly to: number;
}

/**
 * Where the given names stand in a formula, as text: it also works on a formula that does not read yet, so that the desk can
 * light what follows a measure while one of the formulas is being typed. The longest name wins ("inside depth" over "depth");
 * a name after a dot belongs to a piece and one that begins a function's name to that: neither counts.
 */
export function namesIn(formula: string, names: readonly string[]): readonly NameSpan[] {
  if (names.length === 0) return [];
  const known = finder(names);
  return [...formula.matchAll(known.pattern)].map((match) => ({
    name: known.names.get(keyOf(match[0])) ?? match[0],
    from: match.index,
    to: match.index + match[0].length,
  }));
}

/** The source of an expression that finds a name in whatever layout. */
export const searchFor = (name: string): string =>
  name.replace(/[.*+?^${}()|[\]\\]/gu, '\\$&').replace(/\s+/gu, '\\s+');

interface Finder {
  readonly pattern: RegExp;
  /** Names as they are called, by how they are compared. */
  readonly names: ReadonlyMap<string, string>;
}
/** A name that begins the name of a function, as in `arc length(…)`, does not stand for itself. */
const NO_CALL = '(?!\\s*\\()(?!\\s+(?!(?:and|or|not|is|if|then|else)\\b)\\p{L}+\\s*\\()';

const finders = new Map<string, Finder>();
function finder(names: readonly string[]): Finder {
  const key = names.join('\n');
  const known = finders.get(key);
  if (known) return known;
  const words = [...names].sort((a, b) => b.length - a.length).map(searchFor);
  const made = {
    pattern: new RegExp(`(?<![\\p{L}\\p{N}_.])(?:${words.join('|')})(?![\\p{L}\\p{N}_])${NO_CALL}`, 'giu'),
    names: new Map(names.map((name) => [keyOf(name), name])),
  };
  if (finders.size > 50) finders.clear();
  finders.set(key, made);
  return made;
}

/** Names that a formula may use: measures and choices. */
export const namesOf = (pattern: Pattern): readonly string[] => [
  ...pattern.measures.map((measure) => measure.name),
  ...pattern.choices.map((choice) => choice.name),
];

/** The formulas that say what a measure is: its own, or the usual value and condition of an asked one. */
export const formulasOfMeasure = (measure: Pattern['measures'][number]): readonly string[] =>
  [measure.formula, measure.ask?.usual, measure.ask?.when].filter((f): f is string => f !== undefined && f !== '');
