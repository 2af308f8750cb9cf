import { describe, expect, it } from 'vitest';
import { expectClose } from '../setup/expect-close';
import { figuresOf, inch, modelOf } from './patterns';

const LAYERS = { choices: { layers: 'every outer face' } };

describe('what a box takes', () => {
  it('is, for a tray of 9 × 6 × 1 1/4 in, card without the corners’ bevels and four tabs of glue', () => {
    const { materials } = figuresOf(modelOf('tray'), { 'card thickness': 0 });
    // The corner tabs are 1 1/4 in wide and deep; each end leans in by the taper, 1 1/4 / 8 rounded to 3/16 in (tie up: 2.5
    // sixteenths), so two triangles of 3/16 × 1 1/4 / 2 fall off each. Each hangs on a fold of 1 1/4 in.
    const blank = 11.5 * 8.5;
    const bevels = 4 * 2 * ((3 / 16) * 1.25) * 0.5;
    expect(materials.stocks.map(({ stock }) => stock)).toEqual(['card']);
    expectClose(materials.stocks[0]?.area ?? NaN, (blank - bevels) * 25.4 ** 2, 1e-3);
    expectClose(materials.seams, inch(4 * 1.25), 1e-6);
    expect([materials.glued, materials.extras]).toEqual([0, []]);
  });
  it('counts layers as paper, glued all over', () => {
    const { materials } = figuresOf(modelOf('tray'), {}, LAYERS);
    // 1/8 in less on every side of 9 × 1 1/4 and of 6 × 1 1/4 in, two of each.
    const paper = 2 * (8.75 * 1 + 5.75 * 1) * 25.4 ** 2;
    expect(materials.stocks.map(({ stock }) => stock)).toEqual(['card', 'patterned paper']);
    expectClose(materials.stocks[1]?.area ?? NaN, paper, 1e-3);
    expectClose(materials.glued, paper, 1e-3);
  });
  it('is, for a book with a straight spine, its tabs and its ribbon', () => {
    const choices = {
      spine: 'straight',
      lid: 'flip',
      'lid sides': 'plain',
      'pull ribbon': 'through the lid',
      layers: 'none',
    };
    const { materials } = figuresOf(modelOf('book-box'), {}, { choices });
    // Inside 9 × 6 × 2 1/4 in, lid drop 1 1/2 in. Fore edge 2 × 9; floor 2 × 6 and its end 2 1/4; lower spine 2 × 7 1/2 and
    // its foot 2 1/4; lid: end and tail 2 × (2 1/4 − 1/16).
    expectClose(materials.seams, inch(18 + 12 + 2.25 + 15 + 2.25 + 2 * (2.25 - 1 / 16)), 1e-6);
    // Two turned-back ends of 15 mm and a pull of 2 in.
    expect(materials.extras).toEqual([{ name: 'ribbon', kind: 'length', value: 2 * 15 + 50.8 }]);
  });
  it('names what the pattern names, as its choices ask for it', () => {
    const extras = (slug: string, choices: Record<string, string> = {}) =>
      figuresOf(modelOf(slug), {}, { choices }).materials.extras;
    expect(extras('drawer-chest').map(({ name, kind }) => [name, kind])).toEqual([['knobs', 'whole number']]);
    expect(extras('book-box')).toEqual([]);
    expect(extras('gable-carton', { window: 'in the front' }).map(({ name, kind }) => [name, kind])).toEqual([
      ['clear film', 'area'],
    ]);
  });
});
