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
    const { mm, bare = false, cards = 0, signed = false } = part;
    const shown = show(mm, { ...options, bare });
    // Nothing and a card's thickness is a card's thickness.
    const alone = isZero(mm) ? CARDS[cards] : undefined;
    const spoken = alone ?? shown.spoken + cardsInWords(cards);
    if (signed) {
      const number = show(mm, { ...options, bare: true });
      const sign = signs(cards);
      return {
        text: number.text + sign + shown.text.slice(number.text.length),
        typeset: number.typeset + sign + shown.typeset.slice(number.typeset.length),
        spoken,
        figure: true,
      };
    }
    if (alone) return { text: alone, typeset: alone, spoken, figure: true };
    return {
      text: shown.text + cardsInWords(cards),
      typeset: shown.typeset + cardsInWords(cards),
      spoken,
      figure: true,
    };
  });
}
const cardsInWords = (cards: number): string =>
  cards === 0 ? '' : `${cards > 0 ? ' plus ' : ' less '}${CARDS[Math.abs(cards)] ?? ''}`;
/** A sign for each card thickness that no ruler shows. */
const signs = (cards: number): string => (cards > 0 ? '+' : '−').repeat(Math.abs(cards));
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
  return { text, spoken, typeset: typeset + signs(cards) };
}
