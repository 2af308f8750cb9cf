import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import PDFDocument from 'pdfkit';
import { config } from '@/config.server';
import { woffToTtf } from '../woff-to-ttf.server';

export type Weight = 400 | 600 | 800;
/** Figtree comes as two files: what most texts need, and further letters of European languages. */
export type Subset = 'latin' | 'latin-ext';
export const WEIGHTS: readonly Weight[] = [400, 600, 800];
export const SUBSETS: readonly Subset[] = ['latin', 'latin-ext'];

/** A font as the PDF library has read it; what each document embeds of it is the document's own. */
export interface ReadFont {
  hasGlyphForCodePoint(mark: number): boolean;
  readonly unitsPerEm: number;
  layout(text: string): { readonly advanceWidth: number };
}

const { resolve } = createRequire(join(config.root, 'package.json'));
const fonts = new Map<string, ReadFont>();

/** Read once for all documents: reading six fonts takes longer than laying out a page. */
export function readFont(weight: Weight, subset: Subset): ReadFont {
  const name = `figtree-${subset}-${weight}-normal.woff`;
  let font = fonts.get(name);
  if (!font) fonts.set(name, (font = parse(woffToTtf(readFileSync(resolve(`@fontsource/figtree/files/${name}`))))));
  return font;
}

/** How wide a text is on one line, in the unit of its size. */
export function textWidth(text: string, { size, weight }: { readonly size: number; readonly weight: Weight }): number {
  const font = readFont(weight, 'latin');
  return (font.layout(text).advanceWidth / font.unitsPerEm) * size;
}

/** Words that are kept with the places of their letters, of each font; a sheet has some five hundred in all. */
const MOST_WORDS = 5000;
const layouts = new Map<string, Record<string, unknown>>();

/** How words of a font are laid out, for all documents: most words of a sheet stand on every other sheet too. */
export function layoutsOf(weight: Weight, subset: Subset): Record<string, unknown> {
  const name = `${subset}-${weight}`;
  let known = layouts.get(name);
  if (!known || Object.keys(known).length > MOST_WORDS)
    layouts.set(name, (known = Object.create(null) as Record<string, unknown>));
  return known;
}

/** The library takes a font that is read already, and has no other way to read one than to begin a document. */
function parse(file: Buffer): ReadFont {
  const doc = new PDFDocument({ autoFirstPage: false, font: null as unknown as string }).font(file);
  return (doc as unknown as { _font: { font: ReadFont } })._font.font;
}
