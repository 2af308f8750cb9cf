import { Node } from '@tiptap/core';

/** Something that makes the work easier; may be skipped. */
export const Tip = Node.create({
  name: 'tip',
  group: 'block',
  content: '(paragraph | bulletList | orderedList)+',
  defining: true,

  parseHTML() {
    return [{ tag: 'div[data-tip]' }];
  },

  renderHTML() {
    return ['div', { 'data-tip': '' }, 0];
  },
});
