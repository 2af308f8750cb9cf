import { atLeast, coincident, inWords, moreThan, same, snap } from '../measure';
import { boundsOf, flatten, pointAt, reversed, samePoint } from '../net';
import type { Arc, Curve, Loop, Net, Point, Sentence, SentenceFigure } from '../types';

/** What every sentence needs: the flat piece, and figures in it. */
export interface Said {
  readonly net: Net;
  /** Splits a position into what a ruler shows and card thicknesses. */
  readonly figure: (mm: number, bare?: boolean) => SentenceFigure;
}
export type Part = Sentence[number];
type Axis = 'across' | 'along';
const AXES: readonly Axis[] = ['across', 'along'];
/** Coordinate of a point along an axis, and its name when places are told. */
const READ = { across: ({ x }: Point) => x, along: ({ y }: Point) => y } as const;
const PLACED = { across: ' across', along: ' down' } as const;
const OTHER = { across: 'along', along: 'across' } as const;

/** `a, b and c` out of parts. */
export function listed(items: readonly (readonly Part[])[], last = ' and '): Part[] {
  return items.flatMap((item, index) => [...(index === 0 ? [] : [index === items.length - 1 ? last : ', ']), ...item]);
}
/** `1/2, 2 and 3 1/2`, the last one with its unit when asked. */
export const figures = ({ figure }: Said, values: readonly number[], unit = false): Part[] =>
  listed(values.map((value, index) => [figure(value, !unit || index < values.length - 1)]));
/** One of a kind by itself, more by their number: `the notch`, `the three notches`. */
export const counted = (count: number, one: string, many = `${one}s`): string =>
  count === 1 ? one : `${inWords(count)} ${many}`;

/** A place by the edge or corner of the blank that it lies on, else by how far it is from the left and from the top edge. */
export function placeOf({ net, figure }: Said, { x, y }: Point): Part[] {
  const side = coincident(x, 0) ? 'left' : coincident(x, net.across) ? 'right' : '';
  const end = coincident(y, 0) ? 'top' : coincident(y, net.along) ? 'bottom' : '';
  if (side && end) return [`the ${end} ${side} corner`];
  if (side) return [`the ${side} edge at `, figure(y, true)];
  if (end) return [`the ${end} edge at `, figure(x, true)];
  return pointOf({ net, figure }, { x, y });
}
export const pointOf = ({ figure }: Said, { x, y }: Point): Part[] => [
  figure(x, true),
  ' across, ',
  figure(y, true),
  ' down',
];

/** An arc by its radius and the way its middle stands out from the straight line between its ends. */
export function bowOf({ figure }: Pick<Said, 'figure'>, arc: Arc): Part[] {
  const middle = pointAt(arc, 0.5);
  const [x, y] = [middle.x - (arc.from.x + arc.to.x) / 2, middle.y - (arc.from.y + arc.to.y) / 2];
  const way = Math.abs(y) >= Math.abs(x) ? (y < 0 ? 'up' : 'down') : x < 0 ? 'to the left' : 'to the right';
  return ['an arc of ', figure(arc.radius), ` radius, bowed ${way}`];
}

// ── What is the same mirrored ────────────────────────────────────────────────────────────────────────────────────────

type Chain = readonly Curve[];
/** −1 where a direction is mirrored. */
type Turn = readonly [1 | -1, 1 | -1];
const IMAGES = {
  'mirrored left to right': [[-1, 1]],
  'mirrored top to bottom': [[1, -1]],
  'turned half round': [[-1, -1]],
  'mirrored left to right, top to bottom and both ways': [
    [-1, 1],
    [1, -1],
    [-1, -1],
  ],
} as const;
type Image = keyof typeof IMAGES;

/** Chains of curves once each, with the images of it in the blank's middle lines that are there too. */
export function mirrored<T extends { readonly chain: Chain }>(
  { across, along }: Net,
  items: readonly T[],
): { readonly item: T; readonly image: Image | null }[] {
  const left = [...items];
  const found: { item: T; image: Image | null }[] = [];
  for (let item = left.shift(); item; item = left.shift()) {
    const { chain } = item;
    const indexOf = (turn: Turn) => {
      const turned = chain.map((curve) => moved(curve, turn, across, along));
      return left.findIndex((other) => sameChain(turned, other.chain));
    };
    const image = (Object.keys(IMAGES) as Image[])
      .reverse()
      .find(
        (one) =>
          new Set(IMAGES[one].map(indexOf)).size === IMAGES[one].length &&
          IMAGES[one].every((turn) => indexOf(turn) >= 0),
      );
    for (const index of (image ? IMAGES[image].map(indexOf) : []).sort((a, b) => b - a)) left.splice(index, 1);
    found.push({ item, image: image ?? null });
  }
  return found;
}
function moved(curve: Curve, [x, y]: Turn, across: number, along: number): Curve {
  const place = (at: Point): Point => ({ x: x < 0 ? across - at.x : at.x, y: y < 0 ? along - at.y : at.y });
  const ends = { from: place(curve.from), to: place(curve.to) };
  if (curve.type === 'line') return { ...curve, ...ends };
  return { ...curve, ...ends, centre: place(curve.centre), clockwise: x * y > 0 === curve.clockwise };
}
/** The same curves, whichever end they are walked from. */
function sameChain(a: Chain, b: Chain): boolean {
  const matches = (one: Chain) =>
    one.every((curve, index) => {
      const other = b[index] as Curve;
      return (
        samePoint(curve.from, other.from) &&
        samePoint(curve.to, other.to) &&
        samePoint(pointAt(curve, 0.5), pointAt(other, 0.5))
      );
    });
  return a.length === b.length && (matches(a) || matches([...a].reverse().map(reversed)));
}

// ── Lines that are scored or slit ────────────────────────────────────────────────────────────────────────────────────

type Kind = 'valley' | 'mountain' | 'slit';
interface Stroke {
  readonly kind: Kind;
  readonly curve: Curve;
}
interface Ruled {
  readonly axis: Axis;
  readonly at: number;
  /** From where to where along the other axis. */
  readonly spans: readonly { readonly kind: Kind; readonly from: number; readonly to: number }[];
  /** Scoring it from edge to edge of the blank does no harm. */
  readonly full: boolean;
}

/** Straight lines square to the edges, each once with all its stretches. */
function ruledLines(net: Net, strokes: readonly Stroke[]): Ruled[] {
  return AXES.flatMap((axis) => {
    const [read, run] = [READ[axis], READ[OTHER[axis]]];
    const own = strokes.filter(({ curve }) => isRuled(curve, axis));
    const places = [...new Set(own.map(({ curve }) => snap(read(curve.from))))].sort((a, b) => a - b);
    return places
      .filter((at, index) => index === 0 || !same(at, places[index - 1] as number))
      .map((at): Ruled => {
        const spans: { kind: Kind; from: number; to: number }[] = [];
        const stretches = own
          .filter(({ curve }) => same(snap(read(curve.from)), at))
          .map(({ kind, curve }) => ({
            kind,
            ends: [run(curve.from), run(curve.to)].sort((a, b) => a - b) as [number, number],
          }))
          .sort((a, b) => a.ends[0] - b.ends[0]);
        for (const {
          kind,
          ends: [from, to],
        } of stretches) {
          const last = spans.at(-1);
          if (last && last.kind === kind && atLeast(last.to + 1e-5, from)) last.to = Math.max(last.to, to);
          else spans.push({ kind, from, to });
        }
        const [first] = spans;
        const full =
          first?.kind !== 'slit' && spans.every(({ kind }) => kind === first?.kind) && harmless(net, axis, at, spans);
        return { axis, at, spans, full };
      });
  });
}
const isRuled = (curve: Curve, axis: Axis): boolean =>
  curve.type === 'line' && coincident(READ[axis](curve.from), READ[axis](curve.to));

/** Whether a line from edge to edge of the blank meets, outside its own stretches, only waste, cuts and slits. */
function harmless(net: Net, axis: Axis, at: number, spans: Ruled['spans']): boolean {
  const [read, run] = [READ[axis], READ[OTHER[axis]]];
  const size = axis === 'across' ? net.along : net.across;
  const loops = [net.outline, ...net.holes];
  const meets = loops.flatMap((loop) =>
    loop.flatMap((curve) => {
      const [before, after] = [read(curve.from) - at, read(curve.to) - at];
      if (curve.type === 'line' && before * after > 0 && Math.min(Math.abs(before), Math.abs(after)) > 1) return [];
      const points = [curve.from, ...flatten(curve)];
      return points.slice(1).flatMap((to, index) => crossings(points[index] as Point, to, at, read, run));
    }),
  );
  const slits = net.slits.filter((slit) => isRuled(slit, axis) && coincident(read(slit.from), at));
  const stops = [
    0,
    size,
    ...meets,
    ...slits.flatMap(({ from, to }) => [run(from), run(to)]),
    ...spans.flatMap(({ from, to }) => [from, to]),
  ]
    .filter((stop) => stop >= 0 && stop <= size)
    .sort((a, b) => a - b);
  const covered = (list: readonly { readonly from: number; readonly to: number }[], middle: number) =>
    list.some(({ from, to }) => from < middle && middle < to);
  return stops.slice(1).every((stop, index) => {
    const before = stops[index] as number;
    if (!moreThan(stop, before + 1e-4)) return true;
    const middle = (before + stop) / 2;
    if (covered(spans, middle)) return true;
    if (
      slits.some(({ from, to }) =>
        covered([{ from: Math.min(run(from), run(to)), to: Math.max(run(from), run(to)) }], middle),
      )
    )
      return true;
    // On card only when there is card on both sides: a line along a cut is the cut.
    const beside = (by: number): Point => (axis === 'across' ? { x: at + by, y: middle } : { x: middle, y: at + by });
    return ![1e-3, -1e-3].every((by) => isOnCard(loops, beside(by)));
  });
}
function crossings(from: Point, to: Point, at: number, read: (point: Point) => number, run: (point: Point) => number) {
  const [a, b] = [read(from) - at, read(to) - at];
  if (a * b > 1e-12) return [];
  return coincident(a, b) ? [run(from), run(to)] : [run(from) + ((run(to) - run(from)) * a) / (a - b)];
}
/** Inside an odd number of loops: in the outline and in no hole. */
function isOnCard(loops: readonly Loop[], { x, y }: Point): boolean {
  let inside = false;
  for (const loop of loops)
    for (const curve of loop) {
      let from = curve.from;
      for (const to of flatten(curve)) {
        if (from.y > y !== to.y > y && x < from.x + ((y - from.y) * (to.x - from.x)) / (to.y - from.y))
          inside = !inside;
        from = to;
      }
    }
  return inside;
}

/** The lines of a piece that are folded; `full` ones run from edge to edge. */
export function scoresIn(net: Net) {
  const strokes = [...net.folds.filter(({ angle }) => angle !== 0), ...net.creases];
  const ruled = ruledLines(net, strokes);
  const positions = (kind: Kind) => (axis: Axis) =>
    ruled.filter((one) => one.axis === axis && one.full && one.spans[0]?.kind === kind).map(({ at }) => at);
  return {
    valley: AXES.map(positions('valley')) as [number[], number[]],
    mountain: AXES.map(positions('mountain')) as [number[], number[]],
    parts: ruled.filter(({ full }) => !full),
    free: strokes.filter(({ curve }) => !AXES.some((axis) => isRuled(curve, axis))),
  };
}

/** Scores from edge to edge, read along each side as on a scoring board; then those that stop short; then the slanting ones. */
export function scoring(said: Said): Sentence[] {
  const { valley, mountain, parts, free } = scoresIn(said.net);
  return [
    ...edgeToEdge(said, valley, ''),
    ...edgeToEdge(said, mountain, 'mountain folds '),
    ...stretches(said, parts),
    ...strokesFree(said, free),
  ];
}

/** Positions that lie alike from both ends are said once. */
function positions(said: Said, at: readonly number[], size: number): Part[] {
  const half = at.slice(0, Math.ceil(at.length / 2));
  const alike = at.length > 1 && half.every((one, index) => same(one + (at[at.length - 1 - index] as number), size));
  if (!alike) return ['at ', ...figures(said, at)];
  const ends = half.filter((one) => !same(2 * one, size));
  return [
    'at ',
    ...figures(said, ends, true),
    ` from each end${ends.length < half.length ? ' and in the middle' : ''}`,
  ];
}
function edgeToEdge(
  said: Said,
  [wide, tall]: readonly [readonly number[], readonly number[]],
  what: string,
): Sentence[] {
  const { figure, net } = said;
  const square = same(net.across, net.along);
  const at = [positions(said, wide, net.across), positions(said, tall, net.along)] as const;
  const text = at.map((parts) => JSON.stringify(parts));
  if (wide.length > 1 && text[0] === text[1] && wide.length === tall.length && text[0]?.includes('each end'))
    return [[`Score ${what}`, ...at[0].slice(0, -1), ' from each of the four sides.']];
  if (square && wide.length > 0 && text[0] === text[1])
    return [[`Along one side score ${what}`, ...at[0], '; give it a quarter turn and score the same again.']];
  return [
    ...(wide.length === 0
      ? []
      : [
          [
            'Along the ',
            figure(net.across),
            ` side${square ? ' from left to right' : ''} score ${what}`,
            ...at[0],
            '.',
          ],
        ]),
    ...(tall.length === 0
      ? []
      : [
          [
            wide.length === 0 ? 'Along the ' : square ? 'Give it a quarter turn; along the other ' : 'Turn; along the ',
            figure(net.along),
            ` side${square && wide.length === 0 ? ' from top to bottom' : ''} score ${what}`,
            ...at[1],
            '.',
          ],
        ]),
  ];
}

/** `At 5 1/2 and 8 across score from 1/2 to 2 down.`; lines with the same stretches together. */
function stretches(said: Said, lines: readonly Ruled[]): Sentence[] {
  const { net, figure } = said;
  const groups = new Map<string, { line: Ruled; at: number[] }>();
  for (const line of lines) {
    const key = line.axis + line.spans.map(({ kind, from, to }) => [kind, snap(from), snap(to)].join()).join(';');
    const group = groups.get(key);
    if (group) group.at.push(line.at);
    else groups.set(key, { line, at: [line.at] });
  }
  return [...groups.values()].map(({ line: { axis, spans }, at }): Sentence => {
    const other = OTHER[axis];
    const [size, first, last] = other === 'across' ? [net.across, 'left', 'right'] : [net.along, 'top', 'bottom'];
    const end = (value: number, unit: boolean): Part[] =>
      coincident(value, 0)
        ? [`the ${first} edge`]
        : coincident(value, size)
          ? [`the ${last} edge`]
          : [figure(value, true), unit ? PLACED[other] : ''];
    const mixed = spans.some(({ kind }) => kind !== spans[0]?.kind);
    const verb = spans[0]?.kind === 'slit' ? 'slit ' : 'score ';
    return [
      'At ',
      ...figures(said, at),
      `${PLACED[axis]} ${verb}`,
      ...listed(
        spans.map(({ kind, from, to }, index): Part[] => {
          const before = spans[index - 1];
          const what = kind !== 'slit' && kind !== (before?.kind ?? (mixed ? '' : 'valley')) ? `a ${kind} fold ` : '';
          const start: Part[] = before && coincident(before.to, from) ? ['on'] : ['from ', ...end(from, false)];
          return [what, ...start, ' to ', ...end(to, index === spans.length - 1)];
        }),
      ),
      '.',
    ];
  });
}

/** Slanting and curved lines, from point to point; lines that run on from one another in one go, those of a kind together. */
function strokesFree(said: Said, strokes: readonly Stroke[]): Sentence[] {
  const chains: { kind: Kind; chain: Curve[] }[] = [];
  for (const { kind, curve } of strokes) {
    const joined = chains.some((one) => one.kind === kind && join(one.chain, curve));
    if (!joined) chains.push({ kind, chain: [curve] });
  }
  const plain =
    said.net.folds.every((fold) => fold.kind === 'valley') && strokes.every(({ kind }) => kind === 'valley');
  const groups = new Map<string, { what: string; says: Part[][]; image: Image | null }>();
  for (const { item, image } of mirrored(said.net, chains)) {
    const { kind, chain } = item;
    const [first] = chain as [Curve];
    const what = kind === 'slit' ? 'Slit' : plain ? 'Score' : `Score a ${kind} fold`;
    const group = groups.get(what + image) ?? { what, says: [], image };
    group.says.push([
      ' from ',
      ...pointOf(said, first.from),
      ...chain.flatMap((curve, index): Part[] => [index === 0 ? ', to ' : ', on to ', ...pointOf(said, curve.to)]),
      ...(first.type === 'arc' ? [', ', ...bowOf(said, first)] : []),
    ]);
    groups.set(what + image, group);
  }
  return [...groups.values()].map(
    ({ what, says, image }): Sentence => [
      says.length > 1 ? what.replace(/ a (.+)/, ' $1s') : what,
      ...says.flatMap((one, index) => (index === 0 ? one : [';', ...one])),
      `${image ? `; the same ${image}` : ''}.`,
    ],
  );
}
/** Adds a line to the end of a chain that it touches, or an arc to one of the same circle; false when it does neither. */
function join(chain: Curve[], curve: Curve): boolean {
  const [first, last] = [chain[0], chain.at(-1)] as [Curve, Curve];
  for (const next of [curve, reversed(curve)]) {
    const [after, before] = [samePoint(last.to, next.from), samePoint(next.to, first.from)];
    if (!after && !before) continue;
    if (next.type === 'arc') {
      if (last.type !== 'arc' || !samePoint(last.centre, next.centre) || last.clockwise !== next.clockwise) continue;
      chain[0] = after ? { ...last, to: next.to } : { ...next, to: first.to };
    } else if (last.type === 'arc') continue;
    else if (after) chain.push(next);
    else chain.unshift(next);
    return true;
  }
  return false;
}
export function slits(said: Said): Sentence[] {
  const strokes = said.net.slits.map((curve): Stroke => ({ kind: 'slit', curve }));
  return [
    ...stretches(said, ruledLines(said.net, strokes)),
    ...strokesFree(
      said,
      strokes.filter(({ curve }) => !AXES.some((axis) => isRuled(curve, axis))),
    ),
  ];
}

// ── Holes ────────────────────────────────────────────────────────────────────────────────────────────────────────────

/** What is wider both ways is a window. */
const LARGEST_SLOT = 12.7;
/** Round holes, those of one size together by their rows; then slots and windows by their top left corner. */
export function holes(said: Said): Sentence[] {
  const { net, figure } = said;
  const round = new Map<number, Map<string, { ys: number[]; xs: number[] }>>();
  const square: Sentence[] = [];
  for (const loop of net.holes) {
    const [arc] = loop;
    const { left, top, right, bottom } = boundsOf(loop);
    if (arc?.type === 'arc') {
      const rows = round.get(snap(arc.radius)) ?? new Map<string, { ys: number[]; xs: number[] }>();
      const x = `${snap(arc.centre.x)}`;
      rows.set(x, { xs: [snap(arc.centre.x)], ys: [...(rows.get(x)?.ys ?? []), snap(arc.centre.y)] });
      round.set(snap(arc.radius), rows);
    } else
      square.push([
        `Cut out a ${Math.min(right - left, bottom - top) > LARGEST_SLOT ? 'window' : 'slot'} `,
        figure(right - left, true),
        ' × ',
        figure(bottom - top),
        ', its top left corner ',
        ...pointOf(said, { x: left, y: top }),
        '.',
      ]);
  }
  const punched = [...round].flatMap(([radius, columns]) => {
    const rows = new Map<string, { ys: number[]; xs: number[] }>();
    for (const { xs, ys } of columns.values()) rows.set(`${ys}`, { ys, xs: [...(rows.get(`${ys}`)?.xs ?? []), ...xs] });
    return [...rows.values()].map(
      ({ xs, ys }): Sentence => [
        `Punch ${xs.length * ys.length === 1 ? 'a hole' : `${inWords(xs.length * ys.length)} holes`} of `,
        figure(2 * radius),
        ' diameter at ',
        ...figures(said, xs),
        ' across, ',
        ...figures(
          said,
          ys.sort((a, b) => a - b),
        ),
        ' down.',
      ],
    );
  });
  return [...punched, ...square];
}
