import { describe, expect, it } from 'vitest';
import { areaOf, type Figures, type Loop, type Point, type Sizing } from '@/engine';
import { dot, minus, size, vector, type Vector } from '@/engine/space';
import { expectClose } from '../../setup/expect-close';
import { figuresOf, modelOf, pieceOf } from '../patterns';
import { inSpace, reach, worstFold } from './folded-net';

const model = modelOf('gable-carton');
const METRIC = { units: 'mm', grid: '1mm' } as const satisfies Partial<Sizing>;
const WORKED = {
  width: 90,
  depth: 60,
  height: 100,
  'roof height': 40,
  'seal strip': 15,
  tab: 12,
  'card thickness': 0,
};
const exact = (figures: Figures, name: string): number =>
  figures.measures.find((one) => one.name === name)?.exact ?? NaN;
const carton = (answers: Readonly<Record<string, number>> = {}): Figures =>
  figuresOf(model, { ...WORKED, ...answers }, METRIC);
const netOf = (figures: Figures) => pieceOf(figures, 'Carton').net;

describe('gable-carton', () => {
  it('gives the worked example: 90 × 60 × 100, roof 40, seal 15, tab 12 mm (derived)', () => {
    const figures = carton();
    expect(figures.problems).toEqual([]);
    expectClose(exact(figures, 'slope'), 50, 1e-9); // √(30² + 40²)
    expectClose(exact(figures, 'roof turn'), 36.869898, 1e-6); // atan(30 / 40)
    expectClose(exact(figures, 'gable turn'), 111.100196, 1e-6); // 180° − acos(900 / 2500)
    const piece = pieceOf(figures, 'Carton');
    expect([piece.across, piece.along]).toEqual([312, 225]); // 12 + 90 + 60 + 90 + 60; 15 + 50 + 100 + 60
    // Gable fold: half the depth across, the slope up.
    expectClose(piece.net.edges['gable fold'] ?? NaN, Math.hypot(30, 50), 1e-9);
    expect(figures.finished.outside.map(({ mm }) => mm)).toEqual([90, 60, 155]); // 100 + 40 + 15
  });
  it('adds and takes a card’s thickness where layers stack: third panel wider, last one narrower (derived)', () => {
    const piece = pieceOf(carton({ 'card thickness': 0.4, width: 92 }), 'Carton');
    const wide = (name: string) => {
      const xs = piece.net.panels.find((panel) => panel.name === name)?.loop.map((curve) => curve.from.x) ?? [];
      return Math.max(...xs) - Math.min(...xs);
    };
    for (const [name, size] of [
      ['front', 92],
      ['side', 60],
      ['back', 92.4],
      ['last side', 59.6],
      ['floor', 92],
      ['outer flap', 91.2],
      ['dust flap 1', 59.2],
    ] as const)
      expectClose(wide(name), size, 1e-9, name);
    expect([piece.across, piece.along]).toEqual([316, 225]);
  });
  it('folds by formula: valleys round the walls, doubled corners, mountains in the gables', () => {
    const { folds } = netOf(carton());
    const turn = (a: string, b: string) => {
      const fold = folds.find(({ panels }) => panels.includes(a) && panels.includes(b));
      return fold ? `${fold.kind} ${fold.angle.toFixed(3)}` : 'none';
    };
    expect(turn('front', 'front roof')).toBe('valley 36.870');
    expect(turn('side', 'gable 1')).toBe('valley 36.870');
    expect(turn('front roof', 'triangle 1')).toBe('valley 180.000');
    expect(turn('gable 1', 'triangle 2')).toBe('mountain 111.100');
    expect(turn('back roof', 'back strip')).toBe('mountain 36.870');
    expect(turn('triangle 3', 'half 3')).toBe('valley 36.870');
    expect(turn('half 3', 'half 4')).toBe('mountain 180.000');
    expect(turn('front roof', 'roof tab')).toBe('valley 180.000');
    expect(turn('side', 'back')).toBe('valley 90.000');
    // Without thickness the bottom flaps touch; they are slit apart, not folded.
    expect(turn('floor', 'dust flap 1')).toBe('none');
    expect(netOf(carton()).slits.length).toBeGreaterThan(0);
  });

  const SIZES: readonly Readonly<Record<string, number>>[] = [
    {},
    { width: 200, depth: 60, 'roof height': 12 },
    { width: 61, depth: 60, 'roof height': 71 },
    { width: 120, depth: 90, height: 60, 'roof height': 30, 'seal strip': 30 },
  ];
  describe.each(SIZES)('folded at %o', (answers) => {
    const figures = carton(answers);
    const net = netOf(figures);
    const space = inSpace(net, 'front', '-x', '-z');
    const { width, depth }: typeof WORKED = { ...WORKED, ...answers };
    const ridge = figures.measures.find((one) => one.name === 'ridge height')?.cut ?? NaN;
    const corner = (panel: string, index: number): Vector =>
      space.at(panel, net.panels.find((one) => one.name === panel)?.loop.at(index)?.to as Point);
    const apart = (a: Vector, b: Vector) => size(minus(a, b));
    it('meets every ring of folds again, each at its angle', () => {
      expect(figures.problems).toEqual([]);
      expect(worstFold(net, space)).toBeLessThan(1e-6);
      for (const { panels, angle } of net.folds) {
        const [a, b] = panels.map((name) => space.panels.get(name)?.inside ?? vector(0, 0, 0)) as [Vector, Vector];
        expectClose(dot(a, b), Math.cos((angle * Math.PI) / 180), 1e-6, panels.join(' and '));
      }
    });
    it('brings both gable points to the middle line of the ridge, half the depth in from the ends', () => {
      // Origin at the right end of the front's eaves; x leftwards negative, y to the back.
      for (const [gable, x] of [
        ['gable 1', -width + depth / 2],
        ['gable 2', -depth / 2],
      ] as const)
        expectClose(apart(corner(gable, 1), vector(x, depth / 2, ridge)), 0, 1e-6, gable);
    });
    it('closes the glued seam of wall and roof', () => {
      expectClose(apart(corner('front', 0), corner('last side', 1)), 0, 1e-6, 'eaves');
      expectClose(apart(corner('front', -1), corner('last side', 2)), 0, 1e-6, 'foot');
      expectClose(apart(corner('front roof', 0), corner('triangle 4', 1)), 0, 1e-6, 'ridge');
    });
    it('lays the side triangles flat against the roof, and the four parts of the seal together', () => {
      for (const [triangle, roof] of [
        ['triangle 1', 'front roof'],
        ['triangle 2', 'back roof'],
        ['triangle 3', 'back roof'],
        ['triangle 4', 'front roof'],
      ] as const) {
        const [flat, on] = [space.panels.get(triangle), space.panels.get(roof)];
        for (const point of flat?.points ?? [])
          expectClose(
            dot(minus(point, on?.points[0] as Vector), on?.inside ?? vector(0, 0, 0)),
            0,
            1e-6,
            `${triangle} on ${roof}`,
          );
      }
      for (const name of ['front strip', 'back strip', 'half 1', 'half 2', 'half 3', 'half 4']) {
        const [low, high] = reach(space.panels.get(name), 'y');
        expectClose(low, depth / 2, 1e-6, name);
        expectClose(high, depth / 2, 1e-6, name);
      }
    });
    it('glues both parts of the tab inside what they lie on, and closes the bottom', () => {
      const [low, high] = reach(space.panels.get('tab'), 'x');
      expectClose(Math.max(Math.abs(low), Math.abs(high)), 0, 1e-6, 'tab on the last wall');
      for (const point of space.panels.get('roof tab')?.points ?? [])
        expectClose(
          dot(minus(point, corner('triangle 4', 1)), space.panels.get('triangle 4')?.inside ?? vector(0, 0, 0)),
          0,
          1e-6,
          'roof tab on the last triangle',
        );
      for (const name of ['floor', 'outer flap', 'dust flap 1', 'dust flap 2']) {
        const [from, to] = reach(space.panels.get(name), 'z');
        expectClose(to - from, 0, 1e-6, name);
      }
      const [near, far] = reach(space.panels.get('floor'), 'y');
      expectClose(far - near, depth, 1e-6, 'floor');
    });
  });

  it('cuts a window into the middle of the front when it is asked for', () => {
    const figures = figuresOf(
      model,
      { ...WORKED, 'window width': 40, 'window height': 50 },
      { ...METRIC, choices: { window: 'in the front' } },
    );
    expect(figures.problems).toEqual([]);
    const { holes, panels } = netOf(figures);
    expect(holes).toHaveLength(1);
    expectClose(Math.abs(areaOf(holes[0] as Loop)), 40 * 50, 1e-6);
    const front = panels.find((panel) => panel.name === 'front')?.loop[0]?.to as Point;
    expectClose(Math.min(...(holes[0] as Loop).map((curve) => curve.from.x)) - front.x, (90 - 40) / 2, 1e-6);
    expectClose(Math.min(...(holes[0] as Loop).map((curve) => curve.from.y)) - front.y, (100 - 50) / 2, 1e-6);
    expect(netOf(carton()).holes).toHaveLength(0);
  });
  it('refuses a depth at which the gables meet, and names the nearest that works', () => {
    const figures = figuresOf(model, { width: 60, depth: 60, 'card thickness': 0.3 }, METRIC);
    // 60 − 4 × 0.3 = 58.8: 58 on this grid.
    expect(figures.problems.find((problem) => problem.code === 'fit fails')).toMatchObject({
      measure: 'depth',
      nearest: 58,
    });
  });
  it('warns of a roof that is too low', () => {
    const figures = carton({ 'roof height': 9 });
    expect(figures.fits.find((fit) => fit.name === 'roof holds')).toMatchObject({ holds: false, advice: true });
  });
});
