import { cross, minus, vector, type Vector } from './vector';

/** A fold of the tree that a net is folded by: the facet that it moves, and where and about which direction it turns it. */
export interface Hinge {
  readonly moves: number;
  readonly at: Vector;
  /** Of length 1; a larger turn of the link turns right-handed about it. */
  readonly about: Vector;
}
/** Two places that are one on the card, seen from the facets on both sides of a fold that closes a ring. */
export interface Closure {
  readonly facets: readonly [number, number];
  readonly places: readonly [Vector, Vector];
}
export interface Linkage {
  readonly hinges: readonly Hinge[];
  /** Hinges that keep the turn they have. */
  readonly held: readonly boolean[];
  readonly closures: readonly Closure[];
  /** Hinges that move a facet, from the root outwards, by their places in `hinges`. */
  readonly chain: (facet: number) => readonly number[];
}

/** Rings that gape less than this are closed, millimetres. */
const CLOSED = 0.01;
const ROUNDS = 20;
/** No step turns a fold further, radians: between flat and folded there are other ways round, and the near one is meant. */
const STEP = 0.3;
/** Keeps steps small where the card is nearly flat, and all folds of a ring nearly do the same. Millimetres. */
const DAMPING = 0.2;

/**
 * Turns folds a little more or less than `turns` says on the way to `folded` (radians, one a hinge), so that panels round an inner corner stay
 * together: card bends at its folds and nowhere else. The least change that closes all rings, by damped least squares; as near
 * as it comes where they cannot be closed.
 */
export function closeRings(
  turns: readonly number[],
  folded: readonly number[],
  layOut: (turns: readonly number[]) => Linkage,
): readonly number[] {
  // Cuts to a grid leave some rings open by a hair when all is folded; on the way there they may gape as much.
  const closed = CLOSED + gapOf(layOut(folded));
  let [now, linkage] = [turns, layOut(turns)];
  let gap = gapOf(linkage);
  let damping = DAMPING;
  for (let round = 0; round < ROUNDS && gap > closed; round += 1) {
    const change = stepOf(linkage, damping);
    const largest = Math.max(...change.map(Math.abs));
    const scale = largest > STEP ? STEP / largest : 1;
    const next = now.map((turn, index) => turn + (change[index] as number) * scale);
    const laid = layOut(next);
    const left = gapOf(laid);
    if (left >= gap) {
      damping *= 4;
      continue;
    }
    [now, linkage, gap] = [next, laid, left];
    damping = Math.max(1e-3, damping / 3);
  }
  return now;
}

const gapOf = ({ closures }: Linkage): number =>
  Math.max(0, ...closures.map(({ places: [a, b] }) => Math.hypot(a.x - b.x, a.y - b.y, a.z - b.z)));

/** Jᵀ (J Jᵀ + d² I)⁻¹ r, for the gaps r and J, how each hinge moves them. */
function stepOf({ hinges, held, closures, chain }: Linkage, damping: number): readonly number[] {
  const none = vector(0, 0, 0);
  const moved = (facet: number, place: Vector): ReadonlyMap<number, Vector> =>
    new Map(
      chain(facet)
        .filter((hinge) => !held[hinge])
        .map((hinge) => {
          const { at, about } = hinges[hinge] as Hinge;
          return [hinge, cross(about, minus(place, at))];
        }),
    );
  const rows = closures.flatMap(({ facets: [a, b], places: [p, q] }) => {
    const [first, second] = [moved(a, p), moved(b, q)];
    const columns = hinges.map((_, index) => minus(first.get(index) ?? none, second.get(index) ?? none));
    const gap = minus(q, p);
    return (['x', 'y', 'z'] as const).map((axis) => ({ gap: gap[axis], row: columns.map((column) => column[axis]) }));
  });
  const product = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, value, index) => sum + value * (b[index] as number), 0);
  const weights = solve(
    rows.map(({ row }, i) => rows.map((other, k) => product(row, other.row) + (i === k ? damping ** 2 : 0))),
    rows.map(({ gap }) => gap),
  );
  return hinges.map((_, index) =>
    rows.reduce((sum, { row }, i) => sum + (row[index] as number) * (weights[i] as number), 0),
  );
}

/** Gauss's elimination, for a matrix that is symmetric and positive definite. */
function solve(matrix: readonly (readonly number[])[], right: readonly number[]): readonly number[] {
  const rows = matrix.map((row, index) => [...row, right[index] as number]);
  rows.forEach((pivot, index) => {
    for (const row of rows.slice(index + 1)) {
      const share = (row[index] as number) / (pivot[index] as number);
      if (share === 0) continue;
      for (let column = index; column < row.length; column += 1)
        row[column] = (row[column] as number) - share * (pivot[column] as number);
    }
  });
  const found = new Array<number>(rows.length).fill(0);
  for (let index = rows.length - 1; index >= 0; index -= 1) {
    const row = rows[index] as number[];
    const known = found.reduce((sum, value, column) => sum + (column > index ? value * (row[column] as number) : 0), 0);
    found[index] = ((row.at(-1) as number) - known) / (row[index] as number);
  }
  return found;
}
