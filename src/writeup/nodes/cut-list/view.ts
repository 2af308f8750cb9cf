import type { NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../../editor/editing-desk';
import { cutListInside } from '../../render-figures';

/** The cut list in the editor: the same table that the reader gets, following the figures. */
export function cutListView(desk: EditingDesk): NodeViewRenderer {
  return ({ node }) => {
    const dom = document.createElement('div');
    dom.className = 'cut-list';
    dom.contentEditable = 'false';
    const draw = () => {
      const live = desk.figures.get();
      dom.innerHTML = live ? cutListInside(live.figures) : '<p>The cut list appears when the pattern reads.</p>';
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
