import { kindName, type Formula } from '../formula';
import { GRIDS, roundTo, snap } from '../measure';
import { keyOf } from '../pattern/names';
import type { Fault, Figures, KindName, Result, Unit } from '../types';
import { valuesBehind } from './evaluate';
import type { Model } from './model';

/** A measure placed in the text: a name, or a formula typed in place. */
export interface LiveMeasure {
  readonly formula: string;
  readonly kind: KindName;
  /** Names of the measures that it reads. */
  readonly uses: readonly string[];
  /** Shown in this unit always, when it is a measure that says so. */
  readonly unit?: Unit;
  /** At the size that the figures are for; null when it has no value there. */
  readonly value: (figures: Figures) => { readonly exact: number; readonly cut: number } | null;
}

/** Checks a live measure against the pattern's names. A formula that is not one bare measure is rounded to the grid as it is shown. */
export function compileLive(model: Model, text: string): Result<LiveMeasure> {
  const compiled = model.read(text);
  if (!compiled.ok) return compiled;
  const { value: formula } = compiled;
  const kind = kindName(formula.kind);
  if (kind === null || kind === 'choice') {
    const fault: Fault = {
      code: 'live kind',
      where: 'live measure',
      found: 'this works out nothing that can be shown',
      expected: 'a length, an area, an angle or a number',
      hint: 'Divide it, or take its root.',
    };
    return { ok: false, faults: [fault] };
  }
  const own = model.measures.find((measure) => keyOf(measure.def.name) === keyOf(text));
  return {
    ok: true,
    value: {
      formula: text,
      kind,
      uses: formula.uses,
      ...(own?.def.unit ? { unit: own.def.unit } : {}),
      value: (figures) => valueOf(formula, kind, own !== undefined, figures),
    },
  };
}

function valueOf(
  formula: Formula,
  kind: KindName,
  bare: boolean,
  figures: Figures,
): { exact: number; cut: number } | null {
  const values = valuesBehind(figures);
  if (!values) return null;
  const [exact, cut] = [formula.work(values.exact), formula.work(values.cut)];
  if (!Number.isFinite(exact) || !Number.isFinite(cut)) return null;
  // Lengths of a drawn edge stay what they are; sums of rounded measures already lie on the grid.
  const drawn = formula.uses.some((name) => name.endsWith(' length'));
  const rounded = kind === 'length' && !bare && !drawn ? roundTo(cut, GRIDS[figures.sizing.grid].step, 'nearest') : cut;
  return { exact: snap(exact), cut: snap(rounded) };
}
