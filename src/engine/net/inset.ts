import { COINCIDENT, coincident, isZero } from '../measure';
import type { Arc, Curve, Loop, Point } from '../types';
import { straighten } from './assemble';
import { encloses } from './crossing';
import { areaOf, distance, line, partOf, pointAt, pointsOf, sweepOf } from './curve';

/** Ends of moved sides that meet are the same to a tenth of a micrometre: each was worked out from another side. */
const MEET = 1e-4;
/** A part of this share of the largest, such as what a thin tip leaves beyond its neck, is waste and no second part. */
const CRUMB = 0.01;

/**
 * A loop with every side moved by `by` millimetres to its right, which is into the card, for outlines and holes alike.
 * Straight sides stay parallel and meet in mitres; arcs keep their centre, and one that shrinks to nothing leaves the sharp
 * corner of its neighbours. Null when nothing is left or the face would fall apart; crumbs are left out.
 *
 * What lies `by` away from the loop lies on its moved sides: those are cut wherever they meet, what is nearer to the loop than
 * that is left out, and the rest is one closed loop.
 */
export function inset(loop: Loop, by: number): Loop | null {
  const ring = roundAbout(loop);
  if (ring) return movedRing(ring, by);
  const sides = straighten(loop);
  if (isZero(by)) return sides;
  const corners = sides.map((side, index) => cornerOf(side, sides[(index + 1) % sides.length] as Curve, by));
  const moved = sides.map((side, index): Curve | null => {
    const whole = movedSide(side, by);
    const before = corners[(index + sides.length - 1) % sides.length];
    return whole && { ...whole, from: before?.mitre ?? whole.from, to: corners[index]?.mitre ?? whole.to };
  });
  const isRight = isRightOf(loop);
  const kept = splitWhereTheyMeet(moved).filter(({ curve, of }) => {
    const middle = pointAt(curve, 0.5);
    const inMitre = corners.some(
      (corner, index) => corner && of !== index && of !== (index + 1) % sides.length && isWithin(corner.kite, middle),
    );
    return !inMitre && isRight(middle) && sides.every((side) => distanceTo(side, middle) > by - COINCIDENT);
  });
  const loops = (closed(withoutDoubles(kept)) ?? []).map((left) => ({ left, area: Math.abs(areaOf(left)) }));
  const [largest, ...others] = loops.sort((a, b) => b.area - a.area);
  const apart = others.some(({ area }) => area > CRUMB * (largest?.area ?? 0));
  return largest && !apart && areaOf(largest.left) * areaOf(loop) > 0 ? straighten(largest.left) : null;
}

/** A corner at which the card turns back: moved sides part there, and are drawn out until they meet. */
interface MitredCorner {
  readonly mitre: Point;
  /** What the mitre takes beyond its sides: nothing else is left there. */
  readonly kite: readonly Point[];
}
/** Inside, and not on an edge. */
const isWithin = (kite: readonly Point[], point: Point): boolean =>
  encloses(kite, point) &&
  kite.every((from, index) => distanceTo(line(from, kite[(index + 1) % kite.length] as Point), point) > COINCIDENT);
/** Null where moved sides cross, or run into one another. */
function cornerOf(before: Curve, after: Curve, by: number): MitredCorner | null {
  const { to: corner } = before;
  const [u, v] = [normalAt(before, 1), normalAt(after, 0)];
  if (!(u.x * v.y - u.y * v.x < -COINCIDENT)) return null;
  const [a, b] = [movedSide(before, by), movedSide(after, by)];
  const mitre = a && b && nearest(meetings(a, b), corner);
  return mitre ? { mitre, kite: [corner, a.to, mitre, b.from] } : null;
}
const nearest = (points: readonly Point[], to: Point): Point | null =>
  points.reduce<Point | null>(
    (best, point) => (best && distance(best, to) <= distance(point, to) ? best : point),
    null,
  );

interface Part {
  readonly curve: Curve;
  /** The side that it was moved from. */
  readonly of: number;
}
function splitWhereTheyMeet(moved: readonly (Curve | null)[]): readonly Part[] {
  return moved.flatMap((curve, of): readonly Part[] => {
    if (!curve) return [];
    const whole = wayTo(curve, curve.to);
    const stops = moved
      .flatMap((other) =>
        other && other !== curve
          ? [
              ...meetings(curve, other).filter((point) => isOn(other, point)),
              // Sides on one line meet nowhere, but one may begin or end on the other.
              ...[other.from, other.to].filter((point) => distanceTo(curve, point) < COINCIDENT),
            ]
          : [],
      )
      .map((point) => ({ point, way: wayTo(curve, point) }))
      .filter(({ way }) => way > MEET && way < whole - MEET)
      .sort((a, b) => a.way - b.way)
      .filter(({ way }, index, all) => index === 0 || way - (all[index - 1] as { way: number }).way > MEET)
      .map(({ point }) => point);
    return [...stops, curve.to].map((stop, index) => ({
      of,
      curve: partOf(curve, stops[index - 1] ?? curve.from, stop),
    }));
  });
}
/** How far along a line, or round a circle, a point of it lies; negative before a line's beginning. */
function wayTo(curve: Curve, point: Point): number {
  if (curve.type === 'arc') return sweepOf({ ...curve, to: point }) * curve.radius;
  const u = directionOf(curve);
  return (point.x - curve.from.x) * u.x + (point.y - curve.from.y) * u.y;
}
function isOn(curve: Curve, point: Point): boolean {
  if (distance(curve.from, point) < MEET || distance(curve.to, point) < MEET) return true;
  const way = wayTo(curve, point);
  return way > 0 && way < wayTo(curve, curve.to);
}

/** Parts that lie on one another: the same way they are one, opposite ways there is nothing between them. */
function withoutDoubles(parts: readonly Part[]): readonly Curve[] {
  const curves: Curve[] = [];
  const found = (from: Point, to: Point, middle: Point): number =>
    curves.findIndex(
      (curve) =>
        distance(curve.from, from) < MEET &&
        distance(curve.to, to) < MEET &&
        distance(pointAt(curve, 0.5), middle) < MEET,
    );
  for (const { curve } of parts) {
    const middle = pointAt(curve, 0.5);
    if (found(curve.from, curve.to, middle) >= 0) continue;
    const opposite = found(curve.to, curve.from, middle);
    if (opposite >= 0) curves.splice(opposite, 1);
    else curves.push(curve);
  }
  return curves;
}

/** Curves one after the other in closed loops; null when some run nowhere. */
function closed(curves: readonly Curve[]): Loop[] | null {
  const rest = new Set(curves);
  const loops: Loop[] = [];
  for (const first of curves) {
    if (!rest.delete(first)) continue;
    const loop = [first];
    while (distance((loop.at(-1) as Curve).to, first.from) > MEET) {
      const { to } = loop.at(-1) as Curve;
      const next = [...rest].find(({ from }) => distance(from, to) < MEET);
      if (!next) return null;
      rest.delete(next);
      loop.push(next);
    }
    loops.push(loop);
  }
  return loops;
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

/** Whether a point lies inside an outline, or outside a hole. */
function isRightOf(loop: Loop): (point: Point) => boolean {
  const [corners, clockwise] = [pointsOf(loop), areaOf(loop) > 0];
  return (point) => encloses(corners, point) === clockwise;
}

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
