import { describe, expect, it } from 'vitest';
import { areaOf, compilePattern, evaluate, type Figures, type Loop, type Sizing } from '@/engine';
import { foldNet, minus, size, vector, type FoldedPanel, type Vector } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, patternOf, pieceOf } from '../patterns';

const model = modelOf('wedge-box');
const METRIC = { units: 'mm', grid: '0.5mm' } as const satisfies Partial<Sizing>;
const slice = (
  answers: Readonly<Record<string, number>>,
  choices: Readonly<Record<string, string>> = {},
  more: Partial<Sizing> = METRIC,
): Figures => figuresOf(model, answers, { ...more, choices });
const measure = (figures: Figures, name: string) => {
  const found = figures.measures.find((one) => one.name === name);
  return { exact: found?.exact ?? NaN, cut: found?.cut ?? NaN };
};
const EVERY = [3, 4, 5, 6, 8, 11, 16];
const CURVED = { 'outer wall': 'curved' };
const TUCKED = { tip: 'tucked' };

/** The slice folded, its tip at the origin, side b along x, the box at y ≤ 0. */
function folded(figures: Figures): ReadonlyMap<string, FoldedPanel> {
  const { radius, angle } = { radius: measure(figures, 'radius').cut, angle: measure(figures, 'slice angle').cut };
  const left = Math.min(0, radius * Math.cos((angle * Math.PI) / 180));
  const panels = foldNet(pieceOf(figures, 'Slice').net, {
    root: 'base',
    at: vector(left, 0, 0),
    across: '+x',
    along: '-y',
  });
  return new Map(panels.map((panel) => [panel.name, panel]));
}
const meeting = (a: FoldedPanel | undefined, b: FoldedPanel | undefined, within = 1e-5): number =>
  (a?.points ?? []).filter((p) => (b?.points ?? []).some((q) => size(minus(p, q)) < within)).length;

describe('the circle’s share', () => {
  interface Row {
    readonly inputs: { readonly central_angle: { readonly value: number } };
    readonly computed: {
      readonly arc: number;
      readonly sagitta: number;
      readonly chord: number;
      readonly area: number;
    };
  }
  // Source: check values “circle-segment-table” (handbook table of segments of radius 1, computed with mathjs).
  const rows = (groups.find((group) => group.id === 'circle-segment-table')?.cases ?? []) as unknown as readonly Row[];
  const shares = rows.filter(({ inputs }) => {
    const slices = 360 / inputs.central_angle.value;
    return Number.isInteger(slices) && slices >= 3 && slices <= 16;
  });
  it('is looked up at enough angles', () => expect(shares.length).toBeGreaterThanOrEqual(5));
  it.each(shares)('has the chord, arc, bulge and segment of the table, row %#', ({ inputs, computed }) => {
    const slices = 360 / inputs.central_angle.value;
    const figures = slice({ slices, radius: 100, 'card thickness': 0 }, CURVED);
    expect(figures.problems).toEqual([]);
    expectClose(measure(figures, 'chord').exact, 100 * computed.chord, 1e-5);
    expectClose(measure(figures, 'arc').exact, 100 * computed.arc, 1e-5);
    expectClose(measure(figures, 'bulge').exact, 100 * computed.sagitta, 1e-5);
    const { net } = pieceOf(figures, 'Slice');
    expectClose(net.edges.curve ?? NaN, 100 * computed.arc, 1e-4);
    for (const name of ['curve', 'lid curve']) {
      const segment: Loop = net.panels.find((panel) => panel.name === name)?.loop ?? [];
      expectClose(areaOf(segment), 1e4 * computed.area, 0.01, name);
    }
  });
});

describe('closing the round', () => {
  it('leaves 3 mm open in all for 8 slices of 100 mm at sixteenths of an inch (derived)', () => {
    const figures = slice({ slices: 8, radius: 100 }, {}, {});
    expect(measure(figures, 'chord').cut).toBe(inch(3)); // 2 × 100 × sin 22.5° = 76.54 mm, down
    // 100 mm is cut as 3 15/16 in = 100.0125 mm: 16 × asin(76.2 / 200.025) = 358.283°, and 1.717 / 360 of the round is 2.997 mm (2.914 at 100 mm).
    expectClose(measure(figures, 'open gap').cut, 2.997, 0.001);
    expect(measure(figures, 'open gap').exact).toBeLessThan(1e-4);
    expect(figures.fits.find((fit) => fit.name === 'slices close')?.holds).toBe(true);
  });
  it('leaves nothing open with a curved wall, which is drawn from a template', () => {
    for (const slices of EVERY)
      expectClose(measure(slice({ slices }, CURVED), 'open gap').cut, 0, 1e-4, `${slices} slices`);
  });
  it('is refused by the fit, were the chord cut long', () => {
    const pattern = patternOf('wedge-box');
    const measures = pattern.measures.map((one) => (one.name === 'chord' ? { ...one, rounds: 'up' as const } : one));
    const wrong = compilePattern({ ...pattern, measures });
    if (!wrong.ok) throw new Error('does not compile');
    const { problems } = evaluate(wrong.value, { values: { radius: 101 }, choices: {}, units: 'mm', grid: '1mm' });
    expect(problems[0]).toMatchObject({ code: 'fit fails', measure: 'radius' });
    expect(problems[0]?.sentence).toContain('close the round');
  });
  it('stands each tip a card’s thickness over the sine of half the angle from the middle (derived)', () => {
    const six = { slices: 6, radius: 100, 'card thickness': 0.5 };
    expectClose(measure(slice(six, CURVED), 'stand off').exact, 1, 1e-9); // 0.5 / sin 30°
    expectClose(measure(slice(six, CURVED), 'whole round').exact, 203, 1e-6); // 2 × (100 + 0.5 + 1)
    expectClose(measure(slice(six), 'whole round').exact, 2 * (100 * Math.cos(Math.PI / 6) + 1.5), 1e-5);
    expectClose(measure(slice(six, { ...CURVED, ...TUCKED }), 'whole round').exact, 204, 1e-6); // and once more for the neck
  });
});

describe('folded', () => {
  it.each(EVERY)('a straight slice of %d closes: every glued edge meets, the lid lies on the walls', (slices) => {
    const figures = slice({ slices, radius: 100, height: 60 });
    expect(figures.problems).toEqual([]);
    const panels = folded(figures);
    const panel = (name: string) => panels.get(name);
    expect(meeting(panel('side a'), panel('side b')), 'the tip').toBe(2);
    expect(meeting(panel('side a'), panel('outer')), 'outer wall and side a').toBe(2);
    expect(meeting(panel('side b'), panel('outer')), 'outer wall and side b').toBe(2);
    // The lid's three corners lie over those of the base; two of them are corners of the outer wall.
    expect(meeting(panel('lid'), panel('outer'))).toBe(2);
    for (const { z } of panel('lid')?.points ?? []) expectClose(z, 60, 1e-5, 'lid');
    for (const corner of panel('base')?.points ?? [])
      expect(
        panel('lid')?.points.some((p) => Math.hypot(p.x - corner.x, p.y - corner.y) < 1e-5),
        'lid over base',
      ).toBe(true);
  });
  it.each(EVERY)('its tabs lie flat on what they are glued to and inside it, %d slices', (slices) => {
    const panels = folded(slice({ slices, radius: 100, height: 60 }));
    for (const name of ['tip tab', 'end b']) {
      const points = panels.get(name)?.points ?? [];
      expect(points).toHaveLength(4);
      for (const { x, y, z } of points) {
        expectClose(y, 0, 1e-5, `${name} in the plane of side b`);
        expect(x >= -1e-5 && x <= 100 + 1e-5 && z >= -1e-5 && z <= 60 + 1e-5, name).toBe(true);
      }
    }
    const side = panels.get('side a');
    const [corner, normal] = [side?.points[0] as Vector, side?.inside as Vector];
    for (const p of panels.get('end a')?.points ?? []) {
      const off = minus(p, corner);
      expectClose(off.x * normal.x + off.y * normal.y + off.z * normal.z, 0, 1e-5, 'end a in the plane of side a');
    }
  });
  it('tucks the flap a card’s thickness inside side b, clear of both glued tabs', () => {
    const figures = slice({ slices: 8, radius: 100, height: 60, 'card thickness': 0.5 });
    const panels = folded(figures);
    const flap = panels.get('flap')?.points ?? [];
    for (const { y, z } of flap) {
      expectClose(y, -0.5, 1e-5);
      expect(z).toBeLessThanOrEqual(60 + 1e-5);
    }
    const far = (name: string, end: 'min' | 'max') => Math[end](...(panels.get(name)?.points ?? []).map(({ x }) => x));
    expect(far('flap', 'min')).toBeGreaterThan(far('tip tab', 'max'));
    expect(far('flap', 'max')).toBeLessThan(far('end b', 'min'));
  });
  it('leads the neck outside side b to its slit and the tongue in', () => {
    const figures = slice({ slices: 6, radius: 100, height: 60 }, TUCKED);
    expect(figures.problems).toEqual([]);
    const { net } = pieceOf(figures, 'Slice');
    expect(net.holes).toHaveLength(1);
    expectClose(Math.abs(areaOf(net.holes[0] ?? [])), 31, 1e-5); // 1 mm by half the height and 1 mm
    const panels = folded(figures);
    const neck = panels.get('neck')?.points ?? [];
    expectClose(Math.max(...neck.map(({ y }) => y)), 0.3, 1e-3); // a card's thickness outside
    expectClose(Math.max(...neck.map(({ x }) => x)), 12.7, 0.01); // at the slit, 1/2 in from the tip
    expectClose(Math.min(...neck.map(({ z }) => z)), 15, 1e-5);
    expectClose(Math.max(...neck.map(({ z }) => z)), 45, 1e-5);
    const tongue = panels.get('tongue')?.points ?? [];
    expectClose(Math.min(...tongue.map(({ y }) => y)), 0.3 - (10 * 0.3) / 12.7, 0.35);
  });
  it.each(EVERY)('a curved slice of %d has its strip on the arc, from side to side', (slices) => {
    const radius = 100;
    const figures = slice({ slices, radius, height: 60, 'card thickness': 0 }, CURVED);
    expect(figures.problems).toEqual([]);
    expect(figures.pieces.map((piece) => piece.name)).toEqual(['Slice', 'Outer strip']);
    const tab = measure(figures, 'tab width').cut;
    const strips = foldNet(pieceOf(figures, 'Outer strip').net, {
      root: 'left',
      at: vector(radius - tab, 0, 60),
      across: '+x',
      along: '-z',
    }).filter((panel) => panel.name === 'strip');
    // Narrow flat strips instead of a round: their corners leave the circle by less than what cutting to the grid moves them.
    for (const { x, y } of strips.flatMap((strip) => strip.points)) expectClose(Math.hypot(x, y), radius, 0.3);
    const end = strips.at(-1)?.points[1] as Vector;
    const angle = (2 * Math.PI) / slices;
    // The strip is cut to half a millimetre: a quarter over or under, and the strips' own error.
    expect(Math.hypot(end.x - radius * Math.cos(angle), end.y + radius * Math.sin(angle))).toBeLessThan(0.5);
    const panels = folded(figures);
    expect(meeting(panels.get('side a'), panels.get('side b'))).toBe(2);
    const rim = panels.get('lid curve')?.points ?? [];
    for (const { x, y, z } of rim) {
      expectClose(Math.hypot(x, y), radius, 1e-5);
      expectClose(z, 60, 1e-5);
    }
  });
});

describe('the smallest and the widest', () => {
  it('are made with the largest tabs asked, every choice', () => {
    for (const slices of [3, 4, 16])
      for (const wall of ['straight', 'curved'])
        for (const tip of ['glued', 'tucked'])
          for (const height of [19.05, 127])
            expect(
              slice({ slices, radius: 50.8, height, tab: 25.4 }, { 'outer wall': wall, tip }, {}).problems,
              `${slices} ${wall} ${tip} ${height}`,
            ).toEqual([]);
  });
});
