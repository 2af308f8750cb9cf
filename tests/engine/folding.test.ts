import { describe, expect, it } from 'vitest';
import { foldNet, type FoldedPanel } from '@/engine/space';
import { backToFront, type Face } from '@/engine/space';
import { minus, size, vector, type Vector } from '@/engine/space';
import type { Net, Placement } from '@/engine';
import { expectClose } from '../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf, seeded } from './patterns';

const AT = vector(0, 0, 0);
function folded(
  net: Net,
  root: string,
  across: Placement['across'] = '+x',
  along: Placement['along'] = '-y',
): ReadonlyMap<string, FoldedPanel> {
  return new Map(foldNet(net, { root, at: AT, across, along }).map((panel) => [panel.name, panel]));
}
const distance = (a: Vector, b: Vector): number => size(minus(a, b));
/** Corners of one panel that lie on a corner of the other. */
function meeting(a: FoldedPanel | undefined, b: FoldedPanel | undefined, within: number): number {
  return (a?.points ?? []).filter((p) => (b?.points ?? []).some((q) => distance(p, q) < within)).length;
}
const spread = (panel: FoldedPanel | undefined, axis: 'x' | 'y' | 'z'): number => {
  const values = (panel?.points ?? []).map((point) => point[axis]);
  return Math.max(...values) - Math.min(...values);
};

describe('folding', () => {
  it('stands the four walls of a tray up and brings their edges together (derived: a square corner closes)', () => {
    const { net } = pieceOf(figuresOf(modelOf('tray')), 'Tray');
    const panels = folded(net, 'floor');
    for (const [a, b] of [
      ['left end', 'far side'],
      ['far side', 'right end'],
      ['right end', 'near side'],
      ['near side', 'left end'],
    ] as const) {
      expect(meeting(panels.get(a), panels.get(b), 1e-6), `${a} and ${b}`).toBe(2);
    }
    expectClose(spread(panels.get('far side'), 'z'), inch(1.25), 1e-6);
    expectClose(spread(panels.get('floor'), 'z'), 0, 1e-6);
  });
  it('lays every corner tab flat on the wall it is glued to', () => {
    const { net } = pieceOf(figuresOf(modelOf('tray')), 'Tray');
    const panels = folded(net, 'floor');
    for (const [tab, wall] of [
      ['corner 1', 'far side'],
      ['corner 2', 'far side'],
      ['corner 3', 'near side'],
      ['corner 4', 'near side'],
    ] as const) {
      const y = panels.get(wall)?.points[0]?.y ?? NaN;
      for (const point of panels.get(tab)?.points ?? []) expectClose(point.y, y, 1e-6, tab);
    }
  });
  it('brings a sleeve round to its seam: edges meet but for the card’s thickness', () => {
    for (const [thickness, within] of [
      [0, 1e-6],
      [0.3, 0.31],
    ] as const) {
      const { net } = pieceOf(figuresOf(modelOf('sleeve-drawer'), { 'card thickness': thickness }), 'Sleeve');
      const panels = folded(net, 'top', '-y', '+x');
      expect(
        meeting(panels.get('bottom'), panels.get('second side'), within + 0.3 * Number(thickness > 0)),
        `${thickness}`,
      ).toBe(2);
    }
  });
  it('rolls the lower spine from cover to cover (chord of the arc = inside depth)', () => {
    const figures = figuresOf(modelOf('book-box'), { 'inside depth': inch(2), circle: inch(4) });
    const spine = pieceOf(figures, 'Lower spine');
    const strips = foldNet(spine.net, { root: 'spine', at: AT, across: '-y', along: '-z' }).filter(
      (panel) => panel.name === 'spine',
    );
    const [first, last] = [strips[0]?.points[0] as Vector, strips.at(-1)?.points[1] as Vector];
    // The strip is cut 2 1/8 in for an arc of 2.0944: its chord is 2 × 2 × sin(2.125 / 4) = 2.0266 in.
    expectClose(distance(first, last), inch(4 * Math.sin(2.125 / 4)), 0.1);
    expectClose(first.x, last.x, 0.05);
    // It bulges outwards by the arc's height, 2 − 2 cos(2.125 / 4) = 0.276 in.
    expectClose(
      Math.max(...strips.flatMap((strip) => strip.points.map((point) => point.x))),
      inch(2 - 2 * Math.cos(2.125 / 4)),
      0.15,
    );
  });
  it('turns the side tabs of the spine on to the covers', () => {
    const figures = figuresOf(modelOf('book-box'), { 'inside depth': inch(2), circle: inch(4) });
    const panels = new Map(
      foldNet(pieceOf(figures, 'Lower spine').net, { root: 'spine', at: AT, across: '-y', along: '-z' }).map(
        (panel) => [panel.name, panel],
      ),
    );
    // Flat on a cover: the tab hardly leaves the plane across the depth.
    for (const tab of ['left', 'right']) expect(spread(panels.get(tab), 'y'), tab).toBeLessThan(0.6);
  });
  it('keeps every panel rigid: edges are as long folded as flat', () => {
    for (const [slug, name, root] of [
      ['tray', 'Tray', 'floor'],
      ['book-box', 'Lid', 'lid'],
      ['sleeve-drawer', 'Sleeve', 'top'],
    ] as const) {
      const { net } = pieceOf(figuresOf(modelOf(slug)), name);
      for (const panel of foldNet(net, { root, at: AT, across: '+x', along: '-y' })) {
        const flat = net.panels.find((one) => one.name === panel.name)?.loop ?? [];
        if (flat.some((curve) => curve.type === 'arc')) continue;
        flat.forEach((curve, index) => {
          const [p, q] = [panel.points[index] as Vector, panel.points[(index + 1) % panel.points.length] as Vector];
          expectClose(
            distance(p, q),
            Math.hypot(curve.to.x - curve.from.x, curve.to.y - curve.from.y),
            1e-6,
            panel.name,
          );
        });
      }
    }
  });
  it('lies flat at no fold and halfway at half', () => {
    const { net } = pieceOf(figuresOf(modelOf('tray')), 'Tray');
    const at = (share: number) => foldNet(net, { root: 'floor', at: AT, across: '+x', along: '-y', share });
    expect(Math.max(...at(0).flatMap((panel) => panel.points.map((point) => Math.abs(point.z))))).toBeLessThan(1e-9);
    // A wall turned by 45° stands sin 45° of its height.
    expectClose(
      Math.max(
        ...at(0.5)
          .filter((panel) => panel.role === 'panel')
          .flatMap((panel) => panel.points.map((point) => point.z)),
      ),
      inch(1.25) * Math.SQRT1_2,
      1e-6,
    );
  });
});

describe('hidden faces', () => {
  it('are painted as a depth buffer would, for boxes from many sides', () => {
    const random = seeded(5);
    for (const [slug, name, root] of [
      ['tray', 'Tray', 'floor'],
      ['lidded-box', 'Base', 'floor'],
      ['sleeve-drawer', 'Sleeve', 'top'],
    ] as const) {
      const { net } = pieceOf(figuresOf(modelOf(slug), { 'card thickness': 0 }), name);
      const faces: Face<number>[] = foldNet(net, { root, at: AT, across: '+x', along: '-y' })
        .filter((panel) => panel.role === 'panel')
        .map((panel, index) => ({ points: panel.points, edges: panel.edges, data: index }));
      for (let view = 0; view < 6; view += 1) {
        const [turn, tilt] = [random() * 2 * Math.PI, 0.15 + random() * 1.1];
        const towards = vector(-Math.sin(turn) * Math.cos(tilt), -Math.cos(turn) * Math.cos(tilt), Math.sin(tilt));
        expect(wrongSamples(faces, towards, random), `${slug} ${view}`).toBe(0);
      }
    }
  });
});

/** Samples where the last painted face is not the nearest one, by more than a hair. */
function wrongSamples(faces: readonly Face<number>[], towards: Vector, random: () => number): number {
  const painted = backToFront(faces, towards);
  const u = vector(-towards.y, towards.x, 0);
  const un = vector(u.x / size(u), u.y / size(u), 0);
  const v = vector(
    towards.y * un.z - towards.z * un.y,
    towards.z * un.x - towards.x * un.z,
    towards.x * un.y - towards.y * un.x,
  );
  const flat = (p: Vector): [number, number] => [
    p.x * un.x + p.y * un.y + p.z * un.z,
    p.x * v.x + p.y * v.y + p.z * v.z,
  ];
  const depthAt = (face: Face<number>, x: number, y: number): number | null => {
    const polygon = face.points.map(flat);
    let inside = false;
    polygon.forEach(([ax, ay], i) => {
      const [bx, by] = polygon[(i + 1) % polygon.length] as [number, number];
      if (ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax) inside = !inside;
    });
    if (!inside) return null;
    const [a, b, c] = face.points as [Vector, Vector, Vector];
    const [e, f] = [minus(b, a), minus(c, a)];
    const n = vector(e.y * f.z - e.z * f.y, e.z * f.x - e.x * f.z, e.x * f.y - e.y * f.x);
    const facing = n.x * towards.x + n.y * towards.y + n.z * towards.z;
    if (Math.abs(facing) < 1e-3 * size(n)) return null;
    const p = vector(un.x * x + v.x * y, un.y * x + v.y * y, un.z * x + v.z * y);
    return ((a.x - p.x) * n.x + (a.y - p.y) * n.y + (a.z - p.z) * n.z) / facing;
  };
  const all = faces.flatMap((face) => face.points.map(flat));
  const [xs, ys] = [all.map(([x]) => x), all.map(([, y]) => y)];
  let wrong = 0;
  for (let index = 0; index < 1500; index += 1) {
    const x = Math.min(...xs) + (Math.max(...xs) - Math.min(...xs)) * random();
    const y = Math.min(...ys) + (Math.max(...ys) - Math.min(...ys)) * random();
    const depths = faces.map((face) => depthAt(face, x, y)).filter((depth): depth is number => depth !== null);
    const last = [...painted].reverse().find((face) => depthAt(face, x, y) !== null);
    if (!last || depths.length === 0) continue;
    if ((depthAt(last, x, y) as number) < Math.max(...depths) - 0.01) wrong += 1;
  }
  return wrong;
}

describe('folds that cross at inner corners', () => {
  /** The panels round an inner corner hang together on the card: at a fold between two of them both have the same corners. */
  const gaps = (slug: string, piece: string, root: string, share: number): readonly number[] => {
    const { net } = pieceOf(figuresOf(modelOf(slug)), piece);
    const panels = new Map(
      foldNet(net, { root, at: AT, across: '+x', along: '-y', share, asShown: true }).map((panel) => [
        panel.name,
        panel,
      ]),
    );
    const at = (name: string, { x, y }: { x: number; y: number }): Vector | undefined => {
      const loop = net.panels.find((panel) => panel.name === name)?.loop ?? [];
      const corner = loop.findIndex(({ from }) => Math.hypot(from.x - x, from.y - y) < 1e-3);
      return panels.get(name)?.points[corner];
    };
    return net.folds.flatMap(({ panels: [a, b], curve }) =>
      [curve.from, curve.to].flatMap((end) => {
        const [p, q] = [at(a, end), at(b, end)];
        return p && q ? [distance(p, q)] : [];
      }),
    );
  };

  it.each([
    ['gable-carton', 'Carton', 'front'],
    ['gusset-bag', 'Bag', 'front'],
  ])('hold the %s together at every share of its folds (derived: card does not stretch)', (slug, piece, root) => {
    // Panels that turn in behind others are cut a hair narrower, by less than the card is thick twice; a ring that is nearly
    // flat makes five times as much of it.
    const open = Math.max(...gaps(slug, piece, root, 1));
    expect(open).toBeLessThan(0.6);
    for (const share of [0.1, 0.3, 0.5, 0.6, 0.7, 0.8, 0.9, 0.97]) {
      const all = gaps(slug, piece, root, share);
      expect(all.length).toBeGreaterThan(40);
      expect(Math.max(...all), `${share}`).toBeLessThan(Math.max(0.05, 5 * open));
    }
  });

  it('fold walls to a tube first: half way they stand square on one another, and what is above them goes straight on', () => {
    const { net } = pieceOf(figuresOf(modelOf('gable-carton')), 'Carton');
    const panels = new Map(
      foldNet(net, { root: 'front', at: AT, across: '+x', along: '-y', share: 0.5 }).map((panel) => [
        panel.name,
        panel,
      ]),
    );
    const facing = (name: string) => panels.get(name)?.inside as Vector;
    const dot = (a: Vector, b: Vector) => a.x * b.x + a.y * b.y + a.z * b.z;
    expectClose(dot(facing('front'), facing('side')), 0, 1e-6);
    expectClose(dot(facing('front'), facing('back')), -1, 1e-6);
    expectClose(dot(facing('front'), facing('front roof')), 1, 1e-6);
    expectClose(dot(facing('side'), facing('gable 1')), 1, 1e-6);
  });
});
