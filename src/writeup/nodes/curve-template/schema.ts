import { Node } from '@tiptap/core';
import { textUpTo } from '../attributes';

/** The curves of one piece at full size. */
export const CurveTemplate = Node.create({
  name: 'curveTemplate',
  group: 'block',
  atom: true,
  draggable: true,

  addAttributes() {
    return {
      piece: {
        default: '',
        validate: textUpTo(80),
        parseHTML: (element) => element.getAttribute('data-curve-of') ?? '',
        renderHTML: ({ piece }) => ({ 'data-curve-of': String(piece) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'div[data-curve-of]' }];
  },

  renderHTML({ node, HTMLAttributes }) {
    return ['div', HTMLAttributes, ['p', {}, `Curve of ${String(node.attrs.piece)}`]];
  },

  renderText({ node }) {
    return `Curve of ${String(node.attrs.piece)}`;
  },
});
