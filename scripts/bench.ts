/**
 * Measurements as JSON lines, each a ratio against a peer in the same run: `npm run bench [-- engine]`.
 * A time is the median of many rounds; what counts is the ratio, which a busy machine moves far less than the time.
 */
import { performance } from 'node:perf_hooks';
import { gzipSync } from 'node:zlib';
import { HyperFormula } from 'hyperformula';
import { compile as compileMath } from 'mathjs';
import { build } from 'vite';
import { compilePattern, drawPiece, evaluate, usualSizing, type Model, type Pattern } from '@/engine';
import { getPatternModel } from '@/features/patterns/patterns.server';

const MEASURES = 150;
const ROUNDS = 200;

function median(rounds: number, work: (round: number) => void): number {
  for (let warm = 0; warm < Math.min(rounds, 50); warm += 1) work(warm);
  const times = Array.from({ length: rounds }, (_, round) => {
    const start = performance.now();
    work(round);
    return performance.now() - start;
  }).sort((a, b) => a - b);
  return times[Math.floor(times.length / 2)] as number;
}
function report(name: string, ours: number, peer: string, theirs: number): void {
  const round = (value: number) => Number(value.toPrecision(3));
  console.log(
    JSON.stringify({ bench: name, ours_ms: round(ours), peer, peer_ms: round(theirs), ratio: round(theirs / ours) }),
  );
}

/** The same chain of sums, products, roots and choices for every contestant. `x` is the one value that changes. */
const formulas = Array.from({ length: MEASURES }, (_, index) => {
  const before = index === 0 ? 'x' : `m${index}`;
  return ['%1 + 3', '%1 / 2 + 5', 'sqrt(%1 * %1 + 144)', 'max(%1, 7) - 1', 'min(%1 * 1.01, 900)'][
    index % 5
  ]?.replaceAll('%1', before) as string;
});

/** The chain in one column: x in the first row, the measures below it. */
const inCells = (text: string): string =>
  text
    .replace(/\b(x|m(\d+))\b/g, (_, name: string, n: string) => (name === 'x' ? 'A1' : `A${Number(n) + 1}`))
    .replace(/sqrt|max|min/g, (word) => word.toUpperCase());

function patternOf(count: number): Pattern {
  const withUnits = (text: string) =>
    text
      .replace('+ 3', '+ 3 mm')
      .replace('+ 5', '+ 5 mm')
      .replace('+ 144', '+ 144 mm * 1 mm')
      .replace(', 7', ', 7 mm')
      .replace('- 1', '- 1 mm')
      .replace('900', '900 mm');
  const all = Array.from({ length: Math.ceil(count / MEASURES) }, (_, block) =>
    formulas.map((text, index) => ({
      name: `b${block}m${index + 1}`,
      formula: withUnits(text).replace(/\bm(\d+)\b(?!m)/g, (m, n: string) => (m === 'mm' ? m : `b${block}m${n}`)),
    })),
  ).flat();
  const measures = [
    { name: 'x', ask: { question: '', usual: '100 mm', from: '0 mm', to: '9999 mm' } },
    ...all.slice(0, count),
  ];
  return {
    format: 1,
    slug: 'bench',
    name: 'Bench',
    summary: '',
    group: '',
    measures,
    choices: [],
    pieces: [],
    fits: [],
    finished: { inside: [], outside: [] },
    order: [],
    assembly: [],
  };
}
function modelOf(count: number): Model {
  const compiled = compilePattern(patternOf(count));
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults.slice(0, 3)));
  return compiled.value;
}
const sizing = (x: number) => ({ values: { x }, choices: {}, units: 'mm', grid: '1mm' }) as const;

async function engine(): Promise<void> {
  const model = modelOf(MEASURES);
  const both = median(ROUNDS, (round) => evaluate(model, sizing(100 + round)));
  const cells = HyperFormula.buildFromArray([[100], ...formulas.map((text) => [`=${inCells(text)}`])], {
    licenseKey: 'gpl-v3',
  });
  const sheet = median(ROUNDS, (round) => void cells.setCellContents({ sheet: 0, row: 0, col: 0 }, [[100 + round]]));
  const compiled = formulas.map((text) => compileMath(text));
  const math = median(ROUNDS, (round) => {
    const scope: Record<string, number> = { x: 100 + round };
    compiled.forEach((one, index) => void (scope[`m${index + 1}`] = one.evaluate(scope) as number));
  });
  report('150 formulas after one change, exact and as cut', both, 'hyperformula (one pass)', sheet);
  report('150 formulas after one change, exact and as cut', both, 'mathjs (one pass)', math);

  const book = getPatternModel('book-box') as Model;
  const usual = usualSizing(book);
  const whole = median(60, (round) => {
    const figures = evaluate(book, { ...usual, values: { 'inside width': 150 + (round % 50) } });
    for (const piece of figures.pieces) drawPiece(piece, { width: 560, units: 'in', grid: '1/16in' });
  });
  report('a whole book box: both evaluations, nets, fits, words, drawings', whole, 'hyperformula, 150 formulas', sheet);

  const [few, many] = [modelOf(19), modelOf(190)].map((one) =>
    median(ROUNDS, (round) => void evaluate(one, sizing(100 + round))),
  ) as [number, number];
  console.log(
    JSON.stringify({
      bench: 'growth with ten times the measures (19 to 190)',
      ratio: Number((many / few).toPrecision(3)),
    }),
  );
  console.log(JSON.stringify({ bench: 'engine as shipped, gzip', bytes: await engineBytes() }));
}
async function engineBytes(): Promise<number> {
  const result = await build({
    logLevel: 'silent',
    configFile: false,
    resolve: { alias: { '@': new URL('../src', import.meta.url).pathname } },
    build: {
      write: false,
      lib: { entry: new URL('../src/engine/index.ts', import.meta.url).pathname, formats: ['es'] },
      minify: 'esbuild',
    },
  });
  const outputs = (Array.isArray(result) ? result : [result]).flatMap((one) => ('output' in one ? one.output : []));
  return outputs.reduce((sum, file) => sum + (file.type === 'chunk' ? gzipSync(file.code, { level: 9 }).length : 0), 0);
}

const wanted = process.argv[2] ?? 'engine';
if (wanted !== 'engine') {
  console.error(`There is no bench called “${wanted}”. There is: engine.`);
  process.exit(2);
}
await engine();
