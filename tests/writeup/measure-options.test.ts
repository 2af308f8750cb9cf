import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, usualSizing, type Pattern } from '@/engine';
import { measureOptions } from '@/writeup/editor/measure-options';

const measures: Pattern['measures'] = [
  { name: 'inside width', ask: { question: 'How wide?', usual: '6 in', from: '1 in', to: '12 in' } },
  { name: 'inside depth', ask: { question: 'How deep?', usual: '2 1/4 in', from: '1 in', to: '6 in' } },
  { name: 'tab', ask: { question: 'How wide is a tab?', usual: '1/2 in', from: '1/4 in', to: '1 in' } },
  { name: 'arc', formula: 'inside depth + 1/8 in' },
  { name: 'arc rise', formula: 'tab / 2' },
  { name: 'floor across', formula: 'inside depth + 2 * tab' },
];
const pattern: Pattern = {
  format: 1,
  slug: 'strip',
  name: 'Strip',
  summary: 'A strip.',
  group: 'Trays',
  measures,
  choices: [],
  pieces: [
    {
      name: 'Strip',
      stock: 'card',
      builder: 'grid',
      columns: [{ name: 'middle', size: 'inside width' }],
      rows: [{ name: 'row', size: '2 in' }],
      cells: [['panel middle']],
    },
  ],
  fits: [],
  finished: { inside: [], outside: [] },
  order: [],
  assembly: [{ piece: 'Strip', root: 'middle', at: ['0 in', '0 in', '0 in'], across: '+x', along: '-y' }],
};
const compiled = compilePattern(pattern);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const live = { model: compiled.value, figures: evaluate(compiled.value, usualSizing(compiled.value)) };
const found = (typed: string, bare = false) =>
  measureOptions(live, typed, bare).options.map(({ formula, completes }) => completes ?? formula);

describe('the measure field', () => {
  it('offers every measure before anything is typed, with its figure as the reader sees it', () => {
    const { options, fault } = measureOptions(live, '', false);
    expect(fault).toBeNull();
    expect(options.map(({ formula, shown, is }) => `${formula}: ${shown} ${is}`)).toEqual([
      'inside width: 6\u00a0in asked',
      'inside depth: 2\u202f1\u20444\u00a0in asked',
      'tab: 1\u20442\u00a0in asked',
      'arc: 2\u202f3\u20448\u00a0in worked',
      'arc rise: 1\u20444\u00a0in worked',
      'floor across: 3\u202f1\u20444\u00a0in worked',
    ]);
  });

  it('shows figures without their unit when that is asked for', () => {
    expect(measureOptions(live, 'tab', true).options[0]?.shown).toBe('1\u20442');
  });

  it('finds a name by its beginning, by a word in it and by words in any order; the name itself comes first', () => {
    expect(found('ins')).toEqual(['inside width', 'inside depth']);
    expect(found('depth')).toEqual(['inside depth']);
    expect(found('depth ins')).toEqual(['inside depth']);
    expect(found('arc')).toEqual(['arc', 'arc rise']);
    expect(found('ARC RISE')).toEqual(['arc rise']);
  });

  it('finds the measure that has a figure, and offers the figure itself last', () => {
    expect(found('2 3/8')[0]).toBe('arc');
    expect(found('2 3/8 in')).toEqual(['arc', '2 3/8 in']);
  });

  it('takes a formula that reads, with its figure', () => {
    expect(measureOptions(live, 'arc + 2 * tab', false).options[0]).toEqual({
      formula: 'arc + 2 * tab',
      shown: '3\u202f3\u20448\u00a0in',
      is: 'formula',
    });
  });

  it('goes on from the last word of a formula', () => {
    expect(found('inside width + ar')).toEqual(['inside width + arc', 'inside width + arc rise']);
    expect(found('2 * (ta')).toEqual(['2 * (tab']);
  });

  it('says what does not read and where, when no name holds it', () => {
    const { options, fault } = measureOptions(live, 'arc + 2 * tabs', false);
    expect(options).toEqual([]);
    expect(fault).toMatchObject({ span: { from: 10, to: 14 }, cure: 'tab' });
    expect(measureOptions(live, 'ins', false).fault).toBeNull();
  });
});
