import { atLeast, coincident, moreThan } from '../measure';
import type { Net } from '../types';
import type { Lie } from './blanks';
import type { Stock } from './stock';

/** Card folds best along the grain; a spine that must be stiff runs across it. `either`: the grain is not heeded. */
export type Folds = 'either' | 'along the grain' | 'across the grain';

/** The way in which most of a piece's folds run, by length; null when neither has more. */
export function foldsRun({ folds }: Pick<Net, 'folds'>): 'across' | 'along' | null {
  let more = 0;
  for (const { curve, angle } of folds) {
    if (curve.type !== 'line' || angle === 0) continue;
    more += Math.abs(curve.to.x - curve.from.x) - Math.abs(curve.to.y - curve.from.y);
  }
  return coincident(more, 0) ? null : more > 0 ? 'across' : 'along';
}

/** How a piece may lie on the part of a sheet that is used; null when it fits no way that the grain allows. */
export function lieOf(
  piece: {
    readonly across: number;
    readonly along: number;
    readonly net?: Pick<Net, 'folds'>;
    readonly foldsRun?: 'across' | 'along';
  },
  { grain = 'along' }: Pick<Stock, 'grain'>,
  room: { readonly across: number; readonly along: number },
  folds: Folds,
): Lie | null {
  const runs = folds === 'either' ? null : (piece.foldsRun ?? (piece.net ? foldsRun(piece.net) : null));
  const asDrawn = runs === null || (runs === grain) === (folds === 'along the grain');
  const turned = runs === null || !asDrawn;
  const fits = (across: number, along: number) => atLeast(room.across, across) && atLeast(room.along, along);
  const ways = {
    asDrawn: asDrawn && fits(piece.across, piece.along),
    turned: turned && fits(piece.along, piece.across),
  };
  if (!moreThan(piece.across, 0) || !moreThan(piece.along, 0)) return null;
  return ways.asDrawn && ways.turned ? 'either' : ways.asDrawn ? 'as drawn' : ways.turned ? 'turned' : null;
}
