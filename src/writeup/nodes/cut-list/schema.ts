import { Node } from '@tiptap/core';

/** Every piece with its count, size and scores, in one table. */
export const CutList = Node.create({
  name: 'cutList',
  group: 'block',
  atom: true,
  draggable: true,

  parseHTML() {
    return [{ tag: 'div[data-cut-list]' }];
  },

  renderHTML() {
    return ['div', { 'data-cut-list': '' }, ['p', {}, 'Cut list']];
  },

  renderText() {
    return 'Cut list';
  },
});
