import type { PieceFigure } from '@/engine';

/** CSS pixels in a millimetre at true size. */
const PIXELS = 96 / 25.4;
const SCALES = [1, 2, 3, 4, 5, 6, 8, 10, 12, 15, 20] as const;
/** The tallest and widest that a piece may be drawn on a sheet of paper, in pixels, without its dimensions. */
const WIDEST = 300;
const TALLEST = 280;

export interface SheetScale {
  /** Drawing pixels for a millimetre. */
  readonly pixels: number;
  /** `1 : 4` */
  readonly words: string;
}

/** One scale for all pieces of a sheet: the largest plain one at which the largest piece still fits. */
export function sheetScale(pieces: readonly Pick<PieceFigure, 'across' | 'along'>[]): SheetScale {
  const across = Math.max(1, ...pieces.map((piece) => piece.across)) * PIXELS;
  const along = Math.max(1, ...pieces.map((piece) => piece.along)) * PIXELS;
  const by = SCALES.find((scale) => across / scale <= WIDEST && along / scale <= TALLEST) ?? 30;
  return { pixels: PIXELS / by, words: `1 : ${by}` };
}
