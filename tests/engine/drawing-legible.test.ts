import { describe, expect, it } from 'vitest';
import { drawPiece, evaluate, type Drawing, type PieceFigure, type Point } from '@/engine';
import { sheetScale } from '@/exports/sheet-scale';
import { crosses, linesOf, overlap, strokesOf, textsOf, widthOf, type Box } from './drawn';
import { SLUGS, atEnd, modelOf, sizingsOf } from './patterns';
import { expectClose } from '../setup/expect-close';

/** What keeps a person from reading a drawing. */
function troubles(drawing: Drawing, piece: PieceFigure): string[] {
  const texts = textsOf(drawing);
  const lines = linesOf(drawing);
  const found: string[] = [];
  const frame: Box = { left: 0, right: drawing.width, top: 0, bottom: drawing.height };
  texts.forEach((one, index) => {
    const { text } = one.shape;
    for (const other of texts.slice(index + 1)) if (overlap(one, other)) found.push(`${text} over ${other.shape.text}`);
    for (const line of lines)
      if (crosses(line, one)) {
        found.push(`${text} on a line: ${line.role}`);
        break;
      }
    if (one.left < frame.left || one.right > frame.right || one.top < frame.top || one.bottom > frame.bottom)
      found.push(`${text} outside the picture`);
  });
  return [...found, ...strays(drawing, piece)];
}
/** Names that do not stand on their own panel, with what goes on from it without a line. */
function strays(drawing: Drawing, piece: PieceFigure): string[] {
  return textsOf(drawing).flatMap((one) => {
    const { of, text } = one.shape;
    if (of === undefined) return [];
    const names = new Set([of]);
    for (const { panels } of piece.net.joins)
      if (panels.some((name) => names.has(name))) panels.forEach((name) => names.add(name));
    const loops = drawing.shapes.flatMap((shape) =>
      shape.type === 'path' && names.has(shape.of ?? '') ? [strokesOf(shape.d)] : [],
    );
    const corners = [one.left + 0.5, one.right - 0.5].flatMap((x) =>
      [one.top + 0.5, one.bottom - 0.5].map((y) => ({ x, y })),
    );
    const stands = corners.every((corner) => loops.some((loop) => isWithin(loop, corner)));
    return stands ? [] : [`${text} beside its panel ${of}`];
  });
}
/** Even–odd rule. */
const isWithin = (loop: readonly (readonly [Point, Point])[], { x, y }: Point): boolean =>
  loop.filter(([a, b]) => a.y > y !== b.y > y && x < ((b.x - a.x) * (y - a.y)) / (b.y - a.y) + a.x).length % 2 === 1;

/** On a phone, on the desk's wide page, and on paper at the sheet's own scale. */
function drawings(piece: PieceFigure, pieces: readonly PieceFigure[], sizing: Parameters<typeof evaluate>[1]) {
  const scale = sheetScale(pieces, { perMm: 96 / 25.4, widest: 300, tallest: 280 }).units;
  return {
    phone: drawPiece(piece, { ...sizing, width: 300 }),
    desk: drawPiece(piece, { ...sizing, width: 640 }),
    paper: drawPiece(piece, { ...sizing, width: piece.across * scale + 96, tallest: 1e4, scale }),
  };
}

describe('a dimensioned drawing', () => {
  it.each(SLUGS)('of %s has no text over text or line, at 20 sizings and three widths', (slug) => {
    const found: string[] = [];
    const model = modelOf(slug);
    const some = [...sizingsOf(model, 18, 77)];
    const ends = (['from', 'to'] as const).map((end) =>
      atEnd(model, some[end === 'from' ? 0 : 4] as (typeof some)[0], end),
    );
    for (const [index, sizing] of [...ends, ...some].entries()) {
      const { pieces } = evaluate(model, sizing);
      for (const piece of pieces)
        for (const [place, drawing] of Object.entries(drawings(piece, pieces, sizing)))
          found.push(...troubles(drawing, piece).map((trouble) => `${index} ${piece.name}, ${place}: ${trouble}`));
    }
    expect(found).toEqual([]);
  });
});

describe('the check itself', () => {
  const text = (x: number, y: number, words: string) =>
    ({ type: 'text', role: 'label', x, y, text: words, anchor: 'middle' }) as const;
  const line = (d: string) => ({ type: 'path', role: 'cut', d }) as const;
  const piece = { net: { joins: [] } } as unknown as PieceFigure;
  const seen = (...shapes: Drawing['shapes']) =>
    troubles({ width: 100, height: 40, title: '', alt: '', shapes }, piece);
  it('sees text over text, over straight lines and arcs, and outside the picture', () => {
    expect(seen(text(50, 20, 'wall'), text(60, 24, 'lid'))).toEqual(['wall over lid']);
    expect(seen(text(50, 20, 'wall'), line('M0 16L100 16'))).toEqual(['wall on a line: cut']);
    expect(seen(text(50, 20, 'wall'), line('M0 20L100 40'))).toEqual([]);
    // A half circle over a chord of 40 goes 20 up from it, through the middle of the word.
    expect(seen(text(50, 20, 'wall'), line('M30 36A20 20 0 0 1 70 36'))).toEqual(['wall on a line: cut']);
    expect(seen(text(95, 20, 'wall'))).toEqual(['wall outside the picture']);
  });
  it('measures by the font: 6 13/16 has a full figure, half a space and a fraction', () => {
    // Advances at weight 600 out of 1000, from the font file: tabular figure 629, space 241; 3⁄4 as a fraction 907.
    expectClose(widthOf('6'), 0.629 * 13, 0.01);
    expectClose(widthOf('3\u20444'), 0.907 * 13, 0.01);
    expectClose(widthOf('6\u202f3\u20444'), (0.629 + 0.241 / 2 + 0.907) * 13, 0.02);
  });
});
