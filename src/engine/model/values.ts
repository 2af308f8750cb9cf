import type { Values } from '../formula';
import { GRIDS, roundTo } from '../measure';
import { keyOf } from '../pattern/names';
import type { Rounding, Sizing } from '../types';
import { CUT_GRID } from './compile';
import type { CompiledMeasure, CompiledTrack, Model } from './model';

/** Values before and after rounding to the reader's cut grid, one number a slot. */
export interface BothValues {
  readonly exact: Values;
  readonly cut: Values;
}
export const roundingOf = (measure: CompiledMeasure): Rounding =>
  measure.def.rounds ?? (measure.kind.type === 'quantity' && measure.kind.power === 1 ? 'nearest' : 'exact');

/** What the reader answered for an asked measure, if anything. */
export const answerTo = (measure: CompiledMeasure, sizing: Sizing): number | undefined =>
  measure.def.ask ? sizing.values[keyOf(measure.def.name)] : undefined;
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
  const exact = pass(model, sizing, null, null);
  return { exact, cut: pass(model, sizing, GRIDS[sizing.grid].step, exact) };
}

function pass(model: Model, sizing: Sizing, step: number | null, answers: Values | null): Values {
  const values = new Float64Array(model.slots).fill(NaN);
  values[model.scope.slot(CUT_GRID)] = step ?? 0;
  for (const choice of model.choices) values[choice.slot] = choice.def.options.indexOf(optionOf(choice, sizing));
  for (const one of model.worked) {
    if (one.type === 'size') {
      values[one.slot] = one.parts.reduce((sum, part) => sum + sizeOf(part, values), 0);
      continue;
    }
    const { measure } = one;
    const value =
      measure.def.ask && answers
        ? (answers[measure.slot] as number)
        : (answerTo(measure, sizing) ?? measure.formula.work(values));
    values[one.slot] = step === null ? value : roundTo(value, step, roundingOf(measure));
  }
  return values;
}

/** A column or row that is not in use has no size. */
export const isInUse = (track: { readonly when?: CompiledTrack['when'] }, values: Values): boolean =>
  track.when === undefined || track.when.work(values) !== 0;
const sizeOf = (track: CompiledTrack, values: Values): number => (isInUse(track, values) ? track.size.work(values) : 0);
