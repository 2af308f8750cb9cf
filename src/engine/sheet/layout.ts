import { fromNanometres } from '../measure';
import type { Blanks } from './blanks';
import { largestAt } from './offcut';
import { ACROSS, type Tree } from './tree';

/** A rectangle of a sheet in whole nanometres from its top left corner. */
export interface Region {
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
}
/** What becomes of a region: a blank, something left over, or strips cut from it one after another. */
export type Piecework =
  | { readonly is: 'blank'; readonly region: Region; readonly blank: number; readonly turned: boolean }
  | { readonly is: 'over'; readonly region: Region }
  | { readonly is: 'strips'; readonly region: Region; readonly across: boolean; readonly strips: readonly Piecework[] };

/** Settles where the cuts of a sheet run, so that the largest rectangle that they can free stays whole. */
export function layOut(tree: Tree, { sheet }: Blanks): Piecework {
  const region = { x: 0, y: 0, across: sheet.across, along: sheet.along };
  return tree.nodes === 0 ? { is: 'over', region } : settle(tree, 0, region);
}

/** Seen along a node's axis: `main` runs the way its nodes stand side by side, `cross` the other way. */
interface Seen {
  readonly across: boolean;
  readonly length: number;
  readonly depth: number;
}
const part = (
  { x, y }: Region,
  { across }: Seen,
  at: readonly [number, number],
  size: readonly [number, number],
): Region =>
  across
    ? { x: x + at[0], y: y + at[1], across: size[0], along: size[1] }
    : { x: x + at[1], y: y + at[0], across: size[1], along: size[0] };

function settle(tree: Tree, node: number, region: Region): Piecework {
  const code = tree.leaf[node] as number;
  if (code >= 0) return settleBlank(tree, node, region);
  const across = tree.axis[node] === ACROSS;
  const seen: Seen = across
    ? { across, length: region.across, depth: region.along }
    : { across, length: region.along, depth: region.across };
  const main = (child: number) => (across ? tree.across[child] : tree.along[child]) as number;
  const cross = (child: number) => (across ? tree.along[child] : tree.across[child]) as number;
  const children = childrenOf(tree, node).sort((a, b) => cross(b) - cross(a));
  const spare = seen.length - main(node);

  // Which rectangle is the largest: over the lower nodes and beyond them all, or within one node that has the spare length?
  let level = 0;
  let best = spare * seen.depth;
  for (const child of children) {
    const low = children
      .filter((other) => cross(other) <= cross(child))
      .reduce((sum, other) => sum + main(other), spare);
    if (low * (seen.depth - cross(child)) <= best) continue;
    best = low * (seen.depth - cross(child));
    level = cross(child);
  }
  let inside = -1;
  for (const child of children) {
    if ((tree.leaf[child] as number) >= 0) continue;
    const room = part(region, seen, [0, 0], [main(child) + spare, seen.depth]);
    const most = largestAt(tree, child, room.across, room.along, best);
    if (most > best) [best, inside] = [most, child];
  }

  let at = 0;
  const strip = (child: number, length: number, depth: number): Piecework => {
    const place = part(region, seen, [at, 0], [length, depth]);
    at += length;
    return settle(tree, child, place);
  };
  if (inside >= 0) {
    const others = children.filter((child) => child !== inside).map((child) => strip(child, main(child), seen.depth));
    return strips(region, across, [...others, strip(inside, main(inside) + spare, seen.depth)]);
  }
  const high = children.filter((child) => cross(child) > level).map((child) => strip(child, main(child), seen.depth));
  const low = children.filter((child) => cross(child) <= level);
  const start = at;
  const lows = low.map((child) => strip(child, main(child), level));
  const end = part(region, seen, [at, 0], [seen.length - at, level]);
  const group = part(region, seen, [start, 0], [seen.length - start, level]);
  const over = part(region, seen, [start, level], [seen.length - start, seen.depth - level]);
  const lower = strips(group, across, [...lows, { is: 'over', region: end }]);
  const rest = part(region, seen, [start, 0], [seen.length - start, seen.depth]);
  return strips(region, across, [...high, strips(rest, !across, [lower, { is: 'over', region: over }])]);
}

/** A blank in a corner: the larger of the two strips beside it stays whole. */
function settleBlank(tree: Tree, node: number, region: Region): Piecework {
  const [across, along] = [tree.across[node] as number, tree.along[node] as number];
  const code = tree.leaf[node] as number;
  const { x, y } = region;
  const beside = { x: x + across, y, across: region.across - across, along: region.along };
  const below = { x, y: y + along, across: region.across, along: region.along - along };
  const [besideFirst] = [beside.across * beside.along >= below.across * below.along];
  const blank: Piecework = {
    is: 'blank',
    region: { x, y, across, along },
    blank: code >> 1,
    turned: (code & 1) === 1,
  };
  const over = (left: Region): Piecework => ({ is: 'over', region: left });
  if (besideFirst) {
    const column = { x, y, across, along: region.along };
    return strips(region, true, [strips(column, false, [blank, over({ ...below, across })]), over(beside)]);
  }
  const row = { x, y, across: region.across, along };
  return strips(region, false, [strips(row, true, [blank, over({ ...beside, along })]), over(below)]);
}

/** Strips of nothing fall away; one strip alone is what it is; strips among strips of the same direction join them. */
function strips(region: Region, across: boolean, all: readonly Piecework[]): Piecework {
  const some = all
    .filter(({ region: own }) => own.across > 0 && own.along > 0)
    .flatMap((one) => (one.is === 'strips' && one.across === across ? one.strips : [one]));
  return some.length === 1 ? (some[0] as Piecework) : { is: 'strips', region, across, strips: some };
}

function childrenOf({ span }: Tree, node: number): number[] {
  const children: number[] = [];
  const end = node + (span[node] as number);
  for (let child = node + 1; child < end; child += span[child] as number) children.push(child);
  return children;
}

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
}
/** A region in millimetres, moved in by the margin. */
export const boxOf = (region: Region, margin: number): Box => ({
  x: fromNanometres(region.x + margin),
  y: fromNanometres(region.y + margin),
  across: fromNanometres(region.across),
  along: fromNanometres(region.along),
});
