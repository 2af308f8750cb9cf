import { Extension } from '@tiptap/core';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { Plugin, PluginKey, type Transaction } from '@tiptap/pm/state';
import { Decoration, DecorationSet } from '@tiptap/pm/view';

export interface Sought {
  readonly query: string;
  readonly matchCase: boolean;
}
/** Where the sought words stand: in the text from a position to another, or in the title of the step at `pos`. */
export type Found =
  | { readonly in: 'text'; readonly from: number; readonly to: number }
  | { readonly in: 'title'; readonly pos: number; readonly from: number; readonly to: number };

/**
 * Every place in reading order, none overlapping. Live measures, amounts and step numbers are no text: nothing in them is
 * found, and nothing is found across one.
 */
export function findAll(doc: ProseMirrorNode, { query, matchCase }: Sought): readonly Found[] {
  if (query === '') return [];
  const found: Found[] = [];
  const wanted = query.replace(/[.*+?^${}()|[\]\\]/gu, '\\$&');
  const pattern = new RegExp(wanted, matchCase ? 'gu' : 'giu');
  const places = (text: string) =>
    [...text.matchAll(pattern)].map(({ index, 0: match }) => [index, index + match.length] as const);
  doc.descendants((node, pos) => {
    if (node.type.name === 'step')
      for (const [from, to] of places(String(node.attrs.title))) found.push({ in: 'title', pos, from, to });
    if (!node.isTextblock) return true;
    const text = node.textBetween(0, node.content.size, undefined, '\uFFFC');
    for (const [from, to] of places(text)) found.push({ in: 'text', from: pos + 1 + from, to: pos + 1 + to });
    return false;
  });
  return found;
}

/** Puts other words in the place of what was found, as one change; `found` is in reading order. */
export function replaceAll(tr: Transaction, found: readonly Found[], words: string): Transaction {
  for (const one of [...found].reverse()) {
    if (one.in === 'text') {
      if (words === '') tr.delete(one.from, one.to);
      else tr.insertText(words, one.from, one.to);
      continue;
    }
    const node = tr.doc.nodeAt(one.pos);
    const title = String(node?.attrs.title ?? '');
    const next = (title.slice(0, one.from) + words + title.slice(one.to)).slice(0, 200);
    tr.setNodeMarkup(one.pos, undefined, { ...node?.attrs, title: next });
  }
  return tr;
}

interface Shown {
  readonly sought: Sought | null;
  readonly current: number;
  readonly found: readonly Found[];
  readonly marks: DecorationSet;
}
const NOTHING: Shown = { sought: null, current: 0, found: [], marks: DecorationSet.empty };
const finding = new PluginKey<Shown>('find');

/** Marks in the text what is sought, while anything is. */
export const find = Extension.create({
  name: 'find',

  addProseMirrorPlugins() {
    return [
      new Plugin<Shown>({
        key: finding,
        state: {
          init: () => NOTHING,
          apply(tr, shown) {
            const change = tr.getMeta(finding) as Pick<Shown, 'sought' | 'current'> | undefined;
            if (!change && !(tr.docChanged && shown.sought)) return shown;
            const { sought, current } = change ?? shown;
            if (!sought) return NOTHING;
            const found = change && !tr.docChanged && sought === shown.sought ? shown.found : findAll(tr.doc, sought);
            const marks = found.flatMap((one, n) =>
              one.in === 'text'
                ? [Decoration.inline(one.from, one.to, { class: n === current ? 'found found-now' : 'found' })]
                : [],
            );
            return { sought, current, found, marks: DecorationSet.create(tr.doc, marks) };
          },
        },
        props: { decorations: (state) => finding.getState(state)?.marks },
      }),
    ];
  },
});

/** Shows what is sought, with one of the places as the current one; null ends it. */
export const seek = (tr: Transaction, sought: Sought | null, current = 0): Transaction =>
  tr.setMeta(finding, { sought, current }).setMeta('addToHistory', false);
