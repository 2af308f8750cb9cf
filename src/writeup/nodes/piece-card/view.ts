import type { NodeViewRenderer } from '@tiptap/core';
import { drawPiece } from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import type { EditingDesk } from '../../editor/editing-desk';

/** Pixels that the piece is drawn in beside its name. */
const SMALL = { width: 140, tallest: 88 } as const;

/** A piece card in the editor, small: which piece, how many of what; the reader gets it with dimensions and words. */
export function pieceCardView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, editor, getPos }) => {
    const dom = document.createElement('div');
    dom.className = 'piece-card piece-card-small';
    dom.contentEditable = 'false';
    const picture = document.createElement('div');
    picture.className = 'piece-card-picture';
    const words = document.createElement('div');
    const choose = document.createElement('select');
    choose.className = 'piece-card-choose';
    choose.setAttribute('aria-label', 'Which piece');
    const facts = document.createElement('p');
    facts.className = 'piece-card-facts';
    words.append(choose, facts);
    dom.append(picture, words);

    let current = node;
    const draw = () => {
      const name = String(current.attrs.piece);
      const figures = desk.figures.get()?.figures;
      const piece = figures?.pieces.find((p) => p.name === name);
      const names = figures?.pieces.map((p) => p.name) ?? [];
      choose.replaceChildren(
        ...(names.includes(name) ? names : [name, ...names]).map((n) => new Option(n, n, false, n === name)),
      );
      dom.classList.toggle('unknown', figures !== undefined && !piece);
      facts.textContent = piece
        ? `cut ${piece.count} · ${piece.stock}`
        : 'Not part of the box as it is set up now. Choose another piece, or leave it for a choice that has it.';
      picture.innerHTML =
        figures && piece
          ? drawingSvg(
              drawPiece(piece, {
                ...SMALL,
                units: figures.sizing.units,
                grid: figures.sizing.grid,
                labels: false,
                dims: false,
              }),
            )
          : '';
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
