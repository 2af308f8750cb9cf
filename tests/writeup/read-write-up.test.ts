import { describe, expect, it } from 'vitest';
import { emptyWriteUp } from '../setup/empty-write-up';
import { explainWriteUpFault } from '@/writeup/messages';
import { readWriteUp } from '@/writeup/read-write-up';
import { sample } from './sample';

const doc = (...content: unknown[]) => ({ version: 1, doc: { type: 'doc', content } });
const paragraph = (...content: unknown[]) => ({ type: 'paragraph', content });
const text = (words: string, ...marks: unknown[]) => ({
  type: 'text',
  text: words,
  ...(marks.length > 0 ? { marks } : {}),
});
function refusal(json: unknown): string {
  const read = readWriteUp(json);
  if (read.ok) throw new Error('It was taken.');
  expect(read.faults).toHaveLength(1);
  return explainWriteUpFault(read.faults[0]!);
}
const code = (json: unknown) => {
  const read = readWriteUp(json);
  return read.ok ? 'ok' : read.faults[0]?.code;
};

describe('a write-up that is taken', () => {
  it('comes back as it was given', () => {
    expect(readWriteUp(sample)).toEqual({ ok: true, value: sample });
    expect(readWriteUp(emptyWriteUp())).toEqual({ ok: true, value: emptyWriteUp() });
  });

  it('loses attributes that the schema does not know, and nothing else', () => {
    const strange = doc({
      type: 'step',
      attrs: { title: 'A', mark: '', style: 'position:fixed', onclick: 'x' },
      content: [{ type: 'paragraph' }],
    });
    expect(readWriteUp(strange)).toEqual({
      ok: true,
      value: {
        version: 1,
        doc: {
          type: 'doc',
          content: [{ type: 'step', attrs: { title: 'A', mark: '' }, content: [{ type: 'paragraph' }] }],
        },
      },
    });
  });

  it('keeps where a step begins in a video, with an https address or without; a step without one is stored as before', () => {
    const step = (moment: unknown) => ({
      type: 'step',
      attrs: { title: 'A', mark: '', moment },
      content: [{ type: 'paragraph' }],
    });
    const read = (moment: unknown) => {
      const taken = readWriteUp(doc(step(moment)));
      return taken.ok ? taken.value.doc.content[0] : taken.faults[0]?.code;
    };
    const here = { seconds: 252, address: 'https://video.example/watch?v=1' };
    expect(read(here)).toEqual(step(here));
    expect(read({ seconds: 0, address: null })).toEqual(step({ seconds: 0, address: null }));
    expect(read(null)).toEqual({ ...step(null), attrs: { title: 'A', mark: '' } });
    for (const wrong of [
      { seconds: -1, address: null },
      { seconds: 1.5, address: null },
      { seconds: 86_400, address: null },
      { seconds: 1 },
      { seconds: 1, address: 'http://video.example' },
      { seconds: 1, address: 'javascript:alert(1)' },
      { seconds: 1, address: null, autoplay: true },
      'https://video.example',
    ])
      expect(read(wrong)).toBe('wrong value');
  });

  it('takes lists as the editor gives them, and keeps their start only when it says something', () => {
    const list = (start: number) => ({
      type: 'orderedList',
      attrs: { start, type: null },
      content: [{ type: 'listItem', content: [{ type: 'paragraph' }] }],
    });
    const read = readWriteUp(doc(list(1), list(4)));
    expect(read.ok && read.value.doc.content.map((node) => ('attrs' in node ? node.attrs : undefined))).toEqual([
      undefined,
      { start: 4 },
    ]);
  });

  it('may link to https, http, mailto and places on the site', () => {
    for (const href of [
      'https://a.example/b?c=d',
      'http://a.example',
      'mailto:ines@quilletlane.example',
      '/handbook/scoring',
      '#step-2',
    ]) {
      expect(code(doc(paragraph(text('x', { type: 'link', attrs: { href } }))))).toBe('ok');
    }
  });
});

it('may hold eight lists one inside the other, in a step, with a linked word in the innermost', () => {
  const nested = (levels: number): unknown => ({
    type: 'bulletList',
    content: [
      {
        type: 'listItem',
        content: [
          paragraph(text('x', { type: 'link', attrs: { href: 'https://a.example' } })),
          ...(levels > 1 ? [nested(levels - 1)] : []),
        ],
      },
    ],
  });
  const inStep = (levels: number) =>
    doc({ type: 'step', attrs: { title: '', mark: '' }, content: [{ type: 'paragraph' }, nested(levels)] });
  expect(code(inStep(8))).toBe('ok');
  expect(code(inStep(9))).toBe('too deep');
});

describe('a write-up that is refused', () => {
  it.each([
    ['nothing', null],
    ['a text', 'doc'],
    ['another version', { version: 2, doc: { type: 'doc', content: [] } }],
    ['a paragraph as the whole', { version: 1, doc: { type: 'paragraph' } }],
    [
      'attributes that are objects of objects',
      doc({ type: 'step', attrs: { moment: { seconds: {} } }, content: [{ type: 'paragraph' }] }),
    ],
  ])('is %s', (_, json) => {
    expect(code(json)).toBe('not a write-up');
  });

  it('has a part of a kind that is not known', () => {
    expect(refusal(doc({ type: 'iframe' }))).toBe(
      'A part of the kind “iframe” was found: wanted is a kind of part that this version knows. Reload the page: it may be older than the site.',
    );
    expect(code(doc({ type: 'codeBlock', content: [text('x')] }))).toBe('unknown part');
    expect(code(doc({ type: 'constructor' }))).toBe('unknown part');
    expect(code(doc(paragraph(text('x', { type: 'strike' }))))).toBe('unknown part');
  });

  it('has parts where they cannot stand', () => {
    const step = { type: 'step', attrs: { title: '', mark: '' }, content: [{ type: 'paragraph' }] };
    expect(code(doc({ ...step, content: [step] }))).toBe('wrong place');
    expect(code(doc(paragraph({ type: 'cutList' })))).toBe('wrong place');
    expect(code(doc({ type: 'tip', content: [{ type: 'pieceCard', attrs: { piece: 'Floor' } }] }))).toBe('wrong place');
    expect(code(doc())).toBe('wrong place');
    expect(code(doc({ type: 'bulletList', content: [] }))).toBe('wrong place');
  });

  it.each([
    ['a link that is a program', paragraph(text('x', { type: 'link', attrs: { href: 'javascript:alert(1)' } }))],
    ['a link hidden by spaces', paragraph(text('x', { type: 'link', attrs: { href: 'java\nscript:alert(1)' } }))],
    [
      'a link to another host without a scheme',
      paragraph(text('x', { type: 'link', attrs: { href: '//other.example' } })),
    ],
    [
      'a link to another host by a backslash',
      paragraph(text('x', { type: 'link', attrs: { href: '/\\other.example' } })),
    ],
    ['data in a link', paragraph(text('x', { type: 'link', attrs: { href: 'data:text/html,x' } }))],
    ['a link to nowhere', paragraph(text('x', { type: 'link' }))],
    ['a heading of level 1', { type: 'heading', attrs: { level: 1 }, content: [text('x')] }],
    ['a heading of no level', { type: 'heading', attrs: { level: '2"><script>' }, content: [text('x')] }],
    [
      'a formula of more than 300 characters',
      paragraph({ type: 'measure', attrs: { formula: 'a'.repeat(301), bare: false } }),
    ],
    [
      'a measure whose unit is neither kept nor left',
      paragraph({ type: 'measure', attrs: { formula: 'tab', bare: 'yes' } }),
    ],
    [
      'a picture with a path for an id',
      { type: 'photo', attrs: { upload: '../../secret', alt: '', width: 1, height: 1 } },
    ],
    ['a picture of no size', { type: 'photo', attrs: { upload: 'abc', alt: '', width: 0, height: 1 } }],
    [
      'a picture that is not whole pixels wide',
      { type: 'photo', attrs: { upload: 'abc', alt: '', width: 1.5, height: 1 } },
    ],
    [
      'a title of more than 200 characters',
      { type: 'step', attrs: { title: 'a'.repeat(201), mark: '' }, content: [{ type: 'paragraph' }] },
    ],
    [
      'a list that starts in the middle of a number',
      { type: 'orderedList', attrs: { start: 1.5 }, content: [{ type: 'listItem', content: [{ type: 'paragraph' }] }] },
    ],
    ['an empty text', paragraph(text(''))],
  ])('has %s', (_, node) => {
    expect(code(doc(node))).toBe('wrong value');
  });

  it('is too long', () => {
    expect(refusal(doc(paragraph(text('a'.repeat(500_001)))))).toMatch(
      /^The write-up has 500\d\d\d characters: wanted is at most 500,000 characters, pictures apart\./,
    );
  });

  it('has too many parts', () => {
    expect(code(doc(...Array.from({ length: 5_001 }, () => ({ type: 'paragraph' }))))).toBe('too many parts');
    expect(code(doc(...Array.from({ length: 100_000 }, () => ({ type: 'paragraph' }))))).toBe('too many parts');
  });

  it('lies too deep, however deep that is', () => {
    let deep: unknown = { type: 'paragraph' };
    for (let n = 0; n < 100_000; n += 1)
      deep = { type: 'bulletList', content: [{ type: 'listItem', content: [deep] }] };
    expect(refusal(doc(deep))).toBe(
      'Lists lie too deep inside one another: wanted is at most 8 levels of lists inside lists. Take the innermost lists out one level.',
    );
  });
});
