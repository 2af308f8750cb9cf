import { describe, expect, it } from 'vitest';
import { areaOf, instructionsOf, say, type Loop } from '@/engine';
import { dot, foldNet, minus, size, vector, type FoldedPanel } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';

const model = modelOf('polygon-box');
const MM = { units: 'mm', grid: '0.5mm' } as const;
const SIDES = Array.from({ length: 10 }, (_, index) => index + 3);
type Answers = Readonly<Record<string, number>>;
const of = (answers: Answers) => {
  const figures = figuresOf(model, answers, MM);
  const found = (name: string) => figures.measures.find((measure) => measure.name === name);
  return {
    figures,
    exact: (name: string) => found(name)?.exact ?? NaN,
    cut: (name: string) => found(name)?.cut ?? NaN,
  };
};
const cases = (id: string) => {
  const group = groups.find((one) => one.id === id);
  if (!group) throw new Error(`no check values ${id}`);
  return group.cases as unknown as {
    inputs: Record<string, { value: number }>;
    expected: Record<string, { value: number }>;
  }[];
};

describe('polygon-box', () => {
  it('has side and corners of the regular polygon (printed table, Machinery’s Handbook 31st ed. p. 82; computed to 12 figures)', () => {
    for (const [id, within] of [
      ['regular-polygon-printed', 0.0000501],
      ['regular-polygon-computed', 1e-6],
    ] as const) {
      for (const { inputs, expected } of cases(id)) {
        const { exact, figures } = of({ sides: inputs.sides?.value ?? 0, 'inside across flats': 200 });
        const r = 100;
        expectClose(exact('side') / r, expected['S/r']?.value ?? NaN, within, `${id} side`);
        expectClose(exact('across corners') / 2 / r, expected['R/r']?.value ?? NaN, within, `${id} corners`);
        const floor = pieceOf(figures, 'Base').net.panels[0]?.loop as Loop;
        expectClose(areaOf(floor) / r ** 2, expected['A/r^2']?.value ?? NaN, within, `${id} floor drawn`);
        if (expected.interior_angle) expectClose(exact('corner angle'), expected.interior_angle.value, 1e-6);
      }
    }
  });
  it('reads from flat to corner where the sides are odd, from flat to flat where they are even (derived)', () => {
    // Pentagon, 100 across: 50 + 50 / cos 36° = 111.8034. Hexagon 100.
    expectClose(of({ sides: 5, 'inside across flats': 100 }).exact('ruler across'), 111.803399, 1e-6);
    expectClose(of({ sides: 6, 'inside across flats': 100 }).exact('ruler across'), 100, 1e-9);
    for (const sides of [3, 5, 7, 9, 11]) {
      const { figures, exact } = of({ sides, 'inside across flats': 100 });
      const floor = pieceOf(figures, 'Base').net.panels[0]?.loop as Loop;
      const [side] = floor as [Loop[number]];
      // Side 1 lies level at the foot: the highest corner is opposite.
      const top = Math.min(...floor.map((curve) => curve.from.y));
      expectClose(side.from.y - top, exact('flat to corner'), 1e-4, `${sides}`);
    }
  });
  it('shows a hexagon of 4 in: sides of 2 5/16 in, 4 5/8 in across corners (4 / √3 = 2.309, 8 / √3 = 4.619)', () => {
    const figures = figuresOf(model);
    const cut = (name: string) => figures.measures.find((measure) => measure.name === name)?.cut;
    expect([cut('side'), cut('across corners')]).toEqual([inch(2 + 5 / 16), inch(4 + 5 / 8)]);
  });
  it('makes the lid 4 card thicknesses and the play wider (derived: 100 + 4 × 0.5 + 2)', () => {
    const { figures, cut } = of({ sides: 5, 'inside across flats': 100, 'card thickness': 0.5, play: 2 });
    expect(cut('lid across flats')).toBe(104);
    // Lid side 104 × tan 36° = 75.5604: drawn to the rounded width, so that the play is what it says.
    expectClose(
      pieceOf(figures, 'Lid').fan?.side.from.x ?? NaN,
      (pieceOf(figures, 'Lid').fan?.side.to.x ?? NaN) + 75.560423,
      1e-3,
    );
  });
  it('narrows the tabs of low walls and of many sides (derived)', () => {
    // 12 sides, 13 mm tall: low taper 28°, 0.9 × 13 / (1 / tan 28° + tan 15°) = 11.7 / 2.1487 = 5.445, down to 5.
    expect(of({ sides: 12, 'inside across flats': 100, 'inside height': 13, 'lid height': 13 }).cut('tab width')).toBe(
      5,
    );
    expect(of({ sides: 6, 'inside across flats': 100, 'inside height': 60, tab: 12 }).cut('tab width')).toBe(12);
  });
  it.each(SIDES)('folds %i walls up edge to edge, each tab flat on the next wall', (sides) => {
    for (const name of ['Base', 'Lid']) {
      const { net } = pieceOf(
        of({ sides, 'inside across flats': 120, 'inside height': 40, 'lid height': 20 }).figures,
        name,
      );
      const panels = new Map(
        foldNet(net, {
          root: name === 'Base' ? 'floor' : 'top',
          at: vector(0, 0, 0),
          across: '+x',
          along: '-y',
          anchor: 'middle',
        }).map((panel) => [panel.name, panel]),
      );
      for (let k = 1; k <= sides; k += 1) {
        const wall = panels.get(`wall ${k}`) as FoldedPanel;
        const before = panels.get(`wall ${k === 1 ? sides : k - 1}`) as FoldedPanel;
        const shared = wall.points.filter((p) => before.points.some((q) => size(minus(p, q)) < 1e-5));
        expect(shared.length, `${name} ${k}`).toBe(2);
        const tab = panels.get(`tab ${k}`) as FoldedPanel;
        for (const point of tab.points)
          expectClose(dot(minus(point, before.points[0] ?? point), before.inside), 0, 1e-5, `tab ${k}`);
      }
      // The middle of the floor is where it was put, and all walls stand 40 mm (the lid’s 20) over it.
      const all = [...panels.values()].flatMap((panel) => panel.points);
      expectClose(Math.max(...all.map(({ z }) => z)), name === 'Base' ? 40 : 20, 1e-5);
      const floor = panels.get(name === 'Base' ? 'floor' : 'top')?.points ?? [];
      const radii = floor.map(({ x, y }) => Math.hypot(x, y));
      expectClose(Math.max(...radii), Math.min(...radii), 1e-5);
    }
  });
  it('says enough to draw the base again (square, 100 mm, 30 mm tall: corners at 50 √2)', () => {
    const { figures } = of({ sides: 4, 'inside across flats': 100, 'inside height': 30, 'lid height': 20, tab: 12 });
    expect(instructionsOf(pieceOf(figures, 'Base')).map((sentence) => say(sentence, MM))).toEqual([
      'Cut 160 × 160 mm.',
      'Draw a circle of 70.7 mm radius, its middle 80 mm from the left edge and 80 mm from the top; mark it every 90°, beginning 45° beside the lowest point, and join the 4 marks: sides of 100 mm, each 50 mm from the middle.',
      'On every side draw a rectangle 30 mm tall.',
      'On the left edge of every wall, seen from the middle, draw a glue tab 12 mm wide; its ends stand at 45° to that edge on the inner side and 75° on the outer.',
      'Score the 4 sides and the edges with tabs: the walls turn by 90°, the tabs by 90°.',
      'Fold every score towards you and burnish it.',
    ]);
  });
  it('refuses a lid without room, and names the nearest play that works', () => {
    const { figures } = of({ play: 0, 'card thickness': 0, 'inside across flats': 100 });
    expect(figures.problems[0]).toMatchObject({ code: 'fit fails', measure: 'play', nearest: 0.5 });
  });
  it('refuses 2 and 13 sides, and walls too narrow for tabs', () => {
    expect(of({ sides: 2 }).figures.problems[0]).toMatchObject({ code: 'below range', measure: 'sides', nearest: 3 });
    expect(of({ sides: 13 }).figures.problems[0]).toMatchObject({ code: 'above range', measure: 'sides', nearest: 12 });
    // 12 sides of at least 12 mm: 12 / tan 15° = 44.78 across, 45 on the grid.
    expect(of({ sides: 12, 'inside across flats': 40 }).figures.problems[0]).toMatchObject({
      code: 'below range',
      nearest: 45,
    });
  });
});
