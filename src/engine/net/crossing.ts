import { COINCIDENT } from '../measure';
import type { Loop, Point } from '../types';
import { pointsOf } from './curve';

/**
 * Where a loop crosses itself, or null. Touching at a corner is no crossing; overlapping edges are. Segments are met in order
 * from the left, each with those only that begin before it ends: a rim of teeth has hundreds.
 */
export function selfCrossing(loop: Loop): Point | null {
  const points = pointsOf(loop, 0.1);
  const count = points.length;
  const segments = points
    .map((from, index) => {
      const to = points[(index + 1) % count] as Point;
      return { index, from, to, left: Math.min(from.x, to.x), right: Math.max(from.x, to.x) };
    })
    .sort((one, other) => one.left - other.left);
  for (const [place, { index, from: a, to: b, right }] of segments.entries()) {
    const [top, bottom] = [Math.min(a.y, b.y), Math.max(a.y, b.y)];
    for (let next = place + 1; next < count; next += 1) {
      const { index: other, from: c, to: d, left } = segments[next] as (typeof segments)[number];
      if (left > right) break;
      const between = Math.abs(index - other);
      if (between === 1 || between === count - 1) continue;
      if (Math.max(c.y, d.y) < top || Math.min(c.y, d.y) > bottom) continue;
      const crossing = crossingOf(a, b, c, d);
      if (crossing) return crossing;
    }
  }
  return null;
}

/**
 * The point where two segments cross inside both; null for parallel, touching at an end, or apart. Ends within a hundredth
 * of a micrometre of the other segment count as touching.
 */
export function crossingOf(a: Point, b: Point, c: Point, d: Point): Point | null {
  const side = (from: Point, to: Point, point: Point) =>
    ((to.x - from.x) * (point.y - from.y) - (to.y - from.y) * (point.x - from.x)) /
    Math.max(Math.hypot(to.x - from.x, to.y - from.y), COINCIDENT);
  const [c1, d1, a1, b1] = [side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b)];
  const apart = (p: number, q: number) => (p > COINCIDENT && q < -COINCIDENT) || (p < -COINCIDENT && q > COINCIDENT);
  if (!apart(c1, d1) || !apart(a1, b1)) return null;
  const t = a1 / (a1 - b1);
  return { x: a.x + (b.x - a.x) * t, y: a.y + (b.y - a.y) * t };
}

/** Whether a point lies within the polygon of these corners. */
export function encloses(corners: readonly Point[], point: Point): boolean {
  return corners.reduce((inside, a, index) => {
    const b = corners[(index + 1) % corners.length] as Point;
    const crosses = a.y > point.y !== b.y > point.y && point.x < ((b.x - a.x) * (point.y - a.y)) / (b.y - a.y) + a.x;
    return crosses ? !inside : inside;
  }, false);
}
