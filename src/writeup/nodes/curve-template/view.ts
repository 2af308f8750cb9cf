import type { NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../../editor/editing-desk';
import { curvesInside, curvesOf } from '../../curve-template';

/** The curve template in the editor: as the reader gets it, with a choice of the pieces that have a curve. */
export function curveTemplateView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, editor, getPos }) => {
    const dom = document.createElement('div');
    dom.className = 'live-block curve-template';
    dom.contentEditable = 'false';
    const choose = document.createElement('select');
    choose.className = 'piece-card-choose';
    choose.setAttribute('aria-label', 'Curve of which piece');
    const shown = document.createElement('div');
    dom.append(choose, shown);
    let current = node;
    const draw = () => {
      const name = String(current.attrs.piece);
      const figures = desk.figures.get()?.figures;
      const names = (figures?.pieces ?? []).filter((piece) => curvesOf(piece).length > 0).map((piece) => piece.name);
      choose.replaceChildren(
        ...(names.includes(name) ? names : [name, ...names]).map(
          (one) => new Option(one || 'Choose a piece', one, false, one === name),
        ),
      );
      const html = figures && name !== '' ? curvesInside(figures, name) : '';
      shown.innerHTML = html;
      if (html === '') shown.textContent = 'No curve as the box is set up now: readers see nothing here.';
    };
    draw();
    const stop = desk.figures.listen(draw);
    choose.addEventListener('change', () => {
      const pos = getPos();
      if (pos !== undefined) editor.view.dispatch(editor.state.tr.setNodeAttribute(pos, 'piece', choose.value));
    });
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
      stopEvent: (event) => event.target === choose,
      ignoreMutation: () => true,
      destroy: stop,
    };
  };
}
