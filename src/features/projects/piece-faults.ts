import { keyOf, type Fault, type GridPieceDef, type PieceDef } from '@/engine';
import { placesOf, type Axis, type CellPlace } from './grid-edits';

/** What is chosen in a grid: a cell, or a column or row. */
export type GridSelection =
  | ({ readonly is: 'cell' } & CellPlace)
  | { readonly is: 'track'; readonly axis: Axis; readonly index: number };

/** Where in its piece a fault stands: `column, “length”`; the empty text is the piece itself. */
export const placeInPiece = (fault: Pick<Fault, 'where'>, piece: string): string | null => {
  const head = `piece “${piece}”`;
  return fault.where.startsWith(head) ? fault.where.slice(head.length).replace(/^,\s*/u, '') : null;
};

/**
 * The faults of one field. Where several fields share a place, one is told from the others by its text: the fault's words are
 * found in it, or it is empty and the fault says that something is missing.
 */
export function faultsIn(
  faults: readonly Fault[],
  { piece, at, text }: { readonly piece: string; readonly at: string; readonly text?: string },
): readonly Fault[] {
  return faults.filter((fault) => placeInPiece(fault, piece) === at && (text === undefined || speaksOf(fault, text)));
}

/** Whether a fault was found in this text, told by its own words. */
export function speaksOf(fault: Fault, text: string): boolean {
  if (fault.span === undefined || fault.span.to > text.length + 1) return false;
  const bad = text.slice(fault.span.from, fault.span.to);
  if (bad === '') return text.trim() === '';
  return fault.found.includes(bad) || fault.span.to - fault.span.from >= text.length;
}

/** What to choose in a grid so that the place of a fault is seen; null when it is seen anyhow or cannot be told. */
export function selectionOf(fault: Pick<Fault, 'where'>, piece: PieceDef): GridSelection | null {
  const place = placeInPiece(fault, piece.name);
  if (place === null || piece.builder !== 'grid') return null;
  const [, axis, track] = /^(column|row), “([^”]*)”/u.exec(place) ?? [];
  if (axis !== undefined) {
    const key = axis === 'column' ? 'columns' : 'rows';
    const index = piece[key].findIndex(({ name }) => name === track);
    return index < 0 ? null : { is: 'track', axis: key, index };
  }
  const [, row, column] = /^row (\d+), column (\d+)/u.exec(place) ?? [];
  if (row !== undefined) return { is: 'cell', row: Number(row) - 1, column: Number(column) - 1 };
  const name = cellOf(place, piece);
  const [at] = name === undefined ? [] : placesOf(piece, name);
  return at === undefined ? null : { is: 'cell', ...at };
}

function cellOf(place: string, piece: GridPieceDef): string | undefined {
  const [, list, number] = /^(tabs|line) (\d+)/u.exec(place) ?? [];
  if (list === 'tabs') return piece.tabs?.[Number(number) - 1]?.cells[0];
  if (list === 'line') return piece.lines?.[Number(number) - 1]?.between[0];
  const edge = /^edge “([^”]*)”/u.exec(place)?.[1];
  if (edge !== undefined) return piece.edges?.find(({ name }) => keyOf(name) === keyOf(edge))?.cell;
  return /(?:cap|of) “([^”]*)”/u.exec(place)?.[1];
}
