import type { LoosePanel } from '../net';
import type { Point } from '../types';
import { polygon } from './shapes';

export interface TabOnEdge {
  readonly name: string;
  readonly width: number;
  /** Between the hinge and the tab's ends, in degrees: where the edge begins and where it ends. */
  readonly low: number;
  readonly high: number;
}
/**
 * A glue tab outside the edge of a panel that runs from `from` to `to` with the panel on its right. Ends lean in by the
 * angles given; null when they meet before the tip.
 */
export function tabOnEdge(from: Point, to: Point, { name, width, low, high }: TabOnEdge): LoosePanel | null {
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  const along = { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
  const out = { x: along.y, y: -along.x };
  const inset = (angle: number) => width / Math.tan((angle * Math.PI) / 180);
  const [a, b] = [inset(low), length - inset(high)];
  if (!(b >= a) || !(width > 0)) return null;
  const place = (u: number, v: number): Point => ({
    x: from.x + along.x * u + out.x * v,
    y: from.y + along.y * u + out.y * v,
  });
  return { name, role: 'tab', loop: polygon([to, from, place(a, width), place(b, width)]) };
}
