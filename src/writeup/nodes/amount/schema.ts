import { mergeAttributes, Node } from '@tiptap/core';
import { textUpTo } from '../attributes';

/** What the box takes of something, worked out wherever the text is shown. */
export const Amount = Node.create({
  name: 'amount',
  group: 'inline',
  inline: true,
  atom: true,
  selectable: true,

  addAttributes() {
    return {
      of: {
        default: 'sheets',
        validate: textUpTo(120),
        parseHTML: (element) => element.getAttribute('data-amount') ?? '',
        renderHTML: ({ of }) => ({ 'data-amount': String(of) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'span[data-amount]' }];
  },

  renderHTML({ node, HTMLAttributes }) {
    return ['span', mergeAttributes({ class: 'measure' }, HTMLAttributes), String(node.attrs.of)];
  },

  renderText({ node }) {
    return String(node.attrs.of);
  },
});
