import { describe, expect, it } from 'vitest';
import { compilePattern, evaluate, planSheets, usualSizing, type Pattern, type PieceFigure } from '@/engine';
import { amountsOf, showAmount } from '@/writeup/amounts';
import { curvesInside, curvesOf } from '@/writeup/curve-template';
import type { BlockNode, DocNode, PhotoNode } from '@/writeup/document';
import { readWriteUp } from '@/writeup/read-write-up';
import { renderWriteUp } from '@/writeup/render';
import { amountsInside, sheetPlanInside, sizesInside } from '@/writeup/render-blocks';
import { expectClose } from '../setup/expect-close';

/** Two strips of 7 × 2 in with a glued tab of 1/2 in at either end, and a length of ribbon. */
const STRIP: Pattern = {
  format: 1,
  slug: 'strip',
  name: 'Strip',
  summary: 'A strip with two tabs.',
  group: 'Trays and lidded boxes',
  measures: [{ name: 'width', ask: { question: 'How wide?', usual: '6 in', from: '1 in', to: '30 in' } }],
  choices: [],
  pieces: [
    {
      name: 'Strip',
      count: '2',
      stock: 'card',
      builder: 'grid',
      columns: [
        { name: 'left', size: '1/2 in' },
        { name: 'middle', size: 'width' },
        { name: 'right', size: '1/2 in' },
      ],
      rows: [{ name: 'row', size: '2 in' }],
      cells: [['tab left', 'panel middle', 'tab right']],
    },
  ],
  fits: [],
  finished: {
    inside: [{ name: 'wide', formula: 'width' }],
    outside: [{ name: 'wide', formula: 'width + 1 in' }],
  },
  order: [],
  materials: [{ name: 'ribbon', formula: 'width * 2' }],
  assembly: [],
};
const compiled = compilePattern(STRIP);
if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
const model = compiled.value;
const at = (values: Record<string, number> = {}) => evaluate(model, { ...usualSizing(model), values });
const figures = at();
const plan = planSheets(figures, { stock: '12x12in' });
const doc = (...content: BlockNode[]): DocNode => ({ type: 'doc', content });

describe('amounts', () => {
  it('are sheets, glue and what the pattern names, by the reader’s sheets', () => {
    expect(showAmount(figures, plan, 'sheets')).toBe('1 sheet of 12 × 12 in');
    // Each 7 × 2 in: a sheet of 6 × 6 in holds neither, one of 8 × 8 in both.
    expect(showAmount(figures, planSheets(figures, { stock: '8x8in' }), 'sheets card')).toBe('1 sheet of 8 × 8 in');
    // Two strips with two tabs each, hinged on 2 in: 8 in.
    expect(showAmount(figures, plan, 'tape')).toBe('8 in');
    // Twice 6 in.
    expect(showAmount(figures, plan, 'extra ribbon')).toBe('12 in');
  });

  it('are nothing where there is none of it, and never a wrong count of sheets', () => {
    for (const of of ['glued', 'area greyboard', 'extra knob', 'sheets greyboard', 'nonsense', ''])
      expect(showAmount(figures, plan, of)).toBeNull();
    const large = at({ width: 20 * 25.4 });
    expect(showAmount(large, planSheets(large, { stock: '12x12in' }), 'sheets')).toBeNull();
  });

  it('are offered in the order of a list of materials', () => {
    expect(amountsOf(figures, plan).map(({ of }) => of)).toEqual(['sheets card', 'area card', 'tape', 'extra ribbon']);
    expect(amountsInside(figures, plan)).toContain(
      '<dt>Card</dt><dd>1 sheet of 12 × 12 in</dd></div><div><dt>Glue or tape along tabs</dt><dd>8 in</dd>',
    );
  });

  it('follow the plan that they are given', () => {
    const write = doc({ type: 'paragraph', content: [{ type: 'amount', attrs: { of: 'sheets' } }] });
    const a4 = planSheets(figures, { stock: 'a4' });
    expect(renderWriteUp(write, { model, figures, plan: a4 })).toContain('data-amount="sheets">1 sheet of A4</span>');
  });
});

describe('worked-out blocks', () => {
  it('draw every sheet with its parts, and say what is too large', () => {
    expect(sheetPlanInside(figures, plan).match(/<svg/g)).toHaveLength(1);
    const large = at({ width: 20 * 25.4 });
    expect(sheetPlanInside(large, planSheets(large, { stock: '12x12in' }))).toContain(
      'Too large for 12 × 12 in: Strip.',
    );
  });

  it('say the finished sizes', () => {
    expect(
      sizesInside(figures)
        .replace(/<[^>]*>/g, ' ')
        .replace(/\s+/g, ' ')
        .trim(),
    ).toBe('Finished size Inside 6 in wide Outside 7 in wide');
  });
});

describe('a curve template', () => {
  /** 60° of a circle of 50 mm, and a rounded corner of 3 mm. */
  const net = {
    outline: [
      {
        type: 'arc',
        from: { x: 0, y: 0 },
        to: { x: 50, y: 0 },
        centre: { x: 25, y: 43.301 },
        radius: 50,
        clockwise: true,
      },
      { type: 'arc', from: { x: 50, y: 0 }, to: { x: 53, y: 3 }, centre: { x: 50, y: 3 }, radius: 3, clockwise: true },
    ],
    folds: [],
    creases: [],
  };
  const piece = { name: 'Floor', net } as unknown as PieceFigure;

  it('has chord, rise and length of its arc; rounded corners need none', () => {
    const [curve, ...others] = curvesOf(piece);
    expect(others).toEqual([]);
    // 50 π / 3; 2 · 50 sin 30°; 50 (1 − cos 30°)
    expectClose(curve!.length, 52.36, 0.01);
    expectClose(curve!.chord, 50, 0.01);
    expectClose(curve!.rise, 6.699, 0.01);
  });

  it('is drawn at full size: 96 pixels of CSS to the inch', () => {
    const html = curvesInside({ ...figures, pieces: [piece] }, 'Floor');
    // 50 mm are 188.98 px, the radius as much.
    expect(html).toMatch(/A188\.9\d 188\.9\d 0 0 1 /);
    expect(html).toContain('full size when printed at 100 %');
    expect(curvesInside(figures, 'Strip')).toBe('');
  });
});

describe('photos', () => {
  const photo = (attrs: Partial<PhotoNode['attrs']> = {}): PhotoNode => ({
    type: 'photo',
    attrs: { upload: 'a1', alt: 'A strip', width: 900, height: 600, ...attrs },
  });
  const html = (...content: BlockNode[]) =>
    renderWriteUp(doc({ type: 'step', attrs: { title: 'A', mark: '' }, content }), { model, figures });

  it('stand side by side when they follow one another, cropped round what matters', () => {
    const two = html(photo(), photo({ focus: { across: 3, down: 10 } }));
    expect(two).toContain('<div class="photos"><figure class="photo photo-cropped photo-whole"><img');
    expect(two).toContain('<figure class="photo photo-cropped photo-whole focus-across-3 focus-down-10"><img');
    expect(html(photo(), { type: 'cutList' }, photo())).not.toContain('class="photos"');
  });

  it('are whole when they stand alone, unless a shape is chosen', () => {
    expect(html(photo())).toContain('<figure class="photo"><img');
    expect(html(photo({ crop: 'wide' }))).toContain('<figure class="photo photo-cropped photo-wide"><img');
  });

  it('keep tenths of the picture and the shapes that there are', () => {
    const read = (attrs: object) => {
      const taken = readWriteUp({ version: 1, doc: doc({ ...photo(), attrs: { ...photo().attrs, ...attrs } }) });
      return taken.ok ? (taken.value.doc.content[0] as PhotoNode).attrs : taken.faults[0]?.code;
    };
    expect(read({ focus: null, crop: 'whole' })).toEqual(photo().attrs);
    expect(read({ focus: { across: 0, down: 10 }, crop: 'square' })).toMatchObject({ crop: 'square' });
    for (const wrong of [
      { focus: { across: 11, down: 0 } },
      { focus: { across: 1 } },
      { focus: 'x' },
      { crop: 'round' },
    ])
      expect(read(wrong)).toBe('wrong value');
  });
});

describe('a note for a later step', () => {
  it('says for which, and that step says where it was done', () => {
    const html = renderWriteUp(
      doc(
        {
          type: 'step',
          attrs: { title: 'Flat', mark: '' },
          content: [
            {
              type: 'forward',
              attrs: { word: 'While it is still flat', key: 'lid' },
              content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Cut the slot.' }] }],
            },
          ],
        },
        { type: 'step', attrs: { title: 'Lid', mark: '', key: 'lid' }, content: [{ type: 'paragraph' }] },
      ),
      { model, figures },
    );
    expect(html).toContain(
      '<b class="note-word">While it is still flat <span class="note-for">for <a class="step-ref" href="#step-2"',
    );
    expect(html).toContain('<p class="step-earlier">Needs what was done for it in <a class="step-ref" href="#step-1"');
  });
});

describe('a table', () => {
  const cell = (type: 'tableCell' | 'tableHeader', words: string, attrs?: { colspan: number }) => ({
    type,
    ...(attrs ? { attrs } : {}),
    content: [{ type: 'paragraph', content: [{ type: 'text', text: words }] }] as const,
  });
  const table: BlockNode = {
    type: 'table',
    content: [
      { type: 'tableRow', content: [cell('tableHeader', 'Glue'), cell('tableHeader', 'Dries in')] },
      { type: 'tableRow', content: [cell('tableHeader', 'White'), cell('tableCell', '20 minutes')] },
      { type: 'tableRow', content: [cell('tableCell', 'None', { colspan: 2 })] },
    ],
  };

  it('has its headings said for columns and rows', () => {
    const html = renderWriteUp(doc(table), { model, figures });
    expect(html).toContain(
      '<thead><tr><th scope="col"><p>Glue</p></th><th scope="col"><p>Dries in</p></th></tr></thead>',
    );
    expect(html).toContain('<tr><th scope="row"><p>White</p></th><td><p>20 minutes</p></td></tr>');
    expect(html).toContain('<td colspan="2"><p>None</p></td>');
  });

  it('comes back as it was given, and covers at most twenty columns', () => {
    expect(readWriteUp({ version: 1, doc: doc(table) })).toEqual({ ok: true, value: { version: 1, doc: doc(table) } });
    const wide = { ...table, content: [{ type: 'tableRow', content: [cell('tableCell', 'x', { colspan: 1000 })] }] };
    const read = readWriteUp({ version: 1, doc: { type: 'doc', content: [wide] } });
    expect(!read.ok && read.faults[0]?.code).toBe('wrong value');
  });
});
