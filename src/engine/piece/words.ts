import { areaOf } from '../net';
import type { PieceHead, PieceFigure, Sentence } from '../types';
import type { GridPiece } from './grid';
import { gridWords } from './grid-words';
import { layerWords } from './layer-words';
import type { Said } from './line-words';
import { shapeWords } from './shape-words';

export interface WordsOptions extends Said {
  /** The worked-out grid; null for pieces of the other builders. */
  readonly grid: GridPiece | null;
  readonly def: PieceHead;
  /** A layer's faces and margin, and how many are cut. */
  readonly layer?: PieceFigure['layer'];
  readonly count?: number;
  /** Positions of scores from the left and from the top edge. */
  readonly scores: { readonly across: readonly number[]; readonly along: readonly number[] };
}

/**
 * The making of a piece in words, as a maker says it: the blank, the scores read from one edge (twice the same from both
 * ends is said once), what is cut away, slits, tapers, teeth, arcs, rounded corners, notches and slots. Enough to draw the
 * piece again without a picture: places are told across from the left edge of the blank and down from its top edge.
 */
export function makingOf(options: WordsOptions): readonly Sentence[] {
  const { def, grid } = options;
  return withSigns([
    blank(options),
    ...(grid ? gridWords({ ...options, grid }) : shapeWords(options)),
    ...layerWords(options),
    ...folding(options),
    ...(def.remarks ?? []).map((remark) => [remark]),
  ]);
}

/** More figures than these with card thicknesses are written with signs. */
const MOST_IN_WORDS = 4;
function withSigns(sentences: readonly Sentence[]): readonly Sentence[] {
  const stepped = (part: Sentence[number]) => typeof part !== 'string' && part.cards !== undefined;
  if (sentences.flat().filter(stepped).length <= MOST_IN_WORDS) return sentences;
  const signed = sentences.map(
    (sentence): Sentence =>
      sentence.map((part) => (typeof part !== 'string' && part.cards !== undefined ? { ...part, signed: true } : part)),
  );
  return [...signed.slice(0, 1), ['Each + is a card’s thickness more, each − one less.'], ...signed.slice(1)];
}

function blank({ net, def, figure }: WordsOptions): Sentence {
  const from = def.builder === 'layer' ? ` from ${def.stock}.` : '.';
  return ['Cut ', figure(net.across, true), ' × ', figure(net.along), from];
}

function folding({ net }: WordsOptions): Sentence[] {
  if ([...net.folds, ...net.creases].some(({ kind }) => kind === 'mountain'))
    return [['Fold the mountain folds away from you, all others towards you.']];
  return net.folds.some((fold) => fold.angle !== 0) && areaOf(net.outline) > 0
    ? [['Fold every score towards you and burnish it.']]
    : [];
}
