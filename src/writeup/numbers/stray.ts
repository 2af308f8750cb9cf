import type { Figures } from '@/engine';
import type { DocNode } from '../document';
import type { LiveFigures } from '../live';
import { findNumbers } from './find-numbers';
import { matchNumbers, type MatchedNumber } from './match-numbers';
import { THING } from './tokens';

/** A stretch of a line of text: words, or one thing in it such as a live measure, which counts as one character. */
export interface Stretch {
  readonly text: string;
  /** The author means it as it is. */
  readonly meant: boolean;
}
/** A typed length that is not live. Offsets count from the beginning of its line, a live measure as one character. */
export type StrayNumber = MatchedNumber;
export interface PlacedStray extends StrayNumber {
  /** The step that it stands in, from 1. */
  readonly step: number | null;
  readonly sentence: string;
}

/** The stray numbers of one line of text. `about` is what stands above it, such as the title of its step. */
export function strayIn(line: readonly Stretch[], live: LiveFigures, about: string): readonly StrayNumber[] {
  const text = line.map((stretch) => stretch.text).join('');
  const meant = meantIn(line);
  const known = knownFor(live.figures);
  const key = `${about}\n${meant.map(({ from, to }) => `${from}-${to}`).join()}\n${text}`;
  const before = known.get(key);
  if (before) return before;
  const found = findNumbers(text, { units: live.figures.sizing.units });
  const stray =
    found.length === 0
      ? []
      : matchNumbers(text, found, live, about).filter(
          ({ from, to }) => !meant.some((one) => one.from < to && from < one.to),
        );
  if (known.size > MOST_KNOWN) known.clear();
  known.set(key, stray);
  return stray;
}

/** Lines are looked at again and again while one of them is typed. */
const MOST_KNOWN = 3000;
const lines = new WeakMap<Figures, Map<string, readonly StrayNumber[]>>();
function knownFor(figures: Figures): Map<string, readonly StrayNumber[]> {
  let known = lines.get(figures);
  if (!known) lines.set(figures, (known = new Map()));
  return known;
}

function meantIn(line: readonly Stretch[]): readonly { readonly from: number; readonly to: number }[] {
  let at = 0;
  return line.flatMap(({ text, meant }) => {
    const from = at;
    at += text.length;
    return meant ? [{ from, to: at }] : [];
  });
}

interface AnyNode {
  readonly type: string;
  readonly text?: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly marks?: readonly { readonly type: string }[];
  readonly content?: readonly AnyNode[];
}

/** The stray numbers of a whole write-up, in order. */
export function strayNumbers(doc: DocNode, live: LiveFigures): readonly PlacedStray[] {
  const found: PlacedStray[] = [];
  let steps = 0;
  const look = (node: AnyNode, step: number | null, about: string): void => {
    const content = node.content ?? [];
    if (content.some(({ type }) => type === 'text')) {
      const line = content.map(stretchOf);
      const sentence = line.map(({ text }) => text).join('');
      for (const stray of strayIn(line, live, about)) found.push({ ...stray, step, sentence });
      return;
    }
    for (const child of content) {
      if (child.type !== 'step') look(child, step, about);
      else look(child, (steps += 1), `${String(child.attrs?.title ?? '')}.`);
    }
  };
  look(doc as AnyNode, null, '');
  return found;
}

const stretchOf = ({ type, text, marks = [] }: AnyNode): Stretch => ({
  text: type === 'text' ? (text ?? '') : THING,
  meant: marks.some((mark) => mark.type === 'asTyped'),
});
