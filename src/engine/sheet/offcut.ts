import type { Blanks } from './blanks';
import { ACROSS, type Tree } from './tree';

/** Area of the largest rectangle that straight cuts can free on a sheet without cutting a part. */
export function largestOffcut(tree: Tree, { sheet }: Blanks): number {
  return tree.nodes === 0 ? sheet.area : largestAt(tree, 0, sheet.across, sheet.along, 0);
}

/** The same within a region that holds a node, where it beats `least`. */
export function largestAt(tree: Tree, node: number, regionAcross: number, regionAlong: number, least: number): number {
  const { leaf, span, axis, across, along } = tree;
  if ((leaf[node] as number) >= 0)
    return Math.max(
      least,
      (regionAcross - (across[node] as number)) * regionAlong,
      regionAcross * (regionAlong - (along[node] as number)),
    );
  // Seen along the axis: nodes stand side by side, each with what is over beyond it.
  const ways = axis[node] === ACROSS;
  const main = ways ? across : along;
  const cross = ways ? along : across;
  const length = ways ? regionAcross : regionAlong;
  const depth = ways ? regionAlong : regionAcross;
  const spare = length - (main[node] as number);
  let best = Math.max(least, spare * depth);
  const end = node + (span[node] as number);
  for (let child = node + 1; child < end; child += span[child] as number) {
    // The lower ones side by side, then one cut beyond the highest of them frees all that lies over them.
    const level = cross[child] as number;
    let low = spare;
    for (let other = node + 1; other < end; other += span[other] as number)
      if ((cross[other] as number) <= level) low += main[other] as number;
    best = Math.max(best, low * (depth - level));
  }
  for (let child = node + 1; child < end; child += span[child] as number) {
    if ((leaf[child] as number) >= 0) continue;
    const room = (main[child] as number) + spare;
    if (room * depth <= best) continue;
    best = ways ? largestAt(tree, child, room, depth, best) : largestAt(tree, child, depth, room, best);
  }
  return best;
}
