import { describe, expect, it } from 'vitest';
import { areaOf, compilePattern, evaluate, type Figures, type Net, type Sizing } from '@/engine';
import { foldNet, minus, size, vector, type Vector } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, patternOf, pieceOf } from '../patterns';

const model = modelOf('cone-cup');
const METRIC = { units: 'mm', grid: '0.5mm' } as const satisfies Partial<Sizing>;
const exact = (figures: Figures, name: string): number =>
  figures.measures.find((measure) => measure.name === name)?.exact ?? NaN;
const cup = (top: number, bottom: number, height: number, thickness = 0): Figures =>
  figuresOf(model, { 'top diameter': top, 'bottom diameter': bottom, height, 'card thickness': thickness }, METRIC);

interface Quantity {
  readonly value: number | string;
  readonly unit: string;
}
type Quantities = Readonly<Record<string, Quantity>>;
interface Case {
  readonly inputs: Quantities;
  readonly expected: Quantities;
  readonly expected_decimal?: Readonly<Record<string, number>>;
  readonly computed?: Readonly<Record<string, number>>;
}
const casesOf = (id: string): readonly Case[] =>
  (groups.find((group) => group.id === id)?.cases ?? []) as unknown as readonly Case[];
const SCALE: Readonly<Record<string, number>> = { in: 25.4, cm: 10, mm: 1 };
const mm = ({ value, unit }: Quantity): number => Number(value) * (SCALE[unit] ?? NaN);

describe('the flat body', () => {
  // Source: check values “cone-frustum-development” (radial-line development, computed with mathjs).
  it.each(casesOf('cone-frustum-development'))('is the published ring sector of a frustum, either way up %#', (one) => {
    const { large_radius, small_radius, height } = one.inputs as Record<string, Quantity>;
    if (!large_radius || !small_radius || !height) throw new Error('a case without its inputs');
    const [wide, narrow, tall] = [2 * mm(large_radius), 2 * mm(small_radius), mm(height)];
    for (const upside of [false, true]) {
      const figures = upside ? cup(narrow, wide, tall) : cup(wide, narrow, tall);
      expect(figures.problems).toEqual([]);
      const wanted = (name: string): number => mm(one.expected[name] as Quantity);
      expectClose(exact(figures, 'slant height'), wanted('slant'), 1e-5);
      expectClose(exact(figures, 'inner radius'), wanted('inner_radius'), 1e-4);
      expectClose(exact(figures, 'outer radius'), wanted('outer_radius'), 1e-4);
      expectClose(exact(figures, 'sector angle'), Number(one.expected.angle?.value), 1e-6);
      expectClose(exact(figures, 'rim arc'), wanted(upside ? 'inner_arc' : 'outer_arc'), 1e-5);
      expectClose(exact(figures, 'foot arc'), wanted(upside ? 'outer_arc' : 'inner_arc'), 1e-5);
    }
  });
  // Source: check values “cone-development”; lateral area = pi r s, chord = 2 s sin(angle / 2).
  it.each(casesOf('cone-development'))('of a pointed cup is the published sector %#', (one) => {
    const { base_radius, height } = one.inputs as Record<string, Quantity>;
    if (!base_radius || !height) throw new Error('a case without its inputs');
    const figures = cup(2 * mm(base_radius), 0, mm(height));
    expect(figures.problems).toEqual([]);
    expect(figures.pieces.map((piece) => piece.name)).toEqual(['Body']);
    expectClose(exact(figures, 'outer radius'), mm(one.expected.sector_radius as Quantity), 1e-5);
    expect(exact(figures, 'inner radius')).toBe(0);
    expectClose(exact(figures, 'sector angle'), Number(one.expected.sector_angle?.value), 1e-6);
    expectClose(exact(figures, 'sector chord'), mm(one.expected.end_to_end_chord as Quantity), 1e-5);
  });
  // Source: check values “cone-frustum-worked”: the page of a geometry reference, a course page, a sheet metal manual of 1921.
  it('agrees with three worked examples that others published', () => {
    const widens = cup(200, 400, 250); // radii 10 and 20 cm, 25 cm tall: slant √725 cm, sector 133.7°
    expectClose(exact(widens, 'slant height'), 269.25824035673, 1e-6);
    expectClose(exact(widens, 'inner radius'), 269.25824035673, 1e-6);
    expectClose(exact(widens, 'outer radius'), 538.51648071345, 1e-6);
    expectClose(exact(widens, 'sector angle'), 133.7, 0.05);
    const course = cup(inch(5), inch(8), inch(4)); // 7.12 and 11.39 in, 126.4°
    expectClose(exact(course, 'inner radius'), inch(7.12), inch(0.006));
    expectClose(exact(course, 'outer radius'), inch(11.39), inch(0.006));
    expectClose(exact(course, 'sector angle'), 126.4, 0.06);
    expectClose(exact(cup(inch(3), inch(6), inch(3)), 'slant height'), inch(3.35410196625), 1e-6);
  });
  it('has the lateral area of the frustum (derived: pi (R + r) s = pi × 80 × 52)', () => {
    const { net } = pieceOf(cup(100, 60, 48), 'Body');
    expectClose(areaOf(net.panels.find((panel) => panel.name === 'wall')?.loop ?? []), Math.PI * 80 * 52, 1e-3);
    expectClose(net.edges.rim ?? NaN, Math.PI * 100, 1e-5);
    expectClose(net.edges.foot ?? NaN, Math.PI * 60, 1e-5);
  });
  it('is drawn through the middle of the card: radii grow, angle and slant stay (derived)', () => {
    const figures = cup(100, 60, 48, 0.48); // slant √(48² + 20²) = 52; half card 0.48 × 52 / 96 = 0.26
    expectClose(exact(figures, 'inner radius'), (30.26 * 52) / 20, 1e-9); // 78.676
    expectClose(exact(figures, 'outer radius'), 130.676, 1e-9);
    expectClose(exact(figures, 'sector angle'), (360 * 20) / 52, 1e-6);
    expectClose(exact(figures, 'bottom disc'), 58.96, 1e-9); // 60 − 2 × 0.48 × 52 / 48
    expectClose(exact(cup(40, 0, 48, 0.48), 'outer radius'), 52.676, 1e-9); // (20 + 0.26) × 52 / 20
  });
  it('keeps the seam tab off the other edge of a wide sector (derived: half of what is left of the round)', () => {
    const figures = cup(250, 50, 50); // √(100² + 50²) = 111.8034 along the slant; 125 × 111.8034 / 100 to the rim
    expectClose(exact(figures, 'low'), (360 - 321.99378875997) / 2, 1e-6);
    const { net } = pieceOf(figures, 'Body');
    const seam = net.panels.find((panel) => panel.name === 'seam')?.loop ?? [];
    const apex = net.panels.find((panel) => panel.cone)?.cone?.apex ?? { x: NaN, y: NaN };
    for (const { from } of seam)
      expect(Math.hypot(from.x - apex.x, from.y - apex.y)).toBeLessThanOrEqual(139.754249 + 1e-5);
  });
});

describe('ends alike', () => {
  it('make a plain strip once round: pi × 100.3 mm, up to the next half millimetre (derived)', () => {
    const figures = cup(100, 100, 80, 0.3);
    expect(figures.problems).toEqual([]);
    const strip = pieceOf(figures, 'Straight body');
    expect([strip.across, strip.along]).toEqual([12.5 + 315.5, 80]); // 315.102 up; the tab of 1/2 in cut at half millimetres
  });
  it('nearly alike are made, with the advice to print the template', () => {
    const figures = cup(100, 95, 80);
    expect(figures.problems).toEqual([]);
    expect(figures.fits.find((fit) => fit.name === 'arcs stay within reach')).toMatchObject({
      holds: false,
      advice: true,
    });
    expect(cup(100, 90, 80).fits.every((fit) => fit.holds)).toBe(true);
  });
});

describe('the bottom', () => {
  it('smaller than 22 mm is a plain disc, and the advice says so', () => {
    const figures = cup(60, 10, 80);
    expect(pieceOf(figures, 'Bottom').net.panels).toHaveLength(1);
    expect(figures.problems).toEqual([]);
    expect(figures.fits.find((fit) => fit.name === 'bottom carries teeth')?.holds).toBe(false);
  });
  it('has a tooth for every 0.1 mm of chord error (derived: pitch √(8 × 0.1 × 30) = 4.9 mm; 188.5 / 4.9 → 39)', () => {
    const { net } = pieceOf(cup(100, 60, 48), 'Bottom');
    expect(net.panels.filter((panel) => panel.tooth)).toHaveLength(39);
  });
  it.each([
    [100, 60],
    [60, 100],
    [80, 80],
  ])('stands its teeth along the wall inside, top %d and bottom %d', (top, bottom) => {
    const height = 48;
    const { net } = pieceOf(cup(top, bottom, height), 'Bottom');
    const teeth = foldNet(net, {
      root: 'bottom',
      at: vector(0, 0, 0),
      across: '+x',
      along: '-y',
      anchor: 'middle',
    }).filter((panel) => panel.tooth);
    expect(teeth.length).toBeGreaterThan(6);
    const highest = Math.max(...teeth.flatMap((tooth) => tooth.points.map((point) => point.z)));
    const lean = Math.atan2(Math.abs(top - bottom) / 2, height);
    // 12.5 mm deep as cut, but for the height of the arc over one tooth's chord.
    expectClose(highest, 12.5 * Math.cos(lean), 0.15);
    for (const { x, y, z } of teeth.flatMap((tooth) => tooth.points)) {
      if (z < 1) continue;
      const wall = bottom / 2 + ((top - bottom) / 2) * (z / height);
      expect(Math.hypot(x, y)).toBeLessThanOrEqual(wall + 0.05);
      expect(Math.hypot(x, y)).toBeGreaterThan(wall - 0.4);
    }
  });
});

describe('rolled', () => {
  const rolled = (net: Net, at: Vector, along: '+z' | '-z') =>
    foldNet(net, { root: 'wall', at, across: '-y', along }).filter((panel) => panel.name === 'wall');
  it.each([
    ['widens upwards', 100, 60],
    ['widens downwards', 60, 100],
    ['is pointed', 100, 0],
  ])('a body that %s closes at its seam and stands on its circles', (_, top, bottom) => {
    const height = 48;
    const figures = cup(top, bottom, height);
    const { net } = pieceOf(figures, 'Body');
    // The tip of the whole cone lies where its sides would meet: height × narrow / (wide − narrow) beyond the narrow end.
    const beyond = (height * Math.min(top, bottom)) / Math.abs(top - bottom);
    const up = top > bottom;
    const strips = rolled(net, vector(0, 0, up ? -beyond : height + beyond), up ? '+z' : '-z');
    const [first, last] = [strips[0]?.points ?? [], strips.at(-1)?.points ?? []];
    expectClose(size(minus(first[0] as Vector, last[1] as Vector)), 0, 1e-6, 'seam at the wide end');
    expectClose(size(minus(first.at(-1) as Vector, last[2] as Vector)), 0, 1e-6, 'seam at the narrow end');
    for (const { x, y, z } of strips.flatMap((strip) => strip.points)) {
      // Thirty-six flat strips instead of a round: 0.1 % of the radius.
      const atTop = Math.abs(z - height) < 0.2;
      expectClose(Math.hypot(x, y), (atTop ? top : bottom) / 2, 0.1);
      expectClose(z, atTop ? height : 0, 0.1);
    }
  });
});

describe('fits', () => {
  it('find a body that does not go round, were its angle wrong', () => {
    const pattern = patternOf('cone-cup');
    const measures = pattern.measures.map((measure) =>
      measure.name === 'sector angle' ? { ...measure, formula: '350° * (taper / slant height)' } : measure,
    );
    const wrong = compilePattern({ ...pattern, measures });
    if (!wrong.ok) throw new Error('does not compile');
    const { fits, problems } = evaluate(wrong.value, { values: {}, choices: {}, units: 'in', grid: '1/16in' });
    expect(fits.filter((fit) => !fit.holds).map((fit) => fit.name)).toEqual([
      'rim goes round the top',
      'foot goes round the bottom',
    ]);
    expect(problems[0]).toMatchObject({ code: 'fit fails' });
  });
  it('a cup too flat to roll is refused by its range, and the lowest that works is named', () => {
    // 0.15 × (200 − 60) mm = 21 mm
    expect(cup(200, 60, 15).problems[0]).toMatchObject({ code: 'below range', measure: 'height', nearest: 21 });
  });
});
