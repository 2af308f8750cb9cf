import { expect, it } from 'vitest';
import { gramsPerSquareMetre } from '@/features/handbook/cover-weights';

it('turns pounds of cover stock into grams a square metre', () => {
  // 500 sheets of 20 × 26 in are 260 000 sq in = 167.7416 m²; 100 lb = 45 359.237 g; 45 359.237 ÷ 167.7416 = 270.41.
  expect(gramsPerSquareMetre(100)).toBeCloseTo(270.41, 2);
});

it('is in proportion to the pounds', () => {
  expect(gramsPerSquareMetre(65)).toBeCloseTo(0.65 * gramsPerSquareMetre(100), 9);
});
