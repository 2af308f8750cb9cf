import { atLeast, coincident, isZero, moreThan, snap } from '../measure';
import { arcThrough, areaOf, distance, lengthOf, line, pointAt, samePoint, type Joint, type LoosePanel } from '../net';
import type { Arc, Curve, Loop, Net, Panel, Point, Side } from '../types';
import { OPPOSITE, SIDES, hangs, type Cell } from './cells';
import { MOST_TEETH, toothOn } from './disc';
import { finishNet, jointAsSaid, type Built } from './finish';
import { circle, fillet, polygon, slotIn } from './shapes';

/** A grid piece with every formula worked out: lengths in mm, angles in degrees. Tracks of nothing are already left out. */
export interface GridPiece {
  readonly columns: readonly number[];
  readonly rows: readonly number[];
  readonly cells: readonly (readonly Cell[])[];
  readonly lines: readonly {
    readonly between: readonly [string, string];
    readonly is: 'valley' | 'mountain' | 'slit' | 'nothing';
    readonly angle: number;
    readonly shown?: number;
  }[];
  readonly tabs: ReadonlyMap<string, TabShape>;
  readonly caps: ReadonlyMap<string, number>;
  readonly corners: readonly { readonly cell: string; readonly corner: string; readonly radius: number }[];
  readonly notches: readonly {
    readonly cell: string;
    readonly side: Side;
    readonly at: number;
    readonly radius: number;
  }[];
  readonly slots: readonly {
    readonly cell: string;
    readonly across: number;
    readonly along: number;
    readonly width: number;
    readonly height: number;
  }[];
  readonly holes: readonly {
    readonly cell: string;
    readonly across: number;
    readonly along: number;
    readonly diameter: number;
  }[];
  readonly creases: readonly {
    readonly cell: string;
    readonly is: 'valley' | 'mountain';
    readonly from: readonly [number, number];
    readonly to: readonly [number, number];
    /** Name of the panel that it parts off; null: a crease that lies flat. */
    readonly parts: string | null;
    readonly angle: number;
  }[];
  readonly rolls: ReadonlyMap<string, { readonly radius: number }>;
  readonly edges: readonly { readonly name: string; readonly cell: string; readonly side: Side }[];
}
export interface TabShape {
  readonly depth: number | null;
  readonly ends: Readonly<Partial<Record<Side, EndShape>>>;
  readonly teeth: number;
  readonly toothAngle: number;
  readonly round: number;
  readonly shape: readonly (readonly [number, number])[] | null;
}
export interface EndShape {
  readonly from: number;
  /** How much narrower at the tip: millimetres, or degrees off square. */
  readonly by: { readonly mm: number } | { readonly degrees: number };
}
interface Sided {
  readonly side: Side | 'inner';
  readonly curve: Curve;
}
type Outlined = readonly Sided[];

/**
 * Columns and rows of card to a flat net. Panels are rectangles; a tab is hinged on one neighbour and cut free elsewhere;
 * a cap is the circular segment over its neighbour's edge. Cells of one name are one, a rectangle. Two panels side by side
 * fold (valley, 90°) unless a line says otherwise.
 */
export function buildGrid(piece: GridPiece): Built {
  const negative = [...piece.columns, ...piece.rows].find((size) => !atLeast(size, 0) || !Number.isFinite(size));
  if (negative !== undefined) return { ok: false, reason: 'a column or row comes out smaller than nothing' };
  const xs = running(piece.columns);
  const ys = running(piece.rows);
  const builder = new GridBuilder(piece, xs, ys);
  const failure = builder.build();
  if (failure !== null) return { ok: false, reason: failure };
  return builder.net();
}

const running = (sizes: readonly number[]): readonly number[] =>
  sizes.reduce((stops, size) => [...stops, snap((stops.at(-1) as number) + size)], [0]);

class GridBuilder {
  private readonly panels: LoosePanel[] = [];
  private readonly hinges = new Map<string, string>();
  private readonly sides = new Map<string, Outlined>();
  private readonly cellOfPanel = new Map<string, Cell>();
  private readonly partings = new Map<string, Joint>();
  private readonly spans = new Map<string, Cell[]>();
  private readonly holes: Loop[] = [];
  private readonly creases: { readonly curve: Curve; readonly kind: 'valley' | 'mountain' }[] = [];

  constructor(
    private readonly piece: GridPiece,
    private readonly xs: readonly number[],
    private readonly ys: readonly number[],
  ) {
    for (const cell of piece.cells.flat()) {
      const span = this.spans.get(cell.name);
      if (span) span.push(cell);
      else this.spans.set(cell.name, [cell]);
    }
  }

  build(): string | null {
    const kept = this.piece.cells.flat().filter((cell) => cell.kind !== 'away' && this.spanOf(cell)[0] === cell);
    for (const cell of kept) {
      const span = this.spanOf(cell);
      const [columns, rows] = [new Set(span.map(({ column }) => column)), new Set(span.map(({ row }) => row))];
      const [wide, tall] = [1 + Math.max(...columns) - Math.min(...columns), 1 + Math.max(...rows) - Math.min(...rows)];
      if (wide * tall !== span.length) return `the cells of “${cell.name}” make no rectangle`;
    }
    // Caps before the tabs that hang on them.
    for (const cell of [...kept].sort((a, b) => Number(hangs(a)) - Number(hangs(b)))) {
      const failure = this.add(cell);
      if (failure !== null) return failure;
    }
    for (const [list, cut] of [
      [this.piece.slots, (cell: Cell, one: GridPiece['slots'][number]) => this.cutSlot(cell, one)],
      [this.piece.holes, (cell: Cell, one: GridPiece['holes'][number]) => this.cutHole(cell, one)],
      [this.piece.creases, (cell: Cell, one: GridPiece['creases'][number]) => this.addCrease(cell, one)],
    ] as const) {
      for (const one of list) {
        const cell = kept.find(({ name }) => name === one.cell);
        const failure = cell ? (cut as (cell: Cell, one: unknown) => string | null)(cell, one) : null;
        if (failure !== null) return failure;
      }
    }
    return null;
  }

  net(): Built {
    const away = this.piece.cells
      .flat()
      .filter((cell) => cell.kind === 'away')
      .map((cell) => {
        const { left, top, right, bottom } = this.box(cell);
        return { x: left, y: top, across: right - left, along: bottom - top };
      });
    const edges = Object.fromEntries(
      this.piece.edges.map(({ name, cell, side }) => [
        name,
        (this.sides.get(cell) ?? [])
          .filter((edge) => edge.side === side)
          .reduce((sum, edge) => sum + lengthOf(edge.curve), 0),
      ]),
    );
    return finishNet({
      panels: this.panels,
      jointOf: (a, b) => this.joint(a, b),
      holes: this.holes,
      creases: this.creases,
      edges,
      blank: {
        away,
        across: this.xs.at(-1) as number,
        along: this.ys.at(-1) as number,
        columns: this.xs,
        rows: this.ys,
      },
      step: 0,
    });
  }

  /** The cells of one name: together they are one rectangle. */
  private spanOf(cell: Cell): readonly Cell[] {
    return this.spans.get(cell.name) ?? [cell];
  }
  private box(cell: Cell) {
    const span = this.spanOf(cell);
    const [columns, rows] = [span.map(({ column }) => column), span.map(({ row }) => row)];
    return {
      left: this.xs[Math.min(...columns)] as number,
      right: this.xs[Math.max(...columns) + 1] as number,
      top: this.ys[Math.min(...rows)] as number,
      bottom: this.ys[Math.max(...rows) + 1] as number,
    };
  }
  private neighbour(cell: Cell, side: Side): Cell | undefined {
    const [dr, dc] = { top: [-1, 0], right: [0, 1], bottom: [1, 0], left: [0, -1] }[side] as [number, number];
    return this.piece.cells[cell.row + dr]?.[cell.column + dc];
  }
  /** The side on which a tab or cap hangs. */
  private hingeSide(cell: Cell): Side | null {
    const span = this.spanOf(cell);
    const touching = SIDES.filter((side) =>
      span.some((part) => {
        const other = this.neighbour(part, side);
        if (other === undefined || other.kind === 'away' || other.name === cell.name) return false;
        return cell.on === null ? !hangs(other) : other.name === cell.on;
      }),
    );
    return touching.length === 1 ? (touching[0] as Side) : cell.on === null ? null : (touching[0] ?? null);
  }

  private add(cell: Cell): string | null {
    if (cell.kind === 'panel') return this.addPanel(cell);
    const side = this.hingeSide(cell);
    if (side === null) return `“${cell.name}” hangs on nothing`;
    const host = this.spanOf(cell)
      .flatMap((part) => this.neighbour(part, side) ?? [])
      .find(
        ({ kind, name }) => kind !== 'away' && name !== cell.name && (cell.on === null || name === cell.on),
      ) as Cell;
    return cell.kind === 'cap' ? this.addCap(cell, side, host) : this.addTab(cell, side, host);
  }
  private push(cell: Cell, name: string, host: Cell | null, outlined: Outlined): void {
    const roll = this.piece.rolls.get(cell.name);
    const role: Panel['role'] = cell.kind === 'tab' ? 'tab' : 'panel';
    this.panels.push({
      name,
      role,
      loop: outlined.map((edge) => edge.curve),
      ...(name !== cell.name ? { tooth: true } : {}),
      ...(roll ? { roll } : {}),
    });
    this.cellOfPanel.set(name, cell);
    this.sides.set(name, outlined);
    if (host) this.hinges.set(name, host.name);
  }

  private addPanel(cell: Cell): string | null {
    const corners = cornersOf(this.box(cell));
    let edges: Sided[] = SIDES.map((side) => ({ side, curve: line(...endsOf(corners, side)) }));
    for (const { corner, radius } of this.piece.corners.filter(
      (one) => one.cell === cell.name && moreThan(one.radius, 0),
    )) {
      const rounded = roundCorner(edges, corner, radius);
      if (rounded === null) return `a corner radius is larger than “${cell.name}” allows`;
      edges = rounded;
    }
    for (const notch of this.piece.notches.filter((one) => one.cell === cell.name && moreThan(one.radius, 0))) {
      const notched = cutNotch(edges, notch);
      if (notched === null) return `a notch does not fit on the ${notch.side} of “${cell.name}”`;
      edges = notched;
    }
    this.push(cell, cell.name, null, edges);
    return null;
  }

  /** The circular segment over the host's edge: chord on the hinge, arc away from it. */
  private addCap(cell: Cell, side: Side, host: Cell): string | null {
    const radius = this.piece.caps.get(cell.name) ?? NaN;
    const [from, to] = endsOf(cornersOf(this.box(cell)), side);
    const arc = arcThrough(to, from, radius, true);
    if (!arc) return `the arc of “${cell.name}” does not reach across its chord`;
    this.push(cell, cell.name, host, [
      { side, curve: line(from, to) },
      { side: OPPOSITE[side], curve: arc },
    ]);
    return null;
  }

  private addTab(cell: Cell, side: Side, host: Cell): string | null {
    const shape = this.piece.tabs.get(cell.name) ?? {
      depth: null,
      ends: {},
      teeth: 1,
      toothAngle: 0,
      round: 0,
      shape: null,
    };
    if (shape.teeth > MOST_TEETH) return `“${cell.name}” has more than ${MOST_TEETH} teeth`;
    if (shape.shape) return this.addShaped(cell, side, host, shape.shape, shape.round);
    const box = this.box(cell);
    const full = side === 'top' || side === 'bottom' ? box.bottom - box.top : box.right - box.left;
    const depth = shape.depth === null ? full : shape.depth;
    if (!moreThan(depth, 0)) return null;
    if (!atLeast(full, depth)) return `“${cell.name}” is deeper than its place`;
    const hostArc =
      host.kind === 'cap'
        ? (this.sides.get(host.name)?.find((edge) => edge.curve.type === 'arc')?.curve as Arc | undefined)
        : undefined;
    if (hostArc) return this.addArcTeeth(cell, host, hostArc, depth, shape);
    return this.addStraightTab(cell, side, host, depth, shape);
  }

  /** A flap of its own shape, given along the hinge from left to right or top to bottom, and out from it. */
  private addShaped(
    cell: Cell,
    side: Side,
    host: Cell,
    shape: readonly (readonly [number, number])[],
    round: number,
  ): string | null {
    const corners = cornersOf(this.box(cell));
    const [start, end] = endsOf(corners, side);
    const length = Math.hypot(end.x - start.x, end.y - start.y);
    const along = { x: (end.x - start.x) / length, y: (end.y - start.y) / length };
    const forward = side === 'top' || side === 'right';
    const points = shape.map(([u, v]): Point => {
      const at = forward ? u : length - u;
      return { x: snap(start.x + along.x * at - along.y * v), y: snap(start.y + along.y * at + along.x * v) };
    });
    const loop = polygon(points);
    const clockwise = areaOf(loop) > 0 ? loop : polygon([...points].reverse());
    if (!moreThan(areaOf(clockwise), 0)) return `“${cell.name}” comes out smaller than nothing`;
    const depth = Math.max(...shape.map(([, v]) => v));
    const out = ({ x, y }: Point) => (x - start.x) * -along.y + (y - start.y) * along.x;
    const atTip = clockwise.filter((curve) => moreThan(round, 0) && coincident(out(curve.to), depth));
    const rounded = atTip.reduce<Loop | null>(
      (sides, { to }) =>
        sides &&
        fillet(
          sides,
          sides.findIndex((curve) => curve.to === to),
          round,
        ),
      clockwise,
    );
    if (rounded === null) return `the corners of “${cell.name}” are rounder than it is deep`;
    this.push(
      cell,
      cell.name,
      host,
      rounded.map((curve) => ({ side: 'inner' as const, curve })),
    );
    return null;
  }

  /** A tab along a straight hinge, cut into teeth when asked. Works in its own frame: u along the hinge, v out from it. */
  private addStraightTab(cell: Cell, side: Side, host: Cell, depth: number, shape: TabShape): string | null {
    const [start, end] = endsOf(cornersOf(this.box(cell)), side);
    const length = Math.hypot(end.x - start.x, end.y - start.y);
    const along = { x: (end.x - start.x) / length, y: (end.y - start.y) / length };
    // Loops run clockwise on screen, so the inside of the tab lies to the right of its hinge side, and out is away from the host.
    const out = { x: -along.y, y: along.x };
    const place = (u: number, v: number): Point => ({
      x: snap(start.x + along.x * u + out.x * v),
      y: snap(start.y + along.y * u + out.y * v),
    });
    const [firstSide, lastSide] = endSides(side);
    const [first, last] = [shape.ends[firstSide], shape.ends[lastSide]];
    const [from, to] = [first?.from ?? 0, length - (last?.from ?? 0)];
    if (!moreThan(to, from)) return `“${cell.name}” has no length along its fold`;
    const inset = (end: EndShape | undefined) =>
      end === undefined ? 0 : 'mm' in end.by ? end.by.mm : depth * Math.tan((end.by.degrees * Math.PI) / 180);
    const teeth = Math.max(1, Math.round(shape.teeth));
    const pitch = (to - from) / teeth;
    const give = teeth > 1 ? depth * Math.tan((shape.toothAngle * Math.PI) / 180) : 0;
    const sides = [side, lastSide, OPPOSITE[side], firstSide];
    let root = place(from, 0);
    for (let tooth = 0; tooth < teeth; tooth += 1) {
      const [a, b] = [from + pitch * tooth, tooth === teeth - 1 ? to : from + pitch * (tooth + 1)];
      let left = a + (tooth === 0 ? Math.max(inset(first), give) : give);
      let right = b - (tooth === teeth - 1 ? Math.max(inset(last), give) : give);
      if (teeth === 1 && moreThan(left, right)) [left, right] = meet(a, b, inset(first), inset(last));
      if (moreThan(left, right)) return `the teeth of “${cell.name}” come to nothing`;
      const tip = teeth === 1 && isZero(right - left) ? depth * ((b - a) / (inset(first) + inset(last))) : depth;
      const start = root;
      root = place(b, 0);
      const corners = [start, root, place(right, tip), place(left, tip)].filter(
        (point, index, all) => index === 0 || distance(point, all[index - 1] as Point) > 1e-5,
      );
      const outlined = corners.map((point, index) => ({
        side: sides[index] as Side,
        curve: line(point, corners[(index + 1) % corners.length] as Point),
      }));
      const rounded = shape.round > 0 && teeth === 1 ? roundTip(outlined, shape.round) : outlined;
      if (rounded === null) return `the corners of “${cell.name}” are rounder than it is deep`;
      this.push(cell, teeth === 1 ? cell.name : `${cell.name} ${tooth + 1}`, host, rounded);
    }
    return null;
  }

  /** Teeth along the arc of a cap. */
  private addArcTeeth(cell: Cell, host: Cell, arc: Arc, depth: number, shape: TabShape): string | null {
    const teeth = Math.max(1, Math.round(shape.teeth));
    for (let index = 0; index < teeth; index += 1) {
      const tooth = toothOn(
        { ...arc, from: pointAt(arc, index / teeth), to: pointAt(arc, (index + 1) / teeth) },
        depth,
        shape.toothAngle,
      );
      if (!tooth) return `the teeth of “${cell.name}” come to nothing`;
      const name = teeth === 1 ? cell.name : `${cell.name} ${index + 1}`;
      this.push(
        cell,
        name,
        host,
        tooth.map((curve) => ({ side: 'inner' as const, curve })),
      );
    }
    this.splitHostArc(host, arc, teeth);
    return null;
  }
  /** The cap's arc gets a corner at every tooth, so that roots and arc match. */
  private splitHostArc(host: Cell, arc: Arc, teeth: number): void {
    const index = this.panels.findIndex((panel) => panel.name === host.name);
    const panel = this.panels[index] as LoosePanel;
    const parts: readonly Curve[] = Array.from(
      { length: teeth },
      (_, tooth): Arc => ({
        ...arc,
        from: tooth === 0 ? arc.from : pointAt(arc, tooth / teeth),
        to: tooth === teeth - 1 ? arc.to : pointAt(arc, (tooth + 1) / teeth),
      }),
    );
    this.panels[index] = { ...panel, loop: panel.loop.flatMap((curve) => (curve.type === 'arc' ? parts : [curve])) };
  }

  private cutSlot(cell: Cell, slot: GridPiece['slots'][number]): string | null {
    const hole = slotIn(this.box(cell), slot);
    if (!hole) return `a slot does not fit inside “${cell.name}”`;
    this.holes.push(hole);
    return null;
  }

  private cutHole(cell: Cell, hole: GridPiece['holes'][number]): string | null {
    const { left, top, right, bottom } = this.box(cell);
    const [centre, radius] = [{ x: left + hole.across, y: top + hole.along }, hole.diameter / 2];
    const inside =
      moreThan(centre.x - radius, left) &&
      moreThan(right, centre.x + radius) &&
      moreThan(centre.y - radius, top) &&
      moreThan(bottom, centre.y + radius);
    if (!inside || !moreThan(radius, 0)) return `a hole does not fit inside “${cell.name}”`;
    this.holes.push(circle(centre, radius, false));
    return null;
  }
  private addCrease(cell: Cell, crease: GridPiece['creases'][number]): string | null {
    const { left, top } = this.box(cell);
    const place = ([x, y]: readonly [number, number]): Point => ({ x: snap(left + x), y: snap(top + y) });
    const [from, to] = [place(crease.from), place(crease.to)];
    if (crease.parts !== null) return this.part(cell, from, to, { ...crease, parts: crease.parts });
    this.creases.push({ curve: line(from, to), kind: crease.is });
    return null;
  }
  /** Cuts a panel in two along a fold from edge to edge; what lies to the right of the fold takes a name of its own. */
  private part(
    cell: Cell,
    from: Point,
    to: Point,
    { parts, is, angle }: { readonly parts: string; readonly is: 'valley' | 'mountain'; readonly angle: number },
  ): string | null {
    const index = this.panels.findIndex((panel) => panel.name === cell.name);
    const panel = this.panels[index];
    const halves = panel && parted(panel.loop, from, to);
    if (!halves) return `a fold does not run from edge to edge of “${cell.name}”`;
    this.panels.splice(index, 1, { ...panel, loop: halves.left }, { ...panel, name: parts, loop: halves.right });
    this.cellOfPanel.set(parts, { ...cell, name: parts });
    this.partings.set(pairOf(cell.name, parts), { is: 'fold', kind: is, angle });
    return null;
  }

  private joint(a: string, b: string): Joint {
    const [cellA, cellB] = [this.cellOfPanel.get(a) as Cell, this.cellOfPanel.get(b) as Cell];
    const hinged = this.hinges.get(a) === cellB.name || this.hinges.get(b) === cellA.name;
    const parting = this.partings.size > 0 ? this.partings.get(pairOf(a, b)) : undefined;
    if (parting) return parting;
    const said = this.piece.lines.find(
      ({ between: [p, q] }) => (p === cellA.name && q === cellB.name) || (p === cellB.name && q === cellA.name),
    );
    if (said) return jointAsSaid(said);
    if (cellA.kind === 'panel' && cellB.kind === 'panel') return { is: 'fold', kind: 'valley', angle: 90 };
    if (!hinged) return { is: 'slit' };
    return hangs(cellA) || hangs(cellB) ? { is: 'fold', kind: 'valley', angle: 90 } : { is: 'nothing' };
  }
}

const pairOf = (a: string, b: string): string => [a, b].sort().join('|');

/** A loop of straight edges cut in two from one point of it to another; null when one of them is not on it. */
function parted(loop: Loop, from: Point, to: Point): { readonly left: Loop; readonly right: Loop } | null {
  const corners = loop.flatMap((curve) => {
    const length = lengthOf(curve);
    const on = [from, to].filter((point) => {
      const [a, b] = [distance(curve.from, point), distance(point, curve.to)];
      return coincident(a + b, length) && !isZero(a) && !isZero(b);
    });
    return [curve.from, ...on.sort((a, b) => distance(curve.from, a) - distance(curve.from, b))];
  });
  const [start, end] = [from, to].map((point) => corners.findIndex((corner) => samePoint(corner, point))) as [
    number,
    number,
  ];
  if (start < 0 || end < 0 || start === end) return null;
  const walk = (first: number, last: number): Point[] => {
    const count = ((last - first + corners.length) % corners.length) + 1;
    return Array.from({ length: count }, (_, step) => corners[(first + step) % corners.length] as Point);
  };
  // Loops run clockwise on screen: back from the fold's end to its start they go round what lies to its right.
  const [right, left] = [polygon(walk(end, start)), polygon(walk(start, end))];
  return moreThan(areaOf(right), 0) && moreThan(areaOf(left), 0) ? { left, right } : null;
}

interface Corners {
  readonly tl: Point;
  readonly tr: Point;
  readonly br: Point;
  readonly bl: Point;
}
const cornersOf = (box: { left: number; top: number; right: number; bottom: number }): Corners => ({
  tl: { x: box.left, y: box.top },
  tr: { x: box.right, y: box.top },
  br: { x: box.right, y: box.bottom },
  bl: { x: box.left, y: box.bottom },
});
/** From where to where a side runs when the rectangle is walked clockwise. */
function endsOf({ tl, tr, br, bl }: Corners, side: Side): [Point, Point] {
  return { top: [tl, tr], right: [tr, br], bottom: [br, bl], left: [bl, tl] }[side] as [Point, Point];
}
/** The sides on which a hinge begins and ends, walked clockwise. */
const endSides = (hinge: Side): readonly [Side, Side] =>
  (({ top: ['left', 'right'], right: ['top', 'bottom'], bottom: ['right', 'left'], left: ['bottom', 'top'] }) as const)[
    hinge
  ];

/** Two tapers that meet before the tip make a point there. */
function meet(a: number, b: number, first: number, last: number): [number, number] {
  const point = a + ((b - a) * first) / (first + last);
  return [point, point];
}

/** The two corners of the tip of a tab with four corners: hinge, end, tip, end. */
function roundTip(edges: readonly Sided[], radius: number): Outlined | null {
  if (edges.length !== 4) return null;
  const sides = edges.map((edge) => edge.side);
  const first = fillet(
    edges.map((edge) => edge.curve),
    1,
    radius,
  );
  const both = first && fillet(first, 3, radius);
  return (
    both &&
    both.map((curve, index) => ({
      side: curve.type === 'arc' ? ('inner' as const) : (sides[[0, 1, 1, 2, 2, 3][index] ?? 0] as Side),
      curve,
    }))
  );
}

const CORNER_SIDES: Readonly<Record<string, readonly [Side, Side]>> = {
  'top left': ['left', 'top'],
  'top right': ['top', 'right'],
  'bottom right': ['right', 'bottom'],
  'bottom left': ['bottom', 'left'],
};
function roundCorner(edges: readonly Sided[], corner: string, radius: number): Sided[] | null {
  const [before, after] = CORNER_SIDES[corner] as readonly [Side, Side];
  const into = edges.find((edge) => edge.side === before && edge.curve.type === 'line');
  const outOf = edges.find((edge) => edge.side === after && edge.curve.type === 'line');
  if (!into || !outOf || !atLeast(lengthOf(into.curve), radius) || !atLeast(lengthOf(outOf.curve), radius)) return null;
  const from = pointAt(into.curve, 1 - radius / lengthOf(into.curve));
  const to = pointAt(outOf.curve, radius / lengthOf(outOf.curve));
  // The tangent arc of a square corner: chord r √2 over radius r.
  const arc = arcThrough(from, to, radius, true);
  if (!arc) return null;
  return edges.flatMap((edge) => {
    if (edge === into)
      return [
        { ...edge, curve: line(edge.curve.from, from) },
        { side: 'inner' as const, curve: arc },
      ];
    return edge === outOf ? [{ ...edge, curve: line(to, edge.curve.to) }] : [edge];
  });
}

function cutNotch(edges: readonly Sided[], notch: GridPiece['notches'][number]): Sided[] | null {
  const index = edges.findIndex((edge) => edge.side === notch.side && edge.curve.type === 'line');
  const edge = edges[index];
  if (!edge) return null;
  const length = lengthOf(edge.curve);
  // Positions run left to right and top to bottom; the bottom and left sides are walked the other way.
  const at = notch.side === 'top' || notch.side === 'right' ? notch.at : length - notch.at;
  if (!moreThan(at, notch.radius) || !moreThan(length, at + notch.radius)) return null;
  const [from, to] = [
    pointAt(edge.curve, (at - notch.radius) / length),
    pointAt(edge.curve, (at + notch.radius) / length),
  ];
  const bite = arcThrough(from, to, notch.radius, false);
  if (!bite) return null;
  return edges.flatMap((one, i) =>
    i === index
      ? [
          { ...one, curve: line(one.curve.from, from) },
          { side: 'inner' as const, curve: bite },
          { ...one, curve: line(to, one.curve.to) },
        ]
      : [one],
  );
}

/** Card left of the blank after cutting, in square millimetres. */
export const areaOfNet = (net: Net): number =>
  areaOf(net.outline) - net.holes.reduce((sum, hole) => sum + Math.abs(areaOf(hole)), 0);
