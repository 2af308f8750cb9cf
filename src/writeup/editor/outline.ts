import type { Node as ProseMirrorNode } from '@tiptap/pm/model';
import type { LiveFigures } from '../live';
import { listSteps } from './step-numbers';

/** A heading or a step of the write-up, by which one goes about in it. */
export interface OutlineItem {
  readonly pos: number;
  readonly words: string;
  readonly is: 'heading' | 'step';
  /** Steps: as readers count; null when it does not apply at this size. */
  readonly number: number | null;
}

export function outlineOf(doc: ProseMirrorNode, live: LiveFigures | null): readonly OutlineItem[] {
  const steps = new Map(listSteps(doc, live).map((step) => [step.pos, step]));
  const items: OutlineItem[] = [];
  doc.forEach((node, pos) => {
    const step = steps.get(pos);
    if (step) items.push({ pos, words: step.title, is: 'step', number: step.number });
    else if (node.type.name === 'heading' && node.textContent.trim() !== '')
      items.push({ pos, words: node.textContent.trim(), is: 'heading', number: null });
  });
  return items;
}

export interface Counts {
  readonly words: number;
  /** Live measures and amounts. */
  readonly live: number;
  readonly steps: number;
}

/** Words of the text and of titles; a live measure is none, whatever it shows. */
export function countsOf(doc: ProseMirrorNode): Counts {
  let [words, live, steps] = [0, 0, 0];
  const count = (text: string) => text.match(/[\p{L}\p{N}][\p{L}\p{N}’'-]*/gu)?.length ?? 0;
  doc.descendants((node) => {
    if (node.type.name === 'step') {
      steps += 1;
      words += count(String(node.attrs.title));
    }
    if (node.type.name === 'measure' || node.type.name === 'amount') live += 1;
    if (node.isTextblock) words += count(node.textBetween(0, node.content.size, undefined, ' '));
  });
  return { words, live, steps };
}
