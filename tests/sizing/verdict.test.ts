import { expect, test } from 'vitest';
import { compilePattern, type Model, type Sizing } from '@/engine';
import { judge } from '@/features/sizing/verdict';
import { FOLDER } from '../server/published-project';

const INCH = 25.4;
const compiled = compilePattern(FOLDER);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model: Model = compiled.value;
const authors: Sizing = { values: {}, choices: {}, units: 'in', grid: '1/16in' };
const tall = (inches: number): Sizing => ({ ...authors, values: { 'inside height': inches * INCH } });
const heightOf = (figures: { measures: readonly { name: string; exact: number }[] }) =>
  figures.measures.find(({ name }) => name === 'inside height')?.exact;

test('a size that can be made is shown as it is asked', () => {
  const verdict = judge(model, tall(7), authors);
  expect(verdict.good).toBe(true);
  expect(heightOf(verdict.shown)).toBe(177.8);
  expect(verdict.refusals).toEqual([]);
});

test('a size whose fit fails keeps the last good figures and offers the nearest that works and the way back', () => {
  // 4 in wide: it stands up to twice that, 8 in.
  const verdict = judge(model, tall(9), authors);
  expect(verdict.good).toBe(false);
  expect(heightOf(verdict.figures)).toBe(228.6);
  expect(heightOf(verdict.shown)).toBe(152.4);
  expect(verdict.refusals.map(({ problem }) => [problem.code, problem.measure])).toEqual([
    ['fit fails', 'inside height'],
  ]);
  expect(verdict.refusals[0]?.cures.map(({ label }) => label)).toEqual(['Use 8\u00a0in', 'Back to 6\u00a0in']);
  expect(verdict.refusals[0]?.cures[0]?.sizing.values).toEqual({ 'inside height': 203.2 });
});

test('without a last good size the nearest that works is shown', () => {
  const verdict = judge(model, tall(9), authors, { nearest: true });
  expect(verdict.instead).toBe('nearest');
  expect(heightOf(verdict.shown)).toBe(203.2);
});

test('a size outside its range says which measure and the end of the range', () => {
  const verdict = judge(model, { ...authors, values: { 'inside width': 9 * INCH } }, authors, { nearest: true });
  expect(verdict.refusals.map(({ problem }) => [problem.code, problem.measure, problem.nearest])).toEqual([
    ['above range', 'inside width', 203.2],
  ]);
  expect(verdict.shown.problems).toEqual([]);
});

test('several measures out of range are mended one after the other', () => {
  const asked = { ...authors, values: { 'inside width': INCH, 'inside height': 12 * INCH } };
  const { shown, refusals } = judge(model, asked, authors, { nearest: true });
  expect(refusals.length).toBeGreaterThan(1);
  expect(shown.problems).toEqual([]);
});

test('figures shown instead are in the units and on the cut grid that were asked for', () => {
  const { shown } = judge(model, { ...tall(9), units: 'mm', grid: '1mm' }, authors);
  expect([shown.sizing.units, shown.sizing.grid]).toEqual(['mm', '1mm']);
  expect(heightOf(shown)).toBe(152.4);
});
