import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compileLive, compilePattern, evaluate, explain, usualSizing, type Pattern } from '@/engine';

/** What a guide's source names, checked without rendering it: a slip in a formula would be found by a reader otherwise. */
const folder = new URL('../../content/handbook/', import.meta.url);
const guides = readdirSync(folder)
  .filter((name) => name.endsWith('.mdx'))
  .map((name) => ({ name, text: readFileSync(new URL(name, folder), 'utf8') }));

const all = (text: string, pattern: RegExp) => [...text.matchAll(pattern)].map(([, found]) => found ?? '');
const one = (text: string, pattern: RegExp) => pattern.exec(text)?.[1] ?? '';

function modelOf(slug: string) {
  const file = new URL(`../../content/patterns/${slug}.json`, import.meta.url);
  const compiled = compilePattern(JSON.parse(readFileSync(file, 'utf8')) as Pattern);
  if (!compiled.ok) throw new Error(compiled.faults.map(explain).join('\n'));
  return compiled.value;
}

it('has at least three guides, in an order without ties', () => {
  const orders = guides.map(({ text }) => one(text, /^order: (\d+)$/m));
  expect(guides.length).toBeGreaterThanOrEqual(3);
  expect(new Set(orders).size).toBe(guides.length);
});

describe.each(guides)('$name', ({ text }) => {
  const model = modelOf(one(text, /^pattern: (\S+)$/m));
  const figures = evaluate(model, usualSizing(model));

  it('places only formulas that read', () => {
    const faults = all(text, /<Live formula="([^"]+)"/g).flatMap((formula) => {
      const live = compileLive(model, formula);
      return live.ok ? [] : live.faults.map(explain);
    });
    expect(faults).toEqual([]);
  });

  it('draws only pieces of its pattern', () => {
    const named = [one(text, /^piece: (.+)$/m), ...all(text, /<Piece(?:Drawing|Words) piece="([^"]+)"/g)];
    const known = figures.pieces.map(({ name }) => name);
    expect(named.filter((name) => !known.includes(name))).toEqual([]);
  });

  it('asks only for measures that its pattern asks for', () => {
    const asked = model.pattern.measures.filter(({ ask }) => ask).map(({ name }) => name);
    const named = one(text, /^ask: \[(.+)\]$/m).split(', ');
    expect(named.filter((name) => !asked.includes(name))).toEqual([]);
  });
});
