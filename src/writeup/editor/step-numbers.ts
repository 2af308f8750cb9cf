import { Extension } from '@tiptap/core';
import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import { Plugin } from '@tiptap/pm/state';
import { atom, type ReadableAtom } from 'nanostores';
import { countSteps } from '../condition';
import type { FiguresStore } from '../figures-store';
import type { LiveFigures } from '../live';

/** A step of the document that is being edited. */
export interface ListedStep {
  readonly pos: number;
  readonly key: string;
  /** Its title, or the first words of its text. */
  readonly title: string;
  /** At the shown figures; null when it does not apply. */
  readonly number: number | null;
}

export function listSteps(doc: ProseMirrorNode, live: LiveFigures | null): readonly ListedStep[] {
  const steps: { pos: number; key: string; title: string; when: string }[] = [];
  doc.forEach(({ type, attrs, firstChild }, pos) => {
    if (type.name !== 'step') return;
    const title = String(attrs.title).trim() || (firstChild?.textContent.trim().slice(0, 48) ?? '');
    steps.push({ pos, key: String(attrs.key), title, when: String(attrs.when) });
  });
  const whens = steps.map(({ when }) => when);
  const numbers = live ? countSteps(whens, live) : whens.map((_, index) => index + 1);
  return steps.map(({ pos, key, title }, index) => ({ pos, key, title, number: numbers[index] ?? null }));
}

/** Numbers of the steps that are spoken of, by key. */
export type StepNumbers = ReadableAtom<ReadonlyMap<string, number | null>>;

/**
 * Keeps the numbers that references show, and sees to it that no two steps have one key: of a step and its copy, the one that
 * stands first keeps it.
 */
export function stepNumbers(figures: FiguresStore): { readonly numbers: StepNumbers; readonly extension: Extension } {
  const numbers = atom<ReadonlyMap<string, number | null>>(new Map());
  const extension = Extension.create({
    name: 'stepNumbers',

    addProseMirrorPlugins() {
      return [
        new Plugin({
          appendTransaction(transactions, _, { doc, tr }) {
            if (!transactions.some(({ docChanged }) => docChanged)) return null;
            const seen = new Set<string>();
            for (const { pos, key } of listSteps(doc, null)) {
              if (seen.has(key)) tr.setNodeAttribute(pos, 'key', '');
              if (key !== '') seen.add(key);
            }
            return tr.docChanged ? tr : null;
          },
          view(view) {
            const count = () => {
              const listed = listSteps(view.state.doc, figures.get()).filter(({ key }) => key !== '');
              const before = numbers.get();
              if (listed.length !== before.size || listed.some(({ key, number }) => before.get(key) !== number))
                numbers.set(new Map(listed.map(({ key, number }) => [key, number])));
            };
            count();
            const stop = figures.listen(count);
            return {
              update: (_, before) => {
                if (before.doc !== view.state.doc) count();
              },
              destroy: stop,
            };
          },
        }),
      ];
    },
  });
  return { numbers, extension };
}
