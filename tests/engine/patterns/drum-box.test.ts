import { describe, expect, it } from 'vitest';
import { instructionsOf, lengthOf, say, type Net } from '@/engine';
import { dot, foldNet, minus, size, vector, type FoldedPanel, type Vector } from '@/engine/space';
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';

const model = modelOf('drum-box');
const MM = { units: 'mm', grid: '0.5mm' } as const;
const at = (answers: Readonly<Record<string, number>>) =>
  figuresOf(
    model,
    {
      'inside diameter': 100,
      'inside height': 80,
      'lid height': 30,
      tab: 12,
      'card thickness': 0.5,
      play: 2,
      ...answers,
    },
    MM,
  );
const cutOf = (figures: ReturnType<typeof at>, name: string) =>
  figures.measures.find((measure) => measure.name === name)?.cut;
const tooth = (net: Net, name: string) => net.panels.find((panel) => panel.name === name)?.loop ?? [];

describe('drum-box', () => {
  it('cuts the strip to the circle of the middle of the card, up (π × 100.5 = 315.73)', () => {
    const strip = pieceOf(at({}), 'Strip');
    expect(strip.across).toBe(316 + 12);
    expect(strip.along).toBe(81 + 12); // 80 + 2 × 0.5, and the teeth
    expect(strip.scores).toEqual({ across: [], along: [81] });
  });
  it('cuts discs and lid to the tube as cut (derived)', () => {
    const figures = at({});
    const cut = (name: string) => cutOf(figures, name);
    // 316 / π = 100.586: inside 100.086 − 0.5 = 99.586, down; outside 101.086, up.
    expect([cut('bottom diameter'), cut('outer bottom diameter')]).toEqual([99.5, 101.5]);
    // Lid inside 100.086 + 4 × 0.5 + 2 = 104.086; π × 104.586 = 328.567, up; 329 / π = 104.724.
    expectClose(cut('lid inside diameter') ?? NaN, 104.085925, 1e-5);
    expect(cut('lid circumference')).toBe(329);
    expect([cut('lid lining diameter'), cut('top diameter')]).toEqual([103.5, 105.5]);
    expect(pieceOf(figures, 'Top').across).toBe(105.5);
  });
  it('is 4 card thicknesses and the play wider at the lid, exactly (100 + 4 × 0.5 + 2)', () => {
    const exact = at({}).measures.find((measure) => measure.name === 'lid inside diameter')?.exact ?? NaN;
    expectClose(exact, 104, 1e-6);
  });
  it('cuts teeth for a tenth of a millimetre: 36, 51, 62 and 71 round 1, 2, 3 and 4 in of radius (derived: √(8 × 0.1 × r))', () => {
    for (const [radius, teeth] of [
      [1, 36],
      [2, 51],
      [3, 62],
      [4, 71],
    ] as const) {
      const figures = figuresOf(model, { 'inside diameter': inch(2 * radius), 'card thickness': 0 });
      expect(cutOf(figures, 'teeth'), `${radius}`).toBe(teeth);
      const { net } = pieceOf(figures, 'Strip');
      expect(net.panels.filter((panel) => panel.tooth).length).toBe(teeth);
    }
  });
  it('narrows every tooth so that none lies over its neighbour (derived)', () => {
    // Radius 50.25: pitch √(0.8 × 50.25) = 6.34, 316 / 6.34 → 50 teeth of 6.32; tip 6.32 − 2 × 12 × tan 3.6° = 4.810.
    const [root, , tip] = tooth(pieceOf(at({}), 'Strip').net, 'foot 2');
    expectClose(root ? lengthOf(root) : NaN, 6.32, 1e-5);
    expectClose(tip ? lengthOf(tip) : NaN, 4.810048, 1e-5);
  });
  it('has no teeth under the seam tab, whose place is a pencil line and no score', () => {
    const strip = pieceOf(at({}), 'Strip');
    expect(
      Math.max(...strip.net.panels.filter((panel) => panel.tooth).flatMap((panel) => panel.loop.map(({ to }) => to.x))),
    ).toBe(316);
    expect(instructionsOf(strip).map((sentence) => say(sentence, MM))).toEqual([
      'Cut 328 × 93 mm.',
      'Along the 93 mm side score at 81.',
      'Along the 328 mm side draw a pencil line at 316; do not score it.',
      'Cut away the corner square at the bottom right, along the lines.',
      'Taper the tab at the right at both ends by 15°.',
      'Cut the tab at the bottom into 50 teeth, each 6.3 mm wide at the score and 4.8 mm at the tip: a narrow V between each two, down to the score.',
      'Fold every score towards you and burnish it.',
    ]);
  });
  it('rolls round to its seam, the tab under the first strip, the teeth in one plane', () => {
    for (const diameter of [26, 60, 100, 240]) {
      for (const name of ['Strip', 'Lid strip']) {
        const { net } = pieceOf(at({ 'inside diameter': diameter }), name);
        const panels = foldNet(net, { root: 'wall', at: vector(0, 0, 0), across: '-x', along: '-z' });
        const wall = panels.filter((panel) => panel.name === 'wall') as [FoldedPanel, ...FoldedPanel[]];
        const [first, last] = [wall[0], wall.at(-1) as FoldedPanel];
        expectClose(size(minus(first.points[0] as Vector, last.points[1] as Vector)), 0, 1e-5, 'top of the seam');
        expectClose(size(minus(first.points[3] as Vector, last.points[2] as Vector)), 0, 1e-5, 'foot of the seam');
        const seam = panels.find((panel) => panel.name === 'seam') as FoldedPanel;
        for (const point of seam.points)
          expectClose(dot(minus(point, first.points[0] as Vector), first.inside), 0, 1e-5, 'seam tab');
        const foot = first.points[2]?.z ?? NaN;
        const teeth = panels.filter((panel) => panel.tooth).flatMap((panel) => panel.points);
        for (const point of teeth) expectClose(point.z, foot, 1e-5, 'teeth');
        // The inside faces in: the teeth lie within the tube.
        const all = wall.flatMap((panel) => panel.points);
        const middle = { x: 0, y: (Math.min(...all.map(({ y }) => y)) + Math.max(...all.map(({ y }) => y))) / 2 };
        const radius = Math.max(...all.map(({ x, y }) => Math.hypot(x - middle.x, y - middle.y)));
        for (const { x, y } of teeth) expect(Math.hypot(x - middle.x, y - middle.y)).toBeLessThan(radius * 1.05);
      }
    }
  });
  it('refuses a lid without room, and names the nearest play that works', () => {
    const figures = at({ play: 0, 'card thickness': 0 });
    expect(figures.problems[0]).toMatchObject({ code: 'fit fails', measure: 'play', nearest: 0.5 });
  });
  it('shortens the teeth of a narrow drum to half its radius, down (12.75 / 2)', () => {
    expect(cutOf(at({ 'inside diameter': 25.5, 'card thickness': 0 }), 'tooth depth')).toBe(6);
  });
});
