import { fontName, type Doc } from './document.server';
import { readFont, SUBSETS, type Subset, type Weight } from './fonts.server';
import { writeText } from './writing.server';

/** Type of one run of text; sizes in points. */
export interface Type {
  readonly size: number;
  readonly weight: Weight;
  readonly colour: string;
}
/** Text with some of it in another weight. */
export type Words = readonly (string | { readonly text: string; readonly weight: Weight })[];

/** A stretch that one font can draw at one size, or letters that none can. */
interface Stretch {
  readonly text: string;
  readonly size: number;
  readonly weight: Weight;
  /** Null: no font at hand has these letters. */
  readonly subset: Subset | null;
  readonly width: number;
}
interface Word {
  readonly stretches: readonly Stretch[];
  readonly width: number;
  /** Only a part of a word, the rest of which goes on. */
  readonly broken?: boolean;
}
export interface Line {
  readonly stretches: readonly Stretch[];
  readonly width: number;
}

const ASCENT = 0.95;
/** Height of capitals and figures in Figtree. */
export const CAPS = 0.7;
/** Between a whole number and its fraction stands a space as wide as half of one. */
const NARROW = /[\u2009\u200a\u202f]/u;
const NARROW_SIZE = 0.5;
const MISSING_WIDTH = 0.6;
/** Words by size and weight, for all documents: a sheet has some five hundred, and most stand on every other sheet too. */
const known = new Map<string, Word>();
const MOST_WORDS = 10_000;

/**
 * Sets text: what the fonts at hand cannot draw becomes an empty box that still copies and reads aloud as it was written;
 * a whole number and its fraction stand close, with a real space between them.
 */
export class Typesetter {
  constructor(private readonly doc: Doc) {
    if (known.size > MOST_WORDS) known.clear();
  }

  /** How wide it is on one line, in points. */
  width(words: Words | string, type: Type): number {
    return this.#one(words, type).width;
  }

  /** Broken at spaces into lines of at most `width` points; a word that is longer is broken where it must. */
  lines(words: Words | string, type: Type, width: number): readonly Line[] {
    const space = this.#measure(' ', type.size, type.weight, 'latin').width;
    const lines: Word[][] = [[]];
    let used = 0;
    for (const word of this.#words(words, type).flatMap((one) => this.#fitting(one, width))) {
      const line = lines.at(-1) as Word[];
      const after = line.length === 0 ? word.width : used + space + word.width;
      if (line.length > 0 && after > width + 0.01) {
        lines.push([word]);
        used = word.width;
      } else {
        line.push(word);
        used = after;
      }
    }
    return lines.map((line, index) => this.#joined(line, type, index < lines.length - 1 && !line.at(-1)?.broken));
  }

  /** Draws a line with its letters standing on `baseline`, from `x` to the right or up to it (`end`) or round it (`middle`). */
  draw(
    line: Line | Words | string,
    type: Type,
    place: { readonly x: number; readonly baseline: number; readonly anchor?: 'start' | 'middle' | 'end' },
  ): void {
    const set = isLine(line) ? line : this.#one(line, type);
    const shift = place.anchor === 'middle' ? set.width / 2 : place.anchor === 'end' ? set.width : 0;
    let x = place.x - shift;
    for (const stretch of set.stretches) {
      if (stretch.subset === null) {
        this.#box(stretch, x, place.baseline, type.colour);
      } else {
        const look = { font: fontName(stretch.weight, stretch.subset), size: stretch.size, colour: type.colour };
        writeText(this.doc, stretch.text, look, { x, baseline: place.baseline });
      }
      x += stretch.width;
    }
  }

  /** Draws lines below one another from `top`; gives where the next would begin. */
  paragraph(lines: readonly Line[], type: Type, place: { x: number; top: number; leading: number }): number {
    lines.forEach((line, index) => {
      const baseline = place.top + index * place.leading + (place.leading - type.size) / 2 + ASCENT * type.size * 0.87;
      this.draw(line, type, { x: place.x, baseline });
    });
    return place.top + lines.length * place.leading;
  }

  #one(words: Words | string, type: Type): Line {
    return this.#joined(this.#words(words, type), type, false);
  }

  #words(words: Words | string, type: Type): readonly Word[] {
    // A change of weight in the middle of a word does not part it.
    const parts = typeof words === 'string' ? [words] : words;
    const open: Stretch[][] = [[]];
    for (const part of parts) {
      const [text, weight] = typeof part === 'string' ? [part, type.weight] : [part.text, part.weight];
      readable(text)
        .split(/[^\S\u00a0\u2009\u200a\u202f]+/u)
        .forEach((piece, index) => {
          if (index > 0) open.push([]);
          if (piece !== '') (open.at(-1) as Stretch[]).push(...this.#word(piece, type.size, weight).stretches);
        });
    }
    return open.filter((stretches) => stretches.length > 0).map(asWord);
  }

  #word(text: string, size: number, weight: Weight): Word {
    const key = `${size} ${weight} ${text}`;
    let word = known.get(key);
    if (!word) known.set(key, (word = this.#cut(text, size, weight)));
    return word;
  }

  #cut(text: string, size: number, weight: Weight): Word {
    const stretches: Stretch[] = [];
    let open = '';
    let subset: Subset | null = 'latin';
    const close = () => {
      if (open !== '') stretches.push(this.#measure(open, size, weight, subset));
      open = '';
    };
    for (const mark of text) {
      if (NARROW.test(mark)) {
        close();
        stretches.push(this.#measure('\u00a0', size * NARROW_SIZE, weight, 'latin'));
        continue;
      }
      const code = mark.codePointAt(0) as number;
      const own = SUBSETS.find((one) => readFont(weight, one).hasGlyphForCodePoint(code)) ?? null;
      if (own !== subset) close();
      subset = own;
      open += mark;
    }
    close();
    return asWord(stretches);
  }

  #measure(text: string, size: number, weight: Weight, subset: Subset | null): Stretch {
    if (subset === null) return { text, size, weight, subset, width: [...text].length * MISSING_WIDTH * size };
    const width = this.doc.font(fontName(weight, subset)).fontSize(size).widthOfString(text);
    return { text, size, weight, subset, width };
  }

  /** A word that is wider than the line, in parts that are not. */
  #fitting(word: Word, width: number): readonly Word[] {
    if (word.width <= width + 0.01) return [word];
    const parts: Stretch[][] = [[]];
    let used = 0;
    for (const { text, size, weight, subset } of word.stretches) {
      for (const mark of text) {
        const one = this.#measure(mark, size, weight, subset);
        if (used + one.width > width && used > 0) {
          parts.push([]);
          used = 0;
        }
        (parts.at(-1) as Stretch[]).push(one);
        used += one.width;
      }
    }
    return parts.map((stretches, index) => ({
      ...asWord(stretches.reduce<Stretch[]>((all, one) => this.#append(all, one), [])),
      broken: index < parts.length - 1,
    }));
  }

  /** Words with spaces between them, neighbours of one look in one stretch; `more` leaves a space before the next line. */
  #joined(words: readonly Word[], type: Type, more: boolean): Line {
    const space = this.#measure(' ', type.size, type.weight, 'latin');
    const all: Stretch[] = [];
    words.forEach((word, index) => {
      if (index > 0) this.#append(all, space);
      word.stretches.forEach((stretch) => this.#append(all, stretch));
    });
    const width = all.reduce((sum, one) => sum + one.width, 0);
    if (more) this.#append(all, space);
    return { stretches: all, width };
  }

  #append(all: Stretch[], next: Stretch): Stretch[] {
    const last = all.at(-1);
    const alike =
      last &&
      last.size === next.size &&
      last.subset === next.subset &&
      (last.weight === next.weight || next.text === ' ');
    if (alike) all[all.length - 1] = { ...last, text: last.text + next.text, width: last.width + next.width };
    else all.push(next);
    return all;
  }

  /** Letters that no font at hand has. */
  #box({ text, size, width }: Stretch, x: number, baseline: number, colour: string): void {
    this.doc.markContent('Span', { actual: text });
    const each = width / [...text].length;
    [...text].forEach((_, index) => {
      this.doc.rect(x + index * each + 0.08 * size, baseline - CAPS * size, each - 0.16 * size, CAPS * size);
    });
    this.doc
      .lineWidth(0.05 * size)
      .undash()
      .stroke(colour);
    this.doc.endMarkedContent();
  }
}

const isLine = (line: Line | Words | string): line is Line => typeof line === 'object' && 'stretches' in line;
const asWord = (stretches: readonly Stretch[]): Word => ({
  stretches,
  width: stretches.reduce((sum, one) => sum + one.width, 0),
});

/** What nearly all of a sheet is written in. */
const PLAIN = /^[ -~\u00a0\u00b7\u00d7\u202f\u2044]*$/u;

/** Fractions as numerator, slash and denominator, marks of feet and inches as the fonts have them, nothing that only steers. */
function readable(text: string): string {
  if (PLAIN.test(text)) return text;
  return (
    text
      .normalize('NFC')
      .replace(/(\d?)([¼-¾⅐-⅞])/gu, (_, whole: string, fraction: string) =>
        whole === '' ? fraction.normalize('NFKD') : `${whole}\u202f${fraction.normalize('NFKD')}`,
      )
      .replaceAll('″', '"')
      .replaceAll('′', "'")
      // Controls, marks of direction, joiners, and halves of pairs.
      .replace(/[\p{Cc}\p{Cf}\p{Cs}]/gu, (mark) => (/\s/u.test(mark) ? ' ' : ''))
  );
}
