import { atLeast, coincident, isZero, roundTo } from '../measure';
import { areaOf, assemble, boundsOf, crossingOf, encloses, inset, pointsOf } from '../net';
import { keyOf } from '../pattern/names';
import type { Loop, Net, PieceDef, PieceHead, Point } from '../types';
import { cellsOf } from './cells';
import { finishNet, type Built } from './finish';
import { polygon } from './shapes';

/** A layer with its margin worked out, and the net of the piece that it is glued to. */
export interface LayerPiece {
  readonly name: string;
  readonly host: Net;
  /** Names of the host's panels that make one face. */
  readonly face: readonly string[];
  readonly margin: number;
  readonly step: number;
}
/** A layer's edges where they lie on the flat host. */
export interface Laid {
  readonly outline: Loop;
  readonly holes: readonly Loop[];
}

/** `at`: where the corner of the layer's blank lies on the flat host. */
export type BuiltLayer = Extract<Built, { ok: false }> | (Extract<Built, { ok: true }> & { readonly at: Point });

/** A flat sheet for one face of a piece: the face's outline moved in and its holes moved out by the margin. */
export function buildLayer(piece: LayerPiece): BuiltLayer {
  const laid = layOn(piece.host, piece.face, piece.margin);
  if ('reason' in laid) return { ok: false, reason: laid.reason };
  const outline = trimmed(laid.outline, piece.step);
  const built = finishNet({
    panels: [{ name: keyOf(piece.name), role: 'panel', loop: outline }],
    jointOf: () => ({ is: 'nothing' }),
    holes: laid.holes,
    step: piece.step,
  });
  if (!built.ok) return built;
  const [there, here] = [boundsOf(outline), boundsOf(built.net.outline)];
  return { ...built, at: { x: there.left - here.left, y: there.top - here.top } };
}

/** A plain rectangle is cut on a trimmer: down to whole steps of the grid, in the middle of the face; other shapes stay. */
function trimmed(outline: Loop, step: number): Loop {
  const { left, top, right, bottom } = boundsOf(outline);
  const [across, along] = [right - left, bottom - top].map((size) => roundTo(size, step, 'down')) as [number, number];
  const plain = outline.length === 4 && coincident(areaOf(outline), (right - left) * (bottom - top));
  if (!plain || isZero(across) || isZero(along)) return outline;
  const [x, y] = [(left + right - across) / 2, (top + bottom - along) / 2];
  return polygon([
    { x, y },
    { x: x + across, y },
    { x: x + across, y: y + along },
    { x, y: y + along },
  ]);
}

/** The edges of a layer on its host, or why there are none. */
export function layOn(host: Net, face: readonly string[], margin: number): Laid | { readonly reason: string } {
  if (!atLeast(margin, 0)) return { reason: 'its margin comes out smaller than nothing' };
  const panels = host.panels.filter(({ name }) => face.includes(keyOf(name)));
  const within = (names: readonly string[]) => names.every((name) => panels.some((panel) => panel.name === name));
  if (host.folds.some((fold) => !isZero(fold.angle) && within(fold.panels)))
    return { reason: 'a fold runs across the face that it covers' };
  const joined = assemble(panels, () => ({ is: 'nothing' }));
  if (joined.parts !== 1) return { reason: 'the panels that it covers do not lie side by side' };
  const outline = inset(joined.outline, margin);
  if (!outline) return { reason: 'the margin leaves nothing of it' };
  const gaps = [
    ...joined.holes,
    ...host.holes.filter(
      (hole) => encloses(pointsOf(joined.outline), middleOf(hole)) && !joined.holes.some((gap) => isSame(gap, hole)),
    ),
  ];
  const holes: Loop[] = [];
  for (const gap of gaps) {
    const hole = inset(gap, margin);
    if (!hole || !liesInside(hole, outline)) return { reason: 'a hole breaks through its edge' };
    if (holes.some((other) => crosses(hole, other) || encloses(pointsOf(other), middleOf(hole))))
      return { reason: 'two of its holes run into each other' };
    holes.push(hole);
  }
  return { outline, holes };
}

/** Names of the panels that a piece can have, at one sizing or another. */
export function panelNames(def: PieceDef): readonly string[] {
  switch (def.builder) {
    case 'grid':
      return [
        ...cellsOf(def).flatMap((row) => row.flatMap(({ kind, name }) => (kind === 'away' ? [] : [name]))),
        ...(def.creases ?? []).flatMap(({ parts }) => (parts === undefined ? [] : [keyOf(parts)])),
      ];
    case 'fan':
      return [keyOf(def.centre), ...Array.from({ length: MOST_SIDES }, (_, k) => keyOf(`${def.flap.name} ${k + 1}`))];
    case 'disc':
      return [keyOf(def.disc)];
    case 'sector':
      return [keyOf(def.body)];
    case 'outline':
      return def.panels.map(({ name }) => keyOf(name));
    case 'layer':
      return [];
  }
}
const MOST_SIDES = 24;

/**
 * The faces that a layer goes on at this sizing, each by the panels that are there; none when the host has none of them. The
 * first flap of a fan stands for all: they are alike.
 */
export function facesOf(host: Net, hostDef: PieceHead, faces: readonly (readonly string[])[]): readonly string[][] {
  const there = host.panels.map(({ name }) => keyOf(name));
  const flap = hostDef.builder === 'fan' ? `${keyOf(hostDef.flap.name)} ` : null;
  return faces.flatMap((face) => {
    if (flap !== null && face.length === 1 && face[0] === `${flap}1`)
      return there.filter((name) => name.startsWith(flap)).map((name) => [name]);
    const kept = face.filter((name) => there.includes(name));
    return kept.length > 0 ? [kept] : [];
  });
}

function middleOf(loop: Loop): Point {
  const { left, top, right, bottom } = boundsOf(loop);
  return { x: (left + right) / 2, y: (top + bottom) / 2 };
}
function isSame(a: Loop, b: Loop): boolean {
  const [one, other] = [boundsOf(a), boundsOf(b)];
  return (['left', 'top', 'right', 'bottom'] as const).every((side) => coincident(one[side], other[side]));
}
const liesInside = (hole: Loop, outline: Loop): boolean => {
  const edge = pointsOf(outline);
  return pointsOf(hole).every((point) => encloses(edge, point)) && !crosses(hole, outline);
};
function crosses(one: Loop, other: Loop): boolean {
  const [a, b] = [pointsOf(one), pointsOf(other)];
  return a.some((from, i) => {
    const to = a[(i + 1) % a.length] as Point;
    return b.some((start, j) => crossingOf(from, to, start, b[(j + 1) % b.length] as Point) !== null);
  });
}
