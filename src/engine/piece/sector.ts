import { line } from '../net';
import type { Curve, Point } from '../types';
import { finishNet, nonsense, type Built } from './finish';
import { arcs, polar } from './shapes';
import { tabOnEdge } from './tab';

/** A sector with every formula worked out: lengths in mm, angles in degrees. */
export interface SectorPiece {
  readonly body: string;
  readonly inner: number;
  readonly outer: number;
  readonly angle: number;
  readonly seam: { readonly width: number; readonly low: number; readonly high: number };
  readonly step: number;
}

/**
 * The flat of a cone or frustum: a ring sector hanging down from its middle line, a seam tab along its left straight edge.
 * It is rolled, not folded; the tab's crease does not turn.
 */
export function buildSector(piece: SectorPiece): Built {
  const { inner, outer, angle, seam } = piece;
  if (!(outer > inner) || !(inner >= 0)) return nonsense('its outer radius is not larger than its inner one');
  if (!(angle > 0) || angle >= 360)
    return nonsense('its angle goes all the way round, so that nothing is left to close');
  const centre: Point = { x: 0, y: 0 };
  const [first, last] = [90 - angle / 2, 90 + angle / 2];
  const rim = arcs(centre, outer, first, last);
  const foot: Curve[] = inner > 0 ? arcs(centre, inner, last, first) : [];
  const [rimEnd, rimStart] = [polar(centre, outer, last), polar(centre, outer, first)];
  const [footEnd, footStart] = inner > 0 ? [polar(centre, inner, last), polar(centre, inner, first)] : [centre, centre];
  const loop: Curve[] = [...rim, line(rimEnd, footEnd), ...foot, line(footStart, rimStart)];
  const tab = tabOnEdge(rimEnd, footEnd, { name: 'seam', width: seam.width, low: seam.high, high: seam.low });
  if (!tab) return nonsense('the seam tab comes to a point before its full width');
  return finishNet({
    panels: [
      { name: piece.body, role: 'panel', loop, cone: { apex: centre, angle } },
      { ...tab, tooth: true },
    ],
    jointOf: () => ({ is: 'fold', kind: 'valley', angle: 0 }),
    edges: { rim: (angle / 180) * Math.PI * outer, foot: (angle / 180) * Math.PI * inner },
    step: piece.step,
  });
}
