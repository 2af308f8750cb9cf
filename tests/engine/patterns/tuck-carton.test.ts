import { describe, expect, it } from 'vitest';
import { instructionsOf, lengthOf, say, snap, type Sizing } from '@/engine';
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf, sizingsOf } from '../patterns';
import { inSpace, reach, worstFold } from './folded-net';

const model = modelOf('tuck-carton');
const CLOSINGS = ['same side', 'opposite sides', 'glued bottom'] as const;
const THIN = {
  'inside width': inch(3),
  'inside depth': inch(2),
  'inside height': inch(4),
  'card thickness': 0,
  play: 0,
};
/** All on the half-millimetre grid: t = 0.5, so that every step can be read. */
const CARD = {
  'inside width': 80,
  'inside depth': 40,
  'inside height': 110,
  'card thickness': 0.5,
  play: 1.5,
  tab: 12,
};
const carton = (values: Record<string, number>, closing: (typeof CLOSINGS)[number], more: Partial<Sizing> = {}) => {
  const figures = figuresOf(model, values, { choices: { closing }, ...more });
  expect(figures.problems).toEqual([]);
  return { figures, ...pieceOf(figures, 'Carton') };
};
const inCard = (closing: (typeof CLOSINGS)[number]) => carton(CARD, closing, { units: 'mm', grid: '0.5mm' });
const cut = ({ figures }: ReturnType<typeof carton>, name: string) =>
  figures.measures.find((measure) => measure.name === name)?.cut;

describe('tuck-carton', () => {
  it('has the blank and the scores of the worked example at 3 × 2 × 4 in (derived, constructions)', () => {
    const piece = carton(THIN, 'same side');
    const { across, along, scores } = piece;
    // 1/2 + 3 + 2 + 3 + 2 across; 1/2 + 2 + 4 + 2 + 1/2 along
    expect([across, along]).toEqual([inch(10.5), inch(9)]);
    expect(scores).toEqual({ across: [0.5, 3.5, 5.5, 8.5].map(inch), along: [0.5, 2.5, 6.5, 8.5].map(inch) });
    expect(
      instructionsOf(piece)
        .slice(0, 3)
        .map((sentence) => say(sentence, { units: 'in', grid: '1/16in' })),
    ).toEqual([
      'Cut 10 1/2 × 9 in.',
      'Along the 10 1/2 in side score at 1/2, 3 1/2, 5 1/2 and 8 1/2.',
      'Turn; along the 9 in side score at 1/2 and 2 1/2 in from each end.',
    ]);
  });
  it('is 8 1/2 in along with a glued bottom (derived: no second tongue)', () => {
    expect(carton(THIN, 'glued bottom').along).toBe(inch(8.5));
    expect(carton(THIN, 'opposite sides').along).toBe(inch(9));
  });
  it('is 267.3 × 229.2 mm in card of 0.3 mm (derived: the steps of one card thickness)', () => {
    const { across, along } = carton({ ...THIN, 'card thickness': 0.3 }, 'same side');
    // 12.7 + 76.2 + 51.1 + 76.5 + 50.8; 2 × (12.7 + 50.8 + 0.3) + 101.6
    expect([across, along]).toEqual([267.3, 229.2]);
  });
  it('gives each closing its depth (derived: a tongue takes a card’s thickness at its end)', () => {
    for (const [closing, side, closure] of [
      ['same side', 40.5, 40],
      ['opposite sides', 41, 40.5],
      ['glued bottom', 40.5, 40],
    ] as const) {
      const made = inCard(closing);
      expect([cut(made, 'side'), cut(made, 'closure'), cut(made, 'third panel'), cut(made, 'fourth panel')]).toEqual([
        side,
        closure,
        80.5,
        closure,
      ]);
      // tongue: max(12, 10), less than (110 − 1.5) / 2; slit: min(10, 6); shoulder 6 − 0.5; relief: max(1, 1.5)
      expect(['tongue', 'slit', 'shoulder', 'relief'].map((name) => cut(made, name))).toEqual([12, 6, 5.5, 1.5]);
      // dust flap: 3/4 × side = 30.375 or 30.75, down; 80 / 2 − 0.5 is more
      expect(cut(made, 'dust flap')).toBe(closing === 'opposite sides' ? 30.5 : 30);
    }
  });
  it('hangs the tongue between its slits and rounds its two corners', () => {
    const { net } = inCard('same side');
    const fold = net.folds.find(({ panels }) => panels.includes('tongue') && panels.includes('closure'));
    expectClose(fold ? lengthOf(fold.curve) : NaN, 80 - 2 * 6, 1e-6);
    const arcs = net.panels
      .find((panel) => panel.name === 'tongue')
      ?.loop.flatMap((curve) => (curve.type === 'arc' ? [curve.radius] : []));
    expect(arcs).toEqual([9, 9]); // min(3/4 × 12, (80 − 1) / 3)
  });
  it('mirrors the lower dust flaps for opposite sides, and leaves them plain over a glued bottom', () => {
    // A shoulder's corner more on one side of the middle than on the other.
    const shoulders = (closing: (typeof CLOSINGS)[number]) => {
      const middle = 12 + 80 + (closing === 'opposite sides' ? 41 : 40.5) / 2;
      const corners = inCard(closing).net.panels.find(({ name }) => name === 'lower dust 2')?.loop ?? [];
      return corners.reduce((sum, { from }) => sum + Math.sign(from.x - middle), 0);
    };
    expect(shoulders('glued bottom')).toBe(0);
    expect(shoulders('same side')).toBe(-1);
    expect(shoulders('opposite sides')).toBe(1);
  });
  it('says when the dust flaps are too short to lock, and the nearest play that works', () => {
    const figures = figuresOf(model, {
      'inside width': inch(4),
      'inside depth': inch(0.75),
      tab: inch(0.75),
      play: inch(0.25),
    });
    // Dust flap 3/4 × 19.35 = 14.51, down to 14.2875; shoulder 9.525 − 0.3, relief 6.35: 15.575. With 3/16 in: 13.9875.
    expect(figures.problems[0]).toMatchObject({ code: 'fit fails', measure: 'play', nearest: inch(3 / 16) });
    expect(figures.fits.find((fit) => fit.name === 'dust flaps lock')?.holds).toBe(false);
  });
  it('wants height for two tongues', () => {
    // 1/2 in and the play of 1/16 in
    expect(figuresOf(model, { 'inside height': inch(0.5) }).problems[0]).toMatchObject({
      code: 'below range',
      measure: 'inside height',
      nearest: inch(9 / 16),
    });
  });
});

describe('tuck-carton, folded', () => {
  const folded = ({ net }: ReturnType<typeof carton>) => inSpace(net, 'first', '-x', '-z');
  const near = (found: readonly [number, number], wanted: readonly [number, number], what: string) => {
    expectClose(found[0], wanted[0], 1e-6, what);
    expectClose(found[1], wanted[1], 1e-6, what);
  };
  it('closes without thickness: the seam meets, closures lie on the rims, tongues on the panels behind which they go', () => {
    for (const closing of CLOSINGS) {
      const { panels } = folded(carton(THIN, closing));
      const at = (name: string, axis: 'x' | 'y' | 'z') => reach(panels.get(name), axis);
      near(at('fourth', 'x'), [0, 0], closing);
      near(at('fourth', 'y'), [0, inch(2)], closing);
      near(at('closure', 'z'), [0, 0], closing);
      near(at('closure', 'y'), [0, inch(2)], closing);
      near(at('tongue', 'y'), [0, 0], closing);
      near(at('seam tab', 'x'), [0, 0], closing);
      for (const dust of ['dust 2', 'dust 4']) near(at(dust, 'z'), [0, 0], closing);
    }
  });
  it('keeps every ring of folds closed and every step at one card’s thickness (derived)', () => {
    for (const closing of CLOSINGS) {
      const made = inCard(closing);
      const space = folded(made);
      const at = (name: string, axis: 'x' | 'y' | 'z') => reach(space.panels.get(name), axis);
      const side = cut(made, 'side') ?? NaN;
      expect(worstFold(made.net, space)).toBeLessThan(1e-6);
      // First in the plane y = 0 with its right edge at x = 0; the third a side behind it, both 111 tall; an outer flap begins a card lower.
      near(at('first', 'z'), [closing === 'glued bottom' ? -111.5 : -111, 0], closing);
      near(at('third', 'y'), [side, side], closing);
      near(at('third', 'z'), [-111, 0], closing);
      // The fourth lies a card outside the tab, its raw edge a card behind the front.
      near(at('fourth', 'x'), [0.5, 0.5], closing);
      near(at('fourth', 'y'), [0.5, side], closing);
      near(at('seam tab', 'x'), [0, 0], closing);
      // Closure on the dust flaps, tongue behind the front.
      near(at('closure', 'z'), [0, 0], closing);
      near(at('dust 2', 'z'), [-0.5, -0.5], closing);
      near(at('dust 4', 'z'), [-0.5, -0.5], closing);
      near(at('tongue', 'y'), [0.5, 0.5], closing);
      // The tongue's tip stays above the middle, so that two of them do not meet.
      near(at('tongue', 'z'), [-12, 0], closing);
      expect(at('dust 2', 'x')[1]).toBeLessThan(at('dust 4', 'x')[0]);
    }
  });
  it('closes the bottom as the top, from the other side, or in three layers', () => {
    const at = (closing: (typeof CLOSINGS)[number], name: string, axis: 'x' | 'y' | 'z') =>
      reach(folded(inCard(closing)).panels.get(name), axis);
    near(at('same side', 'lower tongue', 'y'), [0.5, 0.5], 'behind the first');
    near(at('opposite sides', 'lower tongue', 'y'), [40.5, 40.5], 'a card before the third, 41 behind the first');
    for (const closing of ['same side', 'opposite sides'] as const) {
      near(at(closing, 'lower closure', 'z'), [-111, -111], closing);
      near(at(closing, 'lower dust 2', 'z'), [-110.5, -110.5], closing);
    }
    // Dust flaps, floor, outer flap: a card's thickness each.
    near(at('glued bottom', 'lower dust 4', 'z'), [-110.5, -110.5], 'dust');
    near(at('glued bottom', 'floor', 'z'), [-111, -111], 'floor');
    near(at('glued bottom', 'outer flap', 'z'), [-111.5, -111.5], 'outer flap');
    near(at('glued bottom', 'floor', 'y'), [0.5, 40.5], 'floor from the third');
    // min(40, 40.5 / 2 + 12 / 2) = 26.25, down
    near(at('glued bottom', 'outer flap', 'y'), [0, 26], 'outer flap from the first');
  });
  it('leaves room for the tongue beside the dust flaps at every size', () => {
    for (const sizing of sizingsOf(model, 30, 17)) {
      const figures = figuresOf(model, sizing.values, sizing);
      const { net } = pieceOf(figures, 'Carton');
      const { panels } = inSpace(net, 'first', '-x', '-z');
      const of = (name: string) => figures.measures.find((one) => one.name === name)?.cut ?? NaN;
      const tongue = of('side') - of('closure');
      expectClose(reach(panels.get('tongue'), 'y')[1], tongue, 1e-6);
      // Beyond the shoulder the dust flaps stand behind the back of the tongue.
      for (const dust of ['dust 2', 'dust 4']) {
        const points = panels.get(dust)?.points ?? [];
        const hinge = dust === 'dust 2' ? reach(panels.get('second'), 'x')[0] : reach(panels.get('fourth'), 'x')[1];
        for (const point of points.filter(({ x }) => Math.abs(x - hinge) > of('shoulder') + of('relief') - 1e-6))
          expect(snap(point.y - tongue), `${dust} at ${JSON.stringify(sizing)}`).toBeGreaterThanOrEqual(0);
      }
    }
  });
});
