import type { Editor } from '@tiptap/core';

/**
 * Writes what is typed in a part's own field into its attribute. Goes by `setNodeMarkup` and not by `setNodeAttribute`:
 * the latter changes no range, so that undo would take back one letter at a time.
 */
export function typeAttribute(editor: Editor, pos: number, name: string, value: unknown): void {
  const node = editor.state.doc.nodeAt(pos);
  if (node) editor.view.dispatch(editor.state.tr.setNodeMarkup(pos, undefined, { ...node.attrs, [name]: value }));
}
