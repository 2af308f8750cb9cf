/**
 * The built site under load: 200 sizings of one box, each another, asked for as PDF all at once. The site runs in a process and a data
 * folder of its own, with its demo, and is stopped at the end. What counts: every answer is a PDF, and the most memory that the
 * process ever held (`VmHWM`, so Linux alone) stays below 600 MB.
 */
import { spawn, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { setTimeout } from 'node:timers/promises';
import { print, three } from './measure';

const MOST_MB = 600;
/** Milliseconds; the demo is drawn first. */
const STARTS_WITHIN = 300_000;
const PROJECT = 'seed-keepers-book-box';
/** Heights and widths a sixteenth of an inch apart, all within the box's ranges: 20 × 10 sizings. */
const SIZINGS = Array.from(
  { length: 200 },
  (_, i) => `inside-height=${8 + (i % 20) / 16}in&inside-width=${6 + Math.floor(i / 20) / 16}in`,
);

export async function loadBench(): Promise<void> {
  if (!existsSync('dist/server/entry.mjs')) throw new Error('The site is not built: npm run build.');
  const data = mkdtempSync(join(tmpdir(), 'foldwright-load-'));
  const port = await freePort();
  const site = startSite(port, data);
  try {
    const address = `http://127.0.0.1:${port}`;
    await answers(`${address}/api/health`, site);
    const before = peakMb(site);
    const start = performance.now();
    const faults = (
      await Promise.all(SIZINGS.map((query) => faultOf(`${address}/projects/${PROJECT}/sheet.pdf?${query}`)))
    ).flat();
    const seconds = (performance.now() - start) / 1000;
    const peak = peakMb(site);
    print({
      bench: `load: ${SIZINGS.length} sizings of one PDF at once`,
      good: SIZINGS.length - faults.length,
      seconds: three(seconds),
      peak_mb: three(peak),
      peak_mb_before: three(before),
      most_mb: MOST_MB,
    });
    if (faults.length > 0) print({ bench: 'load: answers that were no PDF', faults: [...new Set(faults)].slice(0, 5) });
    if (faults.length > 0 || peak >= MOST_MB) process.exitCode = 1;
  } finally {
    await stop(site);
    rmSync(data, { recursive: true, force: true, maxRetries: 10, retryDelay: 500 });
  }
}

/** The same as `npm start` runs, without building anew. */
function startSite(port: number, data: string): ChildProcess {
  const program = "const { startSite } = await import('./scripts/site.ts'); await startSite();";
  return spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '--eval', program], {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, NODE_ENV: 'production', PORT: `${port}`, HOST: '127.0.0.1', DATA_DIR: data, DEMO: '1' },
  });
}

async function answers(url: string, site: ChildProcess): Promise<void> {
  const until = Date.now() + STARTS_WITHIN;
  while (Date.now() < until) {
    if (site.exitCode !== null) throw new Error(`The site ended by itself, with ${site.exitCode}.`);
    const up = await fetch(url).then(
      (response) => response.ok,
      () => false,
    );
    if (up) return;
    await setTimeout(250);
  }
  throw new Error(`The site did not answer within ${STARTS_WITHIN / 1000} s.`);
}

/** Nothing, or what came instead of a PDF. */
async function faultOf(url: string): Promise<readonly string[]> {
  try {
    const response = await fetch(url, { redirect: 'manual' });
    const body = Buffer.from(await response.arrayBuffer());
    const whole = body.subarray(0, 5).equals(Buffer.from('%PDF-')) && body.subarray(-7).includes('%%EOF');
    return response.status === 200 && whole ? [] : [`${response.status} ${response.headers.get('content-type')}`];
  } catch (error) {
    return [String(error)];
  }
}

function peakMb({ pid }: ChildProcess): number {
  const kilobytes = /^VmHWM:\s+(\d+) kB$/m.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1];
  return Number(kilobytes) / 1024;
}

async function stop(site: ChildProcess): Promise<void> {
  if (site.exitCode !== null || site.signalCode !== null) return;
  const ended = new Promise((resolve) => site.once('exit', resolve));
  site.kill('SIGTERM');
  const patience = setTimeout(10_000, undefined, { ref: false }).then(() => site.kill('SIGKILL'));
  await Promise.race([ended, patience.then(() => ended)]);
}

async function freePort(): Promise<number> {
  const probe = createServer();
  await new Promise<void>((resolve) => probe.listen(0, '127.0.0.1', resolve));
  const { port } = probe.address() as AddressInfo;
  await new Promise((resolve) => probe.close(resolve));
  return port;
}
