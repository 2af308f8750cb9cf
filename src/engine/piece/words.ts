import { inWords, coincident, isZero, same, snap } from '../measure';
import { areaOf, distance } from '../net';
import type { Arc, Net, PieceDef, PieceFigure, Point, Sentence, SentenceFigure, Side } from '../types';
import { hangs, type Cell } from './cells';
import { layerWords } from './layer-words';
import { shapeWords } from './shape-words';
import type { GridPiece } from './grid';

export interface WordsOptions {
  readonly net: Net;
  /** The worked-out grid; null for pieces of the other builders. */
  readonly grid: GridPiece | null;
  readonly def: PieceDef;
  /** A layer's faces and margin, and how many are cut. */
  readonly layer?: PieceFigure['layer'];
  readonly count?: number;
  /** Positions of scores from the left and from the top edge. */
  readonly scores: { readonly across: readonly number[]; readonly along: readonly number[] };
  /** Splits a position into what a ruler shows and card thicknesses. */
  readonly figure: (mm: number, bare?: boolean) => SentenceFigure;
}
interface GridWords extends WordsOptions {
  readonly grid: GridPiece;
}

/**
 * The making of a piece in words, as a maker says it: the blank, the scores read from one edge (twice the same from both
 * ends is said once), what is cut away, slits, tapers, teeth, arcs, rounded corners, notches and slots. Enough to draw the
 * piece again without a picture.
 */
export function makingOf(options: WordsOptions): readonly Sentence[] {
  const { def, grid } = options;
  return [
    blank(options),
    ...(grid ? gridWords({ ...options, grid }) : shapeWords(options)),
    ...layerWords(options),
    ...folding(options),
    ...(def.remarks ?? []).map((remark) => [remark]),
  ];
}
const gridWords = (options: GridWords): Sentence[] => [
  ...scoring(options),
  ...pencilling(options),
  ...cuttingAway(options),
  ...tabsInWords(options),
  ...shapedInWords(options),
  ...arcs(options),
  ...corners(options),
  ...notches(options),
  ...slots(options),
  ...holes(options),
  ...creases(options),
];

type Part = Sentence[number];

/** `a, b and c` out of parts. */
function listed(items: readonly (readonly Part[])[]): Part[] {
  return items.flatMap((item, index) => [
    ...(index === 0 ? [] : [index === items.length - 1 ? ' and ' : ', ']),
    ...item,
  ]);
}

function blank({ net, def, figure }: WordsOptions): Sentence {
  const from = def.builder === 'layer' ? ` from ${def.stock}.` : '.';
  return ['Cut ', figure(net.across, true), ' × ', figure(net.along), from];
}

function scoring({ net, scores, figure }: WordsOptions): Sentence[] {
  const { across, along } = net;
  const square = same(across, along);
  const [wide, tall] = [scores.across, scores.along];
  if (wide.length === 0 && tall.length === 0) return [];
  const evenly = (positions: readonly number[], size: number) =>
    positions.length === 2 && same((positions[0] as number) + (positions[1] as number), size);
  if (evenly(wide, across) && evenly(tall, along) && same(wide[0] as number, tall[0] as number)) {
    return [['Score at ', figure(wide[0] as number), ' from each of the four sides.']];
  }
  const at = (positions: readonly number[], size: number): Part[] =>
    evenly(positions, size)
      ? ['at ', figure(positions[0] as number), ' from each end']
      : ['at ', ...listed(positions.map((position) => [figure(position, true)]))];
  if (
    square &&
    wide.length > 0 &&
    wide.length === tall.length &&
    wide.every((position, index) => same(position, tall[index] as number))
  ) {
    return [['Along one side score ', ...at(wide, across), '; give it a quarter turn and score the same again.']];
  }
  const first: Part[] =
    wide.length === 0
      ? []
      : [
          'Along the ',
          figure(across),
          square ? ' side from left to right score ' : ' side score ',
          ...at(wide, across),
          '.',
        ];
  if (tall.length === 0) return [first];
  const turned: Part[] = [
    wide.length === 0 ? 'Along the ' : square ? 'Give it a quarter turn; along the other ' : 'Turn; along the ',
    figure(along),
    ' side score ',
    ...at(tall, along),
    '.',
  ];
  return first.length === 0 ? [turned] : [first, turned];
}

/** Tabs that go on without a fold: a line to glue to. */
function pencilling({ net, figure }: GridWords): Sentence[] {
  const { across, along } = seamsOf(net);
  const line = (size: number, at: readonly number[]): Sentence[] =>
    at.length === 0
      ? []
      : [
          [
            'Along the ',
            figure(size),
            ` side draw ${at.length === 1 ? 'a pencil line' : 'pencil lines'} at `,
            ...listed(at.map((position) => [figure(position, true)])),
            `; do not score ${at.length === 1 ? 'it' : 'them'}.`,
          ],
        ];
  return [...line(net.across, across), ...line(net.along, along)];
}
/** Positions of the upright and level lines at which a tab goes on without a fold. */
export function seamsOf(net: Net): { readonly across: readonly number[]; readonly along: readonly number[] } {
  const seams = net.folds.filter(({ curve, angle }) => curve.type === 'line' && isZero(angle));
  const places = (read: (point: Point) => number) =>
    seams
      .filter(({ curve }) => same(read(curve.from), read(curve.to)))
      .map(({ curve }) => snap(read(curve.from)))
      .sort((a, b) => a - b)
      .filter((value, index, all) => index === 0 || !same(value, all[index - 1] as number));
  return { across: places(({ x }) => x), along: places(({ y }) => y) };
}

/** Corners of the blank that fall away, and rectangles elsewhere on its edge. */
function cuttingAway({ net, grid }: GridWords): Sentence[] {
  const away = grid.cells.flat().filter((cell) => cell.kind === 'away');
  if (away.length === 0) return [];
  const [lastRow, lastColumn] = [grid.cells.length - 1, (grid.cells[0]?.length ?? 1) - 1];
  const isCorner = (cell: Cell) =>
    (cell.row === 0 || cell.row === lastRow) && (cell.column === 0 || cell.column === lastColumn);
  const cornerCells = away.filter(isCorner);
  const shape = (cells: readonly Cell[]) =>
    cells.every((cell) => same(grid.columns[cell.column] as number, grid.rows[cell.row] as number))
      ? 'square'
      : 'piece';
  const sentences: Sentence[] = [];
  if (cornerCells.length > 0) {
    const which =
      cornerCells.length === 4
        ? 'the four corner '
        : `the ${cornerCells.length === 1 ? '' : `${inWords(cornerCells.length)} `}corner `;
    const places =
      cornerCells.length === 4
        ? ''
        : ` at the ${[...new Set(cornerCells.map((cell) => placeOf(cell, lastRow, lastColumn, cornerCells)))].join(' and ')}`;
    sentences.push([
      `Cut away ${which}${shape(cornerCells)}${cornerCells.length === 1 ? '' : 's'}${places}, along the scores.`,
    ]);
  }
  if (away.length > cornerCells.length) sentences.push(['Cut away what the drawing crosses out.']);
  return isZero(net.across) ? [] : sentences;
}
function placeOf(cell: Cell, lastRow: number, lastColumn: number, all: readonly Cell[]): string {
  const vertical = cell.row === 0 ? 'top' : 'bottom';
  const horizontal = cell.column === 0 ? 'left' : 'right';
  if (all.every((other) => other.row === cell.row) && all.length > 1) return vertical;
  if (all.every((other) => other.column === cell.column) && all.length > 1) return horizontal;
  return lastRow === 0 || lastColumn === 0 ? horizontal : `${vertical} ${horizontal}`;
}

/** Slits, tapers and teeth of the tabs, alike ones together. */
function tabsInWords({ grid, net, figure }: GridWords): Sentence[] {
  const tabs = grid.cells
    .flat()
    .filter(
      (cell) =>
        hangs(cell) &&
        !grid.tabs.get(cell.name)?.shape &&
        net.panels.some((panel) => panel.name === cell.name || panel.name.startsWith(`${cell.name} `)),
    );
  const sentences: Sentence[] = [];
  const slit = tabs.filter(
    (cell) => neighbours(grid, cell).filter((other) => other.kind !== 'away' && !hangs(other)).length > 1,
  );
  if (slit.length > 0) {
    const [first] = slit as [Cell];
    const hinge = hingeOf(grid, first);
    const score = hinge === 'top' || hinge === 'bottom' ? 'left-to-right edge' : 'top-to-bottom edge';
    const size = score === 'left-to-right edge' ? grid.rows[first.row] : grid.columns[first.column];
    sentences.push([
      `${slit.length === 1 ? 'Slit the corner' : `Slit ${inWords(slit.length)} corners`} from the ${score}, along the score, `,
      figure(size as number),
      ` deep, to the crossing: ${slit.length === 1 ? 'it becomes a tab' : 'they become tabs'}.`,
    ]);
  }
  const tapers = new Map<string, { says: Part[]; cells: Cell[] }>();
  for (const cell of tabs) {
    const shape = grid.tabs.get(cell.name);
    if (!shape || shape.teeth > 1) continue;
    const hinge = hingeOf(grid, cell);
    const ends = Object.entries(shape.ends).filter(
      ([side, end]) =>
        side !== hinge && side !== opposite(hinge) && !isZero('mm' in end.by ? end.by.mm : end.by.degrees),
    );
    if (ends.length === 0) continue;
    const key = ends.map(([side, end]) => `${side} ${JSON.stringify(end)}`).join();
    const amount = (end: (typeof ends)[number][1]): Part[] =>
      'mm' in end.by ? [figure(end.by.mm), ' at the tip'] : [`${Math.round(end.by.degrees * 10) / 10}°`];
    const [a, b] = ends;
    const alike = a && b && JSON.stringify(a[1].by) === JSON.stringify(b[1].by);
    const says: Part[] = alike
      ? ['at both ends by ', ...amount(a[1])]
      : listed(ends.map(([side, end]) => [`at the ${side} end by `, ...amount(end)]));
    const group = tapers.get(alike ? JSON.stringify(a[1].by) : key) ?? { says, cells: [] };
    group.cells.push(cell);
    tapers.set(alike ? JSON.stringify(a[1].by) : key, group);
  }
  for (const { says, cells } of tapers.values()) {
    const which =
      cells.length === tabs.length
        ? cells.length === 1
          ? 'the tab'
          : 'all tabs'
        : cells.length > 2
          ? `the ${inWords(cells.length)} tabs`
          : listed(cells.map((cell) => [`the tab “${cell.name}”`])).join('');
    sentences.push([`Taper ${which} `, ...says, '.']);
  }
  for (const cell of tabs) {
    const shape = grid.tabs.get(cell.name);
    const [root, , tip] = net.panels.find((panel) => panel.name === `${cell.name} 2`)?.loop ?? [];
    if (shape && shape.teeth > 1 && root && tip)
      sentences.push([
        `Cut the tab “${cell.name}” into ${inWords(Math.round(shape.teeth))} teeth, each `,
        figure(distance(root.from, root.to)),
        ' wide at the score and ',
        figure(distance(tip.from, tip.to)),
        ' at the tip: a narrow V between each two, down to the score.',
      ]);
    if (shape?.depth !== null && shape?.depth !== undefined) {
      const hinge = hingeOf(grid, cell);
      const full = hinge === 'top' || hinge === 'bottom' ? grid.rows[cell.row] : grid.columns[cell.column];
      if (
        !same(shape.depth, full as number) &&
        cell === tabs.find((one) => grid.tabs.get(one.name)?.depth === shape.depth)
      ) {
        sentences.push(['Trim the tabs to ', figure(shape.depth), ' deep, so that two on one wall do not meet.']);
      }
    }
  }
  return sentences;
}

/** Flaps of a shape of their own, corner by corner; alike ones together. */
function shapedInWords({ grid, net, figure }: GridWords): Sentence[] {
  const alike = new Map<string, Cell[]>();
  for (const cell of grid.cells.flat()) {
    const { shape, round } = grid.tabs.get(cell.name) ?? {};
    if (!hangs(cell) || !shape || !net.panels.some((panel) => panel.name === cell.name)) continue;
    const from = ['left', 'right'].includes(hingeOf(grid, cell)) ? 'top' : 'left';
    const key = JSON.stringify([from, shape, round]);
    const group = alike.get(key) ?? [];
    if (!group.some(({ name }) => name === cell.name)) alike.set(key, [...group, cell]);
  }
  return [...alike].map(([key, cells]): Sentence => {
    const [from, shape, round] = JSON.parse(key) as [string, [number, number][], number];
    return [
      `Cut ${cells.map(({ name }) => `“${name}”`).join(' and ')} by these corners, along the score from its ${from} end and out from it: `,
      ...shape.flatMap(([along, out], index): Part[] => [
        index === 0 ? '' : '; ',
        figure(along, true),
        ' along, ',
        figure(out, true),
        ' out',
      ]),
      ...(isZero(round) ? ['.'] : ['. Round the two corners at its tip to a radius of ', figure(round), '.']),
    ];
  });
}
const opposite = (side: Side): Side =>
  (({ top: 'bottom', bottom: 'top', left: 'right', right: 'left' }) as const)[side];
const STEPS: readonly [Side, number, number][] = [
  ['top', -1, 0],
  ['right', 0, 1],
  ['bottom', 1, 0],
  ['left', 0, -1],
];
const neighbours = (grid: GridPiece, cell: Cell): Cell[] =>
  STEPS.flatMap(([, dr, dc]) => grid.cells[cell.row + dr]?.[cell.column + dc] ?? []);
function hingeOf(grid: GridPiece, cell: Cell): Side {
  const found = STEPS.find(([, dr, dc]) => {
    const other = grid.cells[cell.row + dr]?.[cell.column + dc];
    return other !== undefined && other.kind !== 'away' && (cell.on === null ? !hangs(other) : other.name === cell.on);
  });
  return found?.[0] ?? 'bottom';
}

function arcs({ grid, net, figure }: GridWords): Sentence[] {
  return grid.cells
    .flat()
    .filter((cell) => cell.kind === 'cap')
    .flatMap((cell) => {
      const arc = net.panels
        .find((panel) => panel.name === cell.name)
        ?.loop.find((curve): curve is Arc => curve.type === 'arc');
      if (!arc) return [];
      const side = hingeOf(grid, cell);
      const chord = side === 'top' || side === 'bottom' ? grid.columns[cell.column] : grid.rows[cell.row];
      const cut = net.outline.some(
        (curve) =>
          curve.type === 'arc' && coincident(curve.centre.x, arc.centre.x) && coincident(curve.centre.y, arc.centre.y),
      );
      return [
        [
          `At the ${opposite(side)} draw the arc of a `,
          figure(2 * arc.radius),
          ' circle over the ',
          figure(chord as number),
          cut
            ? ' between the scores and cut round it.'
            : ' between the scores: it is a score, and the teeth stand outside it.',
        ],
      ];
    });
}

function corners({ grid, figure }: GridWords): Sentence[] {
  const groups = new Map<number, string[]>();
  for (const { corner, radius } of grid.corners)
    if (!isZero(radius)) groups.set(radius, [...(groups.get(radius) ?? []), corner]);
  return [...groups].map(([radius, names]) => [
    `Round the ${names.length === 4 ? 'four corners' : `${names.join(' and ')} corner${names.length === 1 ? '' : 's'}`} to a radius of `,
    figure(radius),
    '.',
  ]);
}
function notches({ grid, figure }: GridWords): Sentence[] {
  return grid.notches.map(({ cell, side, at, radius }) => [
    `Cut a half-round notch of `,
    figure(radius),
    ` radius into the ${side} edge of “${cell}”, its middle `,
    figure(at),
    ` from the ${side === 'top' || side === 'bottom' ? 'score on its left' : 'score above it'}.`,
  ]);
}
/** What is wider both ways is a window. */
const LARGEST_SLOT = 12.7;
function slots({ grid, figure }: GridWords): Sentence[] {
  return grid.slots.map(({ cell, across, along, width, height }) => [
    `In “${cell}” cut a ${Math.min(width, height) > LARGEST_SLOT ? 'window' : 'slot'} `,
    figure(width, true),
    ' × ',
    figure(height),
    ', its middle ',
    figure(across),
    ' from the left of that panel and ',
    figure(along),
    ' from its top.',
  ]);
}
function folding({ net }: WordsOptions): Sentence[] {
  const mountains = net.folds.filter((fold) => fold.kind === 'mountain');
  if (mountains.length > 0) return [['Fold the dash-dot lines away from you, all others towards you.']];
  return net.folds.some((fold) => fold.angle !== 0) && areaOf(net.outline) > 0
    ? [['Fold every score towards you and burnish it.']]
    : [];
}

function holes({ grid, figure }: GridWords): Sentence[] {
  return grid.holes.map(({ cell, across, along, diameter }) => [
    `In “${cell}” punch a hole of `,
    figure(diameter),
    ' diameter, its middle ',
    figure(across),
    ' from the left of that panel and ',
    figure(along),
    ' from its top.',
  ]);
}
function creases({ grid, figure }: GridWords): Sentence[] {
  return grid.creases.map(({ cell, is, from, to }) => [
    `In “${cell}” score a ${is} fold from `,
    figure(from[0], true),
    ' across and ',
    figure(from[1], true),
    ' down to ',
    figure(to[0], true),
    ' across and ',
    figure(to[1], true),
    ' down.',
  ]);
}
