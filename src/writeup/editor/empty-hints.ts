import { Extension } from '@tiptap/core';
import { Plugin } from '@tiptap/pm/state';
import { Decoration, DecorationSet } from '@tiptap/pm/view';

const HINTS: Readonly<Record<string, string>> = {
  doc: 'Write, paste a text, or begin with a step: Ctrl Enter',
  step: 'What to do in this step',
  tip: 'What makes it easier',
  caution: 'What can hurt, and how not to be hurt',
  materials: 'Card, glue',
  tools: 'Trimmer, scoring board, folder',
  correction: 'What was wrong, and what it means for somebody who has cut already',
  forward: 'What to do now',
};

/** Grey words in the only, empty paragraph of a part: what belongs there. They are drawn, never stored. */
export const emptyHints = Extension.create({
  name: 'emptyHints',

  addProseMirrorPlugins() {
    return [
      new Plugin({
        props: {
          decorations({ doc }) {
            const found: Decoration[] = [];
            const look = (node: typeof doc, start: number) => {
              const hint = HINTS[node.type.name];
              const only = node.childCount === 1 ? node.firstChild : null;
              if (hint && only?.type.name === 'paragraph' && only.content.size === 0) {
                found.push(Decoration.node(start, start + only.nodeSize, { class: 'empty-hint', 'data-hint': hint }));
              }
              if (node.isTextblock) return;
              node.forEach((child, offset) => {
                if (child.type.name in HINTS) look(child, start + offset + 1);
              });
            };
            look(doc, 0);
            return DecorationSet.create(doc, found);
          },
        },
      }),
    ];
  },
});
