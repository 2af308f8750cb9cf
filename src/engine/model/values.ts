import type { Values } from '../formula';
import { GRIDS, roundTo } from '../measure';
import { CUT_GRID, keyOf } from '../pattern/names';
import type { Sizing } from '../types';
import type { CompiledMeasure, Conditional, Model } from './model';

/** Values before and after rounding to the reader's cut grid, one number a slot. */
export interface BothValues {
  readonly exact: Values;
  readonly cut: Values;
}

/** What the reader answered for an asked measure, if anything. */
export const answerTo = (measure: CompiledMeasure, sizing: Sizing): number | undefined =>
  measure.def.ask ? sizing.values[measure.key] : undefined;
export function optionOf(choice: Model['choices'][number], sizing: Sizing): string {
  const said = sizing.choices[keyOf(choice.def.name)];
  return said !== undefined && choice.def.options.includes(said) ? said : choice.def.usual;
}

/**
 * Works a sizing out twice. As cut, each measure is rounded as soon as it is known and everything after it is computed from
 * the rounded one: equal edges stay equal on every piece and nothing accumulates. The usual value of an asked measure stands
 * for the reader's answer, so as cut it is the exact one rounded, and not worked out again from rounded measures.
 */
export function workOut(model: Model, sizing: Sizing): BothValues {
  const exact = workExact(model, sizing);
  const { step } = GRIDS[sizing.grid];
  const cut = valuesAt(model, sizing, step);
  for (const { slot, asked, work, rounds } of model.steps)
    cut[slot] = roundTo(asked === null ? work(cut) : (exact[slot] as number), step, rounds);
  return { exact, cut };
}

/** The values before rounding, alone. */
export function workExact(model: Model, sizing: Sizing): Values {
  const values = valuesAt(model, sizing, 0);
  const answers = sizing.values;
  for (const { slot, asked, work } of model.steps)
    values[slot] = (asked === null ? undefined : answers[asked]) ?? work(values);
  return values;
}

/** Room for every value; what stands there already: the grid and the choices. */
function valuesAt(model: Model, sizing: Sizing, step: number): Values {
  const values = new Float64Array(model.slots).fill(NaN);
  values[model.scope.slot(CUT_GRID)] = step;
  for (const choice of model.choices) values[choice.slot] = choice.def.options.indexOf(optionOf(choice, sizing));
  return values;
}

/** What has a condition is in use when it holds. */
export const isInUse = (one: Conditional, values: Values): boolean =>
  one.when === undefined || one.when.work(values) !== 0;
