import { getMarkRange, type Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { TextSelection } from '@tiptap/pm/state';
import type { BlockNode, DocNode } from '../document';
import type { LiveText } from '../live';
import { insertBlock } from './insert-block';
import { newTable } from './table-keys';

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

export type PartName = Exclude<
  BlockNode['type'],
  'step' | 'paragraph' | 'heading' | 'bulletList' | 'orderedList' | 'photo'
>;

export function insertPart(editor: Editor, name: PartName, attrs?: Readonly<Record<string, string>>): boolean {
  const type = editor.schema.nodes[name];
  const node = name === 'table' ? newTable(editor.schema) : type?.createAndFill(attrs ?? null);
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

/** The phrase under a condition that the selection covers or the caret stands in; null outside text. */
export function phraseAt({
  state,
}: Editor): { readonly from: number; readonly to: number; readonly when: string } | null {
  const type = state.schema.marks.onlyWhen;
  const { selection } = state;
  if (!type || !(selection instanceof TextSelection)) return null;
  const { $from, from, to, empty } = selection;
  const inside = getMarkRange($from, type) ?? (empty ? undefined : getMarkRange(state.doc.resolve(from + 1), type));
  if (empty && !inside) return null;
  const range = empty && inside ? inside : { from, to };
  const mark = state.doc.nodeAt(range.from)?.marks.find((one) => one.type === type);
  return { ...range, when: String(mark?.attrs.when ?? '') };
}

/** Puts a phrase under a condition; an empty one makes it plain text again. */
export function setCondition(
  { state, view }: Editor,
  { from, to }: { readonly from: number; readonly to: number },
  when: string,
): void {
  const type = state.schema.marks.onlyWhen;
  if (!type) return;
  const tr = state.tr.removeMark(from, to, type);
  if (when !== '') tr.addMark(from, to, type.create({ when }));
  view.dispatch(closeHistory(tr).setSelection(TextSelection.create(tr.doc, to)).removeStoredMark(type));
}

/** Changes attributes of the part at `pos`, as one step of undo. */
export function setAttributes({ state, view }: Editor, pos: number, attrs: Readonly<Record<string, unknown>>): void {
  const node = state.doc.nodeAt(pos);
  if (node) view.dispatch(closeHistory(state.tr.setNodeMarkup(pos, undefined, { ...node.attrs, ...attrs })));
}

/** The key of the step at `pos`, which gets one when it has none yet. */
export function keyOfStep({ state, view }: Editor, pos: number): string {
  const step = state.doc.nodeAt(pos);
  if (step?.type.name !== 'step') return '';
  const key = String(step.attrs.key) || newKey(state.doc);
  if (key !== step.attrs.key) view.dispatch(state.tr.setNodeMarkup(pos, undefined, { ...step.attrs, key }));
  return key;
}

/** Puts the number of the step at `pos` in at the caret; the step gets a key when it has none yet. */
export function insertStepRef(editor: Editor, pos: number): void {
  insertInline(editor, 'stepRef', { key: keyOfStep(editor, pos) });
}

/** Puts a part of the text in at the caret; where no text can stand, in a paragraph of its own. */
export function insertInline(
  { state, view }: Editor,
  name: 'stepRef' | 'amount',
  attrs: Readonly<Record<string, string>>,
): void {
  const { [name]: type, paragraph } = state.schema.nodes;
  if (!type || !paragraph) return;
  const { $from, from, to } = state.selection;
  const inText = $from.parent.inlineContent;
  const node = type.create(attrs, null, inText ? $from.marks() : undefined);
  const { tr } = state;
  if (inText) tr.replaceWith(from, to, node);
  else tr.replaceSelectionWith(paragraph.create(null, node));
  view.dispatch(closeHistory(tr).scrollIntoView());
}

/** Six letters and digits that no step of the document has. */
function newKey(doc: ProseMirrorNode): string {
  const taken = new Set<unknown>();
  doc.forEach(({ attrs }) => taken.add(attrs.key));
  for (;;) {
    const key = Array.from(crypto.getRandomValues(new Uint8Array(6)), (n) => (n % 36).toString(36)).join('');
    if (!taken.has(key)) return key;
  }
}

/**
 * Takes over the names of a document of the same parts: what live measures, conditions and piece cards speak of. No step of
 * undo, since the names are not the editor's to take back.
 */
export function takeNames(editor: Editor, renamed: DocNode): void {
  const { state, view } = editor;
  const { tr } = state;
  state.schema.nodeFromJSON(renamed).descendants((node, pos) => {
    const now = state.doc.nodeAt(pos);
    if (now?.type !== node.type) return;
    for (const [name, value] of Object.entries(node.attrs))
      if (NAMED.includes(name) && now.attrs[name] !== value) tr.setNodeAttribute(pos, name, value);
    for (const mark of node.marks)
      if (mark.type.name === 'onlyWhen' && !mark.isInSet(now.marks)) tr.addMark(pos, pos + node.nodeSize, mark);
  });
  if (tr.docChanged) view.dispatch(tr.setMeta('addToHistory', false));
}
/** Attributes that hold names of the pattern. */
const NAMED: readonly string[] = ['formula', 'piece', 'when'];

/** Puts the caret at the beginning of the part at `pos`, with the part at the top of what is seen. */
export function goTo({ state, view }: Editor, pos: number): void {
  view.dispatch(state.tr.setSelection(TextSelection.near(state.doc.resolve(pos + 1), 1)));
  const dom = view.nodeDOM(pos);
  if (dom instanceof HTMLElement) dom.scrollIntoView({ block: 'start' });
}
