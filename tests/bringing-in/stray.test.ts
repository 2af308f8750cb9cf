import { describe, expect, it } from 'vitest';
import { typedNumberItems } from '@/features/projects/proof-numbers';
import { placesIn } from '@/features/projects/proof-place';
import type { BlockNode, InlineNode, WriteUp } from '@/writeup/document';
import { strayNumbers } from '@/writeup/numbers/stray';
import { writeUpSchema } from '@/writeup/schema';
import { strayInDocument } from '@/writeup/editor/stray-numbers';
import { liveAt } from './read-sentences';

// The book box at its usual size: inside 9 x 6 x 2 1/4 in, tabs of 1/2 in.
const live = liveAt('book-box', 'in');
const step = (title: string, ...content: readonly InlineNode[]): BlockNode => ({
  type: 'step',
  attrs: { title, mark: '' },
  content: [{ type: 'paragraph', content }],
});
const say = (text: string): InlineNode => ({ type: 'text', text });
const writeUp = (...content: readonly BlockNode[]): WriteUp => ({ version: 1, doc: { type: 'doc', content } });

const mixed = writeUp(
  step(
    'The floor',
    say('Cut it '),
    { type: 'measure', attrs: { formula: 'floor.across', bare: true } },
    say(' by 6 13/16 inches, in step 2 of 5.'),
  ),
  step('', { type: 'text', text: '2 1/4 in', marks: [{ type: 'asTyped' }] }, say(' deep, with 10 inches of ribbon.')),
);

describe('stray numbers', () => {
  it('are the typed lengths that are neither live nor meant, each in its step', () => {
    expect(strayNumbers(mixed.doc, live).map(({ text, step: at, matches }) => [text, at, matches[0]?.formula])).toEqual(
      [
        ['6 13/16 inches', 1, 'floor.along'],
        ['10 inches', 2, undefined],
      ],
    );
  });

  it('are the same in the editor, at their places in its document', () => {
    const doc = writeUpSchema().nodeFromJSON(mixed.doc);
    expect(strayInDocument(doc, live).map(({ from, to }) => doc.textBetween(from, to))).toEqual([
      '6 13/16 inches',
      '10 inches',
    ]);
  });

  it('keep a project from being published when they are certainly a measure; a length of no measure does not', () => {
    expect(typedNumberItems(mixed, live, placesIn(mixed))).toEqual([
      {
        code: 'typed number',
        blocking: true,
        title: '“6 13/16 inches” is typed, not live',
        detail:
          'It is floor.along (Floor, along): it would stay as it is at another size. Make it live, or leave it as typed.',
        place: { column: 'write-up', label: 'Write-up, step 1, The floor', nth: 0, step: 1 },
      },
    ]);
  });

  it('are only worth a look when the words do not say which measure they are, and nothing when said of a bought sheet', () => {
    const text = writeUp(step('', say('Something is 9 inches here.')), step('', say('Take a 6 by 9 sheet of paper.')));
    expect(typedNumberItems(text, live, placesIn(text)).map(({ blocking, place }) => [blocking, place.step])).toEqual([
      [false, 1],
    ]);
  });
});
