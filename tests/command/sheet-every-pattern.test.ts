import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { STOCKS, evaluate, usualSizing, type Figures, type Sizing, type Unit } from '@/engine';
import { figuresJson } from '@/exports/json/figures-json';
import { measurementText } from '@/exports/text/measurement-text';
import { SLUGS, atEnd, modelOf } from '../engine/patterns';

const OPTIONS = { stock: STOCKS['12x12in'], copies: 1 };
const root = join(import.meta.dirname, '../..');

const MEASURE = ['name', 'kind', 'exact', 'cut', 'shown'];
const PIECE = ['name', 'count', 'stock', 'across', 'along', 'scores', 'area', 'perimeter', 'instructions'];

function expectContract(slug: string, json: ReturnType<typeof figuresJson>): void {
  for (const key of ['pattern', 'sizing', 'measures', 'pieces', 'fits', 'sheets', 'departure'])
    expect(json).toHaveProperty(key);
  expect(json.pattern).toBe(slug);
  expect(json.measures.length).toBeGreaterThan(0);
  for (const measure of json.measures) {
    expect(Object.keys(measure)).toEqual(MEASURE);
    expect(typeof measure.shown).toBe('string');
    expect(measure.exact, measure.name).toEqual(expect.any(Number));
    expect(measure.cut, measure.name).toEqual(expect.any(Number));
  }
  expect(json.pieces.length).toBeGreaterThan(0);
  for (const piece of json.pieces) {
    for (const key of PIECE) expect(piece).toHaveProperty(key);
    for (const size of [piece.count, piece.across, piece.along, piece.area, piece.perimeter])
      expect(size, piece.name).toBeGreaterThan(0);
    for (const [scores, total] of [
      [piece.scores.across, piece.across],
      [piece.scores.along, piece.along],
    ] as const) {
      expect(scores.every((score) => score > 0 && score < total)).toBe(true);
      expect([...scores].sort((a, b) => a - b)).toEqual([...scores]);
    }
    expect(piece.instructions.length).toBeGreaterThan(0);
  }
  for (const fit of json.fits) {
    expect(fit).toMatchObject({ name: expect.any(String), holds: expect.any(Boolean) });
    expect(fit.gap === null || Number.isFinite(fit.gap), fit.name).toBe(true);
    if (!fit.advice) expect(fit.holds, fit.name).toBe(true);
  }
  expect(json.sheets).toMatchObject({ stock: '12x12in', count: 1 });
  expect(json.sheets.plan).toHaveLength(json.sheets.used);
  expect(json.problems).toEqual([]);
  // What a program reads is what was worked out: no NaN became null, no undefined fell out.
  expect(JSON.parse(JSON.stringify(json))).toEqual(json);
}
function expectPlain(text: string): void {
  expect(text).not.toMatch(/NaN|undefined|null|Infinity|\?|\[object/);
  // No empty figure: “ ×  mm”, “at  and”, a unit without its number.
  expect(text).not.toMatch(/(^|[×(]) +(in|mm)\b|\b(at|by|to) +(and|,|\.)/m);
  expect(text).not.toContain('PROBLEM');
}

describe.each(SLUGS)('the sheet of %s', (slug) => {
  const model = modelOf(slug);
  const sizes: readonly [string, (base: Sizing) => Sizing][] = [
    ['usual', (base) => base],
    ['smallest', (base) => atEnd(model, base, 'from')],
    ['largest', (base) => atEnd(model, base, 'to')],
  ];
  it.each(['in', 'mm'] satisfies Unit[])(
    'is whole at usual, smallest and largest sizes in %s, text and JSON',
    (units) => {
      for (const [size, sized] of sizes) {
        const figures: Figures = evaluate(model, sized(usualSizing(model, units)));
        expect(figures.problems, `${slug} ${size} ${units}`).toEqual([]);
        expectContract(slug, figuresJson(model, figures, OPTIONS));
        expectPlain(measurementText(model, figures, OPTIONS));
      }
    },
  );
});

describe('npm run sheet, a process each', { timeout: 120_000 }, () => {
  const sheet = (...args: string[]) =>
    spawnSync(process.execPath, ['--import', 'tsx', 'scripts/sheet.ts', ...args], { cwd: root, encoding: 'utf8' });
  it('lists sixteen patterns', () => {
    const { status, stdout } = sheet('--list');
    expect(status).toBe(0);
    expect(
      stdout
        .trim()
        .split('\n')
        .map((line) => line.split(' ')[0]),
    ).toEqual(SLUGS);
    expect(SLUGS).toHaveLength(16);
  });
  it.each([
    ['pyramid-box', 'json', 'mm'],
    ['cone-cup', 'text', 'in'],
  ])('prints %s as %s in %s and exits 0', (slug, format, units) => {
    const { status, stdout, stderr } = sheet(slug, '--format', format, '--units', units);
    expect([status, stderr]).toEqual([0, '']);
    if (format === 'json') expectContract(slug, JSON.parse(stdout));
    else expectPlain(stdout);
  });
});
