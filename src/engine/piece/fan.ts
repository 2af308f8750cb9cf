import type { Joint, LoosePanel } from '../net';
import type { Loop, Point } from '../types';
import { finishNet, nonsense, type Built } from './finish';
import { circle, polar, polygon } from './shapes';
import { tabOnEdge } from './tab';

/** A fan piece with every formula worked out: lengths in mm, angles in degrees. */
export interface FanPiece {
  readonly centre: string;
  readonly sides: number;
  readonly side: number;
  readonly flap: {
    readonly name: string;
    readonly shape: 'rectangle' | 'triangle';
    readonly height: number;
    readonly angle: number;
    readonly hole: { readonly diameter: number; readonly fromTip: number } | null;
  };
  readonly tab: { readonly width: number; readonly low: number; readonly high: number; readonly angle: number } | null;
  readonly step: number;
}

/**
 * A regular polygon lying on one side, a flap outside every side, a tab on the same-handed end of every flap. Corners of a
 * regular polygon: radius = side / (2 sin(180° / n)) (Machinery's Handbook, regular polygons).
 */
export function buildFan(piece: FanPiece): Built {
  const { sides, side, flap, tab } = piece;
  if (!Number.isInteger(sides) || sides < 3 || sides > 24)
    return nonsense(`a polygon of ${sides} sides cannot be drawn`);
  if (!(side > 0) || !(flap.height > 0)) return nonsense('a side or flap comes out smaller than nothing');
  const origin: Point = { x: 0, y: 0 };
  const radius = side / (2 * Math.sin(Math.PI / sides));
  const corners = Array.from({ length: sides }, (_, k) => polar(origin, radius, 90 - 180 / sides + (360 / sides) * k));
  const panels: LoosePanel[] = [{ name: piece.centre, role: 'panel', loop: polygon(corners) }];
  const holes: Loop[] = [];
  for (let k = 0; k < sides; k += 1) {
    const [a, b] = [corners[k] as Point, corners[(k + 1) % sides] as Point];
    const out = polar(origin, 1, 90 + (360 / sides) * k);
    const lift = (point: Point, by: number): Point => ({ x: point.x + out.x * by, y: point.y + out.y * by });
    const middle = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 };
    const tip = lift(middle, flap.height);
    const outline = flap.shape === 'triangle' ? [b, a, tip] : [b, a, lift(a, flap.height), lift(b, flap.height)];
    panels.push({ name: `${flap.name} ${k + 1}`, role: 'panel', loop: polygon(outline) });
    if (flap.hole) holes.push(circle(lift(middle, flap.height - flap.hole.fromTip), flap.hole.diameter / 2, false));
    if (!tab) continue;
    const made = tabOnEdge(a, flap.shape === 'triangle' ? tip : lift(a, flap.height), { name: `tab ${k + 1}`, ...tab });
    if (!made) return nonsense('the tabs come to a point before their full width');
    panels.push(made);
  }
  const jointOf = (one: string, other: string): Joint => {
    const turn = one.startsWith('tab ') || other.startsWith('tab ') ? (tab?.angle ?? 0) : flap.angle;
    return { is: 'fold', kind: turn < 0 ? 'mountain' : 'valley', angle: Math.abs(turn) };
  };
  return finishNet({ panels, jointOf, holes, step: piece.step });
}
