import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compilePattern, type Pattern } from '@/engine';
import { drawnAt, workExample } from '@/features/examples/example';
import {
  changesWords,
  closesHtml,
  liveInside,
  pieceOf,
  troublesHtml,
  wordsHtml,
} from '@/features/examples/example-html';

function modelOf(slug: string) {
  const file = new URL(`../../content/patterns/${slug}.json`, import.meta.url);
  const compiled = compilePattern(JSON.parse(readFileSync(file, 'utf8')) as Pattern);
  if (!compiled.ok) throw new Error(slug);
  return compiled.value;
}
const tray = modelOf('tray');
const at = (query: string) => workExample(tray, new URLSearchParams(query));
/** What is seen of a figure, without what is heard. */
const seen = (html: string) => html.replace(/<span class="visually-hidden.*?<\/span>/g, '').replace(/<[^>]+>/g, '');

describe('an example', () => {
  it('is worked out for the size in the address', () => {
    // Across: 8 in and the height of 1 in on both sides.
    const example = at('inside-length=8in&inside-width=5in&inside-height=1in');
    expect(pieceOf(example, 'Tray').across).toBeCloseTo(10 * 25.4, 6);
    expect(seen(liveInside(example, 'inside length + 2 * inside height'))).toBe('10\u00a0in');
    expect(example.troubles).toEqual([]);
  });

  it('shows other units without changing the box', () => {
    expect(seen(liveInside(at('inside-length=200mm&units=mm'), 'inside length'))).toBe('200\u00a0mm');
  });

  it('reads a form the way it was drawn: a field that was not touched keeps its exact size', () => {
    const before = at('inside-length=200mm');
    // 200 mm stands in the field as inches, which are not quite 200 mm when read back.
    const field = before.panel.fields.find(({ name }) => name === 'inside length');
    const form = new URLSearchParams({ from: drawnAt(before), 'inside-length': field?.text ?? '', units: 'mm' });
    expect(workExample(tray, form).asked.values['inside length']).toBeCloseTo(200, 9);
  });

  it('keeps the last size that worked while a field does not read, and says so', () => {
    const good = at('inside-length=8in');
    const form = new URLSearchParams({ from: drawnAt(good), 'inside-length': 'long' });
    const example = workExample(tray, form, good.figures.sizing);
    expect(example.figures.sizing.values['inside length']).toBeCloseTo(203.2, 9);
    expect(example.typed).toEqual({ 'inside length': 'long' });
    expect(troublesHtml(example)).toContain('“long” does not read as a length.');
  });

  it('goes to the nearest size that works when the address asks for one that does not', () => {
    const example = at('inside-length=500in');
    const length = tray.pattern.measures.find(({ name }) => name === 'inside length');
    expect(length?.ask?.to).toBe('20 in');
    expect(example.figures.sizing.values['inside length']).toBeCloseTo(20 * 25.4, 6);
    expect(example.troubles).toHaveLength(1);
  });

  it('says whether the pieces come out of a common sheet', () => {
    expect(seen(closesHtml(at('inside-length=8in&inside-width=5in&inside-height=1in')))).toBe(
      'It closes, and its piece comes out of 1 sheet of 12 × 12 in.',
    );
    // 11 in and 1 in on both sides are 13 in: more than 12.
    expect(seen(closesHtml(at('inside-length=11in&inside-width=5in&inside-height=1in')))).toBe(
      'It closes, but Tray will not fit a 12 × 12 in sheet.',
    );
  });

  it('gives a piece its making in words, figures apart', () => {
    expect(seen(wordsHtml(at('inside-length=8in&inside-width=5in&inside-height=1in'), 'Tray'))).toMatch(
      /^Cut 10 × 7\u00a0in\. /,
    );
  });

  it('refuses a formula or a piece that the pattern does not have', () => {
    expect(() => liveInside(at(''), 'inside lenght')).toThrow(/inside length/);
    expect(() => pieceOf(at(''), 'Lid')).toThrow('tray has no piece called "Lid" at this size.');
  });
});

it('counts what a change did', () => {
  expect(changesWords(0, 0)).toBe('Nothing changed: cut to your marks, it is the same box.');
  expect(changesWords(1, 0)).toBe('Just changed: one figure.');
  expect(changesWords(3, 1)).toBe('Just changed: 3 figures and the drawing.');
});
