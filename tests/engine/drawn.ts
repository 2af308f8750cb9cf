import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import PDFDocument from 'pdfkit';
import type { Drawing, Point, Role, Shape } from '@/engine';
import { woffToTtf } from '@/exports/woff-to-ttf.server';

/** Drawings as a reader sees them: the straight strokes of every path, and the rectangles that letters cover. */

export interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}
export interface Text extends Box {
  readonly shape: Extract<Shape, { type: 'text' }>;
}
export interface Stroke {
  readonly role: Role;
  readonly from: Point;
  readonly to: Point;
}

/** Of the style sheet's figures and labels. */
const SIZE = 13;
/** Figtree's capitals, figures and ascenders stand within this share of the size over the line; descenders hang so far below it. */
const ABOVE = 0.72;
const BELOW = 0.2;
const DESCENDS = /[gjpqyQ,;()]/;

let doc: PDFKit.PDFDocument | undefined;
const widths = new Map<string, number>();
/** As wide as the font's own advances make it in the heavier of the two weights, figures all of one width, as on a page. */
export function widthOf(text: string): number {
  let width = widths.get(text);
  if (width === undefined) {
    const file = createRequire(import.meta.url).resolve('@fontsource/figtree/files/figtree-latin-600-normal.woff');
    doc ??= new PDFDocument({ font: null as unknown as string })
      .font(woffToTtf(readFileSync(file)) as unknown as string)
      .fontSize(SIZE);
    const measured = doc;
    const spaces = text.split('\u202f');
    // The font has no narrow space; browsers make it half as wide as a space.
    width = spaces.reduce((sum, part) => sum + measured.widthOfString(part, { features: ['tnum'] }), 0);
    width += ((spaces.length - 1) * measured.widthOfString(' ')) / 2;
    widths.set(text, width);
  }
  return width;
}

export function textsOf(drawing: Drawing): readonly Text[] {
  return drawing.shapes.flatMap((shape) => {
    if (shape.type !== 'text') return [];
    const { x, y, anchor, turned, text } = shape;
    const width = widthOf(text);
    const start = anchor === 'middle' ? -width / 2 : anchor === 'end' ? -width : 0;
    const [above, below] = [ABOVE * SIZE, DESCENDS.test(text) ? BELOW * SIZE : 0];
    return [
      turned
        ? // Turned a quarter to the left: what was right is up, what was up is left.
          { shape, left: x - above, right: x + below, top: y - start - width, bottom: y - start }
        : { shape, left: x + start, right: x + start + width, top: y - above, bottom: y + below },
    ];
  });
}

/** The strokes of a path in straight pieces, arcs by chords. Throws for a command that our drawings do not use. */
export function strokesOf(d: string): readonly (readonly [Point, Point])[] {
  const strokes: [Point, Point][] = [];
  let [at, start]: Point[] = [
    { x: 0, y: 0 },
    { x: 0, y: 0 },
  ] as [Point, Point];
  for (const [, command = '', rest = ''] of d.matchAll(/([A-Za-z])([^A-Za-z]*)/g)) {
    const numbers = (rest.match(/-?\d*\.?\d+/g) ?? []).map(Number);
    const relative = command === command.toLowerCase();
    const size = { M: 2, L: 2, H: 1, V: 1, A: 7, Z: 0 }[command.toUpperCase()];
    if (size === undefined) throw new Error(`no command ${command} is known`);
    for (let index = 0; index < Math.max(1, numbers.length); index += Math.max(1, size)) {
      const values = numbers.slice(index, index + size);
      const from = at as Point;
      const [dx, dy] = relative ? [from.x, from.y] : [0, 0];
      const [x = 0, y = 0] = values.slice(-2);
      let to: Point = { x: x + dx, y: y + dy };
      if (command === 'H' || command === 'h') to = { x: x + dx, y: from.y };
      if (command === 'V' || command === 'v') to = { x: from.x, y: x + dy };
      if (command === 'Z' || command === 'z') to = start as Point;
      if (command.toUpperCase() === 'A') {
        for (const point of arc(from, to, values)) {
          strokes.push([at as Point, point]);
          at = point;
        }
      } else if (command.toUpperCase() !== 'M' || index > 0) strokes.push([from, to]);
      else start = to;
      at = to;
    }
  }
  return strokes;
}
/** Points along a circular arc, by the endpoint form of SVG 1.1, F.6.5. */
function arc(from: Point, to: Point, [r = 1, , , large, sweep]: readonly number[]): readonly Point[] {
  const [dx, dy] = [(from.x - to.x) / 2, (from.y - to.y) / 2];
  const half = Math.min(r, Math.hypot(dx, dy));
  const off = Math.sqrt(Math.max(0, r * r - half * half)) / Math.max(half, 1e-9);
  const side = large === sweep ? -1 : 1;
  const centre = { x: (from.x + to.x) / 2 + side * off * dy, y: (from.y + to.y) / 2 - side * off * dx };
  const begin = Math.atan2(from.y - centre.y, from.x - centre.x);
  let turn = Math.atan2(to.y - centre.y, to.x - centre.x) - begin;
  if (sweep === 1 && turn <= 0) turn += 2 * Math.PI;
  if (sweep === 0 && turn >= 0) turn -= 2 * Math.PI;
  const count = Math.max(1, Math.ceil(Math.abs(turn) * Math.sqrt(r)));
  return Array.from({ length: count }, (_, index) => {
    const angle = begin + (turn * (index + 1)) / count;
    return { x: centre.x + r * Math.cos(angle), y: centre.y + r * Math.sin(angle) };
  });
}

const LINES: readonly Role[] = [
  'cut',
  'valley',
  'mountain',
  'slit',
  'away',
  'hidden',
  'dimension',
  'extension',
  'ruler',
  'origin',
];
export const linesOf = (drawing: Drawing): readonly Stroke[] =>
  drawing.shapes.flatMap((shape) =>
    shape.type === 'path' && LINES.includes(shape.role)
      ? strokesOf(shape.d).map(([from, to]) => ({ role: shape.role, from, to }))
      : [],
  );

export const overlap = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
/** Whether a stroke goes through a rectangle (Liang and Barsky's clipping, 1984). */
export function crosses({ from, to }: Pick<Stroke, 'from' | 'to'>, { left, right, top, bottom }: Box): boolean {
  let [enter, leave] = [0, 1];
  for (const [p, q] of [
    [from.x - to.x, from.x - left],
    [to.x - from.x, right - from.x],
    [from.y - to.y, from.y - top],
    [to.y - from.y, bottom - from.y],
  ] as const) {
    if (p === 0) {
      if (q <= 0) return false;
    } else if (p < 0) enter = Math.max(enter, q / p);
    else leave = Math.min(leave, q / p);
  }
  return enter < leave;
}
