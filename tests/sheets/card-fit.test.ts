import { expect, it } from 'vitest';
import { cardFit, cardLineHtml, type CardBlank } from '@/features/sheets/card-fit';

/** Three squares of 8 in (203.2 mm), whose folds run along: no two of them lie on a sheet of 12 × 12 in. */
const SQUARES: readonly CardBlank[] = [[203.2, 203.2, 3, 'along']];

it('takes the first of one’s sizes that is enough', () => {
  const fit = cardFit(SQUARES, [
    { card: '12x12in', count: 2 },
    { card: 'a4', count: 20 },
    { card: 'a3', count: 20 },
  ]);
  // 203.2 mm lies on A4 (210 × 297) once.
  expect(fit).toEqual({ enough: true, words: '3 of your A4 sheets' });
});

it('says what is missing where none is enough, of the size that lacks least', () => {
  expect(
    cardFit(SQUARES, [
      { card: 'a4', count: 1 },
      { card: '12x12in', count: 2 },
    ]),
  ).toEqual({ enough: false, words: 'needs 3 sheets of 12 × 12 in, you have 2' });
});

it('says that a box is too large for all of them', () => {
  expect(cardFit(SQUARES, [{ card: '6x6in', count: 99 }])).toEqual({
    enough: false,
    words: 'too large for your sheets',
  });
});

it('heeds the grain where it is known', () => {
  // 100 × 280 mm lies on A4 lengthways only; its folds run along its short side, across the long grain.
  const across: readonly CardBlank[] = [[100, 280, 1, 'across']];
  expect(cardFit(across, [{ card: 'a4', count: 1 }])?.enough).toBe(true);
  expect(cardFit(across, [{ card: 'a4-short', count: 1 }])?.enough).toBe(true);
  expect(cardFit(across, [{ card: 'a4-long', count: 1 }])?.words).toBe('too large for your sheets');
});

it('says nothing to those who have said nothing', () => {
  expect(cardFit(SQUARES, [])).toBeNull();
});

it('is one line that begins with a capital', () => {
  expect(cardLineHtml({ enough: false, words: 'needs <3>' })).toMatch(/<\/svg> Needs &lt;3&gt;$/);
});
