import { type ShowOptions } from '../measure';
import { areaOf, boundsOf, lengthOf, pointsOf } from '../net';
import { seamsOf } from '../piece';
import type { Drawing, Loop, PieceFigure, Point, Shape } from '../types';
import { acrossTop, downLeft, textWidth, topRows, type Stop } from './dimensions';
import { closedPath, n, pathOf, segment, type Place } from './path';
import { ruler } from './ruler';
import { say, showPosition } from './say';

export interface PieceDrawingOptions extends Pick<ShowOptions, 'units' | 'grid'> {
  /** Drawing units across, all in (CSS pixels on a page). */
  readonly width: number;
  /** The piece itself is drawn at most this tall. */
  readonly tallest?: number;
  /** Drawing units for a millimetre; usual: as large as it fits. */
  readonly scale?: number;
  readonly dims?: boolean;
  readonly labels?: boolean;
  readonly ruler?: boolean;
}

/**
 * A flat piece: outline, folds by kind, glue areas, what is cut away, slits; running dimensions from the top left corner, the
 * way a scoring board is read; a ruler to the drawing's own scale. The text alternative states size and scores.
 */
export function drawPiece(piece: PieceFigure, options: PieceDrawingOptions): Drawing {
  const { net } = piece;
  const { units, grid, width, dims = true, labels = true, tallest = 340 } = options;
  // A position a card's thickness off the ruler carries a sign; the sentences say what it means.
  const says = (mm: number) => showPosition(mm, piece.thickness, { units, ...(grid ? { grid } : {}) }).typeset;
  const seams = seamsOf(net);
  const stopsOf = (scores: readonly number[], tabs: readonly number[], size: number) =>
    [...scores, ...(piece.fan ? [] : tabs), size].sort((a, b) => a - b);
  const acrossMm = stopsOf(piece.scores.across, seams.across, net.across);
  const alongMm = stopsOf(piece.scores.along, seams.along, net.along);
  const fan = dims ? (piece.fan ?? null) : null;
  const left = dims ? Math.max(...alongMm.map((mm) => textWidth(says(mm)))) + 34 : 6;
  const right = fan ? textWidth(says(fan.height)) + 30 : dims ? textWidth(says(net.across)) / 2 + 6 : 6;
  const scale = options.scale ?? Math.min((width - left - right) / net.across, tallest / net.along);
  const inset = left + Math.max(0, (width - left - right - net.across * scale) / 2);
  const stopsAcross: Stop[] = acrossMm.map((mm) => ({ at: inset + mm * scale, text: says(mm) }));
  const rulerHeight = options.ruler ? 16 : 0;
  const top = rulerHeight + (dims ? 34 + Math.max(...topRows(stopsAcross)) * 15 : 6);
  const place: Place = (point) => ({ x: inset + point.x * scale, y: top + point.y * scale });
  const bottom = top + net.along * scale;
  const height = bottom + (fan ? 36 : dims ? 12 : 6);
  const stopsAlong: Stop[] = alongMm.map((mm) => ({ at: top + mm * scale, text: says(mm) }));

  const shapes: Shape[] = [
    ...net.away.map((box): Shape => {
      const [a, b] = [place({ x: box.x, y: box.y }), place({ x: box.x + box.across, y: box.y + box.along })];
      return {
        type: 'path',
        role: 'away',
        d: `M${n(a.x)} ${n(a.y)}H${n(b.x)}V${n(b.y)}H${n(a.x)}ZM${n(a.x)} ${n(a.y)}L${n(b.x)} ${n(b.y)}M${n(b.x)} ${n(a.y)}L${n(a.x)} ${n(b.y)}`,
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
    ...net.folds
      .filter((fold) => fold.angle !== 0)
      .map((fold): Shape => ({ type: 'path', role: fold.kind, d: pathOf([fold.curve], place, scale) })),
    ...net.creases.map(({ curve, kind }): Shape => ({ type: 'path', role: kind, d: pathOf([curve], place, scale) })),
    ...net.slits.map((slit): Shape => ({ type: 'path', role: 'slit', d: slitPath(place(slit.from), place(slit.to)) })),
    {
      type: 'path',
      role: 'cut',
      d: [net.outline, ...net.holes].map((loop) => closedPath(loop, place, scale)).join(''),
    },
    ...(labels ? labelsOf(piece, place, scale) : []),
    ...(dims
      ? [
          ...acrossTop(stopsAcross, { from: inset, line: top - 14, edge: top }),
          ...downLeft(stopsAlong, { from: top, line: inset - 12, edge: inset, bottom }),
          { type: 'path', role: 'origin', d: `M${n(inset - 2)} ${n(top - 2)}v-8h-8z` } satisfies Shape,
        ]
      : []),
    ...(fan ? fanDimensions(fan, place, says, { right: inset + net.across * scale, bottom }) : []),
    ...(options.ruler ? ruler({ width, start: inset, scale, units }) : []),
  ];
  return { width, height, title: piece.name, alt: altOf(piece, options), shapes };
}

/** The side that lies level at the foot, dimensioned below the piece, and how far its flap stands out, on the right. */
function fanDimensions(
  { side, height }: NonNullable<PieceFigure['fan']>,
  place: Place,
  says: (mm: number) => string,
  edge: { readonly right: number; readonly bottom: number },
): Shape[] {
  const [a, b] = [place(side.from), place(side.to)].sort((p, q) => p.x - q.x) as [Point, Point];
  const foot = place({ x: side.from.x, y: side.from.y + height }).y;
  const [x, y] = [edge.right + 14, edge.bottom + 12];
  return [
    {
      type: 'path',
      role: 'extension',
      d:
        [a.x, b.x].map((at) => segment(at, foot + 3, at, y + 4)).join('') +
        segment(b.x + 3, a.y, x + 4, a.y) +
        segment((a.x + b.x) / 2 + 3, foot, x + 4, foot),
    },
    { type: 'path', role: 'dimension', d: segment(a.x, y, b.x, y) + segment(x, a.y, x, foot) },
    {
      type: 'text',
      role: 'figure',
      x: (a.x + b.x) / 2,
      y: y + 17,
      text: says(lengthOf(side)),
      anchor: 'middle',
    },
    { type: 'text', role: 'figure', x: x + 6, y: (a.y + foot) / 2 + 4.5, text: says(height), anchor: 'start' },
  ];
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

/** Names of panels where they balance, where there is room for them and no other name stands there. */
function labelsOf(piece: PieceFigure, place: Place, scale: number): Shape[] {
  const joined = new Set(piece.net.joins.map((join) => join.panels[1]));
  const taken: { readonly x: number; readonly y: number; readonly wide: number; readonly tall: number }[] = [];
  return piece.net.panels.flatMap((panel): Shape[] => {
    if (panel.role === 'tab' || joined.has(panel.name) || areaOf(panel.loop) <= 0) return [];
    const box = boundsOf(panel.loop);
    // Where a triangle balances, two thirds of it are left across and down.
    const pointed = panel.loop.length === 3;
    const left = pointed ? (scale * 2) / 3 : scale;
    const [wide, tall] = [(box.right - box.left) * left, (box.bottom - box.top) * left];
    const room = textWidth(panel.name) + 10;
    const turned = wide < room && tall >= room;
    if ((turned ? wide : tall) < 18 || (turned ? tall : wide) < room) return [];
    const { x, y } = place(centroidOf(panel.loop));
    const own = { x, y, wide: turned ? 18 : room, tall: turned ? room : 18 };
    const meets = (other: typeof own) =>
      Math.abs(other.x - x) * 2 < other.wide + own.wide && Math.abs(other.y - y) * 2 < other.tall + own.tall;
    if (taken.some(meets)) return [];
    taken.push(own);
    return [
      {
        type: 'text',
        role: 'label',
        x: x + (turned ? 4.5 : 0),
        y: y + (turned ? 0 : 4.5),
        text: panel.name,
        anchor: 'middle',
        of: panel.name,
        ...(turned ? { turned } : {}),
      },
    ];
  });
}

/** Where a panel would balance. */
function centroidOf(loop: Loop): Point {
  const points = pointsOf(loop);
  const origin = points[0] ?? { x: 0, y: 0 };
  const sum = points.reduce<Point & { readonly twice: number }>(
    (so, a, index) => {
      const b = points[(index + 1) % points.length] ?? a;
      const twice = (a.x - origin.x) * (b.y - origin.y) - (b.x - origin.x) * (a.y - origin.y);
      const [x, y] = [(a.x + b.x + origin.x) / 3, (a.y + b.y + origin.y) / 3];
      return { x: so.x + twice * x, y: so.y + twice * y, twice: so.twice + twice };
    },
    { x: 0, y: 0, twice: 0 },
  );
  return { x: sum.x / sum.twice, y: sum.y / sum.twice };
}

/** Size and scores in words, for those who hear the drawing. */
export function altOf(piece: PieceFigure, options: Pick<ShowOptions, 'units' | 'grid'>): string {
  const [first, ...rest] = piece.instructions;
  const blank = first ? say(first, options).replace(/^Cut /, '') : '';
  const scores = rest
    .filter((sentence) => typeof sentence[0] === 'string' && /^(Score|Along|Turn|Give)/.test(sentence[0]))
    .map((sentence) => say(sentence, options));
  return [`${piece.name}, ${blank}`, ...scores].join(' ');
}
