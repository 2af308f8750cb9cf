import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import {
  GRID_IDS,
  GRIDS,
  evaluate,
  keyOf,
  snap,
  type Figures,
  type MeasureDef,
  type Model,
  type Pattern,
  type Sizing,
} from '@/engine';
import { workOut } from '@/engine/model/values';
import { loadPattern } from '@/features/patterns/load-pattern';

const folder = join(import.meta.dirname, '../../content/patterns');
export const SLUGS = readdirSync(folder).map((name) => name.replace(/\.json$/, ''));

const known = new Map<string, ReturnType<typeof loadPattern>>();
/** Read and compiled once: a test may ask at thousands of sizes. */
function loaded(slug: string): ReturnType<typeof loadPattern> {
  const pattern =
    known.get(slug) ?? loadPattern(`content/patterns/${slug}.json`, readFileSync(join(folder, `${slug}.json`), 'utf8'));
  known.set(slug, pattern);
  return pattern;
}
export const modelOf = (slug: string): Model => loaded(slug).model;
export const patternOf = (slug: string): Pattern => loaded(slug).pattern;
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
/**
 * Sizings spread over the asked range and over choices and grids; one answer in five lies on an end of its range. The finer
 * points keep their usual values unless `finer` says otherwise: without play, say, a lid may rub, and that is no fault.
 */
export function* sizingsOf(
  model: Model,
  count: number,
  seed: number,
  { finer = false }: { readonly finer?: boolean } = {},
): Generator<Sizing> {
  const random = seeded(seed);
  const asked = model.measures.filter(({ def }) => def.ask && (finer || !def.ask.finer));
  for (let index = 0; index < count; index += 1) {
    const grid = GRID_IDS[index % GRID_IDS.length] as Sizing['grid'];
    const choices = Object.fromEntries(
      model.pattern.choices.map(({ name, options }) => [
        keyOf(name),
        options[Math.floor(random() * options.length)] as string,
      ]),
    );
    const shares = asked.map(() => {
      const at = random();
      return at < 0.1 ? 0 : at > 0.9 ? 1 : random();
    });
    let sizing: Sizing = { values: {}, choices, units: GRIDS[grid].unit, grid };
    // A range may hang on answers that come later: answer again until nothing moves.
    for (let round = 0; round < 3; round += 1) {
      const before = sizing.values;
      asked.forEach(({ def, when, from, to }, place) => {
        const { exact, cut } = workOut(model, sizing);
        if (!from || !to || (when && when.work(cut) === 0)) return;
        const value = answerAt(def, from.work(exact), to.work(exact), shares[place] as number);
        sizing = { ...sizing, values: { ...sizing.values, [keyOf(def.name)]: value } };
      });
      if (Object.keys(sizing.values).every((name) => sizing.values[name] === before[name])) break;
    }
    yield sizing;
  }
}
/** The ends of a range as they are; between them what a person could type: micrometres, or a caliper's hundredths. */
function answerAt({ name, kind }: MeasureDef, from: number, to: number, share: number): number {
  const value = from + (to - from) * share;
  if (kind === 'whole number') return Math.round(value);
  const parts = name === 'card thickness' ? 100 : 1000;
  return snap(share === 0 || share === 1 ? value : Math.min(to, Math.max(from, Math.round(value * parts) / parts)));
}
/** Every foremost measure at this end of its range, one after the other, as the answers before leave it. */
export function atEnd(model: Model, base: Sizing, end: 'from' | 'to'): Sizing {
  return model.pattern.measures.reduce((sizing, { name, ask }) => {
    if (!ask || ask.finer) return sizing;
    const figure = evaluate(model, sizing).measures.find((measure) => measure.name === name);
    const value = figure?.inUse ? figure[end] : undefined;
    return value === undefined ? sizing : { ...sizing, values: { ...sizing.values, [keyOf(name)]: value } };
  }, base);
}
