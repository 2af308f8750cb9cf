import { decoration, group, tagged, type Tag } from './document.server';
import type { Pen } from './drawing.server';
import type { Block } from './flow.server';
import { BODY, HAIR, INK, LEADING, RULE, SMALL, SMALL_LEADING, THICK } from './look';
import type { Line, Type, Words } from './typeset.server';

export interface Column {
  readonly head: string;
  /** Points, or a share of what the others leave. */
  readonly width: number | { readonly share: number };
  readonly type?: Type;
  readonly align?: 'start' | 'end';
  /** The cell that names the row. */
  readonly names?: boolean;
}
/** A cell: words, or something drawn in its place with the words that say it. */
export type Cell =
  | Words
  | string
  | { readonly says: string; draw(place: { x: number; y: number; width: number }): void };

const PAD = 3.2;
const GAP = 6;

/** A table as one block; taller than a page it parts between rows, each part with the heads. */
export function table(pen: Pen, columns: readonly Column[], rows: readonly (readonly Cell[])[], width: number): Block {
  const wide = widthsOf(columns, width);
  const heads = columns.map(({ head }, i) => pen.type.lines(head, SMALL, wide[i] as number));
  const headHeight = Math.max(...heads.map((lines) => lines.length)) * SMALL_LEADING + PAD;
  const made = rows.map((cells) => rowOf(pen, columns, cells, wide));
  const height = headHeight + made.reduce((sum, row) => sum + row.height, 0);
  return {
    height,
    draw: (parent, place) => {
      const { doc, type } = pen;
      const element = group(doc, parent, 'Table');
      const head = group(doc, group(doc, element, 'THead'), 'TR');
      let { x } = place;
      columns.forEach(({ align }, i) => {
        const lines = heads[i] as readonly Line[];
        const left = x;
        tagged(
          doc,
          head,
          'TH',
          () => {
            lines.forEach((line, k) => {
              const baseline = place.y + headHeight - PAD - 2.2 - (lines.length - 1 - k) * SMALL_LEADING;
              type.draw(line, SMALL, anchored(left, wide[i] as number, baseline, align));
            });
          },
          { scope: 'Column' },
        );
        x += (wide[i] as number) + GAP;
      });
      decoration(doc, () => rule(pen, place.x, place.y + headHeight, width, THICK, INK));
      const body = group(doc, element, 'TBody');
      let y = place.y + headHeight;
      for (const row of made) {
        row.draw(body, { x: place.x, y });
        y += row.height;
        const at = y;
        decoration(doc, () => rule(pen, place.x, at, width, HAIR, RULE));
      }
      element.end();
    },
    parts: () => partsOf(pen, columns, rows, width, made),
  };
}

/** Rows that a page surely holds. */
const TALL = 560;
function partsOf(
  pen: Pen,
  columns: readonly Column[],
  rows: readonly (readonly Cell[])[],
  width: number,
  made: readonly Block[],
): readonly Block[] {
  const parts: (readonly Cell[])[][] = [[]];
  let used = 0;
  rows.forEach((row, i) => {
    const { height } = made[i] as Block;
    if (used + height > TALL && used > 0) {
      parts.push([]);
      used = 0;
    }
    (parts.at(-1) as (readonly Cell[])[]).push(row);
    used += height;
  });
  return parts.map((part) => table(pen, columns, part, width));
}

function rowOf(pen: Pen, columns: readonly Column[], cells: readonly Cell[], wide: readonly number[]): Block {
  const { doc, type } = pen;
  const lines = columns.map(({ type: look = BODY }, i) => {
    const cell = cells[i] ?? '';
    return isDrawn(cell) ? [] : type.lines(cell, look, wide[i] as number);
  });
  const height = Math.max(1, ...lines.map((one) => one.length)) * LEADING + 2 * PAD - 1;
  return {
    height,
    draw: (parent: Tag, { x, y }) => {
      const row = group(doc, parent, 'TR');
      let left = x;
      columns.forEach(({ type: look = BODY, align, names }, i) => {
        const [cell, at, width] = [cells[i] ?? '', left, wide[i] as number];
        const fill = () => {
          if (isDrawn(cell)) return cell.draw({ x: at, y: y + PAD, width });
          (lines[i] as readonly Line[]).forEach((line, k) => {
            const baseline = y + PAD - 0.5 + LEADING * k + LEADING * 0.77;
            type.draw(line, look, anchored(at, width, baseline, align));
          });
        };
        tagged(doc, row, names ? 'TH' : 'TD', fill, names ? { scope: 'Row' } : isDrawn(cell) ? { alt: cell.says } : {});
        left += width + GAP;
      });
      row.end();
    },
  };
}

const isDrawn = (cell: Cell): cell is Exclude<Cell, Words | string> => typeof cell === 'object' && 'says' in cell;

const anchored = (x: number, width: number, baseline: number, align: Column['align'] = 'start') => ({
  x: align === 'end' ? x + width : x,
  baseline,
  anchor: align,
});

function widthsOf(columns: readonly Column[], width: number): readonly number[] {
  const fixed = columns.reduce((sum, one) => sum + (typeof one.width === 'number' ? one.width : 0), 0);
  const shares = columns.reduce((sum, one) => sum + (typeof one.width === 'number' ? 0 : one.width.share), 0);
  const free = width - fixed - GAP * (columns.length - 1);
  return columns.map((one) => (typeof one.width === 'number' ? one.width : (free * one.width.share) / shares));
}

export function rule({ doc }: Pen, x: number, y: number, width: number, thickness: number, colour: string): void {
  doc
    .moveTo(x, y)
    .lineTo(x + width, y)
    .lineWidth(thickness)
    .undash()
    .stroke(colour);
}
