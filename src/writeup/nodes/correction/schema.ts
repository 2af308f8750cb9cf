import { Node } from '@tiptap/core';

/** What an earlier edition had wrong, said at the place where it stood. */
export const Correction = Node.create({
  name: 'correction',
  group: 'block',
  content: '(paragraph | bulletList | orderedList)+',
  defining: true,

  parseHTML() {
    return [{ tag: 'div[data-correction]' }];
  },

  renderHTML() {
    return ['div', { 'data-correction': '' }, 0];
  },
});
