import { expect, it } from 'vitest';
import { shelfScale } from '@/features/home/shelf-scale';

const place = { across: 200, up: 100 };

it('lets the widest picture decide when it is the one that would not fit', () => {
  // 200 px ÷ 400 mm = 0.5; the tallest would allow 100 ÷ 50 = 2.
  expect(
    shelfScale(
      [
        { across: 400, up: 50 },
        { across: 10, up: 10 },
      ],
      place,
    ),
  ).toBe(0.5);
});

it('lets the tallest picture decide when it is the one that would not fit', () => {
  // 100 px ÷ 250 mm = 0.4; the widest would allow 200 ÷ 100 = 2.
  expect(
    shelfScale(
      [
        { across: 100, up: 250 },
        { across: 20, up: 20 },
      ],
      place,
    ),
  ).toBe(0.4);
});

it('is 1 when there is nothing to draw', () => {
  expect(shelfScale([], place)).toBe(1);
  expect(shelfScale([{ across: 0, up: 0 }], place)).toBe(1);
});
