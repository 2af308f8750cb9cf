import { GRIDS, defaultGrid, isZero, show, type ShowOptions, type Shown } from '../measure';
import { figureMaker } from '../piece';
import type { Sentence } from '../types';

export interface SaidPart {
  readonly text: string;
  /** Set as a live figure: typeset and spoken forms differ. */
  readonly figure: boolean;
  readonly typeset: string;
  readonly spoken: string;
}
const CARDS: Readonly<Record<number, string>> = {
  1: 'a card’s thickness',
  2: 'two card thicknesses',
  3: 'three card thicknesses',
  4: 'four card thicknesses',
};

/** A sentence from geometry as parts, figures apart from words, in the reader's units. */
export function sayParts(sentence: Sentence, options: Pick<ShowOptions, 'units' | 'grid'>): readonly SaidPart[] {
  return sentence.map((part) => {
    if (typeof part === 'string') return { text: part, typeset: part, spoken: part, figure: false };
    const shown = show(part.mm, { ...options, ...(part.bare ? { bare: true } : {}) });
    // Nothing and a card's thickness is a card's thickness.
    const bare = isZero(part.mm) ? CARDS[part.cards ?? 0] : undefined;
    if (bare) return { text: bare, typeset: bare, spoken: bare, figure: true };
    const cards =
      part.cards === undefined ? '' : `${part.cards > 0 ? ' and ' : ' less '}${CARDS[Math.abs(part.cards)] ?? ''}`;
    return { text: shown.text + cards, typeset: shown.typeset + cards, spoken: shown.spoken + cards, figure: true };
  });
}
export const say = (sentence: Sentence, options: Pick<ShowOptions, 'units' | 'grid'>): string =>
  sayParts(sentence, options)
    .map((part) => part.text)
    .join('');

/** A position along an edge: `typeset` carries a + or − for each card thickness that no ruler shows, `text` and `spoken` say it. */
export function showPosition(mm: number, thickness: number, options: Pick<ShowOptions, 'units' | 'grid'>): Shown {
  const { mm: shown, cards = 0 } = figureMaker(GRIDS[options.grid ?? defaultGrid(options.units)].step, thickness)(mm);
  const [said] = sayParts([{ mm: shown, bare: true, ...(cards === 0 ? {} : { cards }) }], options);
  const { typeset } = show(shown, { ...options, bare: true });
  const { text, spoken } = said as SaidPart;
  return { text, spoken, typeset: typeset + (cards > 0 ? '+' : '−').repeat(Math.abs(cards)) };
}
