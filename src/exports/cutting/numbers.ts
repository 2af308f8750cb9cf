import { lengthOf, type Arc, type Curve } from '@/engine';

/** Below a nanometre there is nothing; and a smaller number would be written with an exponent, which not every reader knows. */
const NOTHING = 1e-6;

/** A number for a file: nine decimals, so that rounding never adds up to a nanometre; never −0. */
export function written(value: number): number {
  return Math.abs(value) < NOTHING ? 0 : Math.round(value * 1e9) / 1e9;
}

/** How far an arc turns, in radians, positive. */
export const turnOf = (arc: Arc): number => lengthOf(arc) / arc.radius;

/**
 * The curve in equal parts that turn by `most` radians or less. The ends of an arc tell its length the worse the nearer they come
 * to half a turn, and not at all at a whole one.
 */
export function inParts(curve: Curve, most: number): readonly Curve[] {
  if (curve.type === 'line') return [curve];
  const { centre, radius, clockwise } = curve;
  const turn = turnOf(curve);
  const count = Math.ceil(turn / most - 1e-9);
  const begin = Math.atan2(curve.from.y - centre.y, curve.from.x - centre.x);
  const stops = Array.from({ length: count + 1 }, (_, k) => {
    if (k === 0) return curve.from;
    if (k === count) return curve.to;
    const angle = begin + ((clockwise ? turn : -turn) * k) / count;
    return { x: centre.x + radius * Math.cos(angle), y: centre.y + radius * Math.sin(angle) };
  });
  return stops.slice(1).map((to, k) => ({ ...curve, from: stops[k] ?? curve.from, to }));
}
