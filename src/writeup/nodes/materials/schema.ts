import { Node } from '@tiptap/core';

/** What to have on the table before beginning: card, glue, tools. */
export const Materials = Node.create({
  name: 'materials',
  group: 'block',
  content: '(paragraph | heading | bulletList | orderedList | amounts)+',
  defining: true,

  parseHTML() {
    return [{ tag: 'div[data-materials]' }];
  },

  renderHTML() {
    return ['div', { 'data-materials': '' }, 0];
  },
});
