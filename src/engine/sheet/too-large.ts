import { snap } from '../measure';
import type { Net } from '../types';
import { lieOf, type Folds } from './grain';
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
}

export function tooLargeOf(
  piece: { readonly name: string; readonly across: number; readonly along: number; readonly net?: Pick<Net, 'folds'> },
  stock: Stock,
  margin: number,
  folds: Folds,
): TooLarge {
  const room = (of: Stock) => ({ across: snap(of.across - 2 * margin), along: snap(of.along - 2 * margin) });
  const fits = Object.values(STOCKS)
    .filter((known) => lieOf(piece, known, room(known), folds) !== null)
    .sort((a, b) => a.across * a.along - b.across * b.along);
  return { name: piece.name, across: piece.across, along: piece.along, stock, room: room(stock), fits };
}
