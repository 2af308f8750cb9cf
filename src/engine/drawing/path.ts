import { sweepOf } from '../net';
import type { Curve, Loop, Point } from '../types';

export type Place = (point: Point) => Point;
/** Two decimals of a drawing unit are finer than any screen or printer. Whole numbers are written many times faster than others. */
export function n(value: number): string {
  const cents = Math.round(value * 100);
  const rest = Math.abs(cents % 100);
  if (rest === 0) return `${cents / 100 + 0}`;
  const whole = `${cents < 0 ? '-' : ''}${(Math.abs(cents) - rest) / 100}`;
  return rest % 10 === 0 ? `${whole}.${rest / 10}` : `${whole}.${rest < 10 ? '0' : ''}${rest}`;
}
const apart = (a: number, b: number): boolean => Math.round(a * 100) !== Math.round(b * 100);
const at = (point: Point): string => `${n(point.x)} ${n(point.y)}`;

/** SVG path data of curves that follow one another; arcs stay arcs. `place` may move and scale, not mirror. */
export function pathOf(curves: readonly Curve[], place: Place, scale: number): string {
  let last: Point | null = null;
  const parts: string[] = [];
  for (const curve of curves) {
    const [from, to] = [place(curve.from), place(curve.to)];
    if (!last || apart(last.x, from.x) || apart(last.y, from.y)) parts.push(`M${at(from)}`);
    if (curve.type === 'line') parts.push(`L${at(to)}`);
    else
      parts.push(
        `A${n(curve.radius * scale)} ${n(curve.radius * scale)} 0 ${sweepOf(curve) > Math.PI ? 1 : 0} ${curve.clockwise ? 1 : 0} ${at(to)}`,
      );
    last = to;
  }
  return parts.join('');
}
export const closedPath = (loop: Loop, place: Place, scale: number): string => `${pathOf(loop, place, scale)}Z`;
export const segment = (x1: number, y1: number, x2: number, y2: number): string =>
  `M${n(x1)} ${n(y1)}L${n(x2)} ${n(y2)}`;
