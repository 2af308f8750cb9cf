import { Extension } from '@tiptap/core';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { Plugin, PluginKey, type EditorState } from '@tiptap/pm/state';
import { Decoration, DecorationSet, type EditorView } from '@tiptap/pm/view';
import type { LiveFigures } from '../live';
import { strayIn, type StrayNumber } from '../numbers/stray';
import { THING } from '../numbers/tokens';
import type { EditingDesk } from './editing-desk';

const key = new PluginKey<DecorationSet>('strayNumbers');

/** A typed length in the document, with its place in it. */
export interface StrayAt extends Omit<StrayNumber, 'from' | 'to'> {
  readonly from: number;
  readonly to: number;
}

/**
 * Underlines typed lengths that are not live, as they are written. Only lines that changed are looked at again; with another
 * size all of them. They are drawn, never stored.
 */
export const strayNumbers = ({ figures }: Pick<EditingDesk, 'figures'>) =>
  Extension.create({
    name: 'strayNumbers',

    addProseMirrorPlugins() {
      return [
        new Plugin<DecorationSet>({
          key,
          state: {
            init: (_, state) => drawn(state, figures.get()),
            apply: (tr, before, _old, state) =>
              tr.docChanged || tr.getMeta(key) !== undefined ? drawn(state, figures.get()) : before,
          },
          props: {
            decorations: (state) => key.getState(state),
          },
          view(view: EditorView) {
            // Figures come several times while a slider moves: once it rests is soon enough.
            let waiting: ReturnType<typeof setTimeout> | undefined;
            const stop = figures.listen(() => {
              clearTimeout(waiting);
              waiting = setTimeout(() => !view.isDestroyed && view.dispatch(view.state.tr.setMeta(key, true)), 250);
            });
            return {
              destroy() {
                clearTimeout(waiting);
                stop();
              },
            };
          },
        }),
      ];
    },
  });

function drawn({ doc }: EditorState, live: LiveFigures | null): DecorationSet {
  const stray = live ? strayInDocument(doc, live) : [];
  return DecorationSet.create(
    doc,
    stray.map(({ from, to, matches }) =>
      Decoration.inline(from, to, {
        class: isMatched(matches) ? 'stray-number' : 'stray-number unmatched',
        title: isMatched(matches)
          ? 'Typed, not live. Alt M makes it live.'
          : 'Typed, not live: no measure has this size.',
      }),
    ),
  );
}

const isMatched = ([first]: StrayNumber['matches']): boolean => first !== undefined && first.off === 0;

/** Every stray number of a document. */
export function strayInDocument(doc: ProseMirrorNode, live: LiveFigures): readonly StrayAt[] {
  const found: StrayAt[] = [];
  doc.forEach((part, offset) => {
    const about = part.type.name === 'step' ? `${String(part.attrs.title)}.` : '';
    const look = (node: ProseMirrorNode, pos: number) => {
      if (!node.isTextblock) return node.forEach((child, at) => look(child, pos + 1 + at));
      const line = node.children.map((child) => ({
        text: child.isText ? (child.text ?? '') : THING,
        meant: child.marks.some((mark) => mark.type.name === 'asTyped'),
      }));
      for (const stray of strayIn(line, live, about))
        found.push({ ...stray, from: pos + 1 + stray.from, to: pos + 1 + stray.to });
    };
    look(part, offset);
  });
  return found;
}

/** The stray number at the caret or under the selection; null when none stands there. */
export function strayAt({ doc, selection: { from, to } }: EditorState, live: LiveFigures): StrayAt | null {
  return strayInDocument(doc, live).find((stray) => stray.from <= to && from <= stray.to) ?? null;
}
