import { coincident, moreThan } from '../measure';
import { arcThrough, line, type Box } from '../net';
import type { Arc, Curve, Loop, Point } from '../types';

/** Straight lines round these corners, in order; corners that coincide with the one before are dropped. */
export function polygon(corners: readonly Point[]): Loop {
  const kept = corners.filter((point, index) => {
    const before = corners[(index + corners.length - 1) % corners.length] as Point;
    return !coincident(point.x, before.x) || !coincident(point.y, before.y);
  });
  return kept.map((point, index) => line(point, kept[(index + 1) % kept.length] as Point));
}

/** A rectangular hole, its middle measured from the left and top of the box; null when it does not fit inside. */
export function slotIn(
  { left, top, right, bottom }: Box,
  slot: { readonly across: number; readonly along: number; readonly width: number; readonly height: number },
): Loop | null {
  const [x, y] = [left + slot.across, top + slot.along];
  const [a, b] = [
    { x: x - slot.width / 2, y: y - slot.height / 2 },
    { x: x + slot.width / 2, y: y + slot.height / 2 },
  ];
  if (!(moreThan(a.x, left) && moreThan(right, b.x) && moreThan(a.y, top) && moreThan(bottom, b.y))) return null;
  return polygon([a, { x: a.x, y: b.y }, b, { x: b.x, y: a.y }]);
}

/** A circle as two half arcs, clockwise, or the other way round for a hole. */
export function circle(centre: Point, radius: number, clockwise = true): Loop {
  const [left, right] = [
    { x: centre.x - radius, y: centre.y },
    { x: centre.x + radius, y: centre.y },
  ];
  const half = (from: Point, to: Point): Arc => ({ type: 'arc', from, to, centre, radius, clockwise });
  return [half(left, right), half(right, left)];
}

/** The point at `angle` degrees (clockwise on screen from the right) and `radius` from `centre`. */
export function polar(centre: Point, radius: number, angle: number): Point {
  const turn = (angle * Math.PI) / 180;
  return { x: centre.x + radius * Math.cos(turn), y: centre.y + radius * Math.sin(turn) };
}

/** The arc between two angles in degrees in `parts` equal arcs, clockwise when `to` is larger. */
export function arcs(
  centre: Point,
  radius: number,
  from: number,
  to: number,
  parts = Math.max(1, Math.ceil(Math.abs(to - from) / 120)),
): Arc[] {
  const stops = Array.from({ length: parts + 1 }, (_, index) =>
    polar(centre, radius, from + ((to - from) * index) / parts),
  );
  return stops.slice(1).map((stop, index) => ({
    type: 'arc',
    from: stops[index] as Point,
    to: stop,
    centre,
    radius,
    clockwise: to > from,
  }));
}

/** The loop with corner `index` (where that curve ends) rounded; null when the sides are too short or not straight. */
export function fillet(loop: Loop, index: number, radius: number): Loop | null {
  const [before, after] = [loop[index], loop[(index + 1) % loop.length]];
  if (!before || !after || before.type !== 'line' || after.type !== 'line' || !moreThan(radius, 0)) return null;
  const [u, v] = [direction(before), direction(after)];
  const turn = Math.atan2(u.x * v.y - u.y * v.x, u.x * v.x + u.y * v.y);
  const cut = radius * Math.tan(Math.abs(turn) / 2);
  if (cut > u.length + 1e-9 || cut > v.length + 1e-9) return null;
  const [from, to] = [
    { x: before.to.x - u.x * cut, y: before.to.y - u.y * cut },
    { x: before.to.x + v.x * cut, y: before.to.y + v.y * cut },
  ];
  const arc = arcThrough(from, to, radius, turn > 0);
  if (!arc) return null;
  return loop.flatMap((curve, at): readonly Curve[] => {
    if (at === index) return [line(curve.from, from), arc];
    return at === (index + 1) % loop.length ? [line(to, curve.to)] : [curve];
  });
}
function direction({ from, to }: Curve) {
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  return { x: (to.x - from.x) / length, y: (to.y - from.y) / length, length };
}
