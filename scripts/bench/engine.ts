import { gzipSync } from 'node:zlib';
import { HyperFormula } from 'hyperformula';
import { compile as compileMath, unit, type Unit } from 'mathjs';
import { build, transformWithEsbuild, type Rollup } from 'vite';
import {
  compilePattern,
  drawPiece,
  evaluate,
  instructionsOf,
  usualSizing,
  workExact,
  workOut,
  type Model,
  type Pattern,
} from '@/engine';
import { getPattern, getPatternModel } from '@/features/patterns/patterns.server';
import { MATHJS, MATHJS_UNITS, OURS, cells, realMeasures, written, type BenchMeasure, type Language } from './formulas';
import { median, print, report, three } from './measure';

const MEASURES = 150;
const ROUNDS = 400;

const sizing = (x: number) => ({ values: { x }, choices: {}, units: 'mm', grid: '1mm' }) as const;

/** Formulas, growth, a whole box, and what a reader's page loads. */
export async function engineBench(): Promise<void> {
  const real = realMeasures(MEASURES);
  const model = modelOf(
    real.map(({ name, kind, node }) => ({ name, kind, formula: written(node, OURS), rounds: 'nearest' })),
  );

  const columnOf = (name: string) => `A${name === 'x' ? 1 : real.findIndex((one) => one.name === name) + 2}`;
  const inCells = [[100], ...real.map(({ node }) => [`=${written(node, cells(columnOf))}`])];
  const sheet = HyperFormula.buildFromArray(inCells, { licenseKey: 'gpl-v3' });
  const mathPass = (language: Language) => {
    const compiled = real.map(({ name, node }) => ({ name, one: compileMath(written(node, language)) }));
    return (x: unknown): Record<string, unknown> => {
      const scope: Record<string, unknown> = { x };
      for (const { name, one } of compiled) scope[name] = one.evaluate(scope);
      return scope;
    };
  };
  const [plain, withUnits] = [mathPass(MATHJS), mathPass(MATHJS_UNITS)];
  agree();

  const hyper = median(
    ROUNDS,
    (round) => void sheet.setCellContents({ sheet: 0, row: 0, col: 0 }, [[100 + (round % 50)]]),
  );
  const math = median(ROUNDS, (round) => void plain(100 + (round % 50)));
  const mathUnits = median(100, (round) => void withUnits(unit(100 + (round % 50), 'mm')));
  const one = median(ROUNDS, (round) => void workExact(model, sizing(100 + (round % 50))));
  const both = median(ROUNDS, (round) => void workOut(model, sizing(100 + (round % 50))));
  const all = median(ROUNDS, (round) => void evaluate(model, sizing(100 + (round % 50))));
  for (const [what, ours] of [
    ['exact', one],
    ['exact and as cut', both],
    ['exact, as cut, ranges, figures', all],
  ] as const) {
    report(`${MEASURES} formulas after one change: ${what}`, ours, 'hyperformula', hyper);
    report(`${MEASURES} formulas after one change: ${what}`, ours, 'mathjs, lengths with units', mathUnits);
    report(`${MEASURES} formulas after one change: ${what}`, ours, 'mathjs, bare numbers', math);
  }

  const book = getPatternModel('book-box') as Model;
  const usual = usualSizing(book);
  const whole = (measure: string) =>
    median(200, (round) => {
      const figures = evaluate(book, { ...usual, values: { [measure]: 150 + (round % 50) } });
      for (const piece of figures.pieces) {
        drawPiece(piece, { width: 560, units: 'in', grid: '1/16in' });
        for (const sentence of instructionsOf(piece)) void sentence;
      }
    });
  for (const measure of ['inside width', 'inside height'])
    report(
      `a whole book box after a change of ${measure}`,
      whole(measure),
      `hyperformula, ${MEASURES} formulas`,
      hyper,
    );

  print({ bench: 'ten times the measures', ratio: three(growth(modelOf(chain(19)), modelOf(chain(190)))) });
  const tray = getPattern('tray') as Pattern;
  print({ bench: 'ten times the pieces', ratio: three(growth(piecesOf(tray, 3), piecesOf(tray, 30))) });
  print({ bench: 'engine as a reader’s page loads it, bytes with gzip', ...(await engineBytes()) });

  /** Contestants that work out different measures are no contestants. */
  function agree(): void {
    const scope = plain(120);
    const inUnits = withUnits(unit(120, 'mm'));
    sheet.setCellContents({ sheet: 0, row: 0, col: 0 }, [[120]]);
    const { exact } = workOut(model, sizing(120));
    real.forEach(({ name }, index) => {
      const values = [
        exact[model.scope.slot(name)] as number,
        scope[name] as number,
        numberIn(inUnits[name]),
        Number(sheet.getCellValue({ sheet: 0, row: index + 1, col: 0 })),
      ];
      if (Math.max(...values) - Math.min(...values) > 1e-6 || values.some(Number.isNaN))
        throw new Error(
          `the contestants differ in ${name}: ${values.join(', ')}: ${written((real[index] as BenchMeasure).node, OURS)}`,
        );
    });
  }
}

const numberIn = (value: unknown): number => (typeof value === 'number' ? value : (value as Unit).toNumber('mm'));

function growth(small: Model, large: Model): number {
  const time = (model: Model) =>
    median(ROUNDS, (round) => void evaluate(model, { ...usualSizing(model, 'mm'), values: { x: 100 + (round % 50) } }));
  return time(large) / time(small);
}
function chain(count: number): Pattern['measures'] {
  return Array.from({ length: count }, (_, index) => ({
    name: `m${index + 1}`,
    formula: `max(${index === 0 ? 'x' : `m${index}`} * 1.01, 7 mm) - 1 mm`,
  }));
}

function modelOf(worked: Pattern['measures'], pieces: Pattern['pieces'] = [], asked: Pattern['measures'] = []): Model {
  const x = { name: 'x', ask: { question: '', usual: '100 mm', from: '0 mm', to: '9999 mm' } };
  const compiled = compilePattern({
    format: 1,
    slug: 'bench',
    name: 'Bench',
    summary: '',
    group: '',
    measures: [x, ...asked, ...worked],
    choices: [],
    pieces,
    fits: [],
    finished: { inside: [], outside: [] },
    order: [],
    assembly: [],
  });
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults.slice(0, 3)));
  return compiled.value;
}
/** A pattern with the same piece many times over, all following x. */
function piecesOf(pattern: Pattern, count: number): Model {
  const [piece] = pattern.pieces;
  if (!piece) throw new Error('the tray has no piece');
  const measures = pattern.measures.map(({ name, kind, ask, formula }) => ({
    name,
    kind,
    formula:
      formula ?? (kind === undefined || kind === 'length' ? `x * 0 + ${ask?.usual ?? '0'}` : (ask?.usual ?? '0')),
  }));
  const following = measures.map((one) => (one.name === 'inside length' ? { ...one, formula: '2 * x' } : one));
  return modelOf(
    following as Pattern['measures'],
    Array.from({ length: count }, (_, index) => ({ ...piece, name: `Tray ${index + 1}` })),
  );
}

/** What of src/engine a reader's page loads before it follows a size, and all that it loads for drawings, words and sheets. */
async function engineBytes(): Promise<{ readonly first: number; readonly all: number }> {
  const result = await build({
    logLevel: 'silent',
    configFile: false,
    resolve: { alias: { '@': new URL('../../src', import.meta.url).pathname } },
    build: {
      write: false,
      minify: false,
      rollupOptions: {
        input: new URL('../../src/features/sizing/reader-page.client.ts', import.meta.url).pathname,
        preserveEntrySignatures: 'strict',
      },
    },
  });
  const chunks = (Array.isArray(result) ? result : [result])
    .flatMap((one) => ('output' in one ? one.output : []))
    .filter((file) => file.type === 'chunk');
  const first = new Set<string>();
  const reach = ({ fileName, imports }: Rollup.OutputChunk): void => {
    if (first.has(fileName)) return;
    first.add(fileName);
    chunks.filter((chunk) => imports.includes(chunk.fileName)).forEach(reach);
  };
  chunks.filter(({ isEntry }) => isEntry).forEach(reach);
  const sizes = await Promise.all(chunks.map(async (chunk) => ({ chunk, bytes: await engineIn(chunk) })));
  const sum = (list: typeof sizes) => list.reduce((all, { bytes }) => all + bytes, 0);
  return { first: sum(sizes.filter(({ chunk }) => first.has(chunk.fileName))), all: sum(sizes) };
}
/** The engine's modules in a file, minified and compressed as they are served. */
async function engineIn(chunk: Rollup.OutputChunk): Promise<number> {
  const modules = Object.entries(chunk.modules).filter(([id]) => id.includes('/src/engine/'));
  const code = modules.map(([, module]) => module.code ?? '').join('\n');
  const { code: minified } = await transformWithEsbuild(code, 'engine.js', { minify: true, treeShaking: false });
  return modules.length === 0 ? 0 : gzipSync(minified, { level: 9 }).length;
}
