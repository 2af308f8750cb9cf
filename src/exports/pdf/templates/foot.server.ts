import type { Point } from '@/engine';
import type { PaperId } from '../../paper';
import { decoration, MM, tagged, type Paper, type Tag } from '../document.server';
import type { Pen } from '../drawing.server';
import type { LegendLine } from '../../line-legend';
import { drawLegend, LEGEND_TYPE, SAMPLE } from '../legend.server';
import { HAIR, HEAD, INK, SMALL, SMALL_LEADING, THIN } from '../look';
import { square } from '../sheet/closing.server';
import { rule } from '../table.server';
import type { TemplatesContent } from '../sheet/content';
import type { Type } from '../typeset.server';
import { MARGIN, pageSize, SQUARES, tileArea, type TemplatePage } from './layout';

/** What every foot says. */
export interface Of {
  readonly content: TemplatesContent;
  readonly paper: PaperId;
  readonly page: number;
  readonly pages: number;
  /** The lines that the pieces have. */
  readonly legend: readonly LegendLine[];
}

const PRINT = 'Print at 100\u00a0%, “actual size”. Lay a ruler on either square before you cut.';
const ONCE = 'Drawn once: cut as many as the name says.';
/** Between lines of the foot, in points. */
const ROW = 9.8;
const LINES: Type = { ...SMALL, colour: INK };
const BESIDE = 4;
const MAP_HEIGHT = 74;

/** Both squares side by side at the foot of the page, and the words beside them. Gives the words' left, top and width in points. */
function squaresFoot(pen: Pen, parent: Tag, { width, height }: Paper): { x: number; top: number; width: number } {
  const bottom = height - MARGIN * MM;
  const inches = SQUARES.inches * MM;
  square(pen, parent, 'inches', { x: MARGIN * MM, y: bottom - inches });
  const second = MARGIN * MM + inches + BESIDE * MM;
  square(pen, parent, 'millimetres', { x: second, y: bottom - SQUARES.millimetres * MM });
  const x = second + SQUARES.millimetres * MM + (BESIDE + 2) * MM;
  return { x, top: bottom - inches, width: width - MARGIN * MM - x };
}

/** Words in the foot from the top; gives where the next begin. */
function footWords(pen: Pen, parent: Tag, of: Of, at: { x: number; top: number; width: number }, more: string): number {
  const { doc, type } = pen;
  decoration(doc, () => rule(pen, at.x, at.top, at.width, THIN, INK));
  let { top } = at;
  const titles = type.lines(of.content.title, HEAD, at.width).slice(0, 2);
  tagged(doc, parent, of.page === 1 ? 'H1' : 'P', () => {
    top = type.paragraph(titles, HEAD, { x: at.x, top: top + 4, leading: 11 });
  });
  for (const text of [of.content.sizeWords, PRINT, more]) {
    if (text === '') continue;
    const lines = type.lines(text, LINES, at.width);
    tagged(doc, parent, 'P', () => {
      top = type.paragraph(lines, LINES, { x: at.x, top: top + 2.5, leading: SMALL_LEADING });
    });
  }
  return top;
}

function pageNumber({ doc, type }: Pen, { width, height }: Paper, { page, pages }: Of): void {
  const place = { x: width - MARGIN * MM, baseline: height - MARGIN * MM - 0.5, anchor: 'end' } as const;
  decoration(doc, () => type.draw(`${page} of ${pages}`, { ...SMALL, weight: 800, colour: INK }, place));
}

/** The foot of a page with whole pieces: lines of words, and the squares where the pieces leave room for them. */
export function lineFoot(
  pen: Pen,
  parent: Tag,
  paper: Paper,
  of: Of,
  { placed, squares }: Extract<TemplatePage, { kind: 'pieces' }>,
): void {
  const { doc, type } = pen;
  (['inches', 'millimetres'] as const).forEach((which, i) => {
    const { x, y } = squares[i] as Point;
    square(pen, parent, which, { x: (MARGIN + x) * MM, y: (MARGIN + y) * MM });
  });
  const [left, baseline] = [MARGIN * MM, paper.height - MARGIN * MM - 0.5];
  const width = paper.width - 2 * MARGIN * MM;
  const upper = baseline - 2 * ROW;
  decoration(doc, () => rule(pen, left, upper - 11, width, THIN, INK));
  const [title] = type.lines(of.content.title, HEAD, width * 0.5);
  if (title)
    tagged(doc, parent, of.page === 1 ? 'H1' : 'P', () => type.draw(title, HEAD, { x: left, baseline: upper }));
  const size = { x: left + width, baseline: upper, anchor: 'end' } as const;
  tagged(doc, parent, 'P', () => type.draw(of.content.sizeWords, LINES, size));
  const more = placed.length === 1 ? 'The squares are no part of the piece.' : '';
  const often = placed.some(({ item }) => item.piece.count > 1) ? ONCE : '';
  const words = [PRINT, more, often].filter((one) => one !== '').join(' ');
  tagged(doc, parent, 'P', () => type.draw(words, LINES, { x: left, baseline: baseline - ROW }));
  const widths = of.legend.map((line) => SAMPLE + type.width(line.words, LEGEND_TYPE) + 12);
  drawLegend(pen, parent, of.legend, (i) => ({
    x: left + widths.slice(0, i).reduce((sum, one) => sum + one, 0),
    y: baseline - 7.4,
  }));
  pageNumber(pen, paper, of);
}

/** The foot of one page of a large piece, with a map of all its pages. */
export function tileFoot(
  pen: Pen,
  parent: Tag,
  paper: Paper,
  of: Of & {
    /** The piece's outline as it lies, drawn at this scale with its corner there. */ outline(
      scale: number,
      x: number,
      y: number,
    ): void;
  },
  { item, tiling, tile }: Extract<TemplatePage, { kind: 'tile' }>,
): void {
  const { doc, type } = pen;
  const at = squaresFoot(pen, parent, paper);
  const map = MAP_HEIGHT;
  const area = tileArea(pageSize(of.paper));
  const covered = {
    across: Math.max(...tiling.tiles.map(({ x }) => x)) + area.across,
    along: Math.max(...tiling.tiles.map(({ y }) => y)) + area.along,
  };
  const scale = Math.min((at.width * 0.36) / covered.across, map / covered.along);
  const wide = covered.across * scale;
  const often = item.piece.count > 1 ? ` ${ONCE}` : '';
  const words = `Part ${tile.name} of piece ${item.number}. Lay the pages so that the crosses meet, tape them, then cut.${often}`;
  const below = footWords(pen, parent, of, { ...at, width: at.width - wide - 10 }, words);
  drawLegend(pen, parent, of.legend, (i) => ({ x: at.x, y: below + 5 + i * ROW }));
  const [left, top] = [at.x + at.width - wide, at.top + 6];
  decoration(doc, () => rule(pen, at.x, at.top, at.width, THIN, INK));
  const draw = () => {
    for (const one of tiling.tiles) {
      doc.rect(left + one.x * scale, top + one.y * scale, area.across * scale, area.along * scale);
      doc.lineWidth(HAIR).undash();
      if (one === tile) doc.fillAndStroke('#d9d9d9', INK);
      else doc.stroke(INK);
    }
    of.outline(scale, left, top);
    for (const one of tiling.tiles) {
      const middle = left + (one.x + area.across / 2) * scale;
      const baseline = top + (one.y + area.along / 2) * scale + 2.5;
      type.draw(one.name, { ...SMALL, weight: 600, colour: INK }, { x: middle, baseline, anchor: 'middle' });
    }
  };
  tagged(doc, parent, 'Figure', draw, {
    alt: `Map: this is page ${tile.name} of ${tiling.tiles.length}, in ${tiling.columns} columns and ${tiling.rows} rows.`,
    bbox: [left, top, left + wide, top + covered.along * scale],
  });
  pageNumber(pen, paper, of);
}
