import type { Net, PieceFigure, PieceHead } from '../types';
import type { GridPiece } from './grid';

/** What the making of a piece is told from, beside its net. */
export interface Making {
  /** The worked-out grid; null for pieces of the other builders. */
  readonly grid: GridPiece | null;
  readonly def: PieceHead;
  /** A layer's faces and margin, and how many are cut. */
  readonly layer?: PieceFigure['layer'];
  readonly count?: number;
  /** Positions of scores from the left and from the top edge. */
  readonly scores: PieceFigure['scores'];
  /** Of the cut grid, and of the card: figures are what a ruler shows, and cards. */
  readonly step: number;
  readonly thickness: number;
}

/** Kept with the net, apart from the words: what works out sizes need not be able to speak. */
const makings = new WeakMap<Net, Making>();
export const keepMaking = (net: Net, making: Making): void => void makings.set(net, making);
export const makingOf = (net: Net): Making | undefined => makings.get(net);
