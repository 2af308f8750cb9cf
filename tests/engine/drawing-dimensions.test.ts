import { describe, expect, it } from 'vitest';
import { drawPiece, evaluate, type Drawing, type Figures, type Sizing } from '@/engine';
import { spread } from '@/engine/drawing/dimensions';
import { notesOf } from '@/engine/drawing/notes';
import { positionsOf } from '@/engine/drawing/stops';
import { SLUGS, figuresOf, inch, modelOf, pieceOf, sizingsOf } from './patterns';
import { strokesOf, textsOf } from './drawn';
import { expectClose } from '../setup/expect-close';

const METRIC: Partial<Sizing> = { units: 'mm', grid: '1mm' };
const WIDE = 640;

const drawn = (figures: Figures, piece: string, width = WIDE): Drawing =>
  drawPiece(pieceOf(figures, piece), { width, ...figures.sizing });
/** What is written in a drawing and its key, fractions with a plain slash. */
const written = (drawing: Drawing): readonly string[] =>
  textsOf(drawing).map(({ shape }) => shape.text.replaceAll('\u202f', ' ').replaceAll('\u2044', '/'));
/** Figures above the piece and on its left: outside the frame of its outline. */
function running(drawing: Drawing): { readonly across: readonly string[]; readonly along: readonly string[] } {
  const outline = drawing.shapes.flatMap((shape) =>
    shape.type === 'path' && (shape.role === 'cut' || shape.role === 'away') ? strokesOf(shape.d).flat() : [],
  );
  const [left, top] = [Math.min(...outline.map(({ x }) => x)), Math.min(...outline.map(({ y }) => y))];
  const figures = textsOf(drawing).filter(({ shape }) => shape.role === 'figure');
  const plain = (text: string) => text.replaceAll('\u202f', ' ').replaceAll('\u2044', '/');
  return {
    across: figures.filter(({ bottom }) => bottom < top).map(({ shape }) => plain(shape.text)),
    along: figures.filter(({ right, bottom }) => right < left && bottom > top).map(({ shape }) => plain(shape.text)),
  };
}

describe('running dimensions', () => {
  it('give scores, the beginning of a curve and the whole size, from the left and from the top edge', () => {
    const figures = figuresOf(modelOf('book-box'), { circle: inch(4.5) });
    // Two tabs of 1/2 in beside a floor of 2 1/4 in, the last one where the rest ends: 1/2, 2 3/4, 3 1/4. The arc of a
    // 4 1/2 in circle over 2 1/4 in rises 2.25 − √(2.25² − 1.125²) = 0.3014 in past 6 1/2: up to 6 13/16 on sixteenths.
    expect(running(drawn(figures, 'Floor'))).toEqual({
      across: ['1/2', '2 3/4', '3 1/4'],
      along: ['1/2', '6 1/2', '6 13/16'],
    });
  });
  it('give the scores of a piece whose outline is free too, and creases', () => {
    // A tab of 1/2 in, then walls of 4 and 3 in twice, a card’s thickness (+) on the way; sides creased down their middles.
    const { across } = running(drawn(figuresOf(modelOf('gable-carton')), 'Carton'));
    expect(across).toEqual(['1/2', '4 1/2', '6', '7 1/2', '11 1/2+', '13', '14 1/2']);
  });
  it('give the middles of holes', () => {
    const figures = figuresOf(modelOf('gusset-bag'), {}, METRIC);
    const { across, along } = running(drawn(figures, 'Bag'));
    const tenths = (mm: number) => `${Math.round(mm * 10) / 10}`;
    for (const [arc] of pieceOf(figures, 'Bag').net.holes) {
      if (arc?.type !== 'arc') throw new Error('a hole that is not round');
      expect(across).toContain(tenths(arc.centre.x));
      expect(along).toContain(tenths(arc.centre.y));
    }
  });
  it('stand on a ruler to the drawing’s own scale', () => {
    const figures = figuresOf(modelOf('tray'), {}, METRIC);
    const drawing = drawPiece(pieceOf(figures, 'Tray'), { width: WIDE, scale: 1.5, units: 'mm', grid: '1mm' });
    const ticks = drawing.shapes.flatMap((shape) =>
      shape.type === 'path' && shape.role === 'ruler' ? strokesOf(shape.d).map(([from]) => from.x) : [],
    );
    // A millimetre is 1.5 units, too fine; a centimetre in halves is 7.5 units a tick.
    for (let index = 1; index < ticks.length; index += 1)
      expectClose((ticks[index] as number) - (ticks[index - 1] as number), 7.5, 0.02);
    expect(ticks).toHaveLength(Math.floor(pieceOf(figures, 'Tray').across / 5));
  });
});

describe('figures moved apart', () => {
  it('keep their order, their sizes and the limits, and stay where they are when there is room', () => {
    expect(spread([20, 60], [10, 10], [0, 100])).toEqual([20, 60]);
    // Two of 10 at one place: 5 to either side of it.
    expect(spread([50, 50], [10, 10], [0, 100])).toEqual([45, 55]);
    // Against an end the last has half its size left: 95, and the one before is 10 nearer.
    expect(spread([99, 100], [10, 10], [0, 100])).toEqual([85, 95]);
    expect(spread([0, 1], [10, 10], [0, 100])).toEqual([5, 15]);
  });
});

describe('notes in a drawing', () => {
  it('tell radii of arcs, and like ones once', () => {
    expect(written(drawn(figuresOf(modelOf('book-box'), { circle: inch(4.5) }), 'Floor'))).toContain('R 2 1/4');
    const sleeve = written(drawn(figuresOf(modelOf('sleeve-drawer')), 'Sleeve'));
    // Two thumb notches at either edge.
    expect(sleeve.filter((text) => text.startsWith('4× R '))).toHaveLength(1);
  });
  it('tell whole circles by their diameter, as large as the disc', () => {
    const figures = figuresOf(modelOf('drum-box'), {}, METRIC);
    const { across } = pieceOf(figures, 'Bottom');
    expect(written(drawn(figures, 'Bottom'))).toContain(`Ø ${Math.round(across * 10) / 10}`);
  });
  it('tell the angles of tabs off their folds: a taper of 15° leaves 75°, a mitre 45°', () => {
    const texts = written(drawn(figuresOf(modelOf('book-box')), 'Fore edge'));
    expect(texts).toEqual(expect.arrayContaining(['2× 75°', '2× 45°']));
  });
  it('tell the angles of a polygon: (n − 2) · 180° / n', () => {
    // Six sides: 720° / 6 = 120°. Its tabs turn by as much as the walls do round the corner: 360° / 6 = 60°.
    const texts = written(drawn(figuresOf(modelOf('polygon-box'), { sides: 6 }), 'Base'));
    expect(texts).toEqual(expect.arrayContaining(['6× 120°', '6× fold 60°']));
  });
  it('tell both radii of a ring’s sector and its angle: a frustum unrolled', () => {
    const figures = figuresOf(modelOf('cone-cup'), {}, METRIC);
    const { net } = pieceOf(figures, 'Body');
    const [outer, inner] = net.outline
      .flatMap((curve) => (curve.type === 'arc' ? [curve.radius] : []))
      .sort((a, b) => b - a) as [number, number];
    const texts = written(drawn(figures, 'Body'));
    // The chord of the outer arc is 2 R sin(angle / 2); all three are in the drawing.
    const arc = net.outline.find((curve) => curve.type === 'arc' && curve.radius === outer);
    const chord = arc ? Math.hypot(arc.to.x - arc.from.x, arc.to.y - arc.from.y) : NaN;
    const angle = (2 * Math.asin(chord / 2 / outer) * 180) / Math.PI;
    const tenth = (value: number) => `${Math.round(value * 10) / 10}`;
    expect(texts).toEqual(expect.arrayContaining([`R ${tenth(outer)}`, `R ${tenth(inner)}`, `${tenth(angle)}°`]));
  });
  it('tell sizes of windows, depths of tabs and the number of teeth', () => {
    const frame = figuresOf(modelOf('frame-box'), {}, METRIC);
    const window = pieceOf(frame, 'Frame').net.holes[0] ?? [];
    const [xs, ys] = [window.map(({ from }) => from.x), window.map(({ from }) => from.y)];
    const size = (values: readonly number[]) => Math.round((Math.max(...values) - Math.min(...values)) * 10) / 10;
    expect(written(drawn(frame, 'Frame'))).toContain(`${size(xs)} × ${size(ys)}`);
    // "Trim these tabs to 1/2 deep", say the words of the carcass.
    expect(written(drawn(figuresOf(modelOf('drawer-chest')), 'Carcass'))).toContain('4× tab 1/2');
    const strip = figuresOf(modelOf('drum-box'));
    const teeth = pieceOf(strip, 'Strip').net.panels.filter(({ tooth }) => tooth).length;
    expect(written(drawn(strip, 'Strip'))).toContain(`${teeth} teeth`);
  });
  it('tell the length of a slit, and the edge its place', () => {
    const tray = pieceOf(figuresOf(modelOf('tray'), {}, METRIC), 'Tray');
    const slit = { type: 'line', from: { x: 60, y: 60 }, to: { x: 60, y: 85 } } as const;
    const slitted = { ...tray, net: { ...tray.net, slits: [slit] } };
    const positions = positionsOf(slitted);
    expect(positions.across.map(({ at }) => at)).toContain(60);
    expect(notesOf(slitted, positions, String).map(({ text }) => text)).toContain('slit 25');
  });
  it('tell the ends of slanting scores by their places when no edge has them', () => {
    const drawing = drawn(figuresOf(modelOf('diagonal-envelope')), 'Envelope');
    // The four corners of the body, half an inch of crossing cut off each flap: as the words say them.
    expect(written(drawing)).toEqual(
      expect.arrayContaining(['1/4, 4', '4, 1/4', '6 11/16, 2 15/16', '2 15/16, 6 11/16']),
    );
  });
});

describe('the text alternative', () => {
  const sizings = SLUGS.flatMap((slug) => [...sizingsOf(modelOf(slug), 2, 5)].map((sizing) => ({ slug, sizing })));
  it('names every panel and tab, and those that the drawing has no room for', () => {
    for (const { slug, sizing } of sizings)
      for (const piece of evaluate(modelOf(slug), sizing).pieces) {
        const drawing = drawPiece(piece, { width: 300, ...sizing });
        const [, small = ''] = drawing.alt.split('Too small to be named in the drawing: ');
        const texts = textsOf(drawing).map(({ shape }) => shape);
        const joined = new Set(piece.net.joins.map(({ panels }) => panels[1]));
        for (const { name, tooth } of piece.net.panels) {
          if (tooth && piece.net.panels.filter((one) => one.tooth).length > 1) continue;
          expect(drawing.alt, `${slug} ${piece.name}`).toContain(name);
          const shown = texts.some(({ of }) => of === name) || joined.has(name);
          if (!shown) expect(small.split(/, |\./), `${slug} ${piece.name}: ${name}`).toContain(name);
        }
      }
  });
  it('says the size, the scores, the cuts and every radius and angle', () => {
    const figures = figuresOf(modelOf('book-box'), { circle: inch(4.5) });
    expect(drawn(figures, 'Floor').alt).toBe(
      'Floor, 3 1/4 × 6 13/16 in. Along the 3 1/4 in side score at 1/2 in from each end. Turn; along the 6 13/16 in side score at 1/2. ' +
        'Cut away the two corner squares at the top, along the scores. Cut away the two corner pieces at the bottom, 1/2 in wide and 5/16 in tall. ' +
        'Taper the tab at the top at both ends by 15°. Taper the tabs at the left and right at both ends by 45°. ' +
        'At the bottom draw the arc of a 4 1/2 in circle over the 2 1/4 in between the scores, its ends 6 1/2 in down, and cut round it. ' +
        'Noted: a radius of 2 1/4, 2 times an angle of 75°, 4 times an angle of 45°. Panels: floor, curve. Glue tabs: end, left, right.',
    );
  });
});
