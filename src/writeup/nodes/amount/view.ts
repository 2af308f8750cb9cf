import type { NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../../editor/editing-desk';
import { showAmount } from '../../amounts';
import { usualPlan } from '../../usual-plan';

/** An amount in the editor: as it is on the usual sheets; the reader's own may take another number of them. */
export function amountView(desk: EditingDesk): NodeViewRenderer {
  return ({ node }) => {
    const dom = document.createElement('span');
    dom.className = 'measure amount';
    dom.contentEditable = 'false';
    let current = node;
    const draw = () => {
      const of = String(current.attrs.of);
      const figures = desk.figures.get()?.figures;
      dom.textContent = figures ? (showAmount(figures, usualPlan(figures), of) ?? 'none') : of;
      dom.title = `Follows the box: ${of}`;
    };
    draw();
    const stop = desk.figures.listen(draw);
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
