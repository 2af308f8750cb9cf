import {
  WRITE_UP_VERSION,
  type BlockNode,
  type InlineNode,
  type MarkNode,
  type PhotoNode,
  type StepNode,
  type WriteUp,
} from '@/writeup/document';

/*
 * Write-ups in code, close to how they read. In every text, `[[inside width]]` is a live measure, `[[inside width|bare]]` one
 * without its unit, `**words**` are bold and `[words](/handbook)` is a link. `[#lid]` is the number of the step that is keyed
 * `lid`, `[=sheets card]` an amount, and `{lid is flip: words}` are said only when that holds.
 */

type Words = string;
const MARKED =
  /\[\[([^\]|]+)(\|bare)?\]\]|\*\*([^*]+)\*\*|\[([^\]#=][^\]]*)\]\(([^)\s]+)\)|\[#(\w+)\]|\[=([^\]]+)\]|\{([^:}]+): ([^}]*)\}/gu;

/** A text with its live measures, bold words, links and conditions as nodes. */
export function inline(words: Words): InlineNode[] {
  const nodes: InlineNode[] = [];
  let at = 0;
  for (const found of words.matchAll(MARKED)) {
    nodes.push(...plain(words.slice(at, found.index)), ...marked(found));
    at = found.index + found[0].length;
  }
  return [...nodes, ...plain(words.slice(at))];
}

function marked([
  ,
  formula,
  bare,
  strong,
  label,
  href,
  key,
  of,
  when,
  phrase,
]: RegExpMatchArray): readonly InlineNode[] {
  if (formula !== undefined) return [{ type: 'measure', attrs: { formula: formula.trim(), bare: bare !== undefined } }];
  if (strong !== undefined) return plain(strong, [{ type: 'bold' }]);
  if (key !== undefined) return [{ type: 'stepRef', attrs: { key } }];
  if (of !== undefined) return [{ type: 'amount', attrs: { of } }];
  if (when === undefined) return plain(label ?? '', [{ type: 'link', attrs: { href: href ?? '' } }]);
  const only: MarkNode = { type: 'onlyWhen', attrs: { when } };
  return inline(phrase ?? '').map((node) => ({
    ...node,
    marks: [only, ...('marks' in node ? (node.marks ?? []) : [])],
  }));
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
/** A step with more to be said of it: when it is there, whether it may be skipped, what references call it. */
export const stepAs = (
  attrs: Omit<StepNode['attrs'], 'title' | 'mark'>,
  title: string,
  ...content: Content
): BlockNode => {
  const made = step(title, ...content);
  return made.type === 'step' ? { ...made, attrs: { ...made.attrs, ...attrs } } : made;
};
/** Something to be done now, while it is still flat, for the step that is keyed so. */
export const forward = (key: string, ...content: Content): BlockNode => ({
  type: 'forward',
  attrs: { word: 'While it is still flat', key },
  content: blocks(content),
});
export const tip = (...content: Content): BlockNode => ({ type: 'tip', content: blocks(content) });
export const caution = (...content: Content): BlockNode => ({ type: 'caution', content: blocks(content) });
export const materials = (...items: readonly Words[]): BlockNode => ({ type: 'materials', content: [list(...items)] });
export const tools = (...items: readonly Words[]): BlockNode => ({ type: 'tools', content: [list(...items)] });
export const curveOf = (name: string): BlockNode => ({ type: 'curveTemplate', attrs: { piece: name } });
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
