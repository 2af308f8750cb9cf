import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, usualSizing, type Pattern } from '@/engine';
import {
  addPiece,
  duplicatePiece,
  movePiece,
  removePiece,
  usersOfPiece,
  usersOfTrack,
} from '@/features/projects/piece-edits';
import { faultsIn, selectionOf } from '@/features/projects/piece-faults';
import { STARTS, startingPiece } from '@/features/projects/starting-pieces';
import { FOLDER } from '../server/published-project';

const EMPTY: Pattern = {
  ...FOLDER,
  measures: [],
  pieces: [],
  fits: [],
  order: [],
  assembly: [],
  finished: { inside: [], outside: [] },
};
const names = (pattern: Pattern) => pattern.pieces.map((piece) => piece.name);

describe('the pieces of a pattern', () => {
  it('are copied beside themselves under a name of their own', () => {
    const copy = duplicatePiece(FOLDER, 'Folder');
    expect([copy.name, names(copy.pattern)]).toEqual(['Folder 2', ['Folder', 'Folder 2']]);
    expect(names(movePiece(copy.pattern, 'Folder', 1))).toEqual(['Folder 2', 'Folder']);
  });
  it('leave the folded picture with what placed them', () => {
    expect(removePiece(FOLDER, 'Folder')).toMatchObject({ pieces: [], assembly: [] });
  });
  it('say what uses them and their sizes before they go', () => {
    const layer = {
      name: 'Front layer',
      builder: 'layer',
      stock: 'patterned paper',
      of: 'folder',
      panels: ['front'],
      margin: '1/8 in',
    } as const;
    const used: Pattern = {
      ...FOLDER,
      pieces: [...FOLDER.pieces, layer],
      fits: [{ name: 'flat', left: 'folder.across', is: 'at most', right: '20 in', otherwise: 'It is too wide.' }],
    };
    expect(usersOfPiece(used, 'Folder')).toEqual(['piece “Front layer”', 'fit “flat”']);
    expect(usersOfTrack(used, 'Folder', 'across')).toEqual(['fit “flat”']);
    expect(usersOfTrack(used, 'Folder', 'front')).toEqual([]);
  });
  it.each(STARTS.map(({ id }) => id))('begin as a %s that can be cut at its usual size', (id) => {
    const host = id === 'layer' ? addPiece(EMPTY, startingPiece(EMPTY, 'tray')) : EMPTY;
    const piece = startingPiece(host, id);
    const pattern = addPiece(host, piece);
    expect(pattern.assembly).toHaveLength(1);
    const compiled = compilePattern(pattern);
    if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
    const figures = evaluate(compiled.value, usualSizing(compiled.value));
    expect(figures.problems).toEqual([]);
    expect(figures.pieces.map((figure) => figure.name)).toContain(piece.name);
  });
  it('begin at the lengths that the pattern asks for', () => {
    // Inside width 4 in and inside height 6 in are asked; the walls stand 1 in tall: 4 + 2 by 6 + 2.
    const pattern = addPiece(FOLDER, startingPiece(FOLDER, 'tray'));
    const compiled = compilePattern(pattern);
    const tray = compiled.ok ? evaluate(compiled.value, usualSizing(compiled.value)).pieces[1] : undefined;
    expect(tray?.across).toBeCloseTo(6 * 25.4, 6);
    expect(tray?.along).toBeCloseTo(8 * 25.4, 6);
  });
});

describe('a fault of a piece', () => {
  const fault = {
    code: 'x',
    where: 'piece “Folder”, slot of “front”',
    span: { from: 0, to: 3 },
    found: '“wid”',
    expected: '',
    hint: '',
  };
  it('stands with the field whose text its words are found in, where several share a place', () => {
    const at = { piece: 'Folder', at: 'slot of “front”' };
    expect(faultsIn([fault], { ...at, text: 'wid + 1 in' })).toEqual([fault]);
    expect(faultsIn([fault], { ...at, text: '1 in + 2 in' })).toEqual([]);
    expect(faultsIn([fault], { piece: 'Folder', at: 'hole of “front”' })).toEqual([]);
  });
  it.each([
    ['slot of “back”', { is: 'cell', row: 0, column: 1 }],
    ['column, “back”', { is: 'track', axis: 'columns', index: 1 }],
    ['row 1, column 2', { is: 'cell', row: 0, column: 1 }],
    ['count', null],
  ])('at “%s” is shown by choosing its cell or track', (place, selection) => {
    expect(selectionOf({ where: `piece “Folder”, ${place}` }, FOLDER.pieces[0]!)).toEqual(selection);
  });
});
