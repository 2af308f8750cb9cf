import { describe, expect, it } from 'vitest';
import { planSheets, STOCKS } from '@/engine';
import { cutFromKey, planOptions, readCutFrom, USUAL_CUT_FROM, type CutFrom } from '@/features/sheets/cut-from';

const read = (query: string, before?: CutFrom) =>
  readCutFrom(new URLSearchParams(query), { units: 'in', ...(before ? { before } : {}) });

describe('what a box is cut from, in an address', () => {
  it('is one box from scrapbook squares, up to the edge, when nothing is said', () => {
    expect(read('')).toEqual({ value: USUAL_CUT_FROM, typed: {} });
    expect(cutFromKey(USUAL_CUT_FROM)).toBe('');
  });

  it('reads back as it was written', () => {
    const query = 'card=a4-long&patterned-paper=6x6in&sheet-margin=3mm&copies=4&join=cover&join=lower-spine';
    const { value, typed } = read(query);
    expect(typed).toEqual({});
    expect(value).toMatchObject({
      stock: { id: 'a4-long', grain: 'along' },
      others: { 'patterned paper': STOCKS['6x6in'] },
      margin: 3,
      copies: 4,
      join: ['cover', 'lower-spine'],
    });
    expect(cutFromKey(value)).toBe(query);
    expect(read(cutFromKey(value)).value).toEqual(value);
  });

  it('takes a border without a unit in the reader’s units', () => {
    // 1/4 in = 6.35 mm (25.4 mm an inch).
    expect(read('sheet-margin=1/4').value.margin).toBe(6.35);
    expect(readCutFrom(new URLSearchParams('sheet-margin=5'), { units: 'mm' }).value.margin).toBe(5);
  });

  it.each([
    ['card=b5', 'card'],
    ['greyboard=thick', 'greyboard'],
    ['sheet-margin=wide', 'sheet-margin'],
    ['sheet-margin=-1', 'sheet-margin'],
    ['sheet-margin=3in', 'sheet-margin'],
    ['copies=0', 'copies'],
    ['copies=13', 'copies'],
    ['copies=1.5', 'copies'],
  ])('says what does not read of ?%s, and keeps the usual in its place', (query, field) => {
    const { value, typed } = read(query);
    expect(Object.keys(typed)).toEqual([field]);
    expect(value).toEqual(USUAL_CUT_FROM);
  });
});

describe('the form', () => {
  const drawn: CutFrom = { ...USUAL_CUT_FROM, margin: 3, join: ['cover'] };

  it('keeps an exact border that its field could only say roughly', () => {
    // 3 mm are nearly 1/8 in, and so the field says.
    expect(read('card=12x12in&sheet-margin=1/8&copies=2', drawn).value).toEqual({ ...drawn, copies: 2 });
    expect(read('sheet-margin=', drawn).value.margin).toBe(0);
  });

  it('changes the grain where it was changed, and lets another sheet have its own', () => {
    const long = read('card=a4&grain=long').value;
    expect(long.stock.id).toBe('a4-long');
    expect(read('card=a4-long&grain=', long).value.stock.id).toBe('a4');
    expect(read('card=letter&grain=long', long).value.stock.id).toBe('letter');
    expect(read('card=letter-short&grain=long', long).value.stock.id).toBe('letter-short');
  });

  it('takes sheets of another material back', () => {
    const own = read('greyboard=a3').value;
    expect(own.others).toEqual({ greyboard: STOCKS.a3 });
    expect(read('greyboard=', own).value.others).toEqual({});
  });
});

describe('the plan', () => {
  const pieces = [
    { name: 'Base', count: 1, across: 200, along: 100, stock: 'card' as const },
    { name: 'Layer', count: 1, across: 100, along: 100, stock: 'patterned paper' as const },
  ];

  it('heeds the border, counts all boxes and takes each material from its own sheets', () => {
    const { value } = read('card=210x120mm&patterned-paper=6x6in&sheet-margin=5mm&copies=2');
    // Within 5 mm, 210 × 120 mm leave 200 × 110: one base a sheet. One layer of 100 mm a square of 152.4 − 10 mm.
    const plan = planSheets({ pieces }, planOptions(value, pieces));
    expect(plan.takes.map(({ material, stock, used }) => [material, stock.id, used])).toEqual([
      ['card', '210x120mm', 2],
      ['patterned paper', '6x6in', 2],
    ]);
  });

  it('knows the pieces to be joined by their names in links', () => {
    const named = [{ name: 'Cover' }, { name: 'Lower spine' }, { name: 'Lid' }];
    expect(planOptions(read('join=lower-spine&join=nothing').value, named).join).toEqual(['Lower spine']);
  });
});
