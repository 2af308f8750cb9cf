import type { NodeViewRenderer } from '@tiptap/core';
import type { EditingDesk } from '../../editor/editing-desk';
import { listSteps } from '../../editor/step-numbers';
import { keyOfStep, setAttributes } from '../../editor/writing';

/** Reasons to do something now; one that was written elsewhere stays as it is. */
const WORDS = ['While it is still flat', 'Before you fold', 'Before you glue', 'Before it closes'] as const;

/** A note that something is done now for a later step: why now, for which step, and what. */
export function forwardView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, editor, getPos }) => {
    const dom = document.createElement('div');
    dom.className = 'forward';
    const head = document.createElement('div');
    head.className = 'note-word forward-head';
    head.contentEditable = 'false';
    const word = document.createElement('select');
    word.setAttribute('aria-label', 'Why now');
    const later = document.createElement('select');
    later.setAttribute('aria-label', 'For which step');
    head.append(word, later);
    const contentDOM = document.createElement('div');
    contentDOM.className = 'worded-content';
    dom.append(head, contentDOM);

    let current = node;
    const show = () => {
      const { word: said, key } = current.attrs as { word: string; key: string };
      const words = WORDS.some((one) => one === said) ? WORDS : [said, ...WORDS];
      word.replaceChildren(...words.map((one) => new Option(one, one, false, one === said)));
      const steps = listSteps(editor.state.doc, desk.figures.get());
      later.replaceChildren(
        new Option('for no step in particular', '', false, key === ''),
        ...steps.map(({ pos, key: own, number, title }) => {
          const words = `for step ${number ?? '–'}${title === '' ? '' : `, ${title.slice(0, 40)}`}`;
          return new Option(words, String(pos), false, own !== '' && own === key);
        }),
      );
    };
    show();
    // Steps are moved and named while the note stands: the list is made anew when it is opened.
    for (const event of ['focus', 'pointerdown']) later.addEventListener(event, show);
    const stop = desk.numbers.listen(show);
    const set = (attrs: Readonly<Record<string, unknown>>) => {
      const pos = getPos();
      if (pos !== undefined) setAttributes(editor, pos, attrs);
    };
    word.addEventListener('change', () => set({ word: word.value }));
    later.addEventListener('change', () =>
      set({ key: later.value === '' ? '' : keyOfStep(editor, Number(later.value)) }),
    );

    return {
      dom,
      contentDOM,
      update(next) {
        if (next.type !== current.type) return false;
        current = next;
        show();
        return true;
      },
      stopEvent: (event) => event.target instanceof Node && head.contains(event.target),
      ignoreMutation: (mutation) => mutation.type !== 'selection' && !contentDOM.contains(mutation.target),
      destroy: stop,
    };
  };
}
