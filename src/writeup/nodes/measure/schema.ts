import { mergeAttributes, Node } from '@tiptap/core';
import { textUpTo, yesNo } from '../attributes';

/** The longest formula that is kept in the text. */
const FORMULA_LENGTH = 300;

/** A live measure in the text. Its value is never stored: it is worked out wherever the text is shown. */
export const Measure = Node.create({
  name: 'measure',
  group: 'inline',
  inline: true,
  atom: true,
  selectable: true,

  addAttributes() {
    return {
      formula: {
        default: '',
        validate: textUpTo(FORMULA_LENGTH),
        parseHTML: (element) => element.getAttribute('data-live') ?? '',
        renderHTML: ({ formula }) => ({ 'data-live': String(formula) }),
      },
      bare: {
        default: false,
        validate: yesNo,
        parseHTML: (element) => element.hasAttribute('data-bare'),
        renderHTML: ({ bare }) => (bare ? { 'data-bare': '' } : {}),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'span[data-live]' }];
  },

  renderHTML({ node, HTMLAttributes }) {
    return ['span', mergeAttributes({ class: 'measure' }, HTMLAttributes), String(node.attrs.formula)];
  },

  renderText({ node }) {
    return String(node.attrs.formula);
  },
});
