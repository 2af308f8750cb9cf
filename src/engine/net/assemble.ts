import { COINCIDENT, coincident, snap } from '../measure';
import type { Curve, Fold, Line, Loop, Net, Panel, Point } from '../types';
import { areaOf, distance, line, partOf, samePoint } from './curve';

/** A panel before it is joined to its neighbours: a closed clockwise loop. */
export interface LoosePanel {
  readonly name: string;
  readonly role: Panel['role'];
  readonly loop: Loop;
  readonly tooth?: boolean;
  readonly roll?: Panel['roll'];
  readonly cone?: Panel['cone'];
  readonly bent?: Panel['bent'];
}
/** How two panels that share an edge are joined there. */
export type Joint =
  | { readonly is: 'fold'; readonly kind: Fold['kind']; readonly angle: number; readonly shown?: number }
  | { readonly is: 'nothing' }
  | { readonly is: 'slit' };
export interface Assembled {
  readonly outline: Loop;
  readonly holes: readonly Loop[];
  readonly folds: readonly Fold[];
  readonly joins: Net['joins'];
  readonly slits: readonly Line[];
  /** Further outer loops: the piece would fall apart. */
  readonly parts: number;
}

interface Edge {
  readonly panel: number;
  readonly curve: Curve;
}

/**
 * Joins loose panels into one flat piece. Edges that two panels share become folds, joins or slits as `jointOf` says; what
 * is left is the outline and its holes. Shared edges need not have the same ends: they are split where they overlap.
 */
export function assemble(panels: readonly LoosePanel[], jointOf: (a: string, b: string) => Joint): Assembled {
  const edges = splitAtVertices(panels.flatMap((panel, index) => panel.loop.map((curve) => ({ panel: index, curve }))));
  const open = byStart(edges);
  const folds: Fold[] = [];
  const joins: { curve: Curve; panels: [string, string] }[] = [];
  const slits: Line[] = [];
  const matched = new Set<Edge>();
  for (const edge of edges) {
    if (matched.has(edge)) continue;
    const twin = (open.get(keyOf(edge.curve.to)) ?? []).find(
      (other) => !matched.has(other) && other.panel !== edge.panel && isTwin(edge.curve, other.curve),
    );
    if (!twin) continue;
    matched.add(edge).add(twin);
    const names: [string, string] = [(panels[edge.panel] as LoosePanel).name, (panels[twin.panel] as LoosePanel).name];
    const joint = jointOf(...names);
    if (joint.is === 'fold') {
      const { kind, angle, shown } = joint;
      folds.push({ curve: edge.curve, kind, angle, ...(shown === undefined ? {} : { shown }), panels: names });
    } else if (joint.is === 'nothing') joins.push({ curve: edge.curve, panels: names });
    else slits.push(line(edge.curve.from, edge.curve.to));
  }
  const loops = chain(edges.filter((edge) => !matched.has(edge)));
  const outer = loops.filter((loop) => areaOf(loop) > 0).sort((a, b) => areaOf(b) - areaOf(a));
  return {
    outline: outer[0] ?? [],
    holes: loops.filter((loop) => areaOf(loop) <= 0),
    folds: mergeFolds(folds),
    joins,
    slits: mergeLines(slits),
    parts: outer.length,
  };
}

/** Whole micrometres: points nearer than that share a place, but for those that straddle a rounding edge, hence the snap first. */
const micrometres = (mm: number): number => Math.round(snap(mm) * 1e3);
/** Both coordinates in one number, exact up to 30 m either way. */
const keyOf = (point: Point): number => micrometres(point.x) * 2 ** 26 + micrometres(point.y);

function byStart(edges: readonly Edge[]): ReadonlyMap<number, Edge[]> {
  const map = new Map<number, Edge[]>();
  for (const edge of edges) {
    const key = keyOf(edge.curve.from);
    const there = map.get(key);
    if (there) there.push(edge);
    else map.set(key, [edge]);
  }
  return map;
}

function isTwin(a: Curve, b: Curve): boolean {
  if (!samePoint(a.from, b.to) || !samePoint(a.to, b.from) || a.type !== b.type) return false;
  return a.type === 'line' || (b.type === 'arc' && samePoint(a.centre, b.centre) && a.clockwise !== b.clockwise);
}

/** Straight upright and level edges are cut at every corner of another panel that lies on them. */
function splitAtVertices(edges: readonly Edge[]): Edge[] {
  // Corners by the line they lie on, so that an edge looks only along its own line.
  const [byX, byY] = [new Map<number, number[]>(), new Map<number, number[]>()];
  const add = (map: Map<number, number[]>, line: number, at: number): void => {
    const known = map.get(line);
    if (known) known.push(at);
    else map.set(line, [at]);
  };
  for (const { curve } of edges) {
    add(byX, micrometres(curve.from.x), curve.from.y);
    add(byY, micrometres(curve.from.y), curve.from.x);
  }
  return edges.flatMap((edge) => {
    const { from, to } = edge.curve;
    const upright = coincident(from.x, to.x);
    if (edge.curve.type !== 'line' || (!upright && !coincident(from.y, to.y))) return [edge];
    const [start, end] = upright ? [from.y, to.y] : [from.x, to.x];
    const [low, high] = [Math.min(start, end) + COINCIDENT, Math.max(start, end) - COINCIDENT];
    const corners = (upright ? byX.get(micrometres(from.x)) : byY.get(micrometres(from.y))) ?? [];
    const between = corners.filter((value) => value > low && value < high);
    if (between.length === 0) return [edge];
    const cuts = between
      .sort((a, b) => (start < end ? a - b : b - a))
      .filter((value, index, all) => index === 0 || !coincident(value, all[index - 1] as number));
    const stops = [from, ...cuts.map((value) => (upright ? { x: from.x, y: value } : { x: value, y: from.y })), to];
    return stops
      .slice(1)
      .map((stop, index) => ({ panel: edge.panel, curve: partOf(edge.curve, stops[index] as Point, stop) }));
  });
}

/** Loose edges to closed loops. Where several go on from a corner, the one that turns most to the right keeps loops apart. */
function chain(edges: readonly Edge[]): Loop[] {
  const from = byStart(edges);
  const used = new Set<Edge>();
  const loops: Loop[] = [];
  for (const first of edges) {
    if (used.has(first)) continue;
    const loop: Curve[] = [];
    let edge: Edge | undefined = first;
    while (edge && !used.has(edge)) {
      used.add(edge);
      loop.push(edge.curve);
      const last: Curve = edge.curve;
      edge = undefined;
      let most = -Infinity;
      for (const next of from.get(keyOf(last.to)) ?? []) {
        if (used.has(next)) continue;
        const right = turn(last, next.curve);
        if (right > most) [edge, most] = [next, right];
      }
    }
    loops.push(straighten(loop));
  }
  return loops;
}

function turn(a: Curve, b: Curve): number {
  const [u, v] = [
    { x: a.to.x - a.from.x, y: a.to.y - a.from.y },
    { x: b.to.x - b.from.x, y: b.to.y - b.from.y },
  ];
  return Math.atan2(u.x * v.y - u.y * v.x, u.x * v.x + u.y * v.y);
}

/** Edges that run on in the same line, or round the same circle, are one edge. */
export function straighten(loop: Loop): Loop {
  const result: Curve[] = [];
  for (const curve of loop) {
    const last = result.at(-1);
    if (last && continues(last, curve)) result[result.length - 1] = partOf(last, last.from, curve.to);
    else result.push(curve);
  }
  const [first, last] = [result[0], result.at(-1)];
  if (first && last && result.length > 2 && samePoint(last.to, first.from) && continues(last, first)) {
    result[0] = partOf(first, last.from, first.to);
    result.pop();
  }
  return result;
}
function continues(a: Curve, b: Curve): boolean {
  if (!samePoint(a.to, b.from)) return false;
  if (a.type === 'arc')
    return b.type === 'arc' && samePoint(a.centre, b.centre) && a.clockwise === b.clockwise && !samePoint(a.from, b.to);
  if (b.type === 'arc') return false;
  const cross = (a.to.x - a.from.x) * (b.to.y - b.from.y) - (a.to.y - a.from.y) * (b.to.x - b.from.x);
  const dot = (a.to.x - a.from.x) * (b.to.x - b.from.x) + (a.to.y - a.from.y) * (b.to.y - b.from.y);
  return dot > 0 && coincident(cross / Math.max(distance(a.from, a.to), distance(b.from, b.to)), 0);
}

/** One fold between two panels stays one fold, however its edge was split. */
function mergeFolds(folds: readonly Fold[]): Fold[] {
  const result: Fold[] = [];
  for (const fold of folds) {
    const index = result.findIndex(
      (other) =>
        other.panels[0] === fold.panels[0] &&
        other.panels[1] === fold.panels[1] &&
        (continues(other.curve, fold.curve) || continues(fold.curve, other.curve)),
    );
    const before = result[index];
    if (!before) result.push(fold);
    else
      result[index] = {
        ...before,
        curve: continues(before.curve, fold.curve)
          ? partOf(before.curve, before.curve.from, fold.curve.to)
          : partOf(before.curve, fold.curve.from, before.curve.to),
      };
  }
  return result;
}
function mergeLines(lines: readonly Line[]): Line[] {
  return straighten(lines) as Line[];
}
