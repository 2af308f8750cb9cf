import { atLeast, coincident, GRIDS, moreThan, snap } from '../measure';
import { scoresOf } from '../model/pieces';
import { boundsOf, line, perimeterOf, type Joint, type LoosePanel } from '../net';
import { areaOfNet, finishNet, keepMaking, moveNet, type LoosePiece } from '../piece';
import type { Fold, GridId, Line, Loop, Net, PieceFigure, Point } from '../types';

/** A fold at which a piece can be parted: where it runs, and how far from the left (`along`) or the top edge (`across`). */
export interface Parting {
  readonly runs: 'across' | 'along';
  readonly at: number;
}
/** A piece made of two, glued together at a fold. The first carries the extra tab. */
export interface Joined {
  readonly parting: Parting;
  /** How far the tab stands out. */
  readonly tab: number;
  readonly parts: readonly [PieceFigure, PieceFigure];
}

/** As wide as a glue tab usually is; common practice, no source. */
const TAB = { in: 12.7, mm: 12, cm: 12 } as const;

/** Every way to part a piece at a straight fold that runs right through it, the most even halves first. */
export function partings({ net }: Pick<PieceFigure, 'net'>): readonly Parting[] {
  const { across, along } = scoresOf(net);
  const uneven = (at: number, size: number) => Math.abs(at - size / 2) / size;
  return [
    ...across.map((at) => ({ runs: 'along' as const, at, uneven: uneven(at, net.across) })),
    ...along.map((at) => ({ runs: 'across' as const, at, uneven: uneven(at, net.along) })),
  ]
    .filter(({ runs, at }) => sidesOf(net, { runs, at }) !== null)
    .sort((a, b) => a.uneven - b.uneven)
    .map(({ runs, at }) => ({ runs, at }));
}

/**
 * Parts a piece at a fold. The first half keeps the fold, as that of a new glue tab; glued behind the second half, the two
 * fold to what the one piece folds to. Null where the line meets anything but folds between panels, or where no tab has room.
 */
export function joinAt(piece: PieceFigure, parting: Parting, grid: GridId): Joined | null {
  const { net } = piece;
  const sides = sidesOf(net, parting);
  if (!sides) return null;
  const { step, unit } = GRIDS[grid];
  const upright = parting.runs === 'along';
  const far = upright ? net.across : net.along;
  // No tab reaches past the panel that it is glued to.
  const room = Math.min(...sides.folds.map(({ beyond }) => depthBeyond(net, beyond, parting)));
  const tab = Math.min(TAB[unit], Math.floor((room + step * 1e-6) / step) * step);
  if (!moreThan(tab, 0)) return null;

  const tabs = sides.folds.map(({ fold }, index): LoosePanel & { readonly fold: Fold; readonly host: string } => ({
    name: `joining tab${sides.folds.length > 1 ? ` ${index + 1}` : ''}`,
    role: 'tab',
    loop: tabLoop(fold.curve as Line, tab, upright),
    fold,
    host: fold.panels.find((name) => sides.before.includes(name)) as string,
  }));
  const jointOf = (a: string, b: string): Joint => {
    const own = tabs.find(({ name }) => name === a || name === b);
    if (!own) return jointBetween(net, a, b);
    if (own.host !== a && own.host !== b) return { is: 'slit' };
    const { kind, angle, shown } = own.fold;
    return { is: 'fold', kind, angle, ...(shown === undefined ? {} : { shown }) };
  };
  const panelsOf = (names: readonly string[]) => net.panels.filter(({ name }) => names.includes(name));
  const size = (length: number) =>
    upright ? { across: length, along: net.along } : { across: net.across, along: length };
  const start = upright ? { x: parting.at, y: 0 } : { x: 0, y: parting.at };
  const first = partOf(net, [...panelsOf(sides.before), ...tabs], jointOf, {
    from: { x: 0, y: 0 },
    ...size(snap(parting.at + tab)),
  });
  const second = partOf(net, panelsOf(sides.after), jointOf, { from: start, ...size(snap(far - parting.at)) });
  if (!first || !second) return null;
  return {
    parting,
    tab,
    parts: [figureOf(piece, first, 'first part', grid), figureOf(piece, second, 'second part', grid)],
  };
}

/** The most even way to part a piece so that both halves fit; null when there is none. */
export function joinToFit(
  piece: PieceFigure,
  grid: GridId,
  fits: (part: Pick<PieceFigure, 'across' | 'along'> & Partial<PieceFigure>) => boolean,
): Joined | null {
  const { across, along } = piece;
  for (const parting of partings(piece)) {
    // The halves without the tab; most partings fail by these already, and are not worth building.
    const { runs, at } = parting;
    const half = (size: number) => (runs === 'along' ? { across: size, along } : { across, along: size });
    if (!fits(half(at)) || !fits(half(snap((runs === 'along' ? across : along) - at)))) continue;
    const joined = joinAt(piece, parting, grid);
    if (joined?.parts.every(fits)) return joined;
  }
  return null;
}

interface Sides {
  /** Panels before the line (left of it, above it) and after it. */
  readonly before: readonly string[];
  readonly after: readonly string[];
  /** The folds on the line, each with the panel beyond. */
  readonly folds: readonly { readonly fold: Fold; readonly beyond: string }[];
}
/** What lies on either side of a line through a piece; null when it meets more than folds between panels and free edges. */
function sidesOf(net: Net, { runs, at }: Parting): Sides | null {
  const extent = (loop: Loop): readonly [number, number] => {
    const box = boundsOf(loop);
    return runs === 'along' ? [box.left, box.right] : [box.top, box.bottom];
  };
  const isBefore = (loop: Loop) => atLeastNear(at, extent(loop)[1]);
  const isAfter = (loop: Loop) => atLeastNear(extent(loop)[0], at);
  const loops = [...net.panels.map(({ loop }) => loop), ...net.holes, ...net.creases.map(({ curve }) => [curve])];
  if (!loops.every((loop) => isBefore(loop) || isAfter(loop))) return null;
  const before = net.panels.filter(({ loop }) => isBefore(loop)).map(({ name }) => name);
  const after = net.panels.filter(({ loop }) => isAfter(loop)).map(({ name }) => name);
  const crosses = ({ panels: [a, b] }: Pick<Fold, 'panels'>) => before.includes(a) !== before.includes(b);
  if (net.joins.some(crosses)) return null;
  const roleOf = (name: string) => net.panels.find((panel) => panel.name === name)?.role;
  const folds = net.folds.filter(crosses).map((fold) => ({
    fold,
    beyond: fold.panels.find((name) => after.includes(name)) as string,
  }));
  const sound = ({ fold }: (typeof folds)[number]) =>
    fold.curve.type === 'line' && fold.panels.every((name) => roleOf(name) === 'panel');
  return folds.length > 0 && folds.every(sound) ? { before, after, folds } : null;
}
const atLeastNear = (a: number, b: number): boolean => atLeast(a, b) || coincident(a, b);

/** How far a panel reaches beyond the line. */
function depthBeyond(net: Net, name: string, { runs, at }: Parting): number {
  const panel = net.panels.find((one) => one.name === name);
  if (!panel) return 0;
  const { right, bottom } = boundsOf(panel.loop);
  return (runs === 'along' ? right : bottom) - at;
}

/** From a fold outwards, its ends cut back so that it clears its neighbours. */
function tabLoop({ from, to }: Line, depth: number, upright: boolean): Loop {
  const place = (at: number, out: number): Point =>
    upright ? { x: snap(from.x + out), y: at } : { x: at, y: snap(from.y + out) };
  const [low, high] = (upright ? [from.y, to.y] : [from.x, to.x]).sort((a, b) => a - b) as [number, number];
  const taper = Math.min(depth, (high - low) / 4);
  const round = [place(low, 0), place(snap(low + taper), depth), place(snap(high - taper), depth), place(high, 0)];
  // Clockwise on the screen, whichever way the fold runs.
  const points = upright ? round : [...round].reverse();
  return points.map((point, index) => line(point, points[(index + 1) % points.length] as Point));
}

/** How two panels of the whole piece meet. */
function jointBetween(net: Net, a: string, b: string): Joint {
  const both = (names: readonly [string, string]) => names.includes(a) && names.includes(b);
  const fold = net.folds.find(({ panels }) => both(panels));
  if (fold) {
    const { kind, angle, shown } = fold;
    return { is: 'fold', kind, angle, ...(shown === undefined ? {} : { shown }) };
  }
  return net.joins.some(({ panels }) => both(panels)) ? { is: 'nothing' } : { is: 'slit' };
}

function partOf(
  net: Net,
  panels: LoosePiece['panels'],
  jointOf: LoosePiece['jointOf'],
  blank: { readonly from: Point; readonly across: number; readonly along: number },
): Net | null {
  const { from, across, along } = blank;
  const within = ({ left, top, right, bottom }: ReturnType<typeof boundsOf>) =>
    atLeastNear(left, from.x) &&
    atLeastNear(top, from.y) &&
    atLeastNear(from.x + across, right) &&
    atLeastNear(from.y + along, bottom);
  const stops = (all: readonly number[], start: number, size: number) => [
    0,
    ...all.map((at) => snap(at - start)).filter((at) => moreThan(at, 0) && moreThan(size, at)),
    size,
  ];
  const built = finishNet({
    panels,
    jointOf,
    holes: net.holes.filter((hole) => panels.some(({ loop }) => holds(boundsOf(loop), boundsOf(hole)))),
    creases: net.creases.filter(({ curve }) => within(boundsOf([curve]))),
    blank: {
      across,
      along,
      away: net.away
        .filter(({ x, y, across: wide, along: tall }) => within({ left: x, top: y, right: x + wide, bottom: y + tall }))
        .map((box) => ({ ...box, x: snap(box.x - from.x), y: snap(box.y - from.y) })),
      columns: stops(net.columns, from.x, across),
      rows: stops(net.rows, from.y, along),
    },
    step: 0,
  });
  return built.ok ? moveNet(built.net, { x: -from.x, y: -from.y }) : null;
}
const holds = (outer: ReturnType<typeof boundsOf>, inner: ReturnType<typeof boundsOf>): boolean =>
  atLeastNear(inner.left, outer.left) &&
  atLeastNear(inner.top, outer.top) &&
  atLeastNear(outer.right, inner.right) &&
  atLeastNear(outer.bottom, inner.bottom);

function figureOf(piece: PieceFigure, net: Net, which: string, grid: GridId): PieceFigure {
  const name = `${piece.name}, ${which}`;
  const scores = scoresOf(net);
  const { stock, thickness } = piece;
  const def = { builder: 'outline', name, stock } as const;
  keepMaking(net, { grid: null, def, scores, step: GRIDS[grid].step, thickness });
  return {
    name,
    count: piece.count,
    stock,
    net,
    across: net.across,
    along: net.along,
    scores,
    thickness,
    area: areaOfNet(net),
    perimeter: perimeterOf(net.outline) + net.holes.reduce((sum, hole) => sum + perimeterOf(hole), 0),
  };
}
