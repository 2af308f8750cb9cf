import { sayParts, type Figures, type Sentence } from '@/engine';
import { group, tagged, type Tag } from '../document.server';
import { disc, type Pen } from '../drawing.server';
import { BODY, LEADING } from '../look';
import type { Line, Words } from '../typeset.server';

/** A sentence from geometry with its figures in bold. */
export function wordsOf(sentence: Sentence, { units, grid }: Figures['sizing']): Words {
  return sayParts(sentence, { units, grid }).map(({ typeset, figure }) =>
    figure ? { text: typeset, weight: 600 } : typeset.replaceAll(' × ', '\u00a0×\u00a0'),
  );
}

export interface List {
  readonly height: number;
  draw(parent: Tag, place: { readonly x: number; readonly y: number }): void;
}

const BETWEEN = 2.6;
const DISC = 6;
/** How far words stand in from a numbered disc. */
export const NUMBERED = 19;

/** Sentences below one another. */
export function plainList(pen: Pen, sentences: readonly Words[], width: number): List {
  const items = sentences.map((words) => pen.type.lines(words, BODY, width));
  return listOf(pen, items, { indent: 0, between: BETWEEN, least: 0 });
}

/** Sentences with a number in a disc before each. */
export function numberedList(pen: Pen, sentences: readonly Words[], width: number, first = 1): List {
  const items = sentences.map((words) => pen.type.lines(words, BODY, width - NUMBERED));
  return listOf(pen, items, { indent: NUMBERED, between: BETWEEN + 1.4, least: 2 * DISC, first });
}

function listOf(
  pen: Pen,
  items: readonly (readonly Line[])[],
  { indent, between, least, first = 1 }: { indent: number; between: number; least: number; first?: number },
): List {
  const heights = items.map((lines) => Math.max(least, lines.length * LEADING));
  return {
    height: heights.reduce((sum, one) => sum + one + between, 0) - (items.length > 0 ? between : 0),
    draw(parent, { x, y }) {
      if (items.length === 0) return;
      const { doc, type } = pen;
      const list = group(doc, parent, 'L');
      let top = y;
      items.forEach((lines, i) => {
        const item = group(doc, list, 'LI');
        const at = top;
        if (indent > 0) {
          const middle = { x: x + DISC, y: at + LEADING / 2 + 0.3, radius: DISC };
          tagged(doc, item, 'Lbl', () => disc(pen, `${first + i}`, middle));
        }
        tagged(doc, item, 'LBody', () => type.paragraph(lines, BODY, { x: x + indent, top: at, leading: LEADING }));
        top += (heights[i] as number) + between;
      });
      list.end();
    },
  };
}
