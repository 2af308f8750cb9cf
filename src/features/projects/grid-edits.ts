import {
  keyOf,
  readCell,
  type Cell,
  type GridPieceDef,
  type LineDef,
  type Side,
  type TabDef,
  type Track,
} from '@/engine';
import { freeName, insertedAt, movedTo, removedAt, replacedAt } from './list-edits';

/** Each of these gives a new piece and leaves the old one as it was. Cells of one name are one cell and change together. */

export type Axis = 'columns' | 'rows';
export interface CellPlace {
  readonly row: number;
  readonly column: number;
}
export type CellKind = Cell['kind'];
export interface CellWords {
  readonly kind: CellKind;
  readonly name: string;
  /** What a tab, flap or cap hangs on; null: the only one it touches. */
  readonly on: string | null;
}
export interface Neighbour {
  readonly name: string;
  readonly kind: CellKind;
  /** The side of the cell at which it lies. */
  readonly side: Side;
}

export const sayCell = ({ kind, name, on }: CellWords): string =>
  kind === 'away' ? 'away' : [kind, name, ...(on === null || kind === 'panel' ? [] : ['on', on])].join(' ');

export const cellAt = (piece: GridPieceDef, { row, column }: CellPlace): Cell =>
  readCell(piece.cells[row]?.[column] ?? 'away', row, column) ?? { kind: 'away', name: '', on: null, row, column };

/** Every place of the cell called `name`, row by row. */
export const placesOf = (piece: GridPieceDef, name: string): readonly CellPlace[] =>
  piece.cells.flatMap((row, r) =>
    row.flatMap((_, c) => {
      const cell = cellAt(piece, { row: r, column: c });
      return cell.kind !== 'away' && cell.name === keyOf(name) ? [{ row: r, column: c }] : [];
    }),
  );

const STEPS: readonly (readonly [Side, number, number])[] = [
  ['top', -1, 0],
  ['right', 0, 1],
  ['bottom', 1, 0],
  ['left', 0, -1],
];
/** What a cell touches, each once, clockwise from the top. */
export function neighboursOf(piece: GridPieceDef, at: CellPlace): readonly Neighbour[] {
  const { kind, name } = cellAt(piece, at);
  const places = kind === 'away' ? [at] : placesOf(piece, name);
  const found = new Map<string, Neighbour>();
  for (const [side, down, right] of STEPS)
    for (const { row, column } of places) {
      const [r, c] = [row + down, column + right];
      if (piece.cells[r]?.[c] === undefined) continue;
      const other = cellAt(piece, { row: r, column: c });
      if (other.kind !== 'away' && other.name !== name && !found.has(other.name))
        found.set(other.name, { name: other.name, kind: other.kind, side });
    }
  return [...found.values()];
}

/** On which side a tab, flap or cap hangs; null when that cannot be told. */
export function hingeOf(piece: GridPieceDef, at: CellPlace): Neighbour | null {
  const { on } = cellAt(piece, at);
  const around = neighboursOf(piece, at);
  if (on !== null) return around.find(({ name }) => name === on) ?? null;
  const hosts = around.filter(({ kind }) => kind === 'panel' || kind === 'cap');
  return hosts.length === 1 ? (hosts[0] ?? null) : null;
}

/** Gives a cell another kind, name or hinge. What it becomes is complete: a name of its own, a hinge that can be told, an arc. */
export function setCell(piece: GridPieceDef, at: CellPlace, words: Partial<CellWords>): GridPieceDef {
  const before = cellAt(piece, at);
  const kind = words.kind ?? before.kind;
  const name = words.name ?? (before.kind === 'away' ? freeName(kind, namesIn(piece)) : before.name);
  const places = before.kind === 'away' ? [at] : placesOf(piece, before.name);
  const says = sayCell({ kind, name: keyOf(name), on: words.on === undefined ? before.on : words.on });
  const changed = withCells(piece, places, says);
  if (kind === 'away' || kind === 'panel') return pruned(changed);
  return pruned(kind === 'cap' ? withArc(hung(changed, at), at) : hung(changed, at));
}

const withCells = (piece: GridPieceDef, places: readonly CellPlace[], says: string): GridPieceDef => ({
  ...piece,
  cells: piece.cells.map((row, r) =>
    row.map((text, c) => (places.some((one) => one.row === r && one.column === c) ? says : text)),
  ),
});

/** Names what a cell hangs on, so that a new neighbour does not make it doubtful: what it hung on, or the first panel. */
function hung(piece: GridPieceDef, at: CellPlace): GridPieceDef {
  const cell = cellAt(piece, at);
  const around = neighboursOf(piece, at);
  const host = hingeOf(piece, at) ?? around.find(({ kind }) => kind === 'panel') ?? around[0];
  return withCells(piece, placesOf(piece, cell.name), sayCell({ ...cell, on: host?.name ?? null }));
}

/** An arc over the whole hinge, as high as the cell's other side. */
function withArc(piece: GridPieceDef, at: CellPlace): GridPieceDef {
  const { name } = cellAt(piece, at);
  if (piece.caps?.some((cap) => keyOf(cap.cell) === name)) return piece;
  const side = hingeOf(piece, at)?.side ?? 'top';
  const [row, column] = [piece.rows[at.row]?.size ?? '1 in', piece.columns[at.column]?.size ?? '1 in'];
  const [chord, height] = side === 'left' || side === 'right' ? [row, column] : [column, row];
  return { ...piece, caps: [...(piece.caps ?? []), { cell: name, radius: `arc radius(${chord}, ${height})` }] };
}

/** Makes a cell one with its neighbour on that side. */
export function joinCell(piece: GridPieceDef, at: CellPlace, side: Side): GridPieceDef {
  const [, down, right] = STEPS.find(([known]) => known === side) ?? ['top', 0, 0];
  const text = piece.cells[at.row + down]?.[at.column + right];
  return text === undefined ? piece : pruned(withCells(piece, [at], text));
}
/** Parts one place from a cell that has several: it gets a name of its own. */
export function partCell(piece: GridPieceDef, at: CellPlace): GridPieceDef {
  const cell = cellAt(piece, at);
  const name = freeName(cell.name, namesIn(piece));
  return withCells(piece, [at], sayCell({ ...cell, name }));
}
const namesIn = (piece: GridPieceDef): readonly string[] =>
  piece.cells.flatMap((row, r) =>
    row.flatMap((_, c) => {
      const { kind, name } = cellAt(piece, { row: r, column: c });
      return kind === 'away' ? [] : [name];
    }),
  );

// ── Columns and rows ─────────────────────────────────────────────────────────────────────────────────────────────────

export const changeTrack = (
  piece: GridPieceDef,
  { axis, index }: { readonly axis: Axis; readonly index: number },
  change: Partial<Track>,
): GridPieceDef => ({
  ...piece,
  [axis]: piece[axis].map((track, i) => (i === index ? { ...track, ...change } : track)),
});

/** A new column or row before `index`, cut away all along, under a name of its own. */
export function insertTrack(
  piece: GridPieceDef,
  { axis, index }: { readonly axis: Axis; readonly index: number },
  size: string,
): GridPieceDef {
  const name = freeName(
    axis === 'columns' ? 'column' : 'row',
    [...piece.columns, ...piece.rows].map((track) => track.name),
  );
  const tracks = insertedAt(piece[axis], index, { name, size });
  const cells =
    axis === 'columns'
      ? piece.cells.map((row) => insertedAt(row, index, 'away'))
      : insertedAt(
          piece.cells,
          index,
          piece.columns.map(() => 'away'),
        );
  return { ...piece, [axis]: tracks, cells };
}
/** Without a column or row. The last one stays. What spoke of a cell that went with it goes too. */
export function removeTrack(
  piece: GridPieceDef,
  { axis, index }: { readonly axis: Axis; readonly index: number },
): GridPieceDef {
  if (piece[axis].length < 2) return piece;
  const cells = axis === 'columns' ? piece.cells.map((row) => removedAt(row, index)) : removedAt(piece.cells, index);
  return pruned({ ...piece, [axis]: removedAt(piece[axis], index), cells });
}
export function moveTrack(
  piece: GridPieceDef,
  { axis, index }: { readonly axis: Axis; readonly index: number },
  by: number,
): GridPieceDef {
  const to = index + by;
  const cells =
    axis === 'columns' ? piece.cells.map((row) => movedTo(row, index, to)) : movedTo(piece.cells, index, to);
  return { ...piece, [axis]: movedTo(piece[axis], index, to), cells };
}

// ── Folds and tabs ───────────────────────────────────────────────────────────────────────────────────────────────────

/** The lines that say something of the edge between two cells, with their place in the piece's list. */
export const linesBetween = (
  piece: Pick<GridPieceDef, 'lines'>,
  a: string,
  b: string,
): readonly { readonly line: LineDef; readonly index: number }[] =>
  (piece.lines ?? []).flatMap((line, index) => {
    const ends = line.between.map(keyOf);
    return ends.includes(keyOf(a)) && ends.includes(keyOf(b)) ? [{ line, index }] : [];
  });

/** The shapes that a tab or flap takes, with their place in the piece's list. */
export const shapesOf = (
  piece: GridPieceDef,
  cell: string,
): readonly { readonly shape: TabDef; readonly index: number }[] =>
  (piece.tabs ?? []).flatMap((shape, index) =>
    shape.cells.some((name) => keyOf(name) === keyOf(cell)) ? [{ shape, index }] : [],
  );

/** One cell's shape apart from those that it was shaped with. */
export function shapeApart(piece: GridPieceDef, index: number, cell: string): GridPieceDef {
  const shape = piece.tabs?.[index];
  if (shape === undefined) return piece;
  const others = shape.cells.filter((name) => keyOf(name) !== keyOf(cell));
  const tabs = replacedAt(piece.tabs ?? [], index, { ...shape, cells: others });
  return { ...piece, tabs: insertedAt(tabs, index + 1, { ...shape, cells: [cell] }) };
}

type Listed = 'lines' | 'tabs' | 'caps' | 'corners' | 'notches' | 'slots' | 'holes' | 'creases' | 'rolls' | 'edges';

/** Without what speaks of cells that are no longer there. */
function pruned(piece: GridPieceDef): GridPieceDef {
  const names = new Set([
    ...namesIn(piece),
    ...(piece.creases ?? []).flatMap(({ parts }) => (parts === undefined ? [] : [keyOf(parts)])),
  ]);
  const has = (name: string) => names.has(keyOf(name));
  const ofCell = (one: { readonly cell: string }) => has(one.cell);
  const caps = new Set(namesOfKind(piece, 'cap'));
  const hanging = new Set([...namesOfKind(piece, 'tab'), ...namesOfKind(piece, 'flap')]);
  const kept = {
    lines: piece.lines?.filter((line) => line.between.every(has)),
    tabs: piece.tabs
      ?.map((tab) => ({ ...tab, cells: tab.cells.filter((name) => hanging.has(keyOf(name))) }))
      .filter((tab) => tab.cells.length > 0),
    caps: piece.caps?.filter(({ cell }) => caps.has(keyOf(cell))),
    corners: piece.corners?.filter(ofCell),
    notches: piece.notches?.filter(ofCell),
    slots: piece.slots?.filter(ofCell),
    holes: piece.holes?.filter(ofCell),
    creases: piece.creases?.filter(ofCell),
    rolls: piece.rolls?.filter(ofCell),
    edges: piece.edges?.filter(ofCell),
  };
  return (Object.keys(kept) as Listed[]).reduce<GridPieceDef>((so, key) => withList(so, key, kept[key]), piece);
}
const namesOfKind = (piece: GridPieceDef, wanted: CellKind): readonly string[] =>
  piece.cells.flatMap((row, r) =>
    row.flatMap((_, c) => {
      const { kind, name } = cellAt(piece, { row: r, column: c });
      return kind === wanted ? [name] : [];
    }),
  );

/** A piece with one of its lists changed; an empty list is left away, as in a file. */
export function withList<P extends object, K extends keyof P>(piece: P, key: K, list: P[K] | undefined): P {
  if (Array.isArray(list) && list.length > 0) return { ...piece, [key]: list };
  const { [key]: _, ...rest } = piece;
  return rest as P;
}
