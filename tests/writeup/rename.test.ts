import { describe, expect, it } from 'vitest';
import type { Rename } from '@/engine';
import type { BlockNode, DocNode } from '@/writeup/document';
import { readWriteUp } from '@/writeup/read-write-up';
import { renameInWriteUp } from '@/writeup/rename';
import { collectUses } from '@/writeup/uses';
import { sampleDoc } from './sample';

const tab: Rename = { what: 'measure', from: 'tab', to: 'glue flap' };
const renamed = (doc: DocNode, rename: Rename): DocNode => {
  const result = renameInWriteUp(doc, rename);
  if (!result.ok) throw new Error(result.faults[0]!.found);
  return result.value;
};
const measure = (formula: string) => ({ type: 'measure', attrs: { formula, bare: false } }) as const;
const line = (...formulas: string[]): BlockNode => ({ type: 'paragraph', content: formulas.map(measure) });

describe('renaming in a write-up', () => {
  it('changes live measures in the text and under photos and conditions, and nothing else', () => {
    const after = renamed(sampleDoc, tab);
    expect(collectUses(after).formulas.map(({ formula }) => formula)).toEqual([
      'inside width + 2 * glue flap',
      'glue flap',
      'glue flap',
    ]);
    expect(after.content.slice(0, 3)).toEqual(sampleDoc.content.slice(0, 3));
    expect(collectUses(after).conditions.map(({ when }) => when)).toEqual(['glue flap > 1/4 in', 'glue flap > 1/2 in']);
    expect(JSON.stringify(after).replaceAll('glue flap', 'tab')).toBe(JSON.stringify(sampleDoc));
    expect(readWriteUp({ version: 1, doc: after })).toEqual({ ok: true, value: { version: 1, doc: after } });
  });
  it('changes conditions of steps and phrases, a choice and its options among them', () => {
    const phrase = (when: string) =>
      ({ type: 'text', text: 'x', marks: [{ type: 'onlyWhen', attrs: { when } }] }) as const;
    const conditional: DocNode = {
      type: 'doc',
      content: [
        {
          type: 'step',
          attrs: { title: '', mark: '', when: 'lid is flip' },
          content: [{ type: 'paragraph', content: [phrase('tab > 1 in'), phrase('lid is flip and tab < 1 in')] }],
        },
      ],
    };
    const whens = (rename: Rename) => collectUses(renamed(conditional, rename)).conditions.map(({ when }) => when);
    expect(whens(tab)).toEqual(['lid is flip', 'glue flap > 1 in', 'lid is flip and glue flap < 1 in']);
    expect(whens({ what: 'choice', from: 'lid', to: 'top' })).toEqual([
      'top is flip',
      'tab > 1 in',
      'top is flip and tab < 1 in',
    ]);
    expect(whens({ what: 'option', choice: 'lid', from: 'flip', to: 'hinged' })).toEqual([
      'lid is hinged',
      'tab > 1 in',
      'lid is hinged and tab < 1 in',
    ]);
  });
  it('reaches every block that holds text', () => {
    const item = (block: BlockNode) => ({ type: 'listItem', content: [block] }) as const;
    const blocks: BlockNode[] = [
      { type: 'heading', attrs: { level: 2 }, content: [measure('tab')] },
      { type: 'materials', content: [{ type: 'bulletList', content: [item(line('tab'))] }] },
      { type: 'step', attrs: { title: 'tab', mark: '' }, content: [line('tab')] },
      { type: 'tip', content: [{ type: 'orderedList', content: [item(line('2 * tab'))] }] },
      { type: 'caution', content: [line('tab', 'tab width', 'tab + tab')] },
    ];
    const uses = collectUses(renamed({ type: 'doc', content: blocks }, tab));
    expect(uses.formulas.map(({ formula }) => formula)).toEqual([
      'glue flap',
      'glue flap',
      'glue flap',
      '2 * glue flap',
      'glue flap',
      'tab width',
      'glue flap + glue flap',
    ]);
  });
  it('changes the cards of a piece and the sizes that are said of it', () => {
    const doc: DocNode = {
      type: 'doc',
      content: [
        { type: 'pieceCard', attrs: { piece: 'Strip' } },
        { type: 'pieceCard', attrs: { piece: 'Strip end' } },
        line('strip.across', 'strip end.across', 'strip'),
      ],
    };
    const { pieces, formulas } = collectUses(renamed(doc, { what: 'piece', from: 'Strip', to: 'Band' }));
    expect(pieces.map(({ piece }) => piece)).toEqual(['Band', 'Strip end']);
    expect(formulas.map(({ formula }) => formula)).toEqual(['band.across', 'strip end.across', 'strip']);
  });
  it('keeps what does not change the same', () => {
    expect(renamed(sampleDoc, { ...tab, from: 'rib' })).toBe(sampleDoc);
    expect(renamed(sampleDoc, tab).content[1]).toBe(sampleDoc.content[1]);
  });
  it('takes along a live measure that does not read yet, and says where one cannot be told', () => {
    expect(renamed({ type: 'doc', content: [line('tab +')] }, tab).content).toEqual([line('glue flap +')]);
    const doc: DocNode = {
      type: 'doc',
      content: [line('tab'), { type: 'step', attrs: { title: '', mark: '' }, content: [line('tab ; 2')] }],
    };
    expect(renameInWriteUp(doc, tab)).toMatchObject({
      ok: false,
      faults: [{ code: 'formula stray mark', where: 'write-up, step 1', found: '“;” means nothing here' }],
    });
  });
});
