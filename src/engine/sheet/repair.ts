import { seeded } from '../measure';
import { areaShare, fewestSheets, type Blanks } from './blanks';
import { largestOffcut } from './offcut';
import { emptyTree, join, measureTree, note, shapeOf, take, takeBack, treeOf, type Tree, type TreeShape } from './tree';

/*
 * Ruin and repair. To save a sheet, one is emptied, and what no longer finds room waits in a pool: again and again a few
 * parts are taken out of a few sheets and laid anew together with the pool, and the result stands when no more area waits
 * than some trials before. When nothing waits, a sheet is saved. Once no sheet can be saved or half of the time is up, the
 * same is done for the largest offcut.
 */

/** Trials between two looks at the budget. */
const BATCH = 16;
/** Of the budget; the rest goes to the offcut. */
const FOR_SHEETS = 0.75;
/** A result is compared with the one so many trials before: a little worse may pass, and leads out of dead ends. */
const MEMORY = 50;
/** One place in so many is passed over, so that the best one is not always taken. */
const PASSED_OVER = 0.01;
const SHEETS_RUINED = 3;
const PARTS_RUINED = 3;
/** How often whole sheets are emptied instead. */
const WHOLE = 0.2;

export interface Packing {
  readonly sheets: readonly TreeShape[];
  /** Area of the largest rectangle that cuts can free on one sheet. */
  readonly offcut: number;
}
export interface PackingBudget {
  readonly seed: number;
  /** Share of the budget that is used up after so many trials; 1 ends the search. */
  readonly spent: (trials: number) => number;
}

/**
 * Packs blanks that each fit the sheet on few sheets, cut by straight cuts from edge to edge. Every yield is a short stretch
 * of work: a better packing, or null. Nothing but the blanks, the seed and the budget decides what comes.
 */
export function* packings(blanks: Blanks, { seed, spent }: PackingBudget): Generator<Packing | null, void> {
  if (blanks.count === 0) return;
  const bench = layingBench(blanks, seeded(seed));
  const fewest = fewestSheets(blanks);
  bench.start(fewest);
  let trials = 0;
  let best = bench.packing();
  yield best;

  while (bench.sheets() > fewest && spent(trials) < FOR_SHEETS) {
    bench.dropSheet();
    while (!bench.complete() && spent(trials) < FOR_SHEETS) {
      for (let trial = 0; trial < BATCH && !bench.complete(); trial += 1) bench.tryCloser();
      trials += BATCH;
      if (!bench.complete()) yield null;
    }
    if (bench.complete()) {
      best = bench.packing();
      yield best;
    }
  }
  bench.restore(best);
  // No offcut is larger than a sheet, nor than all that is not cut to pieces.
  const most = Math.min(1, best.sheets.length - areaShare(blanks)) * blanks.sheet.area * (1 - 1e-12);
  while (spent(trials) < 1 && best.offcut < most) {
    for (let trial = 0; trial < BATCH; trial += 1) bench.tryRoomier();
    trials += BATCH;
    const found = bench.roomiest();
    if (found && (found.sheets.length < best.sheets.length || found.offcut > best.offcut)) {
      best = found;
      yield best;
    } else yield null;
  }
}

/** The sheets under work, and the two kinds of trial made on them. */
function layingBench(blanks: Blanks, random: () => number) {
  let trees: Tree[] = [];
  let pool: number[] = [];
  let waiting = 0;
  const memory = new Float64Array(MEMORY);
  let turn = 0;
  const rank = new Float64Array(blanks.count);
  /** Sheets changed in this trial. */
  const changed: Tree[] = [];
  const below = (count: number) => Math.floor(random() * count);
  const areaOf = (some: readonly number[]) => some.reduce((sum, blank) => sum + (blanks.area[blank] as number), 0);

  const touch = (tree: Tree) => {
    if (changed.includes(tree)) return;
    note(tree);
    changed.push(tree);
  };
  const keep = () => (changed.length = 0);
  const undo = () => {
    for (const tree of changed) takeBack(tree, blanks);
    changed.length = 0;
  };

  /** Lays a blank where the room that it takes is left with the narrowest strip; false when no sheet has room. */
  const lay = (blank: number, others: readonly Tree[]): boolean => {
    const across = blanks.across[blank] as number;
    const along = blanks.along[blank] as number;
    const short = Math.min(across, along);
    const long = Math.max(across, along);
    const first = blanks.turned[blank] as number;
    const last = first + (blanks.turns[blank] as number);
    let best = Infinity;
    let at = 0;
    let turned = 0;
    let on: Tree | null = null;
    for (const tree of others) {
      if (tree.roomShort < short || tree.roomLong < long) continue;
      const { nodes, roomAcross, roomAlong } = tree;
      for (let node = 0; node <= nodes; node += 1) {
        const wide = roomAcross[node] as number;
        const tall = roomAlong[node] as number;
        for (let lie = first; lie <= last; lie += 1) {
          const overAcross = wide - (lie === 0 ? across : along);
          const overAlong = tall - (lie === 0 ? along : across);
          const left = overAcross < overAlong ? overAcross : overAlong;
          if (left < 0 || left >= best || random() < PASSED_OVER) continue;
          best = left;
          at = node;
          turned = lie;
          on = tree;
        }
      }
    }
    if (!on) return false;
    touch(on);
    join(on, at, 2 * blank + turned, blanks);
    return true;
  };

  /** Large blanks first, by one of four measures, a little out of order. */
  const shuffle = (some: number[]) => {
    const draw = random();
    for (const blank of some) {
      const across = blanks.across[blank] as number;
      const along = blanks.along[blank] as number;
      const size =
        draw < 0.5
          ? across * along
          : draw < 0.75
            ? Math.max(across, along)
            : draw < 0.9
              ? across + along
              : Math.min(across, along);
      rank[blank] = size * (0.75 + 0.5 * random());
    }
    some.sort((a, b) => (rank[b] as number) - (rank[a] as number));
  };

  const ruin = (tree: Tree, whole: boolean, out: number[]) => {
    if (tree.nodes === 0) return;
    touch(tree);
    if (whole) take(tree, 0, blanks, out);
    else {
      const count = 1 + below(PARTS_RUINED);
      for (let part = 0; part < count && tree.nodes > 0; part += 1) take(tree, below(tree.nodes), blanks, out);
    }
    measureTree(tree, blanks);
  };
  const ruinSome = (out: number[]) => {
    const whole = random() < WHOLE;
    const count = 1 + below(SHEETS_RUINED);
    for (let sheet = 0; sheet < count; sheet += 1) ruin(trees[below(trees.length)] as Tree, whole, out);
  };
  const remember = (value: number) => {
    memory[turn] = value;
    turn = (turn + 1) % MEMORY;
  };

  /** What is aimed at once every blank lies: a large offcut on one sheet, and little else on it. */
  let goal: Tree | null = null;
  let found: Packing | null = null;
  const worth = (tree: Tree) => largestOffcut(tree, blanks) + 0.1 * (blanks.sheet.area - tree.area);
  const largestOf = () => trees.reduce((most, tree) => Math.max(most, largestOffcut(tree, blanks)), 0);

  return {
    sheets: () => trees.length,
    complete: () => pool.length === 0,
    packing: (): Packing => ({ sheets: trees.map(shapeOf), offcut: largestOf() }),

    /** On as many sheets as are sure to be needed, and more as they are called for. */
    start(fewest: number): void {
      trees = Array.from({ length: fewest }, () => emptyTree(blanks));
      const byArea = Array.from({ length: blanks.count }, (_, blank) => blank).sort(
        (a, b) => (blanks.area[b] as number) - (blanks.area[a] as number),
      );
      let rest = byArea.filter((blank) => !lay(blank, trees));
      while (rest.length > 0) {
        trees.push(emptyTree(blanks));
        rest = rest.filter((blank) => !lay(blank, trees));
      }
      keep();
    },

    /** Empties the sheet with the least on it into the pool. */
    dropSheet(): void {
      const least = trees.reduce((so, tree) => (tree.area < so.area ? tree : so));
      take(least, 0, blanks, pool);
      trees = trees.filter((tree) => tree !== least);
      shuffle(pool);
      pool = pool.filter((blank) => !lay(blank, trees));
      keep();
      waiting = areaOf(pool);
      memory.fill(waiting);
    },
    tryCloser(): void {
      const out = [...pool];
      ruinSome(out);
      shuffle(out);
      const limit = Math.max(waiting, memory[turn] as number);
      const left: number[] = [];
      let area = 0;
      for (const blank of out) {
        if (area > limit) break;
        if (lay(blank, trees)) continue;
        left.push(blank);
        area += blanks.area[blank] as number;
      }
      if (area <= limit) {
        [pool, waiting] = [left, area];
        keep();
      } else undo();
      remember(waiting);
    },

    restore({ sheets }: Packing): void {
      trees = sheets.map((shape) => treeOf(shape, blanks));
      pool = [];
      goal = trees.reduce((so, tree) => (worth(tree) > worth(so) ? tree : so));
      memory.fill(worth(goal));
    },
    tryRoomier(): void {
      if (!goal) return;
      const now = worth(goal);
      const out: number[] = [];
      ruin(goal, random() < WHOLE, out);
      if (trees.length > 1 && random() < 0.7) ruinSome(out);
      shuffle(out);
      const others = trees.filter((tree) => tree !== goal);
      const alone = [goal];
      const all = out.every((blank) => lay(blank, others) || lay(blank, alone));
      const value = all ? worth(goal) : -1;
      if (value >= Math.min(now, memory[turn] as number)) keep();
      else undo();
      remember(worth(goal));
      if (goal.nodes === 0 && trees.length > 1) {
        trees = others;
        goal = trees.reduce((so, tree) => (worth(tree) > worth(so) ? tree : so));
        memory.fill(worth(goal));
      }
      if (value > 0) {
        const offcut = largestOf();
        if (!found || trees.length < found.sheets.length || offcut > found.offcut)
          found = { sheets: trees.map(shapeOf), offcut };
      }
    },
    roomiest: (): Packing | null => found,
  };
}
