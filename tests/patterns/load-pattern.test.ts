import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { PatternFileError, loadPattern } from '@/features/patterns/load-pattern';

const text = readFileSync(join(import.meta.dirname, '../../content/patterns/tray.json'), 'utf8');
function messageOf(changed: string): string {
  try {
    loadPattern('content/patterns/tray.json', changed);
    return '';
  } catch (error) {
    return error instanceof PatternFileError ? error.message : String(error);
  }
}
/** As far as these tests spoil it; fields are taken out and misspelt on purpose. */
interface Spoilt {
  slug: string;
  group?: string;
  measures: { name: string; formula?: string }[];
  pieces: { colums?: unknown; cells: string[][]; tabs: { cells: string[] }[] }[];
  fits: { left: string }[];
}
const changedBy = (change: (pattern: Spoilt) => void): string => {
  const pattern = JSON.parse(text) as Spoilt;
  change(pattern);
  return messageOf(JSON.stringify(pattern));
};

describe('a pattern file', () => {
  it('loads when it is sound', () => {
    expect(loadPattern('content/patterns/tray.json', text).model.pieces.map(({ def }) => def.name)).toContain('Tray');
  });
  it.each<[string, string, string]>([
    [
      'a formula with an unknown name',
      changedBy((p) => {
        p.measures.find(({ name }) => name === 'corner tab')!.formula = 'min(inside hight, inside length)';
      }),
      'measure “corner tab”: No measure is called “inside hight”. The nearest name is “inside height”.',
    ],
    [
      'a field that we do not know',
      changedBy((p) => {
        p.pieces[0]!.colums = [];
      }),
      'pieces → 1: A field called “colums”. The nearest is “columns”.',
    ],
    [
      'a missing field',
      changedBy((p) => {
        delete p.group;
      }),
      'group: Nothing. Add it.',
    ],
    [
      'a row with too few cells',
      changedBy((p) => {
        p.pieces[0]!.cells[1]!.pop();
      }),
      'piece “Tray”, row 2: 2 cells. Give every row one cell for every column.',
    ],
    [
      'a cell of no kind',
      changedBy((p) => {
        p.pieces[0]!.cells[1]![1] = 'flor floor';
      }),
      'piece “Tray”, row 2, column 2: The cell “flor floor”. Write it like “panel floor” or “tab left on floor”.',
    ],
    [
      'a tab shape for no cell',
      changedBy((p) => {
        p.pieces[0]!.tabs[0]!.cells = ['cornr 1'];
      }),
      'piece “Tray”, tabs 1: No cell is called “cornr 1”. The nearest name is “corner 1”.',
    ],
    [
      'a name that is used twice',
      changedBy((p) => {
        p.measures[1]!.name = 'inside length';
      }),
      'measure “inside length”: Two things are called “inside length”. Rename one of them.',
    ],
    [
      'another slug than the file',
      changedBy((p) => {
        p.slug = 'dish';
      }),
      'slug: “dish”. Write “tray”, or rename the file.',
    ],
    ['broken JSON', messageOf(`${text.slice(0, 300)}`), 'the file: '],
  ])('with %s is refused by file, place and cure', (_, message, line) => {
    expect(message.startsWith('content/patterns/tray.json cannot be used:\n')).toBe(true);
    expect(message).toContain(`  ${line}`);
  });
  it('reports every fault at once', () => {
    const message = changedBy((p) => {
      p.measures[4]!.formula = 'nothing';
      p.fits[0]!.left = 'inside length + 2';
    });
    expect(message.split('\n')).toHaveLength(3);
  });
});
