/**
 * A measurement sheet of several pages as our PDF, against headless Chromium printing the same drawings, tables and words from a
 * page. Chromium is started once, before the clock; each round loads the page and prints it.
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

const ROUNDS = 11;
const WARM_ROUNDS = 10;
const PATTERN = 'drawer-chest';

export async function pdfBench(): Promise<void> {
  const model = getPatternModel(PATTERN) as Model;
  const figures = evaluate(model, usualSizing(model));
  const content = patternSheet({ model, figures, plan: planSheets(figures, { stock: STOCKS.letter, copies: 4 }) });
  const html = pageOf(content);
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-dev-shm-usage'],
  });
  try {
    const tab = await browser.newPage();
    const theirs = await medianOf(async () => {
      await tab.setContent(html);
      return tab.pdf({ format: 'A4', margin: { top: '12mm', right: '12mm', bottom: '12mm', left: '12mm' } });
    });
    const ours = await medianOf(() => measurementPdf(content, 'a4'));
    report(
      `measurement sheet of ${pagesIn(ours.last)} pages`,
      ours.ms,
      `headless Chromium, ${pagesIn(theirs.last)} pages`,
      theirs.ms,
    );
    print({ bench: 'size of the file, bytes', ours: ours.last.length, peer: theirs.last.length });
  } finally {
    await browser.close();
  }
}

async function medianOf(work: () => Promise<Uint8Array>): Promise<{ readonly ms: number; readonly last: Uint8Array }> {
  let last = await work();
  for (let round = 1; round < WARM_ROUNDS; round += 1) last = await work();
  const times: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    const start = performance.now();
    last = await work();
    times.push(performance.now() - start);
  }
  times.sort((a, b) => a - b);
  return { ms: times[Math.floor(ROUNDS / 2)] as number, last };
}

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
    const drawing = drawingSvgStandalone(drawPiece(piece, { width: 330, units, grid }));
    return `<figure><b>${esc(piece.name)}</b>${drawing}${list(piece.instructions.map((one) => say(one, { units, grid })))}</figure>`;
  });
  const folded = drawingSvgStandalone(drawFolded(model, figures, { width: 160, height: 200 }));
  const sheets = plan.sheets.map((_, i) => {
    const drawing = drawingSvgStandalone(drawSheet(plan, i, { width: 330, units, grid }));
    return `<figure>${drawing}${list(cutsInWords(plan, i).map((one) => say(one, { units, grid })))}</figure>`;
  });
  const cuts = cutRows(figures, plan).map((one) =>
    row([one.number, one.piece.name, one.piece.count, one.across, one.along]),
  );
  const scores = scoreRows(figures).map((one) => row([one.piece, one.side, one.at.join(' '), one.from]));
  return `<!doctype html><meta charset="utf-8"><title>${esc(title)}</title><style>${fonts}body{font:9pt Figtree}.p{columns:2}figure{margin:0 0 12pt;break-inside:avoid}</style><h1>${esc(title)}</h1>${folded}<table>${cuts.join('')}</table><table>${scores.join('')}</table><div class="p">${pieces.join('')}${sheets.join('')}</div>${list(steps.map((one) => one.title))}${list(cautions)}`;
}
