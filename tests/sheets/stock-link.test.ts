import { describe, expect, it } from 'vitest';
import { STOCKS } from '@/engine';
import { planOn, readStock, stockWords } from '@/features/sheets/stock-link';

describe('a sheet in an address', () => {
  it('goes by its name when it is sold everywhere, in capitals or not', () => {
    expect(readStock('a4')).toEqual(STOCKS.a4);
    expect(readStock(' A4 ')).toEqual(STOCKS.a4);
  });

  it('may be a size of one’s own, in inches, millimetres or centimetres', () => {
    // 8.5 in = 215.9 mm, 13 in = 330.2 mm (25.4 mm an inch).
    expect(readStock('8.5x13in')).toEqual({
      id: '8.5x13in',
      name: '8\u202f1\u20442 × 13\u00a0in',
      across: 215.9,
      along: 330.2,
    });
    expect(readStock('200x300mm')).toMatchObject({ name: '200 × 300\u00a0mm', across: 200, along: 300 });
    expect(readStock('32.5x45cm')).toMatchObject({ id: '32.5x45cm', across: 325, along: 450 });
  });

  it('is the sheet that is sold when it has its size', () => {
    // Letter is 8 1/2 × 11 in (ANSI/ASME Y14.1), A4 210 × 297 mm (ISO 216).
    expect(readStock('8.5x11in')?.id).toBe('letter');
    expect(readStock('21x29.7cm')?.id).toBe('a4');
  });

  it('is written one way, however it was typed', () => {
    expect(readStock('8.50x013.0in')?.id).toBe('8.5x13in');
    expect(readStock('8.5X13IN-LONG')?.id).toBe('8.5x13in-long');
  });

  it.each([
    '',
    'a5',
    '8.5x11',
    '8.5x11ft',
    '0x11in',
    '1x11in',
    '60x11in',
    '-8x11in',
    '8.5x13in-wide',
    '8x8xin',
    '1e3x9in',
  ])('“%s” is none', (text) => expect(readStock(text)).toBeNull());

  it('takes sides from 50 to 1500 mm', () => {
    expect([readStock('50x1500mm'), readStock('49.9x1500mm'), readStock('50x1500.1mm')].map(Boolean)).toEqual([
      true,
      false,
      false,
    ]);
  });
});

describe('the grain of a sheet', () => {
  it('runs along the long or the short side, whichever way the sheet is written', () => {
    expect(readStock('a4-long')?.grain).toBe('along');
    expect(readStock('a4-short')?.grain).toBe('across');
    expect(readStock('13x8.5in-long')?.grain).toBe('across');
    expect(readStock('a4')?.grain).toBeUndefined();
  });

  it('is heeded by the plan only where it is said', () => {
    expect(planOn(readStock('a4-long')!).folds).toBe('along the grain');
    expect(planOn(readStock('a4')!).folds).toBe('either');
  });

  it('tells sheets of one size apart', () => {
    expect(stockWords(readStock('a4-short')!)).toBe('A4, grain along the short side');
  });
});
