import { describe, expect, it } from 'vitest';
import {
  GRIDS,
  areaOf,
  compilePattern,
  keyOf,
  type Figures,
  type Loop,
  type Model,
  type Net,
  type Sizing,
} from '@/engine';
import { judge } from '@/engine/model/evaluate';
import { tracksOf, type CompiledPiece, type CompiledTrack } from '@/engine/model/model';
import { isInUse } from '@/engine/model/values';
import { SLUGS, modelOf, patternOf, sizingsOf } from './patterns';

/** A nanometre, and half of one more for sums of a dozen columns. */
const NOTHING = 1.5e-6;
/** Sizes a pattern, with the finer points at their usual values and with those anywhere too. */
const [PLAIN, FINER] = [2000, 300];

/**
 * Lengths of card that lie on one another or are one wall's height when the box is glued (derived, from how each box is put
 * together). `Piece.row` is a column or row as drawn, other names are measures as cut. What a choice leaves out is skipped.
 */
const GLUED: Readonly<Record<string, readonly (readonly string[])[]>> = {
  'book-box': [
    ['Fore edge.deep', 'Floor.deep', 'Top.deep'],
    ['Cover.tall', 'Lower spine.tall + Upper spine.tall'],
    ['Cover.tall', 'Fore edge.tall + overhang'],
    ['Cover.wide', 'Floor.straight + overhang'],
    ['Top.bulge', 'Floor.bulge'],
    ['Floor.deep', 'Lid.deep + play'],
    ['Lower spine.strip', 'Upper spine.strip + play'],
  ],
  'cone-cup': [],
  'diagonal-envelope': [],
  'drawer-chest': [
    ['Drawer.front', 'Drawer.back', 'Drawer.left side', 'Drawer.right side'],
    ['Carcass.left wall', 'Carcass.right wall', 'Carcass.top', 'Carcass.bottom'],
    ['Shelf.left leg', 'Shelf.right leg'],
    ['Carcass.left wall', 'Shelf.depth + play'],
  ],
  'drum-box': [],
  'frame-box': [
    ['Frame.left wall', 'Frame.right wall', 'Frame.top wall', 'Frame.bottom wall', 'depth'],
    ['Frame.left back', 'Frame.right back', 'Frame.top back', 'Frame.bottom back'],
    ['Frame.left inner wall + card thickness', 'Frame.top inner wall + card thickness', 'depth'],
    ['Frame.left inner wall', 'Frame.right inner wall', 'Frame.bottom inner wall'],
    ['Frame.left foot', 'Frame.right foot', 'Frame.top foot', 'Frame.bottom foot'],
  ],
  'gable-carton': [],
  'gusset-bag': [
    ['Bag.front', 'Bag.back'],
    ['Bag.first gusset', 'Bag.second gusset + card thickness'],
    ['Bag.front', 'Base board.wide + play'],
    ['Bag.first gusset', 'Base board.deep + play'],
  ],
  'lidded-box': [
    ['Base.left end', 'Base.right end', 'Base.far side', 'Base.near side'],
    ['Lid.left end', 'Lid.right end', 'Lid.far side', 'Lid.near side'],
  ],
  'pillow-box': [],
  'polygon-box': [],
  'pyramid-box': [],
  'sleeve-drawer': [
    ['Drawer.left end', 'Drawer.right end', 'Drawer.far side', 'Drawer.near side'],
    ['Sleeve.top', 'Sleeve.bottom + card thickness'],
    ['Sleeve.first side', 'Sleeve.second side + card thickness'],
  ],
  tray: [['Tray.left end', 'Tray.right end', 'Tray.far side', 'Tray.near side']],
  'tuck-carton': [
    ['Carton.third + Carton.third edge', 'Carton.first + card thickness'],
    ['Carton.second', 'Carton.fourth + card thickness'],
    ['Carton.closure', 'Carton.lower closure', 'Carton.first closure', 'Carton.floor + card thickness'],
    ['Carton.tongue', 'Carton.lower tongue', 'Carton.first tongue'],
  ],
  'wedge-box': [['Outer strip.left tab', 'Outer strip.right tab']],
};
/** What a pattern grants edges that are glued together, as its fits write it. */
const GRANTED: Readonly<Record<string, (step: number) => number>> = {
  '': () => 0,
  '0.01 mm': () => 0.01,
  '0.05 mm': () => 0.05,
  'cut grid / 2': (step) => step / 2,
  // Whole steps up or down on either side of a gap that is not glued.
  'cut grid': (step) => step,
};

const onGrid = (mm: number, step: number): boolean => Math.abs(mm / step - Math.round(mm / step)) * step < NOTHING;

interface Judged {
  readonly model: Model;
  readonly sizing: Sizing;
  readonly figures: Figures;
  readonly cut: Float64Array;
}
/** In-use columns, or rows, of a piece with their sizes as cut and where they end. */
function tracks({ cut }: Judged, list: readonly CompiledTrack[]) {
  let at = 0;
  return list
    .filter((track) => isInUse(track, cut))
    .map((track) => {
      const size = track.size.work(cut);
      at += size;
      return { track, size, end: at };
    });
}
/** The drawn line at this place; NaN where there is none. */
const edgeAt = (edges: readonly number[], place: number): number =>
  edges.find((edge) => Math.abs(edge - place) < NOTHING) ?? NaN;
const gridsOf = (model: Model) =>
  model.pieces.flatMap((piece) => (piece.shape.builder === 'grid' ? [{ piece, shape: piece.shape }] : []));

/** The length of one side of a glued pair; null when a piece or a track is not there. */
function lengthOf(judged: Judged, sum: string): number | null {
  const lengths = sum.split(' + ').map((term) => {
    const [name = '', track] = term.split('.');
    if (track === undefined) return judged.figures.measures.find((measure) => measure.name === name)?.cut ?? NaN;
    const piece = judged.model.pieces.find(({ def }) => def.name === name);
    const net = judged.figures.pieces.find((one) => one.name === name)?.net;
    if (piece?.shape.builder !== 'grid' || !net) return null;
    for (const [list, edges] of [
      [piece.shape.columns, net.columns],
      [piece.shape.rows, net.rows],
    ] as const) {
      const made = tracks(judged, list).find((one) => one.track.name === track);
      if (made) return edgeAt(edges, made.end) - edgeAt(edges, made.end - made.size);
    }
    return null;
  });
  return lengths.some((length) => length === null) ? null : lengths.reduce<number>((all, one) => all + (one ?? 0), 0);
}

/** What is wrong with the glued pairs; `seen` gathers those that could be compared. */
function* unequal(judged: Judged, slug: string, seen: Set<string>): Generator<string> {
  for (const pair of GLUED[slug] ?? []) {
    const there = pair.flatMap((side) => {
      const length = lengthOf(judged, side);
      return length === null ? [] : [{ side, length }];
    });
    const [first, ...rest] = there;
    for (const other of rest) {
      seen.add(other.side).add(first?.side ?? '');
      if (!(Math.abs(other.length - (first?.length ?? NaN)) < NOTHING))
        yield `${first?.side} is ${first?.length}, ${other.side} is ${other.length}`;
    }
  }
  const { step } = GRIDS[judged.sizing.grid];
  for (const { def } of judged.model.fits) {
    if (def.is !== 'same as') continue;
    const figure = judged.figures.fits.find((fit) => fit.name === def.name);
    const granted = GRANTED[def.tolerance ?? '']?.(step) ?? NaN;
    if (figure && !(Math.abs(figure.gap ?? NaN) <= granted + NOTHING)) yield `${def.name}: ${figure.gap} apart`;
  }
}

/** Every measure that is rounded lies on the grid, and no further from its formula than its way of rounding moves it. */
function* misrounded({ model, sizing, cut }: Judged): Generator<string> {
  const { step } = GRIDS[sizing.grid];
  for (const { def, slot, formula } of model.measures) {
    const rounds = def.rounds ?? ((def.kind ?? 'length') === 'length' ? 'nearest' : 'exact');
    const value = cut[slot] as number;
    if (rounds === 'exact' || !Number.isFinite(value)) continue;
    if (!onGrid(value, step)) yield `${def.name} is ${value}`;
    if (def.ask) continue;
    const over = value - formula.work(cut);
    const [least, most] = { nearest: [-step / 2, step / 2], up: [0, step], down: [-step, 0] }[rounds] as [
      number,
      number,
    ];
    if (over < least - NOTHING || over > most + NOTHING) yield `${def.name} is rounded ${rounds} by ${over}`;
  }
}

/** Measures added and taken away, and nothing else. */
const isPlainSum = (text: string): boolean => /^[a-z ]+( [+-] [a-z ]+)*$/.test(text);
/** Positions are running sums; what is made of rounded measures only is a whole number of steps. */
function* offTheRuler(
  judged: Judged,
  slug: string,
  piece: CompiledPiece,
  names: ReadonlySet<string>,
): Generator<string> {
  const { shape, def } = piece;
  const written = patternOf(slug).pieces.find(({ name }) => name === def.name);
  const figure = judged.figures.pieces.find(({ name }) => name === def.name);
  if (shape.builder !== 'grid' || written?.builder !== 'grid' || !figure) return;
  const texts = new Map([...written.columns, ...written.rows].map(({ name, size }) => [name, size]));
  const { step } = GRIDS[judged.sizing.grid];
  for (const [way, list, edges, scores, total] of [
    ['across', shape.columns, figure.net.columns, figure.scores.across, figure.across],
    ['along', shape.rows, figure.net.rows, figure.scores.along, figure.along],
  ] as const) {
    const made = tracks(judged, list);
    // A column of no size, such as a step of card without thickness, has one line for both its ends.
    const sums = [0, ...made.filter(({ size }) => size > NOTHING).map(({ end }) => end)];
    const apart = sums.findIndex((sum, index) => !(Math.abs(sum - (edges[index] ?? NaN)) < NOTHING));
    if (apart >= 0 || edges.length !== sums.length)
      yield `${def.name} ${way}: ${edges.join(' ')} for ${sums.join(' ')}`;
    if (Math.abs(total - (sums.at(-1) ?? NaN)) >= NOTHING) yield `${def.name} is ${total} ${way}, not ${sums.at(-1)}`;
    for (const score of scores)
      if (!sums.some((sum) => Math.abs(sum - score) < NOTHING)) yield `${def.name} ${way}: a score at ${score}`;
    const rounded = made.map(
      ({ track: { name, size } }) => isPlainSum(texts.get(name) ?? '') && size.uses.every((name) => names.has(name)),
    );
    const off = made.find(({ size }, index) => rounded[index] && !onGrid(size, step));
    if (off) yield `${def.name}, ${off.track.name} is ${off.size}`;
    if (rounded.every(Boolean) && !onGrid(total, step)) yield `${def.name} is ${total} ${way}, off the grid`;
  }
}
/** A blank is whole steps and card thicknesses wide and tall: those are counted out in the pattern, four at most. */
function* offTheGrid({ sizing, figures }: Judged): Generator<string> {
  const { step } = GRIDS[sizing.grid];
  for (const { name, across, along, thickness } of figures.pieces)
    for (const total of [across, along])
      if (![0, 1, -1, 2, -2, 3, 4].some((cards) => onGrid(total - cards * thickness, step)))
        yield `${name}: ${total} is off the grid`;
}
/** Names of measures that are rounded to the grid. */
const roundedNames = (model: Model): ReadonlySet<string> =>
  new Set(
    model.measures
      .filter(({ def }) => (def.rounds ?? ((def.kind ?? 'length') === 'length' ? 'nearest' : 'exact')) !== 'exact')
      .map(({ def }) => keyOf(def.name)),
  );

const isOpen = (loop: Loop): boolean =>
  loop.length < 2 ||
  loop.some((curve, index) => {
    const next = loop[(index + 1) % loop.length] as Loop[number];
    return Math.hypot(curve.to.x - next.from.x, curve.to.y - next.from.y) > 1e-4;
  });
function* unsound(name: string, { outline, holes, panels }: Net): Generator<string> {
  if ([outline, ...holes, ...panels.map(({ loop }) => loop)].some(isOpen)) yield `${name} is not closed`;
  const areas = panels.map(({ loop }) => areaOf(loop));
  if (!areas.every((area) => area > 0)) yield `${name} has a panel without area`;
  const [whole, sum] = [areaOf(outline), areas.reduce((all, area) => all + area, 0)];
  if (Math.abs(whole - sum) > 1e-3 + sum * 1e-9) yield `${name}: panels of ${sum} mm² in an outline of ${whole}`;
}

function* faultsOf(judged: Judged, slug: string, names: ReadonlySet<string>, seen: Set<string>): Generator<string> {
  yield* unequal(judged, slug, seen);
  yield* misrounded(judged);
  yield* offTheGrid(judged);
  for (const { piece } of gridsOf(judged.model)) yield* offTheRuler(judged, slug, piece, names);
  for (const { name, net } of judged.figures.pieces) yield* unsound(name, net);
}

it('says of every pattern which edges are glued', () => {
  expect(Object.keys(GLUED)).toEqual([...SLUGS].sort());
});

it('finds a wall that is a millimetre taller than the one it is glued to', () => {
  const pattern = patternOf('tray');
  const pieces = pattern.pieces.map((piece) =>
    piece.builder === 'grid'
      ? {
          ...piece,
          columns: piece.columns.map((column) =>
            column.name === 'right end' ? { ...column, size: 'inside height + 1 mm' } : column,
          ),
        }
      : piece,
  );
  const taller = compilePattern({ ...pattern, pieces });
  if (!taller.ok) throw new Error('does not compile');
  const sizing: Sizing = { values: { 'inside height': 30 }, choices: {}, units: 'mm', grid: '1mm' };
  const { figures, values } = judge(taller.value, sizing);
  const judged: Judged = { model: taller.value, sizing, figures, cut: values.cut };
  expect([...faultsOf(judged, 'tray', roundedNames(taller.value), new Set())]).toEqual([
    'Tray.left end is 30, Tray.right end is 31',
  ]);
});

describe.each(SLUGS)('%s anywhere in its range', (slug) => {
  const model = modelOf(slug);
  const names = roundedNames(model);
  const finer = new Set(model.pattern.measures.filter(({ ask }) => ask?.finer).map(({ name }) => name));
  const allTracks = new Set(
    model.pieces.flatMap((piece) => tracksOf(piece).map(({ name }) => `${piece.def.name}.${name}`)),
  );

  it(
    `is made without a problem, glued edges alike and scores on the ruler, at ${PLAIN} sizes`,
    { timeout: 240_000 },
    () => {
      const seen = new Set<string>();
      for (const sizing of sizingsOf(model, PLAIN, 2027)) {
        const { figures, values } = judge(model, sizing);
        if (figures.problems.length > 0) expect.fail(`${JSON.stringify(sizing)}: ${figures.problems[0]?.sentence}`);
        for (const fault of faultsOf({ model, sizing, figures, cut: values.cut }, slug, names, seen))
          expect.fail(`${JSON.stringify(sizing)}: ${fault}`);
      }
      const glued = (GLUED[slug] ?? []).flat();
      expect([...seen].sort()).toEqual([...new Set(glued)].sort());
      for (const term of glued.flatMap((side) => side.split(' + ')))
        if (term.includes('.')) expect(allTracks.has(term), term).toBe(true);
    },
  );
  it(`says at most that a finer point is set too far, at ${FINER} sizes with those`, { timeout: 240_000 }, () => {
    for (const sizing of sizingsOf(model, FINER, 905, { finer: true })) {
      const { figures, values } = judge(model, sizing);
      const grave = figures.problems.find(({ code, measure }) => code !== 'fit fails' || !finer.has(measure));
      if (grave) expect.fail(`${JSON.stringify(sizing)}: ${grave.sentence}`);
      for (const fault of faultsOf({ model, sizing, figures, cut: values.cut }, slug, names, new Set()))
        if (figures.problems.length === 0) expect.fail(`${JSON.stringify(sizing)}: ${fault}`);
    }
  });
});
