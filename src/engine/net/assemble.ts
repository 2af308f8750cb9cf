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

/** A side of a panel. Where it begins and ends is a number too, so that sides that meet are found at once. */
interface Edge {
  readonly panel: number;
  readonly curve: Curve;
  readonly start: number;
  readonly end: number;
  /** The side of another panel that it lies on. */
  twin: Edge | null;
  /** Whether it is in a loop of the outline already. */
  walked: boolean;
}

/**
 * Joins loose panels into one flat piece. Edges that two panels share become folds, joins or slits as `jointOf` says; what
 * is left is the outline and its holes. Shared edges need not have the same ends: they are split where they overlap.
 */
export function assemble(panels: readonly LoosePanel[], jointOf: (a: string, b: string) => Joint): Assembled {
  const whole = panels.flatMap(edgesOf);
  pair(whole, byStart(whole));
  // Most sides have the very same ends as their twin: only those that have not are looked at for corners on them.
  const edges = splitAtCorners(whole);
  const starts = byStart(edges);
  if (edges.length > whole.length) pair(edges, starts);
  const folds: Fold[] = [];
  const joins: { curve: Curve; panels: [string, string] }[] = [];
  const slits: Line[] = [];
  const met = new Set<Edge>();
  for (const edge of edges) {
    if (edge.twin === null || met.has(edge.twin)) continue;
    met.add(edge);
    const { curve } = edge;
    const names: [string, string] = [nameOf(panels, edge), nameOf(panels, edge.twin)];
    const joint = jointOf(...names);
    if (joint.is === 'fold') {
      const { kind, angle, shown } = joint;
      folds.push(
        shown === undefined ? { curve, kind, angle, panels: names } : { curve, kind, angle, shown, panels: names },
      );
    } else if (joint.is === 'nothing') joins.push({ curve, panels: names });
    else slits.push(line(curve.from, curve.to));
  }
  const loops = chain(edges, starts).map((loop) => ({ loop, area: areaOf(loop) }));
  const outer = loops.filter(({ area }) => area > 0).sort((a, b) => b.area - a.area);
  return {
    outline: outer[0]?.loop ?? [],
    holes: loops.flatMap(({ loop, area }) => (area > 0 ? [] : [loop])),
    folds: mergeFolds(folds),
    joins,
    slits: mergeLines(slits),
    parts: outer.length,
  };
}
const nameOf = (panels: readonly LoosePanel[], { panel }: Edge): string => (panels[panel] as LoosePanel).name;

/** Whole micrometres: points nearer than that share a place, but for those that straddle a rounding edge, hence the snap first. */
const micrometres = (mm: number): number => Math.round(snap(mm) * 1e3);
/** Both coordinates in one number, exact up to 30 m either way. */
const placeOf = (point: Point): number => micrometres(point.x) * 2 ** 26 + micrometres(point.y);

function edgesOf({ loop }: LoosePanel, panel: number): Edge[] {
  const starts = loop.map(({ from }) => placeOf(from));
  return loop.map((curve, index) => ({
    panel,
    curve,
    start: starts[index] as number,
    end: starts[index + 1] ?? (starts[0] as number),
    twin: null,
    walked: false,
  }));
}

function byStart(edges: readonly Edge[]): ReadonlyMap<number, readonly Edge[]> {
  const map = new Map<number, Edge[]>();
  for (const edge of edges) {
    if (edge.twin !== null) continue;
    const there = map.get(edge.start);
    if (there) there.push(edge);
    else map.set(edge.start, [edge]);
  }
  return map;
}

/** Gives every edge that lies on one of another panel its twin. */
function pair(edges: readonly Edge[], starts: ReadonlyMap<number, readonly Edge[]>): void {
  for (const edge of edges) {
    if (edge.twin !== null) continue;
    for (const other of starts.get(edge.end) ?? []) {
      if (other.twin !== null || other.panel === edge.panel || !isTwin(edge.curve, other.curve)) continue;
      edge.twin = other;
      other.twin = edge;
      break;
    }
  }
}
function isTwin(a: Curve, b: Curve): boolean {
  if (!samePoint(a.from, b.to) || !samePoint(a.to, b.from) || a.type !== b.type) return false;
  return a.type === 'line' || (b.type === 'arc' && samePoint(a.centre, b.centre) && a.clockwise !== b.clockwise);
}

/** Corners along the upright or the level lines that are asked about, in order once they are asked for. */
class Corners {
  private readonly lines = new Map<number, { readonly places: number[]; sorted: boolean }>();

  /** Only corners on lines that were named are kept. */
  name(line: number): void {
    if (!this.lines.has(line)) this.lines.set(line, { places: [], sorted: false });
  }
  add(line: number, at: number): void {
    this.lines.get(line)?.places.push(at);
  }
  /** Places between two others on a line, each once, in order. */
  between(line: number, low: number, high: number): readonly number[] {
    const known = this.lines.get(line);
    if (!known) return [];
    if (!known.sorted) known.places.sort((a, b) => a - b);
    known.sorted = true;
    const found: number[] = [];
    const { places } = known;
    for (let index = after(places, low + COINCIDENT); index < places.length; index += 1) {
      const place = places[index] as number;
      if (place >= high - COINCIDENT) break;
      if (found.length === 0 || !coincident(place, found.at(-1) as number)) found.push(place);
    }
    return found;
  }
}
/** Index of the first of the ordered places that is larger. */
function after(places: readonly number[], value: number): number {
  let [low, high] = [0, places.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((places[middle] as number) > value) high = middle;
    else low = middle + 1;
  }
  return low;
}

/** Straight upright and level edges without a twin are cut at every corner of another panel that lies on them. */
function splitAtCorners(edges: readonly Edge[]): readonly Edge[] {
  const [onUpright, onLevel] = [new Corners(), new Corners()];
  for (const { twin, curve } of edges) {
    if (twin !== null || curve.type !== 'line') continue;
    if (coincident(curve.from.x, curve.to.x)) onUpright.name(micrometres(curve.from.x));
    else if (coincident(curve.from.y, curve.to.y)) onLevel.name(micrometres(curve.from.y));
  }
  for (const { curve } of edges) {
    onUpright.add(micrometres(curve.from.x), curve.from.y);
    onLevel.add(micrometres(curve.from.y), curve.from.x);
  }
  const split: Edge[] = [];
  for (const edge of edges) {
    const { from, to } = edge.curve;
    const upright = coincident(from.x, to.x);
    const splits = edge.twin === null && edge.curve.type === 'line' && (upright || coincident(from.y, to.y));
    const [start, end] = upright ? [from.y, to.y] : [from.x, to.x];
    const corners = upright ? onUpright : onLevel;
    const cuts = splits
      ? corners.between(micrometres(upright ? from.x : from.y), Math.min(start, end), Math.max(start, end))
      : [];
    if (cuts.length === 0) {
      split.push(edge);
      continue;
    }
    const places = start < end ? cuts : [...cuts].reverse();
    const stops = places.map((at) => (upright ? { x: from.x, y: at } : { x: at, y: from.y }));
    split.push(...edgesBetween(edge, [from, ...stops, to]));
  }
  return split;
}
function edgesBetween(edge: Edge, stops: readonly Point[]): Edge[] {
  const places = [edge.start, ...stops.slice(1, -1).map(placeOf), edge.end];
  return stops.slice(1).map((stop, index) => ({
    ...edge,
    curve: partOf(edge.curve, stops[index] as Point, stop),
    start: places[index] as number,
    end: places[index + 1] as number,
  }));
}

/** Edges without a twin to closed loops. Where several go on from a corner, the one that turns most to the right keeps loops apart. */
function chain(edges: readonly Edge[], starts: ReadonlyMap<number, readonly Edge[]>): Loop[] {
  const isFree = (edge: Edge): boolean => edge.twin === null && !edge.walked;
  const loops: Loop[] = [];
  for (const first of edges) {
    if (!isFree(first)) continue;
    const loop: Curve[] = [];
    let edge: Edge | undefined = first;
    while (edge) {
      edge.walked = true;
      loop.push(edge.curve);
      const next: readonly Edge[] = (starts.get(edge.end) ?? []).filter(isFree);
      edge = next.length < 2 ? next[0] : mostRight(edge.curve, next);
    }
    loops.push(straighten(loop));
  }
  return loops;
}
function mostRight(last: Curve, edges: readonly Edge[]): Edge | undefined {
  let [found, most]: [Edge | undefined, number] = [undefined, -Infinity];
  for (const edge of edges) {
    const right = turn(last, edge.curve);
    if (right > most) [found, most] = [edge, right];
  }
  return found;
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
  const between = new Map<string, number[]>();
  for (const fold of folds) {
    const panels = fold.panels.join('|');
    const places = between.get(panels) ?? [];
    const index = places.find((place) => {
      const { curve } = result[place] as Fold;
      return continues(curve, fold.curve) || continues(fold.curve, curve);
    });
    if (index === undefined) {
      between.set(panels, [...places, result.length]);
      result.push(fold);
      continue;
    }
    const before = result[index] as Fold;
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
