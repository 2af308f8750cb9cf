import { describe, expect, it } from 'vitest';
import { STOCKS } from '@/engine';
import { haveWords, merged, readKept, withMore } from '@/features/sheets/my-sheets';
import { editorHtml, stockOptionsHtml } from '@/features/sheets/my-sheets-html';
import { changeSheets } from '@/features/sheets/sheet-form';
import { keepSheets, keptSheets } from '@/features/sheets/sheet-keeper';
import { mySheetsSchema } from '@/features/sheets/sheets-schema';
import { readStock } from '@/features/sheets/stock-link';

const A4 = { card: 'a4', count: 20 };
const SQUARE = { card: '12x12in', count: 5 };
const form = (fields: Record<string, string>) => (name: string) => fields[name] ?? '';
const faultsOf = (outcome: ReturnType<typeof changeSheets>) => (outcome.ok ? {} : outcome.faults);

describe('the form of one’s sheets', () => {
  it('adds a size that is sold, with its grain', () => {
    expect(changeSheets([A4], form({ do: 'add', size: '12x12in', count: '5', grain: 'long' }))).toEqual({
      ok: true,
      done: 'added',
      sheets: [A4, { card: '12x12in-long', count: 5 }],
    });
  });

  it('adds a size of one’s own in whatever is typed for its sides', () => {
    const outcome = changeSheets(
      [],
      form({ do: 'add', size: 'own', across: '8 1/2', along: '330.2 mm', unit: 'in', count: '3' }),
    );
    expect(outcome).toMatchObject({ ok: true, sheets: [{ card: '8.5x13in', count: 3 }] });
  });

  it('counts more of a size to those that are there', () => {
    expect(withMore([A4, SQUARE], { card: 'a4', count: 3 })).toEqual([{ card: 'a4', count: 23 }, SQUARE]);
  });

  it('says what is wrong with a senseless size or number, at its field', () => {
    expect(
      faultsOf(changeSheets([], form({ do: 'add', size: 'own', across: '', along: 'wide', unit: 'cm', count: '0' }))),
    ).toEqual({
      count: '“0” is no number of sheets. Write a whole number from 1 to 999, or remove the size.',
      across: 'Say how long this side is.',
      along: '“wide” does not read as a length. Write it like 8 1/2 or 21.6 cm.',
    });
    expect(faultsOf(changeSheets([], form({ do: 'add', size: 'own', across: '1', along: '90', unit: 'in' })))).toEqual({
      across: 'A side of a sheet is from 50 mm (about 2 in) to 1500 mm (about 59 in).',
      along: 'A side of a sheet is from 50 mm (about 2 in) to 1500 mm (about 59 in).',
    });
    expect(faultsOf(changeSheets([], form({ do: 'add', size: 'tabloid' })))).toEqual({
      size: 'Choose a size from the list.',
    });
  });

  it('has room for twelve sizes', () => {
    const twelve = Array.from({ length: 12 }, (_, i) => ({ card: `${10 + i}x30in`, count: 1 }));
    expect(faultsOf(changeSheets(twelve, form({ do: 'add', size: 'a4' })))).toHaveProperty('size');
    expect(
      changeSheets(twelve, form({ do: 'add', size: 'own', across: '10', along: '30', unit: 'in', count: '2' })),
    ).toMatchObject({
      ok: true,
    });
  });

  it('keeps new numbers, all or none, and removes a size', () => {
    expect(changeSheets([A4, SQUARE], form({ do: 'keep', 'count-a4': '7', 'count-12x12in': '' }))).toMatchObject({
      sheets: [{ card: 'a4', count: 7 }, SQUARE],
    });
    expect(
      faultsOf(changeSheets([A4, SQUARE], form({ do: 'keep', 'count-a4': '7', 'count-12x12in': 'many' }))),
    ).toEqual({
      'count-12x12in': '“many” is no number of sheets. Write a whole number from 1 to 999, or remove the size.',
    });
    expect(changeSheets([A4, SQUARE], form({ remove: 'a4' }))).toMatchObject({ sheets: [SQUARE] });
  });
});

describe('what a browser keeps', () => {
  const place = (text: string | null) => {
    const kept = new Map(text === null ? [] : [['foldwright:my-sheets', text]]);
    return {
      getItem: (key: string) => kept.get(key) ?? null,
      setItem: (key: string, value: string) => void kept.set(key, value),
      removeItem: (key: string) => void kept.delete(key),
    };
  };

  it('is read back as it was kept, and an empty list leaves nothing behind', () => {
    const storage = place(null);
    expect(keepSheets([A4, SQUARE], () => storage)).toBe(true);
    expect(keptSheets(() => storage)).toEqual([A4, SQUARE]);
    keepSheets([], () => storage);
    expect(storage.getItem('foldwright:my-sheets')).toBeNull();
  });

  it('is nothing where it does not read or the browser lets nobody look', () => {
    expect(keptSheets(() => place('{cut'))).toEqual([]);
    const closed = () => {
      throw new Error('denied');
    };
    expect(keptSheets(closed)).toEqual([]);
    expect(keepSheets([A4], closed)).toBe(false);
  });

  it('loses only the entries that do not read', () => {
    expect(
      readKept([A4, null, { card: 'a4', count: 1 }, { card: 'nothing', count: 1 }, { card: 'a3', count: 0.5 }, SQUARE]),
    ).toEqual([A4, SQUARE]);
    expect(readKept({ sheets: [A4] })).toEqual([]);
  });
});

describe('two lists', () => {
  it('become one: a size in both is one pile, of the larger number', () => {
    expect(
      merged(
        [A4, SQUARE],
        [
          { card: 'a4', count: 30 },
          { card: '12x12in', count: 1 },
          { card: 'a3', count: 4 },
        ],
      ),
    ).toEqual([{ card: 'a4', count: 30 }, SQUARE, { card: 'a3', count: 4 }]);
  });

  it('are the same merged twice as once', () => {
    const once = merged([A4], [SQUARE]);
    expect(merged(once, [SQUARE])).toEqual(once);
  });
});

describe('the schema of a list', () => {
  const reads = (sheets: unknown) => mySheetsSchema.safeParse({ sheets }).success;

  it('takes sheets however their size is written, and keeps their one name', () => {
    expect(mySheetsSchema.parse({ sheets: [{ card: '8.5x11in', count: 3 }] })).toEqual({
      sheets: [{ card: 'letter', count: 3 }],
    });
  });

  it.each([
    ['a sheet that is none', [{ card: 'tabloid', count: 1 }]],
    ['a side that is too long', [{ card: '10x90in', count: 1 }]],
    ['no sheets of a size', [{ card: 'a4', count: 0 }]],
    ['a part of a sheet', [{ card: 'a4', count: 1.5 }]],
    ['more than anybody has', [{ card: 'a4', count: 1000 }]],
    ['a size twice', [A4, { card: '21x29.7cm', count: 1 }]],
    ['thirteen sizes', Array.from({ length: 13 }, (_, i) => ({ card: `${10 + i}x30in`, count: 1 }))],
    ['a field that is not asked for', [{ ...A4, owner: 'x' }]],
  ])('refuses %s', (_, sheets) => expect(reads(sheets)).toBe(false));

  it('takes none, and twelve', () => {
    expect(reads([])).toBe(true);
    expect(reads(Array.from({ length: 12 }, (_, i) => ({ card: `${10 + i}x30in`, count: 999 })))).toBe(true);
  });
});

describe('what is said of one’s sheets', () => {
  const plan = (used: number) => ({
    stock: STOCKS.a4,
    takes: [
      { material: 'card' as const, stock: STOCKS.a4, used },
      // Paper comes from another pile.
      { material: 'patterned paper' as const, stock: STOCKS.a4, used: 90 },
    ],
    tooLarge: [],
  });

  it('is how many of them a box takes, or how many are missing', () => {
    expect(haveWords(plan(20), [A4])).toBe('20 of your A4 sheets');
    expect(haveWords(plan(21), [A4])).toBe('needs 21 sheets of A4, you have 20');
    expect(haveWords(plan(2), [SQUARE])).toBe('');
  });

  it('one’s own come first in the list to choose from, each size once', () => {
    const html = stockOptionsHtml([{ card: '8.5x13in', count: 4 }, A4], STOCKS.a4);
    const values = [...html.matchAll(/value="([^"]+)"/g)].map(([, value]) => value);
    expect(values.slice(0, 3)).toEqual(['8.5x13in', 'a4', '12x12in']);
    expect(values.filter((value) => value === 'a4')).toHaveLength(1);
    expect(html).toContain('value="a4" selected');
  });

  it('a sheet that came with a link stands in the list too', () => {
    expect(stockOptionsHtml([], readStock('10x20in')!)).toMatch(/^<option value="10x20in" selected>/);
  });

  it('what was typed is shown again, escaped', () => {
    const html = editorHtml({
      sheets: [],
      faults: { across: '“<b>” is no length' },
      typed: { across: '"><b>', size: 'own' },
    });
    expect(html).toContain('value="&quot;&gt;&lt;b&gt;"');
    expect(html).not.toContain('<b>” is');
  });
});
