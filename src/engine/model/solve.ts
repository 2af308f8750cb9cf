import { GRIDS, roundTo } from '../measure';
import { keyOf } from '../pattern/names';
import type { Sizing } from '../types';
import { judge } from './evaluate';
import type { CompiledMeasure, Model } from './model';
import { workExact } from './values';

/** An answer to "make it so that …", or why there is none. */
export type Solved = { readonly ok: true; readonly sizing: Sizing } | { readonly ok: false; readonly reason: string };

/** The asked measures that say how large the inside is, in the order of the finished sizes. */
const insideMeasures = (model: Model): readonly CompiledMeasure[] =>
  model.finished.inside.flatMap(
    ({ def }) =>
      model.measures.find((measure) => measure.def.ask && keyOf(measure.def.name) === keyOf(def.formula)) ?? [],
  );

/**
 * The size for a thing that must go inside: every inside size is the thing's and twice the ease, then up to the cut grid, so
 * that the box as cut is never smaller. `object` is in the order of the finished inside sizes, millimetres.
 */
export function around(model: Model, base: Sizing, object: readonly number[], ease: number): Solved {
  const inside = insideMeasures(model);
  const names = model.finished.inside.map(({ def }) => def.name);
  if (inside.length !== names.length)
    return { ok: false, reason: 'the inside of this box is not asked for directly, so it cannot be fitted to a thing' };
  if (object.length !== inside.length || object.some((mm) => !(mm > 0)))
    return { ok: false, reason: `a thing has ${names.length} sizes, each more than nothing: ${names.join(', ')}` };
  const { step } = GRIDS[base.grid];
  const values = Object.fromEntries(
    inside.map(({ def }, index) => [keyOf(def.name), roundTo((object[index] as number) + 2 * ease, step, 'up')]),
  );
  const sizing = { ...base, values: { ...base.values, ...values } };
  const [problem] = judge(model, sizing).figures.problems;
  return problem ? { ok: false, reason: problem.sentence } : { ok: true, sizing };
}

/** Bisections of the growth: 2⁻²⁰ of the range, far below any cut grid. */
const HALVINGS = 20;

/**
 * The largest box, every inside size grown alike, for which `fits` still says yes (the caller knows sheets and copies). Each
 * inside size is put down to the cut grid; the answer is within one grid step of the largest. When not even the smallest box
 * in range fits, the reason says so.
 */
export function largest(model: Model, base: Sizing, fits: (sizing: Sizing) => boolean): Solved {
  const inside = insideMeasures(model);
  if (inside.length === 0)
    return { ok: false, reason: 'the inside of this box is not asked for directly, so it cannot be grown' };
  const exact = workExact(model, base);
  const { step } = GRIDS[base.grid];
  const now = inside.map((measure) => exact[measure.slot] as number);
  const at = (growth: number): Sizing => ({
    ...base,
    values: {
      ...base.values,
      ...Object.fromEntries(
        inside.map(({ def }, index) => [keyOf(def.name), roundTo((now[index] as number) * growth, step, 'down')]),
      ),
    },
  });
  const works = (growth: number): boolean => judge(model, at(growth)).figures.problems.length === 0 && fits(at(growth));
  const limits = inside.map(
    (measure, index) =>
      [
        (measure.from?.work(exact) ?? 0) / (now[index] as number),
        (measure.to?.work(exact) ?? 0) / (now[index] as number),
      ] as const,
  );
  let [low, high] = [Math.max(...limits.map(([from]) => from)), Math.min(...limits.map(([, to]) => to))];
  // The smallest is put up to the grid, not down below its range.
  low = Math.max(...now.map((mm) => roundTo(low * mm, step, 'up') / mm));
  if (!works(low))
    return {
      ok: false,
      reason:
        'not even the smallest box of this shape comes out of these sheets; take larger sheets, more of them, or another shape',
    };
  if (works(high)) return { ok: true, sizing: at(high) };
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middle = (low + high) / 2;
    if (works(middle)) low = middle;
    else high = middle;
  }
  return { ok: true, sizing: at(low) };
}
