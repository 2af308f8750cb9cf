import type { GridPieceDef, Side } from '../types';

/** One cell of a grid piece, read from its words. */
export interface Cell {
  readonly kind: 'panel' | 'tab' | 'flap' | 'cap' | 'away';
  readonly name: string;
  /** Name of the neighbour that a tab or cap hangs on; null: the only one it touches. */
  readonly on: string | null;
  readonly row: number;
  readonly column: number;
}
export const SIDES: readonly Side[] = ['top', 'right', 'bottom', 'left'];
export const OPPOSITE: Readonly<Record<Side, Side>> = { top: 'bottom', right: 'left', bottom: 'top', left: 'right' };
const KINDS: ReadonlySet<string> = new Set(['panel', 'tab', 'flap', 'cap', 'away']);

/** Tabs and flaps hang on one neighbour. */
export const hangs = (cell: Cell): boolean => cell.kind === 'tab' || cell.kind === 'flap';

/** Reads `tab corner 1 on left end`; null when the first word is no kind of cell. A nameless cell is named by its place. */
export function readCell(text: string, row: number, column: number): Cell | null {
  const [kind = '', ...words] = text.trim().toLowerCase().split(/\s+/);
  if (!KINDS.has(kind)) return null;
  const on = words.lastIndexOf('on');
  const name = (on >= 0 ? words.slice(0, on) : words).join(' ');
  return {
    kind: kind as Cell['kind'],
    name: name === '' ? `${kind} ${row + 1}.${column + 1}` : name,
    on: on >= 0 ? words.slice(on + 1).join(' ') : null,
    row,
    column,
  };
}

/** Every cell of a piece, unreadable ones as cut away (the check reports them). */
export const cellsOf = (piece: GridPieceDef): readonly (readonly Cell[])[] =>
  piece.cells.map((row, r) =>
    row.map(
      (text, c) =>
        readCell(text, r, c) ?? { kind: 'away', name: `away ${r + 1}.${c + 1}`, on: null, row: r, column: c },
    ),
  );
