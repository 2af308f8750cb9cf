/**
 * The measurement sheet on the command line:
 *   npm run --silent sheet -- book-box --set 'inside depth=2 in' --choose spine=curved --units in --grid 1/16in --format json
 *   npm run --silent sheet -- book-box --format pdf [--templates] --paper a4 --out sheet.pdf
 *   npm run --silent sheet -- book-box --format svg|dxf [--glue] [--out pieces.svg]
 *   npm run --silent sheet -- --list [--format json]
 * Exit code 0; 1 when the sizing is out of range or a fit fails (the sheet is printed all the same); 2 for a bad argument.
 */
import { writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import {
  GRIDS,
  STOCKS,
  UNITS,
  defaultGrid,
  evaluate,
  explain,
  keyOf,
  nearestName,
  planSheets,
  readValue,
  usualSizing,
  type GridId,
  type Figures,
  type Model,
  type PlanOptions,
  type Sizing,
  type Stock,
  type Unit,
} from '@/engine';
import { rowLayout } from '@/exports/cutting/layout';
import { cuttingDxf } from '@/exports/dxf/cutting';
import { figuresJson } from '@/exports/json/figures-json';
import type { PaperId } from '@/exports/paper';
import { measurementPdf } from '@/exports/pdf/measurement-sheet.server';
import { templatesPdf } from '@/exports/pdf/templates-pdf.server';
import { cuttingSvg } from '@/exports/svg/cutting';
import { measurementText } from '@/exports/text/measurement-text';
import { patternSheet } from '@/features/editions/paper/sheet-content';
import { materialField, MOST_MARGIN, OTHER_MATERIALS, planOptions } from '@/features/sheets/cut-from';
import { readStock } from '@/features/sheets/stock-link';
import { PatternFileError } from '@/features/patterns/load-pattern';
import { getPatternModel, listPatterns } from '@/features/patterns/patterns.server';

class BadArgument extends Error {}
const FORMATS = ['text', 'json', 'pdf', 'svg', 'dxf'] as const;
const PAPERS: readonly PaperId[] = ['a4', 'letter'];

const HELP = `npm run --silent sheet -- <pattern> [options]
npm run --silent sheet -- --list [--format json]

  --set 'inside width=5 3/8 in'  an asked measure, as often as you like
  --choose spine=curved          an option of a choice
  --units in|mm|cm               usual: in
  --grid 1/16in                  how fine you cut: ${Object.keys(GRIDS).join(', ')}
  --stock 12x12in                the sheets it is cut from: ${Object.keys(STOCKS).join(', ')},
                                 a size such as 8.5x13in; a4-long or a4-short heeds the grain along that side
  --stock-for 'greyboard=a3'     sheets of another material, as often as you like: ${OTHER_MATERIALS.join(', ')}
  --margin '1/4 in'              a border trimmed off every sheet first
  --join Cover                   make a piece of two parts should it be too large, as often as you like
  --copies 1                     how many boxes, up to 500
  --format text                  text, json, pdf, svg or dxf; svg and dxf are for cutting machines: all pieces side by
                                 side in millimetres, 10 mm between them
  --glue                         with svg or dxf: glue areas too, as lines to draw
  --paper a4|letter              with pdf
  --templates                    with pdf: the pieces at true size instead of the sheet
  --out FILE                     usual: standard output

Ends with 0; with 1 when the size is out of range or a fit fails; with 2 for what does not read.
`;

const oneOf = <T extends string>(what: string, typed: string, allowed: readonly T[]): T => {
  const found = allowed.find((one) => one === typed.toLowerCase().replace(/\s+/g, ''));
  if (found === undefined) throw new BadArgument(`${what} “${typed}” is not known. It can be ${allowed.join(', ')}.`);
  return found;
};

function readArguments() {
  try {
    return parseArgs({
      allowPositionals: true,
      options: {
        set: { type: 'string', multiple: true, default: [] },
        choose: { type: 'string', multiple: true, default: [] },
        units: { type: 'string', default: 'in' },
        grid: { type: 'string' },
        stock: { type: 'string', default: '12x12in' },
        'stock-for': { type: 'string', multiple: true, default: [] },
        margin: { type: 'string', default: '0' },
        join: { type: 'string', multiple: true, default: [] },
        copies: { type: 'string', default: '1' },
        format: { type: 'string', default: 'text' },
        paper: { type: 'string' },
        templates: { type: 'boolean', default: false },
        glue: { type: 'boolean', default: false },
        out: { type: 'string' },
        list: { type: 'boolean', default: false },
        help: { type: 'boolean', default: false },
      },
    });
  } catch (error) {
    throw new BadArgument(
      error instanceof Error ? (error.message.split('. To specify')[0] ?? error.message) : String(error),
    );
  }
}

const EXAMPLES = { set: 'inside width=5 3/8 in', choose: 'spine=curved', 'stock-for': 'patterned paper=a4' } as const;

function namedPair(option: keyof typeof EXAMPLES, typed: string): [string, string] {
  const at = typed.indexOf('=');
  if (at < 1)
    throw new BadArgument(`--${option} “${typed}” has no “=”. Write it like --${option} '${EXAMPLES[option]}'.`);
  return [typed.slice(0, at).trim(), typed.slice(at + 1).trim()];
}

function readSizing(model: Model, values: ReturnType<typeof readArguments>['values']): Sizing {
  const units = oneOf<Unit>('The unit', values.units, UNITS);
  const grid =
    values.grid === undefined ? defaultGrid(units) : oneOf('The cut grid', values.grid, Object.keys(GRIDS) as GridId[]);
  const sizing = usualSizing(model, units, grid);
  const set: Record<string, number> = {};
  const chosen: Record<string, string> = { ...sizing.choices };
  for (const typed of values.set) {
    const [name, value] = namedPair('set', typed);
    const asked = model.measures.filter(({ def }) => def.ask);
    const measure = asked.find(({ def }) => keyOf(def.name) === keyOf(name));
    if (!measure) {
      const names = asked.map(({ def }) => def.name);
      const nearest = nearestName(name, names);
      throw new BadArgument(
        `${model.pattern.name} does not ask for “${name}”. ${nearest ? `The nearest is “${nearest}”.` : `It asks for ${names.join(', ')}.`}`,
      );
    }
    const read = readValue(
      { kind: measure.def.kind ?? 'length', ...(measure.def.unit ? { unit: measure.def.unit } : {}) },
      value,
      { units },
    );
    if (!read.ok) throw new BadArgument(`${measure.def.name}: ${read.faults.map(explain).join(' ')}`);
    set[keyOf(name)] = read.value;
  }
  for (const typed of values.choose) {
    const [name, option] = namedPair('choose', typed);
    const choice = model.choices.find(({ def }) => keyOf(def.name) === keyOf(name));
    if (!choice)
      throw new BadArgument(
        `${model.pattern.name} has no choice “${name}”. ${model.choices.length === 0 ? 'It has none.' : `It has ${model.choices.map(({ def }) => def.name).join(', ')}.`}`,
      );
    const found = choice.def.options.find((one) => keyOf(one) === keyOf(option));
    if (found === undefined)
      throw new BadArgument(`${choice.def.name} cannot be “${option}”. It can be ${choice.def.options.join(' or ')}.`);
    chosen[keyOf(name)] = found;
  }
  return { ...sizing, values: set, choices: chosen };
}

function readSheet(typed: string): Stock {
  const stock = readStock(typed);
  if (!stock) throw new BadArgument(`The sheet “${typed}” is not known. It can be ${Object.keys(STOCKS).join(', ')}.`);
  return stock;
}

/** How it is planned on sheets. */
function readSheets(
  { pieces, sizing }: Figures,
  values: ReturnType<typeof readArguments>['values'],
): PlanOptions & { readonly stock: Stock; readonly copies: number } {
  const copies = Number(values.copies);
  if (!Number.isInteger(copies) || copies < 1 || copies > 500)
    throw new BadArgument(`--copies “${values.copies}” is not a whole number from 1 to 500.`);
  const margin = readValue({ kind: 'length' }, values.margin, { units: sizing.units });
  if (!margin.ok) throw new BadArgument(`--margin: ${margin.faults.map(explain).join(' ')}`);
  if (margin.value < 0 || margin.value > MOST_MARGIN)
    throw new BadArgument(`--margin “${values.margin}” is not from nothing to ${MOST_MARGIN} mm.`);
  const others = values['stock-for'].map((typed) => {
    const [name, sheet] = namedPair('stock-for', typed);
    const material = OTHER_MATERIALS.find((one) => keyOf(one) === keyOf(name));
    if (!material)
      throw new BadArgument(`The material “${name}” is not known. It can be ${OTHER_MATERIALS.join(' or ')}.`);
    return [material, readSheet(sheet)] as const;
  });
  const join = values.join.map((name) => {
    const piece = pieces.find((one) => keyOf(one.name) === keyOf(name));
    if (!piece)
      throw new BadArgument(`--join “${name}” is no piece of it. It has ${pieces.map((one) => one.name).join(', ')}.`);
    return materialField(piece.name);
  });
  const stock = readSheet(values.stock);
  return {
    ...planOptions({ stock, others: Object.fromEntries(others), margin: margin.value, copies, join }, pieces),
    stock,
    copies,
  };
}

function put(content: string | Uint8Array, out: string | undefined): void {
  if (out === undefined) {
    process.stdout.write(content);
    return;
  }
  try {
    writeFileSync(out, content);
  } catch (error) {
    throw new BadArgument(`“${out}” cannot be written: ${error instanceof Error ? error.message : String(error)}.`);
  }
}

async function run(): Promise<number> {
  const { values, positionals } = readArguments();
  if (values.help) {
    put(HELP, values.out);
    return 0;
  }
  const format = oneOf('The format', values.format, FORMATS);
  const patterns = listPatterns();
  if (values.list) {
    const rows = patterns.map(({ slug, name, summary }) => ({ slug, name, summary }));
    const widest = Math.max(...rows.map((row) => row.slug.length));
    put(
      format === 'json'
        ? `${JSON.stringify(rows, null, 2)}\n`
        : rows.map((row) => `${row.slug.padEnd(widest)}  ${row.name}: ${row.summary}\n`).join(''),
      values.out,
    );
    return 0;
  }
  const [slug, ...more] = positionals;
  const slugs = patterns.map((pattern) => pattern.slug);
  if (slug === undefined) throw new BadArgument(`Name a pattern: ${slugs.join(', ')}. Or ask for --list.`);
  if (more.length > 0)
    throw new BadArgument(`“${more[0]}” stands after the pattern. Sizes are given with --set 'name=value'.`);
  const model = getPatternModel(slug);
  if (!model) {
    const nearest = nearestName(slug, slugs);
    throw new BadArgument(
      `No pattern is called “${slug}”. ${nearest ? `The nearest is “${nearest}”.` : `There are ${slugs.join(', ')}.`}`,
    );
  }
  if (values.templates && format !== 'pdf') throw new BadArgument('--templates goes with --format pdf.');
  if (values.glue && format !== 'svg' && format !== 'dxf')
    throw new BadArgument('--glue goes with --format svg or --format dxf.');
  const figures = evaluate(model, readSizing(model, values));
  const options = readSheets(figures, values);
  const { copies } = options;
  const paper = oneOf('The paper', values.paper ?? (values.units === 'in' ? 'letter' : 'a4'), PAPERS);
  const written = (as: (typeof FORMATS)[number]): string | Uint8Array => {
    if (as === 'pdf') {
      const content = patternSheet({ model, figures, plan: planSheets(figures, options) });
      return values.templates ? templatesPdf(content, paper) : measurementPdf(content, paper);
    }
    if (as === 'svg' || as === 'dxf') {
      const layout = rowLayout(figures.pieces, { copies, glue: values.glue });
      return as === 'svg' ? cuttingSvg(layout, { title: `${model.pattern.name}: all pieces` }) : cuttingDxf(layout);
    }
    return as === 'json'
      ? `${JSON.stringify(figuresJson(model, figures, options), null, 2)}\n`
      : measurementText(model, figures, options);
  };
  put(written(format), values.out);
  return figures.problems.length > 0 ? 1 : 0;
}

try {
  process.exitCode = await run();
} catch (error) {
  if (!(error instanceof BadArgument) && !(error instanceof PatternFileError)) throw error;
  process.stderr.write(`${error.message}\n`);
  process.exitCode = 2;
}
