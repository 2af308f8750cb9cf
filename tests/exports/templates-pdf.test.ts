import { Resvg } from '@resvg/resvg-js';
import { describe, expect, test } from 'vitest';
import { compilePattern, evaluate, usualSizing, type Pattern, type Sizing } from '@/engine';
import { templatesPdf } from '@/exports/pdf/templates-pdf.server';
import type { PaperId } from '@/exports/paper';
import { FOLDER } from '../server/published-project';
import { nodesOf, readPdf, type ReadPage, type ReadPath } from './read-pdf';

const DPI = 600;
const PIXEL = 25.4 / DPI;

const templates = (pattern: Pattern, paper: PaperId, values: Sizing['values'] = {}) => {
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  const figures = evaluate(compiled.value, { ...usualSizing(compiled.value), values });
  const bytes = templatesPdf(
    { title: pattern.name, byline: [], figures, sizeWords: '', date: new Date('2031-03-14T09:30:00Z') },
    paper,
  );
  return readPdf(bytes);
};
/** A disc of 100 mm, as a pattern. */
const DISC: Pattern = {
  ...FOLDER,
  slug: 'disc',
  name: 'Disc',
  measures: [{ name: 'width', ask: { question: 'How wide?', usual: '100 mm', from: '20 mm', to: '600 mm' } }],
  pieces: [{ name: 'Disc', stock: 'card', builder: 'disc', disc: 'disc', diameter: 'width' }],
  fits: [],
  finished: { inside: [], outside: [] },
  order: [],
  assembly: [],
};

/**
 * Middles, in millimetres, of the lines that a straight cut through a page crosses. A strip round the cut is drawn at 600 dpi by a
 * renderer that knows nothing of PDF; every line it meets is weighed by its ink along the strip's middle row of pixels.
 */
function crossings(page: ReadPage, path: ReadPath, along: 'row' | 'column', mm: number): readonly number[] {
  const row = along === 'row';
  const [wide, tall] = [(page.width * 25.4) / 72, (page.height * 25.4) / 72];
  const length = row ? wide : tall;
  const thick = 9 * PIXEL;
  const [x, y, w, h] = row ? [0, mm - thick / 2, length, thick] : [mm - thick / 2, 0, thick, length];
  const pixels = Math.round(length / PIXEL);
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${w / PIXEL}" height="${h / PIXEL}" viewBox="${x} ${y} ${w} ${h}"><path d="${path.d}" fill="none" stroke="#000" stroke-width="${path.lineWidth}"/></svg>`;
  const image = new Resvg(svg).render();
  // Every look at `pixels` copies all of them.
  const ink = image.pixels;
  const found: { sum: number; weight: number }[] = [];
  let open = false;
  for (let k = 0; k < pixels; k += 1) {
    const at = row ? 4 * image.width + k : k * image.width + 4;
    const dark = (ink[at * 4 + 3] ?? 0) / 255;
    if (dark > 0.05) {
      if (!open) found.push({ sum: 0, weight: 0 });
      const last = found[found.length - 1] as { sum: number; weight: number };
      last.sum += (k + 0.5) * dark;
      last.weight += dark;
    }
    open = dark > 0.05;
  }
  return found.map(({ sum, weight }) => (sum / weight) * PIXEL);
}

const bounds = ({ points }: ReadPath) => {
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  return { left: Math.min(...xs), right: Math.max(...xs), top: Math.min(...ys), bottom: Math.max(...ys) };
};
const isSquare = (path: ReadPath, side: number) => {
  const { left, right, top, bottom } = bounds(path);
  return path.stroked && Math.abs(right - left - side) < 0.5 && Math.abs(bottom - top - side) < 0.5;
};

describe.each(['a4', 'letter'] as const)('templates on %s', (paper) => {
  test('carry a square of 2 in and one of 50 mm on every page, true to 0.1 mm at 600 dpi', () => {
    // A disc of 400 mm takes several pages, one of 100 mm a single one.
    for (const values of [{ width: 100 }, { width: 400 }]) {
      const { pages } = templates(DISC, paper, values);
      for (const page of pages) {
        for (const side of [50.8, 50]) {
          const square = page.paths.find((path) => isSquare(path, side) && path.points.length === 4) as ReadPath;
          const { left, top } = bounds(square);
          const [x1, x2] = crossings(page, square, 'row', top + side / 2) as [number, number];
          const [y1, y2] = crossings(page, square, 'column', left + side / 2) as [number, number];
          expect(Math.abs(x2 - x1 - side)).toBeLessThan(0.1);
          expect(Math.abs(y2 - y1 - side)).toBeLessThan(0.1);
        }
      }
    }
  });

  test('draw a circle of 100 mm round, true to 0.1 mm in every direction at 600 dpi', () => {
    const { pages } = templates(DISC, paper);
    const [page] = pages as [ReadPage];
    const circle = page.paths.find((path) => {
      const { left, right } = bounds(path);
      return path.d.includes('C') && right - left > 60;
    }) as ReadPath;
    const { left, right, top, bottom } = bounds(circle);
    const [cx, cy] = [(left + right) / 2, (top + bottom) / 2];
    // Chords at 0, 10, 30 and 45 mm from the middle: 2 √(50² − d²).
    for (const d of [0, 10, 30, 45]) {
      const exact = 2 * Math.sqrt(50 ** 2 - d ** 2);
      const [x1, x2] = crossings(page, circle, 'row', cy + d) as [number, number];
      expect(Math.abs(x2 - x1 - exact)).toBeLessThan(0.1);
    }
    const [y1, y2] = crossings(page, circle, 'column', cx) as [number, number];
    expect(Math.abs(y2 - y1 - 100)).toBeLessThan(0.1);
  });

  test('draw a folded card at its size, the fold in the middle', () => {
    // Two panels of 4 in: 203.2 mm across; 6 in = 152.4 mm along. On A4 (190 mm inside the margins) it lies turned.
    const { pages } = templates(FOLDER, paper);
    expect(pages).toHaveLength(1);
    const paths = pages[0]?.paths ?? [];
    const outline = paths.map(bounds).find(({ left, right, top, bottom }) => {
      const sides = [right - left, bottom - top].sort((a, b) => a - b) as [number, number];
      return Math.abs(sides[0] - 152.4) < 0.02 && Math.abs(sides[1] - 203.2) < 0.02;
    });
    expect(outline).toBeDefined();
    const fold = paths.find((path) => path.dash.length === 2 && path.points.length === 2) as ReadPath;
    const [from, to] = fold.points as [readonly [number, number], readonly [number, number]];
    expect(Math.hypot(to[0] - from[0], to[1] - from[1])).toBeCloseTo(152.4, 1);
    const { left, right, top, bottom } = outline as ReturnType<typeof bounds>;
    const middle = Math.abs(right - left - 203.2) < 1 ? from[0] - left : from[1] - top;
    expect(middle).toBeCloseTo(101.6, 1);
    expect(Math.max(right - left, bottom - top)).toBeGreaterThan(200);
  });
});

describe('a piece larger than a page', () => {
  test('is shown in parts whose crosses meet at the same place of the piece', () => {
    const { pages, structure } = templates(DISC, 'a4', { width: 400 });
    // 190 × 215.2 mm of a page, neighbours sharing 10 mm: (400 − 10) / 180 and (400 − 10) / 205.2 give 3 × 2.
    expect(pages).toHaveLength(6);
    const names = nodesOf(structure)
      .filter((node) => node.type === 'P')
      .map(({ text }) => /part ([A-C]\d)/.exec(text)?.[1])
      .filter((name) => name !== undefined);
    expect(names).toEqual(['A1', 'B1', 'C1', 'A2', 'B2', 'C2']);
    // Rings on the right of A1 and on the left of B1, in millimetres of the piece: the page's place plus 180 across.
    const rings = (page: ReadPage | undefined) =>
      (page?.paths ?? [])
        .filter((path) => path.d.includes('C') && path.points.some(([x, y], i) => i > 0 && x !== y))
        .map(bounds)
        .filter(
          ({ left, right, bottom, top }) => Math.abs(right - left - 4.4) < 0.1 && Math.abs(bottom - top - 4.4) < 0.1,
        )
        .map(({ left, right, top, bottom }) => [(left + right) / 2, (top + bottom) / 2] as const);
    const right = rings(pages[0]).filter(([x]) => x > 190);
    const left = rings(pages[1]).filter(([x]) => x < 20);
    expect(right).toHaveLength(2);
    right.forEach(([x, y], i) => {
      expect((left[i]?.[0] ?? 0) + 180).toBeCloseTo(x, 2);
      expect(left[i]?.[1]).toBeCloseTo(y, 2);
    });
  });
});

test('a piece that is needed more than once is drawn once, and says how often it is cut', () => {
  const twice: Pattern = { ...DISC, pieces: DISC.pieces.map((piece) => ({ ...piece, count: '2' })) };
  // One page for a disc of 100 mm, 3 × 2 for one of 400 mm.
  for (const [width, pages] of [
    [100, 1],
    [400, 6],
  ] as const) {
    const read = templates(twice, 'a4', { width });
    expect(read.pages).toHaveLength(pages);
    expect(read.structure.text.match(/cut 2 · card/g)).toHaveLength(pages);
    expect(read.structure.text.match(/Drawn once: cut as many as the name says\./g)).toHaveLength(pages);
  }
  expect(templates(DISC, 'a4').structure.text).not.toContain('Drawn once');
});

test('every page says what the lines on the pieces mean, and no others', () => {
  const meanings = (pattern: Pattern) =>
    nodesOf(templates(pattern, 'a4').structure)
      .filter((node) => node.type === 'LI')
      .map(({ text }) => text);
  expect(meanings(DISC)).toEqual(['cut']);
  expect(meanings(FOLDER)).toEqual(['cut', 'valley fold: score, fold towards you']);
});

test('the same content gives the same bytes', () => {
  const compiled = compilePattern(FOLDER);
  if (!compiled.ok) throw new Error('FOLDER does not compile');
  const figures = evaluate(compiled.value, usualSizing(compiled.value));
  const content = { title: 'Folder', byline: [], figures, sizeWords: '', date: new Date('2031-03-14T09:30:00Z') };
  const [one, two] = [templatesPdf(content, 'a4'), templatesPdf(content, 'a4')];
  expect(Buffer.compare(one, two)).toBe(0);
});
