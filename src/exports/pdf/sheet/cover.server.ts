import { drawFolded } from '@/engine';
import { decoration, group, tagged, type Tag } from '../document.server';
import { placeDrawing, UNIT, type Pen } from '../drawing.server';
import type { Block } from '../flow.server';
import { INK, SMALL, SMALL_LEADING, SOFT, STRONG, LEADING, THICK, THIN, TITLE } from '../look';
import { drawQr } from '../qr.server';
import { rule } from '../table.server';
import type { Line } from '../typeset.server';
import type { Fact, SheetContent } from './content';

const PAD = 9;
const INSET = 7.2;
const PICTURE = 104;
const CODE = 92;
const FACTS_IN_A_ROW = 3;
const TITLE_LEADING = 22;
const LEAST_HEIGHT = 128;

interface FactLines {
  readonly fact: Fact;
  readonly value: readonly Line[];
  readonly more: readonly Line[];
  readonly height: number;
}

/** The box at the head of a measurement sheet: what is made, at which size, and where that size is to be found again. */
export function cover(pen: Pen, content: SheetContent, width: number): Block {
  const { type } = pen;
  const { address } = content;
  const code = address === null ? 0 : CODE;
  const words = width - PICTURE - code;
  const title = type.lines(content.title, TITLE, words - 2 * INSET);
  const rows = Array.from({ length: Math.ceil(content.facts.length / FACTS_IN_A_ROW) }, (_, row) => {
    const facts = content.facts.slice(row * FACTS_IN_A_ROW, (row + 1) * FACTS_IN_A_ROW);
    return facts.map((fact) => factLines(pen, fact, words / facts.length));
  });
  const tall = rows.map((row) => Math.max(...row.map((fact) => fact.height)));
  const factsHeight = tall.reduce((sum, one) => sum + one, 0);
  const headHeight = PAD + title.length * TITLE_LEADING + content.byline.length * SMALL_LEADING + PAD;
  const height = Math.max(LEAST_HEIGHT, headHeight + factsHeight);
  // What the words leave over goes above the facts.
  const factsTop = height - factsHeight;
  const link = address === null ? [] : type.lines(address.replace(/^https?:\/\//, ''), SMALL, width);

  return {
    height: height + (link.length > 0 ? 5 + link.length * SMALL_LEADING : 0),
    draw(parent, { x, y }) {
      const { doc } = pen;
      frame(pen, { x, y, words, code, width, height, factsTop, rows, tall });
      const head = group(doc, parent, 'Sect');
      tagged(doc, head, 'H1', () =>
        title.forEach((line, k) =>
          type.draw(line, TITLE, { x: x + INSET, baseline: y + PAD + 16 + k * TITLE_LEADING }),
        ),
      );
      content.byline.forEach((line, k) => {
        const baseline = y + PAD + title.length * TITLE_LEADING + 5 + k * SMALL_LEADING;
        tagged(doc, head, 'P', () => type.draw(line, SMALL, { x: x + INSET, baseline }));
      });
      let top = y + factsTop;
      rows.forEach((row, r) => {
        row.forEach((fact, k) => drawFact(pen, head, fact, { x: x + (k * words) / row.length + INSET, y: top }));
        top += tall[r] as number;
      });
      const scale = UNIT;
      const folded = drawFolded(content.model, content.box, {
        width: (PICTURE - 12) / scale,
        height: (height - 12) / scale,
      });
      placeDrawing(pen, head, folded, { x: x + words + 6, y: y + 6, scale });
      if (address !== null) {
        const at = { x: x + words + PICTURE, y, height, full: address };
        drawAddress(pen, head, at, { x, lines: link, top: y + height + 5 });
      }
      head.end();
    },
  };
}

function factLines({ type }: Pen, fact: Fact, cell: number): FactLines {
  const value = fact.value === '' ? [] : type.lines(fact.value, STRONG, cell - 2 * INSET);
  const more = fact.more === '' ? [] : type.lines(fact.more, SMALL, cell - 2 * INSET);
  return { fact, value, more, height: 13 + value.length * LEADING + more.length * SMALL_LEADING + 6 };
}

function drawFact(
  { doc, type }: Pen,
  parent: Tag,
  { fact, value, more }: FactLines,
  at: { x: number; y: number },
): void {
  tagged(doc, parent, 'P', () => {
    type.draw(`${fact.term} `, SMALL, { x: at.x, baseline: at.y + 10 });
    const next = type.paragraph(value, STRONG, { x: at.x, top: at.y + 13, leading: LEADING });
    type.paragraph(more, { ...SMALL, colour: SOFT }, { x: at.x, top: next, leading: SMALL_LEADING });
  });
}

/** The code, and below the box the address it holds, which can be typed and followed. */
function drawAddress(
  { doc, type }: Pen,
  parent: Tag,
  code: { x: number; y: number; height: number; full: string },
  words: { x: number; lines: readonly Line[]; top: number },
): void {
  const side = CODE - 8;
  const top = code.y + (code.height - side - 10) / 2;
  tagged(doc, parent, 'Figure', () => drawQr(doc, code.full, { x: code.x + 4, y: top, side }), {
    alt: 'QR code: this size on the screen.',
    bbox: [code.x + 4, top, code.x + 4 + side, top + side],
  });
  const caption = { x: code.x + CODE / 2, baseline: top + side + 7, anchor: 'middle' } as const;
  tagged(doc, parent, 'Caption', () => type.draw('this size, on screen', SMALL, caption));
  const element = group(doc, parent, 'Link');
  const height = words.lines.length * SMALL_LEADING;
  element.add(() => {
    type.paragraph(words.lines, SMALL, { x: words.x, top: words.top, leading: SMALL_LEADING });
    const wide = Math.max(...words.lines.map((line) => line.width));
    doc.link(words.x, words.top, wide, height, code.full, {
      structParent: element,
      // Plain strings are names to the library.
      Contents: new String('This size, on screen') as string,
    } as PDFKit.Mixins.AnnotationOption);
  });
  element.end();
}

function frame(
  pen: Pen,
  box: {
    readonly x: number;
    readonly y: number;
    readonly words: number;
    readonly code: number;
    readonly width: number;
    readonly height: number;
    readonly factsTop: number;
    readonly rows: readonly (readonly FactLines[])[];
    readonly tall: readonly number[];
  },
): void {
  const { doc } = pen;
  const { x, y, words, code, width, height } = box;
  const upright = (at: number, from: number, to: number) =>
    doc.moveTo(at, from).lineTo(at, to).lineWidth(THIN).undash().stroke(INK);
  decoration(doc, () => {
    doc.rect(x, y, width, height).lineWidth(THICK).lineJoin('miter').undash().stroke(INK);
    upright(x + words, y, y + height);
    if (code > 0) upright(x + words + PICTURE, y, y + height);
    let top = y + box.factsTop;
    box.rows.forEach((row, r) => {
      rule(pen, x, top, words, THIN, INK);
      const tall = box.tall[r] as number;
      for (let k = 1; k < row.length; k += 1) upright(x + (k * words) / row.length, top, top + tall);
      top += tall;
    });
  });
}
