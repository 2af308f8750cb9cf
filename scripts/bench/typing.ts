/**
 * Typing in the middle of a write-up of 20,000 words with 500 live measures and 40 drawings, against the same text engine with the
 * same number of words and nothing else, in one browser in one run. Needs Chromium.
 */
import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium } from '@playwright/test';
import { build } from 'vite';
import { usualSizing, type Model } from '@/engine';
import { getPattern, getPatternModel } from '@/features/patterns/patterns.server';
import type { OpenProject } from '@/features/projects/project';
import { WRITE_UP_VERSION, type BlockNode, type InlineNode } from '@/writeup/document';
import { print, three } from './measure';

const [WORDS, MEASURES, DRAWINGS, STEPS] = [20_000, 500, 40, 50];
const KEYS = 200;
const PARAGRAPHS = 400;
const PATTERN = 'book-box';
/** What one may not feel: a frame at the median, three at the worst of twenty. */
const MOST = { median: 16, p95: 50 };

export async function typingBench(): Promise<void> {
  const out = mkdtempSync(join(tmpdir(), 'foldwright-typing-'));
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-dev-shm-usage'],
  });
  try {
    await bundle(out);
    const page = await browser.newPage({ viewport: { width: 700, height: 900 } });
    await page.setContent('<!doctype html><body></body>');
    for (const style of readdirSync(out).filter((name) => name.endsWith('.css')))
      await page.addStyleTag({ path: join(out, style) });
    await page.addScriptTag({ path: join(out, 'typing.js'), type: 'module' });
    await page.waitForFunction(() => 'mountOurs' in window);

    const plain = async () => {
      await page.evaluate((paragraphs) => window.mountPlain(paragraphs), plainParagraphs());
      return page.evaluate((keys) => window.type(keys), KEYS);
    };
    const ours = async () => {
      await page.evaluate((project) => window.mountOurs(project), longProject());
      return page.evaluate((keys) => window.type(keys), KEYS);
    };
    const peer = spread(await plain());
    const own = spread(await ours());
    print({
      bench: `typing: a key in ${WORDS} words, ${MEASURES} measures, ${DRAWINGS} drawings`,
      median_ms: three(own.median),
      p95_ms: three(own.p95),
      peer: 'the same editor with plain text',
      peer_median_ms: three(peer.median),
      peer_p95_ms: three(peer.p95),
      ratio: three(own.median / peer.median),
      holds: own.median < MOST.median && own.p95 < MOST.p95,
    });
  } finally {
    await browser.close();
    rmSync(out, { recursive: true, force: true });
  }
}

async function bundle(out: string): Promise<void> {
  await build({
    configFile: false,
    logLevel: 'error',
    define: { 'process.env.NODE_ENV': '"production"' },
    resolve: { alias: { '@': join(process.cwd(), 'src') } },
    esbuild: { jsx: 'automatic' },
    css: { postcss: {} },
    worker: { format: 'es' },
    build: {
      outDir: out,
      emptyOutDir: true,
      rollupOptions: {
        input: 'scripts/bench/typing-page.tsx',
        output: { entryFileNames: 'typing.js', assetFileNames: '[name][extname]', inlineDynamicImports: true },
      },
    },
  });
}

function spread(times: readonly number[]): { readonly median: number; readonly p95: number } {
  const sorted = [...times].sort((a, b) => a - b);
  const at = (share: number) => sorted[Math.floor(sorted.length * share)] ?? NaN;
  return { median: at(0.5), p95: at(0.95) };
}

const LINE = 'Fold every score to a right angle then press it flat and rub it down with the folder before any glue';
const words = (n: number): string => {
  const all = LINE.split(' ');
  return Array.from({ length: n }, (_, i) => all[i % all.length]).join(' ');
};
const plainParagraphs = (): string[] => Array.from({ length: PARAGRAPHS }, () => words(WORDS / PARAGRAPHS));

function longProject(): OpenProject {
  const pattern = getPattern(PATTERN);
  if (!pattern) throw new Error(`There is no pattern ${PATTERN}.`);
  const model = getPatternModel(PATTERN) as Model;
  const names = pattern.measures.map(({ name }) => name);
  let measures = 0;
  const paragraph = (index: number): BlockNode => {
    const wanted = Math.round(((index + 1) * MEASURES) / PARAGRAPHS) - measures;
    const content: InlineNode[] = [{ type: 'text', text: `${words(WORDS / PARAGRAPHS)} ` }];
    for (let n = 0; n < wanted; n += 1)
      content.push({ type: 'measure', attrs: { formula: names[(measures + n) % names.length] ?? 'tab', bare: false } });
    measures += wanted;
    return { type: 'paragraph', content };
  };
  const perStep = PARAGRAPHS / STEPS;
  const steps = Array.from({ length: STEPS }, (_, step): BlockNode => {
    const drawing: BlockNode[] =
      step < DRAWINGS
        ? [{ type: 'pieceCard', attrs: { piece: pattern.pieces[step % pattern.pieces.length]?.name ?? '' } }]
        : [];
    return {
      type: 'step',
      attrs: { title: `Step ${step + 1}`, mark: '' },
      content: [...Array.from({ length: perStep }, (_, n) => paragraph(step * perStep + n)), ...drawing],
    };
  });
  return {
    id: '1',
    slug: 'long',
    revision: 1,
    updatedAt: 0,
    author: { id: '1', name: 'Ines' },
    standing: 'owner',
    stage: { stage: 'draft' },
    withdrawn: null,
    state: {
      title: 'A long write-up',
      summary: 'Long.',
      minutes: null,
      hero: null,
      pattern,
      sizing: usualSizing(model),
      writeUp: { version: WRITE_UP_VERSION, doc: { type: 'doc', content: steps } },
    },
  };
}
