import PDFDocument from 'pdfkit';
import { STOCKS } from '@/engine';
import { esc } from '../escape';
import type { PaperId } from '../paper';
import { layoutsOf, readFont, SUBSETS, WEIGHTS, type Subset, type Weight } from './fonts.server';
import { gatherBytes, writeInStretches } from './writing.server';

/** Points in a millimetre. */
export const MM = 72 / 25.4;
const MAKER = 'Foldwright';

export type Doc = PDFKit.PDFDocument;
export type Tag = PDFKit.PDFStructureElement;

export interface DocumentOptions {
  readonly paper: PaperId;
  readonly title: string;
  /** Empty when nobody is named. */
  readonly author: string;
  readonly subject: string;
  /** The day that the file says it was made, so that equal input gives equal bytes. */
  readonly date: Date;
}

export interface Paper {
  readonly doc: Doc;
  /** The structure that everything drawn is part of. */
  readonly root: Tag;
  /** Width and height of a page, in points. */
  readonly width: number;
  readonly height: number;
  /** The file, once the document has ended. */
  bytes(): Uint8Array;
}

export const fontName = (weight: Weight, subset: Subset): string => `${subset}-${weight}`;

/** An empty tagged PDF with Figtree at hand and no page yet. It asks to be printed at its own size; not all viewers listen. */
export function openDocument({ paper, title, author, subject, date }: DocumentOptions): Paper {
  const { across, along } = STOCKS[paper];
  const [width, height] = [across * MM, along * MM];
  const doc = new PDFDocument({
    size: [width, height],
    margin: 0,
    // Nothing is set in the library's own fonts, and a file for reading aloud must not name them.
    font: null as unknown as string,
    autoFirstPage: false,
    bufferPages: true,
    tagged: true,
    pdfVersion: '1.7',
    // Newer than the library's types.
    subset: 'PDF/UA' as 'PDF/A-1',
    lang: 'en-GB',
    displayTitle: true,
    info: {
      Title: title,
      ...(author === '' ? {} : { Author: author }),
      Subject: subject,
      Creator: MAKER,
      Producer: MAKER,
      CreationDate: date,
    },
  });
  const bytes = gatherBytes(doc);
  askForTrueSize(doc);
  writeInStretches(doc);
  escapeMetadata(doc, { title, author, subject, date });
  for (const weight of WEIGHTS) {
    for (const subset of SUBSETS) {
      doc.registerFont(fontName(weight, subset), readFont(weight, subset) as unknown as PDFKit.Mixins.PDFFontSource);
      doc.font(fontName(weight, subset));
      rememberLayouts(doc, weight, subset);
    }
  }
  const root = doc.struct('Document');
  doc.addStructure(root);
  return { doc, root, width, height, bytes };
}

/** The library has no public way to say it. */
function askForTrueSize(doc: Doc): void {
  const catalogue = (doc as unknown as { _root: { data: { ViewerPreferences: { data: object } } } })._root;
  Object.assign(catalogue.data.ViewerPreferences.data, { PrintScaling: 'None', PickTrayByPDFSize: true });
}

/** The library forgets how words are laid out at the end of each document. */
function rememberLayouts(doc: Doc, weight: Weight, subset: Subset): void {
  Object.assign((doc as unknown as { _font: object })._font, { layoutCache: layoutsOf(weight, subset) });
}

/** The library writes titles into the file's XML as they are; a title with `<` or `&` would break it. */
function escapeMetadata(doc: Doc, { title, author, subject, date }: Omit<DocumentOptions, 'paper'>): void {
  const description = (prefix: string, space: string, inner: string) =>
    `<rdf:Description rdf:about="" xmlns:${prefix}="${space}">${inner}</rdf:Description>`;
  const alternative = (text: string) => `<rdf:Alt><rdf:li xml:lang="x-default">${esc(text)}</rdf:li></rdf:Alt>`;
  const parts = [
    description(
      'xmp',
      'http://ns.adobe.com/xap/1.0/',
      `<xmp:CreateDate>${date.toISOString().replace(/\.\d+/, '')}</xmp:CreateDate><xmp:CreatorTool>${MAKER}</xmp:CreatorTool>`,
    ),
    description(
      'dc',
      'http://purl.org/dc/elements/1.1/',
      `<dc:title>${alternative(title)}</dc:title>` +
        (author === '' ? '' : `<dc:creator><rdf:Seq><rdf:li>${esc(author)}</rdf:li></rdf:Seq></dc:creator>`) +
        `<dc:description>${alternative(subject)}</dc:description>`,
    ),
    description('pdf', 'http://ns.adobe.com/pdf/1.3/', `<pdf:Producer>${MAKER}</pdf:Producer>`),
  ];
  Object.assign(doc, { _addInfo: () => parts.forEach((part) => doc.appendXML(part)) });
}

/** Ends the document and gives its bytes. */
export function bytesOf({ doc, root, bytes }: Paper): Uint8Array {
  root.end();
  doc.end();
  return bytes();
}

export interface TagOptions {
  readonly alt?: string;
  /** Left, top, right, bottom, in points. */
  readonly bbox?: readonly [number, number, number, number];
  readonly scope?: 'Column' | 'Row';
}

/** Draws as one part of the structure: a heading, a paragraph, a figure. */
export function tagged(doc: Doc, parent: Tag, type: string, draw: () => void, options: TagOptions = {}): void {
  const element = group(doc, parent, type, options);
  element.add(draw);
  element.end();
}

/** A part of the structure that holds others. */
export function group(doc: Doc, parent: Tag, type: string, options: TagOptions = {}): Tag {
  const element = doc.struct(type, options as object);
  parent.add(element);
  return element;
}

/** Draws what is no content: rules, rulers, page numbers. */
export function decoration(doc: Doc, draw: () => void): void {
  doc.markContent('Artifact', { type: 'Layout' });
  draw();
  doc.endMarkedContent();
}
