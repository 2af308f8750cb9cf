import { describe, expect, it } from 'vitest';
import type { Loop, Point } from '@/engine';
import { selfCrossing } from '@/engine/net/crossing';

const loop = (...corners: readonly [number, number][]): Loop => {
  const points = corners.map(([x, y]): Point => ({ x, y }));
  return points.map((from, index) => ({ type: 'line', from, to: points[(index + 1) % points.length] as Point }));
};

// Derived: where the diagonals of a square meet, and so on; plain coordinates.
describe('an outline that crosses itself', () => {
  it('is found where it does: the diagonals of a square of 20 mm meet in its middle', () => {
    const found = selfCrossing(loop([0, 0], [20, 20], [20, 0], [0, 20]));
    expect([found?.x, found?.y]).toEqual([10, 10]);
  });
  it('is found when the sides that cross are far apart in the loop', () => {
    const found = selfCrossing(loop([0, 0], [40, 0], [40, 30], [30, 30], [30, -10], [20, -10], [20, 30], [0, 30]));
    expect(found).not.toBeNull();
    expect(found?.y).toBe(0);
    expect([20, 30]).toContain(found?.x);
  });
  it.each<[string, Loop]>([
    ['a square', loop([0, 0], [20, 0], [20, 20], [0, 20])],
    [
      'a comb whose teeth stand side by side',
      loop([0, 0], [50, 0], [50, 20], [40, 20], [40, 5], [10, 5], [10, 20], [0, 20]),
    ],
    ['a corner that touches a side', loop([0, 0], [20, 0], [20, 20], [10, 0], [0, 20])],
  ])('is not %s', (_, shape) => {
    expect(selfCrossing(shape)).toBeNull();
  });
});
