import { Node } from '@tiptap/core';
import { stepKey, textUpTo } from '../attributes';

/** What is done now because a later step needs it, while the work still lies flat. */
export const Forward = Node.create({
  name: 'forward',
  group: 'block',
  content: '(paragraph | bulletList | orderedList)+',
  defining: true,

  addAttributes() {
    return {
      word: {
        default: 'While it is still flat',
        validate: textUpTo(60),
        parseHTML: (element) => element.getAttribute('data-forward') ?? '',
        renderHTML: ({ word }) => ({ 'data-forward': String(word) }),
      },
      key: {
        default: '',
        validate: stepKey,
        parseHTML: (element) => element.getAttribute('data-for') ?? '',
        renderHTML: ({ key }) => (key === '' ? {} : { 'data-for': String(key) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'div[data-forward]' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['div', HTMLAttributes, 0];
  },
});
