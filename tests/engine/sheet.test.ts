import { describe, expect, it } from 'vitest';
import { STOCKS, cutsInWords, evaluate, planSheets, say, type PieceFigure, type SheetPlan } from '@/engine';
import { SLUGS, figuresOf, inch, modelOf, seeded, sizingsOf } from './patterns';

const blank = (name: string, across: number, along: number, count = 1) =>
  ({ name, across, along, count }) as PieceFigure;

/** Every part inside the sheet and the margin, none over another; cutting along the cuts alone sets every part free. */
function expectCuttable(plan: SheetPlan): void {
  for (const sheet of plan.sheets) {
    const boxes = [...sheet.parts, ...sheet.offcuts];
    for (const box of boxes) {
      expect(
        box.x >= -1e-6 &&
          box.y >= -1e-6 &&
          box.x + box.across <= plan.stock.across + 1e-6 &&
          box.y + box.along <= plan.stock.along + 1e-6,
      ).toBe(true);
    }
    boxes.forEach((a, index) => {
      for (const b of boxes.slice(index + 1)) {
        const apart =
          a.x + a.across <= b.x + 1e-5 ||
          b.x + b.across <= a.x + 1e-5 ||
          a.y + a.along <= b.y + 1e-5 ||
          b.y + b.along <= a.y + 1e-5;
        expect(apart, `${JSON.stringify(a)} over ${JSON.stringify(b)}`).toBe(true);
      }
    });
    // Replay: the hand holds rectangles; each cut must run from edge to edge of exactly one of them.
    let held = [{ x: 0, y: 0, w: plan.stock.across, h: plan.stock.along }];
    for (const cut of sheet.cuts) {
      const index = held.findIndex((box) =>
        cut.runs === 'across'
          ? Math.abs(cut.from.x - box.x) < 1e-5 &&
            Math.abs(cut.to.x - (box.x + box.w)) < 1e-5 &&
            cut.at > box.y + 1e-6 &&
            cut.at < box.y + box.h - 1e-6
          : Math.abs(cut.from.y - box.y) < 1e-5 &&
            Math.abs(cut.to.y - (box.y + box.h)) < 1e-5 &&
            cut.at > box.x + 1e-6 &&
            cut.at < box.x + box.w - 1e-6,
      );
      const box = held[index];
      expect(box, `cut ${cut.n} runs from edge to edge`).toBeDefined();
      if (!box) return;
      expect(Math.abs(cut.measure - (cut.runs === 'across' ? cut.at - box.y : cut.at - box.x))).toBeLessThan(1e-6);
      const halves =
        cut.runs === 'across'
          ? [
              { ...box, h: cut.at - box.y },
              { ...box, y: cut.at, h: box.y + box.h - cut.at },
            ]
          : [
              { ...box, w: cut.at - box.x },
              { ...box, x: cut.at, w: box.x + box.w - cut.at },
            ];
      held = held.toSpliced(index, 1, ...halves);
    }
    for (const part of sheet.parts) {
      expect(
        held.some(
          (box) =>
            Math.abs(box.x - part.x) < 1e-5 &&
            Math.abs(box.y - part.y) < 1e-5 &&
            Math.abs(box.w - part.across) < 1e-5 &&
            Math.abs(box.h - part.along) < 1e-5,
        ),
        `${part.piece} is cut free`,
      ).toBe(true);
    }
  }
}

describe('planSheets', () => {
  it('fills a sheet with four quarters (4 × 6 × 6 in on 12 × 12)', () => {
    const plan = planSheets({ pieces: [blank('Square', inch(6), inch(6), 4)] }, { stock: '12x12in' });
    expect(plan.used).toBe(1);
    expect(plan.sheets[0]?.offcuts).toEqual([]);
    expectCuttable(plan);
  });
  it('turns a piece that fits only the other way', () => {
    const plan = planSheets({ pieces: [blank('Long', 250, 200)] }, { stock: 'a4' });
    expect(plan.sheets[0]?.parts[0]).toMatchObject({ turned: true, across: 200, along: 250 });
  });
  it('says which piece is larger than the sheet', () => {
    const plan = planSheets({ pieces: [blank('Wall', 400, 100), blank('Floor', 100, 100)] }, { stock: 'a4' });
    expect(plan.tooLarge.map(({ name }) => name)).toEqual(['Wall']);
    expect(plan.used).toBe(1);
  });
  it('counts copies, and gives the same plan twice', () => {
    const figures = figuresOf(modelOf('lidded-box'));
    const plan = planSheets(figures, { stock: '12x12in', copies: 12 });
    expect(plan.sheets.flatMap((sheet) => sheet.parts)).toHaveLength(24);
    expect(planSheets(figures, { stock: '12x12in', copies: 12 })).toEqual(plan);
    expectCuttable(plan);
  });
  it('plans every pattern on every stock so that a trimmer can cut it', () => {
    for (const slug of SLUGS)
      for (const sizing of sizingsOf(modelOf(slug), 6, 9))
        for (const stock of Object.values(STOCKS)) {
          expectCuttable(planSheets(evaluate(modelOf(slug), sizing), { stock }));
        }
  });
  it('needs no more sheets than area demands, by half, on random pieces', () => {
    const random = seeded(2);
    for (let round = 0; round < 20; round += 1) {
      const pieces = Array.from({ length: 12 }, (_, index) =>
        blank(`P${index}`, 20 + random() * 130, 20 + random() * 130),
      );
      const plan = planSheets({ pieces }, { stock: '12x12in', margin: 3 });
      const area = pieces.reduce((sum, piece) => sum + piece.across * piece.along, 0);
      expect(plan.used).toBeLessThanOrEqual(Math.ceil(area / 298.8 ** 2) + 1);
      expectCuttable(plan);
    }
  });
  it('says the cuts in order, measured from the edge in the hand', () => {
    const plan = planSheets({ pieces: [blank('Base', inch(8), inch(12))] }, { stock: '12x12in' });
    expect(cutsInWords(plan, 0).map((sentence) => say(sentence, { units: 'in', grid: '1/16in' }))).toEqual([
      '1. Trim at 8 in from the left: that is the Base; left over: offcut A, 4 × 12.',
    ]);
  });
});
