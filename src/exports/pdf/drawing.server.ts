import type { Drawing, Shape } from '@/engine';
import { paintOf, PRINT_THEME, type Paint } from '../line-styles';
import type { Doc, Tag } from './document.server';
import { tagged } from './document.server';
import type { Weight } from './fonts.server';
import type { Typesetter } from './typeset.server';

/** Points for a drawing unit: figures 13 units high come out at 7.8 points. */
export const UNIT = 0.6;
/** Lines on paper may be finer than on a screen. */
const LINE_WEIGHT = 0.8;
/** Between the lines of a glue area, in drawing units. */
const HATCH = 5;
/** The numbers of cuts cover the circles that they stand in. */
const DISC = 8.6;
/** The border that a sheet's drawing leaves round it. */
export const SHEET_BORDER = 24;

export interface Pen {
  readonly doc: Doc;
  readonly type: Typesetter;
}

/** A drawing at its place on the page, as a figure with its text alternative. `scale` is points for a drawing unit. */
export function placeDrawing(
  { doc, type }: Pen,
  parent: Tag,
  drawing: Drawing,
  place: { readonly x: number; readonly y: number; readonly scale?: number },
): void {
  const { x, y, scale = UNIT } = place;
  const box = [x, y, x + drawing.width * scale, y + drawing.height * scale] as const;
  tagged(doc, parent, 'Figure', () => draw({ doc, type }, drawing, { x, y, scale }), { alt: drawing.alt, bbox: box });
}

/** The same without a place in the structure. */
export function draw(pen: Pen, drawing: Drawing, { x, y, scale }: { x: number; y: number; scale: number }): void {
  const { doc } = pen;
  doc.save().translate(x, y).scale(scale);
  hatch(doc, drawing);
  for (const shape of drawing.shapes) {
    if (shape.type !== 'path' || shape.role === 'glue') continue;
    paint(doc, shape.d, paintOf(shape.role, PRINT_THEME, shape.tone));
  }
  doc.restore();
  for (const shape of drawing.shapes) {
    if (shape.type === 'text') letter(pen, shape, { x: x + shape.x * scale, y: y + shape.y * scale, scale });
  }
}

/** A path in the current scale, painted as the table of looks says. */
function paint(doc: Doc, path: string, { fill, stroke, strokeWidth = 1, strokeOpacity = 1, dash }: Paint): void {
  doc.path(path);
  if (stroke === undefined) {
    if (fill !== undefined) doc.fill(fill);
    return;
  }
  doc.lineWidth(strokeWidth * LINE_WEIGHT).lineJoin('round');
  if (dash) dashed(doc, dash);
  else doc.undash();
  const line = onPaper(stroke, strokeOpacity);
  if (fill === undefined) doc.stroke(line);
  else doc.fillAndStroke(fill, line);
}

/** The library's own `dash` takes one pair only in its types; all of a pattern's lengths go in as they are. */
function dashed(doc: Doc, lengths: readonly number[]): void {
  doc.dash(lengths as unknown as number, {});
}

/** Glue areas are hatched: a grey would print unevenly. */
function hatch(doc: Doc, drawing: Drawing): void {
  const areas = drawing.shapes.flatMap((shape) => (shape.type === 'path' && shape.role === 'glue' ? [shape.d] : []));
  if (areas.length === 0) return;
  doc.save().path(areas.join('')).clip();
  for (let at = -drawing.height; at < drawing.width; at += HATCH) {
    doc.moveTo(at, drawing.height).lineTo(at + drawing.height, 0);
  }
  doc.lineWidth(0.6).undash().stroke(onPaper(PRINT_THEME.ink, 0.5)).restore();
}

function letter(
  { doc, type }: Pen,
  shape: Extract<Shape, { type: 'text' }>,
  { x, y, scale }: { x: number; y: number; scale: number },
): void {
  const { text, fill } = paintOf(shape.role, PRINT_THEME);
  const look = {
    size: (text?.size ?? 13) * scale,
    weight: (shape.role === 'label' ? 400 : (text?.weight ?? 600)) as Weight,
    colour: fill ?? PRINT_THEME.ink,
  };
  if (shape.of === 'cut number') {
    disc({ doc, type }, shape.text, { x, y: y - 4.5 * scale, radius: DISC * scale });
    return;
  }
  const place = { x, baseline: y, anchor: shape.anchor };
  if (!shape.turned) {
    type.draw(shape.text, look, place);
    return;
  }
  doc.save().rotate(-90, { origin: [x, y] });
  type.draw(shape.text, look, place);
  doc.restore();
}

/** A number in a black disc. */
export function disc(
  { doc, type }: Pen,
  text: string,
  { x, y, radius }: { readonly x: number; readonly y: number; readonly radius: number },
): void {
  doc.circle(x, y, radius).fill(PRINT_THEME.ink);
  const size = radius * (text.length > 1 ? 1.15 : 1.35);
  type.draw(text, { size, weight: 800, colour: PRINT_THEME.paper }, { x, baseline: y + size * 0.35, anchor: 'middle' });
}

/** The colour that a share of ink gives on white: paper needs no transparency. */
function onPaper(colour: string, share: number): string {
  if (share === 1) return colour;
  const mixed = [1, 3, 5].map((at) => Math.round(255 - (255 - parseInt(colour.slice(at, at + 2), 16)) * share));
  return `#${mixed.map((channel) => channel.toString(16).padStart(2, '0')).join('')}`;
}
