import { Extension, type Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import { afterBlock } from './insert-block';
import { focusTitle, movePart, newStep, stepAt } from './steps';

/** Keys that make and move parts, and the few places where the usual Enter and Backspace would do harm. */
export const blockKeys = Extension.create({
  name: 'blockKeys',
  priority: 150,

  addKeyboardShortcuts() {
    return {
      'Mod-Enter': ({ editor }) => newStep(editor),
      'Alt-Shift-ArrowUp': ({ editor }) => moved(editor, -1),
      'Alt-Shift-ArrowDown': ({ editor }) => moved(editor, 1),
      Enter: ({ editor }) => leaveCaption(editor),
      ArrowUp: ({ editor }) => intoTitle(editor),
      Backspace: ({ editor }) => backIntoTitle(editor),
    };
  },
});

function moved(editor: Editor, by: -1 | 1): boolean {
  const pos = stepAt(editor);
  if (pos === null) return false;
  movePart(editor, pos, by);
  return true;
}

/** Enter in a caption goes on behind the photo: a second photo would be no use. */
function leaveCaption(editor: Editor): boolean {
  const { state, view } = editor;
  const { $from } = state.selection;
  const photo = state.selection instanceof NodeSelection && state.selection.node.type.name === 'photo';
  if (!photo && $from.parent.type.name !== 'photo') return false;
  const { tr } = state;
  afterBlock(tr, photo ? state.selection.to : $from.after());
  view.dispatch(tr.scrollIntoView());
  return true;
}

/** The place of the step in whose first line the caret stands. */
function firstLineOf(editor: Editor): number | null {
  const { selection } = editor.state;
  const { $from } = selection;
  const pos = stepAt(editor);
  if (pos === null || !selection.empty) return null;
  for (let depth = 1; depth < $from.depth; depth += 1) if ($from.index(depth) !== 0) return null;
  return pos;
}

function intoTitle(editor: Editor): boolean {
  const pos = firstLineOf(editor);
  if (pos === null || !editor.view.endOfTextblock('up')) return false;
  focusTitle(editor, pos);
  return true;
}

/** Backspace at the very start of a step's text goes to the title instead of tearing the step open. */
function backIntoTitle(editor: Editor): boolean {
  const pos = firstLineOf(editor);
  const { $from } = editor.state.selection;
  if (pos === null || $from.parentOffset !== 0 || $from.depth !== 2 || $from.parent.type.name !== 'paragraph')
    return false;
  focusTitle(editor, pos);
  return true;
}
