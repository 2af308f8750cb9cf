import { getMarkRange, type Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import { TextSelection } from '@tiptap/pm/state';
import type { DocNode } from '../document';
import type { LiveText } from '../live';
import { insertBlock } from './insert-block';

/** What buttons and fields do to the write-up, each as one step of undo. */

/** Puts a live measure in place of a range, with the caret behind it. Where no text can stand, in a paragraph of its own. */
export function putMeasure(
  editor: Editor,
  { from, to }: { readonly from: number; readonly to: number },
  text: LiveText,
): boolean {
  const { state, view } = editor;
  const { measure, paragraph } = state.schema.nodes;
  if (!measure || !paragraph) return false;
  const $from = state.doc.resolve(from);
  const marks = state.doc.nodeAt(from)?.isInline ? (state.doc.nodeAt(from)?.marks ?? []) : $from.marks();
  const node = measure.create(
    { formula: text.formula, bare: text.bare },
    null,
    $from.parent.inlineContent ? marks : undefined,
  );
  if (!$from.parent.inlineContent) return insertBlock(editor, paragraph.create(null, node));
  const tr = state.tr.replaceWith(from, to, node);
  view.dispatch(
    closeHistory(tr)
      .setSelection(TextSelection.create(tr.doc, from + 1))
      .scrollIntoView(),
  );
  return true;
}

export type PartName = 'tip' | 'caution' | 'materials' | 'cutList' | 'pieceCard';

export function insertPart(editor: Editor, name: PartName, attrs?: Readonly<Record<string, string>>): boolean {
  const type = editor.schema.nodes[name];
  const node = type?.createAndFill(attrs ?? null);
  return node ? insertBlock(editor, node) : false;
}

/** The address of the link at the caret, or an empty text. */
export const linkAt = (editor: Editor): string => String(editor.getAttributes('link').href ?? '');

/** Links the selection, or the link that the caret is in, or puts the address itself in as text; null takes the link away. */
export function setLink(editor: Editor, href: string | null): void {
  const { state, view } = editor;
  const type = state.schema.marks.link;
  if (!type) return;
  const { selection, tr } = state;
  const range = selection.empty ? getMarkRange(selection.$from, type) : { from: selection.from, to: selection.to };
  if (!range) {
    if (href === null) return;
    const words = href.replace(/^(https?:\/\/|mailto:)/, '');
    tr.replaceWith(selection.from, selection.to, state.schema.text(words, [type.create({ href })]));
    tr.removeStoredMark(type);
  } else {
    tr.removeMark(range.from, range.to, type);
    if (href !== null) tr.addMark(range.from, range.to, type.create({ href }));
  }
  view.dispatch(tr.scrollIntoView());
}

/**
 * Takes over the names of a document of the same parts: what live measures and piece cards speak of. No step of undo, since
 * the names are not the editor's to take back.
 */
export function takeNames(editor: Editor, renamed: DocNode): void {
  const { state, view } = editor;
  const { tr } = state;
  state.schema.nodeFromJSON(renamed).descendants((node, pos) => {
    if (!node.isAtom || node.isText || state.doc.nodeAt(pos)?.type !== node.type) return;
    for (const [name, value] of Object.entries(node.attrs))
      if (state.doc.nodeAt(pos)?.attrs[name] !== value) tr.setNodeAttribute(pos, name, value);
  });
  if (tr.docChanged) view.dispatch(tr.setMeta('addToHistory', false));
}
