import { Node } from '@tiptap/core';

/** Where the work can hurt: said at the place where it matters. */
export const Caution = Node.create({
  name: 'caution',
  group: 'block',
  content: '(paragraph | bulletList | orderedList)+',
  defining: true,

  parseHTML() {
    return [{ tag: 'div[data-caution]' }];
  },

  renderHTML() {
    return ['div', { 'data-caution': '' }, 0];
  },
});
