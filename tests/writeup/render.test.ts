import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, usualSizing, type Pattern, type Unit } from '@/engine';
import type { BlockNode, DocNode, InlineNode } from '@/writeup/document';
import { renderWriteUp } from '@/writeup/render';
import { cutListInside, pieceCardInside, renderCutList, renderPieceCard } from '@/writeup/render-figures';
import { measureInside, renderMeasure } from '@/writeup/render-measure';
import { writeUpSchema } from '@/writeup/schema';
import { sampleDoc } from './sample';

/** A strip: inside width between two tabs; at 6 in with tabs of 1/2 in it is 7 in wide, scored at 1/2 and 6 1/2. */
const STRIP: Pattern = {
  format: 1,
  slug: 'strip',
  name: 'Strip',
  summary: 'A strip with two tabs.',
  group: 'Trays and lidded boxes',
  measures: [
    { name: 'inside width', ask: { question: 'How wide?', usual: '6 in', from: '1 in', to: '12 in' } },
    { name: 'tab', ask: { question: 'How wide is a tab?', usual: '1/2 in', from: '1/4 in', to: '1 in' } },
    { name: 'strip width', formula: 'inside width + 2 * tab' },
  ],
  choices: [],
  pieces: [
    {
      name: 'Strip',
      stock: 'card',
      builder: 'grid',
      columns: [
        { name: 'left tab', size: 'tab' },
        { name: 'middle', size: 'inside width' },
        { name: 'right tab', size: 'tab' },
      ],
      rows: [{ name: 'row', size: '2 in' }],
      cells: [['tab left', 'panel middle', 'tab right']],
    },
  ],
  fits: [],
  finished: {
    inside: [{ name: 'width', formula: 'inside width' }],
    outside: [{ name: 'width', formula: 'inside width' }],
  },
  order: [],
  assembly: [{ piece: 'Strip', root: 'middle', at: ['0 in', '0 in', '0 in'], across: '+x', along: '-y' }],
};

const compiled = compilePattern(STRIP);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model = compiled.value;
const live = (units: Unit = 'in') => ({ model, figures: evaluate(model, usualSizing(model, units)) });
const doc = (...content: BlockNode[]): DocNode => ({ type: 'doc', content });
const paragraph = (...content: InlineNode[]): BlockNode => ({ type: 'paragraph', content });
const text = (words: string): InlineNode => ({ type: 'text', text: words });
const measure = (formula: string, bare = false): InlineNode => ({ type: 'measure', attrs: { formula, bare } });
const step = (title: string, mark: string, ...content: BlockNode[]): BlockNode => ({
  type: 'step',
  attrs: { title, mark },
  content,
});
const render = (...content: BlockNode[]) => renderWriteUp(doc(...content), live());

describe('a live measure', () => {
  it('is its figure to see and in words to hear, at the units of the sizing', () => {
    expect(render(paragraph(text('Cut '), measure('strip width'), text('.')))).toBe(
      '<p>Cut <span class="measure" data-live="strip width"><span class="figure" aria-hidden="true">7\u00a0in</span><span class="visually-hidden spoken">7 inches</span></span>.</p>',
    );
    expect(renderMeasure(live(), { formula: 'tab', bare: true })).toBe(
      '<span class="measure" data-live="tab" data-bare><span class="figure" aria-hidden="true">1\u20442</span><span class="visually-hidden spoken">1 half</span></span>',
    );
    // 1/2 in is 12.7 mm; whole millimetres are the metric grid's usual step.
    expect(renderMeasure(live('mm'), { formula: 'tab', bare: false })).toContain('>13\u00a0mm<');
  });

  it('may be a formula', () => {
    expect(renderMeasure(live(), { formula: 'inside width - tab', bare: false })).toContain(
      '>5\u202f1\u20442\u00a0in<',
    );
  });

  it.each([['tabs'], ['inside width +'], ['inside width * tab * tab * tab * tab'], ['']])(
    'that is not worked out (%j) shows what stands there and says so',
    (formula) => {
      const html = renderMeasure(live(), { formula, bare: false });
      expect(html).toBe(
        `<span class="measure unknown" data-live="${formula}">${formula || 'empty measure'} <small class="unknown-mark">(not worked out)</small></span>`,
      );
    },
  );

  it('that divides by nothing at this size is not worked out and breaks nothing', () => {
    const html = render(paragraph(measure('tab / (inside width - inside width) * tab'), text(' goes on')));
    expect(html).toContain('(not worked out)');
    expect(html).toContain(' goes on</p>');
  });
});

describe('a step', () => {
  it('is numbered in order, has an address and a heading, and its mark', () => {
    const html = render(
      step('The strip', 'optional', paragraph(text('Cut.'))),
      paragraph(text('Between.')),
      step('', '', paragraph(text('Fold.'))),
    );
    expect(html).toContain(
      '<section class="step" id="step-1" aria-labelledby="step-1-title"><div class="step-number" data-number aria-hidden="true">1</div>',
    );
    expect(html).toContain(
      '<h2 class="step-title" id="step-1-title"><span class="visually-hidden">Step <span data-number>1</span>: </span>The strip <span class="step-mark">optional</span></h2><p>Cut.</p>',
    );
    expect(html).toContain('<section class="step" id="step-2"');
    expect(html).toContain(
      '<h2 class="step-title visually-hidden" id="step-2-title">Step <span data-number>2</span></h2><p>Fold.</p>',
    );
  });

  it('stands one level below the heading over it, and headings in it one below that', () => {
    const heading = (level: 2 | 3, words: string): BlockNode => ({
      type: 'heading',
      attrs: { level },
      content: [text(words)],
    });
    const html = render(
      heading(2, 'Cut'),
      step('A', '', paragraph(text('x')), heading(2, 'In it'), heading(3, 'In it')),
    );
    expect(html).toContain('<h2 id="part-cut">Cut</h2>');
    expect(html).toContain('<h3 class="step-title"');
    expect(html).toContain('<h4 id="part-in-it">In it</h4><h4 id="part-in-it-2">In it</h4>');
  });
});

describe('a heading', () => {
  it('has an address from its words alone, whatever its measures are', () => {
    const html = render({
      type: 'heading',
      attrs: { level: 2 },
      content: [text('The '), measure('tab'), text(' tab & “çut”')],
    });
    expect(html).toMatch(/^<h2 id="part-the-tab-c-?ut">/);
  });

  it('never takes the address of a step or of another heading', () => {
    const heading: BlockNode = { type: 'heading', attrs: { level: 2 }, content: [text('Step 1')] };
    const ids = [...render(heading, heading, step('A', '', paragraph(text('x')))).matchAll(/ id="([^"]+)"/g)].map(
      ([, id]) => id,
    );
    expect(ids).toEqual(['part-step-1', 'part-step-1-2', 'step-1', 'step-1-title']);
  });
});

describe('a piece card', () => {
  const card = renderPieceCard(live().figures, 'Strip');

  it('names the piece, its count and stock, draws it twice for wide and narrow pages, and says how to make it', () => {
    expect(card).toMatch(/^<div class="piece-card" role="group" aria-label="Strip" data-piece="Strip">/);
    expect(card).toContain('<p class="piece-card-head"><b>Strip</b> <span>cut 1 · card</span></p>');
    expect(card.match(/<svg /g)).toHaveLength(2);
    expect(card).toContain('class="drawing wide-only"');
    expect(card).toContain('class="drawing narrow-only"');
    expect(card).toContain('<div class="piece-card-words"><p>Cut <span class="measure">');
  });

  it('says that a piece is not part of the box, and keeps its place for when it is', () => {
    expect(renderPieceCard(live().figures, 'Lid')).toBe(
      '<div class="piece-card" role="group" aria-label="Lid" data-piece="Lid"><p class="piece-card-none"><b>Lid</b> is not part of the box as it is set up now.</p></div>',
    );
  });

  it('has in it what the page puts in again at another size', () => {
    expect(card).toContain(pieceCardInside(live().figures, 'Strip'));
    expect(renderMeasure(live(), { formula: 'tab', bare: false })).toContain(
      measureInside(live(), { formula: 'tab', bare: false }),
    );
    expect(renderCutList(live().figures)).toContain(cutListInside(live().figures));
  });
});

describe('the cut list', () => {
  it('has a row for each piece: count, stock, size, scores', () => {
    const words = (html: string) =>
      html
        .replace(/<span class="visually-hidden spoken">[^<]*<\/span>/g, '')
        .replace(/<[^>]+>/g, ' ')
        .replace(/[\u00a0\u202f]/g, ' ')
        .replace(/\s+/g, ' ')
        .trim();
    expect(words(renderCutList(live().figures))).toBe(
      'Cut list Piece Cut Size Score from the left Score from the top Strip 1 card 7 × 2 in 1⁄2 , 6 1⁄2 none',
    );
  });
});

describe('a photo', () => {
  it('comes in three widths with its size, its words and its caption, and waits until it is near', () => {
    const html = render({
      type: 'photo',
      attrs: { upload: 'abc', alt: 'A "strip"', width: 1600, height: 1200 },
      content: [text('Width '), measure('tab')],
    });
    expect(html).toMatch(
      /^<figure class="photo"><img src="\/media\/abc-960\.webp" srcset="\/media\/abc-480\.webp 480w, \/media\/abc-960\.webp 960w, \/media\/abc-1600\.webp 1600w" sizes="[^"]+" width="1600" height="1200" alt="A &quot;strip&quot;" loading="lazy" decoding="async"><figcaption>Width <span class="measure" data-live="tab">/,
    );
  });
});

describe('notes', () => {
  it('say in a word what they are', () => {
    const html = render(
      { type: 'tip', content: [paragraph(text('x'))] },
      { type: 'caution', content: [paragraph(text('y'))] },
      { type: 'materials', content: [paragraph(text('z'))] },
    );
    expect(html).toContain('<b class="note-word">Tip</b><p>x</p>');
    expect(html).toMatch(/<b class="note-word"><svg .*<\/svg> Caution<\/b><p>y<\/p>/);
    expect(html).toContain('<p class="materials-word">Materials</p><p>z</p>');
  });
});

describe('parity with the schema', () => {
  it('has a rendering for every node and mark of the schema', () => {
    const html = renderWriteUp(sampleDoc, live());
    const renderings: Record<string, string> = {
      doc: '<section',
      paragraph: '<p>',
      heading: '<h2',
      bulletList: '<ul>',
      orderedList: '<ol start="3">',
      listItem: '<li>',
      hardBreak: '<br>',
      text: 'Burnish.',
      step: 'id="step-1"',
      measure: 'data-live=',
      stepRef: '<a class="step-ref" href="#step-2"',
      pieceCard: 'data-piece=',
      cutList: 'data-cut-list',
      photo: '<figure class="photo">',
      tip: 'class="tip"',
      caution: 'class="caution"',
      materials: 'class="materials" role="group" aria-label="Materials"',
      tools: 'class="materials" role="group" aria-label="Tools"',
      amount: '<span class="measure" data-amount="sheets card">1 sheet of 12 × 12 in</span>',
      forward: '<div class="forward" role="note">',
      correction: '<div class="correction" role="note">',
      amounts: '<div class="live-block amounts" data-amounts>',
      sheetPlan: '<div class="live-block sheet-plan" data-sheet-plan>',
      curveTemplate: '<div class="live-block curve-template" data-curve-of="Strip">',
      foldedView: '<div class="live-block folded-view" data-folded-view>',
      sizeSummary: '<div class="live-block size-summary" data-size-summary>',
      table: '<table class="table"><thead>',
      tableRow: '<tr>',
      tableHeader: '<th scope="col"><p>Glue</p></th>',
      tableCell: '<td><p>White</p></td>',
      bold: '<strong>',
      italic: '<em>',
      asTyped: ', on a 12 in board</p>',
      onlyWhen: '<span data-when="tab &gt; 1/2 in" hidden> twice</span>',
      link: '<a href="https://quilletlane.example/card" rel="noopener"><em>which card</em></a>',
    };
    const { nodes, marks } = writeUpSchema();
    expect(Object.keys(renderings).sort()).toEqual([...Object.keys(nodes), ...Object.keys(marks)].sort());
    for (const [name, rendering] of Object.entries(renderings)) expect(html, name).toContain(rendering);
  });

  it('shows the same text as the editor, in the same order', () => {
    const words: string[] = [];
    writeUpSchema()
      .nodeFromJSON(sampleDoc)
      .descendants((node) => {
        if (node.isText) words.push(node.text ?? '');
        if (node.type.name === 'step') words.push(String(node.attrs['title']));
      });
    const shown = renderWriteUp(sampleDoc, live())
      .replace(/<[^>]+>/g, '\u0001')
      .replace(/&amp;/g, '&');
    let at = 0;
    for (const word of words) {
      const found = shown.indexOf(word, at);
      expect(found, `${word} after ${at}`).toBeGreaterThanOrEqual(at);
      at = found + word.length;
    }
  });

  it('leaves empty paragraphs and headings away', () => {
    expect(render({ type: 'paragraph' }, { type: 'heading', attrs: { level: 2 } })).toBe('\n');
  });
});

describe('what an author could slip in', () => {
  const EVIL = `"><script>alert(1)</script><img src=x onerror='alert(2)'>&amp;`;
  const photo = (attrs: object): BlockNode =>
    ({ type: 'photo', attrs: { upload: 'abc', alt: '', width: 10, height: 10, ...attrs } }) as BlockNode;

  it.each([
    ['a text', paragraph(text(EVIL))],
    ["a step's title", step(EVIL, '', paragraph(text('x')))],
    ["a step's mark", step('', EVIL, paragraph(text('x')))],
    ['a formula', paragraph(measure(EVIL))],
    ['the name of a piece', { type: 'pieceCard', attrs: { piece: EVIL } } as BlockNode],
    ["a photo's words", photo({ alt: EVIL })],
    ["a photo's id", photo({ upload: EVIL })],
    ["a photo's width", photo({ width: EVIL })],
    ['a heading', { type: 'heading', attrs: { level: 2 }, content: [text(EVIL)] } as BlockNode],
    ["a heading's level", { type: 'heading', attrs: { level: EVIL }, content: [text('x')] } as unknown as BlockNode],
    [
      "a list's start",
      {
        type: 'orderedList',
        attrs: { start: EVIL },
        content: [{ type: 'listItem', content: [paragraph(text('x'))] }],
      } as unknown as BlockNode,
    ],
    [
      'a link',
      paragraph({ type: 'text', text: 'x', marks: [{ type: 'link', attrs: { href: `https://a.example/${EVIL}` } }] }),
    ],
  ])('stays text in %s', (_, node) => {
    const html = render(node);
    expect(html).not.toMatch(/<script|<img src=x| onerror='/);
    // Every tag that is there is one of ours: taking whole tags away leaves no angle bracket.
    expect(html.replace(/<\/?[a-z][a-z0-9]*(?: [a-zA-Z-]+(?:="[^"<>]*")?)*\s*\/?>/g, '')).not.toMatch(/[<>]/);
  });

  it.each([
    'javascript:alert(1)',
    ' javascript:alert(1)',
    'JaVaScRiPt:alert(1)',
    'data:text/html,x',
    'vbscript:x',
    '//other.example',
    '/\\other.example',
    'java\tscript:x',
  ])('is no link to %j', (href) => {
    expect(render(paragraph({ type: 'text', text: 'x', marks: [{ type: 'link', attrs: { href } }] }))).toBe('<p>x</p>');
  });
});
