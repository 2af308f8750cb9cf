import { keyOf } from '../pattern/names';
import type { Formula, Kind, Scope, Work } from '../formula';
import type { Cell } from '../piece';
import type {
  ChoiceDef,
  FitDef,
  KindName,
  MaterialDef,
  MeasureDef,
  NamedFormula,
  PatternHead,
  PieceHead,
  Placement,
  Result,
  Rounding,
  Side,
} from '../types';

/** A pattern whose every formula is checked and compiled. Made by `compilePattern`, read by `evaluate`. */
export interface Model {
  readonly pattern: PatternHead;
  /** Reads a formula of the text; a sealed model knows those that it was sealed with. */
  readonly read: (text: string) => Result<Formula>;
  /** Names of formulas that live in the text: measures and sizes, and what is known once pieces are drawn. */
  readonly scope: Scope;
  readonly slots: number;
  /** What is worked out, in an order in which each step needs only those before it. */
  readonly steps: readonly Step[];
  readonly measures: readonly CompiledMeasure[];
  readonly choices: readonly CompiledChoice[];
  readonly pieces: readonly CompiledPiece[];
  readonly fits: readonly CompiledFit[];
  readonly finished: { readonly inside: readonly CompiledSize[]; readonly outside: readonly CompiledSize[] };
  readonly order: readonly CompiledLineOfOrder[];
  readonly materials: readonly CompiledMaterial[];
  readonly placements: readonly CompiledPlacement[];
}
/** A measure, or the size of a piece's column or row; all of one shape, for they are run more often than anything else. */
export interface Step {
  readonly slot: number;
  /** Where a reader's answer stands in a sizing; null for what is worked out. */
  readonly asked: string | null;
  readonly work: Work;
  readonly rounds: Rounding;
}
export interface CompiledMeasure {
  readonly def: MeasureDef;
  /** The name as formulas and sizings write it. */
  readonly key: string;
  readonly slot: number;
  readonly kind: Kind;
  readonly says: KindName;
  readonly rounds: Rounding;
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
/** Anything that counts only when a condition holds. */
export interface Conditional {
  readonly when?: Formula;
}
export interface CompiledTrack extends Conditional {
  readonly name: string;
  readonly size: Formula;
}
export interface CompiledEnd {
  readonly from?: Formula;
  readonly by?: Formula;
}
export interface CompiledLine extends Conditional {
  readonly between: readonly [string, string];
  readonly is: 'valley' | 'mountain' | 'slit' | 'nothing';
  readonly angle?: Formula;
  readonly shown?: Formula;
}
export interface CompiledTab extends Conditional {
  readonly cells: readonly string[];
  readonly depth?: Formula;
  readonly ends: Readonly<Partial<Record<Side, CompiledEnd>>>;
  readonly teeth?: Formula;
  readonly toothAngle?: Formula;
  readonly round?: Formula;
  readonly shape?: readonly Pair[];
}
export type Pair = readonly [Formula, Formula];

export interface CompiledGrid {
  readonly builder: 'grid';
  readonly columns: readonly CompiledTrack[];
  readonly rows: readonly CompiledTrack[];
  readonly cells: readonly (readonly Cell[])[];
  readonly lines: readonly CompiledLine[];
  readonly tabs: readonly CompiledTab[];
  readonly caps: readonly { readonly cell: string; readonly radius: Formula }[];
  readonly corners: readonly ({
    readonly cell: string;
    readonly corner: string;
    readonly radius: Formula;
  } & Conditional)[];
  readonly notches: readonly ({
    readonly cell: string;
    readonly side: Side;
    readonly at: Formula;
    readonly radius: Formula;
  } & Conditional)[];
  readonly slots: readonly ({ readonly cell: string; readonly at: Pair; readonly size: Pair } & Conditional)[];
  readonly holes: readonly ({ readonly cell: string; readonly at: Pair; readonly diameter: Formula } & Conditional)[];
  readonly creases: readonly ({
    readonly cell: string;
    readonly is: 'valley' | 'mountain';
    readonly from: Pair;
    readonly to: Pair;
    readonly parts: string | null;
    readonly angle?: Formula;
  } & Conditional)[];
  readonly rolls: readonly ({ readonly cell: string; readonly radius: Formula } & Conditional)[];
}
export interface CompiledFan {
  readonly builder: 'fan';
  readonly sides: Formula;
  readonly side: Formula;
  readonly height: Formula;
  readonly angle: Formula;
  readonly hole?: { readonly diameter: Formula; readonly fromTip: Formula } & Conditional;
  readonly tab?: {
    readonly width: Formula;
    readonly low: Formula;
    readonly high: Formula;
    readonly angle: Formula;
  } & Conditional;
}
export interface CompiledDisc {
  readonly builder: 'disc';
  readonly diameter: Formula;
  readonly rim?: {
    readonly teeth: Formula;
    readonly depth: Formula;
    readonly toothAngle: Formula;
    readonly angle: Formula;
  } & Conditional;
}
export interface CompiledSector {
  readonly builder: 'sector';
  readonly inner: Formula;
  readonly outer: Formula;
  readonly angle: Formula;
  readonly seam: { readonly width: Formula; readonly low: Formula; readonly high: Formula };
}
export interface CompiledOutline {
  readonly builder: 'outline';
  readonly points: readonly { readonly name: string; readonly at: Pair }[];
  readonly panels: readonly ({
    readonly name: string;
    readonly role: 'panel' | 'tab';
    readonly loop: readonly {
      readonly point: string;
      readonly bow: { readonly to: 'out' | 'in'; readonly radius: Formula } | null;
    }[];
    readonly bent?: Formula;
  } & Conditional)[];
  readonly lines: readonly CompiledLine[];
  readonly slots: CompiledGrid['slots'];
}
export interface CompiledLayer {
  readonly builder: 'layer';
  readonly of: string;
  /** The face that it is cut for, then others of the same shape. */
  readonly faces: readonly (readonly string[])[];
  readonly margin: Formula;
}
export type CompiledShape =
  | CompiledGrid
  | CompiledFan
  | CompiledDisc
  | CompiledSector
  | CompiledOutline
  | CompiledLayer;

export interface CompiledPiece extends Conditional {
  readonly def: PieceHead;
  readonly count: Formula;
  readonly shape: CompiledShape;
  /** Slots of all that the piece is made from: at the same values it is the same piece. */
  readonly reads: readonly number[];
  /** Slots of what is known once the piece is drawn. */
  readonly drawn: readonly {
    readonly slot: number;
    readonly of: 'area' | 'perimeter' | 'across' | 'along' | { readonly edge: string };
  }[];
}
/** What is rounded as soon as it is known; an asked measure is the reader's answer, or its usual value. */
export const stepOf = ({ slot, key, def, formula, rounds }: CompiledMeasure): Step => ({
  slot,
  asked: def.ask ? key : null,
  work: formula.work,
  rounds,
});
/** A column or row that is not in use has no size. */
export function sizeStep(slot: number, parts: readonly CompiledTrack[]): Step {
  const work: Work = (values) => {
    let sum = 0;
    for (const { size, when } of parts) if (when === undefined || when.work(values) !== 0) sum += size.work(values);
    return sum;
  };
  return { slot, asked: null, work, rounds: 'exact' };
}
/** What a grid's columns and rows add up to, by the names that formulas use. */
export function sizesOf(piece: CompiledPiece): { readonly name: string; readonly parts: readonly CompiledTrack[] }[] {
  if (piece.shape.builder !== 'grid') return [];
  const { columns, rows } = piece.shape;
  const stem = keyOf(piece.def.name);
  const tracks = [...columns, ...rows];
  const single = [...new Set(tracks.map((track) => keyOf(track.name)))].map((name) => ({
    name: `${stem}.${name}`,
    parts: tracks.filter((track) => keyOf(track.name) === name),
  }));
  return [{ name: `${stem}.across`, parts: columns }, { name: `${stem}.along`, parts: rows }, ...single];
}

/** Columns and rows, for pieces that have them. */
export const tracksOf = ({ shape }: CompiledPiece): readonly CompiledTrack[] =>
  shape.builder === 'grid' ? [...shape.columns, ...shape.rows] : [];

export interface CompiledFit extends Conditional {
  readonly def: FitDef;
  readonly left: Formula;
  readonly right: Formula;
  readonly tolerance?: Formula;
}
export interface CompiledSize {
  readonly def: NamedFormula;
  readonly formula: Formula;
}
export interface CompiledLineOfOrder extends Conditional {
  readonly says: string;
}
export interface CompiledMaterial extends Conditional {
  readonly def: MaterialDef;
  readonly kind: KindName;
  readonly formula: Formula;
}
export interface CompiledPlacement extends Conditional {
  readonly def: Placement;
  readonly at: readonly [Formula, Formula, Formula];
}

/** Every formula of a shape, wherever it stands in it. */
export function formulasOf(shape: CompiledShape): readonly Formula[] {
  const found: Formula[] = [];
  const collect = (value: unknown): void => {
    if (typeof value !== 'object' || value === null) return;
    if ('work' in value && 'uses' in value) found.push(value as Formula);
    else for (const part of Object.values(value)) collect(part);
  };
  collect(shape);
  return found;
}
