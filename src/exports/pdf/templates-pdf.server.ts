import { drawPiece, type Drawing, type PieceFigure } from '@/engine';
import type { PaperId } from '../paper';
import { bytesOf, decoration, group, MM, openDocument, tagged, type Paper, type Tag } from './document.server';
import { draw, UNIT, type Pen } from './drawing.server';
import { HAIR, HEAD, INK, SMALL } from './look';
import type { TemplatesContent } from './sheet/content';
import { LINE_LEGEND } from '../line-legend';
import { splitArcs } from './templates/arcs';
import { lineFoot, tileFoot } from './templates/foot.server';
import {
  lying,
  MARGIN,
  NAME,
  OVERLAP,
  pageSize,
  templatePages,
  tileArea,
  type Numbered,
  type TemplatePage,
} from './templates/layout';
import type { Obstacle } from './templates/spots';
import { Typesetter, type Words } from './typeset.server';

/** Drawing units in a millimetre at true size. */
const TRUE = MM / UNIT;
/** The border that a piece's drawing has without dimensions, in drawing units. */
const BORDER = 6;
/** About the size of a letter of a name, in drawing units. */
const LETTER = { wide: 8, tall: 13 } as const;
const MARK = 2.2;

/** Every piece at true size, on as few pages as it takes. The same content gives the same bytes. */
export function templatesPdf(content: TemplatesContent, paper: PaperId): Uint8Array {
  const document = openDocument({
    paper,
    title: `${content.title}: templates`,
    author: content.byline[0] ?? '',
    subject: content.sizeWords,
    date: content.date,
  });
  const { doc, root } = document;
  const pen: Pen = { doc, type: new Typesetter(doc) };
  const { pieces } = content.figures;
  const drawings = new Map(pieces.map((piece) => [piece, trueDrawing(content, piece)]));
  const drawn: Drawn = (piece) => drawings.get(piece) as Drawing;
  const pages = templatePages(pieces, paper, (piece) => labelsOf(drawn(piece)));
  const roles = new Set([...drawings.values()].flatMap(({ shapes }) => shapes.map(({ role }) => role)));
  const legend = LINE_LEGEND.filter(({ role }) => roles.has(role));
  pages.forEach((page, i) => {
    doc.addPage();
    const part = group(doc, root, 'Sect');
    const of = { content, paper, page: i + 1, pages: pages.length, legend };
    if (page.kind === 'pieces') {
      for (const { item, x, y, turned } of page.placed) {
        wholePiece(pen, part, drawn(item.piece), item, { x: MARGIN + x, y: MARGIN + y, turned });
      }
      lineFoot(pen, part, document, of, page);
    } else {
      tilePage(pen, part, document, drawn(page.item.piece), paper, page);
      const outline = (scale: number, x: number, y: number) =>
        outlineOf(pen, drawn(page.item.piece), page, { scale, x, y });
      tileFoot(pen, part, document, { ...of, outline }, page);
    }
    part.end();
  });
  return bytesOf(document);
}

/** Drawings of the pieces, each made once. */
type Drawn = (piece: PieceFigure) => Drawing;

/** The drawing of a piece at true size, without its dimensions. */
function trueDrawing({ figures }: TemplatesContent, piece: PieceFigure): Drawing {
  const { units, grid } = figures.sizing;
  const drawing = drawPiece(piece, {
    width: piece.across * TRUE + 2 * BORDER,
    tallest: Infinity,
    scale: TRUE,
    dims: false,
    units,
    grid,
  });
  return {
    ...drawing,
    shapes: drawing.shapes.map((shape) => (shape.type === 'path' ? { ...shape, d: splitArcs(shape.d) } : shape)),
  };
}

/** Room that the names in a drawing take, millimetres from the piece's corner. */
function labelsOf({ shapes }: Drawing): readonly Obstacle[] {
  const mm = (units: number) => (units - BORDER) / TRUE;
  return shapes.flatMap((shape): Obstacle[] => {
    if (shape.type !== 'text') return [];
    const [long, tall] = [(shape.text.length * LETTER.wide) / TRUE, LETTER.tall / TRUE];
    const [x, y] = [mm(shape.x), mm(shape.y)];
    return [
      shape.turned
        ? { x: x - tall, y: y - long / 2, across: tall, along: long }
        : { x: x - long / 2, y: y - tall, across: long, along: tall },
    ];
  });
}

/** A large piece's outline on the map of its pages; `scale` is points for a millimetre. */
function outlineOf(
  { doc }: Pen,
  drawing: Drawing,
  { item, tiling }: Extract<TemplatePage, { kind: 'tile' }>,
  { scale, x, y }: { readonly scale: number; readonly x: number; readonly y: number },
): void {
  doc.save().translate(x, y).scale(scale);
  if (tiling.turned) doc.transform(0, 1, -1, 0, item.along, 0);
  doc.scale(1 / TRUE).translate(-BORDER, -BORDER);
  for (const shape of drawing.shapes) {
    if (shape.type === 'path' && shape.role === 'cut') doc.path(shape.d);
  }
  doc
    .lineWidth(TRUE / scale)
    .undash()
    .stroke(INK);
  doc.restore();
}

/** Name and drawing with the piece's top left corner, as it lies, under the name; millimetres from the page's corner. */
function wholePiece(
  pen: Pen,
  parent: Tag,
  drawing: Drawing,
  item: Numbered,
  { x, y, turned }: { readonly x: number; readonly y: number; readonly turned: boolean },
): void {
  const { doc } = pen;
  pieceName(pen, parent, item, { x, y }, turned ? ', turned' : '');
  const { across, along } = lying(item, turned);
  const top = y + NAME;
  tagged(doc, parent, 'Figure', () => truly(pen, drawing, item, { x, y: top, turned }), {
    alt: `${drawing.alt} Drawn at true size.`,
    bbox: [x * MM, top * MM, (x + across) * MM, (top + along) * MM],
  });
}

function truly(
  pen: Pen,
  drawing: Drawing,
  { along }: Numbered,
  { x, y, turned }: { readonly x: number; readonly y: number; readonly turned: boolean },
): void {
  const { doc } = pen;
  doc.save();
  if (turned) doc.transform(0, 1, -1, 0, (x + along) * MM, y * MM);
  else doc.translate(x * MM, y * MM);
  draw(pen, drawing, { x: -BORDER * UNIT, y: -BORDER * UNIT, scale: UNIT });
  doc.restore();
}

function pieceName(
  { doc, type }: Pen,
  parent: Tag,
  { piece, number }: Numbered,
  { x, y }: { readonly x: number; readonly y: number },
  more: string,
): void {
  const name = `${number}\u00a0 ${piece.name}`;
  const often = `cut ${piece.count}`;
  const said: Words = [piece.count > 1 ? { text: often, weight: 800 } : often, ` · ${piece.stock}${more}`];
  const baseline = (y + NAME) * MM - 5;
  tagged(doc, parent, 'H2', () => type.draw(name, HEAD, { x: x * MM, baseline }));
  const after = x * MM + type.width(name, HEAD) + 6;
  const room = Math.max(piece.across, 24) * MM - (after - x * MM);
  if (type.width(said, SMALL) <= room) tagged(doc, parent, 'P', () => type.draw(said, SMALL, { x: after, baseline }));
}

/** One page of a large piece: what lies on it, and marks that meet those of its neighbours. */
function tilePage(
  pen: Pen,
  parent: Tag,
  { width }: Paper,
  drawing: Drawing,
  paper: PaperId,
  { item, tiling, tile }: Extract<TemplatePage, { kind: 'tile' }>,
): void {
  const { doc } = pen;
  const area = tileArea(pageSize(paper));
  const [left, top] = [MARGIN, MARGIN + NAME];
  pieceName(pen, parent, item, { x: MARGIN, y: MARGIN }, `, part ${tile.name}${tiling.turned ? ', turned' : ''}`);
  const figure = () => {
    doc
      .save()
      .rect(left * MM, top * MM, area.across * MM, area.along * MM)
      .clip();
    truly(pen, drawing, item, { x: left - tile.x, y: top - tile.y, turned: tiling.turned });
    doc.restore();
  };
  tagged(doc, parent, 'Figure', figure, {
    alt: `${drawing.alt} Part ${tile.name} of ${tiling.tiles.length}, drawn at true size.`,
    bbox: [left * MM, top * MM, (left + area.across) * MM, (top + area.along) * MM],
  });
  decoration(doc, () => {
    const there = (column: number, row: number) => tiling.tiles.some((one) => one.column === column && one.row === row);
    const sides = {
      left: there(tile.column - 1, tile.row),
      right: there(tile.column + 1, tile.row),
      top: there(tile.column, tile.row - 1),
      bottom: there(tile.column, tile.row + 1),
    };
    const name = (column: number, row: number) => `${String.fromCharCode(65 + column)}${row + 1}`;
    const upright = (x: number, other: string, towards: 1 | -1) => {
      joint(pen, [x, top], [x, top + area.along]);
      for (const share of [0.2, 0.8]) meet(pen, x + (towards * OVERLAP) / 2, top + area.along * share);
      const at = { x: (x + (towards * OVERLAP) / 2) * MM, y: (top + area.along / 2) * MM };
      doc.save().rotate(-90, { origin: [at.x, at.y] });
      meets(pen, other, at);
      doc.restore();
    };
    const level = (y: number, other: string, towards: 1 | -1) => {
      joint(pen, [left, y], [left + area.across, y]);
      for (const share of [0.2, 0.8]) meet(pen, left + area.across * share, y + (towards * OVERLAP) / 2);
      meets(pen, other, { x: width / 2, y: (y + (towards * OVERLAP) / 2) * MM });
    };
    if (sides.left) upright(left + OVERLAP, name(tile.column - 1, tile.row), -1);
    if (sides.right) upright(left + area.across - OVERLAP, name(tile.column + 1, tile.row), 1);
    if (sides.top) level(top + OVERLAP, name(tile.column, tile.row - 1), -1);
    if (sides.bottom) level(top + area.along - OVERLAP, name(tile.column, tile.row + 1), 1);
  });
}

/** Where the strip that two pages share begins. */
function joint({ doc }: Pen, [x1, y1]: readonly [number, number], [x2, y2]: readonly [number, number]): void {
  doc
    .moveTo(x1 * MM, y1 * MM)
    .lineTo(x2 * MM, y2 * MM)
    .lineWidth(HAIR)
    .dash(1.2, { space: 3 })
    .stroke('#666666')
    .undash();
}

/** Which page lies here, readable over whatever the piece has there. */
function meets({ doc, type }: Pen, other: string, { x, y }: { readonly x: number; readonly y: number }): void {
  const words = `meets ${other}`;
  const wide = type.width(words, SMALL) + 4;
  doc.rect(x - wide / 2, y - 5, wide, 10).fill('#ffffff');
  type.draw(words, SMALL, { x, baseline: y + 2.5, anchor: 'middle' });
}

/** A cross in a ring, at the same place of the piece on both pages. */
function meet({ doc }: Pen, x: number, y: number): void {
  const [cx, cy, r] = [x * MM, y * MM, MARK * MM];
  doc
    .circle(cx, cy, r * 0.6)
    .moveTo(cx - r, cy)
    .lineTo(cx + r, cy)
    .moveTo(cx, cy - r)
    .lineTo(cx, cy + r)
    .lineWidth(HAIR)
    .undash()
    .stroke(INK);
}
