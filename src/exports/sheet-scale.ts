import type { PieceFigure } from '@/engine';

const SCALES = [1, 2, 3, 4, 5, 6, 8, 10, 12, 15, 20, 30] as const;

export interface SheetScale {
  /** Drawing units for a millimetre. */
  readonly units: number;
  /** `1 : 4` */
  readonly words: string;
}
export interface ScaleRoom {
  /** Drawing units in a millimetre at true size. */
  readonly perMm: number;
  /** The widest and tallest that a piece may be drawn, in drawing units, without its dimensions. */
  readonly widest: number;
  readonly tallest: number;
}

/** One scale for all pieces of a sheet: the largest plain one at which the largest piece still fits. */
export function sheetScale(
  pieces: readonly Pick<PieceFigure, 'across' | 'along'>[],
  { perMm, widest, tallest }: ScaleRoom,
): SheetScale {
  const across = Math.max(1, ...pieces.map((piece) => piece.across)) * perMm;
  const along = Math.max(1, ...pieces.map((piece) => piece.along)) * perMm;
  const by = SCALES.find((scale) => across / scale <= widest && along / scale <= tallest) ?? 40;
  return { units: perMm / by, words: `1 : ${by}` };
}
