import { FUNCTION_NAMES } from '../formula';
import type { PieceDef } from '../types';

const NAME = /^\p{L}[\p{L}\p{N}]*(?: [\p{L}\p{N}]+)*$/u;
const WORDS_OF_FORMULAS = ['if', 'then', 'else', 'and', 'or', 'not', 'is'];
/** The measure by which figures and drawings know how thick the card is. */
export const CARD_THICKNESS = 'card thickness';
/** One step of the reader's cut grid; nothing in the exact evaluation. Always there, for tolerances. */
export const CUT_GRID = 'cut grid';
/** What every formula may use without a measure of that name. */
const GIVEN: ReadonlySet<string> = new Set(['pi', CUT_GRID]);

/** How names are compared: lower case, single spaces. */
export const keyOf = (name: string): string => name.trim().toLowerCase().replace(/\s+/g, ' ');
export const isName = (name: string): boolean => NAME.test(name) && name.length <= 60;
export const reservedWordIn = (name: string): string | undefined =>
  keyOf(name)
    .split(' ')
    .find((word) => WORDS_OF_FORMULAS.includes(word));
export const isFunctionName = (name: string): boolean => FUNCTION_NAMES.has(keyOf(name));
export const isGiven = (name: string): boolean => GIVEN.has(keyOf(name));

/** Names that a grid piece offers to formulas before it is drawn: sums of its columns and rows, and each of them. */
export function sizeNames(piece: PieceDef): readonly string[] {
  if (piece.builder !== 'grid') return [];
  const stem = keyOf(piece.name);
  const tracks = [...piece.columns, ...piece.rows].map((track) => `${stem}.${keyOf(track.name)}`);
  return [...new Set([`${stem}.across`, `${stem}.along`, ...tracks])];
}
/** Names known once the piece is drawn, and what each of them is. */
export function drawnNames(piece: PieceDef): readonly { readonly name: string; readonly of: Drawn }[] {
  const stem = keyOf(piece.name);
  const sizes: readonly Drawn[] =
    piece.builder === 'grid' ? ['area', 'perimeter'] : ['area', 'perimeter', 'across', 'along'];
  const edges: readonly { readonly name: string }[] =
    piece.builder === 'sector' ? [{ name: 'rim' }, { name: 'foot' }] : 'edges' in piece ? (piece.edges ?? []) : [];
  return [
    ...sizes.map((of) => ({ name: `${stem}.${of as string}`, of })),
    ...edges.map(({ name }) => ({ name: `${stem}.${keyOf(name)} length`, of: { edge: name } })),
  ];
}
type Drawn = 'area' | 'perimeter' | 'across' | 'along' | { readonly edge: string };
