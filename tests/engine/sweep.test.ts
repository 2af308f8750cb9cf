import { describe, expect, it } from 'vitest';
import {
  around,
  compilePattern,
  evaluate,
  keyOf,
  largest,
  planSheets,
  sweep,
  usualSizing,
  type Pattern,
  type Sizing,
} from '@/engine';
import { SLUGS, inch, modelOf, patternOf } from './patterns';

describe('sweep', () => {
  it.each(SLUGS)('finds nothing that fails at the corners and edges of the range of %s', (slug) => {
    const model = modelOf(slug);
    for (const grid of ['1/16in', '1mm'] as const) {
      const found = sweep(model, usualSizing(model, grid === '1mm' ? 'mm' : 'in', grid), { count: 80 });
      expect(found.first, JSON.stringify(found.first)).toBeNull();
    }
  });
  it.each(SLUGS)('finds nothing that fails with any choice in %s, in decorative layers', (slug) => {
    const model = modelOf(slug);
    const usual = usualSizing(model, 'mm', '1mm');
    for (const { name, options } of model.pattern.choices)
      for (const option of options) {
        const choices = { ...usual.choices, layers: 'every outer face', [keyOf(name)]: option };
        const found = sweep(model, { ...usual, choices }, { count: 80, seed: 5 });
        expect(found.first, JSON.stringify(found.first)).toBeNull();
      }
  });
  it('names the first failing sizing and the range that works', () => {
    const pattern: Pattern = {
      ...patternOf('tray'),
      fits: [
        {
          name: 'low enough',
          left: 'inside height',
          is: 'at most',
          right: '2 in',
          otherwise: 'it is too tall.',
          change: ['inside height'],
        },
      ],
    };
    const model = compilePattern(pattern);
    if (!model.ok) throw new Error('compiles');
    const found = sweep(model.value, usualSizing(model.value), { count: 400 });
    expect(found.first?.problem.sentence).toBe('Low enough fails: it is too tall.');
    expect(found.failing).toBeGreaterThan(100);
    // Up to 2 in, and what rounds down to it: half of a sixteenth more.
    expect(found.works['inside height']?.to).toBeLessThanOrEqual(inch(2 + 1 / 32));
  });
  it('gives the same answer for the same seed', () => {
    const model = modelOf('lidded-box');
    expect(sweep(model, usualSizing(model), { count: 50, seed: 3 })).toEqual(
      sweep(model, usualSizing(model), { count: 50, seed: 3 }),
    );
  });
});

describe('around', () => {
  const model = modelOf('book-box');
  const base = usualSizing(model);
  it('adds the ease on every side: 8 × 6 × 1 3/4 in with 1/8 in makes 8 1/4 × 6 1/4 × 2', () => {
    const solved = around(model, base, [inch(8), inch(6), inch(1.75)], inch(0.125));
    expect(solved.ok && solved.sizing.values).toEqual({
      'inside height': inch(8.25),
      'inside width': inch(6.25),
      'inside depth': inch(2),
    });
  });
  it('never comes out smaller than the thing once cut', () => {
    const solved = around(model, { ...base, units: 'mm', grid: '1mm' }, [200.3, 150.2, 55.1], 0.5);
    if (!solved.ok) throw new Error(solved.reason);
    const inside = evaluate(model, solved.sizing).finished.inside.map(({ mm }) => mm);
    expect(inside).toEqual([202, 152, 57]); // 201.3, 151.2 and 56.1, up
  });
  it('says why nothing fits', () => {
    expect(around(model, base, [inch(40), inch(6), inch(2)], 0)).toEqual({
      ok: false,
      reason: 'Inside height is 40 in; here it can be at most 14 in.',
    });
    expect(around(model, base, [inch(8), inch(6)], 0)).toEqual({
      ok: false,
      reason: 'a thing has 3 sizes, each more than nothing: tall, wide, deep',
    });
  });
});

describe('largest', () => {
  const model = modelOf('tray');
  const base = usualSizing(model);
  const fitsOn = (sheets: number) => (sizing: Sizing) => {
    const plan = planSheets(evaluate(model, sizing), { stock: '12x12in', tries: 2 });
    return plan.tooLarge.length === 0 && plan.used <= sheets;
  };
  it('grows a tray until its blank is as long as the sheet', () => {
    const solved = largest(model, base, fitsOn(1));
    if (!solved.ok) throw new Error(solved.reason);
    const { across } = evaluate(model, solved.sizing).pieces[0] ?? { across: 0 };
    // The usual tray is 9 × 6 × 1 1/4 in: its blank of 11 1/2 in grows by 12 / 11.5 to at most 12 in, and each size goes down
    // to a sixteenth: at most three sixteenths are lost.
    expect(across).toBeLessThanOrEqual(inch(12));
    expect(across).toBeGreaterThanOrEqual(inch(12 - 3 / 16));
  });
  it('says so when not even the smallest fits', () => {
    expect(largest(model, base, () => false).ok).toBe(false);
  });
});
