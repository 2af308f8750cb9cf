import { keyOf, renameInFormula, type Fault, type Rename, type Result } from '@/engine';
import type { BlockNode, DocNode, InlineNode } from './document';

/**
 * The write-up with a name of its pattern changed: in live measures, wherever they stand, and on piece cards. The words
 * stay as they were written. Parts in which nothing changes stay the same objects. Refused while a live measure holds a mark
 * that means nothing, with its place.
 */
export function renameInWriteUp(doc: DocNode, rename: Rename): Result<DocNode> {
  const faults: Fault[] = [];
  let steps = 0;
  let where = '';

  const inline = (node: InlineNode): InlineNode => {
    if (node.type !== 'measure') return node;
    const { formula } = node.attrs;
    const renamed = renameInFormula(formula, rename, where);
    if (!renamed.ok) faults.push(...renamed.faults);
    return renamed.ok && renamed.value !== formula
      ? { ...node, attrs: { ...node.attrs, formula: renamed.value } }
      : node;
  };
  const block = (node: BlockNode): BlockNode => {
    switch (node.type) {
      case 'paragraph':
      case 'heading':
      case 'photo':
        return node.content === undefined ? node : withContent(node, node.content.map(inline));
      case 'bulletList':
      case 'orderedList':
        return withContent(
          node,
          node.content.map((item) => withContent(item, item.content.map(block))),
        );
      case 'step':
      case 'materials':
      case 'tip':
      case 'caution':
        return withContent(node, node.content.map(block));
      case 'pieceCard':
        return rename.what === 'piece' && keyOf(node.attrs.piece) === keyOf(rename.from)
          ? { ...node, attrs: { ...node.attrs, piece: rename.to } }
          : node;
      case 'cutList':
        return node;
      default:
        return node satisfies never;
    }
  };
  const content = doc.content.map((node) => {
    if (node.type === 'step') steps += 1;
    where = node.type === 'step' ? `write-up, step ${steps}` : 'write-up, outside the steps';
    return block(node);
  });
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: withContent(doc, content) };
}

function withContent<T extends { readonly content?: readonly unknown[] }>(
  node: T,
  content: NonNullable<T['content']>,
): T {
  return content.some((part, index) => part !== node.content?.[index]) ? { ...node, content } : node;
}
