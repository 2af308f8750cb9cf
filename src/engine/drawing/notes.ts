import { coincident, decimal, isZero, same } from '../measure';
import { boundsOf, distance, pointAt, samePoint, sweepOf } from '../net';
import type { Arc, Curve, Fold, Panel, PieceFigure, Point } from '../types';
import { teethOf, type Positions } from './stops';

/** A place that a note points at, and a direction from it in which its words may stand. */
export interface Pointed {
  readonly at: Point;
  readonly out: Point;
  /** Words may stand here as well, without a leader. */
  readonly within?: Point;
  /** Points on the two sides of an angle, the second clockwise from the first. */
  readonly sides?: readonly [Point, Point];
}
/** What a drawing says of a piece beside positions: a radius, an angle, the length of a slit; alike ones once. */
export interface Note {
  readonly text: string;
  readonly places: readonly Pointed[];
  /** Always by a letter: a point and its place. */
  readonly keyed?: boolean;
  /** An arc that is drawn for it. */
  readonly span?: Arc;
}
type Says = (mm: number) => string;
type Take = (text: string, place: Pointed) => void;
type TakeAngle = (size: number, place: Pointed) => void;

/** Shorter slits, millimetres, are where card gives way by its thickness. */
const LEAST_SLIT = 2;
/** Angles nearer to one another than this, in degrees, are one: card is rounded, not bent. */
const LIKE = 0.35;

/** Radii and diameters, sizes of slots, lengths of slits, depths of tabs, angles, turns of folds, teeth, places of points. */
export function notesOf(piece: PieceFigure, positions: Positions, says: Says): readonly Note[] {
  const { net, fan } = piece;
  const groups = new Map<string, Pointed[]>();
  const take: Take = (text, place) => void groups.set(text, [...(groups.get(text) ?? []), place]);
  const sizes: number[] = [];
  const takeAngle: TakeAngle = (size, place) => {
    const known = sizes.find((other) => Math.abs(other - size) < LIKE) ?? size;
    sizes.push(known);
    take(degrees(known), place);
  };
  const teeth = teethOf(net);
  const names = new Set(teeth.map(({ name }) => name));
  const folds = net.folds.filter(({ panels }) => !panels.some((name) => names.has(name)));
  const scored = folds.filter(({ angle }) => !isZero(angle));
  const points = fan ? [] : loosePoints([...scored, ...net.creases], positions);

  rounds(piece, says, take);
  for (const slit of net.slits) {
    const length = distance(slit.from, slit.to);
    if (length > LEAST_SLIT) take(`slit ${says(length)}`, besides(slit));
  }
  for (const panel of net.panels) {
    if (names.has(panel.name)) continue;
    const hinges = folds.filter(({ panels }) => panels.includes(panel.name));
    if (panel.role === 'tab') depth(panel, hinges, positions, says, take);
    if (panel.role === 'tab' || points.length === 0) corners(panel, hinges, takeAngle);
  }
  if (points.length === 0) for (const { curve } of net.creases) slant(curve, positions, takeAngle);
  for (const { curve, angle } of scored)
    if (!same(angle, 90) && !same(angle, 180)) take(`fold ${degrees(angle)}`, besides(curve));

  return [
    ...[...groups].map(([text, places]) => ({ text: places.length > 1 ? `${places.length}× ${text}` : text, places })),
    ...cones(net.panels),
    ...rims(teeth),
    ...points.map((at) => ({
      text: `${says(at.x)}, ${says(at.y)}`,
      places: [{ at, out: { x: 0, y: -1 } }],
      keyed: true,
    })),
  ];
}

const degrees = (angle: number): string => `${decimal(angle, 1)}°`;
const unit = (from: Point, to: Point): Point => {
  const length = distance(from, to);
  return { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
};
/** A point of a curve, usually its middle, and the direction square to it; from an arc outwards. */
function besides(curve: Curve, share = 0.5): Pointed {
  const at = pointAt(curve, share);
  if (curve.type === 'arc') return { at, out: unit(curve.centre, at) };
  const { x, y } = unit(curve.from, curve.to);
  return { at, out: { x: y, y: -x } };
}

/** Arcs of outlines, holes and folds, those of one circle once: a whole circle by its diameter. Slots by their two sizes. */
function rounds({ net }: PieceFigure, says: Says, take: Take): void {
  const circles = new Map<string, Arc[]>();
  const lines = [...net.folds, ...net.creases].map(({ curve }) => curve);
  for (const curve of [...net.outline, ...net.holes.flat(), ...lines]) {
    if (curve.type === 'line') continue;
    const key = [curve.centre.x, curve.centre.y, curve.radius].map((value) => decimal(value, 3)).join(' ');
    circles.set(key, [...(circles.get(key) ?? []), curve]);
  }
  for (const arcs of circles.values()) {
    const middle = arcs[arcs.length >> 1] as Arc;
    const whole = arcs.reduce((sum, arc) => sum + sweepOf(arc), 0) > 2 * Math.PI - 0.01;
    take(whole ? `Ø\u202f${says(2 * middle.radius)}` : `R\u202f${says(middle.radius)}`, besides(middle));
  }
  for (const loop of net.holes) {
    if (loop[0]?.type === 'arc') continue;
    const { left, top, right, bottom } = boundsOf(loop);
    const middle = (top + bottom) / 2;
    const within = { x: (left + right) / 2, y: middle };
    take(`${says(right - left)} × ${says(bottom - top)}`, { at: { x: right, y: middle }, out: { x: 1, y: 0 }, within });
  }
}

/** How far a tab stands out from its fold, where no position says it. */
function depth({ loop }: Panel, hinges: readonly Fold[], { across, along }: Positions, says: Says, take: Take): void {
  const hinge = hinges[0]?.curve;
  if (hinge?.type !== 'line') return;
  const { x, y } = unit(hinge.from, hinge.to);
  const off = ({ from }: Curve) => (from.x - hinge.from.x) * y - (from.y - hinge.from.y) * x;
  const far = loop.reduce((most, curve) => (Math.abs(off(curve)) > Math.abs(off(most)) ? curve : most));
  const known = (list: Positions['across'], place: number) =>
    list.some(({ at }) => coincident(at, place)) || coincident(place, 0);
  if (coincident(x, 0) && known(across, far.from.x)) return;
  if (coincident(y, 0) && known(along, far.from.y)) return;
  const size = Math.abs(off(far));
  const middle = pointAt(hinge, 0.5);
  const side = Math.sign(off(far));
  take(`tab ${says(size)}`, {
    at: { x: middle.x + y * side * size * 0.6, y: middle.y - x * side * size * 0.6 },
    out: { x: y * side, y: -x * side },
  });
}

/** Angles between a fold and the next straight line of a panel, but for right ones. */
function corners({ loop }: Panel, hinges: readonly Fold[], take: TakeAngle): void {
  const folded = (curve: Curve) =>
    hinges.some(
      ({ curve: { from, to } }) =>
        (samePoint(from, curve.from) && samePoint(to, curve.to)) ||
        (samePoint(from, curve.to) && samePoint(to, curve.from)),
    );
  loop.forEach((after, index) => {
    const before = loop.at(index - 1) as Curve;
    if (before.type !== 'line' || after.type !== 'line' || !(folded(before) || folded(after))) return;
    angle(after.from, after.to, before.from, take);
  });
}
/** The angle at a point from one point clockwise to another, unless it is a right or a straight one or wider. */
function angle(at: Point, first: Point, last: Point, take: TakeAngle): void {
  const start = Math.atan2(first.y - at.y, first.x - at.x);
  const turn = (Math.atan2(last.y - at.y, last.x - at.x) - start + 4 * Math.PI) % (2 * Math.PI);
  const size = (turn * 180) / Math.PI;
  if (Math.abs(size - 90) < LIKE || size > 180 - LIKE || size < LIKE) return;
  take(size, {
    at,
    out: { x: Math.cos(start + turn / 2), y: Math.sin(start + turn / 2) },
    sides: [first, last],
  });
}
/** How a slanting crease leaves the line that it begins on. */
function slant(curve: Curve, positions: Positions, take: TakeAngle): void {
  if (curve.type !== 'line' || same(curve.from.x, curve.to.x) || same(curve.from.y, curve.to.y)) return;
  const [from, to] = isKnown(curve.from, positions) ? [curve.from, curve.to] : [curve.to, curve.from];
  const [x, y] = [to.x - from.x, to.y - from.y];
  const square = Math.abs(x) > Math.abs(y) ? { x: to.x, y: from.y } : { x: from.x, y: to.y };
  const clockwise = (square.x - from.x) * y - (square.y - from.y) * x > 0;
  angle(from, clockwise ? square : to, clockwise ? to : square, take);
}

/** Whether both ways to a point are positions already. */
const isKnown = ({ x, y }: Point, { across, along }: Positions): boolean =>
  (coincident(x, 0) || across.some(({ at }) => coincident(at, x))) &&
  (coincident(y, 0) || along.some(({ at }) => coincident(at, y)));
/** Ends of slanting lines that begin and end at no known point: they are told by their places. */
function loosePoints(lines: readonly { readonly curve: Curve }[], positions: Positions): readonly Point[] {
  const loose: Point[] = [];
  for (const { curve } of lines) {
    const { from, to } = curve;
    if (curve.type === 'arc' || same(from.x, to.x) || same(from.y, to.y)) continue;
    if (isKnown(from, positions) || isKnown(to, positions)) continue;
    for (const point of [from, to]) if (!loose.some((other) => samePoint(other, point))) loose.push(point);
  }
  return loose;
}

/** The number of teeth, told at the one that lies furthest to the right. */
function rims(teeth: readonly Panel[]): readonly Note[] {
  const tips = teeth.flatMap(({ loop: [, , tip] }) => (tip ? [besides(tip)] : []));
  const [last] = tips.sort((a, b) => b.at.x - a.at.x);
  return last ? [{ text: `${teeth.length} teeth`, places: [last] }] : [];
}

/** The angle of a ring's sector, across its body. */
function cones(panels: readonly Panel[]): readonly Note[] {
  return panels.flatMap(({ cone, loop }): Note[] => {
    const [outer, inner] = loop.filter((curve) => curve.type === 'arc').sort((a, b) => b.radius - a.radius);
    if (!cone || !outer || !inner) return [];
    const radius = inner.radius + (outer.radius - inner.radius) * 0.3;
    const place = ({ x, y }: Point) => ({
      x: cone.apex.x + ((x - cone.apex.x) * radius) / outer.radius,
      y: cone.apex.y + ((y - cone.apex.y) * radius) / outer.radius,
    });
    const span = { ...outer, radius, from: place(outer.from), to: place(outer.to) };
    const places = [0.5, 0.3, 0.7].map((share) => besides(span, share));
    return [{ text: degrees(cone.angle), places, span }];
  });
}
