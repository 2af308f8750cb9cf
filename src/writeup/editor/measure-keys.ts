import { Extension } from '@tiptap/core';
import { NodeSelection, Plugin } from '@tiptap/pm/state';
import type { EditingDesk } from './editing-desk';

/** Typed twice in a row, it asks for a measure; Escape leaves it as text. */
const TRIGGER = '::';

/** Alt M and `::` ask for a measure; Enter on a selected one changes it. */
export const measureKeys = (desk: EditingDesk) =>
  Extension.create({
    name: 'measureKeys',
    priority: 200,

    addKeyboardShortcuts() {
      return {
        'Alt-m': ({ editor }) => {
          const { from, to } = editor.state.selection;
          const selected = measureIn(editor.state.selection);
          if (selected !== null) desk.changeMeasure(selected);
          else desk.askMeasure({ from, to });
          return true;
        },
        Enter: ({ editor }) => {
          const selected = measureIn(editor.state.selection);
          if (selected === null) return false;
          desk.changeMeasure(selected);
          return true;
        },
      };
    },

    addProseMirrorPlugins() {
      return [
        new Plugin({
          props: {
            handleTextInput(view, from, to, text) {
              const [first = '', last = ''] = TRIGGER;
              if (text !== last || from !== to || from === 0) return false;
              const $from = view.state.doc.resolve(from);
              if (
                !$from.parent.isTextblock ||
                $from.parent.textBetween(Math.max(0, $from.parentOffset - 1), $from.parentOffset) !== first
              )
                return false;
              view.dispatch(view.state.tr.insertText(text, from, to));
              desk.askMeasure({ from: from - 1, to: from + 1 });
              return true;
            },
          },
        }),
      ];
    },
  });

function measureIn(selection: unknown): number | null {
  return selection instanceof NodeSelection && selection.node.type.name === 'measure' ? selection.from : null;
}
