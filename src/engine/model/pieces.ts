import type { Values } from '../formula';
import { GRIDS, isZero, same, snap } from '../measure';
import { perimeterOf } from '../net';
import { CARD_THICKNESS, keyOf } from '../pattern/names';
import { areaOfNet, fanSizes, keepMaking } from '../piece';
import type { Net, PieceFigure, Sizing } from '../types';
import { buildPiece } from './build';
import type { CompiledPiece, Model } from './model';
import { isInUse, type BothValues } from './values';

/** A piece that cannot be cut at this size, and why: the end of a sentence. */
export interface Uncut {
  readonly piece: CompiledPiece;
  readonly reason: string;
}

/** The pieces in use, as cut. What is known once a piece is drawn goes into both values, for fits and the text. */
export function piecesOf(
  model: Model,
  { exact, cut }: BothValues,
  sizing: Sizing,
): { readonly pieces: readonly PieceFigure[]; readonly uncut: readonly Uncut[] } {
  const pieces: PieceFigure[] = [];
  const uncut: Uncut[] = [];
  const nets = new Map<string, Net>();
  for (const piece of model.pieces) {
    const made = asBefore(piece, cut) ?? pieceOf(model, piece, cut, sizing, nets);
    if (made === null) continue;
    if (typeof made === 'string') {
      uncut.push({ piece, reason: made });
      continue;
    }
    remember(piece, cut, made);
    nets.set(keyOf(piece.def.name), made.net);
    for (const { slot, of } of piece.drawn) {
      const value = typeof of === 'object' ? (made.net.edges[of.edge] ?? NaN) : made[of];
      cut[slot] = value;
      exact[slot] = value;
    }
    pieces.push(made);
  }
  return { pieces, uncut };
}

// ── As before ────────────────────────────────────────────────────────────────────────────────────────────────────────

/** How many sizes back a piece is known: a page works out the asked size, and one or two beside it. */
const KNOWN = 3;
interface Kept {
  /** What the piece read, in the order of its `reads`. */
  readonly values: readonly number[];
  readonly figure: PieceFigure;
}
const known = new WeakMap<CompiledPiece, Kept[]>();

/** A change of one size leaves most pieces as they are: what reads the same values is not built again. */
function asBefore(piece: CompiledPiece, values: Values): PieceFigure | undefined {
  const kept = known.get(piece);
  return kept?.find((one) => piece.reads.every((slot, index) => Object.is(one.values[index], values[slot])))?.figure;
}
function remember(piece: CompiledPiece, values: Values, figure: PieceFigure): void {
  const kept = known.get(piece) ?? [];
  if (kept.some((one) => one.figure === figure)) return;
  known.set(piece, [
    { values: piece.reads.map((slot) => values[slot] as number), figure },
    ...kept.slice(0, KNOWN - 1),
  ]);
}

// ── One piece ────────────────────────────────────────────────────────────────────────────────────────────────────────

/** More come of a slip in a formula, and would take for ever to lay on sheets. */
const MOST_OF_A_PIECE = 999;

/** Null when the piece is not in use at this size, the reason when it makes nonsense. */
function pieceOf(
  model: Model,
  piece: CompiledPiece,
  values: Values,
  sizing: Sizing,
  nets: ReadonlyMap<string, Net>,
): PieceFigure | string | null {
  const { def } = piece;
  const count = Math.round(piece.count.work(values));
  if (!isInUse(piece, values) || count < 1) return null;
  if (count > MOST_OF_A_PIECE) return `${count} of it are more than anybody cuts (${MOST_OF_A_PIECE} at most)`;
  const made = buildPiece(model, piece, values, nets);
  if (!made) return null;
  const { grid, built, layer } = made;
  if (!built.ok) return built.reason;
  const { net } = built;
  // Running positions are read from an edge of the blank: only a grid's scores lie square to it.
  const scores = grid ? scoresOf(net) : { across: [], along: [] };
  const thickness = thicknessOf(model, values);
  const fan = def.builder === 'fan' ? fanSizes(net, def) : null;
  let [area, perimeter]: [number?, number?] = [];
  const step = GRIDS[sizing.grid].step;
  keepMaking(net, { grid, def, scores, step, thickness, ...(layer ? { layer, count } : {}) });
  return {
    name: def.name,
    count,
    stock: def.stock,
    net,
    across: net.across,
    along: net.along,
    scores,
    ...(fan && fan.side.type === 'line' ? { fan: { side: fan.side, height: fan.height } } : {}),
    ...(layer ? { layer } : {}),
    thickness,
    // Worked out when first asked for: a sweep over a thousand sizings reads none.
    get area() {
      return (area ??= areaOfNet(net));
    },
    get perimeter() {
      return (perimeter ??= perimeterOf(net.outline) + net.holes.reduce((sum, hole) => sum + perimeterOf(hole), 0));
    },
  };
}

function thicknessOf(model: Model, values: Values): number {
  const value = model.scope.has(CARD_THICKNESS) ? (values[model.scope.slot(CARD_THICKNESS)] as number) : 0;
  return Number.isFinite(value) ? value : 0;
}

/** Positions of straight score lines from the left and from the top edge, each once. */
export function scoresOf(net: Net): PieceFigure['scores'] {
  const upright: number[] = [];
  const level: number[] = [];
  for (const { curve, angle } of net.folds) {
    if (curve.type !== 'line' || isZero(angle)) continue;
    if (same(curve.from.x, curve.to.x)) upright.push(snap(curve.from.x));
    else if (same(curve.from.y, curve.to.y)) level.push(snap(curve.from.y));
  }
  const sorted = (list: number[]) =>
    list.sort((a, b) => a - b).filter((value, index, all) => index === 0 || !same(value, all[index - 1] as number));
  return { across: sorted(upright), along: sorted(level) };
}
