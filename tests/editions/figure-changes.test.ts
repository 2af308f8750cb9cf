import { describe, expect, it } from 'vitest';
import { compilePattern, type Model, type Pattern, type Sizing } from '@/engine';
import { figureChanges, noFigureChanged, type Figured, type FigureChanges } from '@/features/editions/figure-changes';
import type { WriteUp } from '@/writeup/document';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

function compiled(pattern: Pattern): Model {
  const model = compilePattern(pattern);
  if (!model.ok) throw new Error('The test pattern must compile.');
  return model.value;
}
/** Figures with plain spaces in them. */
const changesOf = (...given: Parameters<typeof figureChanges>) =>
  JSON.parse(JSON.stringify(figureChanges(...given)).replaceAll(/[\u00a0\u202f]/gu, ' ')) as FigureChanges;
const figured = (model: Model, writeUp: WriteUp = ONE_STEP): Figured => ({ model, writeUp });
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
const NO_TEXT = writeUpOf({ type: 'paragraph' });
const OLD = figured(at('inside width - 1/16 in'), NO_TEXT);
const NEW = figured(at('inside width'), NO_TEXT);

describe('figures that are different in a later edition', () => {
  it('are told as they were and are, pieces first: 4 in wide and a back of 3 15/16 in, then of 4 in', () => {
    // Flat, the folder is 4 + 3 15/16 = 7 15/16 by 6 in, then 8 by 6 in.
    expect(changesOf(OLD, NEW, AUTHORS_SIZE)).toEqual({
      pieces: [{ name: 'Folder', was: '7 15⁄16 × 6 in', is: '8 × 6 in' }],
      measures: [{ name: 'back width', was: '3 15⁄16 in', is: '4 in' }],
      text: [],
    });
  });
  it('are worked out at the size that the maker has: 5 in wide in millimetres is 127 and 254 mm', () => {
    const size: Sizing = { values: { 'inside width': 127 }, choices: {}, units: 'mm', grid: '1mm' };
    // 127 − 1.5875 = 125.4, cut to 125; flat 127 + 125 = 252.
    expect(changesOf(OLD, NEW, size)).toEqual({
      pieces: [{ name: 'Folder', was: '252 × 152 mm', is: '254 × 152 mm' }],
      measures: [{ name: 'back width', was: '125 mm', is: '127 mm' }],
      text: [],
    });
  });
  it('are none where a ruler shows none', () => {
    const changes = figureChanges(figured(at('inside width - 0.1 mm'), NO_TEXT), NEW, AUTHORS_SIZE);
    expect(changes).toEqual({ pieces: [], measures: [], text: [] });
    expect(noFigureChanged(changes)).toBe(true);
  });
  it('name pieces that are new or gone', () => {
    const second = { ...FOLDER.pieces[0]!, name: 'Label' };
    const more = figured(compiled({ ...FOLDER, pieces: [...FOLDER.pieces, second] }));
    const one = figured(compiled(FOLDER));
    expect(changesOf(one, more, AUTHORS_SIZE).pieces).toEqual([{ name: 'Label', was: '', is: '8 × 6 in' }]);
    expect(changesOf(more, one, AUTHORS_SIZE).pieces).toEqual([{ name: 'Label', was: '8 × 6 in', is: '' }]);
  });
  it('leave out measures that one of the editions does not have', () => {
    expect(changesOf(figured(compiled(FOLDER)), NEW, AUTHORS_SIZE).measures).toEqual([]);
  });
  it('are told of the text too, where another measure stands now', () => {
    const step = (formula: string) =>
      writeUpOf({
        type: 'step',
        attrs: { title: 'Score', mark: '' },
        content: [
          {
            type: 'paragraph',
            content: [
              { type: 'text', text: 'Score the card at ' },
              { type: 'measure', attrs: { formula, bare: false } },
              { type: 'text', text: ' from the left.' },
            ],
          },
        ],
      });
    const model = compiled(FOLDER);
    // The folder is 4 in wide and its blank 8 in.
    expect(changesOf(figured(model, step('blank width')), figured(model, step('inside width')), AUTHORS_SIZE)).toEqual({
      pieces: [],
      measures: [],
      text: [{ name: 'Step 1, Score', was: '8 in', is: '4 in' }],
    });
  });
});
