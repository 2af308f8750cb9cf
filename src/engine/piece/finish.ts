import { roundTo, snap } from '../measure';
import { assemble, boundsOf, selfCrossing, type Joint, type LoosePanel } from '../net';
import type { Curve, Loop, Net, Point } from '../types';

/** A net, or the reason why these sizes make nonsense: the end of "Floor: …". */
export type Built = { readonly ok: true; readonly net: Net } | { readonly ok: false; readonly reason: string };
export const nonsense = (reason: string): Built => ({ ok: false, reason });

/** How a line that the pattern speaks of joins its two panels. */
export function jointAsSaid(said: {
  readonly is: 'valley' | 'mountain' | 'slit' | 'nothing';
  readonly angle: number;
  readonly shown?: number;
}): Joint {
  if (said.is === 'slit' || said.is === 'nothing') return { is: said.is };
  const { is: kind, angle, shown } = said;
  return { is: 'fold', kind, angle, ...(shown === undefined ? {} : { shown }) };
}

export interface LoosePiece {
  readonly panels: readonly LoosePanel[];
  readonly jointOf: (a: string, b: string) => Joint;
  readonly holes?: readonly Loop[];
  readonly creases?: Net['creases'];
  readonly edges?: Net['edges'];
  /** Given by a grid; others take the smallest upright rectangle, rounded up to whole steps. */
  readonly blank?: Pick<Net, 'away' | 'across' | 'along' | 'columns' | 'rows'>;
  readonly step: number;
}

/** Joins the panels of a piece and checks the whole: one part, closed, not crossing itself. */
export function finishNet(loose: LoosePiece): Built {
  const piece = loose.blank ? loose : onBlank(loose);
  const assembled = assemble(piece.panels, piece.jointOf);
  if (assembled.outline.length === 0) return nonsense('nothing is left of it');
  if (assembled.parts > 1) return nonsense(`it falls apart into ${assembled.parts} parts`);
  if (selfCrossing(assembled.outline)) return nonsense('its outline crosses itself');
  const { holes = [], creases = [], edges = {}, blank = NO_BLANK } = piece;
  const net: Net = {
    outline: assembled.outline,
    holes: [...assembled.holes, ...holes],
    panels: piece.panels,
    folds: assembled.folds,
    creases,
    joins: assembled.joins,
    slits: assembled.slits,
    edges,
    ...blank,
  };
  return { ok: true, net };
}
const NO_BLANK = { away: [], across: 0, along: 0, columns: [], rows: [] };

/** Puts a piece on the smallest blank of whole grid steps that holds its panels, in the middle of what is over. */
function onBlank(piece: LoosePiece): LoosePiece {
  const { left, top, right, bottom } = boundsOf(piece.panels.flatMap(({ loop }) => loop));
  const size = (mm: number) => (piece.step > 0 ? roundTo(mm, piece.step, 'up') : snap(mm));
  const [across, along] = [size(right - left), size(bottom - top)];
  const mover = moverBy({ x: (across - (right - left)) / 2 - left, y: (along - (bottom - top)) / 2 - top });
  return {
    ...piece,
    panels: piece.panels.map(mover.panel),
    holes: (piece.holes ?? []).map(mover.loop),
    creases: (piece.creases ?? []).map((crease) => ({ ...crease, curve: mover.curve(crease.curve) })),
    blank: { away: [], across, along, columns: [0, across], rows: [0, along] },
  };
}

/** The same card drawn elsewhere; its blank stays where it is. */
export function moveNet(net: Net, by: Point): Net {
  const { curve, loop, panel } = moverBy(by);
  return {
    ...net,
    outline: loop(net.outline),
    holes: net.holes.map(loop),
    panels: net.panels.map(panel),
    folds: net.folds.map((fold) => ({ ...fold, curve: curve(fold.curve) })),
    creases: net.creases.map((crease) => ({ ...crease, curve: curve(crease.curve) })),
    joins: net.joins.map((join) => ({ ...join, curve: curve(join.curve) })),
    slits: net.slits.map(curve),
  };
}
function moverBy(by: Point) {
  const point = (at: Point): Point => ({ x: at.x + by.x, y: at.y + by.y });
  const curve = <T extends Curve>(one: T): T =>
    one.type === 'line'
      ? { ...one, from: point(one.from), to: point(one.to) }
      : { ...one, from: point(one.from), to: point(one.to), centre: point(one.centre) };
  const loop = (curves: Loop): Loop => curves.map(curve);
  const panel = <T extends LoosePanel>(one: T): T => ({
    ...one,
    loop: loop(one.loop),
    ...(one.cone ? { cone: { ...one.cone, apex: point(one.cone.apex) } } : {}),
  });
  return { curve, loop, panel };
}
