import { describe, expect, it } from 'vitest';
import { answersTo } from '@/features/projects/project';
import { placesOf } from '@/features/workroom/desk/find/desk-places';
import { DESK_KEYS, WRITING_KEYS } from '@/features/workroom/desk/find/desk-keys';
import { editorKeys } from '@/writeup/editor/editor-keys';
import type { BlockNode } from '@/writeup/document';
import { patternOf } from '../engine/patterns';

const step = (title: string): BlockNode => ({
  type: 'step',
  attrs: { title, mark: '' },
  content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Cut it.' }] }],
});
const between: BlockNode = { type: 'paragraph', content: [{ type: 'text', text: 'In between.' }] };

describe('the places of a desk', () => {
  const places = placesOf({
    pattern: patternOf('tray'),
    writeUp: { version: 1, doc: { type: 'doc', content: [step('The tray'), between, step('')] } },
  });
  it('are every measure, choice, fit, piece and step, each with what it is', () => {
    const { measures, choices, fits, pieces } = patternOf('tray');
    expect(places).toHaveLength(measures.length + choices.length + fits.length + pieces.length + 2);
    expect(places.find(({ label }) => label === 'inside length')).toEqual({
      label: 'inside length',
      what: 'asked measure',
      place: { column: 'measures', name: 'inside length', label: 'Measures · inside length' },
    });
    expect(places.find(({ label }) => label === 'Tray')?.place.column).toBe('pieces');
  });
  it('count steps as the write-up does, and find one without a title too', () => {
    expect(places.slice(-2).map(({ label, what, place }) => [label, what, place.step])).toEqual([
      ['The tray', 'step 1', 1],
      ['No title yet', 'step 2', 2],
    ]);
  });
  it('answer to the first letters of their words, in any order and without accents', () => {
    const found = (query: string) => places.filter(({ label, what }) => answersTo(`${label} ${what}`, query));
    expect(found('len ins').map(({ label }) => label)).toEqual(['inside length']);
    expect(found('STEP 2').map(({ label }) => label)).toEqual(['No title yet']);
    expect(found('nside')).toEqual([]);
    expect(answersTo('Côté intérieur', 'cote int')).toBe(true);
  });
});

it('gives no key of the desk two meanings', () => {
  const keys = [...DESK_KEYS, ...WRITING_KEYS, ...editorKeys()].flatMap(({ keys }) => keys.split(/, (?:or type )?/));
  expect(keys.length).toBeGreaterThan(15);
  expect(keys.filter((key, index) => keys.indexOf(key) !== index)).toEqual([]);
});
