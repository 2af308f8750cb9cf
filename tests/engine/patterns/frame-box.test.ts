import { describe, expect, it } from 'vitest';
import { instructionsOf, say, type Figures, type Sizing } from '@/engine';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';
import { inSpace, meeting, reach, worstFold } from './folded-net';

const model = modelOf('frame-box');
const METRIC = { units: 'mm', grid: '0.5mm' } as const satisfies Partial<Sizing>;
/** A picture of 100 × 150 mm in a frame 25 mm deep with a border of 30 and a rebate of 5. */
const worked = (thickness: number, play: number, more: Partial<Sizing> = METRIC): Figures =>
  figuresOf(
    model,
    {
      'picture width': 100,
      'picture height': 150,
      depth: 25,
      border: 30,
      rebate: 5,
      tab: 12,
      'card thickness': thickness,
      play,
    },
    more,
  );
const measure = (figures: Figures, name: string) => figures.measures.find((one) => one.name === name);

describe('the flat frame', () => {
  it('has the sizes of the example worked by hand, without thickness (derived)', () => {
    const figures = worked(0, 0);
    const frame = pieceOf(figures, 'Frame');
    expect(figures.problems).toEqual([]);
    // Window 100 − 2 × 5; front 90 + 2 × 30; hollow 30 − 5.
    expect(measure(figures, 'window width')?.cut).toBe(90);
    expect(measure(figures, 'window height')?.cut).toBe(140);
    expect(measure(figures, 'hollow')?.cut).toBe(25);
    // Across 150 + 2 × (25 + 25 + 25 + 12), along 200 + the same.
    expect([frame.across, frame.along]).toEqual([324, 374]);
    expect(frame.scores.across).toEqual([12, 37, 62, 87, 237, 262, 287, 312]);
    expect(frame.scores.along).toEqual([12, 37, 62, 87, 287, 312, 337, 362]);
  });
  it('gives way for card of 0.3 mm and a play of 1/16 in (derived)', () => {
    const figures = worked(0.3, inch(1 / 16));
    // 30 − 5 − 1.5875 / 2 − 0.3; 25 − 0.3
    expectClose(measure(figures, 'hollow')?.exact ?? NaN, 23.90625, 1e-9);
    expectClose(measure(figures, 'inner wall')?.exact ?? NaN, 24.7, 1e-9);
    // As cut at 0.5 mm the play is 2 and the hollow 23.7, down to 23.5: 150 + 2 × (25 + 23.5 + 24.7 + 12).
    expectClose(pieceOf(figures, 'Frame').across, 320.4, 1e-9);
  });
  it('is the window’s inset of its picture as parallel offsets have it', () => {
    // Source: check values “offset-polygon” (Steiner's formula; inset of a regular polygon): a square of 4 in inset 0.25 in.
    const square = groups.find(({ id }) => id === 'offset-polygon')?.cases[0] as unknown as {
      readonly expected: { readonly inset_side: { readonly value: number } };
    };
    const figures = figuresOf(model, { 'picture width': inch(4), 'picture height': inch(4), rebate: inch(0.25) });
    expectClose(measure(figures, 'window width')?.cut ?? NaN, inch(square.expected.inset_side.value), 1e-9);
    const [window] = pieceOf(figures, 'Frame').net.holes;
    expect(window).toHaveLength(4);
  });
  it('has mitres of 45° on all four backs (derived: as far in as the back is wide)', () => {
    for (const thickness of [0, 0.3]) {
      const { net } = pieceOf(worked(thickness, 0), 'Frame');
      for (const name of ['top back', 'right back', 'bottom back', 'left back']) {
        const slanting = (net.panels.find((panel) => panel.name === name)?.loop ?? []).filter(
          ({ from, to }) => Math.abs(from.x - to.x) > 1e-6 && Math.abs(from.y - to.y) > 1e-6,
        );
        expect(slanting, name).toHaveLength(2);
        for (const { from, to } of slanting)
          expectClose(Math.abs(from.x - to.x), Math.abs(from.y - to.y), 1e-6, `${name}, ${thickness}`);
      }
    }
  });
  it('says the window in words', () => {
    const lines = instructionsOf(pieceOf(worked(0, 0), 'Frame')).map((line) => say(line, METRIC));
    // In the middle of 324 × 374: (324 − 90) / 2 and (374 − 140) / 2.
    expect(lines).toContain('Cut out a window 90 × 140 mm, its top left corner 117 across, 117 down.');
  });
});

describe('the rolled frame', () => {
  it('closes: mitres, inner walls and tabs meet what they belong to', () => {
    const { net } = pieceOf(worked(0, 0), 'Frame');
    const space = inSpace(net, 'front');
    const { panels } = space;
    expectClose(worstFold(net, space), 0, 1e-6);
    for (const [a, b] of [
      ['top', 'left'],
      ['top', 'right'],
      ['bottom', 'left'],
      ['bottom', 'right'],
    ] as const) {
      expect(meeting(panels.get(`${a} back`), panels.get(`${b} back`)), `${a} ${b} mitre`).toBe(2);
      expect(meeting(panels.get(`${a} inner wall`), panels.get(`${b} inner wall`)), `${a} ${b} inside`).toBe(2);
      expect(meeting(panels.get(`${a} wall`), panels.get(`${b} wall`)), `${a} ${b} corner`).toBe(2);
      // A corner tab lies in the plane of the wall it is glued to.
      const plane = reach(panels.get(`${a} wall`), 'y')[0];
      for (const y of reach(panels.get(`${a} ${b} tab`), 'y')) expectClose(y, plane, 1e-6, `${a} ${b} tab`);
    }
    for (const side of ['top', 'right', 'bottom', 'left']) {
      for (const z of reach(panels.get(`${side} foot`), 'z')) expectClose(z, 0, 1e-6, `${side} foot on the front`);
      for (const z of reach(panels.get(`${side} back`), 'z')) expectClose(z, 25, 1e-6, `${side} back`);
    }
    // The picture drops in: inner walls stand 100 and 150 mm apart, one rebate behind the window’s edge.
    expectClose(
      reach(panels.get('right inner wall'), 'x')[0] - reach(panels.get('left inner wall'), 'x')[1],
      100,
      1e-6,
    );
    expectClose(
      reach(panels.get('top inner wall'), 'y')[0] - reach(panels.get('bottom inner wall'), 'y')[1],
      150,
      1e-6,
    );
    expectClose(reach(panels.get('left inner wall'), 'x')[1], 25, 1e-6);
  });
  it('keeps its mitres shut, its tabs inside and its feet a card’s thickness up in card of 0.3 mm', () => {
    const { net } = pieceOf(worked(0.3, 1), 'Frame');
    const { panels } = inSpace(net, 'front');
    for (const [a, b] of [
      ['top', 'left'],
      ['bottom', 'right'],
    ] as const) {
      expect(meeting(panels.get(`${a} back`), panels.get(`${b} back`)), `${a} ${b} mitre`).toBe(2);
      const [wall, tab] = [panels.get(`${a} wall`), panels.get(`${a} ${b} tab`)];
      expectClose(Math.abs(reach(wall, 'y')[0] - reach(tab, 'y')[0]), 0.3, 1e-6);
      // Upright inner walls stop a card's thickness short of the level ones.
      expect(meeting(panels.get(`${a} inner wall`), panels.get(`${b} inner wall`), 0.31)).toBe(2);
      expect(meeting(panels.get(`${a} inner wall`), panels.get(`${b} inner wall`), 0.29)).toBe(0);
    }
    for (const z of reach(panels.get('top foot'), 'z')) expectClose(z, 0.3, 1e-6);
  });
});

describe('what does not work', () => {
  it('is a border too narrow for a foot, with the nearest that is not', () => {
    // 5 + 1 + 2 × 0 + 12.7 = 18.7: the border asked from there, at 0.5 mm from 19 on.
    const figures = figuresOf(model, { rebate: 5, border: 10, play: 1, 'card thickness': 0 }, METRIC);
    expect(figures.problems[0]).toMatchObject({ code: 'below range', measure: 'border', nearest: 19 });
    expect(figures.fits.find(({ name }) => name === 'feet can be glued')?.holds).toBe(false);
  });
  it('is a rebate that half the play uses up', () => {
    const figures = figuresOf(model, { rebate: 1, play: 3 }, METRIC);
    expect(figures.fits.find(({ name }) => name === 'front covers the picture’s edge')?.holds).toBe(false);
    // The least rebate is 3/16 in = 4.7625 mm: 5 at 0.5 mm.
    expect(figures.problems[0]).toMatchObject({ code: 'below range', measure: 'rebate', nearest: 5 });
  });
});
