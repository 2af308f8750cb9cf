import { describe, expect, it } from 'vitest';
import type { ProjectState } from '@/features/projects/project';
import { stateChanges, wordRuns } from '@/features/projects/state-diff';
import { AUTHORS_SIZE, FOLDER, ONE_STEP, writeUpOf } from '../server/published-project';

const base: ProjectState = {
  title: 'Folder',
  summary: '',
  minutes: 20,
  hero: null,
  pattern: FOLDER,
  sizing: AUTHORS_SIZE,
  writeUp: ONE_STEP,
};
const changes = (after: Partial<ProjectState>) => stateChanges(base, { ...base, ...after });

describe('what differs between two states', () => {
  it('is nothing when nothing does', () => expect(changes({})).toEqual([]));
  it('names facts in words', () => {
    expect(changes({ title: 'List folder', minutes: null })).toEqual([
      {
        title: 'Facts',
        changes: [
          { where: 'Title', before: 'Folder', after: 'List folder' },
          { where: 'Minutes at the table', before: '20', after: '' },
        ],
      },
    ]);
  });
  it('tells of a measure only the fields that differ', () => {
    const measures = FOLDER.measures.map((measure) =>
      measure.ask ? { ...measure, ask: { ...measure.ask, to: '12 in' } } : measure,
    );
    expect(changes({ pattern: { ...FOLDER, measures } })).toEqual([
      {
        title: 'Measures',
        changes: [
          { where: 'inside width', before: 'ask, to: 8 in', after: 'ask, to: 12 in' },
          { where: 'inside height', before: 'ask, to: 10 in', after: 'ask, to: 12 in' },
        ],
      },
    ]);
  });
  it('finds a changed column in a piece by the names on the way', () => {
    const [piece] = FOLDER.pieces;
    if (piece?.builder !== 'grid') throw new Error('The folder is a grid.');
    const columns = piece.columns.map((column) =>
      column.name === 'back' ? { ...column, size: 'inside width - 1 mm' } : column,
    );
    expect(changes({ pattern: { ...FOLDER, pieces: [{ ...piece, columns }] } })).toEqual([
      {
        title: 'Pieces',
        changes: [
          {
            where: 'Folder',
            before: 'columns, back, size: inside width',
            after: 'columns, back, size: inside width - 1 mm',
          },
        ],
      },
    ]);
  });
  it('shows live measures in text by their formulas, and the step that they stand in', () => {
    const writeUp = writeUpOf({
      type: 'step',
      attrs: { title: 'Cut the card', mark: '' } as never,
      content: [
        {
          type: 'paragraph',
          content: [
            { type: 'text', text: 'Cut exactly ' },
            { type: 'measure', attrs: { formula: 'blank width', bare: false } },
            { type: 'text', text: ' of card.' },
          ],
        },
        { type: 'pieceCard', attrs: { piece: 'Folder' } },
      ],
    });
    expect(changes({ writeUp })).toEqual([
      {
        title: 'Write-up',
        changes: [
          {
            where: 'Step 1, Cut the card',
            before: 'Cut the card\nCut [blank width] of card.\nFolder',
            after: 'Cut the card\nCut exactly [blank width] of card.\nFolder',
          },
        ],
      },
    ]);
  });
  it('tells a size in millimetres, and the usual one as usual', () => {
    expect(changes({ sizing: { ...AUTHORS_SIZE, values: { 'inside width': 101.6 } } })).toEqual([
      { title: 'Size shown first', changes: [{ where: 'inside width', before: 'usual', after: '101.6 mm' }] },
    ]);
  });
});

describe('words', () => {
  it('are told apart one by one, in order', () => {
    expect(wordRuns({ before: 'Fold it once.', after: 'Fold it twice.' })).toEqual([
      { kind: 'same', text: 'Fold it ' },
      { kind: 'gone', text: 'once' },
      { kind: 'new', text: 'twice' },
      { kind: 'same', text: '.' },
    ]);
  });
  it('of texts that have little in common are told whole, one after the other', () => {
    expect(wordRuns({ before: 'The folded box', after: 'A photo' })).toEqual([
      { kind: 'gone', text: 'The folded box' },
      { kind: 'same', text: '\n' },
      { kind: 'new', text: 'A photo' },
    ]);
  });
  it('put together again give both texts', () => {
    const [before, after] = ['Cut two strips of card, then score them.', 'Cut three strips of card, then fold them.'];
    const runs = wordRuns({ before, after });
    const side = (kind: string) =>
      runs.filter((run) => run.kind === 'same' || run.kind === kind).map((run) => run.text);
    expect([side('gone').join(''), side('new').join('')]).toEqual([before, after]);
  });
});
