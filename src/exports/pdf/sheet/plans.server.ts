import { cutsInWords, drawSheet, helpWithTooLarge, joiningInWords, say, type Sentence, type SheetPlan } from '@/engine';
import { decoration, group, tagged, type Tag } from '../document.server';
import { placeDrawing, SHEET_BORDER, UNIT, type Pen } from '../drawing.server';
import type { Block, Flow } from '../flow.server';
import { HEAD, INK, LEADING, SMALL, STRONG, THICK } from '../look';
import type { SheetContent } from './content';
import { numberedList, wordsOf } from './words.server';

const COLUMN_GAP = 22;
const BETWEEN = 16;
const HEAD_HEIGHT = 14;
/** The largest that a sheet is drawn, in points. */
const WIDEST = 222;
const TALLEST = 222;

/** How the pieces come out of the sheets: each drawn with its cuts numbered, and the same in words. */
export function plans(pen: Pen, parent: Tag, flow: Flow, content: SheetContent): void {
  const { plan } = content;
  const alone = plan.sheets.length === 1;
  const width = (flow.width - COLUMN_GAP) / 2;
  const blocks = plan.sheets.map((_, i) => planBlock(pen, content, i, { width, alone }));
  const large = plan.tooLarge.map((one) => {
    const help = say(helpWithTooLarge(one), content.figures.sizing);
    return warning(pen, `${one.name} is too large for ${one.stock.name}. ${help}`, flow.width);
  });
  const joined = plan.joined.map((one) => warning(pen, say(joiningInWords(one), content.figures.sizing), flow.width));
  const first = [...large, ...joined, ...blocks][0];
  const names = [...new Set(plan.sheets.map(({ stock }) => stock.name))];
  const note = `${names.join(' and ') || plan.stock.name}; straight cuts from edge to edge, in the order of their numbers`;
  flow.section(parent, 'From the sheets', note, first?.height ?? 0);
  [...large, ...joined].forEach((block) => flow.put(parent, block, 8));
  if (alone) blocks.forEach((block) => flow.put(parent, block));
  else flow.columns(parent, blocks, { count: 2, gap: COLUMN_GAP, between: BETWEEN });
}

function planBlock(
  pen: Pen,
  { plan, figures }: SheetContent,
  index: number,
  { width, alone }: { readonly width: number; readonly alone: boolean },
): Block {
  const { units, grid } = figures.sizing;
  const { stock, material } = plan.sheets[index] as SheetPlan['sheets'][number];
  const { across, along } = stock;
  const wide = Math.min(WIDEST, width, (TALLEST * across) / along) / UNIT;
  const drawing = drawSheet(plan, index, { width: wide, units, grid });
  const list = numberedList(
    pen,
    cutsInWords(plan, index).map((sentence) => wordsOf(unnumbered(sentence), figures.sizing)),
    width,
  );
  // The numbers of the cuts stand in the border, which is empty above and left of a sheet without cuts there.
  const [tall, inset] = [drawing.height * UNIT, SHEET_BORDER * UNIT];
  const title = `Sheet ${index + 1} of ${plan.used}${plan.takes.length > 1 ? `, ${material}` : ''}`;
  return {
    height: HEAD_HEIGHT + (alone ? Math.max(tall - inset, list.height) : tall - inset + 4 + list.height),
    draw(parent, { x, y }) {
      const { doc, type } = pen;
      const part = group(doc, parent, 'Sect');
      tagged(doc, part, 'H3', () => type.draw(title, HEAD, { x, baseline: y + 8 }));
      const after = x + type.width(title, HEAD) + 7;
      const makes = `for ${[...new Set(plan.sheets[index]?.parts.map(({ piece }) => piece))].join(', ')}`;
      const fitting = type.lines(makes, SMALL, x + width - after);
      if (fitting.length === 1) tagged(doc, part, 'P', () => type.draw(makes, SMALL, { x: after, baseline: y + 8 }));
      placeDrawing(pen, part, drawing, { x: x - inset + 14, y: y + HEAD_HEIGHT - 4 });
      if (alone) list.draw(part, { x: x + width + COLUMN_GAP, y: y + HEAD_HEIGHT + 8 });
      else list.draw(part, { x, y: y + HEAD_HEIGHT + tall - inset + 4 });
      part.end();
    },
  };
}

/** The number stands in a disc, as it does in the drawing. */
function unnumbered([first, ...rest]: Sentence): Sentence {
  return typeof first === 'string' ? [first.replace(/^\d+\. /, ''), ...rest] : [first as never, ...rest];
}

/** What keeps a piece from being cut, in a box that is not overlooked. */
function warning(pen: Pen, words: string, width: number): Block {
  const lines = pen.type.lines(words, STRONG, width - 20);
  const height = lines.length * LEADING + 12;
  return {
    height,
    draw(parent, { x, y }) {
      const { doc, type } = pen;
      decoration(doc, () => doc.rect(x, y, width, height).lineWidth(THICK).undash().stroke(INK));
      tagged(doc, parent, 'P', () => type.paragraph(lines, STRONG, { x: x + 10, top: y + 6, leading: LEADING }));
    },
  };
}
