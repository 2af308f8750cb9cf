import { describe, expect, it } from 'vitest';
import { GRIDS, instructionsOf, say, snap, type Placement, type Sizing } from '@/engine';
import { foldNet, vector, type FoldedPanel } from '@/engine/space';
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf, sizingsOf } from '../patterns';

const model = modelOf('drawer-chest');
const METRIC: Partial<Sizing> = { units: 'mm', grid: '0.5mm' };
/** Every figure lies on the half-millimetre grid, so that nothing is rounded and exact sums can be compared. */
const PLAIN = {
  'inside length': 90,
  'inside width': 100,
  'inside height': 25,
  'card thickness': 0.5,
  play: 1.5,
  tab: 12,
};
const cut = (figures: ReturnType<typeof figuresOf>, name: string) =>
  figures.measures.find((measure) => measure.name === name)?.cut;
const extent = (panels: readonly FoldedPanel[], axis: 'x' | 'y' | 'z') => {
  const values = panels.flatMap((panel) => panel.points.map((point) => point[axis]));
  return [Math.min(...values), Math.max(...values)] as const;
};

describe('drawer-chest', () => {
  it('stacks drawers, shelves and the tabs they run on up to the carcass (derived)', () => {
    const figures = figuresOf(model, { ...PLAIN, drawers: 4 }, METRIC);
    expect(figures.problems).toEqual([]);
    // Outside: 90 + 2 × 0.5 = 91 long, 100 + 4 × 0.5 = 102 wide, 25 + 0.5 = 25.5 tall; a cell has the play more.
    expect(cut(figures, 'cell width')).toBe(103.5);
    expect(cut(figures, 'cell height')).toBe(27);
    // 103.5 + 2 × 0.5 for the legs; 4 × 27 + 5 × 0.5; 91 + 1.5
    expect(['carcass width', 'carcass height', 'carcass depth'].map((name) => cut(figures, name))).toEqual([
      104.5, 110.5, 92.5,
    ]);
    const carcass = pieceOf(figures, 'Carcass');
    expect([carcass.across, carcass.along]).toEqual([289.5, 295.5]); // 2 × 92.5 more each way
    expect(carcass.scores).toEqual({ across: [92.5, 197], along: [92.5, 203] });
    const shelf = pieceOf(figures, 'Shelf');
    expect([shelf.count, shelf.across, shelf.along]).toEqual([3, 157.5, 91]); // 27 + 103.5 + 27; 92.5 − 1.5
    expect(shelf.scores.across).toEqual([27, 130.5]);
    expect(figures.fits.map((fit) => [fit.name, fit.holds, fit.gap])).toEqual([
      ['drawer slides sideways', true, 1.5],
      ['drawer slides under the shelf', true, 1.5],
      ['top drawer slides under the top', true, 1.5],
      ['drawer shuts', true, 1.5],
      ['shelf spans the carcass', true, 0],
      ['cells fill the carcass', true, 0],
      ['runners clear each other', true, 80.5], // 104.5 − 2 × 12
    ]);
  });
  it('lets drawers slide on one another without shelves: one play for all of them (derived)', () => {
    const figures = figuresOf(model, { ...PLAIN, drawers: 3 }, { ...METRIC, choices: { shelf: 'none' } });
    expect(figures.problems).toEqual([]);
    expect(figures.pieces.map((piece) => piece.name)).toEqual(['Drawer', 'Carcass']);
    expect(cut(figures, 'carcass width')).toBe(103.5);
    expect(cut(figures, 'carcass height')).toBe(79); // 3 × 25.5 + 1.5 + 2 × 0.5
  });
  it('has no shelf and no room for its legs when there is one drawer', () => {
    const [shelved, plain] = ['between drawers', 'none'].map((shelf) =>
      figuresOf(model, { ...PLAIN, drawers: 1 }, { ...METRIC, choices: { shelf } }),
    ) as [ReturnType<typeof figuresOf>, ReturnType<typeof figuresOf>];
    expect(shelved.pieces.map((piece) => [piece.name, piece.count])).toEqual([
      ['Drawer', 1],
      ['Carcass', 1],
    ]);
    // The two ways of counting agree: 1 × 27 + 2 × 0.5 = 1 × 25.5 + 1.5 + 2 × 0.5
    expect(cut(shelved, 'carcass height')).toBe(28);
    expect(cut(plain, 'carcass height')).toBe(28);
    expect(cut(shelved, 'carcass width')).toBe(cut(plain, 'carcass width'));
  });
  it('warns of more than three drawers without shelves, and makes them all the same', () => {
    const figures = figuresOf(model, { ...PLAIN, drawers: 5 }, { ...METRIC, choices: { shelf: 'none' } });
    expect(figures.problems).toEqual([]);
    expect(figures.fits.filter((fit) => fit.advice).map((fit) => [fit.name, fit.holds])).toEqual([
      ['drawers slide on one another', false],
    ]);
  });
  it('refuses drawers without any play, and names the nearest that works', () => {
    const figures = figuresOf(model, { play: 0, 'card thickness': 0 });
    expect(figures.problems.map((problem) => problem.code)).toContain('fit fails');
    expect(figures.problems[0]).toMatchObject({ measure: 'play', nearest: inch(1 / 16) });
  });
  it('makes one to six whole drawers and no more', () => {
    for (const [drawers, code] of [
      [0, 'below range'],
      [7, 'above range'],
      [2.5, 'not whole'],
    ] as const) {
      expect(figuresOf(model, { drawers }).problems[0]).toMatchObject({ code, measure: 'drawers' });
    }
  });
  it('punches the knob’s hole in the middle of the front', () => {
    const drawer = pieceOf(figuresOf(model, PLAIN, METRIC), 'Drawer');
    const [hole] = drawer.net.holes;
    // Front: the first 25 mm across, the 100 mm between the sides along.
    expect(hole?.[0]).toMatchObject({ type: 'arc', centre: { x: 12.5, y: 25 + 50 }, radius: 25.4 / 16 });
  });
  it('says the carcass as a maker scores it', () => {
    const carcass = pieceOf(figuresOf(model, { ...PLAIN, drawers: 4 }, METRIC), 'Carcass');
    const says = instructionsOf(carcass).map((sentence) => say(sentence, { units: 'mm', grid: '0.5mm' }));
    expect(says[0]).toBe('Cut 289.5 × 295.5 mm.');
    expect(says[1]).toBe('Score at 92.5 mm from each of the four sides.');
  });
  it('takes every drawer into every cell with its play on every grid and at every size', () => {
    for (const sizing of sizingsOf(model, 40, 7)) {
      const figures = figuresOf(model, sizing.values, sizing);
      const at = (name: string) => cut(figures, name) ?? NaN;
      const [drawers, thickness] = [at('drawers'), at('card thickness')];
      const shelved = at('shelves') > 0;
      // Solid drawers, outside as section 0 has them: inside + 4, + 1, + 2 card thicknesses.
      const [wide, tall, long] = [
        at('inside width') + 4 * thickness,
        at('inside height') + thickness,
        at('inside length') + 2 * thickness,
      ];
      const room = shelved ? at('shelf width') : at('carcass width');
      const slack = GRIDS[sizing.grid].step + at('play');
      for (const gap of [
        room - wide,
        shelved
          ? at('carcass height') - drawers * at('cell height') - (drawers + 1) * thickness + at('cell height') - tall
          : at('carcass height') - 2 * thickness - drawers * tall,
        at('carcass depth') - long,
      ]) {
        expect(snap(gap - at('play'))).toBeGreaterThanOrEqual(0);
        expect(snap(gap), JSON.stringify(sizing)).toBeLessThanOrEqual(snap(slack + GRIDS[sizing.grid].step));
      }
    }
  });
});

describe('drawer-chest, folded', () => {
  const figures = figuresOf(model, { ...PLAIN, drawers: 4 }, METRIC);
  const fold = (piece: string, root: string, across: Placement['across'], along: Placement['along']) =>
    new Map(
      foldNet(pieceOf(figures, piece).net, { root, at: vector(0, 0, 0), across, along }).map((panel) => [
        panel.name,
        panel,
      ]),
    );
  it('closes the carcass: walls meet at their four long edges, and tabs lie inside top and bottom', () => {
    const panels = fold('Carcass', 'back', '+x', '-z');
    const meeting = (a: string, b: string) =>
      (panels.get(a)?.points ?? []).filter((p) =>
        (panels.get(b)?.points ?? []).some((q) => Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z) < 0.05),
      ).length;
    for (const [a, b] of [
      ['left wall', 'top'],
      ['top', 'right wall'],
      ['right wall', 'bottom'],
      ['bottom', 'left wall'],
    ] as const)
      expect(meeting(a, b), `${a} and ${b}`).toBe(2);
    for (const [tab, wall] of [
      ['corner 1', 'top'],
      ['corner 2', 'top'],
      ['corner 3', 'bottom'],
      ['corner 4', 'bottom'],
    ] as const) {
      const level = panels.get(wall)?.points[0]?.z ?? NaN;
      const points = panels.get(tab)?.points ?? [];
      expect(points).toHaveLength(4);
      for (const point of points) {
        expectClose(point.z, level, 1e-6, tab);
        expect(point.x > -1e-6 && point.x < 104.5 + 1e-6, tab).toBe(true);
      }
    }
    // It opens towards the front.
    expectClose(extent([...panels.values()], 'y')[0], -92.5, 1e-6);
    expectClose(extent([...panels.values()], 'y')[1], 0, 1e-6);
  });
  it('stands every shelf on legs as tall as a cell', () => {
    const panels = fold('Shelf', 'shelf', '+x', '+y');
    for (const leg of ['left leg', 'right leg']) {
      const [low, high] = extent([panels.get(leg) as FoldedPanel], 'z');
      expectClose(low, -27, 1e-6);
      expectClose(high, 0, 1e-6);
    }
  });
});
