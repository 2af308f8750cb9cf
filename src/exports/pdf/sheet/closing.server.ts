import { materialRows } from '../../material-rows';
import { decoration, group, tagged, type Tag } from '../document.server';
import type { Pen } from '../drawing.server';
import type { Block, Flow } from '../flow.server';
import { BODY, HEAD, INK, LEADING, STRONG, THIN } from '../look';
import { CHECK_SIDES, checkSquare } from '../true-size.server';
import type { Words } from '../typeset.server';
import type { SheetContent } from './content';
import { numberedList } from './words.server';

const COLUMN_GAP = 22;

/** The order of making, a line a step. */
export function steps(pen: Pen, parent: Tag, flow: Flow, { steps: all }: SheetContent): void {
  if (all.length === 0) return;
  const width = (flow.width - COLUMN_GAP) / 2;
  const blocks = all.map(({ title, mark }, i): Block => {
    const words: Words = mark === '' ? [title] : [title, ` (${mark})`];
    return numberedList(pen, [words], width, i + 1);
  });
  flow.section(parent, 'Steps in short', 'the write-up says how', blocks[0]?.height ?? 0);
  flow.columns(parent, blocks, { count: 2, gap: COLUMN_GAP, between: 5 });
}

/** What it takes besides the sheets: glue, ribbon, knobs. */
export function materials(pen: Pen, parent: Tag, flow: Flow, { figures, plan }: SheetContent): void {
  const rows = materialRows(figures);
  if (rows.length === 0) return;
  const { doc, type } = pen;
  const width = (flow.width - COLUMN_GAP) / 2;
  const blocks = rows.map(({ name, amount }): Block => {
    const lines = type.lines([`${name}: `, { text: typesetFractions(amount), weight: 600 }], BODY, width);
    return {
      height: lines.length * LEADING,
      draw: (list, { x, y }) =>
        tagged(doc, list, 'P', () => type.paragraph(lines, BODY, { x, top: y, leading: LEADING })),
    };
  });
  flow.section(parent, 'What it takes', plan.copies > 1 ? 'for one box' : '', LEADING);
  flow.columns(parent, blocks, { count: 2, gap: COLUMN_GAP, between: 2 });
}

/** `26 1/2 in` with its fraction set as one. */
const typesetFractions = (text: string): string =>
  text.replace(
    /(?:(\d+) )?\b(\d+)\/(\d+)/g,
    (_, whole: string | undefined, top: string, bottom: string) =>
      `${whole === undefined ? '' : `${whole}\u202f`}${top}\u2044${bottom}`,
  );

/** Where the work can hurt, in a box with a heavy edge. */
export function cautions(pen: Pen, width: number, words: readonly string[]): Block {
  const { doc, type } = pen;
  const indent = 16;
  const half = (width - indent - 12 - COLUMN_GAP) / 2;
  const items = words.map((text) => type.lines(text, BODY, half - 9));
  const heights = items.map((lines) => lines.length * LEADING + 2);
  // Two columns, the first no shorter than the second.
  const whole = heights.reduce((sum, one) => sum + one, 0);
  let used = 0;
  const split = heights.findIndex((one) => (used += one) * 2 >= whole) + 1;
  const tall = Math.max(
    heights.slice(0, split).reduce((sum, one) => sum + one, 0),
    heights.slice(split).reduce((sum, one) => sum + one, 0),
  );
  const height = 22 + tall + 5;
  return {
    height,
    draw(parent, { x, y }) {
      decoration(doc, () => {
        doc.rect(x, y, width, height).lineWidth(THIN).undash().stroke(INK);
        doc.rect(x, y, 4, height).fill(INK);
      });
      tagged(doc, parent, 'H2', () => type.draw('Mind yourself', HEAD, { x: x + indent, baseline: y + 15 }));
      const list = group(doc, parent, 'L');
      let top = y + 22;
      items.forEach((lines, i) => {
        if (i === split) top = y + 22;
        const [left, at] = [x + indent + (i < split ? 0 : half + COLUMN_GAP), top];
        const item = group(doc, list, 'LI');
        decoration(doc, () => doc.rect(left, at + 4.4, 2.6, 2.6).fill(INK));
        tagged(doc, item, 'LBody', () => type.paragraph(lines, BODY, { x: left + 9, top: at, leading: LEADING }));
        top += heights[i] as number;
      });
      list.end();
    },
  };
}

/** Two squares that show whether the paper came out at true size. */
export function check(pen: Pen, width: number): Block {
  const { doc, type } = pen;
  const { inches, millimetres } = CHECK_SIDES;
  const gap = 14;
  const left = inches + millimetres + 2 * gap;
  const words = type.lines(
    'Lay your ruler on either square. If a side is not exactly 2\u00a0in or 50\u00a0mm, print again at 100\u00a0% or “actual size”. The figures on this sheet hold at any scale; only the squares and the ruler along the top do not.',
    BODY,
    width - left,
  );
  return {
    height: inches + 2,
    draw(parent, { x, y }) {
      square(pen, parent, 'inches', { x, y });
      square(pen, parent, 'millimetres', { x: x + inches + gap, y });
      const top = y + (inches - words.length * LEADING - 14) / 2;
      tagged(doc, parent, 'H2', () =>
        type.draw('Did it print at true size?', { ...HEAD, size: STRONG.size + 1 }, { x: x + left, baseline: top + 8 }),
      );
      tagged(doc, parent, 'P', () => type.paragraph(words, BODY, { x: x + left, top: top + 14, leading: LEADING }));
    },
  };
}

/** A check square as a figure with its size in words. */
export function square(pen: Pen, parent: Tag, which: keyof typeof CHECK_SIDES, at: { x: number; y: number }): void {
  const side = CHECK_SIDES[which];
  tagged(pen.doc, parent, 'Figure', () => checkSquare(pen, which, at), {
    alt: `Check square, ${which === 'inches' ? '2 in' : '50 mm'} on each side.`,
    bbox: [at.x, at.y, at.x + side, at.y + side],
  });
}
