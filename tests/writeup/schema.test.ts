import { describe, expect, it } from 'vitest';
import { collectUses } from '@/writeup/uses';
import { readHref, safeHref } from '@/writeup/links';
import { pictureSources } from '@/writeup/pictures';
import { writeUpSchema } from '@/writeup/schema';
import { sampleDoc } from './sample';

describe('the schema', () => {
  it('holds the kinds of parts and marks of the stored contract and no others', () => {
    const { nodes, marks } = writeUpSchema();
    expect(Object.keys(nodes).sort()).toEqual([
      'amount',
      'amounts',
      'bulletList',
      'caution',
      'correction',
      'curveTemplate',
      'cutList',
      'doc',
      'foldedView',
      'forward',
      'hardBreak',
      'heading',
      'listItem',
      'materials',
      'measure',
      'orderedList',
      'paragraph',
      'photo',
      'pieceCard',
      'sheetPlan',
      'sizeSummary',
      'step',
      'stepRef',
      'table',
      'tableCell',
      'tableHeader',
      'tableRow',
      'text',
      'tip',
      'tools',
    ]);
    expect(Object.keys(marks).sort()).toEqual(['asTyped', 'bold', 'italic', 'link', 'onlyWhen']);
  });

  it('gives back what it was given', () => {
    const doc = writeUpSchema().nodeFromJSON(sampleDoc);
    doc.check();
    expect(writeUpSchema().nodeFromJSON(doc.toJSON()).eq(doc)).toBe(true);
  });

  it('reads as plain text with the formulas of its measures', () => {
    const doc = writeUpSchema().nodeFromJSON(sampleDoc);
    expect(
      doc.textBetween(0, doc.content.size, '\n', (leaf) => leaf.type.spec['toText']?.({ node: leaf }) ?? ''),
    ).toContain('Cut inside width + 2 * tab and tab twice');
  });
});

describe('what a write-up uses', () => {
  it('is listed in order of appearance with the step it stands in', () => {
    expect(collectUses(sampleDoc)).toEqual({
      formulas: [
        { step: 1, formula: 'inside width + 2 * tab' },
        { step: 1, formula: 'tab' },
        { step: 1, formula: 'tab' },
      ],
      conditions: [
        { step: 2, when: 'tab > 1/4 in' },
        { step: 2, when: 'tab > 1/2 in' },
      ],
      references: [
        { step: 2, key: 'ends', found: true },
        { step: null, key: 'ends', found: true },
      ],
      pieces: [{ step: 1, piece: 'Strip' }],
      curves: [{ step: null, piece: 'Strip' }],
      photos: [{ step: 1, upload: 'a1b2c3', alt: 'A strip' }],
      cutLists: [{ step: null }],
      materials: [{ step: null }],
      steps: 2,
    });
  });
});

describe('a link as it is typed', () => {
  it.each([
    ['quilletlane.example/card', 'https://quilletlane.example/card'],
    ['ines@quilletlane.example', 'mailto:ines@quilletlane.example'],
    [' https://a.example ', 'https://a.example'],
    ['/handbook', '/handbook'],
    ['just words', null],
    ['javascript:alert(1)', null],
    ['JAVASCRIPT:alert(1)', null],
    ['vbscript:x', null],
    ['', null],
  ])('%j goes to %j', (typed, href) => {
    expect(readHref(typed)).toBe(href);
  });

  it('is never longer than 2000 characters', () => {
    expect(safeHref(`https://a.example/${'a'.repeat(2000)}`)).toBeNull();
  });
});

describe("a picture's sources", () => {
  it('name each file with its true width, none twice', () => {
    expect(pictureSources('x', 1600)).toBe('/media/x-480.webp 480w, /media/x-960.webp 960w, /media/x-1600.webp 1600w');
    expect(pictureSources('x', 700)).toBe('/media/x-480.webp 480w, /media/x-960.webp 700w');
    expect(pictureSources('x', 300)).toBe('/media/x-480.webp 300w');
  });
});
