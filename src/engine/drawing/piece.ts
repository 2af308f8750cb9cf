import { type ShowOptions } from '../measure';
import { flatten, lengthOf, pointsOf } from '../net';
import type { Curve, Drawing, Loop, PieceFigure, Point, Shape } from '../types';
import { acrossTop, downLeft, leftHeight, topFigures, type Stop } from './dimensions';
import { keyRows, lettering } from './lettering';
import { notesOf } from './notes';
import { closedPath, n, pathOf, segment, type Place } from './path';
import { altOf } from './piece-words';
import { roomIn, type Edges, type Room } from './room';
import { ruler } from './ruler';
import { showPosition } from './say';
import { positionsOf, type Position } from './stops';
import { textWidth } from './type';

export interface PieceDrawingOptions extends Pick<ShowOptions, 'units' | 'grid'> {
  /** Drawing units across, all in (CSS pixels on a page); more when a given scale leaves too little for the dimensions. */
  readonly width: number;
  /** The piece itself is drawn at most this tall. */
  readonly tallest?: number;
  /** Drawing units for a millimetre; usual: as large as it fits. */
  readonly scale?: number;
  readonly dims?: boolean;
  readonly labels?: boolean;
}
/** Where a flat piece lies in its drawing. */
interface Frame extends Edges {
  readonly scale: number;
  readonly place: Place;
}
type Lines = readonly (readonly Point[])[];

const TALLEST = 340;
/** Round a drawing without dimensions, and beside the words of one with them. */
const BORDER = 6;
/** From the piece to the dimension lines above it and on its left. */
const ABOVE = 14;
const ASIDE = 12;
/** From the piece's left edge to the figures there, and as much as the unit's name takes. */
const FIGURES = 28;
const LEAST_LEFT = 40;
/** Below a fan and on its right, for the dimensions of its side and flap. */
const FAN = 30;

/**
 * A flat piece: outline, folds by kind, glue areas, what is cut away, slits; running dimensions from the top left corner, the
 * way a scoring board is read, the top one on a ruler to the drawing's own scale; radii, angles and other sizes where they
 * belong; names of panels and tabs. What has no room there is keyed by a letter to lines at the foot. No text stands on
 * another or on a line. The text alternative says all of it.
 */
export function drawPiece(piece: PieceFigure, options: PieceDrawingOptions): Drawing {
  return (options.dims ?? true) ? dimensioned(piece, options) : plain(piece, options);
}

function plain(piece: PieceFigure, options: PieceDrawingOptions): Drawing {
  const { net } = piece;
  const { width, tallest = TALLEST, labels = true } = options;
  const scale = options.scale ?? Math.min((width - 2 * BORDER) / net.across, tallest / net.along);
  const frame = frameOf(net, Math.max(BORDER, (width - net.across * scale) / 2), BORDER, scale);
  const room = () => roomIn({ left: 0, right: width, top: 0, bottom: frame.bottom }, linesOf(net, frame));
  const named = labels ? lettering(net, null, { ...frame, room: room() }) : { shapes: [], unnamed: [] };
  return {
    width,
    height: frame.bottom + BORDER,
    title: piece.name,
    alt: altOf(piece, options, { notes: [], unnamed: named.unnamed }),
    shapes: [...flat(net, frame), ...named.shapes],
  };
}

function dimensioned(piece: PieceFigure, options: PieceDrawingOptions): Drawing {
  const { net, fan } = piece;
  const { units, grid, tallest = TALLEST, labels = true } = options;
  // A position a card's thickness off the ruler carries a sign; the sentences say what it means.
  const known = new Map<number, string>();
  const says = (mm: number) => {
    const text = known.get(mm) ?? showPosition(mm, piece.thickness, { units, ...(grid ? { grid } : {}) }).typeset;
    known.set(mm, text);
    return text;
  };
  const positions = positionsOf(piece);
  const left = Math.max(LEAST_LEFT, FIGURES + Math.max(...positions.along.map(({ at }) => textWidth(says(at)))));
  const right = fan ? textWidth(says(fan.height)) + FAN : textWidth(says(net.across)) / 2 + BORDER;
  const scale = options.scale ?? Math.min((options.width - left - right) / net.across, tallest / net.along);
  const width = Math.max(options.width, left + net.across * scale + right);
  const inset = left + (width - left - right - net.across * scale) / 2;
  const stops = (list: readonly Position[], start: number): readonly Stop[] =>
    list.map(({ at, reach }) => ({ at: start + at * scale, text: says(at), reach: reach * scale }));
  const across = stops(positions.across, inset);
  const figures = topFigures(across, [BORDER, width - 2]);
  const frame = frameOf(net, inset, figures.tall + ABOVE, scale);
  const { top, bottom } = frame;
  const along = stops(positions.along, top);
  const lowest = Math.max(bottom + 8, top + leftHeight(along));
  const foot = fan ? Math.max(lowest, bottom + FAN + BORDER) : lowest;
  const fanned = fan ? fanDimensions(fan, frame, says) : null;

  const notes = notesOf(piece, positions, says);
  const lines: Lines = [
    ...linesOf(net, frame),
    ...notes.flatMap(({ span }) => (span ? [flattened(span, frame)] : [])),
    ...across.map(({ at, reach }) => [
      { x: at, y: top },
      { x: at, y: top + reach },
    ]),
    ...along.map(({ at, reach }) => [
      { x: inset, y: at },
      { x: inset + reach, y: at },
    ]),
    ...(fanned?.lines ?? []),
  ];
  const edges = fan ? frame : { ...frame, right: width, bottom: lowest };
  const room: Room = roomIn({ ...edges, left: inset - 1, top: top - 1 }, lines);
  const lettered = lettering(labels ? net : { ...net, panels: [] }, notes, { ...frame, room });
  const key = keyRows(lettered.key, { left: BORDER, right: width - BORDER, top: foot });
  const corner: Shape[] = [
    { type: 'path', role: 'origin', d: `M${n(inset - 2)} ${n(top - 2)}v-8h-8z` },
    { type: 'text', role: 'label', x: inset - ASIDE - 4, y: top - 3, text: units, anchor: 'end' },
  ];
  return {
    width: Math.max(width, key.wide + 2 * BORDER),
    height: foot + key.tall,
    title: piece.name,
    alt: altOf(piece, options, { notes, unnamed: lettered.unnamed }),
    shapes: [
      ...flat(net, frame),
      ruler({ from: inset, to: frame.right, y: top - ABOVE, scale, units }),
      ...acrossTop(across, figures, { from: inset, line: top - ABOVE, edge: top }),
      ...downLeft(along, { from: top, line: inset - ASIDE, edge: inset, bottom: lowest }),
      ...corner,
      ...(fanned?.shapes ?? []),
      ...lettered.shapes,
      ...key.shapes,
    ],
  };
}

function frameOf({ across, along }: PieceFigure['net'], left: number, top: number, scale: number): Frame {
  return {
    left,
    top,
    right: left + across * scale,
    bottom: top + along * scale,
    scale,
    place: ({ x, y }) => ({ x: left + x * scale, y: top + y * scale }),
  };
}

/** The piece itself, without words and figures. */
function flat(net: PieceFigure['net'], { place, scale }: Frame): Shape[] {
  return [
    ...awayOf(net).map((points): Shape => {
      const [a, b] = points.map(place) as [Point, Point];
      return {
        type: 'path',
        role: 'away',
        d: `M${n(a.x)} ${n(a.y)}H${n(b.x)}V${n(b.y)}H${n(a.x)}Z${segment(a.x, a.y, b.x, b.y)}${segment(b.x, a.y, a.x, b.y)}`,
      };
    }),
    ...net.panels.map(
      (panel): Shape => ({
        type: 'path',
        role: panel.role === 'tab' ? 'glue' : 'panel',
        d: closedPath(panel.loop, place, scale),
        of: panel.name,
      }),
    ),
    ...[...net.folds.filter((fold) => fold.angle !== 0), ...net.creases].map(
      ({ kind, curve }): Shape => ({ type: 'path', role: kind, d: pathOf([curve], place, scale) }),
    ),
    ...net.slits.map((slit): Shape => ({ type: 'path', role: 'slit', d: slitPath(place(slit.from), place(slit.to)) })),
    {
      type: 'path',
      role: 'cut',
      d: [net.outline, ...net.holes].map((loop) => closedPath(loop, place, scale)).join(''),
    },
  ];
}
/** Top left and bottom right corners of what is cut away. */
const awayOf = ({ away }: PieceFigure['net']): Lines =>
  away.map(({ x, y, across, along }) => [
    { x, y },
    { x: x + across, y: y + along },
  ]);

/** Every line of a piece as drawn, in straight parts; seams too, though no line is drawn there. */
function linesOf(net: PieceFigure['net'], frame: Frame): Lines {
  const { place } = frame;
  const loops: readonly Loop[] = [net.outline, ...net.holes];
  return [
    ...loops.map((loop) => {
      const points = pointsOf(loop, 0.5 / frame.scale).map(place);
      return [points.at(-1) as Point, ...points];
    }),
    ...[...net.folds, ...net.creases].map(({ curve }) => flattened(curve, frame)),
    ...net.slits.map(({ from, to }) => [place(from), place(to)]),
    ...awayOf(net).map((points) => {
      const [a, b] = points.map(place) as [Point, Point];
      const [c, d] = [
        { x: b.x, y: a.y },
        { x: a.x, y: b.y },
      ];
      return [a, c, b, d, a, b, c, d];
    }),
  ];
}
const flattened = (curve: Curve, { place, scale }: Frame): readonly Point[] =>
  [curve.from, ...flatten(curve, 0.5 / scale)].map(place);

/** The side that lies level at the foot, dimensioned below the piece, and how far its flap stands out, on the right. */
function fanDimensions(
  { side, height }: NonNullable<PieceFigure['fan']>,
  { place, right, bottom }: Frame,
  says: (mm: number) => string,
): { readonly shapes: readonly Shape[]; readonly lines: Lines } {
  const [a, b] = [place(side.from), place(side.to)].sort((p, q) => p.x - q.x) as [Point, Point];
  const foot = place({ x: side.from.x, y: side.from.y + height }).y;
  const [x, y, middle] = [right + 14, bottom + 12, (a.x + b.x) / 2];
  const at = (from: number, to: number): Point => ({ x: from, y: to });
  const lines: Lines = [
    ...[a.x, b.x].map((end) => [at(end, foot + 3), at(end, y + 4)]),
    [at(b.x + 3, a.y), at(x + 4, a.y)],
    [at(middle + 3, foot), at(x + 4, foot)],
  ];
  const extensions = lines.map((points) => {
    const [from, to] = points as [Point, Point];
    return segment(from.x, from.y, to.x, to.y);
  });
  return {
    lines,
    shapes: [
      { type: 'path', role: 'extension', d: extensions.join('') },
      { type: 'path', role: 'dimension', d: segment(a.x, y, b.x, y) + segment(x, a.y, x, foot) },
      { type: 'text', role: 'figure', x: middle, y: y + 17, text: says(lengthOf(side)), anchor: 'middle' },
      { type: 'text', role: 'figure', x: x + 6, y: (a.y + foot) / 2 + 4.5, text: says(height), anchor: 'start' },
    ],
  };
}

/** A slit with a short tick at either end. */
function slitPath(a: Point, b: Point): string {
  const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
  const [x, y] = [(-(b.y - a.y) / length) * 3, ((b.x - a.x) / length) * 3];
  return (
    segment(a.x, a.y, b.x, b.y) +
    segment(a.x - x, a.y - y, a.x + x, a.y + y) +
    segment(b.x - x, b.y - y, b.x + x, b.y + y)
  );
}
