import { describe, expect, it } from 'vitest';
import {
  cutsInWords,
  drawSheet,
  evaluate,
  planning,
  planSheets,
  say,
  show,
  type Drawing,
  type PieceFigure,
  type SheetPlan,
  type Stock,
} from '@/engine';
import { SLUGS, figuresOf, inch, modelOf, seeded, sizingsOf } from './patterns';
import { expectCuttable, followWords } from './trimmer';

const blank = (name: string, across: number, along: number, count = 1) => ({ name, across, along, count });
const stock = (across: number, along: number): Stock => ({ id: 'own', name: 'own', across, along });
const partsOf = (plan: SheetPlan) => plan.sheets.flatMap(({ parts }) => parts);
const round = (random: () => number, low: number, high: number) => low + Math.floor(random() * (high - low + 1));

describe('planSheets', () => {
  it('fills a sheet with four quarters (4 × 6 × 6 in on 12 × 12)', () => {
    const plan = planSheets({ pieces: [blank('Square', inch(6), inch(6), 4)] }, { stock: '12x12in' });
    expect(plan.used).toBe(1);
    expect(plan.sheets[0]?.offcuts).toEqual([]);
    expect(plan.offcut).toBeNull();
    expectCuttable(plan);
  });
  it('turns a piece that fits only the other way', () => {
    const plan = planSheets({ pieces: [blank('Long', 250, 200)] }, { stock: 'a4' });
    expect(plan.sheets[0]?.parts[0]).toMatchObject({ turned: true, across: 200, along: 250 });
  });
  it('counts copies, and gives the same plan twice', () => {
    const figures = figuresOf(modelOf('lidded-box'));
    const plan = planSheets(figures, { stock: '12x12in', copies: 12 });
    expect(partsOf(plan)).toHaveLength(24);
    expect(planSheets(figures, { stock: '12x12in', copies: 12 })).toEqual(plan);
    expectCuttable(plan);
  });
  it('plans every pattern on every stock so that a trimmer can cut it', () => {
    for (const slug of SLUGS)
      for (const sizing of sizingsOf(modelOf(slug), 2, 9)) {
        const figures = evaluate(modelOf(slug), sizing);
        for (const stock of ['12x12in', 'a4', '6x6in'] as const)
          expectCuttable(planSheets(figures, { stock, tries: 32 }));
      }
  }, 60_000);
  it('has nothing to cut for no pieces', () => {
    expect(planSheets({ pieces: [] }, { stock: 'a4' })).toMatchObject({
      used: 0,
      sheets: [],
      tooLarge: [],
      offcut: null,
    });
  });

  // Sheets cut up at random by straight cuts: that many sheets hold the pieces, and no fewer do, since nothing is left over.
  it('puts sheets together again that were cut up without waste', () => {
    const random = seeded(41);
    for (let time = 0; time < 12; time += 1) {
      const pieces: ReturnType<typeof blank>[] = [];
      const cutUp = (w: number, h: number, depth: number) => {
        if (depth === 0 || Math.min(w, h) < 40) {
          pieces.push(blank(`P${pieces.length}`, w, h));
          return;
        }
        if (w > h) {
          const at = round(random, 15, w - 15);
          cutUp(at, h, depth - 1);
          cutUp(w - at, h, depth - 1);
        } else {
          const at = round(random, 15, h - 15);
          cutUp(w, at, depth - 1);
          cutUp(w, h - at, depth - 1);
        }
      };
      cutUp(200, 200, 2);
      cutUp(200, 200, 2);
      const plan = planSheets({ pieces }, { stock: stock(200, 200), tries: 20_000 });
      expect(plan.used, JSON.stringify(pieces)).toBe(2);
      expect(plan.offcut).toBeNull();
      expectCuttable(plan);
    }
  });
  it('finds the packing that needs an L beside the first cut', () => {
    // 60 × 100 beside 40 × 70 over 40 × 30 fills 100 × 100; turned pieces alone do not.
    const pieces = [blank('A', 100, 60), blank('B', 40, 70), blank('C', 30, 40)];
    expect(planSheets({ pieces }, { stock: stock(100, 100) }).used).toBe(1);
  });
  it('uses no fewer sheets than the area or the large pieces demand, and no more than one a piece', () => {
    const random = seeded(2);
    for (let time = 0; time < 20; time += 1) {
      const pieces = Array.from({ length: 12 }, (_, index) =>
        blank(`P${index}`, round(random, 20, 190), round(random, 20, 190)),
      );
      const plan = planSheets({ pieces }, { stock: '12x12in', margin: 3 });
      const side = inch(12) - 6;
      const area = pieces.reduce((sum, piece) => sum + piece.across * piece.along, 0);
      const large = pieces.filter(({ across, along }) => Math.min(across, along) > side / 2).length;
      expect(plan.used).toBeGreaterThanOrEqual(Math.max(Math.ceil(area / side ** 2), large));
      expect(plan.used).toBeLessThanOrEqual(12);
      expect(partsOf(plan)).toHaveLength(12);
      expectCuttable(plan, 3);
    }
  });

  it('leaves the largest rectangle that it can in one piece: two strips of 3 in leave 6 × 12', () => {
    const plan = planSheets({ pieces: [blank('Strip', inch(3), inch(12), 2)] }, { stock: '12x12in' });
    expect(plan.offcut?.offcut).toMatchObject({ name: 'A', across: inch(6), along: inch(12) });
  });
  it('names offcuts over all sheets, and none of them is a sliver', () => {
    const pieces = [blank('Card', 208, 100, 4)];
    const plan = planSheets({ pieces }, { stock: 'a4' });
    // 210 × 297: two cards on a sheet leave 210 × 97 (and 2 mm beside them) each.
    expect(plan.sheets.map(({ offcuts }) => offcuts.map(({ name }) => name))).toEqual([['A'], ['B']]);
    expect(plan.sheets[0]?.offcuts[0]).toMatchObject({ across: 210, along: 97 });
  });
});

describe('materials', () => {
  it('plans each material from sheets of its own, in its own size where that is given', () => {
    const pieces = [
      { ...blank('Base', 200, 200), stock: 'card' as const },
      { ...blank('Panel', 60, 60, 4), stock: 'patterned paper' as const },
    ];
    const plan = planSheets({ pieces }, { stock: '12x12in', stocks: { 'patterned paper': '6x6in' } });
    expect(plan.takes.map(({ material, stock, used }) => [material, stock.id, used])).toEqual([
      ['card', '12x12in', 1],
      ['patterned paper', '6x6in', 1],
    ]);
    for (const sheet of plan.sheets)
      expect(sheet.parts.every(({ piece }) => (piece === 'Base') === (sheet.material === 'card'))).toBe(true);
    expectCuttable(plan);
  });
});

describe('grain', () => {
  const piece = (foldsRun: 'across' | 'along') => ({ ...blank('Wall', 200, 90), foldsRun });
  const laid = (
    foldsRun: 'across' | 'along',
    folds: 'along the grain' | 'across the grain',
    grain?: 'across' | 'along',
  ) =>
    planSheets({ pieces: [piece(foldsRun)] }, { stock: { ...stock(210, 297), ...(grain ? { grain } : {}) }, folds })
      .sheets[0]?.parts[0]?.turned;
  it('lays a piece so that its folds run with the grain, which runs along unless the stock says otherwise', () => {
    expect(laid('along', 'along the grain')).toBe(false);
    expect(laid('across', 'along the grain')).toBe(true);
    expect(laid('across', 'along the grain', 'across')).toBe(false);
  });
  it('lays it the other way where folds must cross the grain', () => {
    expect(laid('along', 'across the grain')).toBe(true);
  });
  it('reads from the net how most folds run', () => {
    // The usual tray is longer across than along: its two long folds run across.
    const figures = figuresOf(modelOf('tray'));
    const [tray] = figures.pieces as readonly [PieceFigure];
    expect(tray.across).toBeGreaterThan(tray.along);
    const plan = planSheets(figures, { stock: stock(tray.across, tray.across), folds: 'along the grain' });
    expect(plan.sheets[0]?.parts[0]?.turned).toBe(true);
  });
  it('does not turn a piece to save a sheet when the grain forbids it', () => {
    const pieces = [{ ...blank('Strip', 100, 45, 4), foldsRun: 'across' as const }];
    // Drawn lying, 100 × 45 fits twice below one another on 100 × 100; held upright by the grain, twice beside one another.
    expect(planSheets({ pieces }, { stock: stock(100, 100) }).used).toBe(2);
    expect(planSheets({ pieces }, { stock: stock(180, 100) }).used).toBe(1);
    expect(
      planSheets({ pieces }, { stock: { ...stock(180, 100), grain: 'across' }, folds: 'along the grain' }).used,
    ).toBe(2);
  });
  it('counts a piece as too large that would fit only against the grain', () => {
    const plan = planSheets(
      { pieces: [{ ...blank('Long', 250, 100), foldsRun: 'along' }] },
      { stock: stock(210, 297), folds: 'along the grain' },
    );
    expect(plan.tooLarge.map(({ name }) => name)).toEqual(['Long']);
  });
});

describe('words of the cuts', () => {
  const words = (plan: SheetPlan) => cutsInWords(plan, 0).map((one) => say(one, { units: 'in', grid: '1/16in' }));
  it('says where to trim, measured from the edge in the hand, and what comes off', () => {
    const plan = planSheets({ pieces: [blank('Base', inch(8), inch(12))] }, { stock: '12x12in' });
    expect(words(plan)).toEqual(['1. Trim at 8 in from the left: that is the Base; left over: offcut A, 4 × 12.']);
  });
  it('says when to turn', () => {
    const plan = planSheets(
      { pieces: [blank('Base', inch(12), inch(8)), blank('Lid', inch(4), inch(4))] },
      { stock: '12x12in' },
    );
    const said = words(plan).join(' ');
    expect(said.match(/turn/gi)).toHaveLength(1);
  });
  it('trims the margin off first', () => {
    const plan = planSheets(
      { pieces: [blank('Base', inch(11.75), inch(11.75))] },
      { stock: '12x12in', margin: inch(0.125) },
    );
    expect(words(plan)).toEqual([
      '1. Trim at 1/8 in from the left: the edge comes off; the rest is 11 7/8 × 12.',
      '2. Trim the rest at 11 3/4 in: a strip 11 3/4 × 12; the edge comes off.',
      '3. Take the 11 3/4 × 12 strip, turn it and trim at 1/8 in: the edge comes off; the rest is 11 3/4 × 11 7/8.',
      '4. Trim the rest at 11 3/4 in: that is the Base; the edge comes off.',
    ]);
  });
  it('lets someone who has only the words cut every piece', () => {
    const random = seeded(5);
    for (let time = 0; time < 30; time += 1) {
      const pieces = Array.from({ length: 9 }, (_, index) =>
        blank(`Piece ${index}`, round(random, 10, 140), round(random, 10, 140), 1 + (index % 2)),
      );
      const plan = planSheets({ pieces }, { stock: stock(210, 297), margin: time % 3, seed: time });
      const got = plan.sheets.flatMap((_, sheet) => followWords(plan, sheet));
      const size = (w: number, h: number) => [w, h].sort((a, b) => a - b).join(' × ');
      const asked = pieces.flatMap(({ name, across, along, count }) =>
        Array.from({ length: count }, () => `${name}: ${size(across, along)}`),
      );
      expect(got.map(({ name, size: [w, h] }) => `${name}: ${size(w, h)}`).sort()).toEqual(asked.sort());
    }
  });
});

describe('drawSheet', () => {
  const plan = planSheets(figuresOf(modelOf('book-box')), { stock: '12x12in' });
  const drawn = (width: number) =>
    plan.sheets.map((_, i) => drawSheet(plan, i, { width, units: 'in', grid: '1/16in' }));
  const texts = ({ shapes }: Drawing) => shapes.flatMap((shape) => (shape.type === 'text' ? [shape] : []));
  it.each([200, 300, 480])('numbers every cut once, inside its frame, no number on another (%i wide)', (width) => {
    drawn(width).forEach((drawing, i) => {
      const numbers = texts(drawing).filter(({ of }) => of === 'cut number');
      expect(numbers.map(({ text }) => text)).toEqual(plan.sheets[i]?.cuts.map(({ n }) => `${n}`));
      numbers.forEach((a, index) => {
        expect(a.x > 8 && a.x < drawing.width - 8 && a.y > 8 && a.y < drawing.height - 8).toBe(true);
        // Circles of 17 across.
        for (const b of numbers.slice(index + 1)) expect(Math.hypot(a.x - b.x, a.y - b.y)).toBeGreaterThan(17);
      });
    });
  });
  it('labels offcuts with their letter and size, and tells both to those who hear it', () => {
    const { sheet, offcut } = plan.offcut ?? { sheet: 0, offcut: { name: '', across: 0, along: 0 } };
    const drawing = drawn(300)[sheet] as Drawing;
    expect(texts(drawing).map(({ text }) => text)).toContain(`offcut ${offcut.name}`);
    const size = [offcut.across, offcut.along].map(
      (mm) => show(mm, { units: 'in', grid: '1/16in', bare: true }).typeset,
    );
    expect(drawing.alt).toContain(`${offcut.name} ${size.join(' × ')}`);
  });
});

describe('planning', () => {
  const random = seeded(8);
  const pieces = Array.from({ length: 30 }, (_, index) =>
    blank(`P${index}`, round(random, 30, 150), round(random, 10, 90)),
  );
  it('gives a whole plan at once, and only better ones after it', () => {
    const plans = [...planning({ pieces }, { stock: 'a4', tries: 3000 })].flatMap((better) =>
      better ? [better()] : [],
    );
    expect(plans.length).toBeGreaterThan(1);
    const worth = ({ used, offcut }: SheetPlan) =>
      -used * 1e9 + (offcut ? offcut.offcut.across * offcut.offcut.along : 0);
    for (const [index, plan] of plans.entries()) {
      expect(partsOf(plan)).toHaveLength(30);
      expectCuttable(plan);
      if (index > 0) expect(worth(plan)).toBeGreaterThan(worth(plans[index - 1] as SheetPlan));
    }
  });
  it('never does worse with more tries', () => {
    const used = [0, 200, 4000].map((tries) => planSheets({ pieces }, { stock: 'a4', tries }).used);
    expect(used[1]).toBeLessThanOrEqual(used[0] as number);
    expect(used[2]).toBeLessThanOrEqual(used[1] as number);
  });
  it('is a matter of pieces, seed and tries alone', () => {
    const plan = (seed: number) => planSheets({ pieces }, { stock: 'a4', tries: 500, seed });
    expect(plan(3)).toEqual(plan(3));
    expect(plan(4)).not.toEqual(plan(3));
  });
});
