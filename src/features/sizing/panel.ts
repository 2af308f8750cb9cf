import {
  gridsFor,
  showValue,
  type Figures,
  type GridId,
  type MeasureFigure,
  type Model,
  type Sizing,
  type Unit,
} from '@/engine';
import { chosenOption } from './sizing-values';

/** One asked measure in the panel. */
export interface PanelField {
  readonly name: string;
  readonly question: string;
  /** A sentence that helps to answer it. */
  readonly note?: string;
  readonly kind: MeasureFigure['kind'];
  /** What stands in the field: the value without its unit, as it can be typed back. */
  readonly text: string;
  /** What stands beside it. */
  readonly suffix: string;
  /** The unit that a bare number in the field is read in. */
  readonly unit: Unit;
  readonly value: number;
  readonly from: number;
  readonly to: number;
  /** `4 to 14 in` */
  readonly range: string;
  readonly finer: boolean;
  readonly inUse: boolean;
  readonly set: boolean;
}
export interface PanelChoice {
  readonly name: string;
  readonly question: string;
  readonly options: readonly string[];
  readonly chosen: string;
  readonly finer: boolean;
}
export interface Panel {
  readonly fields: readonly PanelField[];
  readonly choices: readonly PanelChoice[];
  readonly units: Unit;
  readonly grids: readonly GridId[];
  readonly grid: GridId;
}

/** What the sizing panel shows for a sizing; `figures` are those of the asked sizing, whether it can be made or not. */
export function panelFor(model: Model, figures: Figures): Panel {
  const { sizing } = figures;
  return {
    fields: figures.measures.flatMap((measure) => {
      const def = model.pattern.measures.find(({ name }) => name === measure.name);
      return def?.ask && measure.asked ? [fieldFor(measure, { ...def.ask, note: def.note }, sizing)] : [];
    }),
    choices: model.pattern.choices.map((choice) => ({
      name: choice.name,
      question: choice.question,
      options: choice.options,
      chosen: chosenOption(sizing, choice),
      finer: choice.finer ?? false,
    })),
    units: sizing.units,
    grids: gridsFor(sizing.units),
    grid: sizing.grid,
  };
}

function fieldFor(
  measure: MeasureFigure,
  ask: { readonly question: string; readonly finer?: boolean; readonly note?: string | undefined },
  sizing: Sizing,
): PanelField {
  const unit = measure.unit ?? sizing.units;
  const from = measure.from ?? measure.exact;
  const to = measure.to ?? measure.exact;
  const told = (value: number, bare: boolean) =>
    showValue(value, measure.kind, { units: sizing.units, grid: sizing.grid, unit: measure.unit, bare }).typeset;
  return {
    name: measure.name,
    question: ask.question,
    ...(ask.note === undefined ? {} : { note: ask.note }),
    kind: measure.kind,
    text: fieldText(measure, sizing),
    suffix: measure.kind === 'length' ? unit : '',
    unit,
    value: measure.exact,
    from,
    to,
    range: `${told(from, true)} to ${told(to, false)}`,
    finer: ask.finer ?? false,
    inUse: measure.inUse,
    set: measure.set ?? false,
  };
}

/** An asked value as it stands in its field: exact, not rounded to the cut grid, and without its unit. */
export function fieldText(measure: MeasureFigure, { units, grid }: Pick<Sizing, 'units' | 'grid'>): string {
  return showValue(measure.exact, measure.kind, { units, grid, unit: measure.unit, bare: measure.kind === 'length' })
    .text;
}
