import { encloses, pointAt, sweepOf } from '../net';
import type { Axis, Curve, Fold, Loop, Net, Panel, Point } from '../types';
import { closeRings, type Closure, type Hinge, type Linkage } from './closing';
import { same } from '../measure';
import { bentStrips, bentTurn, creaseSeams, edgeTurn } from './bent';
import { cross, dot, minus, plus, times, turned, unit, vector, type Vector } from './vector';

/** Where a flat panel lies: flat (x, y) is at `origin + x·across + y·along`; the inside of the box is on the side of `inside`. */
export interface Frame {
  readonly origin: Vector;
  readonly across: Vector;
  readonly along: Vector;
}
export interface FoldedPanel {
  readonly name: string;
  readonly role: Panel['role'];
  readonly tooth: boolean;
  readonly points: readonly Vector[];
  readonly inside: Vector;
  /** For each edge from point i to i + 1: a real edge of the card, not a seam inside a rolled or continued panel. */
  readonly edges: readonly boolean[];
  /** Index of the sheet that this is part of; it is glued on the panel of this name. */
  readonly sheet?: number;
}
export interface FoldOptions {
  readonly root: string;
  readonly at: Vector;
  readonly across: Axis;
  readonly along: Axis;
  /** What of the root panel is put at `at`: the corner of its upright rectangle, or the middle of its corners. Usual: the corner. */
  readonly anchor?: 'corner' | 'middle';
  /** Share of every fold's turn, 0 flat to 1 closed. */
  readonly share?: number;
  /** Folds that the picture shows open turn only so far. */
  readonly asShown?: boolean;
  /** Sheets glued on faces, where they lie on the flat; they follow the panels after them in what is given back. */
  readonly sheets?: readonly Sheet[];
}
/** A flat sheet glued on the panels of one face. */
export interface Sheet {
  readonly face: readonly string[];
  readonly outline: Loop;
  readonly holes: readonly Loop[];
}

const AXES: Readonly<Record<Axis, Vector>> = {
  '+x': vector(1, 0, 0),
  '-x': vector(-1, 0, 0),
  '+y': vector(0, 1, 0),
  '-y': vector(0, -1, 0),
  '+z': vector(0, 0, 1),
  '-z': vector(0, 0, -1),
};
export const axis = (name: Axis): Vector => AXES[name];
export const insideOf = (frame: Frame): Vector => unit(cross(frame.along, frame.across));
const place = (frame: Frame, point: Point): Vector =>
  plus(frame.origin, plus(times(frame.across, point.x), times(frame.along, point.y)));

/** A facet: a flat panel, or one strip of a rolled one. */
interface Facet {
  readonly name: string;
  readonly of: Panel;
  readonly points: readonly Point[];
  readonly edges: readonly boolean[];
}
interface Link {
  readonly a: number;
  readonly b: number;
  readonly from: Point;
  readonly to: Point;
  /** Degrees, valley positive. */
  readonly turn: number;
  /** Hems are made while everything else is still flat; tabs turn ahead of the walls that they go behind. */
  readonly stage?: 'hem' | 'tab';
}
/** Share of the rest at which walls stand as a tube, where its ends are folded from them. */
const TUBE = 0.5;
/** Share at which hems are made, where there are any. */
const HEMMED = 1 / 3;
/**
 * How far tabs are ahead. Between two walls that lean by θ from flat a tab at their corner has to turn by acos(cos² θ), which
 * for small θ is √2 θ, to lie on its wall.
 */
const TABS_AHEAD = 1.45;

/**
 * Folds a net in space. The root panel is placed; every other panel turns about the fold it hangs on, as a tree from the
 * root (folds that close a ring are met again by geometry, and tests check that). Rolled panels become narrow flat strips.
 */
export function foldNet(net: Net, options: FoldOptions): readonly FoldedPanel[] {
  const share = options.share ?? 1;
  const { facets, links } = facetsOf(net, options.asShown ?? false);
  const hemmed = links.some(({ stage }) => stage === 'hem') ? HEMMED : 0;
  const root = facets.findIndex((facet) => facet.of.name === options.root);
  const start = facets[root];
  if (!start) return [];
  const tree = treeOf(root, links);
  const tube = tree.closing.length > 0 ? tubeOf(links) : null;
  const turnOf = (link: Link): number => {
    if (link.stage === 'hem') return link.turn * Math.min(1, share / hemmed);
    const rest = Math.max(0, (share - hemmed) / (1 - hemmed));
    if (tube) {
      const [up, down] = [Math.min(1, rest / TUBE), Math.max(0, (rest - TUBE) / (1 - TUBE))];
      const begins = tube.stands.get(link);
      return begins === undefined ? link.turn * down : begins * up + (link.turn - begins) * down;
    }
    return link.turn * (link.stage === 'tab' ? Math.min(1, rest * TABS_AHEAD) : rest);
  };
  const held = tree.hinges.map(({ link }) => tube?.leads.has(link) ?? false);
  const first = rootFrame(start, options, share);
  const turns = tree.hinges.map(({ link }) => (turnOf(link) * Math.PI) / 180);
  const layOut = (by: readonly number[]) => framesOf(first, tree, facets, by);
  // Half way, folds that close a ring round an inner corner do not turn in step; flat and folded they are as they should be.
  const rings = tree.closing.length > 0 && share > 0 && share < 1;
  const whole = tree.hinges.map(({ link }) => (link.turn * Math.PI) / 180);
  const closed = () => closeRings(turns, whole, (by) => linkageOf(layOut(by), tree, held));
  const { frames } = layOut(rings ? onceFor(net, turns, closed) : turns);
  const inSpace = (facet: Facet, index: number): FoldedPanel[] => {
    const frame = frames.get(index);
    if (!frame) return [];
    return [
      {
        name: facet.of.name,
        role: facet.of.role,
        tooth: facet.of.tooth ?? false,
        points: facet.points.map((point) => place(frame, point)),
        inside: insideOf(frame),
        edges: facet.edges,
      },
    ];
  };
  const laid = (options.sheets ?? []).flatMap((one, sheet) =>
    facetsOfSheet(one, facets).flatMap(({ facet, on }) => inSpace(facet, on).map((part) => ({ ...part, sheet }))),
  );
  return [...facets.flatMap(inSpace), ...laid];
}

/** Walls that fold to a tube before its ends are folded. */
interface Tube {
  /** Folds along the tube with the turn that they have when it stands, degrees: past its walls a corner goes straight on. */
  readonly stands: ReadonlyMap<Link, number>;
  /** What the rest follows: the corners of the tube, and round its ends the folds of every other wall. */
  readonly leads: ReadonlySet<Link>;
}

/**
 * Where folds cross at inner corners, card folds one way first: walls to a tube, then its ends. The folds along the tube are
 * on more lines than the folds round it. Null where no folds cross.
 */
function tubeOf(links: readonly Link[]): Tube | null {
  const [upright, level] = [crossing(links, 'x'), crossing(links, 'y')];
  const [along, round, way] =
    upright.length >= level.length ? ([upright, level, 'x'] as const) : ([level, upright, 'y'] as const);
  const corners = along.flatMap((line) => {
    const wall = longestOf(line);
    // What is folded flat is the corner of no tube.
    return same(Math.abs(wall.turn), 180) ? [] : line.map((link) => ({ link, wall }));
  });
  if (corners.length === 0) return null;
  const stands = corners.map(({ link, wall }) => {
    const own = same(Math.abs(link.turn), Math.abs(wall.turn));
    return { link, own, turn: own ? link.turn : wall.turn };
  });
  const walls = corners.map(({ wall }) => wall);
  const opposite = round.flatMap((line) => {
    const atWalls = line
      .filter((link) => link.stage !== 'hem' && walls.some((wall) => meet(link, wall)))
      .sort((a, b) => Math.min(a.from[way], a.to[way]) - Math.min(b.from[way], b.to[way]));
    const parity = atWalls.length > 0 ? atWalls.indexOf(longestOf(atWalls)) % 2 : 0;
    return atWalls.filter((_, index) => index % 2 === parity);
  });
  return {
    stands: new Map(stands.map(({ link, turn }) => [link, turn])),
    leads: new Set([...stands.flatMap(({ link, own }) => (own ? [link] : [])), ...opposite]),
  };
}
/** Folds that run one way (`x`: all of one x) and meet folds of the other way, by their lines. */
function crossing(links: readonly Link[], way: 'x' | 'y'): readonly (readonly Link[])[] {
  const running = (one: 'x' | 'y') => links.filter(({ from, to }) => Math.abs(from[one] - to[one]) < 1e-3);
  const others = running(way === 'x' ? 'y' : 'x');
  const meeting = running(way).filter((link) => others.some((other) => meet(link, other)));
  const onLine = (link: Link) => meeting.filter(({ from }) => Math.abs(from[way] - link.from[way]) < 1e-3);
  return meeting.map(onLine).filter(([first], index) => first === meeting[index]);
}
const meet = (a: Link, b: Link): boolean => [a.from, a.to].some((end) => near(end, b.from) || near(end, b.to));
const longestOf = (line: readonly Link[]): Link => {
  const long = ({ from, to }: Link) => Math.hypot(to.x - from.x, to.y - from.y);
  return line.reduce((longest, link) => (long(link) > long(longest) ? link : longest));
};

/** A box that is turned before the eyes is folded as far in every picture of it. */
const closedOnce = new WeakMap<Net, { readonly asked: string; readonly turns: readonly number[] }>();
function onceFor(net: Net, turns: readonly number[], close: () => readonly number[]): readonly number[] {
  const asked = turns.join();
  const known = closedOnce.get(net);
  if (known?.asked === asked) return known.turns;
  const closed = close();
  closedOnce.set(net, { asked, turns: closed });
  return closed;
}

interface Tree {
  readonly root: number;
  /** From the root outwards: each turns the facet `moves` about a link that it shares with the facet `from`. */
  readonly hinges: readonly { readonly link: Link; readonly from: number; readonly moves: number }[];
  /** Folds between facets that hang together already. */
  readonly closing: readonly Link[];
  readonly chain: (facet: number) => readonly number[];
}
function treeOf(root: number, links: readonly Link[]): Tree {
  const hinges: Tree['hinges'][number][] = [];
  const chains = new Map<number, readonly number[]>([[root, []]]);
  const used = new Set<Link>();
  const queue = [root];
  for (let from = queue.shift(); from !== undefined; from = queue.shift()) {
    for (const link of links) {
      const moves = link.a === from ? link.b : link.b === from ? link.a : -1;
      if (moves < 0 || chains.has(moves)) continue;
      used.add(link);
      chains.set(moves, [...(chains.get(from) as readonly number[]), hinges.length]);
      hinges.push({ link, from, moves });
      queue.push(moves);
    }
  }
  const closing = links.filter((link) => !used.has(link) && chains.has(link.a) && chains.has(link.b));
  return { root, hinges, closing, chain: (facet) => chains.get(facet) ?? [] };
}

/** Every facet's frame with the hinges turned so far (radians), and where the hinges then are. */
function framesOf(first: Frame, { root, hinges }: Tree, facets: readonly Facet[], turns: readonly number[]) {
  const frames = new Map<number, Frame>([[root, first]]);
  const inSpace = hinges.map(({ link, from, moves }, index): Hinge => {
    const frame = frames.get(from) as Frame;
    const hinge = hingeOf(frame, link, facets[moves] as Facet);
    frames.set(moves, turnedAbout(frame, hinge, turns[index] as number));
    return { ...hinge, moves };
  });
  return { frames, hinges: inSpace };
}

function linkageOf(
  { frames, hinges }: ReturnType<typeof framesOf>,
  { closing, chain }: Tree,
  held: readonly boolean[],
): Linkage {
  const closures = closing.flatMap(({ a, b, from, to }) =>
    [from, to].map((point): Closure => {
      const placed = (facet: number) => place(frames.get(facet) as Frame, point);
      return { facets: [a, b], places: [placed(a), placed(b)] };
    }),
  );
  return { hinges, held, closures, chain };
}

/** A sheet whole on a flat face; strip by strip where the card under it is rolled or bent. */
function facetsOfSheet(
  { face, outline, holes }: Sheet,
  facets: readonly Facet[],
): readonly { readonly facet: Facet; readonly on: number }[] {
  const under = facets.flatMap((facet, on) => (face.includes(facet.of.name.toLowerCase()) ? [{ facet, on }] : []));
  const whole = (of: Panel) => pierced(flatFacet({ ...of, loop: outline }, []), holes);
  const flat = under.find(({ facet: { of } }) => !of.roll && !of.cone && !of.bent);
  if (flat) return [{ facet: whole(flat.facet.of), on: flat.on }];
  return under.map(({ facet, on }) => ({ facet: within(flatFacet({ ...facet.of, loop: outline }, []), facet), on }));
}

/** The part of a facet that lies in a strip, which bulges nowhere inwards; where it is cut it has no edge of its own. */
function within(facet: Facet, strip: Facet): Facet {
  const inner = middleOf(strip.points);
  return strip.points.reduce((kept, from, index) => {
    const to = strip.points[(index + 1) % strip.points.length] as Point;
    const side = ({ x, y }: Point) => (to.x - from.x) * (y - from.y) - (to.y - from.y) * (x - from.x);
    const sign = Math.sign(side(inner));
    const points: Point[] = [];
    const edges: boolean[] = [];
    kept.points.forEach((point, at) => {
      const next = kept.points[(at + 1) % kept.points.length] as Point;
      const [here, there] = [side(point) * sign, side(next) * sign];
      const cut = here / (here - there);
      const crossing = { x: point.x + (next.x - point.x) * cut, y: point.y + (next.y - point.y) * cut };
      if (here >= 0) {
        points.push(point);
        edges.push(kept.edges[at] as boolean);
        if (there < 0) {
          points.push(crossing);
          edges.push(false);
        }
      } else if (there > 0) {
        points.push(crossing);
        edges.push(kept.edges[at] as boolean);
      }
    });
    return { ...kept, points, edges };
  }, facet);
}

/** A rolled root is placed by its chord: its first strip leans back by half the whole turn. */
function rootFrame(start: Facet, { at, across: u, along: v, anchor }: FoldOptions, share: number): Frame {
  const [acrossAxis, alongAxis] = [axis(u), axis(v)];
  const { roll, cone, bent } = start.of;
  if (cone) return coneFrame(cone, at, acrossAxis, alongAxis);
  const corners = start.of.loop.map((curve) => curve.from);
  const box = boxOf(corners);
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const held =
    anchor === 'middle'
      ? { x: mean(corners.map(({ x }) => x)), y: mean(corners.map(({ y }) => y)) }
      : { x: box.left, y: box.top };
  let heading = acrossAxis;
  if (roll || bent) {
    const turn = bent
      ? bentTurn(start.of) * (Math.PI / 180) * share
      : ((box.right - box.left) / (roll?.radius ?? 1)) * (1 - 1 / stripsOf(start.of)) * share;
    const lean = dot(turned(acrossAxis, alongAxis, 0.1), cross(alongAxis, acrossAxis)) > 0 ? -1 : 1;
    heading = turned(acrossAxis, alongAxis, (lean * turn) / 2);
  }
  return {
    origin: minus(at, plus(times(heading, held.x), times(alongAxis, held.y))),
    across: heading,
    along: alongAxis,
  };
}

/** A cone is placed by its apex and its axis (`along`); its first strip looks towards `across`. */
function coneFrame(
  cone: { readonly apex: Point; readonly angle: number },
  at: Vector,
  side: Vector,
  down: Vector,
): Frame {
  const lean = coneLean(cone.angle);
  const middle = plus(times(down, Math.cos(lean)), times(side, Math.sin(lean)));
  const level = cross(side, down);
  // In the flat the first strip's middle line lies at this angle, its outward-clockwise neighbour follows.
  const flat = ((90 - cone.angle / 2 + cone.angle / CONE_STRIPS / 2) * Math.PI) / 180;
  const across = plus(times(middle, Math.cos(flat)), times(level, -Math.sin(flat)));
  const along = plus(times(middle, Math.sin(flat)), times(level, Math.cos(flat)));
  return { origin: minus(at, plus(times(across, cone.apex.x), times(along, cone.apex.y))), across, along };
}

/** A fold in space, about which what lies beyond it turns towards the inside for a valley. */
function hingeOf(frame: Frame, link: Link, beyond: Facet): Pick<Hinge, 'at' | 'about'> {
  const [p, q] = [place(frame, link.from), place(frame, link.to)];
  const direction = unit(minus(q, p));
  const centre = middleOf(beyond.points);
  const towards = minus(place(frame, centre), p);
  const sign = dot(cross(direction, towards), insideOf(frame)) >= 0 ? 1 : -1;
  return { at: p, about: times(direction, sign) };
}
/** The frame beyond a fold: the same flat sheet turned about the fold's line. */
function turnedAbout(frame: Frame, { at, about }: Pick<Hinge, 'at' | 'about'>, angle: number): Frame {
  if (angle === 0) return frame;
  const turn = (a: Vector) => turned(a, about, angle);
  return { origin: plus(at, turn(minus(frame.origin, at))), across: turn(frame.across), along: turn(frame.along) };
}

function facetsOf(net: Net, asShown: boolean): { readonly facets: readonly Facet[]; readonly links: readonly Link[] } {
  const facets: Facet[] = [];
  const links: Link[] = [];
  const strips = new Map<string, readonly number[]>();
  const joined = net.joins.map((join) => join.curve);
  for (const panel of net.panels) {
    const first = facets.length;
    if (panel.cone) {
      strips.set(panel.name, coneFacets(panel, panel.cone, facets, links));
      continue;
    }
    if (panel.bent) {
      const { strips: all, seams } = bentStrips(panel);
      facets.push(...all.map((strip, index) => ({ name: `${panel.name}#${index}`, of: panel, ...strip })));
      links.push(...seams.map((seam, index) => ({ a: first + index, b: first + index + 1, ...seam })));
      strips.set(
        panel.name,
        all.map((_, index) => first + index),
      );
      continue;
    }
    if (!panel.roll) {
      facets.push(pierced(flatFacet(panel, joined), net.holes));
      strips.set(panel.name, [first]);
      continue;
    }
    const box = boxOf(panel.loop.map((curve) => curve.from));
    const count = stripsOf(panel);
    const wide = (box.right - box.left) / count;
    const turn = ((wide / panel.roll.radius) * 180) / Math.PI;
    for (let index = 0; index < count; index += 1) {
      const [l, r] = [box.left + wide * index, box.left + wide * (index + 1)];
      const points = [
        { x: l, y: box.top },
        { x: r, y: box.top },
        { x: r, y: box.bottom },
        { x: l, y: box.bottom },
      ];
      facets.push({
        name: `${panel.name}#${index}`,
        of: panel,
        points,
        edges: [true, index === count - 1, true, index === 0],
      });
      if (index > 0)
        links.push({
          a: first + index - 1,
          b: first + index,
          from: { x: l, y: box.top },
          to: { x: l, y: box.bottom },
          turn,
        });
    }
    strips.set(
      panel.name,
      Array.from({ length: count }, (_, index) => first + index),
    );
  }
  const facetAt = (name: string, curve: Curve): number => {
    const all = strips.get(name) ?? [];
    if (all.length <= 1) return all[0] ?? -1;
    const cone = net.panels.find((panel) => panel.name === name)?.cone;
    if (cone) return all[coneStripAt(cone, curve, all.length)] as number;
    const x = (curve.from.x + curve.to.x) / 2;
    return (
      all.find((index) => x <= Math.max(...(facets[index] as Facet).points.map((point) => point.x))) ??
      (all.at(-1) as number)
    );
  };
  const link = (curve: Curve, [a, b]: readonly [string, string], turn: number, stage?: Link['stage']) =>
    links.push({
      a: facetAt(a, curve),
      b: facetAt(b, curve),
      from: curve.from,
      to: curve.to,
      turn,
      ...(stage ? { stage } : {}),
    });
  const hem = hemOf(net);
  const tabs = net.panels.flatMap(({ name, role, tooth }) => (role === 'tab' && !tooth ? [name] : []));
  const stageOf = (fold: Fold): Link['stage'] =>
    hem.includes(fold) ? 'hem' : fold.panels.some((name) => tabs.includes(name)) ? 'tab' : undefined;
  for (const fold of net.folds) {
    const own = net.panels.filter((panel) => fold.panels.includes(panel.name));
    const bent = own.filter((panel) => panel.bent);
    const [face, flap] = bent;
    if (fold.curve.type === 'arc' && face && flap) {
      const [a, b] = [strips.get(face.name) as readonly number[], strips.get(flap.name) as readonly number[]];
      const seams = creaseSeams(fold.curve, face);
      links.push(...seams.map((seam, index) => ({ a: a[index] as number, b: b[index] as number, ...seam })));
      continue;
    }
    const turn = (asShown ? fold.shown : undefined) ?? fold.angle;
    const cone = own.find((panel) => panel.cone)?.cone;
    const rolled = Math.abs(fold.curve.from.x - fold.curve.to.x) < 1e-6 ? own.find((panel) => panel.roll) : undefined;
    const strip = rolled ? wholeTurn(rolled) / stripsOf(rolled) : 0;
    // The first strip leans half its turn from the round that it stands for; a tab that goes on without a fold, once round,
    // lies under it.
    const under = rolled && wholeTurn(rolled) > 350 && fold.angle === 0;
    const round = cone ? coneTurn(cone.angle) : under ? strip : strip / 2;
    const beyond = bent.reduce((sum, panel) => sum + edgeTurn(panel), round);
    link(fold.curve, fold.panels, (fold.kind === 'valley' ? turn : -turn) + beyond, stageOf(fold));
  }
  for (const join of net.joins) link(join.curve, join.panels, 0);
  return { facets, links };
}

/**
 * Folds back that go on from panel to panel in one straight line. A hem has to be folded before its panels are folded against
 * one another: at any later time card would have to stretch.
 */
function hemOf({ folds }: Net): readonly Fold[] {
  const back = folds.filter(({ angle, shown, curve }) => angle === 180 && shown === undefined && curve.type === 'line');
  const goesOn = ({ curve: a }: Fold, { curve: b }: Fold): boolean => {
    const [across, down] = [a.to.x - a.from.x, a.to.y - a.from.y];
    const off = ({ x, y }: Point) =>
      Math.abs(across * (y - a.from.y) - down * (x - a.from.x)) / Math.hypot(across, down);
    return off(b.from) < 1e-3 && off(b.to) < 1e-3 && [b.from, b.to].some((end) => near(end, a.from) || near(end, a.to));
  };
  return back.filter((fold) => back.some((other) => other !== fold && goesOn(fold, other)));
}

const CONE_STRIPS = 36;
/** Which strip of a cone an edge lies on, by its angle about the apex. */
function coneStripAt(cone: { readonly apex: Point; readonly angle: number }, curve: Curve, count: number): number {
  const [x, y] = [(curve.from.x + curve.to.x) / 2 - cone.apex.x, (curve.from.y + curve.to.y) / 2 - cone.apex.y];
  const at = ((Math.atan2(y, x) * 180) / Math.PI - (90 - cone.angle / 2) + 720) % 360;
  return Math.min(count - 1, Math.max(0, Math.floor((at / cone.angle) * count)));
}
/**
 * A rolled sector as the side faces of a regular pyramid with as many sides as strips. Neighbouring faces turn by the angle
 * between their normals: cos = sin²m + cos²m cos(360° / n), m the angle of a face's middle line to the axis.
 */
function coneFacets(
  panel: Panel,
  cone: { readonly apex: Point; readonly angle: number },
  facets: Facet[],
  links: Link[],
): readonly number[] {
  const radii = panel.loop
    .flatMap((curve) => [curve.from, curve.to])
    .map((point) => Math.hypot(point.x - cone.apex.x, point.y - cone.apex.y));
  const [inner, outer] = [Math.min(...radii), Math.max(...radii)];
  const first = facets.length;
  const each = cone.angle / CONE_STRIPS;
  const at = (radius: number, index: number): Point => {
    const turn = ((90 - cone.angle / 2 + each * index) * Math.PI) / 180;
    return { x: cone.apex.x + radius * Math.cos(turn), y: cone.apex.y + radius * Math.sin(turn) };
  };
  const turn = coneTurn(cone.angle);
  for (let index = 0; index < CONE_STRIPS; index += 1) {
    const pointed = inner < 1e-6;
    const points = pointed
      ? [at(outer, index), at(outer, index + 1), cone.apex]
      : [at(outer, index), at(outer, index + 1), at(inner, index + 1), at(inner, index)];
    const [start, end] = [index === 0, index === CONE_STRIPS - 1];
    facets.push({
      name: `${panel.name}#${index}`,
      of: panel,
      points,
      edges: pointed ? [true, end, start] : [true, end, true, start],
    });
    if (index > 0)
      links.push({
        a: first + index - 1,
        b: first + index,
        from: at(outer, index),
        to: pointed ? cone.apex : at(inner, index),
        turn,
      });
  }
  return Array.from({ length: CONE_STRIPS }, (_, index) => first + index);
}
/** Degrees from one strip of a cone to the next; also from its last strip to a seam tab, which lies under the first. */
function coneTurn(angle: number): number {
  const lean = coneLean(angle);
  const between = Math.acos(Math.sin(lean) ** 2 + Math.cos(lean) ** 2 * Math.cos((2 * Math.PI) / CONE_STRIPS));
  return (between * 180) / Math.PI;
}
/** Angle between the axis and the middle line of a face, for a cone whose flat is a sector of this angle. */
function coneLean(angle: number): number {
  const edge = Math.asin(
    Math.min(1, Math.sin(((angle / CONE_STRIPS) * Math.PI) / 360) / Math.sin(Math.PI / CONE_STRIPS)),
  );
  return Math.atan(Math.tan(edge) * Math.cos(Math.PI / CONE_STRIPS));
}

/** Arcs stay as fine as the panel's own corners plus a few points; seams to a continued panel are no edges. */
function flatFacet(panel: Panel, joined: readonly Curve[]): Facet {
  const points: Point[] = [];
  const edges: boolean[] = [];
  for (const curve of panel.loop) {
    const seam = joined.some((other) => isSame(other, curve));
    const count = curve.type === 'arc' ? Math.max(1, Math.ceil((sweepOf(curve) * 180) / Math.PI / 8)) : 1;
    for (let index = 0; index < count; index += 1) {
      points.push(index === 0 ? curve.from : pointAt(curve, index / count));
      edges.push(!seam);
    }
  }
  return { name: panel.name, of: panel, points, edges };
}
/** A face with the holes that lie in it, each joined to the first corner by a seam that is no edge, so that it stays one loop. */
function pierced(facet: Facet, holes: readonly Loop[]): Facet {
  const [points, edges] = [[...facet.points], [...facet.edges]];
  for (const hole of holes) {
    const rim = hole.flatMap((curve) =>
      curve.type === 'arc' ? Array.from({ length: 8 }, (_, index) => pointAt(curve, index / 8)) : [curve.from],
    );
    if (!encloses(facet.points, middleOf(rim))) continue;
    points.push(facet.points[0] as Point, ...rim, rim[0] as Point);
    edges.push(false, ...rim.map(() => true), false);
  }
  return { ...facet, points, edges };
}
const near = (a: Point, b: Point): boolean => Math.hypot(a.x - b.x, a.y - b.y) < 1e-3;
const isSame = (a: Curve, b: Curve): boolean =>
  (near(a.from, b.from) && near(a.to, b.to)) || (near(a.from, b.to) && near(a.to, b.from));

/** Degrees over which a panel is rolled. */
const wholeTurn = (panel: Panel): number => {
  const box = boxOf(panel.loop.map((curve) => curve.from));
  return (((box.right - box.left) / (panel.roll?.radius ?? 1)) * 180) / Math.PI;
};
const stripsOf = (panel: Panel): number => Math.min(24, Math.max(6, Math.ceil(wholeTurn(panel) / 6)));
const boxOf = (points: readonly Point[]) => {
  const [xs, ys] = [points.map((point) => point.x), points.map((point) => point.y)];
  return { left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) };
};
/** The mean of the corners: inside any face that bulges nowhere inwards, which the middle of its upright rectangle is not. */
const middleOf = (points: readonly Point[]): Point => ({
  x: points.reduce((sum, { x }) => sum + x, 0) / points.length,
  y: points.reduce((sum, { y }) => sum + y, 0) / points.length,
});
