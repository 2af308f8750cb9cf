import { COINCIDENT } from '../measure';
import type { Loop, Point } from '../types';
import { pointsOf } from './curve';

/** Where a loop crosses itself, or null. Touching at a corner is no crossing; overlapping edges are. */
export function selfCrossing(loop: Loop): Point | null {
  const points = pointsOf(loop, 0.1);
  const count = points.length;
  for (let i = 0; i < count; i += 1) {
    const [a, b] = [points[i] as Point, points[(i + 1) % count] as Point];
    for (let j = i + 2; j < count; j += 1) {
      if (i === 0 && j === count - 1) continue;
      const [c, d] = [points[j] as Point, points[(j + 1) % count] as Point];
      if (Math.max(a.x, b.x) < Math.min(c.x, d.x) || Math.max(c.x, d.x) < Math.min(a.x, b.x)) continue;
      if (Math.max(a.y, b.y) < Math.min(c.y, d.y) || Math.max(c.y, d.y) < Math.min(a.y, b.y)) continue;
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
