import { describe, expect, it } from 'vitest';
import { type Figures, type Placement } from '@/engine';
import { foldNet, vector, type FoldedPanel, type Vector } from '@/engine/space';
import { expectClose } from '../setup/expect-close';
import { figuresOf, modelOf, pieceOf } from './patterns';

// Folded boxes against the closed forms of solid geometry: V = l w h, A h, A h / 3, π h (R² + R r + r²) / 3.

const METRIC = { units: 'mm', grid: '0.5mm' } as const;
const cut = (figures: Figures, name: string): number =>
  figures.measures.find((measure) => measure.name === name)?.cut ?? NaN;

interface Fold {
  readonly piece: string;
  readonly root: string;
  readonly across?: Placement['across'];
  readonly along?: Placement['along'];
}
/** The folded panels that are not glued out of sight, rolled ones as their strips. */
const shellOf = (figures: Figures, { piece, root, across = '+x', along = '-y' }: Fold): readonly FoldedPanel[] =>
  foldNet(pieceOf(figures, piece).net, { root, at: vector(0, 0, 0), across, along }).filter(
    (panel) => panel.role === 'panel',
  );

const cross = (a: Vector, b: Vector): Vector =>
  vector(a.y * b.z - a.z * b.y, a.z * b.x - a.x * b.z, a.x * b.y - a.y * b.x);
const dot = (a: Vector, b: Vector): number => a.x * b.x + a.y * b.y + a.z * b.z;
const minus = (a: Vector, b: Vector): Vector => vector(a.x - b.x, a.y - b.y, a.z - b.z);
/** Twice the area, as a vector that stands square on a flat polygon. */
const areaVector = (points: readonly Vector[]): Vector => {
  const [o] = points as [Vector, ...Vector[]];
  return points.slice(1, -1).reduce(
    (sum, p, index) => {
      const turned = cross(minus(p, o), minus(points[index + 2] as Vector, o));
      return vector(sum.x + turned.x, sum.y + turned.y, sum.z + turned.z);
    },
    vector(0, 0, 0),
  );
};
/** Volume within flat faces, by the divergence theorem from a point inside; every face counts as seen from there. */
const volumeOf = (faces: readonly (readonly Vector[])[], inside: Vector): number =>
  faces.reduce((sum, points) => sum + Math.abs(dot(minus(points[0] as Vector, inside), areaVector(points))) / 6, 0);
const middleOf = (points: readonly Vector[]): Vector =>
  vector(
    points.reduce((sum, { x }) => sum + x, 0) / points.length,
    points.reduce((sum, { y }) => sum + y, 0) / points.length,
    points.reduce((sum, { z }) => sum + z, 0) / points.length,
  );
const facesOf = (panels: readonly FoldedPanel[]) => panels.map(({ points }) => points);
/** Points of a face moved along, for the open top of a tray or a prism. */
const raised = (points: readonly Vector[], z: number): Vector[] => points.map((p) => vector(p.x, p.y, p.z + z));
const THIN = { 'card thickness': 0 };

describe('the volume of the folded box', () => {
  it.each([
    ['tray', 'Tray', 'floor'],
    ['lidded-box', 'Base', 'floor'],
    ['sleeve-drawer', 'Drawer', 'floor'],
  ])('of the open box of %s is length × width × height', (slug, piece, root) => {
    for (const [long, wide, tall] of [
      [120, 80, 30],
      [75.5, 64, 51],
    ] as const) {
      const figures = figuresOf(
        modelOf(slug),
        { 'inside length': long, 'inside width': wide, 'inside height': tall, ...THIN },
        METRIC,
      );
      const panels = shellOf(figures, { piece, root });
      const floor = panels.find(({ name }) => name === root)?.points ?? [];
      const faces = [...facesOf(panels), raised(floor, tall)];
      const inside = raised([middleOf(floor)], tall / 2)[0] as Vector;
      expectClose(volumeOf(faces, inside), long * wide * tall, 0.01, slug);
    }
  });
  it.each([3, 4, 5, 6, 8, 12])('of a prism of %i sides is floor × height (A = n r² tan(π / n))', (sides) => {
    const figures = figuresOf(
      modelOf('polygon-box'),
      { sides, 'inside across flats': 90, 'inside height': 40, 'lid height': 20, ...THIN },
      METRIC,
    );
    // The side is drawn as the width across asks for: 90 mm lies on the grid.
    const panels = shellOf(figures, { piece: 'Base', root: 'floor' });
    const floor = panels.find(({ name }) => name === 'floor')?.points ?? [];
    const inside = raised([middleOf(floor)], 20)[0] as Vector;
    const volume = sides * 45 ** 2 * Math.tan(Math.PI / sides) * 40;
    expectClose(volumeOf([...facesOf(panels), raised(floor, 40)], inside), volume, volume * 1e-6);
  });
  it.each([3, 4, 5, 6, 8])('of a pyramid of %i sides is a third of base × height', (sides) => {
    const figures = figuresOf(modelOf('pyramid-box'), { sides, 'base side': 60, height: 75, ...THIN }, METRIC);
    const panels = shellOf(figures, { piece: 'Star', root: 'base' });
    const base = panels.find(({ name }) => name === 'base')?.points ?? [];
    const radius = 30 / Math.tan(Math.PI / sides);
    const tall = Math.sqrt(cut(figures, 'slant height') ** 2 - radius ** 2);
    const area = (sides * 60 * radius) / 2;
    const inside = raised([middleOf(base)], tall / 4)[0] as Vector;
    expectClose(volumeOf(facesOf(panels), inside), (area * tall) / 3, area * 1e-3);
    // Angles between the faces as drawn, from their normals: tan B = h / r; cos D = −(sin² B cos(2π / n) + cos² B).
    const walls = panels.filter(({ name }) => name.startsWith('wall'));
    const normal = ({ points }: FoldedPanel): Vector => {
      const n = areaVector(points);
      const long = Math.sqrt(dot(n, n)) * Math.sign(dot(n, minus(points[0] as Vector, inside)));
      return vector(n.x / long, n.y / long, n.z / long);
    };
    const B = Math.atan2(tall, radius);
    const D = -(Math.sin(B) ** 2 * Math.cos((2 * Math.PI) / sides) + Math.cos(B) ** 2);
    expect(walls).toHaveLength(sides);
    walls.forEach((wall, index) => {
      expectClose(-normal(wall).z, -Math.cos(B), 1e-6, 'wall to base');
      expectClose(-dot(normal(wall), normal(walls[(index + 1) % sides] as FoldedPanel)), D, 1e-6, 'wall to wall');
    });
  });
  it.each([
    [100, 60, 48],
    [60, 100, 48],
    [80, 0, 90],
  ])('of a cup %i mm across the top, %i the bottom and %i tall is π h (R² + R r + r²) / 3', (top, bottom, tall) => {
    const figures = figuresOf(
      modelOf('cone-cup'),
      { 'top diameter': top, 'bottom diameter': bottom, height: tall, ...THIN },
      METRIC,
    );
    const strips = shellOf(figures, { piece: 'Body', root: 'wall', across: '-y', along: '+z' });
    // Seen from the tip, which the rolled body has at the origin: its own faces add nothing, the two ends do.
    const [wide, narrow] = [Math.max(top, bottom) / 2, Math.min(top, bottom) / 2];
    const whole = (tall * wide) / (wide - narrow);
    const inside = vector(0, 0, 0);
    const points = strips.flatMap((strip) => strip.points);
    const far = Math.max(...points.map(({ z }) => z));
    expectClose(far, whole, 0.2, 'the tip of the whole cone lies as far from the wide end as its sides say');
    // Sum of the thin pyramids under each strip's wide edge, less those under its narrow edge.
    const ends = strips.map((strip) => {
      const rim = strip.points.filter(({ z }) => far - z < tall / 2);
      const foot = strip.points.filter(({ z }) => far - z >= tall / 2);
      const under = (edge: readonly Vector[]) =>
        edge.length < 2
          ? 0
          : Math.abs(
              dot(cross(edge[0] as Vector, edge[1] as Vector), vector(0, 0, (edge[0] as Vector).z - inside.z)) / 6,
            );
      return under(rim) - under(foot);
    });
    const volume = (Math.PI * tall * (wide ** 2 + wide * narrow + narrow ** 2)) / 3;
    // Flat strips for a round: sin(a) / a short of the circle, 36 of them at least.
    expectClose(
      ends.reduce((sum, one) => sum + one, 0),
      volume,
      volume * 0.01,
    );
  });
  it.each([3, 4, 6, 8, 12])('of %i wedges together is that of the prism they make', (slices) => {
    const figures = figuresOf(modelOf('wedge-box'), { slices, radius: 100, height: 60, ...THIN }, METRIC);
    const panels = shellOf(figures, { piece: 'Slice', root: 'base' });
    const base = panels.find(({ name }) => name === 'base')?.points ?? [];
    const closing = ['base', 'side a', 'side b', 'outer', 'lid'];
    const faces = facesOf(panels.filter(({ name }) => closing.includes(name)));
    expect(faces).toHaveLength(5);
    const chord = cut(figures, 'chord');
    // One slice: half the chord times the distance from the tip to it.
    const area = (chord / 2) * Math.sqrt(100 ** 2 - (chord / 2) ** 2);
    expectClose(volumeOf(faces, raised([middleOf(base)], 30)[0] as Vector), area * 60, 0.05);
    // All of them: the regular prism, but for what cutting the chord to the grid takes away.
    const prism = (slices / 2) * 100 ** 2 * Math.sin((2 * Math.PI) / slices) * 60;
    expectClose(slices * area * 60, prism, (prism * 0.5) / chord + 1);
  });
});

describe('heights and widths of the folded box', () => {
  const extent = (panels: readonly FoldedPanel[], axis: 'x' | 'y' | 'z'): number => {
    const values = panels.flatMap(({ points }) => points.map((point) => point[axis]));
    return Math.max(...values) - Math.min(...values);
  };
  it.each([
    [40, 10],
    [90, 24],
    [150, 60],
  ])('a pillow %i mm wide is as deep as twice the sagitta of its ends, %i mm', (width, depth) => {
    const wide = Math.max(width, 51);
    const figures = figuresOf(modelOf('pillow-box'), { width: wide, depth: Math.max(depth, 13), length: 200 }, METRIC);
    const rise = cut(figures, 'rise');
    // r = (c² + 4 h²) / 8 h (Machinery's Handbook, circular segments)
    expectClose(cut(figures, 'radius'), (wide ** 2 + 4 * rise ** 2) / (8 * rise), 1e-6);
    expectClose(extent(shellOf(figures, { piece: 'Pillow', root: 'front' }), 'z'), 2 * rise, 0.01);
  });
  it.each([
    [60, 40],
    [80, 20],
    [50, 55],
  ])('a gable over %i mm rises as Pythagoras says from its slope, %i mm', (depth, roof) => {
    const figures = figuresOf(
      modelOf('gable-carton'),
      { width: 120, depth, height: 100, 'roof height': roof, 'seal strip': 15, ...THIN },
      METRIC,
    );
    const panels = shellOf(figures, { piece: 'Carton', root: 'front', across: '-x', along: '-z' });
    const slope = Math.hypot(depth / 2, roof);
    const ridge = Math.sqrt((Math.ceil(slope * 2 - 1e-6) / 2) ** 2 - (depth / 2) ** 2);
    const walls = ['front', 'side', 'back', 'last side', 'front roof', 'back roof'];
    expectClose(
      extent(
        panels.filter(({ name }) => walls.includes(name)),
        'z',
      ),
      100 + ridge,
      1e-6,
    );
    expectClose(
      extent(
        panels.filter(({ name }) => walls.includes(name)),
        'y',
      ),
      depth,
      1e-6,
    );
  });
  it('a drum’s strip rolls to the circle of its length: d = C / π', () => {
    const figures = figuresOf(modelOf('drum-box'), { 'inside diameter': 100, 'inside height': 80, ...THIN }, METRIC);
    const strips = shellOf(figures, { piece: 'Strip', root: 'wall', across: '-y', along: '-z' });
    const across = cut(figures, 'circumference') / Math.PI;
    expectClose(extent(strips, 'x'), across, 0.01 * across);
    expectClose(extent(strips, 'y'), across, 0.01 * across);
    expectClose(extent(strips, 'z'), 80, 1e-6);
  });
});
