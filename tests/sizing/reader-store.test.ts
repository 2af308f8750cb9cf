import { expect, test } from 'vitest';
import { compilePattern, evaluate, type Model, type Sizing } from '@/engine';
import { createReaderStore, inUnits, onWholeSteps } from '@/features/sizing/reader-store';
import { USUAL_CUT_FROM } from '@/features/sheets/cut-from';
import { FOLDER } from '../server/published-project';

const compiled = compilePattern(FOLDER);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model: Model = compiled.value;
const authors: Sizing = { values: {}, choices: {}, units: 'in', grid: '1/16in' };
const start = () => createReaderStore(model, { sizing: authors, authors, cutFrom: USUAL_CUT_FROM });
const shownHeight = (store: ReturnType<typeof start>) =>
  store.$state.get().verdict.shown.measures.find(({ name }) => name === 'inside height')?.exact;

test('what is typed is asked for, in whatever way it is written', () => {
  const store = start();
  store.type('inside height', '7⅜');
  expect(shownHeight(store)).toBe(187.325);
  store.type('inside height', '180 mm');
  expect(shownHeight(store)).toBe(180);
  store.type('inside height', 'seven and a half');
  expect(shownHeight(store)).toBe(190.5);
});

test('what does not read keeps the figures and is remembered with a sentence until it reads', () => {
  const store = start();
  store.type('inside height', 'seven-ish');
  expect(shownHeight(store)).toBe(152.4);
  expect(store.$state.get().typed['inside height']?.text).toBe('seven-ish');
  store.units('mm');
  expect(store.$state.get().typed['inside height']?.text).toBe('seven-ish');
  store.type('inside height', '170');
  expect(store.$state.get().typed).toEqual({});
  expect(shownHeight(store)).toBe(170);
});

test('a size that cannot be made leaves the last good one on the page, and the next good one takes over', () => {
  const store = start();
  store.type('inside height', '7');
  // 4 in wide stands up to 8 in.
  store.set('inside height', 9 * 25.4);
  expect(store.$state.get().verdict.good).toBe(false);
  expect(shownHeight(store)).toBe(177.8);
  store.set('inside width', 5 * 25.4);
  expect(store.$state.get().verdict.good).toBe(true);
  expect(shownHeight(store)).toBe(228.6);
});

test('an empty field takes the usual value back', () => {
  const store = start();
  store.type('inside height', '7');
  store.type('inside height', ' ');
  expect(shownHeight(store)).toBe(152.4);
  expect(store.$state.get().verdict.asked.values).toEqual({});
});

test('half-typed figures count only when they read and can be made', () => {
  const store = start();
  expect(store.wouldWork('inside height', '7')).toBe(true);
  expect(store.wouldWork('inside height', '7 3/')).toBe(false);
  expect(store.wouldWork('inside height', '70')).toBe(false);
  expect(shownHeight(store)).toBe(152.4);
});

test('units never change the size, and bring their own cut grid when the old one is not theirs', () => {
  const mm = inUnits({ ...authors, values: { 'inside height': 228.6 } }, 'mm');
  expect(mm).toMatchObject({ values: { 'inside height': 228.6 }, units: 'mm', grid: '1mm' });
  expect(inUnits({ ...mm, grid: '0.5mm' }, 'cm').grid).toBe('0.5mm');
});

test('whole millimetres are offered for sizes in inches, and nothing for a size that has them', () => {
  const sizing: Sizing = {
    values: { 'inside height': 152.4, 'inside width': 101.6 },
    choices: {},
    units: 'mm',
    grid: '1mm',
  };
  const moved = onWholeSteps(model, sizing, evaluate(model, sizing));
  expect(moved?.values).toEqual({ 'inside height': 152, 'inside width': 102 });
  expect(moved && onWholeSteps(model, moved, evaluate(model, moved))).toBeNull();
});
