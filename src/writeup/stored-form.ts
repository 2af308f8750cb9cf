import type { DocNode } from './document';

interface AnyNode {
  readonly type: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly content?: readonly AnyNode[];
}

/** Attributes that are left away while they hold their usual value: those that a part did not have from the first day. */
const USUAL: Readonly<Record<string, Readonly<Record<string, unknown>>>> = {
  step: { moment: null, when: '', optional: false, key: '' },
  photo: { focus: null, crop: 'whole' },
  tableCell: { colspan: 1, rowspan: 1, colwidth: null },
  tableHeader: { colspan: 1, rowspan: 1, colwidth: null },
  // The text editor's own; `type` is the kind of numbering, of which there is one.
  orderedList: { start: 1, type: null },
};
/** Never kept, whatever they hold. */
const DROPPED: Readonly<Record<string, readonly string[]>> = { orderedList: ['type'] };

/**
 * A document of the editor without attributes that say nothing, so that the same text is always stored alike: what an older
 * version stored is not different from what this one stores.
 */
export const storedForm = (doc: DocNode): DocNode => plain(doc as AnyNode) as DocNode;

function plain(node: AnyNode): AnyNode {
  const { attrs, content, ...rest } = node;
  return { ...rest, ...keptOf(node.type, attrs), ...(content ? { content: content.map(plain) } : {}) };
}

function keptOf(type: string, attrs: AnyNode['attrs']): Pick<AnyNode, 'attrs'> {
  const usual = USUAL[type];
  if (!attrs || !usual) return attrs ? { attrs } : {};
  const kept = Object.entries(attrs).filter(
    ([name, value]) => !(name in usual && usual[name] === value) && !DROPPED[type]?.includes(name),
  );
  return kept.length === 0 ? {} : { attrs: Object.fromEntries(kept) };
}
