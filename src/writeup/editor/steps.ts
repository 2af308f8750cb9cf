import type { Editor } from '@tiptap/core';
import { Fragment, type Node as ProseMirrorNode } from '@tiptap/pm/model';
import { closeHistory } from '@tiptap/pm/history';
import { TextSelection } from '@tiptap/pm/state';
import type { VideoMoment } from '../document';

/**
 * Makes a step where the caret is, and puts the caret into its title. Inside a step, what stands behind the caret goes
 * into the new one; text outside steps becomes a step itself, a heading becomes its title.
 */
export function newStep(editor: Editor): boolean {
  const { state, view } = editor;
  const { step, paragraph } = state.schema.nodes;
  if (!step || !paragraph) return false;
  const { $from, $to } = state.selection;
  const { tr } = state;
  let at: number;

  const top = $from.depth === 0 ? null : $from.node(1);
  if (top?.type === step && $from.depth === 2 && state.selection instanceof TextSelection && state.selection.empty) {
    tr.split($from.pos, 2, [{ type: step, attrs: { title: '', mark: '' } }]);
    const start = $from.before(1);
    at = start + (tr.doc.nodeAt(start)?.nodeSize ?? 0);
  } else if (top === null || top.type === step) {
    at = top === null ? $to.pos : $from.after(1);
    tr.insert(at, step.create(null, paragraph.create()));
  } else {
    at = $from.before(1);
    const last = Math.max($to.index(0), $from.index(0));
    const taken: ProseMirrorNode[] = [];
    let end = at;
    for (let n = $from.index(0); n <= last; n += 1) {
      const node = state.doc.child(n);
      if (node.type === step) break;
      taken.push(node);
      end += node.nodeSize;
    }
    const head = taken[0]?.type.name === 'heading' ? taken.shift() : undefined;
    const title = head?.textContent.trim().slice(0, 200) ?? '';
    tr.replaceWith(
      at,
      end,
      step.create({ title, mark: '' }, taken.length > 0 ? Fragment.from(taken) : paragraph.create()),
    );
  }
  tr.setSelection(TextSelection.near(tr.doc.resolve(at + 1), 1)).scrollIntoView();
  view.dispatch(closeHistory(tr));
  focusTitle(editor, at);
  return true;
}

export function focusTitle(editor: Editor, pos: number) {
  const dom = editor.view.nodeDOM(pos);
  if (dom instanceof HTMLElement) dom.querySelector<HTMLInputElement>('.step-title-field')?.focus();
}

/** Where the step round the caret begins, or null outside steps. */
export function stepAt(editor: Editor): number | null {
  const { $from } = editor.state.selection;
  return $from.depth >= 1 && $from.node(1).type.name === 'step' ? $from.before(1) : null;
}

/** A part changes places with the one before or after it, in the step or the text that it stands in. False at either end. */
export function movePart(editor: Editor, pos: number, by: -1 | 1): boolean {
  const { state, view } = editor;
  const $pos = state.doc.resolve(pos);
  const index = $pos.index();
  const node = $pos.parent.maybeChild(index);
  const other = $pos.parent.maybeChild(index + by);
  if (!node || !other) return false;
  const inside = state.selection.from - pos;
  const kept = inside > 0 && inside < node.nodeSize;
  const { tr } = state;
  tr.delete(pos, pos + node.nodeSize);
  const to = by === 1 ? pos + other.nodeSize : pos - other.nodeSize;
  tr.insert(to, node);
  if (kept) tr.setSelection(TextSelection.near(tr.doc.resolve(to + inside)));
  view.dispatch(closeHistory(tr).scrollIntoView());
  return true;
}

/** Takes the step out with all that is in it; a write-up is never left without a paragraph to type in. */
export function removePart(editor: Editor, pos: number): void {
  const { state, view } = editor;
  const node = state.doc.nodeAt(pos);
  const paragraph = state.schema.nodes.paragraph;
  if (!node || !paragraph) return;
  const { tr } = state;
  if (state.doc.childCount === 1) tr.replaceWith(pos, pos + node.nodeSize, paragraph.create());
  else tr.delete(pos, pos + node.nodeSize);
  tr.setSelection(TextSelection.near(tr.doc.resolve(Math.min(pos, tr.doc.content.size)), -1));
  view.dispatch(closeHistory(tr).scrollIntoView());
  view.focus();
}

/** The video that the steps before `pos` go by, else any that another step goes by; empty when there is none. */
export function usualAddress({ state }: Editor, pos: number): string {
  let address = '';
  state.doc.forEach((node, at) => {
    const own = (node.attrs.moment as VideoMoment | null | undefined)?.address;
    if (own && (at < pos || address === '')) address = own;
  });
  return address;
}
