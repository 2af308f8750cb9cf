import type { DocNode, WriteUp } from '@/writeup/document';

/** A write-up with every node and mark once or more. */
export const sampleDoc: DocNode = {
  type: 'doc',
  content: [
    { type: 'heading', attrs: { level: 2 }, content: [{ type: 'text', text: 'Cut & score' }] },
    {
      type: 'materials',
      content: [
        {
          type: 'bulletList',
          content: [{ type: 'listItem', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Card' }] }] }],
        },
      ],
    },
    { type: 'cutList' },
    {
      type: 'step',
      attrs: { title: 'The strip', mark: 'optional' },
      content: [
        {
          type: 'paragraph',
          content: [
            { type: 'text', text: 'Cut ' },
            { type: 'measure', attrs: { formula: 'inside width + 2 * tab', bare: false } },
            { type: 'text', text: ' and ' },
            { type: 'measure', attrs: { formula: 'tab', bare: true } },
            { type: 'text', marks: [{ type: 'bold' }], text: ' twice' },
            { type: 'hardBreak' },
            {
              type: 'text',
              marks: [{ type: 'link', attrs: { href: 'https://quilletlane.example/card' } }, { type: 'italic' }],
              text: 'which card',
            },
          ],
        },
        { type: 'heading', attrs: { level: 3 }, content: [{ type: 'text', text: 'Scores' }] },
        {
          type: 'orderedList',
          attrs: { start: 3 },
          content: [{ type: 'listItem', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Score' }] }] }],
        },
        { type: 'pieceCard', attrs: { piece: 'Strip' } },
        {
          type: 'photo',
          attrs: { upload: 'a1b2c3', alt: 'A strip', width: 700, height: 500 },
          content: [
            { type: 'text', text: 'The strip is ' },
            { type: 'measure', attrs: { formula: 'tab', bare: false } },
          ],
        },
        { type: 'tip', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Burnish.' }] }] },
        { type: 'caution', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Mind the blade.' }] }] },
      ],
    },
    {
      type: 'step',
      attrs: {
        title: 'The ends',
        mark: '',
        moment: { seconds: 252, address: 'https://video.example/1' },
        when: 'tab > 1/4 in',
        optional: true,
        key: 'ends',
      },
      content: [
        {
          type: 'paragraph',
          content: [
            { type: 'text', text: 'Fold them' },
            { type: 'text', marks: [{ type: 'onlyWhen', attrs: { when: 'tab > 1/2 in' } }], text: ' twice' },
            { type: 'text', text: ', as in ' },
            { type: 'stepRef', attrs: { key: 'ends' } },
            { type: 'text', text: ', on a ' },
            { type: 'text', marks: [{ type: 'asTyped' }], text: '12 in' },
            { type: 'text', text: ' board' },
          ],
        },
      ],
    },
    { type: 'tools', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Folder' }] }] },
    { type: 'paragraph', content: [{ type: 'amount', attrs: { of: 'sheets card' } }] },
    {
      type: 'forward',
      attrs: { word: 'Before you fold', key: 'ends' },
      content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Round them.' }] }],
    },
    { type: 'correction', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'It was wider.' }] }] },
    { type: 'amounts' },
    { type: 'sheetPlan' },
    { type: 'curveTemplate', attrs: { piece: 'Strip' } },
    { type: 'foldedView' },
    { type: 'sizeSummary' },
    {
      type: 'table',
      content: [
        {
          type: 'tableRow',
          content: [
            { type: 'tableHeader', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'Glue' }] }] },
          ],
        },
        {
          type: 'tableRow',
          content: [
            { type: 'tableCell', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'White' }] }] },
          ],
        },
      ],
    },
  ],
};
export const sample: WriteUp = { version: 1, doc: sampleDoc };
