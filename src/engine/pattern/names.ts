import { FUNCTION_NAMES } from '../formula';
import type { PieceDef } from '../types';

const NAME = /^\p{L}[\p{L}\p{N}]*(?: [\p{L}\p{N}]+)*$/u;
const WORDS_OF_FORMULAS = ['if', 'then', 'else', 'and', 'or', 'not', 'is'];

/** How names are compared: lower case, single spaces. */
export const keyOf = (name: string): string => name.trim().toLowerCase().replace(/\s+/g, ' ');
export const isName = (name: string): boolean => NAME.test(name) && name.length <= 60;
export const reservedWordIn = (name: string): string | undefined =>
  keyOf(name)
    .split(' ')
    .find((word) => WORDS_OF_FORMULAS.includes(word));
export const isFunctionName = (name: string): boolean => FUNCTION_NAMES.has(keyOf(name));

/** Names that a piece offers to formulas: sums of its columns and rows, and each of them. */
export const sizeNames = (
  piece: PieceDef,
): { readonly across: string; readonly along: string; readonly track: (name: string) => string } => {
  const stem = keyOf(piece.name);
  return { across: `${stem}.across`, along: `${stem}.along`, track: (name) => `${stem}.${keyOf(name)}` };
};
/** Names known once the piece is drawn. */
export const drawnNames = (piece: PieceDef): readonly string[] => {
  const stem = keyOf(piece.name);
  return [
    `${stem}.area`,
    `${stem}.perimeter`,
    ...(piece.edges ?? []).map((edge) => `${stem}.${keyOf(edge.name)} length`),
  ];
};
