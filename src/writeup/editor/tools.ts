import type { Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import type { EditingDesk } from './editing-desk';
import { newStep } from './steps';
import type { Tool } from './Toolbar';
import { insertPart } from './writing';

/** What can be put in, in the order of use. */
export function partTools(
  editor: Editor,
  given: { desk: EditingDesk; openPiece: () => void; choosePhoto: () => void },
): readonly Tool[] {
  const measure = () => {
    const { selection } = editor.state;
    if (selection instanceof NodeSelection && selection.node.type.name === 'measure')
      given.desk.changeMeasure(selection.from);
    else given.desk.askMeasure({ from: selection.from, to: selection.to });
  };
  return [
    { id: 'measure', icon: 'measure', label: 'Measure', keys: 'Alt M, or type ::', ariaKeys: 'Alt+M', act: measure },
    {
      id: 'step',
      icon: 'step',
      label: 'Step',
      keys: 'Ctrl Enter',
      ariaKeys: 'Control+Enter',
      act: () => newStep(editor),
    },
    { id: 'piece', icon: 'piece', label: 'Piece', keys: 'Alt Shift P', ariaKeys: 'Alt+Shift+P', act: given.openPiece },
    {
      id: 'photo',
      icon: 'photo',
      label: 'Photo',
      keys: 'Alt Shift O',
      ariaKeys: 'Alt+Shift+O',
      act: given.choosePhoto,
    },
    {
      id: 'tip',
      icon: 'info',
      label: 'Tip',
      keys: 'Alt Shift T',
      ariaKeys: 'Alt+Shift+T',
      act: () => insertPart(editor, 'tip'),
    },
    {
      id: 'caution',
      icon: 'warning',
      label: 'Caution',
      keys: 'Alt Shift C',
      ariaKeys: 'Alt+Shift+C',
      act: () => insertPart(editor, 'caution'),
    },
    {
      id: 'materials',
      icon: 'glue',
      label: 'Materials',
      keys: 'Alt Shift M',
      ariaKeys: 'Alt+Shift+M',
      act: () => insertPart(editor, 'materials'),
    },
    {
      id: 'cut-list',
      icon: 'cut',
      label: 'Cut list',
      keys: 'Alt Shift L',
      ariaKeys: 'Alt+Shift+L',
      act: () => insertPart(editor, 'cutList'),
    },
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
export function markTools(editor: Editor, state: ToolState, given: { openLink: () => void }): readonly Tool[] {
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
      act: given.openLink,
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
