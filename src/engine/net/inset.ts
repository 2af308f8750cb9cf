import { COINCIDENT, coincident } from '../measure';
import type { Arc, Curve, Loop, Point } from '../types';
import { straighten } from './assemble';
import { encloses } from './crossing';
import { areaOf, distance, line, pointAt, pointsOf, sweepOf } from './curve';

/** Halvings of the search for the distance at which a side vanishes: 2⁻⁵⁰ of it is far below a nanometre. */
const HALVINGS = 50;
/** Most sides that may go with parts that are pinched off. */
const PINCHES = 3;

/**
 * A loop with every side moved by `by` millimetres to its right, which is into the card, for outlines and holes alike.
 * Straight sides stay parallel and meet in mitres; arcs keep their centre, and one that shrinks to nothing leaves the sharp
 * corner of its neighbours. Null when nothing is left, or when what is left is nearer to the loop than that somewhere: the
 * face would fall apart.
 */
export function inset(loop: Loop, by: number): Loop | null {
  const ring = roundAbout(loop);
  if (ring) return movedRing(ring, by);
  return settled(straighten(loop), { loop, by, pinches: PINCHES });
}

/** The sides moved, without those that vanish on the way. */
function settled(sides: Loop, to: { readonly loop: Loop; readonly by: number; readonly pinches: number }): Loop | null {
  const { loop, by, pinches } = to;
  const moved = movedSides(sides, by);
  const without = (gone: ReadonlySet<number>) => sides.filter((_, index) => !gone.has(index));
  if (!moved?.every((side): side is Curve => side !== null)) {
    const gone = firstToVanish(sides, by);
    return gone.size === 0 || gone.size > sides.length - 2 ? null : settled(without(gone), to);
  }
  const near = new Set(moved.flatMap((side, index) => (keepsAway(side, loop, by) ? [] : [index])));
  if (near.size === 0) return moved;
  if (pinches === 0 || sides.length < 4) return null;
  // Sides that come too near bound a part that is pinched off, such as a thin tip. Which of them go with it shows in what is left.
  const count = sides.length;
  const beside = [...near].flatMap((index) => [index, (index + 1) % count, (index + count - 1) % count]);
  const left = [...new Set(beside)].map((index) =>
    settled(without(new Set([index])), { loop, by, pinches: pinches - 1 }),
  );
  return left.reduce(
    (best, one) => (one && (!best || Math.abs(areaOf(one)) > Math.abs(areaOf(best))) ? one : best),
    null,
  );
}

/** A loop that is one circle. */
function roundAbout(loop: Loop): Arc | null {
  const [first] = loop;
  if (first?.type !== 'arc') return null;
  const same = loop.every(
    (curve) =>
      curve.type === 'arc' && coincident(curve.centre.x, first.centre.x) && coincident(curve.centre.y, first.centre.y),
  );
  return same ? first : null;
}
function movedRing({ centre, radius: before, clockwise }: Arc, by: number): Loop | null {
  const radius = clockwise ? before - by : before + by;
  if (radius < COINCIDENT) return null;
  const [left, right] = [
    { x: centre.x - radius, y: centre.y },
    { x: centre.x + radius, y: centre.y },
  ];
  const half = (from: Point, to: Point): Arc => ({ type: 'arc', from, to, centre, radius, clockwise });
  return [half(left, right), half(right, left)];
}

/** Sides by which the loop first becomes too short as it moves, at the distance where that happens. */
function firstToVanish(sides: Loop, by: number): ReadonlySet<number> {
  const goneAt = (distanceMoved: number) =>
    new Set((movedSides(sides, distanceMoved) ?? []).flatMap((side, index) => (side === null ? [index] : [])));
  let [low, high] = [0, by];
  for (let step = 0; step < HALVINGS; step += 1) {
    const middle = (low + high) / 2;
    if (movedSides(sides, middle)?.every((side) => side !== null)) low = middle;
    else high = middle;
  }
  return goneAt(high);
}

/** Every side moved and cut at its neighbours, null for one of which nothing is left; null when two neighbours do not meet. */
function movedSides(sides: Loop, by: number): readonly (Curve | null)[] | null {
  const moved = sides.map((side) => movedSide(side, by));
  const joints: (Point | null)[] = [];
  for (const [index, side] of sides.entries()) {
    const next = (index + 1) % sides.length;
    const [a, b] = [moved[index], moved[next]];
    joints.push(a && b ? jointOf([side, sides[next] as Curve], [a, b], by) : null);
  }
  const lost = joints.some((joint, index) => !joint && moved[index] && moved[(index + 1) % sides.length]);
  if (lost) return null;
  return moved.map((side, index) => {
    const [from, to] = [joints[(index + sides.length - 1) % sides.length], joints[index]];
    if (!side) return null;
    return !from || !to || runsOn(side, from, to) ? { ...side, from: from ?? side.from, to: to ?? side.to } : null;
  });
}

function movedSide(side: Curve, by: number): Curve | null {
  if (side.type === 'line') {
    const { x, y } = normalAt(side, 0);
    const shift = (point: Point): Point => ({ x: point.x + x * by, y: point.y + y * by });
    return line(shift(side.from), shift(side.to));
  }
  const radius = side.clockwise ? side.radius - by : side.radius + by;
  if (radius < COINCIDENT) return null;
  const { centre } = side;
  const scale = (point: Point): Point => ({
    x: centre.x + ((point.x - centre.x) * radius) / side.radius,
    y: centre.y + ((point.y - centre.y) * radius) / side.radius,
  });
  return { ...side, radius, from: scale(side.from), to: scale(side.to) };
}

/** Of unit length, into the card: to the right of the way the curve runs. */
function normalAt(curve: Curve, t: 0 | 1): Point {
  const at = t === 0 ? curve.from : curve.to;
  if (curve.type === 'line') {
    const length = distance(curve.from, curve.to);
    return { x: (curve.from.y - curve.to.y) / length, y: (curve.to.x - curve.from.x) / length };
  }
  const way = curve.clockwise ? 1 : -1;
  return { x: (way * (curve.centre.x - at.x)) / curve.radius, y: (way * (curve.centre.y - at.y)) / curve.radius };
}

/** Where two moved neighbours meet; null when they do not. */
function jointOf([before, after]: readonly [Curve, Curve], [a, b]: readonly [Curve, Curve], by: number): Point | null {
  const neighbours = coincident(before.to.x, after.from.x) && coincident(before.to.y, after.from.y);
  const [u, v] = [normalAt(before, 1), normalAt(after, 0)];
  // Sides that run into one another smoothly stay together: their crossing would be found only by chance.
  if (neighbours && Math.hypot(u.x - v.x, u.y - v.y) < COINCIDENT)
    return { x: before.to.x + u.x * by, y: before.to.y + u.y * by };
  const near = { x: (before.to.x + after.from.x) / 2, y: (before.to.y + after.from.y) / 2 };
  const [first, ...others] = meetings(a, b);
  return others.reduce<Point | null>(
    (best, point) => (best && distance(point, near) < distance(best, near) ? point : best),
    first ?? null,
  );
}

/** Where the whole lines and circles of two curves meet; none for parallel lines and circles about one centre. */
function meetings(a: Curve, b: Curve): readonly Point[] {
  if (a.type === 'line' && b.type === 'line') {
    const [u, v] = [directionOf(a), directionOf(b)];
    const turn = u.x * v.y - u.y * v.x;
    if (Math.abs(turn) < COINCIDENT) return [];
    const t = ((b.from.x - a.from.x) * v.y - (b.from.y - a.from.y) * v.x) / turn;
    return [{ x: a.from.x + u.x * t, y: a.from.y + u.y * t }];
  }
  if (a.type === 'arc' && b.type === 'arc') {
    const apart = distance(a.centre, b.centre);
    if (apart < COINCIDENT) return [];
    const u = { x: (b.centre.x - a.centre.x) / apart, y: (b.centre.y - a.centre.y) / apart };
    // The radical line of two circles: this far from the first centre, square to the line between the centres.
    const foot = (apart ** 2 + a.radius ** 2 - b.radius ** 2) / (2 * apart);
    return across({ x: a.centre.x + u.x * foot, y: a.centre.y + u.y * foot }, { x: -u.y, y: u.x }, a);
  }
  const [straight, round] = a.type === 'line' ? [a, b as Arc] : [b as Curve, a];
  const u = directionOf(straight);
  const along = (round.centre.x - straight.from.x) * u.x + (round.centre.y - straight.from.y) * u.y;
  return across({ x: straight.from.x + u.x * along, y: straight.from.y + u.y * along }, u, round);
}
/** The two points of a circle on a line of direction `u` whose nearest point to the centre is `foot`. */
function across(foot: Point, u: Point, { centre, radius }: Arc): readonly Point[] {
  const square = radius ** 2 - distance(foot, centre) ** 2;
  if (square < 0) return [];
  const half = Math.sqrt(square);
  return [
    { x: foot.x + u.x * half, y: foot.y + u.y * half },
    { x: foot.x - u.x * half, y: foot.y - u.y * half },
  ];
}
function directionOf(curve: Curve): Point {
  const length = distance(curve.from, curve.to);
  return { x: (curve.to.x - curve.from.x) / length, y: (curve.to.y - curve.from.y) / length };
}

/** Whether a moved side still runs the way it did, from one joint to the other. */
function runsOn(side: Curve, from: Point, to: Point): boolean {
  if (side.type === 'line') {
    const u = directionOf(side);
    return (to.x - from.x) * u.x + (to.y - from.y) * u.y > COINCIDENT;
  }
  const middle = pointAt(side, 0.5);
  const turnTo = (point: Point): number => {
    const [x, y] = [middle.x - side.centre.x, middle.y - side.centre.y];
    const [p, q] = [point.x - side.centre.x, point.y - side.centre.y];
    return Math.atan2(x * q - y * p, x * p + y * q) * (side.clockwise ? 1 : -1);
  };
  return (turnTo(to) - turnTo(from)) * side.radius > COINCIDENT;
}

/** Whether a moved side lies within the loop, no nearer to it than it was moved. */
function keepsAway(side: Curve, loop: Loop, by: number): boolean {
  return [0, 0.25, 0.5, 0.75].every((t) => {
    const point = pointAt(side, t);
    return loop.every((curve) => distanceTo(curve, point) > by - COINCIDENT) && (by === 0 || isRightOf(loop, point));
  });
}
/** Inside an outline, outside a hole. */
const isRightOf = (loop: Loop, point: Point): boolean => encloses(pointsOf(loop), point) === areaOf(loop) > 0;

/** From a point to the nearest point of a curve, its ends included. */
export function distanceTo(curve: Curve, point: Point): number {
  const ends = Math.min(distance(point, curve.from), distance(point, curve.to));
  if (curve.type === 'line') {
    const length = distance(curve.from, curve.to);
    const u = directionOf(curve);
    const along = (point.x - curve.from.x) * u.x + (point.y - curve.from.y) * u.y;
    if (!(along > 0 && along < length)) return ends;
    return Math.abs((point.x - curve.from.x) * u.y - (point.y - curve.from.y) * u.x);
  }
  const reach = distance(point, curve.centre);
  if (reach < COINCIDENT) return curve.radius;
  const on = {
    x: curve.centre.x + ((point.x - curve.centre.x) * curve.radius) / reach,
    y: curve.centre.y + ((point.y - curve.centre.y) * curve.radius) / reach,
  };
  const within = sweepOf({ ...curve, to: on }) < sweepOf(curve);
  return within ? Math.abs(reach - curve.radius) : ends;
}
