import { Node, type NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../editor/editing-desk';
import type { LiveFigures } from '../live';

/** A block that holds nothing of its own: it is worked out whole wherever it is shown. `mark` is its attribute in HTML. */
export const liveBlock = (name: string, mark: string, words: string): Node =>
  Node.create({
    name,
    group: 'block',
    atom: true,
    draggable: true,

    parseHTML() {
      return [{ tag: `div[${mark}]` }];
    },

    renderHTML() {
      return ['div', { [mark]: '' }, ['p', {}, words]];
    },

    renderText() {
      return words;
    },
  });

/** In the editor: the same as the reader gets, following the figures. */
export function liveBlockView(
  desk: EditingDesk,
  given: { readonly className: string; readonly words: string; readonly inside: (live: LiveFigures) => string },
): NodeViewRenderer {
  return ({ node }) => {
    const dom = document.createElement('div');
    dom.className = given.className;
    dom.contentEditable = 'false';
    const draw = () => {
      const live = desk.figures.get();
      dom.innerHTML = live ? given.inside(live) : `<p>${given.words} appears when the pattern reads.</p>`;
    };
    draw();
    const stop = desk.figures.listen(draw);
    return {
      dom,
      update: (next) => next.type === node.type,
      selectNode: () => dom.classList.add('selected'),
      deselectNode: () => dom.classList.remove('selected'),
      ignoreMutation: () => true,
      destroy: stop,
    };
  };
}
