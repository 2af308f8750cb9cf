import { cross, dot, minus, plus, times, unit, type Vector } from './vector';

/** A flat face in space, with what the caller needs to know it by. */
export interface Face<T> {
  readonly points: readonly Vector[];
  readonly edges: readonly boolean[];
  readonly data: T;
}
interface Node<T> {
  readonly normal: Vector;
  readonly offset: number;
  readonly on: readonly Face<T>[];
  readonly front: Node<T> | null;
  readonly back: Node<T> | null;
}
/** Closer to a plane than this is in it: thinner than the card, thicker than rounding noise. */
const IN_PLANE = 1e-4;

/**
 * Faces from the furthest to the nearest along `towards` (the direction to the viewer), so that painting them in order hides
 * what is hidden. A binary space partition: exact where sorting by centres is not; faces that stick through others are cut.
 */
export function backToFront<T>(faces: readonly Face<T>[], towards: Vector): readonly Face<T>[] {
  const result: Face<T>[] = [];
  walk(partition(faces), towards, result);
  return result;
}

function walk<T>(node: Node<T> | null, towards: Vector, into: Face<T>[]): void {
  if (!node) return;
  const facing = dot(node.normal, towards) >= 0;
  walk(facing ? node.back : node.front, towards, into);
  into.push(...node.on);
  walk(facing ? node.front : node.back, towards, into);
}

function partition<T>(faces: readonly Face<T>[]): Node<T> | null {
  const usable = faces.filter((face) => face.points.length >= 3 && planeOf(face) !== null);
  if (usable.length === 0) return null;
  const { normal, offset } = planeOf(chooseCut(usable)) as Plane;
  const [on, front, back]: [Face<T>[], Face<T>[], Face<T>[]] = [[], [], []];
  for (const face of usable) {
    const sides = face.points.map((point) => dot(normal, point) - offset);
    if (sides.every((side) => Math.abs(side) <= IN_PLANE)) on.push(face);
    else if (sides.every((side) => side >= -IN_PLANE)) front.push(face);
    else if (sides.every((side) => side <= IN_PLANE)) back.push(face);
    else {
      front.push(half(face, sides, 1));
      back.push(half(face, sides, -1));
    }
  }
  return { normal, offset, on, front: partition(front), back: partition(back) };
}

interface Plane {
  readonly normal: Vector;
  readonly offset: number;
}
/** Newell's method: sound for any flat polygon; null for one without area. */
function planeOf<T>(face: Face<T>): Plane | null {
  let sum: Vector = { x: 0, y: 0, z: 0 };
  const origin = face.points[0] as Vector;
  face.points.forEach((point, index) => {
    sum = plus(
      sum,
      cross(minus(point, origin), minus(face.points[(index + 1) % face.points.length] as Vector, origin)),
    );
  });
  if (dot(sum, sum) < 1e-12) return null;
  const normal = unit(sum);
  return { normal, offset: dot(normal, origin) };
}

/** Of a few candidates, the face whose plane cuts the fewest others. */
function chooseCut<T>(faces: readonly Face<T>[]): Face<T> {
  const stride = Math.max(1, Math.floor(faces.length / 6));
  let best = faces[0] as Face<T>;
  let fewest = Infinity;
  for (let index = 0; index < faces.length; index += stride) {
    const { normal, offset } = planeOf(faces[index] as Face<T>) as Plane;
    const cuts = faces.filter((face) => {
      const sides = face.points.map((point) => dot(normal, point) - offset);
      return sides.some((side) => side > IN_PLANE) && sides.some((side) => side < -IN_PLANE);
    }).length;
    if (cuts < fewest) {
      fewest = cuts;
      best = faces[index] as Face<T>;
    }
  }
  return best;
}

/** The part of a face on one side of a plane; the new edge along the cut is no edge of the card. */
function half<T>(face: Face<T>, sides: readonly number[], sign: 1 | -1): Face<T> {
  const points: Vector[] = [];
  const edges: boolean[] = [];
  face.points.forEach((point, index) => {
    const nextIndex = (index + 1) % face.points.length;
    const next = face.points[nextIndex] as Vector;
    const [here, there] = [(sides[index] as number) * sign, (sides[nextIndex] as number) * sign];
    const real = face.edges[index] as boolean;
    if (here >= 0) {
      points.push(point);
      edges.push(there >= 0 || here > 0 ? real : false);
    }
    if ((here > 0 && there < 0) || (here < 0 && there > 0)) {
      points.push(plus(point, times(minus(next, point), here / (here - there))));
      edges.push(here < 0 ? real : false);
    }
  });
  return { points, edges, data: face.data };
}
