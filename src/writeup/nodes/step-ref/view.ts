import type { NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../../editor/editing-desk';

/** A reference to a step in the editor: its number as it is now, following every move. */
export function stepRefView(desk: EditingDesk): NodeViewRenderer {
  return ({ node }) => {
    const dom = document.createElement('span');
    dom.className = 'step-ref';
    dom.contentEditable = 'false';
    let current = node;
    const draw = () => {
      const number = desk.numbers.get().get(String(current.attrs.key));
      dom.textContent =
        number === undefined ? 'a step that is gone' : number === null ? 'a step left out here' : `step\u00a0${number}`;
      dom.classList.toggle('unknown', number === undefined);
    };
    draw();
    const stop = desk.numbers.listen(draw);
    return {
      dom,
      update(next) {
        if (next.type !== current.type) return false;
        current = next;
        draw();
        return true;
      },
      selectNode: () => dom.classList.add('selected'),
      deselectNode: () => dom.classList.remove('selected'),
      ignoreMutation: () => true,
      destroy: stop,
    };
  };
}
