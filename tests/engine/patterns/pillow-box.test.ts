import { describe, expect, it } from 'vitest';
import { areaOf, instructionsOf, say, type Figures, type Sizing } from '@/engine';
import { foldNet, minus, size, vector, type Vector } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';

const model = modelOf('pillow-box');
const METRIC = { units: 'mm', grid: '0.5mm' } as const satisfies Partial<Sizing>;
const exact = (figures: Figures, name: string): number =>
  figures.measures.find((one) => one.name === name)?.exact ?? NaN;

type Quantities = Readonly<Record<string, { readonly value: number; readonly unit: string }>>;
/** Cases in which the end stands square, as this box is made: the depth is twice the sagitta. */
const cases = groups
  .filter(({ id }) => id === 'pillow-curve' || id === 'pillow-curve-general')
  .flatMap(({ cases: list }) => list as unknown as readonly { inputs: Quantities; expected: Quantities }[])
  .filter(({ inputs }) => !inputs.depth || inputs.depth.value === 2 * (inputs.sagitta?.value ?? NaN));

describe('pillow-box', () => {
  it.each(cases)('has the curves of the check values (pillow-curve, pillow-curve-general; %#)', (one) => {
    const scale = one.inputs.face_width?.unit === 'in' ? 25.4 : 1;
    const [width, sagitta] = [
      (one.inputs.face_width?.value ?? NaN) * scale,
      (one.inputs.sagitta?.value ?? NaN) * scale,
    ];
    const figures = figuresOf(
      model,
      { width, depth: 2 * sagitta, length: 2 * width },
      scale === 1 ? METRIC : { grid: '1/16in' },
    );
    expect(figures.problems).toEqual([]);
    const { net } = pieceOf(figures, 'Pillow');
    const flap = net.panels.find((panel) => panel.name === 'front top flap');
    const found: Readonly<Record<string, readonly [value: number, scale: number, tolerance: number]>> = {
      radius: [exact(figures, 'radius'), scale, 1e-6],
      angle: [2 * exact(figures, 'half arc'), 1, 1e-6],
      crease_arc: [net.edges.crease ?? NaN, scale, 1e-5],
      flap_area: [areaOf(flap?.loop ?? []), scale ** 2, 1e-3],
      depth_when_square: [2 * exact(figures, 'rise'), scale, 1e-6],
      // The three-point rule of the pattern is within 0.04 mm at 200 mm.
      folded_width: [exact(figures, 'finished width'), scale, (0.04 / 200) * width],
    };
    let checked = 0;
    for (const [name, { value }] of Object.entries(one.expected)) {
      const [actual, by, tolerance] = found[name] ?? [];
      if (actual === undefined || by === undefined || tolerance === undefined) continue;
      expectClose(actual, value * by, tolerance, name);
      checked += 1;
    }
    expect(checked).toBeGreaterThan(0);
  });
  it.each([
    [0.1, 157, 0.9933],
    [0.25, 116, 0.9553],
    [0.4, 36, 0.8635],
  ])('at depth %f of the width the side fold turns %i° and the width is left to %f (derived)', (share, turn, left) => {
    const figures = figuresOf(model, { width: 200, depth: 200 * share, length: 250 }, METRIC);
    expectClose(exact(figures, 'side turn'), turn, 0.5);
    expectClose(exact(figures, 'finished width') / 200, left, 1e-4);
  });
  it('is two faces and a tab wide, and the depth longer than its folds (derived)', () => {
    const figures = figuresOf(model, {
      width: inch(4),
      length: inch(6),
      depth: inch(1),
      tab: inch(0.5),
    });
    const piece = pieceOf(figures, 'Pillow');
    expect([piece.across, piece.along]).toEqual([inch(8.5), inch(7)]); // 2 × 4 + 1/2; 6 + 1
    expectClose(exact(figures, 'radius'), inch(4.25), 1e-6); // (16 + 1) / 4
    // Four score arcs and four cut arcs of one radius.
    const arcs = [...piece.net.outline, ...piece.net.folds.map((fold) => fold.curve)].filter(
      (curve) => curve.type === 'arc',
    );
    expect(arcs.map((arc) => arc.radius)).toEqual(arcs.map(() => inch(4.25)));
    expect(arcs).toHaveLength(8);
    const words = instructionsOf(piece).map((one) => say(one, { units: 'in', grid: '1/16in' }));
    expect(words.join(' ')).toContain(
      'Score from 0 across, 1/2 down, to 4 across, 1/2 down, an arc of 4 1/4 in radius, bowed down;',
    );
    expect(words.join(' ')).toContain(
      'From the left edge at 1/2 cut to 4 across, 1/2 down, an arc of 4 1/4 in radius, bowed up;',
    );
  });

  it.each([
    [100, 30],
    [60, 24],
    [150, 14],
    [80, 32],
  ])('closes in space at %f mm wide and %f mm deep', (width, depth) => {
    const figures = figuresOf(model, { width, depth, length: 1.5 * width + 20 }, METRIC);
    expect(figures.problems).toEqual([]);
    const folded = foldNet(pieceOf(figures, 'Pillow').net, {
      root: 'front',
      at: vector(0, 0, 0),
      across: '+x',
      along: '-y',
    });
    const strips = (name: string) => folded.filter((panel) => panel.name === name);
    const corner = (name: string, strip: number, point: number) => strips(name).at(strip)?.points[point] as Vector;
    const apart = (a: Vector, b: Vector) => size(minus(a, b));
    // The glued seam: the free edge of the front and the last edge of the back.
    expectClose(apart(corner('front', 0, 0), corner('back', -1, 1)), 0, 1e-4, 'seam, top');
    expectClose(apart(corner('front', 0, 3), corner('back', -1, 2)), 0, 1e-4, 'seam, bottom');
    // Each flap stands square, and its cut edge lies on the crease of the other face.
    for (const [flap, face, edge] of [
      ['front top flap', 'back', [0, 1]],
      ['back top flap', 'front', [0, 1]],
      ['front bottom flap', 'back', [2, 3]],
      ['back bottom flap', 'front', [2, 3]],
    ] as const) {
      const crease = strips(face).flatMap((strip) => edge.map((index) => strip.points[index] as Vector));
      for (const strip of strips(flap)) {
        expectClose(strip.inside.z, 0, 1e-4, flap);
        for (const point of edge.flatMap((index) => strip.points[index] ?? []))
          expectClose(Math.min(...crease.map((other) => apart(other, point))), 0, 1e-4, flap);
      }
    }
    const points = folded.filter((panel) => panel.role === 'panel').flatMap((panel) => panel.points);
    const reach = (axis: 'x' | 'z') =>
      Math.max(...points.map((point) => point[axis])) - Math.min(...points.map((point) => point[axis]));
    expectClose(reach('z'), depth, 1e-4, 'depth');
    // Flat strips leave the curve by a few thousandths.
    expectClose(reach('x'), exact(figures, 'finished width'), 0.005 * width, 'finished width');
  });
  it('cannot close deeper than √2 − 1 of the width, and names the nearest depth that works', () => {
    const figures = figuresOf(model, { width: inch(4), depth: inch(1.75), length: inch(6) });
    // 0.4142 × 4 in = 1.657 in; asked at most 0.41 × 4 = 1.64, so 1 5/8 in on this grid.
    expect(figures.fits.find((fit) => fit.name === 'ends close')?.holds).toBe(false);
    expect(figures.problems.find((problem) => problem.code === 'fit fails')).toMatchObject({
      measure: 'depth',
      nearest: inch(1.625),
    });
  });
});
