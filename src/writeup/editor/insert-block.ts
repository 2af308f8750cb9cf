import type { Editor } from '@tiptap/core';
import type { Node as ProseMirrorNode, ResolvedPos } from '@tiptap/pm/model';
import { closeHistory } from '@tiptap/pm/history';
import { NodeSelection, TextSelection } from '@tiptap/pm/state';

/** Where a block goes when the caret is at `$pos`: the range it takes the place of. An empty paragraph makes room, else it goes behind the block. */
export function placeForBlock($pos: ResolvedPos, node: ProseMirrorNode): { from: number; to: number } | null {
  for (let depth = $pos.depth; depth > 0; depth -= 1) {
    const parent = $pos.node(depth - 1);
    const index = $pos.index(depth - 1);
    const own = $pos.node(depth);
    const empty = depth === $pos.depth && own.type.name === 'paragraph' && own.content.size === 0;
    if (empty && parent.canReplaceWith(index, index + 1, node.type))
      return { from: $pos.before(depth), to: $pos.after(depth) };
    if (parent.canReplaceWith(index + 1, index + 1, node.type))
      return { from: $pos.after(depth), to: $pos.after(depth) };
  }
  return $pos.depth === 0 ? { from: $pos.pos, to: $pos.pos } : null;
}

/** Puts a block at the caret. The caret goes into it when it holds text, else into a paragraph behind it, made when there is none. */
export function insertBlock(editor: Editor, node: ProseMirrorNode): boolean {
  const { state, view } = editor;
  const { selection, tr } = state;
  const $pos = selection instanceof NodeSelection ? state.doc.resolve(selection.to) : selection.$to;
  const place =
    selection instanceof NodeSelection && selection.node.isBlock
      ? { from: selection.to, to: selection.to }
      : placeForBlock($pos, node);
  if (!place) return false;
  tr.replaceWith(place.from, place.to, node);
  if (node.isAtom || node.type.name === 'photo') afterBlock(tr, place.from + node.nodeSize);
  else tr.setSelection(TextSelection.near(tr.doc.resolve(place.from + 1), 1));
  view.dispatch(closeHistory(tr).scrollIntoView());
  view.focus();
  return true;
}

/** Puts the caret into the paragraph behind `pos`, made when there is none. */
export function afterBlock(tr: Editor['state']['tr'], pos: number): void {
  const $after = tr.doc.resolve(pos);
  const paragraph = tr.doc.type.schema.nodes.paragraph;
  if (
    paragraph &&
    $after.nodeAfter?.type !== paragraph &&
    $after.parent.canReplaceWith($after.index(), $after.index(), paragraph)
  ) {
    tr.insert(pos, paragraph.create());
  }
  tr.setSelection(TextSelection.near(tr.doc.resolve(pos + 1), 1));
}
