import { snap } from '../measure';
import type { GridId, PieceFigure } from '../types';
import { lieOf, type Folds } from './grain';
import { joinToFit, type Joined } from './joined';
import { STOCKS, type Stock } from './stock';

/** A piece that no sheet of its stock can hold, and what would help. */
export interface TooLarge {
  readonly name: string;
  readonly across: number;
  readonly along: number;
  readonly stock: Stock;
  /** The largest that one piece can be on that stock, within the margin. */
  readonly room: { readonly across: number; readonly along: number };
  /** Known sheets that would hold it, the smallest first. */
  readonly fits: readonly Stock[];
  /** The piece made of two that both fit, where it can be parted at a fold. */
  readonly joined: Joined | null;
}

export function tooLargeOf(
  piece: Pick<PieceFigure, 'name' | 'across' | 'along'> & Partial<PieceFigure>,
  { stock, margin, folds, grid }: { stock: Stock; margin: number; folds: Folds; grid: GridId },
): TooLarge {
  const room = (of: Stock) => ({ across: snap(of.across - 2 * margin), along: snap(of.along - 2 * margin) });
  const fits = Object.values(STOCKS)
    .filter((known) => lieOf(piece, known, room(known), folds) !== null)
    .sort((a, b) => a.across * a.along - b.across * b.along);
  let joined: Joined | null | undefined;
  return {
    name: piece.name,
    across: piece.across,
    along: piece.along,
    stock,
    room: room(stock),
    fits,
    // Worked out when first asked for: it builds nets.
    get joined() {
      joined ??= piece.net
        ? joinToFit(piece as PieceFigure, grid, (part) => lieOf(part, stock, room(stock), folds) !== null)
        : null;
      return joined;
    },
  };
}
