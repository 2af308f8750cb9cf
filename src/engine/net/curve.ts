import { coincident, isZero } from '../measure';
import type { Arc, Curve, Line, Loop, Point } from '../types';

export const line = (from: Point, to: Point): Line => ({ type: 'line', from, to });
export const samePoint = (a: Point, b: Point): boolean => coincident(a.x, b.x) && coincident(a.y, b.y);
export const distance = (a: Point, b: Point): number => Math.hypot(b.x - a.x, b.y - a.y);

/**
 * The arc from `from` to `to` of the given radius that turns less than half round; null when the chord is longer than the
 * diameter or nothing. `clockwise` as seen on screen (y down). A chord as long as the diameter gives the half circle.
 */
export function arcThrough(from: Point, to: Point, radius: number, clockwise: boolean): Arc | null {
  const chord = distance(from, to);
  if (isZero(chord) || chord > 2 * radius + 1e-6) return null;
  const height = Math.sqrt(Math.max(0, radius * radius - (chord / 2) ** 2));
  const side = clockwise ? 1 : -1;
  const unit = { x: (to.x - from.x) / chord, y: (to.y - from.y) / chord };
  const centre = { x: (from.x + to.x) / 2 - side * unit.y * height, y: (from.y + to.y) / 2 + side * unit.x * height };
  return { type: 'arc', from, to, centre, radius: Math.max(radius, chord / 2), clockwise };
}

/** Turn of the arc from `from` to `to` in radians, positive, at most a full turn. */
export function sweepOf(arc: Arc): number {
  const start = Math.atan2(arc.from.y - arc.centre.y, arc.from.x - arc.centre.x);
  const end = Math.atan2(arc.to.y - arc.centre.y, arc.to.x - arc.centre.x);
  const turn = arc.clockwise ? end - start : start - end;
  return turn > 1e-12 ? turn : turn + 2 * Math.PI;
}

/** Point of the curve at `t` from 0 to 1, by length. */
export function pointAt(curve: Curve, t: number): Point {
  if (curve.type === 'line')
    return { x: curve.from.x + (curve.to.x - curve.from.x) * t, y: curve.from.y + (curve.to.y - curve.from.y) * t };
  const start = Math.atan2(curve.from.y - curve.centre.y, curve.from.x - curve.centre.x);
  const angle = start + (curve.clockwise ? 1 : -1) * sweepOf(curve) * t;
  return { x: curve.centre.x + curve.radius * Math.cos(angle), y: curve.centre.y + curve.radius * Math.sin(angle) };
}

export const lengthOf = (curve: Curve): number =>
  curve.type === 'line' ? distance(curve.from, curve.to) : curve.radius * sweepOf(curve);

export function reversed(curve: Curve): Curve {
  return curve.type === 'line'
    ? line(curve.to, curve.from)
    : { ...curve, from: curve.to, to: curve.from, clockwise: !curve.clockwise };
}

/** The curve from `from` to `to` out of a longer one; both points must lie on it. */
export const partOf = (curve: Curve, from: Point, to: Point): Curve => ({ ...curve, from, to });

/** Straight chords that stay within `tolerance` of the curve; the first point is left out. */
export const flatten = (curve: Curve, tolerance?: number): readonly Point[] => pointsOf([curve], tolerance);

/** The corners of a loop with its arcs flattened. */
export function pointsOf(loop: Loop, tolerance = 0.05): readonly Point[] {
  const points: Point[] = [];
  for (const curve of loop) {
    if (curve.type === 'arc') {
      // A chord over angle a leaves the circle by r (1 − cos(a / 2)).
      const step = 2 * Math.acos(Math.max(-1, 1 - tolerance / curve.radius));
      const count = Math.max(2, Math.ceil(sweepOf(curve) / Math.max(step, 1e-3)));
      for (let index = 1; index < count; index += 1) points.push(pointAt(curve, index / count));
    }
    points.push(curve.to);
  }
  return points;
}

/**
 * Area enclosed, positive when the loop runs clockwise on screen. Exact: the polygon of the curves' ends plus the circular
 * segments r² (a − sin a) / 2 beyond their chords (Machinery's Handbook, circular segments).
 */
export function areaOf(loop: Loop): number {
  return loop.reduce((area, curve) => {
    const polygon = (curve.from.x * curve.to.y - curve.to.x * curve.from.y) / 2;
    if (curve.type === 'line') return area + polygon;
    const sweep = sweepOf(curve);
    const segment = (curve.radius ** 2 / 2) * (sweep - Math.sin(sweep));
    return area + polygon + (curve.clockwise ? segment : -segment);
  }, 0);
}
export const perimeterOf = (loop: Loop): number => loop.reduce((sum, curve) => sum + lengthOf(curve), 0);

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}
/** The smallest upright rectangle round a loop, arcs included. */
export function boundsOf(loop: Loop): Box {
  let [left, top, right, bottom] = [Infinity, Infinity, -Infinity, -Infinity];
  const take = ({ x, y }: Point): void => {
    if (x < left) left = x;
    if (x > right) right = x;
    if (y < top) top = y;
    if (y > bottom) bottom = y;
  };
  for (const curve of loop) {
    take(curve.from);
    if (curve.type === 'arc') extremesOf(curve).forEach(take);
  }
  return { left, top, right, bottom };
}
const NONE: readonly Point[] = [];
/** Points of the arc furthest left, right, up and down, where it passes them. */
function extremesOf(arc: Arc): readonly Point[] {
  const { from, to, centre, radius } = arc;
  // Less than a quarter of the circle, within one quarter of it: most teeth.
  const quarterOf = ({ x, y }: Point): number => (x > centre.x ? 2 : 0) + (y > centre.y ? 1 : 0);
  const short = (from.x - to.x) ** 2 + (from.y - to.y) ** 2 < radius * radius;
  if (short && quarterOf(from) === quarterOf(to) && sweepOf(arc) < Math.PI) return NONE;
  const start = Math.atan2(from.y - centre.y, from.x - centre.x);
  const sweep = sweepOf(arc);
  return [0, 1, 2, 3].flatMap((quarter) => {
    const turn = ((arc.clockwise ? 1 : -1) * (quarter * (Math.PI / 2) - start)) % (2 * Math.PI);
    const along = turn < 0 ? turn + 2 * Math.PI : turn;
    return along < sweep ? [pointAt(arc, along / sweep)] : [];
  });
}
