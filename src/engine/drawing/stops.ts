import { isZero, same } from '../measure';
import { boundsOf, sweepOf } from '../net';
import { seamsOf } from '../piece';
import type { Arc, Curve, Net, Panel, PieceFigure, Point } from '../types';

/** A position on a running dimension, millimetres from the edge, and how deep in the piece what it is of begins. */
export interface Position {
  readonly at: number;
  readonly reach: number;
}
export interface Positions {
  readonly across: readonly Position[];
  readonly along: readonly Position[];
}

/**
 * What is read along the top and down the left edge of a piece, the whole size last: scores, lines to glue to, slits and
 * straight ends of caps that lie square to the edge, sides of slots, middles of holes and of notches.
 */
export function positionsOf({ net, scores, fan }: PieceFigure): Positions {
  const seams = seamsOf(net);
  const across: Position[] = [...scores.across, net.across, ...(fan ? [] : seams.across)].map(onEdge);
  const along: Position[] = [...scores.along, net.along, ...(fan ? [] : seams.along)].map(onEdge);
  const add = ({ x, y }: Point) => {
    across.push({ at: x, reach: y });
    along.push({ at: y, reach: x });
  };
  const square = ({ from, to }: Curve) => {
    if (same(from.x, to.x)) across.push(onEdge(from.x));
    else if (same(from.y, to.y)) along.push(onEdge(from.y));
  };
  if (!fan) {
    const teeth = new Set(teethOf(net).map(({ name }) => name));
    const folds = net.folds.filter(({ panels, angle }) => !isZero(angle) && !panels.some((name) => teeth.has(name)));
    for (const { curve } of [...folds, ...net.creases]) square(curve);
  }
  [...net.joins.map(({ curve }) => curve), ...net.slits].forEach(square);
  for (const loop of net.holes) {
    const [arc] = loop;
    const { left, top, right, bottom } = boundsOf(loop);
    if (arc?.type === 'arc') {
      add(arc.centre);
    } else {
      add({ x: left, y: top });
      add({ x: right, y: bottom });
    }
  }
  for (const curve of net.outline) {
    if (!isNotch(curve)) continue;
    const { from, to, centre } = curve;
    if (same(from.y, to.y)) across.push({ at: centre.x, reach: from.y });
    else if (same(from.x, to.x)) along.push({ at: centre.y, reach: from.x });
  }
  return { across: sorted(across), along: sorted(along) };
}
/** A rim cut into teeth; a tab in one piece is none. */
export function teethOf({ panels }: Net): readonly Panel[] {
  const teeth = panels.filter(({ tooth }) => tooth);
  return teeth.length > 1 ? teeth : [];
}
const onEdge = (at: number): Position => ({ at, reach: 0 });

/** A bite of about half a circle out of an edge. */
const isNotch = (curve: Curve): curve is Arc =>
  curve.type === 'arc' && !curve.clockwise && Math.abs(sweepOf(curve) - Math.PI) < 0.2;

/** In order, each once, by what lies nearest to the edge. */
function sorted(positions: readonly Position[]): readonly Position[] {
  return [...positions]
    .sort((a, b) => a.at - b.at || a.reach - b.reach)
    .reduce<Position[]>((kept, one) => {
      const last = kept.at(-1);
      if (last && same(last.at, one.at)) kept[kept.length - 1] = { ...last, reach: Math.min(last.reach, one.reach) };
      else kept.push(one);
      return kept;
    }, []);
}
