import { describe, expect, it } from 'vitest';
import { compilePattern, type Model, type Pattern, type Sizing } from '@/engine';
import { figureChanges, noFigureChanged, type FigureChanges } from '@/features/editions/figure-changes';
import { AUTHORS_SIZE, FOLDER } from '../server/published-project';

function compiled(pattern: Pattern): Model {
  const model = compilePattern(pattern);
  if (!model.ok) throw new Error('The test pattern must compile.');
  return model.value;
}
/** Figures with plain spaces in them. */
const changesOf = (...given: Parameters<typeof figureChanges>) =>
  JSON.parse(JSON.stringify(figureChanges(...given)).replaceAll(/[\u00a0\u202f]/gu, ' ')) as FigureChanges;
const at = (width: string, more: Partial<Pattern> = {}): Model => {
  const [piece] = FOLDER.pieces;
  if (piece?.builder !== 'grid') throw new Error('The folder is a grid.');
  return compiled({
    ...FOLDER,
    measures: [...FOLDER.measures.slice(0, 2), { name: 'back width', formula: width }],
    pieces: [
      {
        ...piece,
        columns: [
          { name: 'front', size: 'inside width' },
          { name: 'back', size: 'back width' },
        ],
      },
    ],
    ...more,
  });
};
const OLD = at('inside width - 1/16 in');
const NEW = at('inside width');

describe('figures that are different in a later edition', () => {
  it('are told as they were and are, pieces first: 4 in wide and a back of 3 15/16 in, then of 4 in', () => {
    // Flat, the folder is 4 + 3 15/16 = 7 15/16 by 6 in, then 8 by 6 in.
    expect(changesOf(OLD, NEW, AUTHORS_SIZE)).toEqual({
      pieces: [{ name: 'Folder', was: '7 15⁄16 × 6 in', is: '8 × 6 in' }],
      measures: [{ name: 'back width', was: '3 15⁄16 in', is: '4 in' }],
    });
  });
  it('are worked out at the size that the maker has: 5 in wide in millimetres is 127 and 254 mm', () => {
    const size: Sizing = { values: { 'inside width': 127 }, choices: {}, units: 'mm', grid: '1mm' };
    // 127 − 1.5875 = 125.4, cut to 125; flat 127 + 125 = 252.
    expect(changesOf(OLD, NEW, size)).toEqual({
      pieces: [{ name: 'Folder', was: '252 × 152 mm', is: '254 × 152 mm' }],
      measures: [{ name: 'back width', was: '125 mm', is: '127 mm' }],
    });
  });
  it('are none where a ruler shows none', () => {
    const changes = figureChanges(at('inside width - 0.1 mm'), NEW, AUTHORS_SIZE);
    expect(changes).toEqual({ pieces: [], measures: [] });
    expect(noFigureChanged(changes)).toBe(true);
  });
  it('name pieces that are new or gone', () => {
    const second = { ...FOLDER.pieces[0]!, name: 'Label' };
    const more = compiled({ ...FOLDER, pieces: [...FOLDER.pieces, second] });
    const one = compiled(FOLDER);
    expect(changesOf(one, more, AUTHORS_SIZE).pieces).toEqual([{ name: 'Label', was: '', is: '8 × 6 in' }]);
    expect(changesOf(more, one, AUTHORS_SIZE).pieces).toEqual([{ name: 'Label', was: '8 × 6 in', is: '' }]);
  });
  it('leave out measures that one of the editions does not have', () => {
    expect(changesOf(compiled(FOLDER), NEW, AUTHORS_SIZE).measures).toEqual([]);
  });
});
