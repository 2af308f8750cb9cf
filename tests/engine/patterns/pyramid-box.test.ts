import { describe, expect, it } from 'vitest';
import { instructionsOf, say, type Arc } from '@/engine';
import { dot, foldNet, minus, size, vector, type FoldedPanel } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';

const model = modelOf('pyramid-box');
const MM = { units: 'mm', grid: '0.5mm' } as const;
const of = (answers: Readonly<Record<string, number>>, closing = 'tabs') => {
  const figures = figuresOf(model, answers, { ...MM, choices: { closing } });
  const found = (name: string) => figures.measures.find((measure) => measure.name === name);
  return {
    figures,
    exact: (name: string) => found(name)?.exact ?? NaN,
    cut: (name: string) => found(name)?.cut ?? NaN,
  };
};
interface Case {
  inputs: Record<string, { value: number; unit: string }>;
  expected: Record<string, { value: number; unit: string }>;
}
const cases = (id: string) => {
  const group = groups.find((one) => one.id === id);
  if (!group) throw new Error(`no check values ${id}`);
  return group.cases as unknown as (Case & { computed: Record<string, number> })[];
};
const mm = (quantity: { value: number; unit: string } | undefined) =>
  (quantity?.value ?? NaN) * (quantity?.unit === 'in' ? 25.4 : 1);

describe('pyramid-box', () => {
  it('has slant height, edge and angles of the regular pyramid (check values “pyramid”)', () => {
    for (const { inputs, expected } of cases('pyramid')) {
      const { exact } = of({ sides: mm(inputs.sides), 'base side': mm(inputs.base_side), height: mm(inputs.height) });
      for (const [name, key] of [
        ['slant height', 'slant'],
        ['edge', 'lateral_edge'],
        ['base dihedral', 'base_dihedral'],
        ['side dihedral', 'side_dihedral'],
        ['tip angle', 'face_apex_angle'],
      ] as const)
        expectClose(exact(name), mm(expected[key]), 2e-6, `${mm(inputs.sides)} ${name}`);
      expectClose(exact('star across') / 2, mm(expected.star_net_tip_radius), 2e-6);
    }
  });
  it('has the known angles of pyramids with equal edges and of the Great Pyramid (check values “polyhedron-known-angles”)', () => {
    for (const { inputs, computed } of cases('polyhedron-known-angles')) {
      const sides = inputs.sides?.value ?? 0;
      const corner = 100 / (2 * Math.sin(Math.PI / sides));
      // All edges 100 mm: the height is what Pythagoras leaves over the corner’s distance from the middle; 440 × 280 cubits at 0.4 mm.
      const { exact } = inputs.all_edges
        ? of({ sides, 'base side': 100, height: Math.sqrt(100 ** 2 - corner ** 2) })
        : of({ sides, 'base side': 176, height: 112 });
      expectClose(exact('base dihedral'), computed.base_dihedral ?? NaN, 2e-6, `${sides} base`);
      if (computed.side_dihedral) expectClose(exact('side dihedral'), computed.side_dihedral, 2e-6, `${sides} side`);
    }
  });
  it('cuts a square one of 4 in, 3 in high, with a slant height of 3 5/8 in (√13 = 3.6056)', () => {
    const figures = figuresOf(model, { sides: 4, 'base side': inch(4), height: inch(3) });
    expect(figures.measures.find(({ name }) => name === 'slant height')?.cut).toBe(inch(3 + 5 / 8));
    // The star reaches 2 (2 + 3 5/8) = 11 1/4 in each way.
    expect([pieceOf(figures, 'Star').across, pieceOf(figures, 'Star').along]).toEqual([inch(11.25), inch(11.25)]);
  });
  it.each([3, 4, 5, 6, 7, 8])(
    'closes to a point with %i sides, low and tall, as cut; tabs lie flat on the next wall',
    (sides) => {
      for (const height of [30, 75, 180, 300]) {
        const { figures, cut } = of({ sides, 'base side': 75, height });
        expect(figures.problems, `${height}`).toEqual([]);
        const panels = new Map(
          foldNet(pieceOf(figures, 'Star').net, {
            root: 'base',
            at: vector(0, 0, 0),
            across: '+x',
            along: '-y',
            anchor: 'middle',
          }).map((panel) => [panel.name, panel]),
        );
        for (let k = 1; k <= sides; k += 1) {
          const wall = panels.get(`wall ${k}`) as FoldedPanel;
          const before = panels.get(`wall ${k === 1 ? sides : k - 1}`) as FoldedPanel;
          // Tip and one corner of the base.
          expect(
            wall.points.filter((p) => before.points.some((q) => size(minus(p, q)) < 1e-4)).length,
            `wall ${k} at ${height}`,
          ).toBe(2);
          const tip = wall.points.find((point) => point.z > 1) ?? vector(NaN, NaN, NaN);
          expectClose(Math.hypot(tip.x, tip.y), 0, 1e-4, 'over the middle');
          expectClose(tip.z, Math.sqrt(cut('slant height') ** 2 - cut('inside radius') ** 2), 1e-4);
          const tab = panels.get(`tab ${k}`) as FoldedPanel;
          for (const point of tab.points)
            expectClose(dot(minus(point, before.points[0] ?? point), before.inside), 0, 1e-4, `tab ${k} at ${height}`);
        }
      }
    },
  );
  it('stands within a cut of the height asked for', () => {
    // 75 mm over a square of 75: slant √(75² + 37.5²) = 83.85, cut 84; height √(84² − 37.5²) = 75.165.
    expectClose(of({ sides: 4, 'base side': 75, height: 75 }).cut('height as cut'), 75.16482, 1e-5);
  });
  it('by a ribbon: no tabs, a hole in every tip with 4 mm of card beside it', () => {
    const { figures, cut } = of({ sides: 5, 'base side': 80, height: 100, 'hole diameter': 5 }, 'ribbon');
    const { net } = pieceOf(figures, 'Star');
    expect(net.panels.some((panel) => panel.role === 'tab')).toBe(false);
    expect(net.holes.length).toBe(5);
    expect(net.holes.map((hole) => (hole[0] as Arc).radius)).toEqual([2.5, 2.5, 2.5, 2.5, 2.5]);
    // From the middle line to an edge: distance from the tip × sin(half the tip angle).
    expect(cut('hole from tip') * Math.sin((cut('tip angle') * Math.PI) / 360) - 2.5).toBeGreaterThanOrEqual(4);
    expect(
      instructionsOf(pieceOf(figures, 'Star'))
        .map((sentence) => say(sentence, MM))
        .join(' '),
    ).toContain(
      `In every tip punch a hole of 5 mm diameter on the middle line, its middle ${cut('hole from tip')} mm from the tip.`,
    );
  });
  it('keeps holes in the tips over the whole range with a ribbon, on every grid', () => {
    for (const grid of ['1/8in', '1/16in', '1/32in', '1mm', '0.5mm'] as const)
      for (const sides of [3, 4, 8])
        for (const share of [0, 0.03, 0.2, 1])
          for (const part of [0, 0.1, 1]) {
            const units = grid.endsWith('in') ? 'in' : 'mm';
            const at = (values: Record<string, number>) =>
              figuresOf(model, values, { units, grid, choices: { closing: 'ribbon' } });
            const range = (values: Record<string, number>, name: string, by: number) => {
              const { from = 0, to = 0 } = at(values).measures.find((measure) => measure.name === name) ?? {};
              return { ...values, [name]: from + (to - from) * by };
            };
            const sizing = range(range({ sides }, 'base side', share), 'height', part);
            expect(at(sizing).problems, `${grid} ${JSON.stringify(sizing)}`).toEqual([]);
          }
  });
  it('refuses walls that do not meet, and a hole that stands too deep', () => {
    // 5 mm over a square of 100: slant √(50² + 5²) = 50.25, cut 50 on whole millimetres: no further than the middle.
    const flat = figuresOf(model, { sides: 4, 'base side': 100, height: 5 }, { units: 'mm', grid: '1mm' });
    expect(flat.fits.find((fit) => fit.name === 'walls meet in a point')?.holds).toBe(false);
    expect(flat.problems.map((problem) => problem.measure)).toContain('height');
    // Hole 9.5 mm, base 30, height 20: (4.75 + 4) / sin(tip / 2) = 8.75 / (15 / 29.155) = 17.0 mm, past half of 25.
    const deep = of({ sides: 4, 'base side': 30, height: 20, 'hole diameter': 9.5 }, 'ribbon').figures;
    expect(deep.fits.find((fit) => fit.name === 'hole stays in the tip')?.holds).toBe(false);
  });
});
