import { Resvg } from '@resvg/resvg-js';
import { describe, expect, it } from 'vitest';
import {
  boundsOf,
  compilePattern,
  evaluate,
  keyOf,
  lengthOf,
  perimeterOf,
  usualSizing,
  type Curve,
  type Figures,
  type Loop,
  type Pattern,
  type PieceDef,
  type PieceFigure,
} from '@/engine';
import { pieceLayout, rowLayout, type CuttingLayout } from '@/exports/cutting/layout';
import { cuttingDxf } from '@/exports/dxf/cutting';
import { cuttingSvg } from '@/exports/svg/cutting';
import { bare } from '../engine/bare-pattern';
import { SLUGS, atEnd, modelOf } from '../engine/patterns';
import { expectClose } from '../setup/expect-close';
import { boundsOfRead, lengthOfRead, readDxf, readSvg, type ReadLine } from './read-cutting';

/** A nanometre. */
const CLOSE = 1e-6;

function figuresOf(pieces: readonly PieceDef[]): Figures {
  const pattern: Pattern = { ...bare({}), pieces };
  const compiled = compilePattern(pattern);
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.faults));
  return evaluate(compiled.value, usualSizing(compiled.value, 'mm'));
}
/** 120 × 80 mm with a valley score 40 mm from the left, and in the right panel a hole 20 mm across and a slot of 10 × 4 mm. */
const PLATE: PieceDef = {
  name: 'Plate',
  builder: 'grid',
  stock: 'card',
  columns: [
    { name: 'left', size: '40 mm' },
    { name: 'right', size: '80 mm' },
  ],
  rows: [{ name: 'only', size: '80 mm' }],
  cells: [['panel left', 'panel right']],
  holes: [{ cell: 'right', across: '40 mm', along: '50 mm', diameter: '20 mm' }],
  slots: [{ cell: 'right', across: '40 mm', along: '20 mm', width: '10 mm', height: '4 mm' }],
};
const ROUND: PieceDef = { name: 'Round', builder: 'disc', stock: 'card', disc: 'round', diameter: '100 mm' };
const only = (piece: PieceDef): PieceFigure => {
  const [made] = figuresOf([piece]).pieces;
  if (!made) throw new Error(JSON.stringify(figuresOf([piece]).problems));
  return made;
};
const read = (layout: CuttingLayout) => [
  { format: 'SVG', lines: readSvg(cuttingSvg(layout, { title: 'Box' })).lines },
  { format: 'DXF', lines: readDxf(cuttingDxf(layout)).lines },
];

const sum = (curves: readonly Curve[]): number => curves.reduce((all, curve) => all + lengthOf(curve), 0);
const scoresOf = ({ net }: PieceFigure, kind: 'valley' | 'mountain'): readonly Curve[] => [
  ...net.folds.filter((fold) => fold.kind === kind && fold.angle !== 0).map(({ curve }) => curve),
  ...net.creases.filter((crease) => crease.kind === kind).map(({ curve }) => curve),
];
/** What the net of a piece holds, by work. */
function expectedOf(piece: PieceFigure) {
  const { net } = piece;
  return {
    cut: perimeterOf(net.outline) + net.holes.reduce((all, hole) => all + perimeterOf(hole), 0) + sum(net.slits),
    valley: sum(scoresOf(piece, 'valley')),
    mountain: sum(scoresOf(piece, 'mountain')),
    draw: net.panels.filter(({ role }) => role === 'tab').reduce((all, { loop }) => all + perimeterOf(loop), 0),
  };
}
/** Which way the arcs of closed lines bend: lengths alone would not tell a bump from a dent. */
const clockwiseOf = (loops: readonly Loop[]): number =>
  loops
    .flat()
    .reduce((all, curve) => all + (curve.type === 'arc' ? lengthOf(curve) * (curve.clockwise ? 1 : -1) : 0), 0);

function expectLengths(lines: readonly ReadLine[], expected: ReturnType<typeof expectedOf>, what: string): void {
  for (const [work, length] of Object.entries(expected))
    expectClose(lengthOfRead(lines, work), length, CLOSE, `${what}: ${work}`);
}
function expectSize(lines: readonly ReadLine[], across: number, along: number, what: string): void {
  const { left, right, low, high } = boundsOfRead(lines);
  expectClose(left, 0, CLOSE, `${what}: left`);
  expectClose(low, 0, CLOSE, `${what}: low`);
  expectClose(right, across, CLOSE, `${what}: right`);
  expectClose(high, along, CLOSE, `${what}: high`);
}
function expectPiece(piece: PieceFigure, what: string): void {
  const { left, right, top, bottom } = boundsOf(piece.net.outline);
  const loops = 1 + piece.net.holes.length;
  for (const { format, lines } of read(pieceLayout(piece, { glue: true }))) {
    expectLengths(lines, expectedOf(piece), `${what} ${piece.name} ${format}`);
    expectSize(lines, right - left, bottom - top, `${what} ${piece.name} ${format}`);
    const cut = lines.filter(({ work }) => work === 'cut');
    expect(cut.filter(({ closed }) => closed)).toHaveLength(loops);
    expect(cut.filter(({ closed }) => !closed)).toHaveLength(piece.net.slits.length);
    const bent = cut.filter(({ closed }) => closed).reduce((all, { clockwise }) => all + clockwise, 0);
    expectClose(
      bent,
      clockwiseOf([piece.net.outline, ...piece.net.holes]),
      CLOSE,
      `${what} ${piece.name} ${format}, bent`,
    );
    expectPlaces(piece, lines, format);
    // Held by its sheet until the last line.
    expectSize(cut.slice(-1), right - left, bottom - top, `${what} ${piece.name} ${format}, last line`);
  }
}

/** Scores lie where the net has them, seen from the top in SVG and from the foot in DXF. */
function expectPlaces(piece: PieceFigure, lines: readonly ReadLine[], format: string): void {
  const { left, top, bottom } = boundsOf(piece.net.outline);
  for (const kind of ['valley', 'mountain'] as const) {
    const scores = scoresOf(piece, kind);
    if (scores.length === 0) continue;
    const there = boundsOf(scores);
    // The bounds of a loop begin every curve where the last ended; single lines have ends of their own.
    const ends = scores.map(({ to }) => to);
    const high = Math.min(there.top, ...ends.map(({ y }) => y));
    const low = Math.max(there.bottom, ...ends.map(({ y }) => y));
    const found = boundsOfRead(lines.filter(({ work }) => work === kind));
    const what = `${piece.name} ${format}, ${kind}`;
    expectClose(found.left, Math.min(there.left, ...ends.map(({ x }) => x)) - left, CLOSE, what);
    expectClose(found.right, Math.max(there.right, ...ends.map(({ x }) => x)) - left, CLOSE, what);
    expectClose(found.low, format === 'SVG' ? high - top : bottom - low, CLOSE, what);
    expectClose(found.high, format === 'SVG' ? low - top : bottom - high, CLOSE, what);
  }
}

describe('a plate with a score, a hole and a slot', () => {
  const layout = pieceLayout(only(PLATE));

  it.each(read(layout))('has the lengths of rectangles and circles in $format', ({ lines }) => {
    // Outline 2 (120 + 80) = 400, hole 20 π, slot 2 (10 + 4) = 28; the score 80.
    expectClose(lengthOfRead(lines, 'cut'), 428 + 20 * Math.PI, CLOSE);
    expectClose(lengthOfRead(lines, 'valley'), 80, CLOSE);
    expect(lines).toHaveLength(4);
    expectSize(lines, 120, 80, 'plate');
  });

  it('lies the right way up in both: y runs down in SVG and up in DXF', () => {
    // The slot's middle is 20 mm below the top: 18 to 22 from the top, 58 to 62 from the foot.
    const [svg, dxf] = read(layout).map(({ lines }) =>
      lines
        .map((line) => boundsOfRead([line]))
        .find(({ left, right }) => Math.abs(left - 75) < 0.01 && Math.abs(right - 85) < 0.01),
    );
    expect(svg).toMatchObject({ low: 18, high: 22 });
    expect(dxf).toMatchObject({ low: 58, high: 62 });
  });
});

it.each(read(pieceLayout(only(ROUND))))('a circle of 100 mm is π × 100 mm round in $format', ({ lines }) => {
  expect(lines).toHaveLength(1);
  expect(lines[0]?.closed).toBe(true);
  expectClose(lengthOfRead(lines, 'cut'), 100 * Math.PI, CLOSE);
  expectSize(lines, 100, 100, 'circle');
});

describe('SVG', () => {
  const svg = cuttingSvg(pieceLayout(only(PLATE), { glue: true }), { title: 'Plate' });

  it('has its size in millimetres and a viewBox in the same units', () => {
    expect(readSvg(svg).root.attributes).toMatchObject({ width: '120mm', height: '80mm', viewBox: '0 0 120 80' });
    expect(readSvg(svg).root.text('desc')).toBe('Outer size 120 × 80 mm. One unit of this file is 1 mm.');
  });

  it('is read by a renderer as large as it says, at 96 pixels to the inch as CSS has it', () => {
    const { width, height } = new Resvg(svg);
    expectClose(width, (120 / 25.4) * 96, 1);
    expectClose(height, (80 / 25.4) * 96, 1);
  });

  it('has groups, paths and words alone: no transforms, styles, clipping or text', () => {
    const { elements } = readSvg(cuttingSvg(rowLayout(pieces('book-box'), { glue: true }), { title: 'Box' }));
    expect(new Set(elements.map(({ name }) => name))).toEqual(new Set(['svg', 'title', 'desc', 'g', 'path']));
    expect(new Set(elements.flatMap(({ attributes }) => Object.keys(attributes)))).toEqual(
      new Set(['xmlns', 'width', 'height', 'viewBox', 'id', 'fill', 'stroke', 'stroke-width', 'd']),
    );
    expect(elements.flatMap(({ attributes }) => attributes.id ?? [])).toEqual(['draw', 'score', 'valley', 'cut']);
  });

  it('keeps valley and mountain apart', () => {
    const { elements } = readSvg(cuttingSvg(rowLayout(pieces('gusset-bag')), { title: 'Bag' }));
    const score = elements.find(({ attributes }) => attributes.id === 'score');
    expect(score?.children.map(({ attributes: { id, stroke } }) => [id, stroke])).toEqual([
      ['valley', '#0000ff'],
      ['mountain', '#ff00ff'],
    ]);
  });

  it.each(['</title><script>alert(1)</script>', 'Ben & Ada\'s "best"', ']]> <!-- <![CDATA[ &#0; &amp;'])(
    'gives %s back as it was typed',
    (title) => {
      expect(readSvg(cuttingSvg(pieceLayout(only(ROUND)), { title })).root.text('title')).toBe(title);
    },
  );

  it('leaves out what XML cannot carry', () => {
    const title = `a\u0000b\u001b[31mc\uffff`;
    expect(readSvg(cuttingSvg(pieceLayout(only(ROUND)), { title })).root.text('title')).toBe('ab[31mc');
  });
});

describe('DXF', () => {
  const { header, layers, types } = readDxf(cuttingDxf(pieceLayout(only(PLATE), { glue: true })));

  it('says that it is in millimetres and how large it is', () => {
    // $INSUNITS 4: millimetres; $MEASUREMENT 1: metric (DXF Reference, HEADER section).
    expect(header).toMatchObject({
      $INSUNITS: 4,
      $MEASUREMENT: 1,
      $EXTMIN: { x: 0, y: 0 },
      $EXTMAX: { x: 120, y: 80 },
    });
  });

  it('has a layer for each work in its own colour, and nothing on layer 0', () => {
    expect(layers).toMatchObject({ CUT: 1, SCORE: 5, DRAW: 3 });
    expect([...types].sort()).toEqual(['LINE', 'LWPOLYLINE', 'LWPOLYLINE', 'LWPOLYLINE']);
    const works = readDxf(cuttingDxf(rowLayout(pieces('gusset-bag'), { glue: true }))).lines.map(({ work }) => work);
    expect(new Set(works)).toEqual(new Set(['draw', 'valley', 'mountain', 'cut']));
  });

  it('has curved scores as arcs', () => {
    const pillow = pieces('pillow-box')[0] as PieceFigure;
    const arcs = pillow.net.folds.filter(({ curve, angle }) => curve.type === 'arc' && angle !== 0);
    const { types } = readDxf(cuttingDxf(pieceLayout(pillow)));
    expect(arcs.length).toBeGreaterThan(0);
    expect(types.filter((type) => type === 'ARC')).toHaveLength(arcs.length);
  });

  it('has no word of what a piece is called', () => {
    const hostile = { ...only(PLATE), name: 'Plate\n  0\nSECTION\n' };
    expect(cuttingDxf(pieceLayout(hostile))).toBe(cuttingDxf(pieceLayout(only(PLATE))));
  });

  it('writes no number with an exponent', () => {
    for (const slug of SLUGS) expect(cuttingDxf(rowLayout(pieces(slug)))).not.toMatch(/^-?[\d.]+e[+-]?\d+$/im);
  });
});

const pieces = (slug: string): readonly PieceFigure[] => {
  const model = modelOf(slug);
  return evaluate(model, usualSizing(model)).pieces;
};

describe('all pieces side by side', () => {
  const row = rowLayout([only(PLATE), { ...only(ROUND), count: 2 }]);

  it.each(read(row))('lie 10 mm apart, as many as are needed, in $format', ({ lines }) => {
    // 120 + 10 + 100 + 10 + 100 across; the tallest is 100 along.
    expectSize(lines, 340, 100, 'row');
    expectClose(lengthOfRead(lines, 'cut'), 428 + 20 * Math.PI + 2 * 100 * Math.PI, CLOSE);
    expect(lines.slice(-2).map((line) => Math.round(boundsOfRead([line]).left))).toEqual([130, 240]);
  });

  it('are there again for every copy of the box', () => {
    expect(rowLayout([only(ROUND)], { copies: 3 }).across).toBe(320);
  });

  it('of no pieces are a drawing of no size that still reads', () => {
    expect(readSvg(cuttingSvg(rowLayout([]), { title: '' })).lines).toEqual([]);
    expect(readDxf(cuttingDxf(rowLayout([]))).lines).toEqual([]);
  });
});

it('leaves glue areas away unless they are asked for', () => {
  const [tray] = pieces('tray');
  if (!tray) throw new Error('no tray');
  expect(expectedOf(tray).draw).toBeGreaterThan(0);
  for (const { lines } of read(pieceLayout(tray))) expect(lengthOfRead(lines, 'draw')).toBe(0);
});

it('the same pieces give the same bytes', () => {
  const files = () => [
    cuttingSvg(rowLayout(pieces('book-box')), { title: 'Box' }),
    cuttingDxf(rowLayout(pieces('book-box'))),
  ];
  expect(files()).toEqual(files());
});

describe.each(SLUGS)('%s', (slug) => {
  const model = modelOf(slug);
  const usual = usualSizing(model);

  it.each([
    ['usual', usual],
    ['smallest', atEnd(model, usual, 'from')],
    ['largest', atEnd(model, usual, 'to')],
  ])('keeps every length and size at its %s size', (name, sizing) => {
    const made = evaluate(model, sizing).pieces;
    expect(made.length).toBeGreaterThan(0);
    for (const piece of made) expectPiece(piece, name);
  });

  it('keeps them with every option of every choice, layers of paper too', () => {
    for (const choice of model.pattern.choices)
      for (const option of choice.options) {
        const choices = { ...usual.choices, [keyOf(choice.name)]: option };
        for (const piece of evaluate(model, { ...usual, choices }).pieces)
          expectPiece(piece, `${choice.name} ${option}`);
      }
  });
});
