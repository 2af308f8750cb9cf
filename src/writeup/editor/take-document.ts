import type { Editor } from '@tiptap/core';
import type { DocNode } from '../document';

/**
 * Makes the editor show another document by changing only the stretch that differs, so that the caret stays where it is when it
 * stands outside it. No step of undo: what comes from elsewhere is not the writer's to take back.
 */
export function takeDocument({ state, view }: Editor, doc: DocNode): void {
  const next = state.schema.nodeFromJSON(doc);
  const from = state.doc.content.findDiffStart(next.content);
  const ends = state.doc.content.findDiffEnd(next.content);
  if (from === null || ends === null) return;
  // The same text on both sides of the stretch is counted from both ends.
  const overlap = Math.max(0, from - Math.min(ends.a, ends.b));
  const tr = state.tr.replace(from, ends.a + overlap, next.slice(from, ends.b + overlap));
  view.dispatch(tr.setMeta('addToHistory', false));
}
