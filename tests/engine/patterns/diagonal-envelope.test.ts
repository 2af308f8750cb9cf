import { describe, expect, it } from 'vitest';
import { drawPiece, lengthOf, type Figures, type Point, type Sizing } from '@/engine';
import { cross, dot, foldNet, minus, size, unit, vector } from '@/engine/space';
import groups from '../../reference/check-values.json' with { type: 'json' };
import { expectClose } from '../../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from '../patterns';
import { inSpace, reach, worstFold } from './folded-net';

const model = modelOf('diagonal-envelope');
const METRIC = { units: 'mm', grid: '1mm' } as const satisfies Partial<Sizing>;
const measure = (figures: Figures, name: string, as: 'exact' | 'cut' = 'exact'): number =>
  figures.measures.find((one) => one.name === name)?.[as] ?? NaN;
const netOf = (figures: Figures) => pieceOf(figures, 'Envelope').net;
const cornersOf = (figures: Figures, panel: string): readonly Point[] =>
  (netOf(figures).panels.find((one) => one.name === panel)?.loop ?? []).map((curve) => curve.from);

type Quantities = Readonly<Record<string, { readonly value: number; readonly unit: string }>>;
interface Case {
  readonly inputs: Quantities;
  readonly expected: Quantities;
}

describe('diagonal-envelope', () => {
  const group = groups.find(({ id }) => id === 'envelope-square');
  const cases = (group?.cases ?? []) as unknown as readonly Case[];
  it.each(cases)('folds from the square of the check values (envelope-square, %#)', (one) => {
    const { inputs, expected } = one;
    const scale = inputs.body_width?.unit === 'in' ? 25.4 : 1;
    const [given, wanted] = [
      (name: string) => (inputs[name]?.value ?? NaN) * scale,
      (name: string) => (expected[name]?.value ?? NaN) * scale,
    ];
    const [wide, tall, overlap] = [given('body_width'), given('body_height'), given('excess')];
    const figures = figuresOf(model, { 'card width': wide - 5, 'card height': tall - 5, ease: 5, overlap });
    expectClose(measure(figures, 'sheet side'), wanted('square_side'), 1e-6);
    expectClose(measure(figures, 'sheet side') * Math.SQRT2, wanted('diagonal'), 1e-6);
    expectClose(measure(figures, 'width mark') + overlap, wanted('score_from_top_vertex'), 1e-6);
    expectClose(measure(figures, 'height mark') + overlap, wanted('score_from_side_vertex'), 1e-6);
    expectClose(measure(figures, 'notch depth'), wanted('corner_inset'), 1e-6);
    expectClose(measure(figures, 'side flap'), wanted('side_flap_height'), 1e-6);
    expectClose(measure(figures, 'side over side'), wanted('left_right_overlap'), 1e-6);
    // A 2 : 1 card: the tip would reach the far fold, 110 mm away, and is cut 3 mm short of it.
    const cut = wide === 2 * tall ? 3 : 0;
    expectClose(measure(figures, 'top flap'), wanted('top_flap_height') - cut, 1e-6);
    expectClose(measure(figures, 'top over bottom'), wanted('top_bottom_overlap') - 2 * cut, 1e-6);
  });
  it('cuts a square of whole sixteenths, the body never smaller than card and ease (derived)', () => {
    const figures = figuresOf(model, {
      'card width': inch(5),
      'card height': inch(3.5),
      ease: inch(0.25),
      overlap: inch(0.5),
    });
    // 5.25 / √2 = 3.7123, up to 3 3/4; 3.75 / √2 = 2.6517, up to 2 11/16; and 1/2: 6 15/16.
    expect([measure(figures, 'width mark', 'cut'), measure(figures, 'height mark', 'cut')]).toEqual([
      inch(3.75),
      inch(2.6875),
    ]);
    const piece = pieceOf(figures, 'Envelope');
    expect([piece.across, piece.along]).toEqual([inch(6.9375), inch(6.9375)]);
    expectClose(piece.net.edges['top fold'] ?? NaN, inch(3.75) * Math.SQRT2, 1e-6);
    expectClose(piece.net.edges['right fold'] ?? NaN, inch(2.6875) * Math.SQRT2, 1e-6);
    // The notch: half the overlap deep, its point on the corner of the body.
    expectClose(Math.min(...cornersOf(figures, 'body').map((point) => point.y)), inch(0.25), 1e-6);
    expect(piece.net.outline).toHaveLength(16); // four corners, four notches of three
    expect(piece.net.folds.map((fold) => fold.angle)).toEqual([180, 180, 180, 180]);
  });
  it('cuts the tips of flaps that would pass the far fold, 3 mm short of it or a little more (derived)', () => {
    const figures = figuresOf(model, { 'card width': 200, 'card height': 100, ease: 5, overlap: 12 }, METRIC);
    expect(figures.problems).toEqual([]);
    // Marks 205 / √2 → 145 and 105 / √2 → 75; 145 + 12 − 2 × 75 + 3 √2 = 11.24, up to 12.
    expect(measure(figures, 'top tip cut', 'cut')).toBe(12);
    expect(measure(figures, 'side tip cut', 'cut')).toBe(0);
    const top = netOf(figures).panels.find((panel) => panel.name === 'top');
    expect(top?.loop.some((curve) => Math.abs(lengthOf(curve) - 12 * Math.SQRT2) < 1e-6)).toBe(true);
    // (145 + 12 − 12) / √2 = 102.53, against a body of 75 √2 = 106.07.
    expectClose(measure(figures, 'top flap', 'cut'), 102.530483, 1e-5);
  });

  describe.each([
    { 'card width': 127, 'card height': 89 },
    { 'card width': 90, 'card height': 150 },
    { 'card width': 220, 'card height': 90 },
    { 'card width': 100, 'card height': 100 },
  ])('folded at $“card width” × $“card height”', (card) => {
    const figures = figuresOf(model, { ...card, ease: 6, overlap: 10 }, METRIC);
    const net = netOf(figures);
    const space = inSpace(net, 'body');
    const [body, corners] = [space.panels.get('body')?.points ?? [], cornersOf(figures, 'body')];
    it('lies flat with every flap inside the body', () => {
      expect(figures.problems).toEqual([]);
      expect(worstFold(net, space)).toBeLessThan(1e-9);
      const [a, b, , d] = body as [typeof AT, typeof AT, typeof AT, typeof AT];
      for (const name of ['top', 'right', 'bottom', 'left']) {
        for (const point of space.panels.get(name)?.points ?? []) {
          for (const end of [b, d]) {
            const share = dot(minus(point, a), minus(end, a)) / size(minus(end, a)) ** 2;
            expect(share, name).toBeGreaterThan(-1e-9);
            expect(share, name).toBeLessThan(1 + 1e-9);
          }
        }
        expect(reach(space.panels.get(name), 'z').every((z) => Math.abs(z) < 1e-9)).toBe(true);
      }
    });
    it('brings neighbouring flaps over one another by the overlap', () => {
      expect(corners).toHaveLength(4);
      const side = measure(figures, 'sheet side', 'cut');
      // Edges that were one side of the square lie parallel, the band between them.
      for (const [a, b, mark, tip] of [
        ['top', 'right', 'width mark', 'side tip cut'],
        ['bottom', 'left', 'height mark', 'side tip cut'],
      ] as const) {
        const y = a === 'top' ? 0 : side;
        const at = measure(figures, mark, 'cut');
        const cut = measure(figures, tip, 'cut');
        const [p, q] =
          a === 'top'
            ? [space.at(b, { x: at + 10, y }), space.at(b, { x: side - cut, y })]
            : [space.at(b, { x: at, y }), space.at(b, { x: cut, y })];
        const other = space.at(a, { x: a === 'top' ? at : at + 10, y });
        expectClose(size(cross(minus(other, p), unit(minus(q, p)))), 10, 1e-6, `${a} on ${b}`);
      }
    });
  });
  const AT = vector(0, 0, 0);
  it('stands open at the top in the picture, and only there', () => {
    const figures = figuresOf(model);
    const shown = foldNet(netOf(figures), { root: 'body', at: AT, across: '+x', along: '-y', asShown: true });
    const top = shown.find((panel) => panel.name === 'top');
    // Turned by 112°, the tip stands sin 112° of the flap's height over the body.
    expectClose(reach(top, 'z')[1], measure(figures, 'top flap', 'cut') * Math.sin((112 * Math.PI) / 180), 1e-6);
    for (const name of ['left', 'right', 'bottom'])
      expectClose(
        reach(
          shown.find((panel) => panel.name === name),
          'z',
        )[1],
        0,
        1e-9,
        name,
      );
  });
  it('names every flap on the flap, clear of the folds', () => {
    const figures = figuresOf(model, { 'card width': 127, 'card height': 89, ease: 6, overlap: 10 }, METRIC);
    // Marks 133 / √2 → 95 and 95 / √2 → 68, and 10: 173 mm, drawn at one unit a millimetre with a margin of 6.
    const { shapes } = drawPiece(pieceOf(figures, 'Envelope'), { ...METRIC, width: 185, scale: 1, dims: false });
    const name = shapes.find((shape) => shape.type === 'text' && shape.of === 'top');
    if (name?.type !== 'text') throw new Error('the top flap has no name');
    // Its fold runs where across and down come to 105; a capital stands 4.5 over the line that it is written on.
    expect(name.x - 6 + (name.y - 4.5 - 6)).toBeLessThan(105 - 15);
  });
  it('refuses bands too narrow for glue and flaps that do not meet, and names the nearest that works', () => {
    const figures = figuresOf(model, { 'card width': 100, 'card height': 100, ease: 5, overlap: 2 }, METRIC);
    // 2 √2 = 2.83 mm over one another at a square card; the asked range begins at 6.35 mm, so at 7 on this grid.
    expect(figures.fits.filter((fit) => !fit.holds).map((fit) => fit.name)).toEqual(['glue holds', 'flaps meet']);
    expect(figures.problems.find((problem) => problem.code === 'fit fails')).toMatchObject({
      measure: 'overlap',
      nearest: 7,
    });
  });
  it('refuses a card without room, and names the nearest ease that works', () => {
    const figures = figuresOf(model, { 'card width': 130, 'card height': 90, ease: 0, overlap: 10 }, METRIC);
    // The range begins at 3.175 mm: 4 on this grid.
    expect(figures.problems.find((problem) => problem.code === 'fit fails')).toMatchObject({
      measure: 'ease',
      nearest: 4,
    });
  });
});
