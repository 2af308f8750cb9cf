import type { Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { TextSelection } from '@tiptap/pm/state';
import type { StepNode } from '../document';

/** Nothing is written, shown or drawn in it. */
export function isEmptyDocument(doc: ProseMirrorNode): boolean {
  let empty = true;
  doc.descendants((node) => {
    if (node.isText || (node.isAtom && !node.isText) || (node.type.name === 'step' && node.attrs.title !== ''))
      empty = false;
    return empty;
  });
  return empty;
}

/** Puts steps behind the last part, or in place of an empty write-up; one step of undo. The caret goes into the first of them. */
export function insertSteps(editor: Editor, steps: readonly StepNode[]): void {
  const { state, view } = editor;
  const nodes = steps.map((step) => state.schema.nodeFromJSON(step));
  const from = isEmptyDocument(state.doc) ? 0 : state.doc.content.size;
  const tr = state.tr.replaceWith(from, state.doc.content.size, nodes);
  view.dispatch(
    closeHistory(tr)
      .setSelection(TextSelection.near(tr.doc.resolve(from + 1), 1))
      .scrollIntoView(),
  );
  view.focus();
}
