import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { GRID_IDS, GRIDS, evaluate, snap, type Figures, type Model, type Sizing } from '@/engine';
import { loadPattern } from '@/features/patterns/load-pattern';

const folder = join(import.meta.dirname, '../../content/patterns');
export const SLUGS = readdirSync(folder).map((name) => name.replace(/\.json$/, ''));

export function modelOf(slug: string): Model {
  return loadPattern(`content/patterns/${slug}.json`, readFileSync(join(folder, `${slug}.json`), 'utf8')).model;
}
export function figuresOf(
  model: Model,
  answers: Readonly<Record<string, number>> = {},
  more: Partial<Sizing> = {},
): Figures {
  return evaluate(model, { values: answers, choices: {}, units: 'in', grid: '1/16in', ...more });
}
export const inch = (inches: number): number => snap(inches * 25.4);
export function pieceOf(figures: Figures, name: string) {
  const piece = figures.pieces.find((one) => one.name === name);
  if (!piece) throw new Error(`no piece ${name}: ${JSON.stringify(figures.problems)}`);
  return piece;
}

/** Numbers from 0 to 1, the same for the same seed. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}
/** Sizings spread over the asked range and over choices and grids; one in five answers lies on an end of its range. */
export function* sizingsOf(model: Model, count: number, seed: number): Generator<Sizing> {
  const random = seeded(seed);
  const { measures, choices } = model.pattern;
  for (let index = 0; index < count; index += 1) {
    const grid = GRID_IDS[index % GRID_IDS.length] as Sizing['grid'];
    const chosen = Object.fromEntries(
      choices.map(({ name, options }) => [name, options[Math.floor(random() * options.length)] as string]),
    );
    let sizing: Sizing = { values: {}, choices: chosen, units: GRIDS[grid].unit, grid };
    for (const { name } of measures.filter(({ ask }) => ask && !ask.finer)) {
      const { from = 0, to = 0, kind } = evaluate(model, sizing).measures.find((one) => one.name === name) ?? {};
      const at = random();
      const between = at < 0.1 ? from : at > 0.9 ? to : from + (to - from) * random();
      const value = kind === 'whole number' ? Math.round(between) : between;
      sizing = { ...sizing, values: { ...sizing.values, [name]: snap(value) } };
    }
    yield sizing;
  }
}
