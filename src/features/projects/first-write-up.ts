import type { Pattern } from '@/engine';
import { WRITE_UP_VERSION, type BlockNode, type InlineNode, type WriteUp } from '@/writeup/document';
import { liveParts } from '@/writeup/live';

/** The write-up that a new project begins with: materials and cut list, then the pattern's order of making, a step a sentence. */
export function firstWriteUp(pattern: Pick<Pattern, 'pieces' | 'order'>): WriteUp {
  const shown = new Set<string>();
  const steps = pattern.order.map((line): BlockNode => {
    // Readers choose for themselves: what only some of them need is there for all, and says so.
    const sentence = typeof line === 'string' ? line : line.says;
    const cards = pattern.pieces.filter((piece) => !shown.has(piece.name) && names(sentence, piece.name));
    cards.forEach((piece) => shown.add(piece.name));
    return {
      type: 'step',
      attrs: { title: '', mark: '' },
      content: [
        { type: 'paragraph', content: inline(sentence) },
        ...cards.map((piece): BlockNode => ({ type: 'pieceCard', attrs: { piece: piece.name } })),
      ],
    };
  });
  // From blank there are no pieces yet; card there will be, and a list has one item at least.
  const cut = new Set(pattern.pieces.map((piece) => piece.stock));
  const stocks = cut.size === 0 ? ['card'] : [...cut];
  return {
    version: WRITE_UP_VERSION,
    doc: {
      type: 'doc',
      content: [
        {
          type: 'materials',
          content: [
            {
              type: 'bulletList',
              content: stocks.map((stock) => ({ type: 'listItem', content: [paragraph(capital(stock))] })),
            },
          ],
        },
        { type: 'cutList' },
        ...(steps.length > 0
          ? steps
          : [{ type: 'step', attrs: { title: '', mark: '' }, content: [{ type: 'paragraph' }] } as BlockNode]),
      ],
    },
  };
}

const paragraph = (text: string): BlockNode => ({ type: 'paragraph', content: [{ type: 'text', text }] });
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
const names = (sentence: string, piece: string): boolean =>
  new RegExp(`(?<![\\p{L}\\p{N}])${piece.replace(/[.*+?^${}()|[\]\\]/gu, '\\$&')}(?![\\p{L}\\p{N}])`, 'iu').test(
    sentence,
  );

const inline = (sentence: string): InlineNode[] =>
  liveParts(sentence).map((part) =>
    'formula' in part
      ? { type: 'measure', attrs: { formula: part.formula, bare: false } }
      : { type: 'text', text: part.text },
  );
