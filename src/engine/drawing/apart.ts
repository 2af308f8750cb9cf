import { encloses } from '../net';
import { cross, minus, plus, times, vector, type Face, type Vector } from '../space';

type Faces = readonly Face<unknown>[];
interface Box {
  readonly min: Vector;
  readonly max: Vector;
}
/** How a piece comes out of the pieces placed before it: along which axis, and of which pieces. */
export interface Way {
  readonly along: 'x' | 'y' | 'z';
  readonly sign: 1 | -1;
  readonly from: readonly number[];
}

const AXES = ['x', 'y', 'z'] as const;
/** Pieces nearer than this touch; drawers in their places do not. */
const TOUCHING = 0.6;
/** How much longer a way may be for one crossing less, millimetres: curves made of facets touch where card does not. */
const DETOUR = 20;
/** Room left between pieces that were moved apart, millimetres. */
const GAP = 6;

/**
 * For each piece of a closed box, the shortest straight way out of the pieces before it that goes through few faces or
 * none. A lid comes off upwards, a drawer through the open end of its sleeve.
 */
export function waysOut(pieces: readonly Faces[]): readonly Way[] {
  const boxes = pieces.map(boxOf);
  return pieces.map((piece, index) => {
    const from = boxes.flatMap((box, other) => (other < index && meet(box, boxes[index] as Box) ? [other] : []));
    const ways = AXES.flatMap((along) => ([1, -1] as const).map((sign): Way => ({ along, sign, from })));
    const weighed = ways.map((way) => ({
      way,
      through: from.reduce((sum, other) => sum + crossings(piece, pieces[other] as Faces, way), 0),
      far: Math.max(0, ...from.map((other) => beyond(boxes[other] as Box, boxes[index] as Box, way))),
    }));
    weighed.sort((a, b) => a.through * DETOUR + a.far - (b.through * DETOUR + b.far));
    return (weighed[0] as { way: Way }).way;
  });
}

/** How far each piece, in whatever state of folding, is moved along its way to be clear of those that it comes out of. */
export function shiftsApart(pieces: readonly Faces[], ways: readonly Way[]): readonly Vector[] {
  const boxes: Box[] = [];
  return pieces.map((piece, index) => {
    const { along, sign, from } = ways[index] as Way;
    const box = boxOf(piece);
    const far = Math.max(0, ...from.map((other) => beyond(boxes[other] as Box, box, { along, sign }) + GAP));
    const shift = { ...vector(0, 0, 0), [along]: sign * far };
    boxes.push({ min: plus(box.min, shift), max: plus(box.max, shift) });
    return shift;
  });
}

function boxOf(faces: Faces): Box {
  const points = faces.flatMap((face) => face.points);
  const of = (pick: (...values: number[]) => number) =>
    vector(...(AXES.map((axis) => pick(...points.map((point) => point[axis]))) as [number, number, number]));
  return { min: of(Math.min), max: of(Math.max) };
}
const meet = (a: Box, b: Box): boolean =>
  AXES.every((axis) => a.min[axis] < b.max[axis] + TOUCHING && b.min[axis] < a.max[axis] + TOUCHING);
/** How far a box has to go along a way to be past another; less than 0 when it is past already. */
const beyond = (still: Box, moved: Box, { along, sign }: Pick<Way, 'along' | 'sign'>): number =>
  sign > 0 ? still.max[along] - moved.min[along] : moved.max[along] - still.min[along];

/** How many points of a piece go through faces of another on its way out, and the other way about. */
function crossings(moved: Faces, still: Faces, { along, sign }: Way): number {
  return hits(moved, still, along, sign) + hits(still, moved, along, -sign);
}
function hits(points: Faces, walls: Faces, along: Way['along'], sign: number): number {
  const [u, v] = AXES.filter((axis) => axis !== along) as [Way['along'], Way['along']];
  const flatly = (point: Vector) => ({ x: point[u], y: point[v] });
  const flat = walls.map((wall) => ({ corners: wall.points.map(flatly), depth: depthOf(wall, along, u, v) }));
  let count = 0;
  for (const point of points.flatMap(within)) {
    for (const { corners, depth } of flat) {
      if (!depth || (depth(point) - point[along]) * sign < TOUCHING) continue;
      if (encloses(corners, flatly(point))) count += 1;
    }
  }
  return count;
}
/** The middle of a face, and its corners drawn in a little: what lies on a rim is not inside it. */
function within({ points }: Face<unknown>): readonly Vector[] {
  const middle = times(points.reduce(plus), 1 / points.length);
  return [middle, ...points.map((point) => plus(middle, times(minus(point, middle), 0.95)))];
}
/** Where a line along an axis meets the face's plane; null for a face that the axis runs along. */
function depthOf({ points }: Face<unknown>, along: Way['along'], u: Way['along'], v: Way['along']) {
  const origin = points[0] as Vector;
  const normal = points
    .map((point, index) => cross(minus(point, origin), minus(points[(index + 1) % points.length] as Vector, origin)))
    .reduce(plus);
  const size = Math.hypot(normal.x, normal.y, normal.z);
  if (Math.abs(normal[along]) < 0.05 * size || size === 0) return null;
  return (point: Vector): number =>
    origin[along] - (normal[u] * (point[u] - origin[u]) + normal[v] * (point[v] - origin[v])) / normal[along];
}
