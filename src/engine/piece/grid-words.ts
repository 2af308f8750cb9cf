import { decimal, inWords, isZero, moreThan, same } from '../measure';
import { distance } from '../net';
import type { Arc, Net, Point, Sentence, Side } from '../types';
import { OPPOSITE, SIDES, hangs, type Cell } from './cells';
import { cuttingOut } from './cut-words';
import type { GridPiece, TabShape } from './grid';
import { counted, figures, holes, listed, scoresIn, scoring, slits, type Part, type Said } from './line-words';

interface GridSaid extends Said {
  readonly grid: GridPiece;
}
/** A corner of the blank that falls away: whole cells. */
interface Corner {
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  readonly name: readonly [Side, Side];
  readonly wide: number;
  readonly tall: number;
}
interface Tab {
  readonly cell: Cell;
  readonly hinge: Side;
  readonly shape: TabShape | undefined;
}
/** A grid that a maker would speak of by its corners and tabs. */
interface Simple extends GridSaid {
  readonly away: readonly Corner[];
  /** Corner cells slit free from one of their two neighbours. */
  readonly corner: readonly Tab[];
  /** Tabs that fill one side of the piece. */
  readonly strips: readonly Tab[];
}

/** Grids by their corners and tabs when that says it all, else by the cuts from edge to edge. */
export function gridWords(said: GridSaid): Sentence[] {
  const simple = simpleOf(said);
  return simple
    ? [
        ...scoring(said),
        ...pencilling(said),
        ...cuttingAway(simple),
        ...slitting(simple),
        ...tapers(simple),
        ...teeth(simple),
        ...arcs(simple),
        ...corners(simple),
        ...notches(simple),
        ...holes(said),
      ]
    : [...scoring(said), ...pencilling(said), ...cuttingOut(said), ...slits(said), ...holes(said)];
}

function simpleOf(said: GridSaid): Simple | null {
  const { net, grid } = said;
  const { parts, free } = scoresIn(net);
  const away = cornersAway(grid);
  const hanging = grid.cells
    .flat()
    .filter((cell) => hangs(cell) && net.panels.some(({ name }) => name === cell.name || name === `${cell.name} 1`));
  const tabs = hanging.map((cell): Tab => ({ cell, hinge: hingeOf(grid, cell), shape: grid.tabs.get(cell.name) }));
  const corner = tabs.filter(
    ({ cell }) => neighbours(grid, cell).filter((other) => other.kind !== 'away' && !hangs(other)).length > 1,
  );
  const strips = tabs.filter((tab) => !corner.includes(tab));
  const ends = ({ shape }: Tab) => Object.values(shape?.ends ?? {});
  const plain =
    away !== null &&
    parts.length + free.filter(({ curve }) => curve.type === 'line').length + grid.creases.length === 0 &&
    new Set(hanging.map(({ name }) => name)).size === hanging.length &&
    tabs.every(({ shape }) => !shape?.shape && isZero(shape?.round ?? 0)) &&
    new Set(strips.map(({ hinge }) => hinge)).size === strips.length &&
    strips.every(
      (tab) => isOutermost(grid, tab) && tab.shape?.depth == null && ends(tab).every(({ from }) => isZero(from)),
    ) &&
    strips.every((tab) => (tab.shape?.teeth ?? 1) === 1 || ends(tab).length === 0) &&
    corner.every((tab) => alikeTabs(tab, corner[0] as Tab)) &&
    grid.corners.every(({ cell }) => grid.cells.flat().every(({ name }) => name === cell));
  return plain && away ? { ...said, away, corner, strips } : null;
}
/** Corner tabs of one kind: what they give way by, and where, is said once for all. */
function alikeTabs(a: Tab, b: Tab): boolean {
  const [upright, ...kinds] = [a, b].map(({ hinge, shape }) => {
    const [ends, level] = [Object.values(shape?.ends ?? {}), hinge === 'top' || hinge === 'bottom'];
    const by = new Set(ends.map((end) => JSON.stringify(end.by)));
    return {
      level,
      depth: shape?.depth,
      by: [...by],
      from: ends.map(({ from }) => from).sort(),
      teeth: shape?.teeth ?? 1,
    };
  });
  return (
    JSON.stringify(upright) === JSON.stringify(kinds[0]) &&
    (upright?.by.length ?? 0) <= 1 &&
    upright?.teeth === 1 &&
    isZero(upright.from[0] ?? 0)
  );
}
const isOutermost = (grid: GridPiece, { cell, hinge }: Tab): boolean => {
  const [rows, columns] = [grid.rows.length - 1, grid.columns.length - 1];
  return { top: cell.row === rows, bottom: cell.row === 0, left: cell.column === columns, right: cell.column === 0 }[
    hinge
  ];
};

/** Rectangles of cells cut away at the blank's corners; null when anything else is cut away. */
function cornersAway({ cells, columns, rows }: GridPiece): Corner[] | null {
  const isAway = (row: number, column: number) => cells[row]?.[column]?.kind === 'away';
  const run = (count: number, last: boolean, kept: (index: number) => boolean): number[] => {
    const order = Array.from({ length: count }, (_, index) => (last ? count - 1 - index : index));
    const end = order.findIndex((index) => !kept(index));
    return end < 0 ? order : order.slice(0, end);
  };
  const found = (['top', 'bottom'] as const).flatMap((end) =>
    (['left', 'right'] as const).flatMap((side): Corner[] => {
      const [row, column] = [end === 'top' ? 0 : rows.length - 1, side === 'left' ? 0 : columns.length - 1];
      if (!isAway(row, column)) return [];
      const wide = run(columns.length, side === 'right', (one) => isAway(row, one));
      const tall = run(rows.length, end === 'bottom', (one) => wide.every((other) => isAway(one, other)));
      const sum = (sizes: readonly number[], of: readonly number[]) =>
        of.reduce((total, one) => total + (sizes[one] as number), 0);
      return [{ rows: tall, columns: wide, name: [end, side], wide: sum(columns, wide), tall: sum(rows, tall) }];
    }),
  );
  const covered = found.reduce((sum, one) => sum + one.rows.length * one.columns.length, 0);
  return covered === cells.flat().filter(({ kind }) => kind === 'away').length ? found : null;
}

/** Tabs that go on without a fold: a line to glue to. */
function pencilling(said: GridSaid): Sentence[] {
  const { across, along } = seamsOf(said.net);
  const line = (size: number, at: readonly number[]): Sentence[] =>
    at.length === 0
      ? []
      : [
          [
            'Along the ',
            said.figure(size),
            ` side draw ${at.length === 1 ? 'a pencil line' : 'pencil lines'} at `,
            ...figures(said, at),
            `; do not score ${at.length === 1 ? 'it' : 'them'}.`,
          ],
        ];
  return [...line(said.net.across, across), ...line(said.net.along, along)];
}
/** Positions of the upright and level lines at which a tab goes on without a fold. */
export function seamsOf(net: Net): { readonly across: readonly number[]; readonly along: readonly number[] } {
  const seams = net.folds.filter(({ curve, angle }) => curve.type === 'line' && isZero(angle));
  const places = (read: (point: Point) => number) =>
    seams
      .filter(({ curve }) => same(read(curve.from), read(curve.to)))
      .map(({ curve }) => read(curve.from))
      .sort((a, b) => a - b)
      .filter((value, index, all) => index === 0 || !same(value, all[index - 1] as number));
  return { across: places(({ x }) => x), along: places(({ y }) => y) };
}

/** `the four corner squares`, `the two corner pieces at the top`: those along the outermost lines, then others by their size. */
function cuttingAway({ away, net, figure }: Simple): Sentence[] {
  const { valley } = scoresIn(net);
  const seams = seamsOf(net);
  const lines = [
    [...valley[0], ...seams.across],
    [...valley[1], ...seams.along],
  ].map((list) => list.sort((a, b) => a - b));
  const onLine = ({ name: [end, side], wide, tall }: Corner) =>
    same(side === 'left' ? wide : net.across - wide, lines[0]?.at(side === 'left' ? 0 : -1) ?? -1) &&
    same(end === 'top' ? tall : net.along - tall, lines[1]?.at(end === 'top' ? 0 : -1) ?? -1);
  const groups = new Map<string, Corner[]>();
  for (const one of away) {
    const key = onLine(one) ? '' : `${decimal(one.wide, 5)} ${decimal(one.tall, 5)}`;
    groups.set(key, [...(groups.get(key) ?? []), one]);
  }
  return [...groups].map(([key, list]): Sentence => {
    const [{ wide, tall }] = list as [Corner];
    const what = list.every((one) => same(one.wide, one.tall)) ? 'square' : 'piece';
    const where = list.length === 4 ? '' : ` at the ${placesOf(list.map(({ name }) => name))}`;
    const start = `Cut away the ${counted(list.length, `corner ${what}`)}${where}, `;
    const along = seams.across.length + seams.along.length > 0 ? 'lines' : 'scores';
    return key === '' ? [`${start}along the ${along}.`] : [start, figure(wide), ' wide and ', figure(tall), ' tall.'];
  });
}
/** `top`, `bottom right`, `top left and bottom right`. */
function placesOf(names: readonly (readonly [Side, Side])[]): string {
  if (names.length === 2 && names[0]?.[0] === names[1]?.[0]) return names[0]?.[0] ?? '';
  if (names.length === 2 && names[0]?.[1] === names[1]?.[1]) return names[0]?.[1] ?? '';
  return names.map((name) => name.join(' ')).join(' and ');
}

/** Corners that become tabs, and what is trimmed off them. */
function slitting({ corner, grid, figure }: Simple): Sentence[] {
  const [first] = corner;
  if (!first) return [];
  const upright = first.hinge === 'top' || first.hinge === 'bottom';
  const full = (upright ? grid.rows[first.cell.row] : grid.columns[first.cell.column]) as number;
  const { depth = null, ends = {} } = first.shape ?? {};
  const relief = Math.max(0, ...Object.values(ends).map(({ from }) => from));
  return [
    [
      `Slit ${corner.length === 1 ? 'the corner' : `the ${inWords(corner.length)} corners`} from the ${upright ? 'top and bottom' : 'left and right'} edges, along the scores, `,
      figure(full),
      ` deep, to the crossing: ${corner.length === 1 ? 'it becomes a tab' : 'they become tabs'}.`,
    ],
    ...(depth === null || same(depth, full)
      ? []
      : [['Trim these tabs to ', figure(depth), ' deep, so that two on one wall do not meet.']]),
    ...(isZero(relief) ? [] : [['Trim ', figure(relief), ' off each of these tabs along its slit.']]),
  ];
}

/** Tapers of the tabs, alike ones together. */
function tapers({ corner, strips, figure }: Simple): Sentence[] {
  const groups = new Map<string, { says: Part[]; tabs: Tab[] }>();
  for (const tab of [...corner, ...strips]) {
    const { hinge, shape } = tab;
    if (!shape || shape.teeth > 1) continue;
    const ends = SIDES.flatMap((side) => {
      const by = shape.ends[side]?.by;
      if (!by || side === hinge || side === OPPOSITE[hinge] || isZero('mm' in by ? by.mm : by.degrees)) return [];
      return [
        { side, by, says: ('mm' in by ? [figure(by.mm), ' at the tip'] : [`${decimal(by.degrees, 1)}°`]) as Part[] },
      ];
    });
    const [a, b] = ends;
    if (!a) continue;
    const both = b && JSON.stringify(a.by) === JSON.stringify(b.by);
    const says = both
      ? ['at both ends by ', ...a.says]
      : listed(ends.map((end) => [`at the ${end.side} end by `, ...end.says]));
    const key = JSON.stringify(says);
    groups.set(key, { says, tabs: [...(groups.get(key)?.tabs ?? []), tab] });
  }
  return [...groups.values()].map(({ says, tabs }): Sentence => {
    const sides = tabs.filter((tab) => strips.includes(tab)).map(({ hinge }) => OPPOSITE[hinge]);
    const which =
      tabs.length === corner.length + strips.length && tabs.length > 1
        ? 'all tabs'
        : [
            ...(sides.length < tabs.length ? ['the corner tabs'] : []),
            ...(sides.length > 0 ? [`the tab${sides.length === 1 ? '' : 's'} at the ${sides.join(' and ')}`] : []),
          ].join(' and ');
    return [`Taper ${which} `, ...says, '.'];
  });
}

/** Teeth along a straight score. */
function teeth({ strips, net, figure }: Simple): Sentence[] {
  return strips.flatMap(({ cell, hinge, shape }): Sentence[] => {
    const [root, , tip] = net.panels.find((panel) => panel.name === `${cell.name} 2`)?.loop ?? [];
    if (!shape || shape.teeth <= 1 || root?.type !== 'line' || !tip) return [];
    return [
      [
        `Cut the tab at the ${OPPOSITE[hinge]} into ${inWords(Math.round(shape.teeth))} teeth, each `,
        figure(distance(root.from, root.to)),
        ' wide at the score and ',
        figure(distance(tip.from, tip.to)),
        ' at the tip: a narrow V between each two, down to the score.',
      ],
    ];
  });
}

/** The arc of each cap. */
function arcs({ grid, net, figure }: Simple): Sentence[] {
  return grid.cells
    .flat()
    .filter((cell) => cell.kind === 'cap')
    .flatMap((cell): Sentence[] => {
      const arc = net.panels
        .find((panel) => panel.name === cell.name)
        ?.loop.find((curve): curve is Arc => curve.type === 'arc');
      if (!arc) return [];
      const side = hingeOf(grid, cell);
      const level = side === 'top' || side === 'bottom';
      const [chord, stop] = level ? [grid.columns[cell.column], arc.from.y] : [grid.rows[cell.row], arc.from.x];
      const draw: Part[] = [
        `At the ${OPPOSITE[side]} draw the arc of a `,
        figure(2 * arc.radius),
        ' circle over the ',
        figure(chord as number),
        ' between the scores, its ends ',
        figure(stop),
        level ? ' down' : ' across',
      ];
      return [[...draw, ', and cut round it.']];
    });
}

function corners({ grid, figure }: Simple): Sentence[] {
  const groups = new Map<number, string[]>();
  for (const { corner, radius } of grid.corners)
    if (moreThan(radius, 0)) groups.set(radius, [...(groups.get(radius) ?? []), corner]);
  return [...groups].map(([radius, names]) => [
    `Round the ${names.length === 4 ? 'four corners' : `${names.join(' and ')} corner${names.length === 1 ? '' : 's'}`} to a radius of `,
    figure(radius),
    '.',
  ]);
}

/** Half-round notches of one size at the same places of several edges are said once. */
function notches(said: Simple): Sentence[] {
  const { grid, net, figure } = said;
  const edges = new Map<string, { side: Side; at: number[]; radius: number }>();
  for (const { cell, side, at, radius } of grid.notches) {
    const place = grid.cells.flat().find(({ name }) => name === cell);
    if (!place || !moreThan(radius, 0)) continue;
    const level = side === 'top' || side === 'bottom';
    const from = (level ? net.columns[place.column] : net.rows[place.row]) as number;
    const key = `${side} ${radius}`;
    edges.set(key, { side, radius, at: [...(edges.get(key)?.at ?? []), from + at] });
  }
  const groups = new Map<string, { sides: Side[]; at: number[]; radius: number }>();
  for (const { side, at, radius } of edges.values()) {
    const level = side === 'top' || side === 'bottom';
    const key = `${level} ${radius} ${at.map((one) => decimal(one, 5)).join()}`;
    groups.set(key, { sides: [...(groups.get(key)?.sides ?? []), side], at, radius });
  }
  return [...groups.values()].map(({ sides, at, radius }) => [
    `Cut ${at.length * sides.length === 1 ? 'a half-round notch' : `${inWords(at.length * sides.length)} half-round notches`} of `,
    figure(radius),
    ` radius into the ${sides.join(' and ')} edge${sides.length === 1 ? '' : 's'}, ${at.length * sides.length === 1 ? 'its middle' : 'their middles'} at `,
    ...figures(said, at),
    sides[0] === 'top' || sides[0] === 'bottom' ? ' across.' : ' down.',
  ]);
}

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
