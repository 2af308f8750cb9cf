import { boundsOf, type Curve, type Loop, type PieceFigure, type Point } from '@/engine';
import type { Work } from './works';

/** Curves that a machine follows without lifting. A closed line ends where it began. */
export interface CuttingLine {
  readonly work: Work;
  readonly curves: Loop;
  readonly closed: boolean;
}
/**
 * What a cutting machine is given: millimetres, x to the right, y down, the corner of the whole at 0, 0. Lines come in the order in
 * which they are worked: an outline after everything inside it, while the card is still held.
 */
export interface CuttingLayout {
  readonly across: number;
  readonly along: number;
  readonly lines: readonly CuttingLine[];
}
export interface LayoutOptions {
  /** Glue areas too, as lines to draw. */
  readonly glue?: boolean;
}

/** Millimetres between pieces that lie side by side. */
export const GAP = 10;

/** Size of the upright rectangle round a piece once it is cut; its blank may be larger. */
export function outerSize({ net }: PieceFigure): { readonly across: number; readonly along: number } {
  const { left, right, top, bottom } = boundsOf(net.outline);
  return { across: right - left, along: bottom - top };
}

/** One piece, its outer edges on the edges of the whole. */
export function pieceLayout(piece: PieceFigure, options: LayoutOptions = {}): CuttingLayout {
  return { ...outerSize(piece), lines: linesOf(piece, 0, options) };
}

/** Every piece as often as it is needed, in one row with 10 mm between, tops level. Nothing at all is 0 × 0. */
export function rowLayout(
  pieces: readonly PieceFigure[],
  { copies = 1, ...options }: LayoutOptions & { /** Boxes, usual 1. */ readonly copies?: number } = {},
): CuttingLayout {
  const every = pieces.flatMap((piece) => Array.from({ length: piece.count * copies }, () => piece));
  const lines: CuttingLine[] = [];
  let [across, along] = [0, 0];
  every.forEach((piece, index) => {
    const size = outerSize(piece);
    const left = index === 0 ? 0 : across + GAP;
    lines.push(...linesOf(piece, left, options));
    across = left + size.across;
    along = Math.max(along, size.along);
  });
  return { across, along, lines };
}

function linesOf({ net }: PieceFigure, left: number, { glue = false }: LayoutOptions): readonly CuttingLine[] {
  const bounds = boundsOf(net.outline);
  const moved = (loop: Loop) => loop.map((curve) => move(curve, left - bounds.left, -bounds.top));
  const closed = (work: Work, loop: Loop): CuttingLine => ({ work, curves: moved(loop), closed: true });
  const open = (work: Work, curve: Curve): CuttingLine => ({ work, curves: moved([curve]), closed: false });
  return [
    ...(glue ? net.panels.filter(({ role }) => role === 'tab').map(({ loop }) => closed('glue', loop)) : []),
    ...net.folds.filter(({ angle }) => angle !== 0).map(({ kind, curve }) => open(kind, curve)),
    ...net.creases.map(({ kind, curve }) => open(kind, curve)),
    ...net.slits.map((slit) => open('cut', slit)),
    ...net.holes.map((hole) => closed('cut', hole)),
    closed('cut', net.outline),
  ];
}

function move(curve: Curve, dx: number, dy: number): Curve {
  const to = ({ x, y }: Point): Point => ({ x: x + dx, y: y + dy });
  const ends = { from: to(curve.from), to: to(curve.to) };
  return curve.type === 'line' ? { ...curve, ...ends } : { ...curve, ...ends, centre: to(curve.centre) };
}
