import type { Unit } from '@/engine';
import { decoration, MM, type Doc } from './document.server';
import type { Pen } from './drawing.server';
import { HAIR, INK, SMALL } from './look';

const INCH = 72;
const CENTIMETRE = 10 * MM;

/** Ticks down from an edge, at true size: sixteenths of an inch, or millimetres. */
function ticks(doc: Doc, { x, y, length, inches }: { x: number; y: number; length: number; inches: boolean }): void {
  const step = inches ? INCH / 16 : MM;
  for (let k = 1; k * step < length - 0.01; k += 1) {
    const tall = inches
      ? k % 16 === 0
        ? 9
        : k % 8 === 0
          ? 6.5
          : k % 4 === 0
            ? 4.8
            : 3
      : k % 10 === 0
        ? 9
        : k % 5 === 0
          ? 6.2
          : 3.4;
    doc.moveTo(x + k * step, y).lineTo(x + k * step, y + tall);
  }
  doc.lineWidth(HAIR).undash().stroke(INK);
}

/** A working ruler along the top of a page. */
export function topRuler({ doc, type }: Pen, at: { x: number; y: number; length: number }, units: Unit): void {
  const inches = units === 'in';
  decoration(doc, () => {
    doc
      .moveTo(at.x, at.y)
      .lineTo(at.x, at.y + 9)
      .lineWidth(HAIR)
      .undash()
      .stroke(INK);
    ticks(doc, { ...at, inches });
    const step = inches ? INCH : CENTIMETRE;
    for (let k = 1; k * step < at.length - 6; k += 1) {
      type.draw(`${k}`, { ...SMALL, size: 6.4, colour: INK }, { x: at.x + k * step + 2, baseline: at.y + 9 });
    }
  });
}

export const CHECK_SIDES = { inches: 2 * INCH, millimetres: 50 * MM } as const;

/** A square of a known size, its edges in the middle of the line. Gives nothing; the words in it say what it should measure. */
export function checkSquare(
  { doc, type }: Pen,
  which: keyof typeof CHECK_SIDES,
  { x, y }: { x: number; y: number },
): void {
  const side = CHECK_SIDES[which];
  const inches = which === 'inches';
  doc.rect(x, y, side, side).lineWidth(THIN_LINE).undash().stroke(INK);
  ticks(doc, { x, y, length: side, inches });
  const middle = x + side / 2;
  type.draw(
    inches ? '2\u00a0in' : '50\u00a0mm',
    { size: 15, weight: 800, colour: INK },
    { x: middle, baseline: y + side / 2 + 3, anchor: 'middle' },
  );
  type.draw('measure each side', SMALL, { x: middle, baseline: y + side / 2 + 15, anchor: 'middle' });
}
const THIN_LINE = 0.6;
