import { Node } from '@tiptap/core';

/** What to have at hand: trimmer, scoring board, folder. */
export const Tools = Node.create({
  name: 'tools',
  group: 'block',
  content: '(paragraph | heading | bulletList | orderedList | amounts)+',
  defining: true,

  parseHTML() {
    return [{ tag: 'div[data-tools]' }];
  },

  renderHTML() {
    return ['div', { 'data-tools': '' }, 0];
  },
});
