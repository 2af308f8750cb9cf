import { Node } from '@tiptap/core';
import { textUpTo } from '../attributes';

/** A numbered step; the number follows from its place. */
export const Step = Node.create({
  name: 'step',
  group: 'part',
  content: 'block+',
  isolating: true,
  defining: true,

  addAttributes() {
    return {
      title: {
        default: '',
        validate: textUpTo(200),
        parseHTML: (element) => element.getAttribute('data-title') ?? '',
        renderHTML: ({ title }) => ({ 'data-title': String(title) }),
      },
      mark: {
        default: '',
        validate: textUpTo(60),
        parseHTML: (element) => element.getAttribute('data-mark') ?? '',
        renderHTML: ({ mark }) => ({ 'data-mark': String(mark) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'section[data-title]' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['section', HTMLAttributes, 0];
  },
});
