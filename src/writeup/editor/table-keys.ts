import { Extension, type Editor } from '@tiptap/core';
import type { Node as ProseMirrorNode, Schema } from '@tiptap/pm/model';
import type { Command } from '@tiptap/pm/state';
import {
  addColumnAfter,
  addColumnBefore,
  addRowAfter,
  addRowBefore,
  deleteColumn,
  deleteRow,
  deleteTable,
  goToNextCell,
  isInTable,
  tableEditing,
  toggleHeaderRow,
} from '@tiptap/pm/tables';
import type { Tool } from './Toolbar';

/** Tab goes from cell to cell and makes a row behind the last; cells are selected and pasted as such. */
export const tableKeys = Extension.create({
  name: 'tableKeys',
  priority: 160,

  addKeyboardShortcuts() {
    const run = (editor: Editor, command: Command) => command(editor.state, editor.view.dispatch, editor.view);
    return {
      Tab: ({ editor }) => {
        if (!isInTable(editor.state)) return false;
        if (run(editor, goToNextCell(1))) return true;
        return run(editor, addRowAfter) && run(editor, goToNextCell(1));
      },
      'Shift-Tab': ({ editor }) => isInTable(editor.state) && run(editor, goToNextCell(-1)),
    };
  },

  addProseMirrorPlugins() {
    return [tableEditing()];
  },
});

/** Three columns, with a row of headings over two empty ones. */
export function newTable({ nodes }: Schema): ProseMirrorNode | null {
  const { table, tableRow, tableCell, tableHeader } = nodes;
  if (!table || !tableRow || !tableCell || !tableHeader) return null;
  const row = (type: typeof tableCell) =>
    tableRow.create(
      null,
      [1, 2, 3].flatMap(() => type.createAndFill() ?? []),
    );
  return table.create(null, [row(tableHeader), row(tableCell), row(tableCell)]);
}

/** What can be done to the table that the caret stands in. */
export function tableTools(editor: Editor): readonly Tool[] {
  const tool = (id: string, icon: Tool['icon'], label: string, command: Command): Tool => ({
    id,
    icon,
    label,
    keys: '',
    ariaKeys: '',
    act: () => {
      command(editor.state, editor.view.dispatch, editor.view);
      editor.view.focus();
    },
  });
  return [
    tool('row-above', 'row-above', 'Row above', addRowBefore),
    tool('row-below', 'row-below', 'Row below', addRowAfter),
    tool('row-away', 'minus', 'Take the row out', deleteRow),
    tool('column-before', 'column-before', 'Column before', addColumnBefore),
    tool('column-after', 'column-after', 'Column after', addColumnAfter),
    tool('column-away', 'minus', 'Take the column out', deleteColumn),
    tool('heading-row', 'heading', 'Row of headings', toggleHeaderRow),
    tool('table-away', 'trash', 'Take the table out', deleteTable),
  ];
}
