import { seeded, snap } from '../measure';
import { keyOf } from '../pattern/names';
import type { Sizing, SizingProblem } from '../types';
import { judge } from './evaluate';
import type { CompiledMeasure, Model } from './model';
import { isInUse, workOut } from './values';

export interface SweepOptions {
  /** How many sizings to try, corners and edges among them. */
  readonly count: number;
  readonly seed?: number;
}
export interface Sweep {
  readonly tried: number;
  readonly failing: number;
  /** The first sizing that cannot be made, with why; null when all can. */
  readonly first: { readonly sizing: Sizing; readonly problem: SizingProblem } | null;
  /** For each foremost asked measure the smallest and largest value, in mm or plain, at which no sizing failed for it. */
  readonly works: Readonly<Record<string, { readonly from: number; readonly to: number }>>;
}

/**
 * Tries sizings all over the asked range, as `base` has its units, grid and choices: every measure at either end, then
 * seeded ones between. Ranges that depend on earlier answers are followed. The same seed gives the same answer.
 */
export function sweep(model: Model, base: Sizing, { count, seed = 1 }: SweepOptions): Sweep {
  const asked = model.measures.filter(({ def }) => def.ask && !def.ask.finer);
  const random = seeded(seed);
  const works: Record<string, { from: number; to: number }> = {};
  let failing = 0;
  let first: Sweep['first'] = null;
  for (let index = 0; index < count; index += 1) {
    const sizing = sizingAt(model, base, asked, (place) => placeOf(index, place, asked.length, random));
    const [problem] = judge(model, sizing).figures.problems;
    if (problem) {
      failing += 1;
      first ??= { sizing, problem };
      continue;
    }
    for (const { def } of asked) {
      const value = sizing.values[keyOf(def.name)] as number;
      const so = works[def.name];
      works[def.name] = so
        ? { from: Math.min(so.from, value), to: Math.max(so.to, value) }
        : { from: value, to: value };
    }
  }
  return { tried: count, failing, first, works };
}

/** Shares of the range, 0 to 1: first the corners (at most 64), then each edge's middle, then anywhere. */
function placeOf(index: number, measure: number, measures: number, random: () => number): number {
  const corners = 2 ** Math.min(6, measures);
  if (index < corners) return (index >> (measure % 6)) & 1;
  const edge = index - corners;
  if (edge < 2 * measures) return measure === edge >> 1 ? edge & 1 : 0.5;
  const at = random();
  return at < 0.05 ? 0 : at > 0.95 ? 1 : at;
}

/** Answers one measure after the other, each within the range that the answers before it leave. */
function sizingAt(
  model: Model,
  base: Sizing,
  asked: readonly CompiledMeasure[],
  share: (place: number) => number,
): Sizing {
  let sizing = base;
  asked.forEach((measure, place) => {
    const at = share(place);
    const { exact, cut } = workOut(model, sizing);
    if (!isInUse(measure, cut) || !measure.from || !measure.to) return;
    const [from, to] = [measure.from.work(exact), measure.to.work(exact)];
    const value = from + (to - from) * at;
    const answer = measure.def.kind === 'whole number' ? Math.round(value) : snap(value);
    sizing = { ...sizing, values: { ...sizing.values, [keyOf(measure.def.name)]: answer } };
  });
  return sizing;
}
