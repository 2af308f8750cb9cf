import type { Doc } from './document.server';

/** The part of the library's pages that takes what is drawn on them. */
interface Content {
  write(chunk: string | Uint8Array): void;
  end(): void;
}

/** So many operators are kept as text before they become bytes. */
const AT_ONCE = 256;

/**
 * Takes what is drawn on a page some hundred operators at a time. The library makes an array of bytes of every single one, some ten
 * thousand for a sheet, and clearing them away took as long as laying out.
 */
export function writeInStretches(doc: Doc): void {
  doc.on('pageAdded', () => {
    const { content } = doc.page as unknown as { content: Content };
    const { write, end } = content;
    let open: string[] = [];
    const close = () => {
      if (open.length > 0) write.call(content, Buffer.from(`${open.join('\n')}\n`, 'latin1'));
      open = [];
    };
    content.write = (operator) => {
      if (open.push(operator as string) === AT_ONCE) close();
    };
    content.end = () => {
      close();
      end.call(content);
    };
  });
}

/** Gathers the file, which the library gives out in thousands of lines; what it gives back is called once the document has ended. */
export function gatherBytes(doc: Doc): () => Uint8Array {
  const stream = doc as unknown as { read(): Uint8Array; push(part: Uint8Array | null): boolean };
  // The first lines were written before anybody could listen.
  const parts = [stream.read()];
  stream.push = (part) => {
    if (part) parts.push(part);
    return true;
  };
  return () => Buffer.concat(parts);
}

interface Glyph {
  readonly xAdvance: number;
  readonly advanceWidth: number;
  readonly xOffset: number;
  readonly yOffset: number;
}
/** A font as the library has it in a document. */
interface FontInDocument {
  readonly id: string;
  /** Numbers of glyphs in hexadecimal, and where they stand, in thousandths of the size. */
  encode(text: string): [readonly string[], readonly Glyph[]];
  ref(): object;
}

/**
 * Text of one font on one line, its letters standing on `baseline`. The library lays every text out three times, and saves, turns
 * over and restores the state of the page for it; this writes the same letters as one operator.
 */
export function writeText(
  doc: Doc,
  text: string,
  look: { readonly font: string; readonly size: number; readonly colour: string },
  { x, baseline }: { readonly x: number; readonly baseline: number },
): void {
  const { _fontFamilies, page } = doc as unknown as {
    _fontFamilies: Record<string, FontInDocument>;
    page: { fonts: Record<string, object> };
  };
  const font = _fontFamilies[look.font] as FontInDocument;
  const [codes, glyphs] = font.encode(text);
  if (glyphs.some(({ xOffset, yOffset }) => xOffset !== 0 || yOffset !== 0)) {
    // Marks over letters have places of their own.
    doc.font(look.font).fontSize(look.size).fillColor(look.colour);
    doc.text(text, x, baseline, { lineBreak: false, baseline: 'alphabetic' });
    return;
  }
  page.fonts[font.id] ??= font.ref();
  let shown = '';
  glyphs.forEach(({ xAdvance, advanceWidth }, i) => {
    const closer = advanceWidth - xAdvance;
    shown += codes[i] as string;
    if (closer !== 0 && i < glyphs.length - 1) shown += `> ${thousandths(closer)} <`;
  });
  // Pages run down from the top; the −1 sets letters upright again.
  doc.addContent(
    `BT /${font.id} ${thousandths(look.size)} Tf ${fillOf(look.colour)} 1 0 0 -1 ${thousandths(x)} ${thousandths(baseline)} Tm [<${shown}>] TJ ET`,
  );
}

const thousandths = (value: number): number => Math.round(value * 1000) / 1000;

const fillOf = (colour: string): string =>
  `${[1, 3, 5].map((at) => thousandths(parseInt(colour.slice(at, at + 2), 16) / 255)).join(' ')} rg`;
