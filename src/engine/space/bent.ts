import { boundsOf, pointAt } from '../net';
import type { Curve, Panel, Point } from '../types';

/*
 * Faces of a pillow: bent about lines that run along, so far that the crease at their end, an arc, lies in a plane at 45°.
 * Where the crease rises by m in the flat for each step across, the card in space rises by m for each step on itself: it
 * leans by asin m there. The flap beyond the crease then stands square (its lines make a right angle with the face's).
 */
const STRIPS = 24;
const DEGREE = Math.PI / 180;

export interface BentStrip {
  readonly points: readonly Point[];
  /** Whether the edge from each point to the next is an edge of the card or a fold. */
  readonly edges: readonly boolean[];
}
/** A line of the flat about which the card turns; degrees, valley positive. */
export interface Seam {
  readonly from: Point;
  readonly to: Point;
  readonly turn: number;
}

const radiusOf = (panel: Panel): number => panel.bent?.radius ?? 1;
/** Upright lines that part the panel into strips. */
function linesOf(panel: Panel): readonly number[] {
  const { left, right } = boundsOf(panel.loop);
  return Array.from({ length: STRIPS + 1 }, (_, index) => left + ((right - left) * index) / STRIPS);
}
/** Slope of the crease's chord over each strip. */
function slopesOf(panel: Panel): readonly number[] {
  const lines = linesOf(panel);
  const middle = ((lines[0] as number) + (lines[STRIPS] as number)) / 2;
  const height = (x: number) => Math.sqrt(Math.max(0, radiusOf(panel) ** 2 - (x - middle) ** 2));
  return lines.slice(1).map((right, index) => {
    const left = lines[index] as number;
    return Math.max(-1, Math.min(1, (height(left) - height(right)) / (right - left)));
  });
}
const leansOf = (panel: Panel): readonly number[] => slopesOf(panel).map((slope) => Math.asin(slope) / DEGREE);

/** Degrees from the first strip of a bent panel to its last. */
export const bentTurn = (panel: Panel): number => 2 * (leansOf(panel)[STRIPS - 1] as number);

/** What a bent panel turns further between the middle of its last strip and its very edge. */
export function edgeTurn(panel: Panel): number {
  const { left, right } = boundsOf(panel.loop);
  const half = Math.asin(Math.min(1, (right - left) / 2 / radiusOf(panel)));
  return Math.asin(Math.min(1, Math.tan(half))) / DEGREE - bentTurn(panel) / 2;
}

/** The strips of a bent panel and the seams between them; a closing flap has no seams: it hangs on its crease strip by strip. */
export function bentStrips(panel: Panel): { readonly strips: readonly BentStrip[]; readonly seams: readonly Seam[] } {
  const [lines, leans] = [linesOf(panel), leansOf(panel)];
  const sided = panel.loop.some((curve) => Math.abs(curve.from.x - curve.to.x) < 1e-6);
  const ends = lines.map((x) => ({ x, ...spanAt(panel.loop, x) }));
  const strips = ends.slice(1).map((r, index): BentStrip => {
    const l = ends[index] as (typeof ends)[number];
    const corners = [
      { x: l.x, y: l.top },
      { x: r.x, y: r.top },
      { x: r.x, y: r.bottom },
      { x: l.x, y: l.bottom },
    ];
    const edges = [true, sided && index === STRIPS - 1, true, sided && index === 0];
    const kept = corners.map((point, at) => {
      const next = corners[(at + 1) % corners.length] as Point;
      return Math.hypot(next.x - point.x, next.y - point.y) > 1e-6;
    });
    return { points: corners.filter((_, at) => kept[at]), edges: edges.filter((_, at) => kept[at]) };
  });
  const seams = ends.slice(1, sided ? -1 : 1).map(({ x, top, bottom }, index) => ({
    from: { x, y: top },
    to: { x, y: bottom },
    turn: (leans[index + 1] as number) - (leans[index] as number),
  }));
  return { strips, seams };
}

/** The crease between two bent panels, strip by strip: lines along that meet at a right angle there turn by acos(−m²). */
export function creaseSeams(crease: Curve, panel: Panel): readonly Seam[] {
  const lines = linesOf(panel);
  const at = (x: number): Point => ({ x, y: spanAt([crease], x).top });
  return slopesOf(panel).map((slope, index) => ({
    from: at(lines[index] as number),
    to: at(lines[index + 1] as number),
    turn: Math.acos(-(slope ** 2)) / DEGREE,
  }));
}

/** Top and bottom of a loop on one upright line. */
function spanAt(loop: readonly Curve[], x: number): { readonly top: number; readonly bottom: number } {
  const ys = loop.flatMap((curve) => {
    const [low, high] = [Math.min(curve.from.x, curve.to.x), Math.max(curve.from.x, curve.to.x)];
    if (high - low < 1e-6 || x < low - 1e-6 || x > high + 1e-6) return [];
    if (Math.abs(x - curve.from.x) < 1e-6) return [curve.from.y];
    if (Math.abs(x - curve.to.x) < 1e-6) return [curve.to.y];
    if (curve.type === 'line')
      return [curve.from.y + ((curve.to.y - curve.from.y) * (x - curve.from.x)) / (curve.to.x - curve.from.x)];
    const side = Math.sign(pointAt(curve, 0.5).y - curve.centre.y);
    return [curve.centre.y + side * Math.sqrt(Math.max(0, curve.radius ** 2 - (x - curve.centre.x) ** 2))];
  });
  return { top: Math.min(...ys), bottom: Math.max(...ys) };
}
