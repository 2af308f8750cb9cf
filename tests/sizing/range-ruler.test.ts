import { expect, test } from 'vitest';
import { rangeRuler, rangeRulerSvg } from '@/features/sizing/range-ruler';

const INCH = 25.4;
const labels = (from: number, to: number, units: 'in' | 'mm' | 'cm') =>
  rangeRuler({ from, to, kind: 'length', units }).flatMap(({ label }) => (label === undefined ? [] : [label]));

test('a range of 4 to 14 in carries figures on whole even inches, as a ruler reads', () => {
  expect(labels(4 * INCH, 14 * INCH, 'in')).toEqual(['4', '6', '8', '10', '12', '14']);
});

test('ticks stand on whole steps of the unit and not of the range', () => {
  const ticks = rangeRuler({ from: 3.375 * INCH, to: 10 * INCH, kind: 'length', units: 'in' });
  const four = ticks.find(({ label }) => label === '4');
  // 4 in lies 0.625 in into a range of 6.625 in.
  expect(four?.at).toBeCloseTo((100 * 0.625) / 6.625, 6);
});

test('the same range in millimetres has millimetres on it', () => {
  expect(labels(100, 350, 'mm')).toEqual(['100', '150', '200', '250', '300', '350']);
});

test('centimetres count tens of millimetres', () => {
  expect(labels(100, 350, 'cm')).toEqual(['10', '15', '20', '25', '30', '35']);
});

test('below an inch the figures are fractions with a fraction slash', () => {
  expect(labels(0, INCH / 2, 'in')).toContain('1\u20444');
});

test('no ruler has more than eighty-one ticks', () => {
  for (const [from, to] of [
    [0, 2],
    [1, 9],
    [25.4, 355.6],
    [0, 2000],
  ] as const) {
    for (const units of ['in', 'mm', 'cm'] as const) {
      expect(rangeRuler({ from, to, kind: 'length', units }).length).toBeLessThanOrEqual(81);
    }
  }
});

test('degrees and plain numbers are not taken for millimetres', () => {
  const ticks = rangeRuler({ from: 3, to: 12, kind: 'whole number', units: 'in' });
  expect(ticks.flatMap(({ label }) => label ?? [])).toEqual(['4', '6', '8', '10', '12']);
});

test('a range without width has no ticks', () => {
  expect(rangeRuler({ from: 5, to: 5, kind: 'length', units: 'mm' })).toEqual([]);
});

test('the drawing needs no style attribute and no text alternative of its own', () => {
  const svg = rangeRulerSvg(rangeRuler({ from: 100, to: 350, kind: 'length', units: 'mm' }));
  expect(svg).toContain('aria-hidden="true"');
  expect(svg).not.toContain('style=');
});
