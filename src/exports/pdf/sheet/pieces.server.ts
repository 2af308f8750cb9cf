import { drawPiece, instructionsOf, type Drawing, type PieceFigure } from '@/engine';
import { LINE_LEGEND } from '../../line-legend';
import { sheetScale } from '../../sheet-scale';
import { decoration, group, MM, tagged, type Tag } from '../document.server';
import { placeDrawing, UNIT, type Pen } from '../drawing.server';
import type { Block, Flow } from '../flow.server';
import { drawLegend, LEGEND_TYPE, SAMPLE } from '../legend.server';
import { HEAD, INK, SMALL, THIN } from '../look';
import { rule } from '../table.server';
import type { SheetContent } from './content';
import { plainList, wordsOf } from './words.server';

const COLUMN_GAP = 22;
const BETWEEN = 17;
/** Room for the running dimensions at both sides of a piece, in drawing units. */
const DIMENSIONS = 92;
/** The tallest that a piece is drawn, in points. */
const TALLEST = 190;
const HEAD_HEIGHT = 12;
/** A drawing no wider than this share of its column has its words beside it. */
const BESIDE = 0.5;
const BESIDE_TOP = 8;
const LEGEND_COLUMNS = 4;
const LEGEND_LINE = 13;
const UNIT_WORDS = { in: 'inches', mm: 'millimetres', cm: 'centimetres' };

/** Every piece at one stated scale with its dimensions, and its making in words. */
export function pieces(pen: Pen, parent: Tag, flow: Flow, content: SheetContent): void {
  const { figures } = content;
  const room = (count: number) => (flow.width - COLUMN_GAP * (count - 1)) / count;
  const perMm = MM / UNIT;
  const two = sheetScale(figures.pieces, {
    perMm,
    widest: room(2) / UNIT - DIMENSIONS,
    tallest: TALLEST / UNIT,
  });
  const narrow = figures.pieces.every(({ across }) => across * two.units + DIMENSIONS <= room(3) / UNIT);
  const count = narrow && figures.pieces.length > 2 ? 3 : 2;
  const blocks = figures.pieces.map((piece, i) =>
    pieceBlock(pen, content, piece, i + 1, { scale: two.units, width: room(count) }),
  );
  const note = `drawn ${two.words}, ${UNIT_WORDS[figures.sizing.units]}; top and left figures run from the corner mark`;
  flow.section(parent, 'Pieces', note, blocks[0]?.height ?? 0);
  flow.columns(parent, blocks, { count, gap: COLUMN_GAP, between: BETWEEN });
  flow.y += 12;
  flow.put(parent, legend(pen, flow.width));
}

function pieceBlock(
  pen: Pen,
  { figures }: SheetContent,
  piece: PieceFigure,
  number: number,
  { scale, width }: { readonly scale: number; readonly width: number },
): Block {
  const { units, grid } = figures.sizing;
  const drawing = drawPiece(piece, {
    width: Math.min(width / UNIT, piece.across * scale + DIMENSIONS),
    tallest: 1e4,
    scale,
    units,
    grid,
  });
  const sentences = instructionsOf(piece).map((sentence) => wordsOf(sentence, figures.sizing));
  const block = (shown: typeof sentences, drawn: Drawing | null): Block => {
    const beside = drawn !== null && drawn.width * UNIT <= width * BESIDE;
    const indent = beside ? width * BESIDE + 8 : 0;
    const words = plainList(pen, shown, width - indent);
    const tall = drawn ? drawn.height * UNIT + 3 : 0;
    const [lower, height] = beside
      ? [BESIDE_TOP, Math.max(tall, BESIDE_TOP + words.height)]
      : [tall, tall + words.height];
    return {
      height: HEAD_HEIGHT + height,
      draw(parent, { x, y }) {
        const { doc, type } = pen;
        const part = group(doc, parent, 'Sect');
        tagged(doc, part, 'H3', () => type.draw(`${number}\u00a0 ${piece.name}`, HEAD, { x, baseline: y + 8 }));
        const after = x + type.width(`${number}\u00a0 ${piece.name}`, HEAD) + 7;
        const said = drawn ? `cut ${piece.count} · ${piece.stock}` : 'goes on';
        tagged(doc, part, 'P', () => type.draw(said, SMALL, { x: after, baseline: y + 8 }));
        if (drawn) placeDrawing(pen, part, drawn, { x, y: y + HEAD_HEIGHT });
        words.draw(part, { x: x + indent, y: y + HEAD_HEIGHT + lower });
        part.end();
      },
    };
  };
  const half = Math.ceil(sentences.length / 2);
  return {
    ...block(sentences, drawing),
    parts: () => [block(sentences.slice(0, half), drawing), block(sentences.slice(half), null)],
  };
}

/** What the lines of the drawings mean. */
function legend({ doc, type }: Pen, width: number): Block {
  const rows = Math.ceil(LINE_LEGEND.length / LEGEND_COLUMNS);
  const columns = Array.from({ length: LEGEND_COLUMNS }, (_, k) => {
    const own = LINE_LEGEND.filter((__, i) => i % LEGEND_COLUMNS === k);
    return SAMPLE + Math.max(...own.map(({ words }) => type.width(words, LEGEND_TYPE)));
  });
  const gap = (width - columns.reduce((sum, one) => sum + one, 0)) / (LEGEND_COLUMNS - 1);
  const lefts = columns.map((_, k) => columns.slice(0, k).reduce((sum, one) => sum + one + gap, 0));
  return {
    height: 8 + rows * LEGEND_LINE,
    draw(parent, { x, y }) {
      decoration(doc, () => rule({ doc, type }, x, y, width, THIN, INK));
      drawLegend({ doc, type }, parent, LINE_LEGEND, (i) => ({
        x: x + (lefts[i % LEGEND_COLUMNS] as number),
        y: y + 6 + Math.floor(i / LEGEND_COLUMNS) * LEGEND_LINE,
      }));
    },
  };
}
