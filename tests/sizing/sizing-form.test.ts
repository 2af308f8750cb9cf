import { expect, test } from 'vitest';
import { compilePattern, type Model, type Sizing } from '@/engine';
import { FROM, isSizingForm, parameterName, readSizingForm } from '@/features/sizing/sizing-form';
import { readSizing, writeSizing } from '@/features/sizing/sizing-link';
import { FOLDER } from '../server/published-project';

const compiled = compilePattern({
  ...FOLDER,
  measures: [
    ...FOLDER.measures,
    { name: 'flap', ask: { question: 'How deep is the flap?', usual: 'inside height / 3', from: '1 in', to: '4 in' } },
  ],
  choices: [{ name: 'corners', question: 'Which corners?', options: ['square', 'rounded'], usual: 'square' }],
});
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model: Model = compiled.value;
const usual: Sizing = { values: {}, choices: { corners: 'square' }, units: 'in', grid: '1/16in' };
const INCHES = { 'inside-width': '4', 'inside-height': '6', flap: '2' };

/** What a browser sends when the form drawn at `from` is sent with these fields. */
const send = (fields: Record<string, string>, from: Sizing = usual) =>
  readSizingForm(
    model,
    new URLSearchParams({ [FROM]: writeSizing(model, from, usual).replace(/^\?/, ''), ...fields }),
    usual,
  );

test('the names of fields are those of links', () => {
  expect(parameterName('Inside  Width')).toBe('inside-width');
  const link = writeSizing(model, { ...usual, values: { 'inside width': 127 } }, usual);
  expect(new URLSearchParams(link).get('inside-width')).not.toBeNull();
  expect(isSizingForm(new URLSearchParams(link))).toBe(false);
});

test('a form sent unchanged changes nothing and sets nothing', () => {
  expect(send(INCHES)).toEqual({ sizing: usual, typed: {} });
});

test('one changed field is read and the others stay unset, so that usual values go on following', () => {
  expect(send({ ...INCHES, 'inside-width': '5 3/8' }).sizing.values).toEqual({ 'inside width': 136.525 });
  expect(send({ ...INCHES, 'inside-width': 'five and three eighths' }).sizing.values).toEqual({
    'inside width': 136.525,
  });
  expect(send({ ...INCHES, 'inside-width': '136 mm' }).sizing.values).toEqual({ 'inside width': 136 });
});

test('a value that its field can only show roughly keeps its exact size', () => {
  // 150 mm is 5.9055 in; the nearest sixty-fourth that the field shows is 5 29/32 in, which is 150.01875 mm.
  const metric: Sizing = { ...usual, values: { 'inside width': 150 } };
  const { sizing } = send({ 'inside-width': '5 29/32', 'inside-height': '7', flap: '2' }, metric);
  expect(sizing.values).toEqual({ 'inside width': 150, 'inside height': 177.8 });
});

test('other units do not change the size, and take their own cut grid', () => {
  expect(send({ ...INCHES, units: 'mm' }).sizing).toEqual({ ...usual, units: 'mm', grid: '1mm' });
});

test('a bare number typed beside "in" is inches, also when millimetres are chosen in the same go', () => {
  expect(send({ ...INCHES, 'inside-width': '5', units: 'mm' }).sizing.values).toEqual({ 'inside width': 127 });
});

test('a field left empty takes the usual value back', () => {
  const set: Sizing = { ...usual, values: { flap: 76.2 } };
  expect(send({ ...INCHES, flap: '' }, set).sizing.values).toEqual({});
});

test('a field that does not read keeps what was typed, with a sentence; the others are taken', () => {
  const { sizing, typed } = send({ 'inside-width': '5', 'inside-height': 'tall', flap: '2' });
  expect(sizing.values).toEqual({ 'inside width': 127 });
  expect(typed['inside height']?.text).toBe('tall');
  expect(typed['inside height']?.sentence).toBe(
    '“tall” does not read as a length. Write it like 5 3/8 in, 5.375 in, 136 mm or 13.6 cm.',
  );
});

test('choices and cut grid are taken when they exist and left alone when they do not', () => {
  expect(send({ ...INCHES, corners: 'rounded', cut: '1/8in' }).sizing).toMatchObject({
    choices: { corners: 'rounded' },
    grid: '1/8in',
  });
  expect(send({ ...INCHES, corners: 'wavy', cut: '1mm' }).sizing).toMatchObject({
    choices: { corners: 'square' },
    grid: '1/16in',
  });
});

test('what the form makes of it survives a link', () => {
  const { sizing } = send({ ...INCHES, 'inside-width': '5 3/8', units: 'mm', corners: 'rounded' });
  const link = new URLSearchParams(writeSizing(model, sizing, usual));
  expect(readSizing(model, link, usual)).toEqual({ sizing, faults: [] });
});
