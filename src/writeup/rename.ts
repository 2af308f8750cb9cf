import { keyOf, renameInFormula, type Fault, type Rename, type Result } from '@/engine';
import type { BlockNode, DocNode, InlineNode, MarkNode, StepNode } from './document';

/**
 * The write-up with a name of its pattern changed: in live measures and conditions, wherever they stand, and on piece cards. The words
 * stay as they were written. Parts in which nothing changes stay the same objects. Refused while a live measure holds a mark
 * that means nothing, with its place.
 */
export function renameInWriteUp(doc: DocNode, rename: Rename): Result<DocNode> {
  const faults: Fault[] = [];
  let steps = 0;
  let where = '';

  const formula = (text: string): string => {
    const renamed = renameInFormula(text, rename, where);
    if (!renamed.ok) faults.push(...renamed.faults);
    return renamed.ok ? renamed.value : text;
  };
  const mark = (one: MarkNode): MarkNode => {
    if (one.type !== 'onlyWhen') return one;
    const when = formula(one.attrs.when);
    return when === one.attrs.when ? one : { ...one, attrs: { when } };
  };
  const marked = <T extends InlineNode>(node: T): T => {
    if (!('marks' in node) || node.marks === undefined) return node;
    const marks = node.marks.map(mark);
    return marks.some((one, index) => one !== node.marks?.[index]) ? { ...node, marks } : node;
  };
  const inline = (node: InlineNode): InlineNode => {
    if (node.type !== 'measure') return marked(node);
    const renamed = formula(node.attrs.formula);
    return marked(renamed === node.attrs.formula ? node : { ...node, attrs: { ...node.attrs, formula: renamed } });
  };
  const step = (node: StepNode): StepNode => {
    const when = node.attrs.when ? formula(node.attrs.when) : node.attrs.when;
    return when === node.attrs.when ? node : { ...node, attrs: { ...node.attrs, when } };
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
        return withContent(step(node), node.content.map(block));
      case 'materials':
      case 'tools':
      case 'tip':
      case 'caution':
      case 'correction':
      case 'forward':
        return withContent(node, node.content.map(block));
      case 'table':
        return withContent(
          node,
          node.content.map((row) =>
            withContent(
              row,
              row.content.map((cell) => withContent(cell, cell.content.map(block))),
            ),
          ),
        );
      case 'pieceCard':
      case 'curveTemplate':
        return rename.what === 'piece' && keyOf(node.attrs.piece) === keyOf(rename.from)
          ? { ...node, attrs: { ...node.attrs, piece: rename.to } }
          : node;
      case 'cutList':
      case 'amounts':
      case 'sheetPlan':
      case 'foldedView':
      case 'sizeSummary':
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
