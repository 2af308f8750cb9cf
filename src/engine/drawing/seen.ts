import { encloses } from '../net';
import { cross, dot, minus, plus, times, vector, type Face, type Vector } from '../space';
import type { Point } from '../types';

/** A parallel projection: places of the drawing (x right, y down, one unit a millimetre) and how near they are. */
export interface View {
  readonly project: (point: Vector) => Point;
  /** To the viewer, in the box's own axes; of length 1. */
  readonly towards: Vector;
  /** A direction in the viewer's axes, for light that stays with the viewer. */
  readonly lit: (direction: Vector) => Vector;
}
/** A face as the viewer has it before them. */
export interface SeenFace<T> {
  readonly face: Face<T>;
  readonly corners: readonly Point[];
  /** How near the face is to the viewer under a place of the drawing; null for a face seen from its edge. */
  readonly nearness: ((at: Point) => number) | null;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Closer than this one face does not hide another: card that lies on card, and faces that share an edge. */
const IN_FRONT = 0.05;

export function viewOf(turn: number, tilt: number): View {
  const [t, d] = [(turn * Math.PI) / 180, (tilt * Math.PI) / 180];
  const spin = (p: Vector): Vector =>
    vector(p.x * Math.cos(t) - p.y * Math.sin(t), p.x * Math.sin(t) + p.y * Math.cos(t), p.z);
  return {
    project: (p) => {
      const s = spin(p);
      return { x: s.x, y: -(s.z * Math.cos(d) + s.y * Math.sin(d)) };
    },
    towards: vector(-Math.sin(t) * Math.cos(d), -Math.cos(t) * Math.cos(d), Math.sin(d)),
    lit: spin,
  };
}

/**
 * Faces with the outline of what is round among their edges: a seam inside a rolled panel counts as an edge where the strip
 * on one of its sides is seen from the front and the other from the back.
 */
export function withOutlines<T>(faces: readonly Face<T>[], { towards }: View): readonly Face<T>[] {
  const fronts = faces.map(({ points }) => dot(normalOf(points), towards) >= 0);
  const seams = new Map<string, { readonly face: number; readonly edge: number }[]>();
  faces.forEach(({ points, edges }, face) =>
    edges.forEach((real, edge) => {
      if (real) return;
      const ends = [points[edge] as Vector, points[(edge + 1) % points.length] as Vector];
      const key = ends.map(placeKey).sort().join(' ');
      seams.set(key, [...(seams.get(key) ?? []), { face, edge }]);
    }),
  );
  const outlined = new Map<number, Set<number>>();
  for (const [one, other, ...more] of seams.values()) {
    if (!one || !other || more.length > 0 || fronts[one.face] === fronts[other.face]) continue;
    for (const { face, edge } of [one, other]) outlined.set(face, (outlined.get(face) ?? new Set()).add(edge));
  }
  return faces.map((face, index) => {
    const more = outlined.get(index);
    return more ? { ...face, edges: face.edges.map((real, edge) => real || more.has(edge)) } : face;
  });
}
/** Strips that share a seam have its ends in the same places, but for the last digits of a double. */
const placeKey = ({ x, y, z }: Vector): string => [x, y, z].map((mm) => Math.round(mm * 1e3)).join();

const normalOf = (points: readonly Vector[]): Vector => {
  const origin = points[0] as Vector;
  return points
    .map((point, index) => cross(minus(point, origin), minus(points[(index + 1) % points.length] as Vector, origin)))
    .reduce(plus);
};

export function seeFaces<T>(faces: readonly Face<T>[], view: View): readonly SeenFace<T>[] {
  return faces.map((face) => {
    const corners = face.points.map(view.project);
    const [xs, ys] = [corners.map(({ x }) => x), corners.map(({ y }) => y)];
    return {
      face,
      corners,
      nearness: nearnessOf(face, corners, view),
      left: Math.min(...xs),
      right: Math.max(...xs),
      top: Math.min(...ys),
      bottom: Math.max(...ys),
    };
  });
}

/** A flat face's nearness is linear in the place: from one corner, and its slope from the face's normal. */
function nearnessOf<T>({ points }: Face<T>, corners: readonly Point[], { project, towards }: View) {
  const [origin, flat] = [points[0] as Vector, corners[0] as Point];
  const normal = normalOf(points);
  const facing = dot(normal, towards);
  if (Math.abs(facing) < 1e-3 * Math.hypot(normal.x, normal.y, normal.z) || facing === 0) return null;
  // The drawing's own two directions in the box's axes: a place moved by them keeps its nearness to the viewer.
  const [right, down] = axesOf(project);
  return (at: Point): number =>
    dot(origin, towards) - ((at.x - flat.x) * dot(normal, right) + (at.y - flat.y) * dot(normal, down)) / facing;
}
/** The directions that the projection shows as right and down: rows of an orthonormal matrix. */
function axesOf(project: View['project']): readonly [Vector, Vector] {
  const [x, y, z] = [project(vector(1, 0, 0)), project(vector(0, 1, 0)), project(vector(0, 0, 1))];
  return [vector(x.x, y.x, z.x), vector(x.y, y.y, z.y)];
}

/** Whether a face lies between the viewer and a place of the drawing that is so near. */
export function isHidden<T>(at: Point, near: number, faces: readonly SeenFace<T>[]): boolean {
  return faces.some(
    ({ left, right, top, bottom, corners, nearness }) =>
      nearness !== null &&
      at.x >= left &&
      at.x <= right &&
      at.y >= top &&
      at.y <= bottom &&
      nearness(at) > near + IN_FRONT &&
      encloses(corners, at),
  );
}

export interface SeenEdge {
  readonly from: Point;
  readonly to: Point;
  readonly hidden: boolean;
}
/** Every edge of the card, cut where a face's outline crosses it, each part either in view or behind a face. */
export function edgesOf<T>(faces: readonly SeenFace<T>[], view: View): readonly SeenEdge[] {
  return faces.flatMap(({ face, corners }) =>
    face.edges.flatMap((real, index) => {
      if (!real) return [];
      const next = (index + 1) % corners.length;
      const [a, b] = [corners[index] as Point, corners[next] as Point];
      const [p, q] = [face.points[index] as Vector, face.points[next] as Vector];
      const stops = [0, ...cutsOf(a, b, faces), 1];
      const parts: SeenEdge[] = [];
      for (let part = 1; part < stops.length; part += 1) {
        const [start, end] = [stops[part - 1] as number, stops[part] as number];
        if (end - start < 1e-6) continue;
        const middle = (start + end) / 2;
        const near = dot(plus(p, times(minus(q, p), middle)), view.towards);
        const hidden = isHidden(between(a, b, middle), near, faces);
        const last = parts.at(-1);
        if (last?.hidden === hidden) parts[parts.length - 1] = { ...last, to: between(a, b, end) };
        else parts.push({ from: between(a, b, start), to: between(a, b, end), hidden });
      }
      return parts;
    }),
  );
}
const between = (a: Point, b: Point, share: number): Point => ({
  x: a.x + (b.x - a.x) * share,
  y: a.y + (b.y - a.y) * share,
});
/** Shares of the way from a to b where outlines cross it, in order. Outlines along it cut nothing. */
function cutsOf<T>(a: Point, b: Point, faces: readonly SeenFace<T>[]): readonly number[] {
  const [left, right, top, bottom] = [Math.min(a.x, b.x), Math.max(a.x, b.x), Math.min(a.y, b.y), Math.max(a.y, b.y)];
  const cuts: number[] = [];
  for (const face of faces) {
    if (face.left > right || face.right < left || face.top > bottom || face.bottom < top) continue;
    face.corners.forEach((c, index) => {
      const d = face.corners[(index + 1) % face.corners.length] as Point;
      const side = ({ x, y }: Point) => (b.x - a.x) * (y - a.y) - (b.y - a.y) * (x - a.x);
      const [here, there] = [side(c), side(d)];
      if (here > 0 === there > 0) return;
      const cut = between(c, d, here / (here - there));
      const share =
        Math.abs(b.x - a.x) > Math.abs(b.y - a.y) ? (cut.x - a.x) / (b.x - a.x) : (cut.y - a.y) / (b.y - a.y);
      if (share > 1e-6 && share < 1 - 1e-6) cuts.push(share);
    });
  }
  return cuts.sort((one, other) => one - other);
}
