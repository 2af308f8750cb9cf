import { snap } from '../measure';
import type { PieceDef, PieceFigure, Sizing } from '../types';
import { blanksOf, type Blank } from './blanks';
import { cutsOf, type Cut, type Offcut, type Part } from './cuts';
import { layOut } from './layout';
import { lieOf, type Folds } from './grain';
import type { Joined } from './joined';
import { packings, type Packing } from './repair';
import { STOCKS, type Stock, type StockId } from './stock';
import { tooLargeOf, type TooLarge } from './too-large';
import { treeOf } from './tree';

export type Material = PieceDef['stock'];
/** What is planned of a piece: its blank, how many, what it is made of, and its folds where the grain matters. */
export type PlannedPiece = Pick<PieceFigure, 'name' | 'count' | 'across' | 'along'> &
  Partial<PieceFigure> & {
    /** How its folds run, where there is no net to tell. */
    readonly foldsRun?: 'across' | 'along';
  };

export interface PlanOptions {
  /** One sold everywhere, or one's own. */
  readonly stock: StockId | Stock;
  /** Materials that come in sheets of another size. */
  readonly stocks?: Readonly<Partial<Record<Material, StockId | Stock>>>;
  /** How many of the whole box. */
  readonly copies?: number;
  /** Border of the sheet that is trimmed off first, millimetres. */
  readonly margin?: number;
  /** How folds must run; usual either way. */
  readonly folds?: Folds;
  /** Names of pieces that are made of two, joined with a tab at a fold, should they be too large. */
  readonly join?: readonly string[];
  /** Trials for each material; more find better plans. */
  readonly tries?: number;
  /** Another seed tries other things. The same pieces, seed and tries give the same plan. */
  readonly seed?: number;
  /** In place of `tries`: the share of the budget that is used up after so many trials; 1 ends the planning. */
  readonly spent?: (trials: number) => number;
}
export interface SheetLayout {
  readonly stock: Stock;
  readonly material: Material;
  readonly parts: readonly Part[];
  /** In the order in which a person makes them. */
  readonly cuts: readonly Cut[];
  readonly offcuts: readonly Offcut[];
}
export interface SheetPlan {
  /** What pieces are cut from, but for materials that come in another size. */
  readonly stock: Stock;
  readonly copies: number;
  readonly used: number;
  /** How many sheets of each material, in the order of `sheets`. */
  readonly takes: readonly { readonly material: Material; readonly stock: Stock; readonly used: number }[];
  readonly sheets: readonly SheetLayout[];
  /** The most useful thing left: the largest offcut, and the place of its sheet in `sheets`. */
  readonly offcut: { readonly sheet: number; readonly offcut: Offcut } | null;
  /** Pieces larger than the sheet however they lie; they are in no sheet. */
  readonly tooLarge: readonly TooLarge[];
  /** Pieces that were too large and are made of two; the parts stand in `sheets` under their own names. */
  readonly joined: readonly (Joined & { readonly name: string })[];
}
/** A stretch of planning: the plan so far when it became better, laid out when it is asked for; else null. */
export type PlanProgress = (() => SheetPlan) | null;

const TRIES = 1000;

/** What is planned: pieces, and the cut grid that an added tab keeps to. */
export interface Planned {
  readonly pieces: readonly PlannedPiece[];
  readonly sizing?: Pick<Sizing, 'grid'>;
}

/** Plans straight edge-to-edge cuts, as a trimmer makes them: fewest sheets first, then the largest offcut. */
export function planSheets(planned: Planned, options: PlanOptions): SheetPlan {
  let newest: PlanProgress = null;
  for (const better of planning(planned, options)) newest = better ?? newest;
  return (newest as () => SheetPlan)();
}

/**
 * The same in short stretches of work, for a worker that shows progress and may stop after any of them. The first gives a
 * whole plan.
 */
export function* planning(planned: Planned, options: PlanOptions): Generator<PlanProgress, void> {
  const { seed = 1, tries = TRIES, spent = (trials: number) => trials / tries } = options;
  const sorted = sortOut(planned, options);
  const groups = groupsOf(sorted.pieces, options);
  const runs = groups.map(({ blanks }) => packings(blanks, { seed, spent }));
  const best = runs.map((run): Packing | null => run.next().value ?? null);
  const plan = (): PlanProgress => {
    const now = [...best];
    return () => planOf(groups, now, sorted, options);
  };
  yield plan();
  for (const [index, run] of runs.entries()) {
    for (const found of run) {
      if (found) best[index] = found;
      yield found ? plan() : null;
    }
  }
}

interface Sorted extends Pick<SheetPlan, 'tooLarge' | 'joined'> {
  /** What the sheets can hold. */
  readonly pieces: readonly PlannedPiece[];
}
/** Sets apart what is too large, and puts two parts in its place where that is asked for and can be. */
function sortOut({ pieces, sizing }: Planned, options: PlanOptions): Sorted {
  const { margin = 0, folds = 'either', join = [] } = options;
  const grid = sizing?.grid ?? '1/16in';
  const large = new Map<PlannedPiece, TooLarge>();
  for (const piece of pieces) {
    const stock = stockFor(piece.stock ?? 'card', options);
    if (lieOf(piece, stock, usable(stock, margin), folds) === null)
      large.set(piece, tooLargeOf(piece, { stock, margin, folds, grid }));
  }
  const joinedOf = (piece: PlannedPiece): Joined | null =>
    join.includes(piece.name) ? (large.get(piece)?.joined ?? null) : null;
  return {
    pieces: pieces.flatMap((piece): readonly PlannedPiece[] =>
      large.has(piece) ? (joinedOf(piece)?.parts ?? []) : [piece],
    ),
    tooLarge: pieces.flatMap((piece) => {
      const one = large.get(piece);
      return one && !joinedOf(piece) ? [one] : [];
    }),
    joined: pieces.flatMap((piece) => {
      const joined = joinedOf(piece);
      return joined ? [{ name: piece.name, ...joined }] : [];
    }),
  };
}

interface Group {
  readonly material: Material;
  readonly stock: Stock;
  readonly margin: number;
  /** Name of the piece that each blank is, in the order of `blanks`. */
  readonly names: readonly string[];
  readonly blanks: ReturnType<typeof blanksOf>;
}

const stockFor = (material: Material, { stock, stocks }: PlanOptions): Stock => {
  const chosen = stocks?.[material] ?? stock;
  return typeof chosen === 'string' ? STOCKS[chosen] : chosen;
};
const usable = ({ across, along }: Stock, margin: number) => ({
  across: snap(across - 2 * margin),
  along: snap(along - 2 * margin),
});

/** The pieces of one material come from sheets of that material. */
function groupsOf(pieces: readonly PlannedPiece[], options: PlanOptions): Group[] {
  const { copies = 1, margin = 0, folds = 'either' } = options;
  const materials = [...new Set(pieces.map(({ stock = 'card' }) => stock))];
  return materials.map((material) => {
    const stock = stockFor(material, options);
    const own = pieces
      .filter(({ stock: of = 'card' }) => of === material)
      .flatMap((piece): (Blank & { readonly name: string })[] => {
        const lie = lieOf(piece, stock, usable(stock, margin), folds);
        if (lie === null) return [];
        const blank = { name: piece.name, across: piece.across, along: piece.along, lie };
        return Array.from({ length: piece.count * copies }, () => blank);
      });
    const blanks = blanksOf(own, usable(stock, margin));
    return { material, stock, margin, names: own.map(({ name }) => name), blanks };
  });
}

function planOf(
  groups: readonly Group[],
  best: readonly (Packing | null)[],
  { tooLarge, joined }: Sorted,
  options: PlanOptions,
): SheetPlan {
  const { copies = 1, margin = 0 } = options;
  const nextName = letters();
  const sheets = groups.flatMap(({ material, stock, names, blanks }, index) =>
    (best[index]?.sheets ?? [])
      .map((shape) => treeOf(shape, blanks))
      // The fullest first, so that what is left over lies on the last.
      .sort((a, b) => b.area - a.area)
      .map((tree) => ({ stock, material, ...cutsOf(layOut(tree, blanks), { stock, margin, names, nextName }) })),
  );
  const takes = groups.map(({ material, stock }, index) => ({
    material,
    stock,
    used: best[index]?.sheets.length ?? 0,
  }));
  const offcuts = sheets.flatMap((sheet, index) => sheet.offcuts.map((offcut) => ({ sheet: index, offcut })));
  const areaOf = ({ offcut }: (typeof offcuts)[number]) => offcut.across * offcut.along;
  return {
    stock: stockFor('card', options),
    copies,
    used: sheets.length,
    takes: takes.filter(({ used }) => used > 0),
    sheets,
    offcut: offcuts.reduce<(typeof offcuts)[number] | null>(
      (most, one) => (most && areaOf(most) >= areaOf(one) ? most : one),
      null,
    ),
    tooLarge,
    joined,
  };
}

/** Offcuts are lettered over all sheets, A to Z, then A2 and on. */
function letters(): () => string {
  let count = 0;
  return () => {
    const round = Math.floor(count / 26);
    const name = String.fromCharCode(65 + (count % 26)) + (round === 0 ? '' : `${round + 1}`);
    count += 1;
    return name;
  };
}
