import type { NodeViewRenderer } from '@tiptap/core';
import { keyOf } from '@/engine';
import type { EditingDesk } from '../../editor/editing-desk';
import { readLive, showLive, type LiveText } from '../../live';
import { NOT_WORKED_OUT } from '../../render-measure';

/** A live measure in the editor: plain DOM that follows the figures by itself, so that a new size writes nothing into the document. */
export function measureView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, getPos }) => {
    const dom = document.createElement('span');
    dom.contentEditable = 'false';
    dom.setAttribute('role', 'img');
    let current = node;
    let shownBefore: string | null = null;

    const draw = (changes: boolean) => {
      const text = current.attrs as LiveText;
      const live = desk.figures.get();
      const shown = live && showLive(live, text);
      const words = shown?.typeset ?? (text.formula.trim() || 'empty measure');
      if (words !== shownBefore || dom.classList.contains('unknown') !== (live !== null && shown === null)) {
        dom.textContent = words;
        if (live && !shown) dom.append(' ', unknownMark());
      }
      dom.classList.toggle('unknown', live !== null && shown === null);
      dom.setAttribute(
        'aria-label',
        shown ? `${text.formula}, live: ${shown.spoken}` : `${text.formula || 'empty measure'}, ${NOT_WORKED_OUT}`,
      );
      dom.title = shown ? `${text.formula}. Enter changes it.` : `${text.formula}: ${NOT_WORKED_OUT}. Enter mends it.`;
      if (changes && shownBefore !== null && shownBefore !== words) flash(dom);
      shownBefore = words;
    };
    const light = () => {
      const names = desk.lit.get();
      const uses = names.length === 0 ? [] : usesOf(desk, current.attrs.formula as string);
      dom.classList.toggle(
        'lit',
        names.some((name) => uses.includes(name)),
      );
      dom.classList.toggle('lit-picked', names[0] !== undefined && uses.includes(names[0]));
    };

    dom.className = 'measure';
    draw(false);
    light();
    const stop = [
      desk.figures.listen(() => {
        draw(true);
        light();
      }),
      desk.lit.listen(light),
    ];
    const change = () => {
      const pos = getPos();
      if (pos !== undefined) desk.changeMeasure(pos);
    };
    dom.addEventListener('dblclick', change);

    return {
      dom,
      update(next) {
        if (next.type !== current.type) return false;
        current = next;
        draw(false);
        light();
        return true;
      },
      selectNode: () => dom.classList.add('selected'),
      deselectNode: () => dom.classList.remove('selected'),
      ignoreMutation: () => true,
      destroy: () => stop.forEach((end) => end()),
    };
  };
}

/** The measures that a formula reads; none while it does not read. */
export function usesOf(desk: Pick<EditingDesk, 'figures'>, formula: string): readonly string[] {
  const live = desk.figures.get();
  const read = live && readLive(live.model, formula);
  if (!read?.ok) return [];
  const called = new Map(live?.model.pattern.measures.map(({ name }) => [keyOf(name), name]));
  return read.value.uses.map((name) => called.get(name) ?? name);
}

function unknownMark(): HTMLElement {
  const mark = document.createElement('small');
  mark.className = 'unknown-mark';
  mark.textContent = `(${NOT_WORKED_OUT})`;
  return mark;
}

function flash(dom: HTMLElement) {
  dom.classList.remove('changed');
  requestAnimationFrame(() => dom.classList.add('changed'));
}
