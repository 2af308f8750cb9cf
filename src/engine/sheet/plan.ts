import { atLeast, isZero, moreThan, same, seeded, snap } from '../measure';
import type { PieceFigure } from '../types';
import { STOCKS, type Stock, type StockId } from './stock';

export interface PlanOptions {
  /** One sold everywhere, or one's own. */
  readonly stock: StockId | Stock;
  /** How many of the whole box. */
  readonly copies?: number;
  /** Border of the sheet that is trimmed off first, millimetres. */
  readonly margin?: number;
  /** Orders of pieces to try; more find better plans. The answer depends on nothing else. */
  readonly tries?: number;
}
export interface Part {
  readonly piece: string;
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
  /** Laid with its across along the sheet's along. */
  readonly turned: boolean;
}
/** A straight cut from edge to edge of what is in the hand. `across`: the blade runs left to right, at `at` from the top. */
export interface Cut {
  readonly n: number;
  readonly runs: 'across' | 'along';
  readonly at: number;
  /** How far from the edge of the part in the hand it is measured. */
  readonly measure: number;
  readonly from: { readonly x: number; readonly y: number };
  readonly to: { readonly x: number; readonly y: number };
  /** What the cut sets free: pieces or an offcut by letter. */
  readonly frees: readonly string[];
}
export interface Offcut {
  readonly name: string;
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
}
export interface SheetLayout {
  readonly parts: readonly Part[];
  readonly cuts: readonly Cut[];
  readonly offcuts: readonly Offcut[];
}
export interface SheetPlan {
  readonly stock: Stock;
  readonly copies: number;
  readonly used: number;
  readonly sheets: readonly SheetLayout[];
  /** Pieces larger than the sheet either way, with what would help. */
  readonly tooLarge: readonly {
    readonly name: string;
    readonly across: number;
    readonly along: number;
    readonly hint: string;
  }[];
}

interface Blank {
  readonly piece: string;
  readonly across: number;
  readonly along: number;
}
interface Box {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}
/** A cut sheet as a tree: a box is left whole, holds a part, or is cut in two. */
type Tree =
  | { readonly type: 'free'; readonly box: Box }
  | { readonly type: 'edge'; readonly box: Box }
  | { readonly type: 'part'; readonly box: Box; readonly part: Part }
  | {
      readonly type: 'cut';
      readonly box: Box;
      readonly runs: 'across' | 'along';
      readonly at: number;
      readonly first: Tree;
      readonly second: Tree;
    };

/**
 * Plans straight edge-to-edge cuts, as a trimmer makes them: fewest sheets first, then the largest useful offcut. Pieces may
 * be turned. Tries several orders of the pieces and keeps the best plan; the same input gives the same plan.
 */
export function planSheets({ pieces }: { readonly pieces: readonly PieceFigure[] }, options: PlanOptions): SheetPlan {
  const { copies = 1, margin = 0, tries = 24 } = options;
  const stock = typeof options.stock === 'string' ? STOCKS[options.stock] : options.stock;
  const area: Box = { x: margin, y: margin, w: snap(stock.across - 2 * margin), h: snap(stock.along - 2 * margin) };
  const fits = (blank: Blank) =>
    (atLeast(area.w, blank.across) && atLeast(area.h, blank.along)) ||
    (atLeast(area.w, blank.along) && atLeast(area.h, blank.across));
  const blanks = pieces.flatMap((piece) =>
    Array.from(
      { length: piece.count * copies },
      (): Blank => ({ piece: piece.name, across: piece.across, along: piece.along }),
    ),
  );
  const tooLarge = pieces
    .filter((piece) => !fits({ piece: piece.name, across: piece.across, along: piece.along }))
    .map(({ name, across, along }) => ({ name, across, along, hint: 'Take a larger sheet, or make the box smaller.' }));
  const usable = blanks.filter(fits);
  let best: Tree[] = [];
  let bestScore = Infinity;
  const random = seeded(usable.length * 7919 + 17);
  // Many copies leave little to win by other orders, and each order costs more.
  const rounds = Math.max(2, Math.min(tries, Math.ceil(2400 / Math.max(1, usable.length))));
  for (let index = 0; index < rounds; index += 1) {
    const trees = pack(orderOf(usable, index, random), area, index % 2 === 0);
    const score = trees.length * 10 - largestFree(trees) / (area.w * area.h);
    if (score < bestScore - 1e-9) {
      best = trees;
      bestScore = score;
    }
  }
  const sheets = nameOffcuts(best.map((tree) => trimEdges(tree, stock, margin)));
  return { stock, copies, used: best.length, sheets, tooLarge };
}

const BY: readonly ((blank: Blank) => number)[] = [
  (blank) => blank.across * blank.along,
  (blank) => Math.max(blank.across, blank.along),
  (blank) => blank.across + blank.along,
  (blank) => Math.min(blank.across, blank.along),
];
/** The first orders are by size, largest first; the others those with some noise. */
function orderOf(blanks: readonly Blank[], index: number, random: () => number): Blank[] {
  const key = BY[Math.floor(index / 2) % BY.length] as (blank: Blank) => number;
  const noise = index < 2 * BY.length ? 0 : 0.35;
  return blanks
    .map((blank) => ({ blank, rank: key(blank) * (1 + noise * (random() - 0.5)) }))
    .sort((a, b) => b.rank - a.rank)
    .map(({ blank }) => blank);
}

/** A sheet that is being filled, with what is free on it. */
interface Filling {
  readonly tree: Tree;
  readonly free: readonly Box[];
}
/** Each blank goes where it leaves the least on its shorter side; a new sheet when it goes nowhere. */
function pack(blanks: readonly Blank[], area: Box, longFirst: boolean): Tree[] {
  const sheets: Filling[] = [];
  for (const blank of blanks) {
    const ways: readonly boolean[] = same(blank.across, blank.along) ? [false] : [false, true];
    let found: { sheet: number; box: Box; turned: boolean; left: number } | null = null;
    for (let sheet = 0; sheet < sheets.length; sheet += 1) {
      for (const box of (sheets[sheet] as Filling).free) {
        for (const turned of ways) {
          const [w, h] = turned ? [blank.along, blank.across] : [blank.across, blank.along];
          if (!atLeast(box.w, w) || !atLeast(box.h, h)) continue;
          const left = Math.min(box.w - w, box.h - h);
          if (!found || moreThan(found.left, left)) found = { sheet, box, turned, left };
        }
      }
    }
    const turned = found?.turned ?? (!atLeast(area.w, blank.across) || !atLeast(area.h, blank.along));
    const before: Tree = found ? (sheets[found.sheet] as Filling).tree : { type: 'free', box: area };
    const tree = put(before, found?.box ?? area, blank, turned, longFirst);
    const filled = { tree, free: freeBoxes(tree) };
    if (found) sheets[found.sheet] = filled;
    else sheets.push(filled);
  }
  return sheets.map(({ tree }) => tree);
}
const freeBoxes = (tree: Tree): readonly Box[] =>
  tree.type === 'free' ? [tree.box] : tree.type === 'cut' ? [...freeBoxes(tree.first), ...freeBoxes(tree.second)] : [];

function put(tree: Tree, target: Box, blank: Blank, turned: boolean, longFirst: boolean): Tree {
  if (tree.type === 'cut') {
    return {
      ...tree,
      first: put(tree.first, target, blank, turned, longFirst),
      second: put(tree.second, target, blank, turned, longFirst),
    };
  }
  if (tree.type !== 'free' || tree.box !== target) return tree;
  const { x, y, w, h } = tree.box;
  const [across, along] = turned ? [blank.along, blank.across] : [blank.across, blank.along];
  const part: Part = { piece: blank.piece, x, y, across, along, turned };
  // The first cut runs so that the larger of the two offcuts stays whole, or the other way round.
  const restRight = snap(w - across);
  const restBelow = snap(h - along);
  const alongFirst = restRight * h >= restBelow * w === longFirst;
  const rest = (box: Box): Tree => ({ type: 'free', box });
  const inner = (box: Box, runs: 'across' | 'along'): Tree => {
    const at = runs === 'across' ? along : across;
    const left = runs === 'across' ? snap(box.h - along) : snap(box.w - across);
    if (isZero(left)) return { type: 'part', box, part };
    const second =
      runs === 'across'
        ? { x: box.x, y: snap(box.y + at), w: box.w, h: left }
        : { x: snap(box.x + at), y: box.y, w: left, h: box.h };
    const first = runs === 'across' ? { ...box, h: at } : { ...box, w: at };
    return { type: 'cut', box, runs, at, first: { type: 'part', box: first, part }, second: rest(second) };
  };
  if (isZero(restRight)) return inner(tree.box, 'across');
  if (isZero(restBelow)) return inner(tree.box, 'along');
  return alongFirst
    ? {
        type: 'cut',
        box: tree.box,
        runs: 'along',
        at: across,
        first: inner({ x, y, w: across, h }, 'across'),
        second: rest({ x: snap(x + across), y, w: restRight, h }),
      }
    : {
        type: 'cut',
        box: tree.box,
        runs: 'across',
        at: along,
        first: inner({ x, y, w, h: along }, 'along'),
        second: rest({ x, y: snap(y + along), w, h: restBelow }),
      };
}

/** The four strips of the margin come off before anything else. */
function trimEdges(tree: Tree, stock: Stock, margin: number): Tree {
  if (isZero(margin)) return tree;
  const [w, h] = [snap(stock.across - margin), snap(stock.along - margin)];
  const edge = (x: number, y: number, wide: number, tall: number): Tree => ({
    type: 'edge',
    box: { x, y, w: snap(wide), h: snap(tall) },
  });
  const inner = { x: margin, y: margin, w: snap(w - margin), h: snap(stock.along - margin) };
  const bottom: Tree = {
    type: 'cut',
    box: inner,
    runs: 'across',
    at: snap(h - margin),
    first: tree,
    second: edge(margin, h, w - margin, margin),
  };
  const column = { x: margin, y: 0, w: snap(w - margin), h: stock.along };
  const top: Tree = {
    type: 'cut',
    box: column,
    runs: 'across',
    at: margin,
    first: edge(margin, 0, w - margin, margin),
    second: bottom,
  };
  const rest = { x: margin, y: 0, w: snap(stock.across - margin), h: stock.along };
  const right: Tree = {
    type: 'cut',
    box: rest,
    runs: 'along',
    at: snap(w - margin),
    first: top,
    second: edge(w, 0, margin, stock.along),
  };
  return {
    type: 'cut',
    box: { x: 0, y: 0, w: stock.across, h: stock.along },
    runs: 'along',
    at: margin,
    first: edge(0, 0, margin, stock.along),
    second: right,
  };
}

const largestFree = (trees: readonly Tree[]): number =>
  Math.max(0, ...trees.flatMap((tree) => freeBoxes(tree)).map((box) => box.w * box.h));

/** Offcuts are lettered over all sheets, A to Z, then A2 and on. */
function nameOffcuts(trees: readonly Tree[]): SheetLayout[] {
  let count = 0;
  const nextName = () => {
    const round = Math.floor(count / 26);
    const name = String.fromCharCode(65 + (count % 26)) + (round === 0 ? '' : `${round + 1}`);
    count += 1;
    return name;
  };
  return trees.map((tree) => {
    const offcuts: Offcut[] = [];
    const names = new Map<Box, string>();
    for (const box of freeBoxes(tree)) {
      const name = nextName();
      names.set(box, name);
      offcuts.push({ name, x: box.x, y: box.y, across: box.w, along: box.h });
    }
    return { parts: partsOf(tree), cuts: cutsOf(tree, names), offcuts };
  });
}
const partsOf = (tree: Tree): readonly Part[] =>
  tree.type === 'part' ? [tree.part] : tree.type === 'cut' ? [...partsOf(tree.first), ...partsOf(tree.second)] : [];

/** Cuts in the order a person makes them: a cut, then those of what it set free, then those of the rest. */
function cutsOf(tree: Tree, names: ReadonlyMap<Box, string>): readonly Cut[] {
  const cuts: Omit<Cut, 'n'>[] = [];
  const visit = (node: Tree): void => {
    if (node.type !== 'cut') return;
    const { x, y, w, h } = node.box;
    const at = node.runs === 'across' ? snap(y + node.at) : snap(x + node.at);
    cuts.push({
      runs: node.runs,
      at,
      measure: node.at,
      from: node.runs === 'across' ? { x, y: at } : { x: at, y },
      to: node.runs === 'across' ? { x: snap(x + w), y: at } : { x: at, y: snap(y + h) },
      frees: [node.first, node.second].flatMap((half) =>
        half.type === 'part'
          ? [half.part.piece]
          : half.type === 'free'
            ? [`offcut ${names.get(half.box) ?? ''}`]
            : half.type === 'edge'
              ? ['the edge']
              : [],
      ),
    });
    visit(node.first);
    visit(node.second);
  };
  visit(tree);
  return cuts.map((cut, index) => ({ n: index + 1, ...cut }));
}
