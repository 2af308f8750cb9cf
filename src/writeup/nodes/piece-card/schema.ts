import { Node } from '@tiptap/core';
import { textUpTo } from '../attributes';

/** One piece: its drawing, what to cut, where to score. */
export const PieceCard = Node.create({
  name: 'pieceCard',
  group: 'block',
  atom: true,
  draggable: true,

  addAttributes() {
    return {
      piece: {
        default: '',
        validate: textUpTo(80),
        parseHTML: (element) => element.getAttribute('data-piece') ?? '',
        renderHTML: ({ piece }) => ({ 'data-piece': String(piece) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'div[data-piece]' }];
  },

  renderHTML({ node, HTMLAttributes }) {
    return ['div', HTMLAttributes, ['p', {}, String(node.attrs.piece)]];
  },

  renderText({ node }) {
    return String(node.attrs.piece);
  },
});
