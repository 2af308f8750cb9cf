import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, openModel, sealModel, usualSizing, type Pattern } from '@/engine';
import { conditionFault, holds, inlinesShown, numberSteps } from '@/writeup/condition';
import type { BlockNode, DocNode, InlineNode, StepNode } from '@/writeup/document';
import { renderWriteUp } from '@/writeup/render';
import { formulasToSeal } from '@/writeup/uses';

/** A strip with a choice: its end is round or square. */
const STRIP: Pattern = {
  format: 1,
  slug: 'strip',
  name: 'Strip',
  summary: 'A strip.',
  group: 'Trays and lidded boxes',
  measures: [{ name: 'width', ask: { question: 'How wide?', usual: '6 in', from: '1 in', to: '12 in' } }],
  choices: [{ name: 'end', question: 'Which end?', options: ['round', 'square'], usual: 'round' }],
  pieces: [
    {
      name: 'Strip',
      stock: 'card',
      builder: 'grid',
      columns: [{ name: 'middle', size: 'width' }],
      rows: [{ name: 'row', size: '2 in' }],
      cells: [['panel middle']],
    },
  ],
  fits: [],
  finished: { inside: [], outside: [] },
  order: [],
  assembly: [],
};
const compiled = compilePattern(STRIP);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model = compiled.value;
const at = (end: 'round' | 'square', width?: number) => ({
  model,
  figures: evaluate(model, {
    ...usualSizing(model),
    choices: { end },
    values: width === undefined ? {} : { width },
  }),
});

const text = (words: string, when = ''): InlineNode => ({
  type: 'text',
  text: words,
  ...(when === '' ? {} : { marks: [{ type: 'onlyWhen', attrs: { when } }] }),
});
const p = (...content: InlineNode[]): BlockNode => ({ type: 'paragraph', content });
const ref = (key: string): InlineNode => ({ type: 'stepRef', attrs: { key } });
const step = (title: string, attrs: Partial<StepNode['attrs']>, ...content: BlockNode[]): StepNode => ({
  type: 'step',
  attrs: { title, mark: '', ...attrs },
  content: content.length > 0 ? content : [p(text('Do it.'))],
});
const doc = (...content: BlockNode[]): DocNode => ({ type: 'doc', content });

describe('a condition', () => {
  it('holds by the choices and the size', () => {
    expect(holds(at('round'), 'end is round')).toBe(true);
    expect(holds(at('square'), 'end is round')).toBe(false);
    expect(holds(at('square'), 'end is square and width > 5 in')).toBe(true);
    // 100 mm is less than 5 in, 127 mm.
    expect(holds(at('square', 100), 'end is square and width > 5 in')).toBe(false);
  });

  it('holds when it is empty, does not read or is a figure: what was written is not lost unseen', () => {
    for (const when of ['', undefined, 'end is', 'lid is flip', 'width']) expect(holds(at('round'), when)).toBe(true);
  });

  it('has a fault when it does not read or is a figure', () => {
    expect(conditionFault(model, 'end is round')).toBeNull();
    expect(conditionFault(model, 'ends is round')?.cure).toBe('end');
    expect(conditionFault(model, 'width')?.found).toBe('This works out a figure, not a yes or no');
  });

  it('works on a page whose model is sealed', () => {
    const write = doc(step('A', { when: 'end is round' }, p(text('x', 'width > 5 in'))));
    expect(formulasToSeal(write)).toEqual(['end is round', 'width > 5 in']);
    const sealed = openModel(JSON.parse(JSON.stringify(sealModel(model, formulasToSeal(write)))));
    const figures = evaluate(sealed, { ...usualSizing(sealed), choices: { end: 'square' } });
    expect(holds({ model: sealed, figures }, 'end is round')).toBe(false);
    expect(holds({ model: sealed, figures }, 'width > 5 in')).toBe(true);
  });
});

describe('steps under conditions', () => {
  const write = doc(
    step('Cut', { key: 'cut' }),
    step('Round it', { when: 'end is round', key: 'round' }),
    step('Score', { key: 'score' }, p(ref('cut'), text(' comes before '), ref('score'), text('. '), ref('round'))),
  );

  it('are counted as the reader meets them, and keep their address', () => {
    const numbers = (end: 'round' | 'square') =>
      numberSteps(write, at(end)).map(({ place, number }) => [place, number]);
    expect(numbers('round')).toEqual([[1, 1], [2, 2], [3, 3]]); // prettier-ignore
    expect(numbers('square')).toEqual([[1, 1], [2, null], [3, 2]]); // prettier-ignore
  });

  it('are hidden and not gone, for another size may need them', () => {
    expect(renderWriteUp(write, at('round'))).toContain('aria-labelledby="step-2-title" data-when="end is round"><div');
    expect(renderWriteUp(write, at('square'))).toContain(
      'aria-labelledby="step-2-title" data-when="end is round" hidden><div class="step-number" data-number aria-hidden="true"></div>',
    );
  });

  it('are spoken of by the number that they have then', () => {
    expect(renderWriteUp(write, at('square'))).toContain(
      '<p><a class="step-ref" href="#step-1" data-step-ref="Step">Step\u00a0<span data-number>1</span></a> comes before ' +
        '<a class="step-ref" href="#step-3" data-step-ref="step">step\u00a0<span data-number>2</span></a>. ' +
        '<a class="step-ref" href="#step-2" data-step-ref="Step">a step that your box does without</a></p>',
    );
    expect(renderWriteUp(write, at('round'))).toContain(
      'data-step-ref="step">step\u00a0<span data-number>3</span></a>. ',
    );
    expect(renderWriteUp(doc(p(ref('gone'), ref(''))), at('round'))).toBe(
      '<p><span class="unknown">a step that is gone</span><span class="unknown">a step that is gone</span></p>',
    );
  });

  it('may be optional, which is said beside the title', () => {
    expect(renderWriteUp(doc(step('Band', { optional: true })), at('round'))).toContain(
      'Band <span class="step-mark">optional</span></h2>',
    );
  });
});

describe('phrases under conditions', () => {
  it('are one element however they are marked up inside, and hidden while they do not apply', () => {
    const bold: InlineNode = {
      type: 'text',
      text: 'twice',
      marks: [{ type: 'onlyWhen', attrs: { when: 'end is round' } }, { type: 'bold' }],
    };
    const write = doc(p(text('Cut'), text(' it ', 'end is round'), bold, text('.')));
    expect(renderWriteUp(write, at('round'))).toBe(
      '<p>Cut<span data-when="end is round"> it <strong>twice</strong></span>.</p>',
    );
    expect(renderWriteUp(write, at('square'))).toBe(
      '<p>Cut<span data-when="end is round" hidden> it <strong>twice</strong></span>.</p>',
    );
  });

  it('take their paragraph or bullet along when they are all of it', () => {
    const whole = p(text('Round off', 'end is round'));
    const list: BlockNode = { type: 'bulletList', content: [{ type: 'listItem', content: [whole] }] };
    expect(renderWriteUp(doc(whole, list), at('square'))).toBe(
      '<p data-when="end is round" hidden>Round off</p>\n' +
        '<ul><li data-when="end is round" hidden><p data-when="end is round" hidden>Round off</p></li></ul>',
    );
  });

  it('cannot break out of the attribute', () => {
    expect(renderWriteUp(doc(p(text('a'), text('x', '"><script>'))), at('round'))).toBe(
      '<p>a<span data-when="&quot;&gt;&lt;script&gt;">x</span></p>',
    );
  });

  it('are left out where the write-up becomes plain text', () => {
    const words = inlinesShown([text('a'), text('b', 'end is round'), text('c')], at('square'));
    expect(words.map((node) => (node.type === 'text' ? node.text : ''))).toEqual(['a', 'c']);
  });
});
