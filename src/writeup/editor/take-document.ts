import type { Editor } from '@tiptap/core';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { Mapping } from '@tiptap/pm/transform';
import type { DocNode } from '../document';

/** The document as it was last told of, and how what was typed since moved its places. */
export interface Told {
  readonly doc: ProseMirrorNode;
  readonly since: Mapping;
}
export const toldNow = ({ state }: Editor): Told => ({ doc: state.doc, since: new Mapping() });

/**
 * Makes the editor show another document, which was made from the one last told of, by changing only the stretch that differs:
 * the caret stays where it is when it stands outside it, and so does what was typed in the meantime. No step of undo: what
 * comes from elsewhere is not the writer's to take back.
 */
export function takeDocument(editor: Editor, doc: DocNode, { doc: before, since }: Told = toldNow(editor)): void {
  const { state, view } = editor;
  const next = state.schema.nodeFromJSON(doc);
  const from = before.content.findDiffStart(next.content);
  const ends = before.content.findDiffEnd(next.content);
  if (from === null || ends === null) return;
  // The same text on both sides of the stretch is counted from both ends.
  const overlap = Math.max(0, from - Math.min(ends.a, ends.b));
  const slice = next.slice(from, ends.b + overlap);
  const tr = state.tr.replace(since.map(from, -1), since.map(ends.a + overlap, 1), slice);
  view.dispatch(tr.setMeta('addToHistory', false));
}
