import { coincident, snap } from '../measure';
import { areaOf, distance, lengthOf, line, pointAt, samePoint } from '../net';
import type { Curve, Loop, Net, Panel, Point, Sentence } from '../types';
import { bowOf, counted, listed, mirrored, placeOf, pointOf, type Part, type Said } from './line-words';

/**
 * What falls away from the blank: every stretch of the outline that leaves the blank's edge, said as the cut from edge to
 * edge whose smaller side is waste. Corners and notches that are square and clipped corners have words of their own.
 */
export function cuttingOut(said: Said): Sentence[] {
  const runs = runsOf(said.net);
  if (!runs) {
    const [first] = said.net.outline as [Curve];
    return [
      [
        'Mark the outline from ',
        ...pointOf(said, first.from),
        ': ',
        ...moves(said, said.net.outline),
        '. Cut round it.',
      ],
    ];
  }
  const { corners, notches, others } = sorted(said, runs);
  return [
    ...[...corners.values()].map(
      ({ size, at }): Sentence => [
        `Cut a piece `,
        said.figure(size.x, true),
        ' × ',
        said.figure(size.y),
        ` out of the ${at.length === 4 ? 'four corners' : `${listed(at.map((name) => [name])).join('')} corner${at.length === 1 ? '' : 's'}`}.`,
      ],
    ),
    ...[...notches.values()].map(
      ({ edge, deep, spans }): Sentence => [
        `Out of the ${edge} edge cut a notch `,
        said.figure(deep),
        ' deep from ',
        ...listed(
          spans.sort(([a], [b]) => a - b).map(([from, to]) => [said.figure(from, true), ' to ', said.figure(to, true)]),
          ' and from ',
        ),
        '.',
      ],
    ),
    ...mirrored(said.net, others).map(
      ({ item: { chain }, image }): Sentence => [
        'From ',
        ...placeOf(said, (chain[0] as Curve).from),
        ' cut ',
        ...moves(said, chain),
        `${image ? `; the same ${image}` : ''}.`,
      ],
    ),
  ];
}

/** From place to place: only what changes is said, and teeth by their number. */
function moves(said: Said, chain: readonly Curve[]): Part[] {
  const { figure, net } = said;
  const parts: Part[] = [];
  for (let index = 0; index < chain.length; index += 1) {
    const from = chain[index]?.from as Point;
    let teeth = 0;
    let tooth: Panel | undefined;
    for (let next = toothAt(net, chain, index); next; next = toothAt(net, chain, index)) {
      tooth = next;
      teeth += 1;
      index += 3;
    }
    parts.push(parts.length === 0 ? '' : '; ');
    if (tooth) {
      index -= 1;
      parts.push(`round ${counted(teeth, 'tooth', 'teeth')}, each `, ...toothSizes(said, tooth), ', to ');
      parts.push(...placeOf(said, (chain[index] as Curve).to));
      continue;
    }
    const curve = chain[index] as Curve;
    const { to } = curve;
    const edge = edgesAt(net, to).length > 0;
    if (curve.type === 'arc') parts.push('to ', ...placeOf(said, to), ', ', ...bowOf(said, curve));
    else if (!edge && coincident(from.y, to.y)) parts.push('across to ', figure(to.x, true));
    else if (!edge && coincident(from.x, to.x)) parts.push(to.y > from.y ? 'down to ' : 'up to ', figure(to.y, true));
    else parts.push('to ', ...placeOf(said, to));
  }
  return parts;
}
/** The tooth whose three free sides come next. */
const toothAt = ({ panels }: Net, chain: readonly Curve[], index: number): Panel | undefined => {
  const sides = chain.slice(index, index + 3);
  return panels.find(
    ({ tooth, loop }) =>
      tooth &&
      sides.length === 3 &&
      loop.length === 4 &&
      sides.every(({ from, to }) => loop.some((side) => samePoint(side.from, from) && samePoint(side.to, to))),
  );
};
/** `1/4 in wide at the score, 13/64 in at the tip and 1/2 in deep`; from an arc to the middle of the tip. */
function toothSizes({ figure }: Said, { loop }: Panel): Part[] {
  const [root, , tip] = loop as [Curve, Curve, Curve];
  const deep = distance(pointAt(root, 0.5), pointAt(tip, 0.5));
  return [
    figure(distance(root.from, root.to)),
    ' wide at the score, ',
    figure(lengthOf(tip)),
    ' at the tip and ',
    figure(deep),
    ' deep',
  ];
}

type Edge = 'top' | 'right' | 'bottom' | 'left';
const edgesAt = ({ across, along }: Net, { x, y }: Point): Edge[] => [
  ...(coincident(y, 0) ? (['top'] as const) : []),
  ...(coincident(x, across) ? (['right'] as const) : []),
  ...(coincident(y, along) ? (['bottom'] as const) : []),
  ...(coincident(x, 0) ? (['left'] as const) : []),
];

/** The stretches of the outline off the blank's edge, clockwise; null when the card is not what is left of the blank by such cuts. */
function runsOf(net: Net): Loop[] | null {
  const { outline } = net;
  const start = outline.findIndex(({ from }) => edgesAt(net, from).length > 0);
  if (start < 0) return null;
  const runs: Curve[][] = [];
  let open = false;
  for (const curve of [...outline.slice(start), ...outline.slice(0, start)]) {
    const ends = edgesAt(net, curve.to);
    const onEdge = curve.type === 'line' && edgesAt(net, curve.from).some((edge) => ends.includes(edge));
    if (!onEdge && open) runs.at(-1)?.push(curve);
    if (!onEdge && !open) runs.push([curve]);
    open = !onEdge && ends.length === 0;
  }
  const half = (net.across * net.along) / 2;
  runs.sort(([a], [b]) => nearTopLeft(a) - nearTopLeft(b));
  return runs.every((run) => wasteOf(net, run) < half * 0.98) ? runs : null;
}
const nearTopLeft = (curve: Curve | undefined): number => (curve ? curve.from.x + curve.from.y : 0);
/** Area between a cut and the blank's edge that is not card: the edge is walked back, clockwise, to where the cut began. */
function wasteOf(net: Net, run: Loop): number {
  const [from, to] = [(run[0] as Curve).from, (run.at(-1) as Curve).to];
  const { across, along } = net;
  const corners = [
    { x: across, y: 0 },
    { x: across, y: along },
    { x: 0, y: along },
    { x: 0, y: 0 },
  ];
  const way = ({ x, y }: Point) =>
    coincident(y, 0) && x < across
      ? x
      : coincident(x, across) && y < along
        ? across + y
        : coincident(y, along) && x > 0
          ? across + along + across - x
          : 2 * across + along + along - y;
  const round = 2 * (across + along);
  const turn = (point: Point) => (way(point) - way(from) + round) % round;
  const passed = corners
    .filter((corner) => turn(corner) > 1e-6 && turn(corner) < turn(to) - 1e-6)
    .sort((a, b) => turn(b) - turn(a));
  const back = [to, ...passed, from];
  return Math.abs(areaOf([...run, ...back.slice(1).map((point, index) => line(back[index] as Point, point))]));
}

interface Sorted {
  readonly corners: Map<string, { size: Point; at: string[] }>;
  readonly notches: Map<string, { edge: Edge; deep: number; spans: [number, number][] }>;
  readonly others: { chain: Loop }[];
}
/** Square corners by their size, square notches by edge and depth, the rest. */
function sorted({ net }: Said, runs: readonly Loop[]): Sorted {
  const result: Sorted = { corners: new Map(), notches: new Map(), others: [] };
  for (const chain of runs) {
    const [from, to] = [(chain[0] as Curve).from, (chain.at(-1) as Curve).to];
    const upright = chain.every(
      (curve) =>
        curve.type === 'line' && (coincident(curve.from.x, curve.to.x) || coincident(curve.from.y, curve.to.y)),
    );
    const [starts, ends] = [edgesAt(net, from), edgesAt(net, to)];
    const edge = starts.find((one) => ends.includes(one));
    if (upright && chain.length === 2 && starts.length === 1 && ends.length === 1 && !edge) {
      const size = { x: snap(Math.abs(from.x - to.x)), y: snap(Math.abs(from.y - to.y)) };
      const found = result.corners.get(`${size.x} ${size.y}`) ?? { size, at: [] };
      const name = [...starts, ...ends].sort((a) => (a === 'top' || a === 'bottom' ? -1 : 1)).join(' ');
      result.corners.set(`${size.x} ${size.y}`, { size, at: [...found.at, name] });
    } else if (upright && chain.length === 3 && edge && !samePoint(from, to)) {
      const level = edge === 'top' || edge === 'bottom';
      const [, { from: corner }] = chain as unknown as [Curve, Curve];
      const deep = snap(Math.abs(level ? corner.y - from.y : corner.x - from.x));
      const span = [level ? from.x : from.y, level ? to.x : to.y].sort((a, b) => a - b) as [number, number];
      const key = `${edge} ${deep}`;
      result.notches.set(key, { edge, deep, spans: [...(result.notches.get(key)?.spans ?? []), span] });
    } else result.others.push({ chain });
  }
  return result;
}
