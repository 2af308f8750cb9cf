import { describe, expect, it } from 'vitest';
import { areaOf, compilePattern, instructionsOf, say, snap, type Loop, type Pattern } from '@/engine';
import { expectClose } from '../setup/expect-close';
import { figuresOf, inch, modelOf, pieceOf } from './patterns';

describe('book-box', () => {
  const model = modelOf('book-box');
  it('cuts a strip of 2 1/8 in, 3 1/8 in with its tabs, round a 4 in circle over 2 in (common practice, no source)', () => {
    const figures = figuresOf(model, { 'inside depth': inch(2), circle: inch(4) });
    const spine = pieceOf(figures, 'Lower spine');
    expect(spine.across).toBe(inch(3 + 1 / 8));
    expect(snap((spine.scores.across[1] as number) - (spine.scores.across[0] as number))).toBe(53.975);
    // 2 × 2 × asin(2 / 4) = 2.0944 in: the strip is 0.0306 in over.
    expectClose(figures.measures.find((measure) => measure.name === 'arc')?.exact ?? NaN, inch(2.0943951), 1e-4);
    // 0.1 mm a tooth on a circle of this size: nine teeth (derived: pitch √(8 × 0.1 × 50.8) = 6.375 mm; 53.975 / 6.375 → 9).
    expect(figures.measures.find((measure) => measure.name === 'teeth')?.cut).toBe(9);
  });
  it('cuts 2 3/8 in at sixteenths over 2 1/4 in of a 4 1/2 in circle', () => {
    const spine = pieceOf(figuresOf(model, { circle: inch(4.5) }), 'Lower spine');
    expect(spine.across).toBe(inch(3 + 3 / 8));
    expect(spine.along).toBe(inch(8)); // 9 − 1 1/2 + 1/2
  });
  it('gives the sizes worked by hand at 9 × 6 × 2 1/4 in', () => {
    const figures = figuresOf(model, { circle: inch(4.5), overhang: inch(0.25) });
    const sizes = Object.fromEntries(
      figures.pieces.map(({ name, across, along }) => [name, [snap(across / 25.4), snap(along / 25.4)]]),
    );
    expect(sizes).toEqual({
      Cover: [6.25, 9.25],
      'Fore edge': [3.25, 9],
      Floor: [3.25, 6.8125], // 1/2 + 6 + the arc's 0.3014, up to 5/16
      'Lower spine': [3.375, 8],
      'Upper spine': [3.3125, 1.75], // 2 3/8 − 1/16 + two tabs; 1 1/2 + 1/4
      Lid: [3.1875, 7.3125], // 2 1/4 − 1/16 + two tabs; 1/2 + 6 + 5/16 + 1/2
    });
  });
  it('draws the curve as an arc of the circle over the depth', () => {
    const { net } = pieceOf(figuresOf(model, { circle: inch(4.5) }), 'Floor');
    // 4 1/2 × asin(2 1/4 ÷ 4 1/2) = 2.35619 in
    expectClose(net.edges.curve ?? NaN, inch(2.35619449), 1e-3);
  });
  it('lets a half round be asked: the arc is half the circle and the bulge half the depth', () => {
    const figures = figuresOf(model, { 'inside depth': inch(3), circle: inch(3) });
    expect(figures.problems).toEqual([]);
    expectClose(pieceOf(figures, 'Floor').net.edges.curve ?? NaN, (Math.PI * inch(3)) / 2, 1e-6);
  });
  it('has a straight spine without curve, teeth or bulge', () => {
    const figures = figuresOf(model, {}, { choices: { spine: 'straight' } });
    expect(figures.problems).toEqual([]);
    expect(pieceOf(figures, 'Lower spine').across).toBe(inch(3.25));
    expect(pieceOf(figures, 'Floor').along).toBe(inch(6.5));
    for (const piece of figures.pieces) expect(piece.net.outline.every((curve) => curve.type === 'line')).toBe(true);
  });
  it('closes for good without a flip lid: a full-height spine and a top', () => {
    const figures = figuresOf(model, { overhang: inch(0.25) }, { choices: { lid: 'none' } });
    expect(figures.pieces.map((piece) => piece.name)).toEqual(['Cover', 'Fore edge', 'Floor', 'Lower spine', 'Top']);
    expect(pieceOf(figures, 'Lower spine').along).toBe(inch(9.75)); // 9 + 1/4 + the 1/2 in foot
  });
  it('says that a lid without play rubs, and draws it all the same', () => {
    const figures = figuresOf(model, { play: 0 });
    expect(figures.fits.find((fit) => fit.name === 'lid passes between the covers')?.holds).toBe(false);
    expect(figures.problems[0]).toMatchObject({ code: 'fit fails', measure: 'play', nearest: inch(1 / 16) });
    expect(figures.pieces.length).toBe(6);
  });
  it('rounds cover corners on the fore-edge side only, and warns when they bare the foot', () => {
    const figures = figuresOf(
      model,
      { 'corner radius': inch(0.5), overhang: inch(0.25) },
      { choices: { 'cover corners': 'rounded' } },
    );
    const { net } = pieceOf(figures, 'Cover');
    const arcs = net.outline.filter((curve) => curve.type === 'arc');
    expect(arcs.map((arc) => arc.radius)).toEqual([12.7, 12.7]);
    expect(arcs.every((arc) => arc.from.x > net.across / 2)).toBe(true);
    expect(figures.problems).toEqual([]);
    expect(figures.fits.find((fit) => fit.advice)?.holds).toBe(false);
  });
  it('cuts the ribbon’s slot inside the lid', () => {
    const { net } = pieceOf(figuresOf(model, {}, { choices: { 'pull ribbon': 'through the lid' } }), 'Lid');
    expect(net.holes).toHaveLength(1);
    expectClose(Math.abs(areaOf(net.holes[0] as Loop)), (9.525 + 1) * 2, 1e-6); // ribbon 3/8 in + 1 mm, 2 mm wide
  });
});

describe('trays', () => {
  it('score at the height from each of four sides', () => {
    const tray = pieceOf(
      figuresOf(modelOf('tray'), { 'inside length': inch(9), 'inside width': inch(6), 'inside height': inch(1.25) }),
      'Tray',
    );
    expect([tray.across, tray.along]).toEqual([inch(11.5), inch(8.5)]);
    expect(tray.scores).toEqual({ across: [inch(1.25), inch(10.25)], along: [inch(1.25), inch(7.25)] });
  });
  it('trim their tabs where two would meet on one wall (derived: half the length less a card’s thickness)', () => {
    const figures = figuresOf(modelOf('tray'), { 'inside length': inch(3), 'inside height': inch(2) });
    expect(figures.measures.find((measure) => measure.name === 'corner tab')?.cut).toBe(inch(1 + 7 / 16)); // 1 1/2 in − 0.3 mm, down
    expect(figures.problems).toEqual([]);
  });
  it('lidded: the lid is 4 card thicknesses and the play wider across the tabbed walls, 2 and the play longer (derived)', () => {
    const figures = figuresOf(
      modelOf('lidded-box'),
      { 'inside length': 180, 'inside width': 100, 'card thickness': 0.5, play: 2 },
      { units: 'mm', grid: '0.5mm' },
    );
    const cut = (name: string) => figures.measures.find((measure) => measure.name === name)?.cut;
    expect([cut('lid inside length'), cut('lid inside width')]).toEqual([183, 104]);
  });
  it('lidded: take the usual lid height for an answer: 25.4 mm is cut 25 mm, not worked out again from a rounded height', () => {
    const figures = figuresOf(modelOf('lidded-box'), {}, { units: 'mm', grid: '1mm' });
    // 1 1/2 in × 2/3 = 1 in, which lies on eighths; 38 mm × 2/3 would not.
    expect(figures.measures.find((measure) => measure.name === 'lid height')).toMatchObject({ exact: 25.4, cut: 25 });
  });
  it('lidded: refuse a lid with no play after rounding, and name the nearest that works', () => {
    const figures = figuresOf(modelOf('lidded-box'), { play: 0, 'card thickness': 0 });
    expect(figures.problems[0]).toMatchObject({ code: 'fit fails', measure: 'play', nearest: inch(1 / 16) });
  });
});

describe('sleeve-drawer', () => {
  it('wraps the drawer: tab, wide, narrow, wide and a card’s thickness, narrow less one', () => {
    const figures = figuresOf(
      modelOf('sleeve-drawer'),
      { 'inside length': 150, 'inside width': 100, 'inside height': 30, tab: 12, 'card thickness': 0.5, play: 1 },
      { units: 'mm', grid: '0.5mm' },
    );
    const sleeve = pieceOf(figures, 'Sleeve');
    // wide = 100 + 4 × 0.5 + 1 = 103; narrow = 30 + 0.5 + 1 = 31.5
    expect(sleeve.scores.across).toEqual([12, 115, 146.5, 250]);
    expect(sleeve.across).toBe(281);
  });
  it('says a step of one card thickness in words, since no ruler shows it', () => {
    const figures = figuresOf(modelOf('sleeve-drawer'));
    const score = instructionsOf(pieceOf(figures, 'Sleeve'))[1];
    expect(say(score ?? [], { units: 'in', grid: '1/16in' })).toBe(
      'Along the 11 1/2 in side score at 1/2, 4 5/8, 6 and 10 1/8 plus a card’s thickness.',
    );
  });
});

describe('the departure', () => {
  it('is found on pieces without columns and rows too: a disc of 4 in is cut 102 mm, 0.4 mm over', () => {
    const disc: Pattern = {
      ...modelOf('tray').pattern,
      measures: [{ name: 'across', ask: { question: 'How wide?', usual: '4 in', from: '1 in', to: '9 in' } }],
      pieces: [{ name: 'Disc', stock: 'card', builder: 'disc', disc: 'disc', diameter: 'across' }],
      fits: [],
      finished: { inside: [], outside: [] },
      assembly: [],
    };
    const compiled = compilePattern(disc);
    if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
    const { departure } = figuresOf(compiled.value, {}, { units: 'mm', grid: '1mm' });
    expect(departure).toEqual({ mm: 0.4, where: 'Disc, across' });
  });
});
