import type { Figures, PieceFigure, SheetPlan } from '@/engine';

/**
 * The pieces as they come out of a plan's sheets: counted for all its boxes, and two parts where a piece is joined. The
 * folded box is drawn from the figures as they were: a part alone folds to nothing.
 */
export function figuresAsCut(figures: Figures, { copies, joined }: Pick<SheetPlan, 'copies' | 'joined'>): Figures {
  if (copies === 1 && joined.length === 0) return figures;
  const partsOf = new Map(joined.map(({ name, parts }) => [name, parts]));
  return {
    ...figures,
    pieces: figures.pieces
      .flatMap((piece) => partsOf.get(piece.name) ?? [piece])
      .map((piece) => (copies === 1 ? piece : counted(piece, piece.count * copies))),
  };
}

/** Not spread: what a piece says of its making is worked out when it is asked for. */
const counted = (piece: PieceFigure, count: number): PieceFigure =>
  Object.create(piece, { count: { value: count, enumerable: true } }) as PieceFigure;
