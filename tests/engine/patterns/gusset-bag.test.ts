import { describe, expect, it } from 'vitest';
import { instructionsOf, say, type Figures, type Point, type Sizing } from '@/engine';
import { dot, minus, size, type Vector } from '@/engine/space';
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';
import { inSpace, meeting, reach, worstFold } from './folded-net';

const model = modelOf('gusset-bag');
const METRIC = { units: 'mm', grid: '0.5mm' } as const satisfies Partial<Sizing>;
/** A bag 150 × 80 × 200 mm, turned down by 30, tabs of 12. */
const bag = (base: string, answers: Readonly<Record<string, number>> = {}, handles = 'round holes'): Figures =>
  figuresOf(
    model,
    { width: 150, depth: 80, height: 200, 'turn down': 30, tab: 12, 'card thickness': 0, ...answers },
    { ...METRIC, choices: { base, handles } },
  );
const BASES = ['block folded', 'glued'];
const middle = (loop: readonly { readonly from: Point; readonly to: Point }[]): Point => ({
  x: loop.reduce((sum, { from }) => sum + from.x, 0) / loop.length,
  y: loop.reduce((sum, { from }) => sum + from.y, 0) / loop.length,
});

describe('the flat bag', () => {
  it.each(BASES)('has the sizes of the example worked by hand, base %s (derived)', (base) => {
    const figures = bag(base);
    const piece = pieceOf(figures, 'Bag');
    expect(figures.problems).toEqual([]);
    // Base flap 80 / 2 + 12 / 2; across 12 + 2 × (150 + 80); along 30 + 200 + 46.
    expect(figures.measures.find(({ name }) => name === 'base flap')?.cut).toBe(46);
    expect([piece.across, piece.along]).toEqual([472, 276]);
    expect(piece.scores).toEqual({ across: [12, 162, 242, 392], along: [30, 230] });
  });
  it('makes the last gusset a card’s thickness narrower (derived)', () => {
    // 12 + 2 × (150 + 80) − 0.3
    expectClose(pieceOf(bag('glued', { 'card thickness': 0.3 }), 'Bag').across, 471.7, 1e-9);
  });
  it('parts the ears of a block base off along 45° lines that start in the corners', () => {
    const { net } = pieceOf(bag('block folded'), 'Bag');
    const fold = net.folds.find(({ panels }) => panels.includes('front left ear') && panels.includes('front base'));
    const ends = [fold?.curve.from, fold?.curve.to].sort((a, b) => (a?.x ?? 0) - (b?.x ?? 0));
    // From the corner (12, 30 + 200) to 46 right and 46 down of it.
    expect(ends).toEqual([
      { x: 12, y: 230 },
      { x: 58, y: 276 },
    ]);
    expect(fold).toMatchObject({ kind: 'valley', angle: 180 });
  });
  it('slits a glued base into four flaps and ends the tab at the base line', () => {
    const { net } = pieceOf(bag('glued'), 'Bag');
    const slits = net.slits.map(({ from, to }) => [from.x, Math.abs(to.y - from.y)]);
    // Three lines between four flaps, each 46 deep.
    expect(slits.sort(([a = 0], [b = 0]) => a - b)).toEqual([
      [162, 46],
      [242, 46],
      [392, 46],
    ]);
    expect(net.panels.some(({ name }) => name === 'seam foot')).toBe(false);
  });
  it('says every crease of the gusset', () => {
    const lines = instructionsOf(pieceOf(bag('block folded'), 'Bag')).map((line) => say(line, METRIC));
    // The base line lies 30 + 200 down; the folds meet in the middle of the gusset, 40 mm above it.
    expect(lines.join(' ')).toContain('242 across, 230 down, to 202 across, 190 down, on to 162 across, 230 down');
  });
  it('takes no holes when none are wanted', () => {
    expect(pieceOf(bag('glued', {}, 'none'), 'Bag').net.holes).toHaveLength(0);
    expect(pieceOf(bag('glued'), 'Bag').net.holes).toHaveLength(8);
  });
});

describe('the standing bag', () => {
  it.each(BASES)('closes at every fold and at the seam, base %s', (base) => {
    const { net } = pieceOf(bag(base), 'Bag');
    const space = inSpace(net, 'front');
    expectClose(worstFold(net, space), 0, 1e-6, 'rings of folds');
    for (const { angle, panels } of net.folds) {
      const [a, b] = panels.map((name) => space.panels.get(name)?.inside) as [Vector, Vector];
      expectClose(dot(a, b), Math.cos((angle * Math.PI) / 180), 1e-9, panels.join(' and '));
    }
    expect(meeting(space.panels.get('front'), space.panels.get('second gusset'))).toBe(2);
    const plane = reach(space.panels.get('second gusset'), 'x');
    for (const x of reach(space.panels.get('seam'), 'x')) expectClose(x, plane[0], 1e-6, 'seam tab on the gusset');
  });
  it.each(BASES)(
    'has a flat base of width by depth without a hole, flaps over one another by the tab, base %s',
    (base) => {
      const { net } = pieceOf(bag(base), 'Bag');
      const { panels } = inSpace(net, 'front');
      for (const name of ['front base', 'back base', 'first side base', 'second side base']) {
        const panel = panels.get(name);
        for (const y of reach(panel, 'y')) expectClose(y, -200, 1e-6, `${name} in the plane of the base`);
        expect(reach(panel, 'x')[0], name).toBeGreaterThan(-1e-6);
        expect(reach(panel, 'x')[1], name).toBeLessThan(150 + 1e-6);
        expect(reach(panel, 'z')[0], name).toBeGreaterThan(-1e-6);
        expect(reach(panel, 'z')[1], name).toBeLessThan(80 + 1e-6);
      }
      // 46 + 46 − 80 = 12
      expectClose(reach(panels.get('front base'), 'z')[1] - reach(panels.get('back base'), 'z')[0], 12, 1e-6);
      expectClose(reach(panels.get('front base'), 'z')[0], 0, 1e-6);
      expectClose(reach(panels.get('back base'), 'z')[1], 80, 1e-6);
    },
  );
  it('carries the tab of a block base on under the last side flap', () => {
    const { net } = pieceOf(bag('block folded'), 'Bag');
    const { panels } = inSpace(net, 'front');
    for (const y of reach(panels.get('seam foot'), 'y')) expectClose(y, -200, 1e-6);
    expectClose(reach(panels.get('seam foot'), 'z')[1], 12, 1e-6);
  });
  it('brings the holes of both layers together, and the turned edge against the wall', () => {
    const { net } = pieceOf(bag('block folded'), 'Bag');
    const { panels, at } = inSpace(net, 'front');
    for (const wall of ['front', 'back']) {
      const z = reach(panels.get(wall), 'z')[0];
      for (const one of reach(panels.get(`${wall} hem`), 'z')) expectClose(one, z, 1e-6);
      const inPanel = (name: string): Vector[] => {
        const xs = net.panels.find((panel) => panel.name === name)?.loop.map(({ from }) => from) ?? [];
        const [left, right] = [Math.min(...xs.map(({ x }) => x)), Math.max(...xs.map(({ x }) => x))];
        const [top, bottom] = [Math.min(...xs.map(({ y }) => y)), Math.max(...xs.map(({ y }) => y))];
        return net.holes
          .map(middle)
          .filter(({ x, y }) => x > left && x < right && y > top && y < bottom)
          .map((point) => at(name, point));
      };
      const [outer, inner] = [inPanel(wall), inPanel(`${wall} hem`)];
      expect(outer).toHaveLength(2);
      for (const hole of outer) expect(Math.min(...inner.map((other) => size(minus(hole, other))))).toBeLessThan(1e-6);
    }
  });
  it('closes at the narrowest that a block base is asked, where its 45° lines almost meet (derived)', () => {
    // 80 + 12 + 6.35 = 98.35: at 0.5 mm from 98.5 on.
    const { net } = pieceOf(bag('block folded', { width: 98.5, 'handle spread': 40 }), 'Bag');
    expectClose(worstFold(net, inSpace(net, 'front')), 0, 1e-6);
  });
});

describe('what does not work', () => {
  const fit = (figures: Figures, name: string) => figures.fits.find((one) => one.name === name)?.holds;
  it('is a block base deeper than width less tab, with the deepest that works', () => {
    const answers = { width: inch(3), depth: inch(2.75), tab: inch(0.5), 'handle spread': inch(1) };
    const figures = figuresOf(model, answers);
    // 2 3/4 + 1/2 > 3; asked up to 3 − 1/2 − 1/4 = 2 1/4.
    expect(fit(figures, 'folds at 45° stay clear of each other')).toBe(false);
    expect(figures.problems[0]).toMatchObject({ code: 'above range', measure: 'depth', nearest: inch(2.25) });
    const glued = figuresOf(model, answers, { choices: { base: 'glued' } });
    expect(glued.problems).toEqual([]);
  });
  it('is a tab over the middle of the gusset', () => {
    const figures = figuresOf(model, { depth: inch(1.375), tab: inch(0.75) });
    expect(fit(figures, 'tab stays before the gusset’s middle')).toBe(false);
    // 1 3/8 / 2 − 1/8 = 9/16
    expect(figures.problems[0]).toMatchObject({ code: 'above range', measure: 'tab', nearest: inch(9 / 16) });
  });
  it('is a hole too near to a corner', () => {
    const figures = figuresOf(model, { width: inch(5), 'handle spread': inch(4.5), 'hole diameter': inch(0.25) });
    expect(fit(figures, 'holes stay clear of the folds')).toBe(false);
    // 5 − 1/4 − 3/4
    expect(figures.problems[0]).toMatchObject({ measure: 'handle spread', nearest: inch(4) });
  });
  it('only advises against thick card in a block base', () => {
    const figures = bag('block folded', { 'card thickness': 0.5 });
    expect(fit(figures, 'card bends round four layers')).toBe(false);
    expect(figures.problems).toEqual([]);
  });
});
