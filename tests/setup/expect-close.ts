import { expect } from 'vitest';

/** Within `tolerance` of each other, the tolerance being a distance and not a count of digits. NaN is close to nothing. */
export function expectClose(actual: number, expected: number, tolerance: number, what = 'value'): void {
  const off = Math.abs(actual - expected);
  expect(off <= tolerance, `${what}: ${actual} is ${off} from ${expected}, more than ${tolerance}`).toBe(true);
}
