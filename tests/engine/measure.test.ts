import fc from 'fast-check';
import Fraction from 'fraction.js';
import { describe, expect, it } from 'vitest';
import { GRIDS, explain, readLength, roundTo, same, show, showValue, snap, type GridId } from '@/engine';
import { expectClose } from '../setup/expect-close';
import groups from '../reference/check-values.json' with { type: 'json' };

const mm = (text: string, units: 'in' | 'mm' | 'cm' = 'in'): number | string => {
  const read = readLength(text, { units });
  return read.ok ? read.value.mm : read.faults.map(explain).join(' ');
};

describe('readLength', () => {
  // 5 3/8 in = 5.375 × 25.4 mm = 136.525 mm
  it.each([
    '5 3/8',
    '5-3/8',
    '5⅜',
    '5.375',
    '5 3/8 in',
    '5 3/8"',
    '5 3⁄8 in',
    '5⅜ inches',
    'five and three eighths',
    'five and three-eighths inches',
    '5 and 3/8',
    '136.525 mm',
    '13.6525 cm',
    ' 5  3/8  IN ',
  ])('reads %s as five and three eighths of an inch', (text) => {
    expect(mm(text)).toBe(136.525);
  });
  it.each([
    ['7/8', 22.225],
    ['.5', 12.7],
    ['half', 12.7],
    ['half an inch', 12.7],
    ['an inch', 25.4],
    ['two and five eighths inches', 66.675],
    ['four and a half', 114.3],
    ['three quarters of an inch', 19.05],
    ['twenty-one', 533.4],
    ['a quarter', 6.35],
    ['1,5 cm', 15],
    ['0', 0],
    ['-1/2', -12.7],
  ])('reads %s as %d mm', (text, expected) => {
    expect(mm(text)).toBe(expected);
  });
  it('takes a bare number in the units it is told', () => {
    expect([mm('12', 'mm'), mm('12', 'cm'), mm('1 in', 'mm')]).toEqual([12, 120, 25.4]);
  });
  it.each([
    ['', 'Nothing. Type a length, such as 5 3/8 in or 136 mm.'],
    ['5 9/8', '“5 9/8”. After a whole number the fraction must be less than 1, and 9/8 is not.'],
    ['1/0', '“1/0”. A fraction cannot have 0 below the line.'],
    ['5 foo', '“foo” after the number. Write the unit as in, mm or cm.'],
    ['wide', '“wide”. Write it like 5 3/8 in, 5.375 in, 136 mm or 13.6 cm.'],
    ['2.5 1/4', '“2.5 1/4”. Write either a decimal or a fraction, not “2.5 1/4”.'],
    ['9999999', '“9999999”. Check the unit.'],
  ])('says what is wrong with “%s”', (text, sentence) => {
    expect(mm(text)).toBe(sentence);
  });
  it('reads every sixty-fourth exactly as fraction.js does', () => {
    for (let part = 1; part < 640; part += 1) {
      const exact = new Fraction(part, 64).mul(new Fraction(254, 10));
      expect(mm(`${Math.floor(part / 64)} ${part % 64}/64`)).toBe(exact.valueOf());
    }
  });
  it('reads back what it shows, for every length on a grid', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 4000 }),
        fc.constantFrom<GridId>('1/8in', '1/16in', '1/32in', '1mm', '0.5mm'),
        (steps, grid) => {
          const value = snap(steps * GRIDS[grid].step);
          const units = GRIDS[grid].unit;
          expect(mm(show(value, { units, grid }).text, units)).toBe(value);
          expect(mm(show(value, { units, grid }).typeset, units)).toBe(value);
        },
      ),
      { seed: 7, numRuns: 400 },
    );
  });
});

describe('show', () => {
  it.each([
    [60.325, 'in', '2 3/8 in', '2\u202f3\u20448\u00a0in', '2 and 3 eighths inches'],
    [12.7, 'in', '1/2 in', '1\u20442\u00a0in', '1 half of an inch'],
    [25.4, 'in', '1 in', '1\u00a0in', '1 inch'],
    [228.6, 'mm', '228.6 mm', '228.6\u00a0mm', '228.6 millimetres'],
    [228.6, 'cm', '22.86 cm', '22.86\u00a0cm', '22.86 centimetres'],
    [200, 'in', '7 7/8 in', '7\u202f7\u20448\u00a0in', '7 and 7 eighths inches'],
  ] as const)('shows %d mm in %s as a person reads the ruler', (value, units, text, typeset, spoken) => {
    expect(show(value, { units })).toEqual({ text, typeset, spoken });
  });
  it('keeps card thickness in millimetres when told so', () => {
    expect(show(0.3, { units: 'in', unit: 'mm' }).text).toBe('0.3 mm');
  });
  it('writes fractions reduced, with the sixty-fourths of the printed table', () => {
    const table = groups.find((group) => group.id === 'inch-64ths');
    // Source: N. Hawkins, Self-Help Mechanical Drawing (all 63 values); millimetres = k × 0.396875 exact.
    for (const { inputs, expected } of table?.cases ?? []) {
      const text = String((inputs as { fraction: { value: string } }).fraction.value);
      const { mm: millimetres } = expected as { mm: { value: number } };
      expect(show(millimetres.value, { units: 'in', grid: '1/32in', bare: true }).text).toBe(
        text === '64/64' || text === '1' ? '1' : text,
      );
    }
  });
  it('shows areas, angles and numbers', () => {
    expect(showValue(645.16, 'area', { units: 'in' }).text).toBe('1 sq in');
    expect(showValue(36.87, 'angle', { units: 'in' }).text).toBe('36.9°');
    expect(showValue(9, 'whole number', { units: 'mm' }).text).toBe('9');
  });
});

describe('rounding to a cut grid', () => {
  it('rounds 2.0944 in to 2 1/8 at sixteenths (common practice, no source)', () => {
    expect(roundTo(2.0944 * 25.4, GRIDS['1/16in'].step, 'nearest')).toBe(53.975);
  });
  it('takes a tie upwards, as rule B of ISO 80000-1 Annex B (the reference values’ half_up)', () => {
    const group = groups.find((one) => one.id === 'round-to-fraction');
    for (const one of group?.cases ?? []) {
      const { length, denominator } = one.inputs as { length: { value: number }; denominator: { value: number } };
      const { half_up: expected } = (one as { expected_decimal: { half_up: number } }).expected_decimal;
      const rounded = roundTo(length.value * 25.4, 25.4 / denominator.value, 'nearest');
      expectClose(rounded / 25.4, expected, 1e-9, `${length.value} at 1/${denominator.value}`);
    }
    expect(group?.cases.length).toBeGreaterThan(20);
  });
  it('rounds up and down to whole steps, and leaves what lies on the grid', () => {
    const { step } = GRIDS['1mm'];
    expect([
      roundTo(10.1, step, 'up'),
      roundTo(10.9, step, 'down'),
      roundTo(10, step, 'up'),
      roundTo(10 + 1e-9, step, 'up'),
    ]).toEqual([11, 10, 10, 10]);
    expect(roundTo(0.3, step, 'exact')).toBe(0.3);
  });
  it('gives whole steps and never moves further than one', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 500, noNaN: true }),
        fc.constantFrom('nearest', 'up', 'down'),
        fc.constantFrom<GridId>('1/8in', '1/16in', '1/32in', '1mm', '0.5mm'),
        (value, rounding, grid) => {
          const { step } = GRIDS[grid];
          const rounded = roundTo(value, step, rounding as 'nearest');
          expect(same(snap(Math.round(rounded / step) * step), rounded)).toBe(true);
          expectClose(rounded, value, rounding === 'nearest' ? step / 2 + 1e-6 : step);
        },
      ),
      { seed: 11, numRuns: 500 },
    );
  });
  it('has the exact inch: 25.4 mm (international yard and pound agreement, 1959)', () => {
    expect(mm('1 in')).toBe(25.4);
  });
});
