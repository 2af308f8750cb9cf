import { describe, expect, it } from 'vitest';
import { drawFolded, type Drawing } from '@/engine';
import { facesOf } from '@/engine/drawing/folded-faces';
import { edgesOf, seeFaces, viewOf } from '@/engine/drawing/seen';
import { minus, cross, dot, unit, vector, type Face, type Vector } from '@/engine/space';
import { SLUGS, figuresOf, inch, modelOf } from './patterns';

interface Spot {
  readonly x: number;
  readonly y: number;
}
const polygonsOf = (drawing: Drawing, role: string): Spot[][] =>
  drawing.shapes.flatMap((shape) =>
    shape.type === 'path' && shape.role === role
      ? [[...shape.d.matchAll(/(-?[\d.]+) (-?[\d.]+)/g)].map(([, x, y]) => ({ x: Number(x), y: Number(y) }))]
      : [],
  );
/** Even-odd rule. */
const contains = (corners: readonly Spot[], { x, y }: Spot): boolean =>
  corners.filter((a, index) => {
    const b = corners[(index + 1) % corners.length]!;
    return a.y > y !== b.y > y && x < a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x);
  }).length %
    2 ===
  1;
/** Letters of Figtree at 13 px are 6 to 7 wide on average, and 9 of 13 tall above the line. */
const labelsOf = (drawing: Drawing) =>
  drawing.shapes.flatMap((shape) => {
    if (shape.type !== 'text') return [];
    const half = shape.text.length * 3;
    const corners = [-half, half].flatMap((dx) => [1, -9].map((dy) => ({ x: shape.x + dx, y: shape.y + dy })));
    return [{ text: shape.text, corners }];
  });

const boxOf = (points: readonly Vector[]) =>
  (['x', 'y', 'z'] as const).map((axis) => {
    const values = points.map((point) => point[axis]);
    return { least: Math.min(...values), most: Math.max(...values) };
  });
const overlap = (a: ReturnType<typeof boxOf>, b: ReturnType<typeof boxOf>, slack: number): boolean =>
  a.every((range, axis) => range.least < b[axis]!.most + slack && b[axis]!.least < range.most + slack);
/** The places of each placed piece's faces. */
function piecesOf(slug: string, share: number): Vector[][] {
  const model = modelOf(slug);
  const pieces: Vector[][] = [];
  for (const { points, data } of facesOf(model, figuresOf(model), share))
    pieces[data.placed] = [...(pieces[data.placed] ?? []), ...points];
  return pieces;
}

describe('a box that is folded only so far', () => {
  it('has every piece flat in one plane at share 0; layers of paper lie three tenths of a millimetre above', () => {
    for (const slug of SLUGS)
      for (const points of piecesOf(slug, 0)) {
        const [a] = points;
        const far = points.reduce((best, p) => (dist(p, a!) > dist(best, a!) ? p : best));
        const along = unit(minus(far, a!));
        const off = (p: Vector) => cross(along, minus(p, a!));
        const side = points.reduce((best, p) => (size(off(p)) > size(off(best)) ? p : best));
        const normal = unit(cross(along, minus(side, a!)));
        const out = Math.max(...points.map((p) => Math.abs(dot(normal, minus(p, a!)))));
        expect(out, slug).toBeLessThan(0.3 + 1e-6);
      }
  });
  it('raises a tray’s walls by the sine of their turn', () => {
    const model = modelOf('tray');
    const figures = figuresOf(model);
    const rise = (share: number) => {
      const z = facesOf(model, figures, share)
        .filter(({ data }) => data.panel === 'near side')
        .flatMap(({ points }) => points.map((point) => point.z));
      return Math.max(...z) - Math.min(...z);
    };
    const whole = rise(1);
    expect(whole).toBeGreaterThan(inch(0.5));
    for (const share of [0, 0.25, 0.5, 0.75])
      expect(rise(share)).toBeCloseTo(whole * Math.sin((share * Math.PI) / 2), 6);
  });
  it('keeps pieces that touch in the closed box clear of one another until they are folded', () => {
    for (const slug of SLUGS) {
      const closed = piecesOf(slug, 1).map(boxOf);
      for (const share of [0, 0.4, 0.8]) {
        const boxes = piecesOf(slug, share).map(boxOf);
        closed.forEach((one, i) =>
          closed.slice(0, i).forEach((other, j) => {
            // Rounding aside, boxes that only touch do not overlap.
            if (overlap(one, other, 0))
              expect(overlap(boxes[i]!, boxes[j]!, -1e-6), `${slug} ${share} ${i} ${j}`).toBe(false);
          }),
        );
      }
    }
  });
  it('puts the pieces where they belong as it closes', () => {
    for (const slug of SLUGS) {
      const [closed, nearly] = [piecesOf(slug, 1), piecesOf(slug, 1 - 1e-9)];
      closed.forEach((points, index) =>
        boxOf(points).forEach(({ most }, axis) => expect(boxOf(nearly[index]!)[axis]!.most).toBeCloseTo(most, 0)),
      );
    }
  });
});

describe('what is round', () => {
  /** Upright lines of the drawing, which the axis of a cup and of a drum is parallel to. */
  const steep = (slug: string, options: { readonly seeThrough: boolean }): number => {
    const model = modelOf(slug);
    const drawing = drawFolded(model, figuresOf(model), { width: 300, height: 240, turn: 20, tilt: 20, ...options });
    const lines = drawing.shapes.flatMap((shape) =>
      shape.type === 'path' && shape.role === 'face edge'
        ? [...shape.d.matchAll(/M(-?[\d.]+) (-?[\d.]+)L(-?[\d.]+) (-?[\d.]+)/g)].map((found) =>
            found.slice(1).map(Number),
          )
        : [],
    );
    const xs = lines
      .filter(([x1, y1, x2, y2]) => Math.abs(y2! - y1!) > 60 && Math.abs(y2! - y1!) > 3 * Math.abs(x2! - x1!))
      .map(([x1, , x2]) => (x1! + x2!) / 2);
    return Math.max(...xs) - Math.min(...xs);
  };

  it('has an outline left and right, as a cylinder and a cone have, where no edge of the card is', () => {
    for (const seeThrough of [false, true]) {
      // Seen from 20° above, a drum of 3 in that is 5 in tall with its lid is narrower than tall, a cup is as well: left and
      // right outline are further apart than half of what is drawn.
      expect(steep('drum-box', { seeThrough })).toBeGreaterThan(80);
      expect(steep('cone-cup', { seeThrough })).toBeGreaterThan(80);
    }
  });
});

describe('a box that is turned', () => {
  it('stays inside its frame from every side, flat, half folded and closed', () => {
    for (const slug of SLUGS)
      for (const share of [0, 0.5, 1])
        for (const [turn, tilt] of [
          [0, 0],
          [45, 26],
          [200, -40],
          [300, 85],
        ] as const) {
          const model = modelOf(slug);
          const drawing = drawFolded(model, figuresOf(model), {
            width: 300,
            height: 240,
            turn,
            tilt,
            share,
            steady: true,
          });
          for (const { x, y } of polygonsOf(drawing, 'face').flat())
            expect(x >= 0 && x <= 300 && y >= 0 && y <= 240, `${slug} ${share} ${turn}: ${x} ${y}`).toBe(true);
        }
  });
});

describe('names on a folded box', () => {
  it('stand inside one face each while the box lies flat', () => {
    for (const slug of ['tray', 'lidded-box', 'tuck-carton']) {
      const model = modelOf(slug);
      const drawing = drawFolded(model, figuresOf(model), {
        width: 500,
        height: 400,
        turn: 20,
        tilt: 60,
        share: 0,
        labels: true,
      });
      const labels = labelsOf(drawing);
      const faces = polygonsOf(drawing, 'face');
      expect(labels.length, slug).toBeGreaterThan(0);
      for (const { text, corners } of labels)
        expect(
          faces.some((face) => corners.every((corner) => contains(face, corner))),
          `${slug}: ${text}`,
        ).toBe(true);
    }
  });
  it('are those of faces in view: from above a closed box shows its lid, and through it its floor', () => {
    const model = modelOf('polygon-box');
    const options = { width: 500, height: 400, turn: 0, tilt: 85, labels: true } as const;
    const texts = (seeThrough: boolean) =>
      labelsOf(drawFolded(model, figuresOf(model), { ...options, seeThrough })).map(({ text }) => text);
    expect(texts(false)).toContain('top');
    expect(texts(false)).not.toContain('floor');
    expect(texts(true)).toContain('floor');
  });
  it('leave faces without room alone', () => {
    const model = modelOf('tray');
    expect(labelsOf(drawFolded(model, figuresOf(model), { width: 20, height: 16, labels: true }))).toEqual([]);
  });
});

describe('a box that is seen through', () => {
  it('has no filled faces, and lines behind them', () => {
    for (const slug of SLUGS) {
      const model = modelOf(slug);
      const roles = new Set(
        drawFolded(model, figuresOf(model), { width: 300, height: 240, seeThrough: true }).shapes.map(
          ({ role }) => role,
        ),
      );
      expect([...roles].sort(), slug).toEqual(['face edge', 'glass', 'hidden']);
    }
  });
  it('hides three edges of a cube that is seen towards a corner, and shows nine', () => {
    const corner = (bits: number) => vector(bits & 1, (bits >> 1) & 1, bits >> 2);
    const faces = [
      [0, 1, 3, 2],
      [4, 5, 7, 6],
      [0, 1, 5, 4],
      [2, 3, 7, 6],
      [0, 2, 6, 4],
      [1, 3, 7, 5],
    ].map((corners): Face<null> => ({ points: corners.map(corner), edges: [true, true, true, true], data: null }));
    const view = viewOf(30, 25);
    const length = (hidden: boolean) =>
      edgesOf(seeFaces(faces, view), view)
        .filter((edge) => edge.hidden === hidden)
        .reduce((sum, { from, to }) => sum + Math.hypot(to.x - from.x, to.y - from.y), 0);
    // Each of the three directions has four edges of one projected length, of which one is hidden; faces share edges, so twice.
    const projected = [vector(1, 0, 0), vector(0, 1, 0), vector(0, 0, 1)]
      .map(view.project)
      .reduce((sum, { x, y }) => sum + Math.hypot(x, y), 0);
    expect(length(true)).toBeCloseTo(2 * projected, 6);
    expect(length(false)).toBeCloseTo(6 * projected, 6);
  });
  it('cuts an edge where a face before it begins', () => {
    const wall = (y: number, left: number, right: number): Face<null> => ({
      points: [vector(left, y, 0), vector(right, y, 0), vector(right, y, 10), vector(left, y, 10)],
      edges: [true, false, false, false],
      data: null,
    });
    // Seen from the front, level: the near wall hides the lower edge of the far one from 4 to 10, and not its own.
    const view = viewOf(0, 0);
    const far = { ...wall(5, 0, 10), points: wall(5, 0, 10).points.map((p) => ({ ...p, z: p.z + 5 })) };
    const edges = edgesOf(seeFaces([wall(0, 4, 12), far], view), view).filter(
      ({ from }) => Math.abs(from.y + 5) < 1e-9,
    );
    expect(edges.map(({ from, to, hidden }) => [from.x, to.x, hidden])).toEqual([
      [0, 4, false],
      [4, 10, true],
    ]);
  });
});

const size = (a: Vector): number => Math.hypot(a.x, a.y, a.z);
const dist = (a: Vector, b: Vector): number => size(minus(a, b));
