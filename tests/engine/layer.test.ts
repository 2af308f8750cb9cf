import { Arc, Point as Dot, Polygon, Segment } from '@flatten-js/core';
import { describe, expect, it } from 'vitest';
import {
  areaOf,
  compilePattern,
  evaluate,
  instructionsOf,
  perimeterOf,
  pointsOf,
  say,
  usualSizing,
  type Curve,
  type Loop,
  type Pattern,
  type PieceDef,
  type PieceFigure,
  type Point,
} from '@/engine';
import { inset } from '@/engine/net';
import groups from '../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../setup/expect-close';
import { inch, pieceOf } from './patterns';

const pattern = (pieces: readonly PieceDef[], more: Partial<Pattern> = {}): Pattern => ({
  format: 1,
  slug: 'layered',
  name: 'Layered',
  summary: 'A piece and a layer.',
  group: 'Tests',
  measures: [],
  choices: [],
  pieces,
  fits: [],
  finished: { inside: [], outside: [] },
  order: [],
  assembly: [],
  ...more,
});
const layer = (of: string, panels: readonly string[], margin: string, more: object = {}): PieceDef => ({
  name: 'Layer',
  stock: 'patterned paper',
  builder: 'layer',
  of,
  panels,
  margin,
  ...more,
});
function madeOf(pieces: readonly PieceDef[], more: Partial<Pattern> = {}) {
  const model = compilePattern(pattern(pieces, more));
  if (!model.ok) throw new Error(JSON.stringify(model.faults));
  return evaluate(model.value, usualSizing(model.value, 'mm', '0.5mm'));
}
function layerOn(host: PieceDef, panels: readonly string[], margin: string, more: object = {}): PieceFigure {
  return pieceOf(madeOf([host, layer(host.name, panels, margin, more)]), 'Layer');
}
const faultsOf = (pieces: readonly PieceDef[]) => {
  const model = compilePattern(pattern(pieces));
  return model.ok ? [] : model.faults;
};
const words = (piece: PieceFigure) => instructionsOf(piece).map((sentence) => say(sentence, { units: 'mm' }));

const board: PieceDef = {
  name: 'Board',
  stock: 'card',
  builder: 'grid',
  columns: [{ name: 'wide', size: '150 mm' }],
  rows: [{ name: 'tall', size: '100 mm' }],
  cells: [['panel board']],
};
const round: PieceDef = { name: 'Foot', stock: 'card', builder: 'disc', disc: 'foot', diameter: '80 mm' };
/** A floor 60 wide and 90 long that runs out into the arc of a 100 mm circle, as a book's does. */
const capped = (radius: string): PieceDef => ({
  name: 'Floor',
  stock: 'card',
  builder: 'grid',
  columns: [{ name: 'wide', size: '60 mm' }],
  rows: [
    { name: 'long', size: '90 mm' },
    { name: 'bulge', size: '40 mm' },
  ],
  cells: [['panel floor'], ['cap curve on floor']],
  caps: [{ cell: 'curve', radius }],
});
const slice: PieceDef = {
  name: 'Base',
  stock: 'card',
  builder: 'outline',
  points: [
    { name: 'tip', across: '0 mm', along: '0 mm' },
    { name: 'right', across: '100 mm * cos(60°)', along: '100 mm * sin(60°)' },
    { name: 'left', across: '0 mm', along: '100 mm' },
  ],
  panels: [{ name: 'base', loop: ['tip', 'right', 'left bowed out by 100 mm'] }],
};

/** The same curves for the general library: its arcs run counterclockwise in its own axes, which are clockwise on screen. */
const shapeOf = (curve: Curve): Segment | Arc => {
  if (curve.type === 'line') return new Segment(new Dot(curve.from.x, curve.from.y), new Dot(curve.to.x, curve.to.y));
  const angle = (point: Point) => Math.atan2(point.y - curve.centre.y, point.x - curve.centre.x);
  return new Arc(
    new Dot(curve.centre.x, curve.centre.y),
    curve.radius,
    angle(curve.from),
    angle(curve.to),
    curve.clockwise,
  );
};
const distanceTo = (loop: Loop, point: Point): number =>
  Math.min(...loop.map((curve) => new Dot(point.x, point.y).distanceTo(shapeOf(curve))[0]));
/** Points of a layer's edge where they lie on the flat host. */
const onHost = ({ layer: on, net }: PieceFigure, loop: Loop = net.outline): readonly Point[] =>
  pointsOf(loop, 0.01).map(({ x, y }) => ({ x: x + (on?.at.x ?? NaN), y: y + (on?.at.y ?? NaN) }));

describe('the edge of a layer', () => {
  it('is a smaller rectangle on a rectangle: 150 × 100 mm less 6 on every side is 138 × 88', () => {
    const made = layerOn(board, ['board'], '6 mm');
    expect([made.across, made.along]).toEqual([138, 88]);
    expectClose(made.area, 138 * 88, 1e-6);
    expect(made.layer).toEqual({ of: 'Board', faces: [['board']], margin: 6, at: { x: 6, y: 6 } });
  });
  it('is the face itself with no margin', () => {
    expectClose(layerOn(slice, ['base'], '0 mm').area, (100 ** 2 * Math.PI) / 12, 1e-6);
  });
  // Regular polygon, inward by d: side − 2 d tan(π / n) (check values, group offset-polygon).
  const { cases } = groups.find(({ id }) => id === 'offset-polygon') as unknown as {
    cases: { inputs: Record<string, { value: number }>; expected: Record<string, { value: number }> }[];
  };
  it.each(cases)('is mitred on a regular polygon ($inputs.sides.value sides)', ({ inputs, expected }) => {
    const fan: PieceDef = {
      name: 'Base',
      stock: 'card',
      builder: 'fan',
      centre: 'floor',
      sides: `${inputs.sides?.value}`,
      side: `${inputs.side?.value} in`,
      flap: { name: 'wall', shape: 'rectangle', height: '1 in', angle: '90°' },
    };
    const made = layerOn(fan, ['floor'], `${inputs.offset?.value} in`);
    const sides = made.net.outline.map((side) => perimeterOf([side]));
    expect(sides).toHaveLength(inputs.sides?.value ?? NaN);
    // A square comes off a trimmer: it is cut down to whole steps of the grid.
    const cut = (mm: number) => (sides.length === 4 ? Math.floor(mm / 0.5) * 0.5 : mm);
    for (const side of sides) expectClose(side, cut(inch(expected.inset_side?.value ?? NaN)), 1e-5);
  });
  it('keeps the middles of rounded corners: radius 20 less 6 is 14, as true arcs', () => {
    const rounded: PieceDef = {
      ...board,
      corners: [
        { cell: 'board', corner: 'top right', radius: '20 mm' },
        { cell: 'board', corner: 'bottom right', radius: '20 mm' },
      ],
    } as PieceDef;
    const made = layerOn(rounded, ['board'], '6 mm');
    // Each rounded corner takes r² (1 − π / 4) off the rectangle, and 2 r − r π / 2 off its perimeter.
    expectClose(made.area, 138 * 88 - 2 * 14 ** 2 * (1 - Math.PI / 4), 1e-6);
    expectClose(made.perimeter, 2 * (138 + 88) - 2 * (2 * 14 - (14 * Math.PI) / 2), 1e-6);
    expect(words(made)).toEqual([
      'Cut 138 × 88 mm from patterned paper.',
      'Round the top right and bottom right corners to a radius of 14 mm.',
      'Glue it to the outside of “board”, 6 mm from every edge.',
    ]);
  });
  it('is sharp where a corner is rounded less than the margin', () => {
    const rounded = { ...board, corners: [{ cell: 'board', corner: 'top right', radius: '5 mm' }] } as PieceDef;
    const made = layerOn(rounded, ['board'], '6 mm');
    expectClose(made.area, 138 * 88, 1e-6);
    expect(words(made)).toEqual([
      'Cut 138 × 88 mm from patterned paper.',
      'Glue it to the outside of “board”, 6 mm from every edge.',
    ]);
  });
  it('is a smaller circle on a disc, without its teeth', () => {
    const toothed = {
      ...round,
      rim: { teeth: '24', depth: '8 mm', 'tooth angle': '7.5°', angle: '90°' },
    } as PieceDef;
    for (const disc of [round, toothed]) {
      const made = layerOn(disc, ['foot'], '3 mm');
      expectClose(made.area, Math.PI * 37 ** 2, 1e-6);
      expectClose(made.perimeter, 2 * Math.PI * 37, 1e-6);
      expect(words(made)).toEqual([
        'Cut 74 × 74 mm from patterned paper.',
        'Draw a circle of 74 mm diameter and cut it out.',
        'Glue it to the outside of “foot”, 3 mm from every edge.',
      ]);
    }
  });
  it('goes round a panel and its cap in one: straight sides and a smaller arc about the same middle', () => {
    const made = layerOn(capped('50 mm'), ['floor', 'curve'], '5 mm');
    // Half width 25. The arc's middle lies √(50² − 30²) = 40 above the chord: 50 down. Radius 45 over half the chord 25.
    const [half, radius] = [25, 45];
    const straight = 50 + Math.sqrt(radius ** 2 - half ** 2) - 5;
    const angle = 2 * Math.asin(half / radius);
    expectClose(made.area, 2 * half * straight + (radius ** 2 / 2) * (angle - Math.sin(angle)), 1e-6);
    expectClose(made.perimeter, 2 * half + 2 * straight + radius * angle, 1e-6);
  });
  it('meets a half circle smoothly', () => {
    const made = layerOn(capped('30 mm'), ['floor', 'curve'], '5 mm');
    expectClose(made.area, 50 * 85 + (Math.PI * 25 ** 2) / 2, 1e-6);
  });
  it('moves round and square holes outwards: 20 mm becomes 32, a window 40 × 30 becomes 52 × 42', () => {
    const pierced = {
      ...board,
      holes: [{ cell: 'board', across: '30 mm', along: '50 mm', diameter: '20 mm' }],
      slots: [{ cell: 'board', across: '100 mm', along: '50 mm', width: '40 mm', height: '30 mm' }],
    } as PieceDef;
    const made = layerOn(pierced, ['board'], '6 mm');
    expectClose(made.area, 138 * 88 - Math.PI * 16 ** 2 - 52 * 42, 1e-6);
    // 30 − 6 and 50 − 6; 100 − 26 − 6 and 50 − 21 − 6.
    expect(words(made)).toEqual([
      'Cut 138 × 88 mm from patterned paper.',
      'Punch a hole of 32 mm diameter at 24 across, 44 down.',
      'Cut out a window 52 × 42 mm, its top left corner 68 across, 23 down.',
      'Glue it to the outside of “board”, 6 mm from every edge.',
    ]);
  });
  it('grows a notch: radius 15 and 6 are 21, cut off where the edge now is', () => {
    const notched = { ...board, notches: [{ cell: 'board', side: 'top', at: '75 mm', radius: '15 mm' }] } as PieceDef;
    const made = layerOn(notched, ['board'], '6 mm');
    // The circle of 21 mm below a line 6 mm under its middle: a segment over 2 acos(6 / 21).
    const angle = 2 * Math.acos(6 / 21);
    expectClose(made.area, 138 * 88 - (21 ** 2 / 2) * (angle - Math.sin(angle)), 1e-6);
  });
  it('is a smaller slice on a slice of a round, with its arc', () => {
    const made = layerOn(slice, ['base'], '4 mm');
    const [arc, ...others] = made.net.outline.filter((curve) => curve.type === 'arc');
    expect(others).toEqual([]);
    expectClose(arc?.type === 'arc' ? arc.radius : NaN, 96, 1e-9);
    const expected = new Polygon(made.net.outline.map(shapeOf) as never);
    expectClose(made.area, expected.area(), 1e-6);
    // Its sides meet on the middle line, 4 / sin 15° from the tip.
    const reach = Math.min(...onHost(made).map(({ x, y }) => Math.hypot(x, y)));
    expectClose(reach, 4 / Math.sin(Math.PI / 12), 1e-6);
  });
  it('keeps its distance from every point of an edge that bulges nowhere inwards', () => {
    const hosts: [PieceDef, string[]][] = [
      [board, ['board']],
      [round, ['foot']],
      [slice, ['base']],
      [capped('50 mm'), ['floor', 'curve']],
    ];
    for (const [host, panels] of hosts) {
      const whole = layerOn(host, panels, '0 mm');
      const edge = whole.net.outline;
      const [dx, dy] = [whole.layer?.at.x ?? NaN, whole.layer?.at.y ?? NaN];
      for (const { x, y } of onHost(layerOn(host, panels, '4.5 mm')))
        expectClose(distanceTo(edge, { x: x - dx, y: y - dy }), 4.5, 1e-6, host.name);
    }
  });
});

describe('moving a loop in', () => {
  const corners = (points: readonly (readonly [number, number])[]): Loop =>
    points.map(([x, y], index): Curve => {
      const [p, q] = points[(index + 1) % points.length] as readonly [number, number];
      return { type: 'line', from: { x, y }, to: { x: p, y: q } };
    });
  it('drops short sides one after another, as a cut corner goes', () => {
    // A 100 mm square with a corner cut off at 45°, legs of 4: gone once d (2 − √2) reaches 4, at 6.83 mm.
    const cut = corners([
      [0, 0],
      [96, 0],
      [100, 4],
      [100, 100],
      [0, 100],
    ]);
    // What the cut corner takes: a right triangle whose legs are 4 − d (2 − √2).
    const legs = 4 - 5 * (2 - Math.SQRT2);
    expectClose(areaOf(inset(cut, 5) ?? []), 90 ** 2 - legs ** 2 / 2, 1e-6);
    expectClose(areaOf(inset(cut, 10) ?? []), 80 ** 2, 1e-6);
  });
  it('turns the inner corner of an L sharp', () => {
    // 100 × 100 less 60 × 60 out of a corner, arms of 40: moved in by 5, arms of 30 within 90 × 90.
    const bent = corners([
      [0, 0],
      [100, 0],
      [100, 40],
      [40, 40],
      [40, 100],
      [0, 100],
    ]);
    expectClose(areaOf(inset(bent, 5) ?? []), 90 ** 2 - 60 ** 2, 1e-6);
  });
  it('leaves out the crumb beyond a neck that closes', () => {
    // A square of 100 with a neck 2 wide that opens into one of 8: moved in by 2, the neck is gone, 96 × 96 and 4 × 4 are left.
    const lollipop = corners([
      [0, 0],
      [100, 0],
      [100, 49],
      [110, 49],
      [110, 46],
      [118, 46],
      [118, 54],
      [110, 54],
      [110, 51],
      [100, 51],
      [100, 100],
      [0, 100],
    ]);
    const left = inset(lollipop, 2) ?? [];
    expectClose(areaOf(left), 96 ** 2, 1e-6);
    expect(left).toHaveLength(4);
    // By 1 the neck is a line without width, and the small square 6 × 6.
    expectClose(areaOf(inset(lollipop, 1) ?? []), 98 ** 2, 1e-6);
  });
  it('stays by its distance in a thin wedge, whatever the margin: an isosceles triangle keeps its angles', () => {
    // The middle of the inscribed circle stays where it is: sides shrink as r − d to r.
    const thin = corners([
      [0, 0],
      [200, -20],
      [200, 20],
    ]);
    const side = Math.hypot(200, 20);
    const inradius = (40 * 200) / (2 * side + 40);
    for (const by of [1, 4, 8, 12, inradius - 0.01])
      expectClose(areaOf(inset(thin, by) ?? []), 4000 * (1 - by / inradius) ** 2, 1e-5);
    expect(inset(thin, inradius + 0.01)).toBeNull();
  });
  it('gives nothing where nothing is left, or where it would fall apart', () => {
    const strip = corners([
      [0, 0],
      [100, 0],
      [100, 10],
      [0, 10],
    ]);
    expect(inset(strip, 5)).toBeNull();
    expect(inset(strip, 6)).toBeNull();
    // Two squares of 40 joined by a neck 6 wide.
    const neck = corners([
      [0, 0],
      [40, 0],
      [40, 17],
      [60, 17],
      [60, 0],
      [100, 0],
      [100, 40],
      [60, 40],
      [60, 23],
      [40, 23],
      [40, 40],
      [0, 40],
    ]);
    expect(inset(neck, 2)).not.toBeNull();
    expect(inset(neck, 4)).toBeNull();
  });
});

describe('a layer that makes no sense', () => {
  const why = (host: PieceDef, panels: readonly string[], margin: string) =>
    madeOf([host, layer(host.name, panels, margin)]).problems.map(({ sentence }) => sentence);
  it('says so', () => {
    expect(why(board, ['board'], '50 mm')).toEqual([
      'The layer cannot be cut at this size: the margin leaves nothing of it.',
    ]);
    expect(why(board, ['board'], '0 mm - 1 mm')).toEqual([
      'The layer cannot be cut at this size: its margin comes out smaller than nothing.',
    ]);
    const hole = (across: string) => ({ cell: 'board', across, along: '50 mm', diameter: '20 mm' });
    expect(why({ ...board, holes: [hole('12 mm')] } as PieceDef, ['board'], '3 mm')).toEqual([
      'The layer cannot be cut at this size: a hole breaks through its edge.',
    ]);
    expect(why({ ...board, holes: [hole('40 mm'), hole('65 mm')] } as PieceDef, ['board'], '3 mm')).toEqual([
      'The layer cannot be cut at this size: two of its holes run into each other.',
    ]);
    const pair: PieceDef = {
      ...board,
      columns: [
        { name: 'left', size: '50 mm' },
        { name: 'right', size: '50 mm' },
      ],
      cells: [['panel left', 'panel right']],
    } as PieceDef;
    expect(why(pair, ['left', 'right'], '3 mm')).toEqual([
      'The layer cannot be cut at this size: a fold runs across the face that it covers.',
    ]);
  });
  it('names the piece or panel that is missing, where it stands, and the nearest name', () => {
    expect(faultsOf([board, layer('Bord', ['board'], '1 mm')])).toEqual([
      {
        code: 'pattern no piece',
        where: 'piece “Layer”, of',
        found: 'no piece is called “Bord”',
        expected: 'the name of a piece',
        hint: 'The nearest name is “Board”.',
      },
    ]);
    expect(faultsOf([board, layer('Board', ['bord'], '1 mm')])).toEqual([
      {
        code: 'pattern no panel',
        where: 'piece “Layer”, panels',
        found: 'no panel of “Board” is called “bord”',
        expected: 'the name of one of its panels',
        hint: 'The nearest name is “board”.',
      },
    ]);
  });
  it('cannot lie on another layer', () => {
    const upon = layer('Layer', ['layer'], '1 mm', { name: 'Second' });
    expect(faultsOf([board, layer('Board', ['board'], '1 mm'), upon]).map(({ where }) => where)).toEqual([
      'piece “Second”, of',
    ]);
  });
});

describe('what a layer hangs on', () => {
  const lidded = { choices: [{ name: 'top', question: 'The top', options: ['open', 'closed'], usual: 'open' }] };
  it('may be written after it', () => {
    const made = madeOf([layer('Board', ['board'], '6 mm'), board]);
    expect(pieceOf(made, 'Layer').across).toBe(138);
  });
  it('is not covered when it is not in use', () => {
    const made = madeOf([{ ...board, when: 'top is closed' } as PieceDef, layer('Board', ['board'], '6 mm')], lidded);
    expect([made.pieces, made.problems]).toEqual([[], []]);
  });
  it('is covered as far as its panels are there', () => {
    const plain = capped('50 mm') as Extract<PieceDef, { builder: 'grid' }>;
    const rows = [plain.rows[0], { name: 'bulge', size: '40 mm', when: 'top is closed' }];
    const host = { ...plain, rows } as PieceDef;
    const whole = layer('Floor', ['floor', 'curve'], '5 mm');
    const cap = layer('Floor', ['curve'], '5 mm', { name: 'Cap layer' });
    const made = madeOf([host, whole, cap], lidded);
    expect(made.problems).toEqual([]);
    expect(made.pieces.map(({ name, across, along }) => [name, across, along])).toEqual([
      ['Floor', 60, 90],
      ['Layer', 50, 80],
    ]);
  });
  it('is named with its piece, and each of several faces', () => {
    const made = layerOn(capped('50 mm'), ['floor', 'curve'], '5 mm');
    expect(words(made).at(-1)).toBe(
      'Glue it to the outside of “floor” with “curve” of the floor, 5 mm from every edge.',
    );
    const twice = pieceOf(
      madeOf([{ ...board, count: '2' } as PieceDef, layer('Board', ['board'], '6 mm', { count: '2' })]),
      'Layer',
    );
    expect(words(twice).at(-1)).toBe('Glue one to the outside of each “board”, 6 mm from every edge.');
    const fan: PieceDef = {
      name: 'Base',
      stock: 'card',
      builder: 'fan',
      centre: 'floor',
      sides: '6',
      side: '60 mm',
      flap: { name: 'wall', shape: 'rectangle', height: '40 mm', angle: '90°' },
    };
    const walls = layerOn(fan, ['wall 1'], '3 mm', { count: '6' });
    expect([walls.across, walls.along].sort()).toEqual([34, 54]);
    expect(walls.layer?.faces).toHaveLength(6);
    expect(words(walls).at(-1)).toBe('Glue one to the outside of every “wall” of the base, 3 mm from every edge.');
  });
});
