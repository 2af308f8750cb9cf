import { Mark } from '@tiptap/core';

/** A typed number that its author means to stay as it is. Readers see nothing of it. */
export const AsTyped = Mark.create({
  name: 'asTyped',
  // What is typed behind it is another number.
  inclusive: false,

  parseHTML() {
    return [{ tag: 'span[data-as-typed]' }];
  },

  renderHTML() {
    return ['span', { 'data-as-typed': '' }, 0];
  },
});
