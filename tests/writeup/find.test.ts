import { EditorState } from '@tiptap/pm/state';
import { describe, expect, it } from 'vitest';
import type { BlockNode, DocNode, InlineNode } from '@/writeup/document';
import { findAll, replaceAll } from '@/writeup/editor/find';
import { countsOf, outlineOf } from '@/writeup/editor/outline';
import { writeUpSchema } from '@/writeup/schema';
import { storedForm } from '@/writeup/stored-form';

const text = (words: string, bold = false): InlineNode => ({
  type: 'text',
  text: words,
  ...(bold ? { marks: [{ type: 'bold' }] } : {}),
});
const measure = (formula: string): InlineNode => ({ type: 'measure', attrs: { formula, bare: false } });
const p = (...content: InlineNode[]): BlockNode => ({ type: 'paragraph', content });
const step = (title: string, ...content: BlockNode[]): BlockNode => ({
  type: 'step',
  attrs: { title, mark: '' },
  content,
});
const docOf = (...content: BlockNode[]) => writeUpSchema().nodeFromJSON({ type: 'doc', content } satisfies DocNode);
const replaced = (query: string, words: string, ...content: BlockNode[]) => {
  const doc = docOf(...content);
  const { tr } = EditorState.create({ doc });
  return storedForm(replaceAll(tr, findAll(doc, { query, matchCase: false }), words).doc.toJSON() as DocNode).content;
};
const seek = (query: string, matchCase = false) => ({ query, matchCase });

describe('finding words', () => {
  it('goes through text, captions, tables and titles of steps in reading order', () => {
    const doc = docOf(
      p(text('A tab and a Tab.')),
      step('The tab', p(text('Fold it.')), { type: 'tip', content: [p(text('tab'))] }),
    );
    // "A " is two letters behind the start of the paragraph, at position 1; "A tab and a " twelve.
    expect(findAll(doc, seek('tab'))).toMatchObject([
      { in: 'text', from: 3, to: 6 },
      { in: 'text', from: 13, to: 16 },
      { in: 'title', from: 4, to: 7 },
      { in: 'text' },
    ]);
    expect(findAll(doc, seek('Tab', true))).toHaveLength(1);
    expect(findAll(doc, seek(''))).toEqual([]);
  });

  it('finds words that are partly bold, and takes every sign for itself', () => {
    expect(findAll(docOf(p(text('bone fol'), text('der', true))), seek('folder'))).toHaveLength(1);
    expect(findAll(docOf(p(text('1.5 (about)'))), seek('1.5 ('))).toHaveLength(1);
    expect(findAll(docOf(p(text('125'))), seek('1.5'))).toEqual([]);
  });

  it('finds nothing in live measures and nothing across one', () => {
    const doc = docOf(p(text('Cut '), measure('inside width + 2 in'), text(' wide')));
    expect(findAll(doc, seek('2'))).toEqual([]);
    expect(findAll(doc, seek('Cut  wide'))).toEqual([]);
    expect(findAll(doc, seek('wide'))).toHaveLength(1);
  });
});

describe('putting other words in their place', () => {
  it('changes every place and leaves live measures alone', () => {
    expect(replaced('tab', 'flap', p(text('A tab, '), measure('tab'), text(', a tab.')), step('Tab', p()))).toEqual([
      p(text('A flap, '), measure('tab'), text(', a flap.')),
      { type: 'step', attrs: { title: 'flap', mark: '' }, content: [{ type: 'paragraph' }] },
    ]);
  });

  it('keeps how the words looked, and may take them out', () => {
    expect(replaced('twice', 'once', p(text('Fold '), text('twice', true)))).toEqual([
      p(text('Fold '), text('once', true)),
    ]);
    expect(replaced(' very', '', p(text('a very very long strip')))).toEqual([p(text('a long strip'))]);
  });
});

describe('going about in a write-up', () => {
  const doc = docOf(
    { type: 'heading', attrs: { level: 2 }, content: [text('Cut and score')] },
    step('The strip', p(text('Cut it '), measure('tab'), text(' wide, don’t tear.'))),
    step('', p(text('Fold what was scored.'))),
  );

  it('has headings and steps for an outline; a step without a title goes by its first words', () => {
    expect(outlineOf(doc, null).map(({ words, number }) => [number, words])).toEqual([
      [null, 'Cut and score'],
      [1, 'The strip'],
      [2, 'Fold what was scored.'],
    ]);
  });

  it('counts words, live measures and steps', () => {
    // Cut and score; The strip; Cut it wide don’t tear; Fold what was scored.
    expect(countsOf(doc)).toEqual({ words: 3 + 2 + 5 + 4, live: 1, steps: 2 });
  });
});
