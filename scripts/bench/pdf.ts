/**
 * A measurement sheet of six pages as our PDF, against headless Chromium printing the same drawings, tables and words from a page.
 * Both are warm: Chromium runs with its tab open, its pages are built before the clock and carry their fonts; ours draws and plans
 * the pieces' drawings within it. Every round is another size of the box, so that no answer can be one from before. Ours is always
 * tagged for reading aloud; Chromium prints tagged too, and once more without tags, which is the least that it can do.
 */
import { readFileSync } from 'node:fs';
import { performance } from 'node:perf_hooks';
import { chromium } from '@playwright/test';
import {
  cutsInWords,
  drawFolded,
  drawPiece,
  drawSheet,
  evaluate,
  instructionsOf,
  planSheets,
  say,
  STOCKS,
  usualSizing,
  type Model,
} from '@/engine';
import { esc } from '@/exports/escape';
import { measurementPdf } from '@/exports/pdf/measurement-sheet.server';
import type { SheetContent } from '@/exports/pdf/sheet/content';
import { cutRows, scoreRows } from '@/exports/sheet-tables';
import { drawingSvgStandalone } from '@/exports/svg/drawing';
import { patternSheet } from '@/features/editions/paper/sheet-content';
import { getPatternModel } from '@/features/patterns/patterns.server';
import { print, report } from './measure';

const ROUNDS = 16;
const WARM_ROUNDS = 10;
const PATTERN = 'drawer-chest';
/** Of the box, so that its sheet takes six pages. */
const COPIES = 5;
const SIZES = 8;
/** Of drawings on Chromium's page, in pixels: with these it takes six pages too. */
const PIECE_WIDTH = 260;
const SHEET_WIDTH = 285;
const MARGINS = { top: '12mm', right: '12mm', bottom: '12mm', left: '12mm' };

export async function pdfBench(): Promise<void> {
  const contents = sheetsOfSizes();
  const pages = contents.map(pageOf);
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-dev-shm-usage'],
  });
  try {
    const tab = await browser.newPage();
    const chromiumPrints = (tagged: boolean) => async (round: number) => {
      await tab.setContent(pages[round % SIZES] as string);
      return tab.pdf({ format: 'A4', margin: MARGINS, tagged });
    };
    const [ours, tagged, untagged] = await timed([
      (round) => Promise.resolve(measurementPdf(contents[round % SIZES] as SheetContent, 'a4')),
      chromiumPrints(true),
      chromiumPrints(false),
    ]);
    const compare = (peer: string, theirs: Timed) =>
      report(`measurement sheet of ${ours.pages} pages`, ours.ms, `${peer}, ${theirs.pages} pages`, theirs.ms);
    compare('headless Chromium, tagged as ours is', tagged);
    compare('headless Chromium without tags', untagged);
    print({ bench: 'size of the file, bytes', ours: ours.bytes, tagged: tagged.bytes, untagged: untagged.bytes });
  } finally {
    await browser.close();
  }
}

/** One box at sizes a sixteenth of an inch apart. */
function sheetsOfSizes(): readonly SheetContent[] {
  const model = getPatternModel(PATTERN) as Model;
  const usual = usualSizing(model);
  return Array.from({ length: SIZES }, (_, size) => {
    const figures = evaluate(model, { ...usual, values: { 'inside length': 88.9 + ((size + 1) * 25.4) / 16 } });
    return patternSheet({ model, figures, plan: planSheets(figures, { stock: STOCKS.letter, copies: COPIES }) });
  });
}

interface Timed {
  readonly ms: number;
  readonly pages: string;
  readonly bytes: number;
}
type Work = (round: number) => Promise<Uint8Array>;

/** Each in turn, round by round, so that whatever else the machine does meets all alike; medians. */
async function timed(works: readonly [Work, Work, Work]): Promise<readonly [Timed, Timed, Timed]> {
  const times: number[][] = works.map(() => []);
  const made: Uint8Array[][] = works.map(() => []);
  for (let round = -WARM_ROUNDS; round < ROUNDS; round += 1) {
    for (const [index, work] of works.entries()) {
      const start = performance.now();
      const file = await work(round + WARM_ROUNDS);
      if (round < 0) continue;
      times[index]?.push(performance.now() - start);
      made[index]?.push(file);
    }
  }
  return works.map((_, index): Timed => {
    const pages = [...new Set(made[index]?.map(pagesIn))].sort((a, b) => a - b);
    return {
      ms: middle(times[index] ?? []),
      pages: pages.join(' or '),
      bytes: middle(made[index]?.map((file) => file.length) ?? []),
    };
  }) as [Timed, Timed, Timed];
}

const middle = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] as number;

const pagesIn = (pdf: Uint8Array): number =>
  Buffer.from(pdf)
    .toString('latin1')
    .match(/\/Type \/Page\b(?!s)/g)?.length ?? 0;

/** The page's font comes with it, as the site's does. */
const fonts = [400, 600, 800]
  .map((weight) => {
    const file = readFileSync(`node_modules/@fontsource/figtree/files/figtree-latin-${weight}-normal.woff2`);
    return `@font-face{font-family:Figtree;font-weight:${weight};src:url(data:font/woff2;base64,${file.toString('base64')})}`;
  })
  .join('');

function pageOf({ title, model, figures, plan, steps, cautions }: SheetContent): string {
  const { units, grid } = figures.sizing;
  const row = (cells: readonly (string | number)[]) =>
    `<tr>${cells.map((cell) => `<td>${esc(`${cell}`)}</td>`).join('')}</tr>`;
  const list = (items: readonly string[]) => `<ol>${items.map((item) => `<li>${esc(item)}</li>`).join('')}</ol>`;
  const pieces = figures.pieces.map((piece) => {
    const drawing = drawingSvgStandalone(drawPiece(piece, { width: PIECE_WIDTH, units, grid }));
    return `<figure><b>${esc(piece.name)}</b>${drawing}${list(instructionsOf(piece).map((one) => say(one, { units, grid })))}</figure>`;
  });
  const folded = drawingSvgStandalone(drawFolded(model, figures, { width: 160, height: 200 }));
  const sheets = plan.sheets.map((_, i) => {
    const drawing = drawingSvgStandalone(drawSheet(plan, i, { width: SHEET_WIDTH, units, grid }));
    return `<figure>${drawing}${list(cutsInWords(plan, i).map((one) => say(one, { units, grid })))}</figure>`;
  });
  const cuts = cutRows(figures, plan).map((one) =>
    row([one.number, one.piece.name, one.piece.count, one.across, one.along]),
  );
  const scores = scoreRows(figures).map((one) => row([one.piece, one.side, one.at.join(' '), one.from]));
  return `<!doctype html><meta charset="utf-8"><title>${esc(title)}</title><style>${fonts}body{font:9pt Figtree}.p{columns:2}figure{margin:0 0 12pt;break-inside:avoid}</style><h1>${esc(title)}</h1>${folded}<table>${cuts.join('')}</table><table>${scores.join('')}</table><div class="p">${pieces.join('')}${sheets.join('')}</div>${list(steps.map((one) => one.title))}${list(cautions)}`;
}
