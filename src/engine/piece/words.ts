import { areaOf } from '../net';
import type { Net, PieceFigure, Sentence } from '../types';
import { figureMaker } from './figure';
import { gridWords } from './grid-words';
import { layerWords } from './layer-words';
import type { Said } from './line-words';
import { makingOf, type Making } from './making';
import { shapeWords } from './shape-words';

export type WordsOptions = Said & Making;

const known = new WeakMap<Net, readonly Sentence[]>();

/**
 * The making of a piece in words, as a maker says it: the blank, the scores read from one edge (twice the same from both
 * ends is said once), what is cut away, slits, tapers, teeth, arcs, rounded corners, notches and slots. Enough to draw the
 * piece again without a picture: places are told across from the left edge of the blank and down from its top edge.
 */
export function instructionsOf({ net }: Pick<PieceFigure, 'net'>): readonly Sentence[] {
  const told = known.get(net);
  if (told) return told;
  const making = makingOf(net);
  if (!making) throw new Error('The instructions of a piece need the net that the model made.');
  const { def, grid, step, thickness } = making;
  const options: WordsOptions = { ...making, net, figure: figureMaker(step, thickness) };
  const sentences = withSigns([
    blank(options),
    ...(grid ? gridWords({ ...options, grid }) : shapeWords(options)),
    ...layerWords(options),
    ...folding(options),
    ...(def.remarks ?? []).map((remark) => [remark]),
  ]);
  known.set(net, sentences);
  return sentences;
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
