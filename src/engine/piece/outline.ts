import { arcThrough, areaOf, boundsOf, line, lengthOf, reversed, type Joint, type LoosePanel } from '../net';
import type { Curve, Loop, Point } from '../types';
import { finishNet, jointAsSaid, nonsense, type Built } from './finish';
import type { GridPiece } from './grid';
import { slotIn } from './shapes';

/** An outline piece with every formula worked out. */
export interface OutlinePiece {
  readonly points: ReadonlyMap<string, Point>;
  readonly panels: readonly {
    readonly name: string;
    readonly role: 'panel' | 'tab';
    readonly loop: readonly Stop[];
    readonly bent: { readonly radius: number } | null;
  }[];
  readonly lines: GridPiece['lines'];
  readonly slots: GridPiece['slots'];
  readonly edges: readonly {
    readonly name: string;
    readonly panel: string;
    readonly from: string;
    readonly to: string;
  }[];
  readonly step: number;
}
/** The way from the point before to this one: straight, or an arc bowed out of the panel or into it. */
export interface Stop {
  readonly point: string;
  readonly bow: { readonly to: 'out' | 'in'; readonly radius: number } | null;
}
const STOP = /^(.+?)(?: bowed (out|in) by (.+))?$/;
/** Reads `b` or `b bowed out by radius`. */
export function readStop(text: string): {
  readonly point: string;
  readonly bow: { readonly to: 'out' | 'in'; readonly radius: string } | null;
} {
  const [, point = '', to, radius] = STOP.exec(text.trim().toLowerCase()) ?? [];
  return {
    point: point.trim(),
    bow: to === undefined || radius === undefined ? null : { to: to as 'out' | 'in', radius },
  };
}

/** Panels between named points; panels that share an edge fold there (valley, 90°) unless a line says otherwise. */
export function buildOutline(piece: OutlinePiece): Built {
  const panels: LoosePanel[] = [];
  for (const panel of piece.panels) {
    const loop: Curve[] = [];
    for (const [index, stop] of panel.loop.entries()) {
      const before = panel.loop[(index + panel.loop.length - 1) % panel.loop.length] as Stop;
      const [from, to] = [piece.points.get(before.point), piece.points.get(stop.point)];
      if (!from || !to || !Number.isFinite(from.x + from.y + to.x + to.y))
        return nonsense(`a corner of “${panel.name}” has no place`);
      if (Math.hypot(to.x - from.x, to.y - from.y) < 1e-6) continue;
      const arc = stop.bow ? arcThrough(from, to, stop.bow.radius, stop.bow.to === 'out') : null;
      if (stop.bow && !arc) return nonsense(`an arc of “${panel.name}” does not reach from end to end`);
      loop.push(arc ?? line(from, to));
    }
    if (loop.length < 2) continue;
    if (areaOf(loop) <= 0) return nonsense(`“${panel.name}” comes out smaller than nothing`);
    panels.push({ name: panel.name, role: panel.role, loop, ...(panel.bent ? { bent: panel.bent } : {}) });
  }
  const jointOf = (a: string, b: string): Joint => {
    const said = piece.lines.find(({ between: [p, q] }) => (p === a && q === b) || (p === b && q === a));
    return said ? jointAsSaid(said) : { is: 'fold', kind: 'valley', angle: 90 };
  };
  const holes: Loop[] = [];
  for (const slot of piece.slots) {
    const panel = panels.find((one) => one.name === slot.cell);
    const hole = panel && slotIn(boundsOf(panel.loop), slot);
    if (!hole) return nonsense(`a slot does not fit inside “${slot.cell}”`);
    holes.push(hole);
  }
  const edges = Object.fromEntries(
    piece.edges.map(({ name, panel, from, to }) => [name, lengthBetween(piece, panels, panel, from, to)]),
  );
  return finishNet({ panels, jointOf, holes, edges, step: piece.step });
}

/** Length of the edge of a panel that joins two points, whichever way round; NaN when there is none. */
function lengthBetween(
  piece: OutlinePiece,
  panels: readonly LoosePanel[],
  name: string,
  from: string,
  to: string,
): number {
  const [a, b] = [piece.points.get(from), piece.points.get(to)];
  const near = (p: Point | undefined, q: Point) => p !== undefined && Math.hypot(p.x - q.x, p.y - q.y) < 1e-6;
  const found = panels
    .find((panel) => panel.name === name)
    ?.loop.find((curve) => (near(a, curve.from) && near(b, curve.to)) || (near(a, curve.to) && near(b, curve.from)));
  return found ? lengthOf(reversed(found)) : NaN;
}
