import { describe, expect, it } from 'vitest';
import { explain, same, usualSizing, type Sizing } from '@/engine';
import { readSizing, slugOf, writeSizing } from '@/features/sizing/sizing-link';
import { SLUGS, inch, modelOf, sizingsOf } from '../engine/patterns';

const model = modelOf('book-box');
const usual: Sizing = { ...usualSizing(model), values: { circle: inch(4.5) } };
const read = (query: string) => readSizing(model, new URLSearchParams(query), usual);

describe('a sizing in an address', () => {
  it('reads values, units, grid and choices', () => {
    expect(read('inside-width=200mm&units=mm&cut=1mm&spine=straight').sizing).toEqual({
      values: { circle: inch(4.5), 'inside width': 200 },
      choices: { ...usual.choices, spine: 'straight' },
      units: 'mm',
      grid: '1mm',
    });
  });
  it('reads everything that people type for a length', () => {
    expect(read('inside-width=5+3/8').sizing.values['inside width']).toBe(inch(5.375));
    expect(read('inside-width=13.6+cm').sizing.values['inside width']).toBe(136);
    expect(read('inside-width=200&units=mm').sizing.values['inside width']).toBe(200);
  });
  it('takes the grid of the units when none is said', () => {
    expect([read('units=mm').sizing.grid, read('').sizing.grid, read('units=mm&cut=0.5mm').sizing.grid]).toEqual([
      '1mm',
      '1/16in',
      '0.5mm',
    ]);
  });
  it('keeps what it can read and says what it cannot', () => {
    const { sizing, faults } = read('inside-width=wide&inside-depth=2in&units=feet&spine=bent&cut=3mm&other=1');
    expect(sizing.values['inside depth']).toBe(inch(2));
    expect(faults.map((fault) => `${fault.where}: ${explain(fault)}`)).toEqual([
      'units: “feet”. It can be in or mm or cm.',
      'cut: “3mm”. Did you mean 1mm?',
      'inside width: “wide”. Write it like 5 3/8 in, 5.375 in, 136 mm or 13.6 cm.',
      'spine: “bent”. It can be curved or straight.',
    ]);
  });
  it('writes only what differs from the author’s size', () => {
    expect(writeSizing(model, usual, usual)).toBe('');
    expect(
      writeSizing(
        model,
        { ...usual, values: { ...usual.values, 'inside width': 200 }, units: 'mm', grid: '1mm' },
        usual,
      ),
    ).toBe('inside-width=200mm&units=mm');
    expect(writeSizing(model, { ...usual, values: { ...usual.values, 'inside width': inch(5.375) } }, usual)).toBe(
      'inside-width=5.375in',
    );
  });
  it('reads back every sizing that it writes', () => {
    for (const slug of SLUGS)
      for (const sizing of sizingsOf(modelOf(slug), 40, 13)) {
        const start = usualSizing(modelOf(slug));
        const back = readSizing(modelOf(slug), new URLSearchParams(writeSizing(modelOf(slug), sizing, start)), start);
        expect(back.faults).toEqual([]);
        expect({ ...back.sizing, values: {} }).toEqual({
          ...sizing,
          values: {},
          choices: { ...start.choices, ...sizing.choices },
        });
        for (const [name, value] of Object.entries(sizing.values))
          expect(same(back.sizing.values[name] ?? NaN, value), `${slug} ${name}`).toBe(true);
      }
  });
  it('makes slugs of names', () => {
    expect(slugOf('Inside  Width')).toBe('inside-width');
  });
});
