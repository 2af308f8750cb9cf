import { describe, expect, test } from 'vitest';
import { measurementPdf } from '@/exports/pdf/measurement-sheet.server';
import type { PaperId } from '@/exports/paper';
import { ADDRESS, folderSheet } from './sheet-source';
import { nodesOf, readPdf, type ReadPdf } from './read-pdf';

const sheet = (options: Parameters<typeof folderSheet>[0] = {}, paper: PaperId = 'a4') =>
  readPdf(measurementPdf(folderSheet(options), paper));
const textsOf = ({ structure }: ReadPdf, type: string) =>
  nodesOf(structure)
    .filter((node) => node.type === type)
    .map(({ text }) => text);

describe('a measurement sheet', () => {
  test('is a tagged PDF 1.7 with a title, a language and the wish to be printed at its size', () => {
    const pdf = sheet();
    expect([pdf.version, pdf.marked, pdf.language]).toEqual(['1.7', true, 'en-GB']);
    expect(pdf.info).toMatchObject({ Title: 'Seed folder: measurement sheet', Author: 'Ines Thornbury' });
    expect(pdf.viewer).toMatchObject({ DisplayDocTitle: true, PrintScaling: { name: 'None' } });
    expect(pdf.xmp).toContain('<pdfuaid:part>1</pdfuaid:part>');
  });

  test('says everything in the order of the page', () => {
    const pdf = sheet();
    expect(textsOf(pdf, 'H1')).toEqual(['Seed folder']);
    expect(textsOf(pdf, 'H2')).toEqual([
      'Cut list',
      'Scores, read from one edge',
      'Pieces',
      'From the sheets',
      'What it takes',
      'Steps in short',
      'Mind yourself',
      'Did it print at true size?',
    ]);
    // Two panels of 5 in: 10 in across, folded in the middle; 6 in along.
    const rows = nodesOf(pdf.structure)
      .filter((node) => node.type === 'TR')
      .map(({ children }) => children.map(({ text }) => text.trim()));
    expect(rows).toContainEqual(['1', 'Folder', '1', '10 ×', '6', '1', '']);
    expect(rows).toContainEqual(['1', 'Folder', '10', '5', 'left']);
    const steps = textsOf(pdf, 'LI');
    expect(steps).toContain('1\nCut and score');
    // 5 in / 8 = 5/8 in.
    expect(steps).toContain('2\nRound the corners, 5⁄8\u00a0in or so. (optional)');
    expect(steps).toContain('Sand outdoors.');
    expect(pdf.structure.text).toContain('Edition 2, 14 March 2031');
  });

  test('sets a fraction as numerator, slash U+2044 and denominator, a space after the whole number', () => {
    // 5 11/16 in wide inside: 11 3/8 in across; 5 11/16 in = 144.4625 mm.
    const pdf = sheet({ sizing: { values: { 'inside width': 144.4625 } } });
    expect(pdf.structure.text).toContain('11\u00a03⁄8 ×');
    expect(pdf.structure.text).toContain('5\u00a011⁄16');
  });

  test('draws every piece and the folded box as figures with words that say them', () => {
    const figures = nodesOf(sheet().structure).filter((node) => node.type === 'Figure');
    expect(figures.map(({ alt }) => alt)).toEqual([
      'Folder, folded.',
      'QR code: this size on the screen.',
      expect.stringMatching(/^Folder, 10 × 6 in/),
      expect.stringMatching(/^Sheet 1 of 1, 12 × 12 in: Folder/),
      'Check square, 2 in on each side.',
      'Check square, 50 mm on each side.',
    ]);
  });

  test('links to the very size and says the address', () => {
    const pdf = sheet();
    expect(pdf.links).toEqual([ADDRESS]);
    expect(textsOf(pdf, 'Link')).toEqual(['boxes.example/projects/seed-folder?inside-width=5in']);
  });

  test('carries its fonts, all Figtree', () => {
    const { fonts } = sheet();
    expect(fonts.length).toBeGreaterThan(1);
    for (const font of fonts) {
      expect(font.name).toMatch(/^[A-Z]{6}\+Figtree-(Regular|SemiBold|ExtraBold)$/);
      expect(font.embedded).toBe(true);
    }
  });

  test.each([
    ['a4', 210, 297],
    ['letter', 215.9, 279.4],
  ] as const)('keeps every line and letter of a page of %s at least 8 mm from its edge', (paper, wide, tall) => {
    const { pages } = sheet({}, paper);
    for (const page of pages) {
      expect((page.width * 25.4) / 72).toBeCloseTo(wide, 3);
      expect((page.height * 25.4) / 72).toBeCloseTo(tall, 3);
      const points = [
        ...page.paths.flatMap((path) => path.points),
        ...page.texts.map(({ x, y }) => [(x * 25.4) / 72, (y * 25.4) / 72] as const),
      ];
      for (const [x, y] of points) {
        expect(Math.min(x, y, wide - x, tall - y)).toBeGreaterThanOrEqual(8);
      }
    }
  });

  test('is the same to the byte for the same content whatever was made between, and another for another size', () => {
    const first = measurementPdf(folderSheet(), 'a4');
    const other = measurementPdf(
      folderSheet({ sizing: { values: { 'inside width': 128 } }, title: 'Łódź, 5⅞″' }),
      'letter',
    );
    expect(Buffer.compare(first, measurementPdf(folderSheet(), 'a4'))).toBe(0);
    expect(Buffer.compare(first, other)).not.toBe(0);
  });

  test('measures in millimetres for those who do', () => {
    const pdf = sheet({ sizing: { units: 'mm', grid: '1mm', values: { 'inside width': 130 } } });
    expect(pdf.structure.text).toContain('260 ×');
    expect(pdf.structure.text).toContain('drawn 1 : 4, millimetres');
  });
});

describe('titles from anywhere', () => {
  test('with marks of XML and PDF stand as they were written', () => {
    const title = 'Bits & <b>bobs</b> (left) "right" \\ ]]> /Type';
    const pdf = sheet({ title });
    expect(pdf.info.Title).toBe(`${title}: measurement sheet`);
    expect(textsOf(pdf, 'H1')).toEqual([title]);
    expect(/<dc:title>.*?<rdf:li[^>]*>(.*?)<\/rdf:li>/s.exec(pdf.xmp)?.[1]).toBe(
      'Bits &amp; &lt;b&gt;bobs&lt;/b&gt; (left) &quot;right&quot; \\ ]]&gt; /Type: measurement sheet',
    );
  });

  test('with letters of other languages are drawn, or shown as boxes that copy as they were written', () => {
    const pdf = sheet({ title: 'Łódź żółw, коробка 箱 🎁', author: 'Nguyễn Ẩn' });
    expect(textsOf(pdf, 'H1')).toEqual(['Łódź żółw, коробка 箱 🎁']);
    expect(pdf.info.Author).toBe('Nguyễn Ẩn');
    const drawn = pdf.pages[0]?.texts.map(({ text }) => text).join('') ?? '';
    expect(drawn).toContain('Łó');
    expect(drawn).not.toContain('\ufffd');
  });

  test('with vulgar fractions, controls and marks of direction become readable', () => {
    const pdf = sheet({ title: 'A 2½\u202e in\u0000 box, 5⅞″ tall' });
    expect(textsOf(pdf, 'H1')).toEqual(['A 2\u00a01⁄2 in box, 5\u00a07⁄8" tall']);
  });

  test('that are very long, or one long word, stay on the page', () => {
    const pdf = sheet({ title: 'W'.repeat(200) });
    const wide = pdf.pages[0]?.width ?? 0;
    expect(textsOf(pdf, 'H1').join('')).toBe('W'.repeat(200));
    for (const { x, size, text } of pdf.pages[0]?.texts ?? []) {
      if (/^W+$/.test(text)) expect(x + text.length * 0.9 * size).toBeLessThan(wide);
    }
  });
});
