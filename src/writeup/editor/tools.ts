import type { Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import type { EditingDesk } from './editing-desk';
import { newStep } from './steps';
import type { Tool } from './Toolbar';

/** What opens a field or a list below the caret. */
export interface Opens {
  readonly link: () => void;
  readonly list: (type: 'piece' | 'step number' | 'note' | 'block' | 'amount' | 'outline') => void;
  readonly condition: () => void;
  readonly moment: () => void;
  readonly photo: () => void;
  readonly find: () => void;
}

/** What can be put in, in the order of use. */
export function partTools(editor: Editor, desk: EditingDesk, opens: Opens): readonly Tool[] {
  const measure = () => {
    const { selection } = editor.state;
    if (selection instanceof NodeSelection && selection.node.type.name === 'measure')
      desk.changeMeasure(selection.from);
    else desk.askMeasure({ from: selection.from, to: selection.to });
  };
  const tool = (id: string, icon: Tool['icon'], label: string, keys: string, act: () => void): Tool => ({
    id,
    icon,
    label,
    keys,
    ariaKeys: keys.replace(/^Ctrl/, 'Control').replace(/,.*$/, '').replaceAll(' ', '+'),
    act,
  });
  return [
    tool('measure', 'measure', 'Measure', 'Alt M, or type ::', measure),
    tool('step', 'step', 'Step', 'Ctrl Enter', () => newStep(editor)),
    tool('piece', 'piece', 'Piece', 'Alt Shift P', () => opens.list('piece')),
    tool('photo', 'photo', 'Photo', 'Alt Shift O', opens.photo),
    tool('moment', 'play', 'Moment', 'Alt Shift V', opens.moment),
    tool('note', 'info', 'Note', 'Alt Shift N', () => opens.list('note')),
    tool('block', 'sheet', 'Block', 'Alt Shift B', () => opens.list('block')),
    tool('amount', 'glue', 'Amount', 'Alt Shift A', () => opens.list('amount')),
    tool('only-when', 'fork', 'Only when', 'Alt Shift W', opens.condition),
    tool('step-number', 'list-numbered', 'Step no.', 'Alt Shift S', () => opens.list('step number')),
  ];
}

/** What the buttons show of the text at the caret. */
export const toolState = (editor: Editor) => ({
  bold: editor.isActive('bold'),
  italic: editor.isActive('italic'),
  heading2: editor.isActive('heading', { level: 2 }),
  heading3: editor.isActive('heading', { level: 3 }),
  bulletList: editor.isActive('bulletList'),
  orderedList: editor.isActive('orderedList'),
  link: editor.isActive('link'),
  canUndo: editor.can().undo(),
  canRedo: editor.can().redo(),
});
export type ToolState = ReturnType<typeof toolState>;

/** How text looks, and undo. */
export function markTools(editor: Editor, state: ToolState, opens: Opens): readonly Tool[] {
  const run = () => editor.chain().focus();
  return [
    {
      id: 'heading',
      icon: 'heading',
      label: 'Heading',
      keys: 'Ctrl Alt 2',
      ariaKeys: 'Control+Alt+2',
      on: state.heading2,
      act: () => run().toggleHeading({ level: 2 }).run(),
    },
    {
      id: 'small-heading',
      icon: 'heading-small',
      label: 'Small heading',
      keys: 'Ctrl Alt 3',
      ariaKeys: 'Control+Alt+3',
      on: state.heading3,
      act: () => run().toggleHeading({ level: 3 }).run(),
    },
    {
      id: 'bold',
      icon: 'bold',
      label: 'Bold',
      keys: 'Ctrl B',
      ariaKeys: 'Control+B',
      on: state.bold,
      act: () => run().toggleBold().run(),
    },
    {
      id: 'italic',
      icon: 'italic',
      label: 'Italic',
      keys: 'Ctrl I',
      ariaKeys: 'Control+I',
      on: state.italic,
      act: () => run().toggleItalic().run(),
    },
    {
      id: 'bullets',
      icon: 'list',
      label: 'List',
      keys: 'Ctrl Shift 8',
      ariaKeys: 'Control+Shift+8',
      on: state.bulletList,
      act: () => run().toggleBulletList().run(),
    },
    {
      id: 'numbers',
      icon: 'list-numbered',
      label: 'Numbered list',
      keys: 'Ctrl Shift 7',
      ariaKeys: 'Control+Shift+7',
      on: state.orderedList,
      act: () => run().toggleOrderedList().run(),
    },
    {
      id: 'link',
      icon: 'link',
      label: 'Link',
      keys: 'Ctrl K',
      ariaKeys: 'Control+K',
      on: state.link,
      act: opens.link,
    },
    {
      id: 'undo',
      icon: 'undo',
      label: 'Undo',
      keys: 'Ctrl Z',
      ariaKeys: 'Control+Z',
      off: !state.canUndo,
      act: () => run().undo().run(),
    },
    {
      id: 'redo',
      icon: 'redo',
      label: 'Redo',
      keys: 'Ctrl Shift Z',
      ariaKeys: 'Control+Shift+Z',
      off: !state.canRedo,
      act: () => run().redo().run(),
    },
  ];
}
