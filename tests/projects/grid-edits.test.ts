import { describe, expect, it } from 'vitest';
import type { GridPieceDef } from '@/engine';
import {
  cellAt,
  hingeOf,
  insertTrack,
  joinCell,
  linesBetween,
  moveTrack,
  neighboursOf,
  partCell,
  placesOf,
  removeTrack,
  sayCell,
  setCell,
  shapeApart,
} from '@/features/projects/grid-edits';

/** A floor with a wall at the left and a tab on that wall; what stands at the other places is cut away. */
const PIECE: GridPieceDef = {
  name: 'Half tray',
  stock: 'card',
  builder: 'grid',
  columns: [
    { name: 'side', size: '1 in' },
    { name: 'length', size: '4 in' },
  ],
  rows: [
    { name: 'far', size: '1 in' },
    { name: 'width', size: '3 in' },
  ],
  cells: [
    ['tab corner on wall', 'away'],
    ['panel wall', 'panel floor'],
  ],
  lines: [{ between: ['wall', 'floor'], is: 'mountain' }],
  tabs: [{ cells: ['corner'], left: { by: '15°' } }],
  corners: [{ cell: 'floor', corner: 'top right', radius: '1/4 in' }],
  edges: [{ name: 'rim', cell: 'wall', side: 'left' }],
};
const at = (row: number, column: number) => ({ row, column });

describe('the cells of a grid piece', () => {
  it('are said in the words in which they are read', () => {
    expect(sayCell({ kind: 'tab', name: 'left', on: 'floor' })).toBe('tab left on floor');
    expect(sayCell({ kind: 'panel', name: 'floor', on: 'wall' })).toBe('panel floor');
    expect(sayCell({ kind: 'away', name: 'left', on: null })).toBe('away');
    expect(cellAt(PIECE, at(0, 0))).toMatchObject({ kind: 'tab', name: 'corner', on: 'wall' });
  });
  it('know what they touch, clockwise from the top, and what they hang on', () => {
    expect(neighboursOf(PIECE, at(1, 0)).map(({ name, side }) => [name, side])).toEqual([
      ['corner', 'top'],
      ['floor', 'right'],
    ]);
    expect(hingeOf(PIECE, at(0, 0))).toEqual({ name: 'wall', kind: 'panel', side: 'bottom' });
  });
  it('change kind and keep their name, and a new one gets a name that is free', () => {
    expect(setCell(PIECE, at(1, 1), { kind: 'flap' }).cells[1]).toEqual(['panel wall', 'flap floor on wall']);
    expect(setCell(PIECE, at(0, 1), { kind: 'panel' }).cells[0]).toEqual(['tab corner on wall', 'panel panel']);
  });
  it('get a hinge where several panels could be meant', () => {
    const three = setCell(PIECE, at(0, 1), { kind: 'panel' });
    // The corner now touches a panel at its right and the wall below.
    expect(setCell(three, at(0, 0), { on: null }).cells[0]?.[0]).toBe('tab corner on panel');
  });
  it('become an arc over the whole hinge, as high as the other side of the cell', () => {
    const { cells, caps } = setCell(PIECE, at(1, 0), { kind: 'cap' });
    expect(cells[1]?.[0]).toBe('cap wall on floor');
    // The wall hangs on the floor at its right: the chord is the row, 3 in, the height the column, 1 in.
    expect(caps).toEqual([{ cell: 'wall', radius: 'arc radius(3 in, 1 in)' }]);
  });
  it('take what spoke of them along when they are cut away', () => {
    const cut = setCell(PIECE, at(1, 0), { kind: 'away' });
    expect(cut).not.toHaveProperty('lines');
    expect(cut).not.toHaveProperty('edges');
    expect(cut.corners).toEqual(PIECE.corners);
  });
  it('are made one with a neighbour and parted again', () => {
    const one = joinCell(PIECE, at(1, 0), 'right');
    expect(one.cells[1]).toEqual(['panel floor', 'panel floor']);
    expect(placesOf(one, 'Floor')).toEqual([at(1, 0), at(1, 1)]);
    expect(partCell(one, at(1, 0)).cells[1]).toEqual(['panel floor 2', 'panel floor']);
  });
});

describe('columns and rows', () => {
  it('are put in cut away all along, under a name that is free', () => {
    const more = insertTrack(PIECE, { axis: 'columns', index: 1 }, '1/2 in');
    expect(more.columns.map(({ name }) => name)).toEqual(['side', 'column', 'length']);
    expect(more.cells).toEqual([
      ['tab corner on wall', 'away', 'away'],
      ['panel wall', 'away', 'panel floor'],
    ]);
    expect(insertTrack(PIECE, { axis: 'rows', index: 2 }, '1/2 in').cells[2]).toEqual(['away', 'away']);
  });
  it('move with their cells', () => {
    const moved = moveTrack(PIECE, { axis: 'columns', index: 0 }, 1);
    expect(moved.columns.map(({ size }) => size)).toEqual(['4 in', '1 in']);
    expect(moved.cells[1]).toEqual(['panel floor', 'panel wall']);
    expect(moveTrack(PIECE, { axis: 'rows', index: 0 }, -1).cells).toEqual(PIECE.cells);
  });
  it('go with their cells, and the last one stays', () => {
    const less = removeTrack(PIECE, { axis: 'rows', index: 0 });
    expect(less.cells).toEqual([['panel wall', 'panel floor']]);
    expect(less).not.toHaveProperty('tabs');
    expect(removeTrack(less, { axis: 'rows', index: 0 })).toBe(less);
  });
});

describe('lines and shapes', () => {
  it('are found whichever cell is named first', () => {
    expect(linesBetween(PIECE, 'Floor', 'wall').map(({ index }) => index)).toEqual([0]);
    expect(linesBetween(PIECE, 'floor', 'corner')).toEqual([]);
  });
  it('of several tabs are parted for one of them', () => {
    const both: GridPieceDef = { ...PIECE, tabs: [{ cells: ['a', 'b'], depth: '1/2 in' }] };
    expect(shapeApart(both, 0, 'B').tabs).toEqual([
      { cells: ['a'], depth: '1/2 in' },
      { cells: ['B'], depth: '1/2 in' },
    ]);
  });
});
