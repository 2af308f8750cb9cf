import { CARD_STEPS, cutRows, hasCardSteps, scoreRows, type CutRow } from '../sheet-tables';
import type { PaperId } from '../paper';
import { bytesOf, decoration, group, MM, openDocument, tagged, type Paper, type Tag } from './document.server';
import type { Pen } from './drawing.server';
import { Flow, type Block } from './flow.server';
import { BODY, HEAD, INK, SMALL, STRONG, THIN } from './look';
import { cover } from './sheet/cover.server';
import { cautions, check, materials, steps } from './sheet/closing.server';
import type { SheetContent } from './sheet/content';
import { pieces } from './sheet/pieces.server';
import { plans } from './sheet/plans.server';
import { rule, table, type Cell } from './table.server';
import { topRuler } from './true-size.server';
import { Typesetter } from './typeset.server';

const MARGIN = 12 * MM;
const RULER_TOP = 9 * MM;
const TOP = 17 * MM;
const FOOT = 17 * MM;
const TABLE_GAP = 24;
const TICK = 7.5;
const MOST_TICKS = 8;

/**
 * The measurement sheet on paper: what is made at which size, cut list, scores, every piece drawn and said, the sheets and their
 * cuts, the steps in short, cautions, and squares that show whether it printed at true size. The same content gives the same bytes.
 */
export function measurementPdf(content: SheetContent, paper: PaperId): Uint8Array {
  const document = openDocument({
    paper,
    title: `${content.title}: measurement sheet`,
    author: content.byline[0] ?? '',
    subject: content.sizeWords,
    date: content.date,
  });
  const { doc, root, width, height } = document;
  const pen: Pen = { doc, type: new Typesetter(doc) };
  const frame = { left: MARGIN, right: width - MARGIN, top: TOP, bottom: height - FOOT };
  const flow = new Flow(pen, document, frame, () =>
    topRuler(pen, { x: MARGIN, y: RULER_TOP, length: width - 2 * MARGIN }, content.figures.sizing.units),
  );
  flow.put(root, cover(pen, content, flow.width), 14);
  tables(pen, root, flow, content);
  pieces(pen, root, flow, content);
  plans(pen, root, flow, content);
  materials(pen, root, flow, content);
  steps(pen, root, flow, content);
  flow.y += 16;
  flow.put(root, cautions(pen, flow.width, content.cautions), 16);
  flow.put(root, check(pen, flow.width));
  feet(pen, document, content);
  return bytesOf(document);
}

/** Cut list and scores, side by side where they fit so. */
function tables(pen: Pen, parent: Tag, flow: Flow, content: SheetContent): void {
  const { figures, plan } = content;
  const half = (flow.width - TABLE_GAP) / 2;
  const rows = cutRows(figures, plan);
  const scores = scoreRows(figures);
  const { units } = figures.sizing;
  const cutTable = (width: number) =>
    titled(
      pen,
      'Cut list',
      'Every size is across × along, as the piece is drawn.',
      width,
      table(
        pen,
        [
          { head: 'no.', width: 13, type: HEAD },
          { head: 'piece', width: { share: 1 }, names: true },
          { head: 'cut', width: 14 },
          { head: 'across ×', width: 40, type: STRONG, align: 'end' },
          { head: `along, ${units}`, width: 38, type: STRONG },
          { head: 'sheet', width: 24 },
          { head: 'done', width: 30 },
        ],
        rows.map((row): readonly Cell[] => [
          `${row.number}`,
          row.piece.stock === 'card' ? row.piece.name : `${row.piece.name} (${row.piece.stock})`,
          `${row.piece.count}`,
          `${row.across} ×`,
          row.along,
          row.sheets.join(', ') || '–',
          ticksFor(pen, row),
        ]),
        width,
      ),
    );
  const scoreTable = (width: number) =>
    titled(
      pen,
      'Scores, read from one edge',
      hasCardSteps(scores) ? CARD_STEPS : '',
      width,
      table(
        pen,
        [
          { head: 'no.', width: 13, type: HEAD },
          { head: 'piece', width: { share: 1 }, names: true },
          { head: 'side of', width: 38, type: BODY },
          { head: 'score at', width: { share: 1.25 }, type: STRONG },
          { head: 'from', width: 20 },
        ],
        scores.map((row): readonly Cell[] => [
          row.number === null ? '' : `${row.number}`,
          row.number === null ? '' : row.piece,
          row.side,
          row.at.join(' · '),
          row.from,
        ]),
        width,
      ),
    );
  if (scores.length === 0) return flow.put(parent, cutTable(flow.width));
  const [left, right] = [cutTable(half), scoreTable(half)];
  const tall = Math.max(left.height, right.height);
  if (tall > flow.room) {
    flow.put(parent, cutTable(flow.width), 16);
    return flow.put(parent, scoreTable(flow.width));
  }
  left.draw(parent, { x: flow.frame.left, y: flow.y });
  right.draw(parent, { x: flow.frame.left + half + TABLE_GAP, y: flow.y });
  flow.y += tall;
}

/** A table under its heading, with a remark below. */
function titled(pen: Pen, title: string, remark: string, width: number, inner: Block): Block {
  const { doc, type } = pen;
  const lines = remark === '' ? [] : type.lines(remark, SMALL, width);
  const block = (part: Block, last: boolean): Block => ({
    height: 15 + part.height + (last && lines.length > 0 ? 4 + lines.length * 9.4 : 0),
    draw(parent, { x, y }) {
      const section = group(doc, parent, 'Sect');
      tagged(doc, section, 'H2', () => type.draw(title, { ...HEAD, size: 10 }, { x, baseline: y + 8 }));
      part.draw(section, { x, y: y + 15 });
      if (last && lines.length > 0) {
        tagged(doc, section, 'P', () =>
          type.paragraph(lines, SMALL, { x, top: y + 15 + part.height + 4, leading: 9.4 }),
        );
      }
      section.end();
    },
  });
  return {
    ...block(inner, true),
    parts: () => (inner.parts?.() ?? [inner]).map((part, i, all) => block(part, i === all.length - 1)),
  };
}

/** A box to tick for every copy. */
function ticksFor({ doc, type }: Pen, { piece }: CutRow): Cell {
  const boxes = Math.min(piece.count, MOST_TICKS);
  return {
    says: `${piece.count} to tick`,
    draw({ x, y, width }) {
      const inARow = Math.max(1, Math.floor((width + 3) / (TICK + 3)));
      const shown = Math.min(boxes, inARow);
      for (let k = 0; k < shown; k += 1) doc.rect(x + k * (TICK + 3), y + 1, TICK, TICK);
      doc.lineWidth(THIN).lineJoin('miter').undash().stroke(INK);
      if (piece.count > shown) type.draw(`/ ${piece.count}`, SMALL, { x: x + width, baseline: y + 8, anchor: 'end' });
    },
  };
}

/** Where it comes from, for which size, and the page's number. */
function feet({ doc, type }: Pen, { width, height }: Paper, content: SheetContent): void {
  const { count } = doc.bufferedPageRange();
  const baseline = height - 10.5 * MM;
  for (let page = 0; page < count; page += 1) {
    doc.switchToPage(page);
    decoration(doc, () => {
      rule({ doc, type }, MARGIN, baseline - 9, width - 2 * MARGIN, THIN, INK);
      type.draw(content.title.length > 48 ? `${content.title.slice(0, 47)}…` : content.title, SMALL, {
        x: MARGIN,
        baseline,
      });
      type.draw(content.sizeWords, SMALL, { x: width / 2, baseline, anchor: 'middle' });
      const number = `${page + 1} of ${count}`;
      type.draw(number, { ...SMALL, weight: 800, colour: INK }, { x: width - MARGIN, baseline, anchor: 'end' });
    });
  }
}
