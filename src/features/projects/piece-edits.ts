import { formulasOfPattern, keyOf, panelNames, type Pattern, type PieceDef, type Placement } from '@/engine';
import { searchFor } from './formula-names';
import { freeName, insertedAt, movedTo } from './list-edits';

/** Each of these gives a new pattern and leaves the old one as it was. */

export const changePiece = (pattern: Pattern, name: string, change: (piece: PieceDef) => PieceDef): Pattern => ({
  ...pattern,
  pieces: pattern.pieces.map((piece) => (piece.name === name ? change(piece) : piece)),
});

/** A new piece goes last. The first one also takes its place in the folded picture; a layer goes with the piece it is on. */
export function addPiece(pattern: Pattern, piece: PieceDef): Pattern {
  const added = { ...pattern, pieces: [...pattern.pieces, piece] };
  return pattern.assembly.length === 0 ? place(added, piece) : added;
}

/** A copy beside the piece, under a name of its own. It stands nowhere in the folded picture yet. */
export function duplicatePiece(pattern: Pattern, name: string): { readonly pattern: Pattern; readonly name: string } {
  const index = pattern.pieces.findIndex((piece) => piece.name === name);
  const piece = pattern.pieces[index];
  if (piece === undefined) return { pattern, name };
  const copy = freeName(
    name.replace(/ \d+$/u, ''),
    pattern.pieces.map((known) => known.name),
  );
  return {
    pattern: { ...pattern, pieces: insertedAt(pattern.pieces, index + 1, { ...piece, name: copy }) },
    name: copy,
  };
}

/** Without the piece and its places in the folded picture. */
export const removePiece = (pattern: Pattern, name: string): Pattern => ({
  ...pattern,
  pieces: pattern.pieces.filter((piece) => piece.name !== name),
  assembly: pattern.assembly.filter((placement) => keyOf(placement.piece) !== keyOf(name)),
});

export function movePiece(pattern: Pattern, name: string, by: number): Pattern {
  const from = pattern.pieces.findIndex((piece) => piece.name === name);
  return { ...pattern, pieces: movedTo(pattern.pieces, from, from + by) };
}

/** One more place for a piece in the folded picture: where the first one usually stands. */
export function place(pattern: Pattern, piece: PieceDef): Pattern {
  const [root] = panelNames(piece);
  if (root === undefined) return pattern;
  const placement: Placement = {
    piece: piece.name,
    root,
    at: ['0 mm', '0 mm', '0 mm'],
    across: '+x',
    along: '-y',
  };
  return { ...pattern, assembly: [...pattern.assembly, placement] };
}

/** What would stop reading without the piece: layers on it, and what uses its sizes. */
export const usersOfPiece = (pattern: Pattern, name: string): readonly string[] => [
  ...pattern.pieces
    .filter((piece) => piece.builder === 'layer' && keyOf(piece.of) === keyOf(name))
    .map((piece) => `piece “${piece.name}”`),
  ...usersOfSize(pattern, `${searchFor(name)}\\s*\\.`).filter((user) => user !== `piece “${name}”`),
];
/** What uses the size of a column or row: `Tray.length`. */
export const usersOfTrack = (pattern: Pattern, piece: string, track: string): readonly string[] =>
  usersOfSize(pattern, `${searchFor(piece)}\\s*\\.\\s*${searchFor(track)}(?![\\p{L}\\p{N}])`);

function usersOfSize(pattern: Pattern, source: string): readonly string[] {
  const size = new RegExp(`(?<![\\p{L}\\p{N}_.])${source}`, 'iu');
  const users = formulasOfPattern(pattern).filter(({ text }) => size.test(text));
  return [...new Set(users.map(({ where }) => placeIn(where)))];
}

/** The thing that a formula belongs to: `piece “Floor”` of `piece “Floor”, columns, size`. */
export const placeIn = (where: string): string =>
  (/^(.*?”)/u.exec(where)?.[1] ?? where.replace(/,.*$/u, '')).replace(/^finished (inside|outside)/u, 'the $1 size');
