import {
  WRITE_UP_VERSION,
  type BlockNode,
  type InlineNode,
  type MarkNode,
  type PhotoNode,
  type WriteUp,
} from '@/writeup/document';

/*
 * Write-ups in code, close to how they read. In every text, `[[inside width]]` is a live measure, `[[inside width|bare]]` one
 * without its unit, `**words**` are bold and `[words](/handbook)` is a link.
 */

type Words = string;
const MARKED = /\[\[([^\]|]+)(\|bare)?\]\]|\*\*([^*]+)\*\*|\[([^\]]+)\]\(([^)\s]+)\)/gu;

/** A text with its live measures, bold words and links as nodes. */
export function inline(words: Words): InlineNode[] {
  const nodes: InlineNode[] = [];
  let at = 0;
  for (const found of words.matchAll(MARKED)) {
    const [whole, formula, bare, strong, label, href] = found;
    nodes.push(...plain(words.slice(at, found.index)));
    if (formula !== undefined)
      nodes.push({ type: 'measure', attrs: { formula: formula.trim(), bare: bare !== undefined } });
    else if (strong !== undefined) nodes.push(...plain(strong, [{ type: 'bold' }]));
    else nodes.push(...plain(label ?? '', [{ type: 'link', attrs: { href: href ?? '' } }]));
    at = found.index + whole.length;
  }
  return [...nodes, ...plain(words.slice(at))];
}

const plain = (text: string, marks: readonly MarkNode[] = []): InlineNode[] =>
  text === '' ? [] : [{ type: 'text', text, ...(marks.length > 0 ? { marks } : {}) }];

export const p = (words: Words): BlockNode => ({ type: 'paragraph', content: inline(words) });
export const heading = (words: Words): BlockNode => ({ type: 'heading', attrs: { level: 2 }, content: inline(words) });
export const list = (...items: readonly Words[]): BlockNode => ({ type: 'bulletList', content: items.map(item) });
export const ordered = (...items: readonly Words[]): BlockNode => ({ type: 'orderedList', content: items.map(item) });
const item = (words: Words) => ({ type: 'listItem' as const, content: [p(words)] });

type Content = readonly (BlockNode | Words)[];
const blocks = (content: Content): BlockNode[] => content.map((one) => (typeof one === 'string' ? p(one) : one));

/** A numbered step; a text is a paragraph. Its mark, such as "optional", follows the title after a bar. */
export function step(title: string, ...content: Content): BlockNode {
  const [name = '', mark = ''] = title.split('|').map((part) => part.trim());
  return { type: 'step', attrs: { title: name, mark }, content: blocks(content) };
}
export const tip = (...content: Content): BlockNode => ({ type: 'tip', content: blocks(content) });
export const caution = (...content: Content): BlockNode => ({ type: 'caution', content: blocks(content) });
export const materials = (...items: readonly Words[]): BlockNode => ({ type: 'materials', content: [list(...items)] });
export const piece = (name: string): BlockNode => ({ type: 'pieceCard', attrs: { piece: name } });
export const cutList: BlockNode = { type: 'cutList' };

/** A picture that is stored already. */
export interface StoredPicture {
  readonly upload: string;
  readonly alt: string;
  readonly width: number;
  readonly height: number;
}
export const photo = (attrs: StoredPicture, caption: Words): PhotoNode => ({
  type: 'photo',
  attrs,
  content: inline(caption),
});

export const writeUp = (...content: Content): WriteUp => ({
  version: WRITE_UP_VERSION,
  doc: { type: 'doc', content: blocks(content) },
});
