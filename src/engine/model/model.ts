import type { Formula, Kind, Scope } from '../formula';
import type { Cell } from '../piece';
import type { ChoiceDef, FitDef, MeasureDef, NamedFormula, Pattern, PieceDef, Placement, Side } from '../types';

/** A pattern whose every formula is checked and compiled. Made by `compilePattern`, read by `evaluate`. */
export interface Model {
  readonly pattern: Pattern;
  /** Names of formulas that live in the text: measures and sizes, and what is known once pieces are drawn. */
  readonly scope: Scope;
  readonly slots: number;
  /** In an order in which each needs only those before it. */
  readonly worked: readonly CompiledValue[];
  readonly measures: readonly CompiledMeasure[];
  readonly choices: readonly CompiledChoice[];
  readonly pieces: readonly CompiledPiece[];
  readonly fits: readonly CompiledFit[];
  readonly finished: { readonly inside: readonly CompiledSize[]; readonly outside: readonly CompiledSize[] };
  readonly placements: readonly CompiledPlacement[];
}
/** Something with a slot: a measure, or the size of a piece's column or row. */
export type CompiledValue =
  | { readonly type: 'measure'; readonly slot: number; readonly measure: CompiledMeasure }
  | { readonly type: 'size'; readonly slot: number; readonly name: string; readonly parts: readonly CompiledTrack[] };
export interface CompiledMeasure {
  readonly def: MeasureDef;
  readonly slot: number;
  readonly kind: Kind;
  /** The formula of a worked measure, the usual value of an asked one. */
  readonly formula: Formula;
  readonly from?: Formula;
  readonly to?: Formula;
  readonly when?: Formula;
}
export interface CompiledChoice {
  readonly def: ChoiceDef;
  readonly slot: number;
  readonly when?: Formula;
}
export interface CompiledTrack {
  readonly name: string;
  readonly size: Formula;
  readonly when?: Formula;
}
export interface CompiledEnd {
  readonly from?: Formula;
  readonly by?: Formula;
}
export interface CompiledPiece {
  readonly def: PieceDef;
  readonly count: Formula;
  readonly when?: Formula;
  readonly columns: readonly CompiledTrack[];
  readonly rows: readonly CompiledTrack[];
  readonly cells: readonly (readonly Cell[])[];
  readonly lines: readonly {
    readonly between: readonly [string, string];
    readonly is: 'valley' | 'mountain' | 'slit' | 'nothing';
    readonly angle?: Formula;
    readonly when?: Formula;
  }[];
  readonly tabs: readonly {
    readonly cells: readonly string[];
    readonly depth?: Formula;
    readonly ends: Readonly<Partial<Record<Side, CompiledEnd>>>;
    readonly teeth?: Formula;
    readonly toothAngle?: Formula;
    readonly when?: Formula;
  }[];
  readonly caps: readonly { readonly cell: string; readonly radius: Formula }[];
  readonly corners: readonly {
    readonly cell: string;
    readonly corner: string;
    readonly radius: Formula;
    readonly when?: Formula;
  }[];
  readonly notches: readonly {
    readonly cell: string;
    readonly side: Side;
    readonly at: Formula;
    readonly radius: Formula;
    readonly when?: Formula;
  }[];
  readonly slots: readonly {
    readonly cell: string;
    readonly across: Formula;
    readonly along: Formula;
    readonly width: Formula;
    readonly height: Formula;
    readonly when?: Formula;
  }[];
  readonly rolls: readonly { readonly cell: string; readonly radius: Formula; readonly when?: Formula }[];
  /** Slots of area, perimeter and named edges, by what they are. */
  readonly drawn: readonly { readonly slot: number; readonly of: 'area' | 'perimeter' | { readonly edge: string } }[];
}
export interface CompiledFit {
  readonly def: FitDef;
  readonly left: Formula;
  readonly right: Formula;
  readonly tolerance?: Formula;
  readonly when?: Formula;
}
export interface CompiledSize {
  readonly def: NamedFormula;
  readonly formula: Formula;
}
export interface CompiledPlacement {
  readonly def: Placement;
  readonly at: readonly [Formula, Formula, Formula];
  readonly when?: Formula;
}
