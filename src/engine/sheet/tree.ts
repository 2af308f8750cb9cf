import type { Blanks } from './blanks';

/*
 * A sheet's parts as a tree of straight cuts. A leaf is a blank, laid as drawn or turned; an inner node holds two or more
 * nodes side by side (across) or one below the other (along), and is as large as they are together. Nothing is said of where
 * the cuts run in what is left over: a blank may join at any node as long as the whole does not outgrow the sheet, and the
 * cuts are settled at the end (layout.ts). That freedom is what makes plans close.
 *
 * The search changes trees some hundred thousand times a second, so a tree is kept flat, each node before all that is under
 * it, in columns that are written over.
 */
export const ACROSS = 0;
export const ALONG = 1;

export interface Tree {
  nodes: number;
  /** Twice the blank, plus one when it is turned; −1 at an inner node. */
  leaf: Int32Array;
  /** Nodes under and including this one. */
  span: Int32Array;
  /** How an inner node sets its nodes; at a leaf, how it would be joined: across the way that it is set itself. */
  axis: Int8Array;
  across: Float64Array;
  along: Float64Array;
  /** The largest blank that may join at this node along its axis; one place more, after the last, for the whole tree the other way. */
  roomAcross: Float64Array;
  roomAlong: Float64Array;
  /** By how much a node may still grow, before the whole outgrows the sheet. */
  spareAcross: Float64Array;
  spareAlong: Float64Array;
  /** No room is larger than this on its shorter side, and than that on its longer. */
  roomShort: number;
  roomLong: number;
  /** Of the blanks in it. */
  area: number;
  /** As it was before a trial. */
  readonly kept: { nodes: number; area: number; leaf: Int32Array; span: Int32Array; axis: Int8Array };
}
/** What is enough to build a tree again. */
export interface TreeShape {
  readonly leaf: Int32Array;
  readonly span: Int32Array;
  readonly axis: Int8Array;
}

const START = 32;
export function emptyTree(blanks: Blanks): Tree {
  const column = () => new Float64Array(START);
  const tree: Tree = {
    nodes: 0,
    leaf: new Int32Array(START),
    span: new Int32Array(START),
    axis: new Int8Array(START),
    across: column(),
    along: column(),
    roomAcross: column(),
    roomAlong: column(),
    spareAcross: column(),
    spareAlong: column(),
    roomShort: 0,
    roomLong: 0,
    area: 0,
    kept: { nodes: 0, area: 0, leaf: new Int32Array(START), span: new Int32Array(START), axis: new Int8Array(START) },
  };
  measureTree(tree, blanks);
  return tree;
}
/** Notes a tree as it is, for `takeBack`. */
export function note({ kept, nodes, area, leaf, span, axis }: Tree): void {
  kept.nodes = nodes;
  kept.area = area;
  if (kept.leaf.length < nodes) {
    kept.leaf = new Int32Array(leaf.length);
    kept.span = new Int32Array(leaf.length);
    kept.axis = new Int8Array(leaf.length);
  }
  for (let node = 0; node < nodes; node += 1) {
    kept.leaf[node] = leaf[node] as number;
    kept.span[node] = span[node] as number;
    kept.axis[node] = axis[node] as number;
  }
}
export function takeBack(tree: Tree, blanks: Blanks): void {
  const { kept, leaf, span, axis } = tree;
  tree.nodes = kept.nodes;
  tree.area = kept.area;
  for (let node = 0; node < kept.nodes; node += 1) {
    leaf[node] = kept.leaf[node] as number;
    span[node] = kept.span[node] as number;
    axis[node] = kept.axis[node] as number;
  }
  measureTree(tree, blanks);
}
export const shapeOf = ({ nodes, leaf, span, axis }: Tree): TreeShape => ({
  leaf: leaf.slice(0, nodes),
  span: span.slice(0, nodes),
  axis: axis.slice(0, nodes),
});
export function treeOf({ leaf, span, axis }: TreeShape, blanks: Blanks): Tree {
  const tree = emptyTree(blanks);
  while (tree.leaf.length < leaf.length + 4) grow(tree);
  tree.leaf.set(leaf);
  tree.span.set(span);
  tree.axis.set(axis);
  tree.nodes = leaf.length;
  for (const code of leaf) if (code >= 0) tree.area += blanks.area[code >> 1] as number;
  measureTree(tree, blanks);
  return tree;
}

function grow(tree: Tree): void {
  const wider = <T extends Int32Array | Int8Array | Float64Array>(column: T): T => {
    const next = new (column.constructor as new (length: number) => T)(2 * column.length);
    next.set(column);
    return next;
  };
  tree.leaf = wider(tree.leaf);
  tree.span = wider(tree.span);
  tree.axis = wider(tree.axis);
  tree.across = wider(tree.across);
  tree.along = wider(tree.along);
  tree.roomAcross = wider(tree.roomAcross);
  tree.roomAlong = wider(tree.roomAlong);
  tree.spareAcross = wider(tree.spareAcross);
  tree.spareAlong = wider(tree.spareAlong);
}

/** Works out sizes from the leaves up, then what may still grow from the root down, and so the room at every node. */
export function measureTree(tree: Tree, blanks: Blanks): void {
  if (tree.nodes === 0) {
    const { sheet } = blanks;
    tree.axis[0] = ACROSS;
    tree.roomAcross[0] = sheet.across;
    tree.roomAlong[0] = sheet.along;
    tree.roomShort = Math.min(sheet.across, sheet.along);
    tree.roomLong = Math.max(sheet.across, sheet.along);
    return;
  }
  measureSizes(tree, blanks);
  measureRoom(tree, blanks);
}
function measureSizes({ nodes, leaf, span, axis, across, along }: Tree, blanks: Blanks): void {
  for (let node = nodes - 1; node >= 0; node -= 1) {
    const code = leaf[node] as number;
    if (code >= 0) {
      const blank = code >> 1;
      const turned = (code & 1) === 1;
      across[node] = (turned ? blanks.along[blank] : blanks.across[blank]) as number;
      along[node] = (turned ? blanks.across[blank] : blanks.along[blank]) as number;
      continue;
    }
    const end = node + (span[node] as number);
    const main = axis[node] === ACROSS ? across : along;
    const cross = axis[node] === ACROSS ? along : across;
    let sum = 0;
    let most = 0;
    for (let child = node + 1; child < end; child += span[child] as number) {
      sum += main[child] as number;
      if ((cross[child] as number) > most) most = cross[child] as number;
    }
    main[node] = sum;
    cross[node] = most;
  }
}
function measureRoom(tree: Tree, { sheet }: Blanks): void {
  const { nodes, leaf, span, axis, across, along, roomAcross, roomAlong, spareAcross, spareAlong } = tree;
  spareAcross[0] = sheet.across - (across[0] as number);
  spareAlong[0] = sheet.along - (along[0] as number);
  if ((leaf[0] as number) >= 0) axis[0] = ALONG;
  axis[nodes] = 1 - (axis[0] as number);
  let short = 0;
  let long = 0;
  for (let node = 0; node <= nodes; node += 1) {
    // One place past the last stands for the whole tree, joined the other way.
    const at = node === nodes ? 0 : node;
    const way = axis[node] as number;
    const wide = spareAcross[at] as number;
    const tall = spareAlong[at] as number;
    if (node < nodes && (leaf[node] as number) < 0) {
      const end = node + (span[node] as number);
      for (let child = node + 1; child < end; child += span[child] as number) {
        spareAcross[child] = way === ACROSS ? wide : wide + (across[node] as number) - (across[child] as number);
        spareAlong[child] = way === ACROSS ? tall + (along[node] as number) - (along[child] as number) : tall;
        if ((leaf[child] as number) >= 0) axis[child] = 1 - way;
      }
    }
    const roomWide = way === ACROSS ? wide : wide + (across[at] as number);
    const roomTall = way === ACROSS ? tall + (along[at] as number) : tall;
    roomAcross[node] = roomWide;
    roomAlong[node] = roomTall;
    const less = roomWide < roomTall ? roomWide : roomTall;
    const more = roomWide < roomTall ? roomTall : roomWide;
    if (less > short) short = less;
    if (less > 0 && more > long) long = more;
  }
  tree.roomShort = short;
  tree.roomLong = long;
}

/** Lets a blank join at a node (`nodes` itself: the whole tree the other way), and measures the tree again. */
export function join(tree: Tree, node: number, code: number, blanks: Blanks): void {
  if (tree.nodes + 4 > tree.leaf.length) grow(tree);
  const { nodes, leaf, span, axis } = tree;
  tree.area += blanks.area[code >> 1] as number;
  let at = node;
  if (nodes === 0) tree.nodes = 1;
  else if (node < nodes && (leaf[node] as number) < 0) {
    widenAbove(tree, node, 1);
    at = node + 1;
    open(tree, at, 1);
    span[node] = (span[node] as number) + 1;
  } else {
    // A new inner node takes the place of this one, and holds it beside the blank.
    const held = node === nodes ? 0 : node;
    const way = axis[node] as number;
    widenAbove(tree, held, 2);
    const under = span[held] as number;
    open(tree, held, 2);
    leaf[held] = -1;
    span[held] = under + 2;
    axis[held] = way;
    at = held + 1;
  }
  leaf[at] = code;
  span[at] = 1;
  measureTree(tree, blanks);
}
/** Lets every node that holds this one hold so many more. */
function widenAbove({ span }: Tree, node: number, by: number): void {
  for (let above = 0; above < node; above += 1)
    if (above + (span[above] as number) > node) span[above] = (span[above] as number) + by;
}

/** Takes a node and all under it away; blanks go to `out`. The tree must be measured again before it is read. */
export function take(tree: Tree, node: number, blanks: Blanks, out: number[]): void {
  const { nodes, leaf, span } = tree;
  const gone = span[node] as number;
  for (let each = node; each < node + gone; each += 1) {
    const code = leaf[each] as number;
    if (code < 0) continue;
    out.push(code >> 1);
    tree.area -= blanks.area[code >> 1] as number;
  }
  if (gone === nodes) {
    tree.nodes = 0;
    tree.area = 0;
    return;
  }
  let parent = -1;
  let over = -1;
  for (let above = 0; above < node; above += 1) {
    if (above + (span[above] as number) <= node) continue;
    span[above] = (span[above] as number) - gone;
    over = parent;
    parent = above;
  }
  open(tree, node + gone, -gone);
  // A node that holds one node only is that node; set as the node above sets its own, it melts into it.
  if ((span[parent + 1] as number) + 1 !== span[parent]) return;
  const melts = over >= 0 && (leaf[parent + 1] as number) < 0 ? 2 : 1;
  widenAbove(tree, parent, -melts);
  open(tree, parent + melts, -melts);
}

/** Moves all from a place on by so many places. */
function open(tree: Tree, at: number, by: number): void {
  const { nodes, leaf, span, axis } = tree;
  leaf.copyWithin(at + by, at, nodes);
  span.copyWithin(at + by, at, nodes);
  axis.copyWithin(at + by, at, nodes);
  tree.nodes += by;
}
