import { expect } from 'vitest';
import { cutsInWords, say, type SheetPlan } from '@/engine';

/*
 * Two ways to try a plan that know nothing of how it was made: a check of its geometry, and a person with a trimmer who has
 * only the words.
 */

interface Held {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}
const NEAR = 1e-5;
const near = (a: number, b: number) => Math.abs(a - b) < NEAR;

/** Every part inside the sheet and its margin, none over another; cutting along the cuts alone sets every part and offcut free. */
export function expectCuttable(plan: SheetPlan, margin = 0): void {
  for (const { stock, parts, offcuts, cuts } of plan.sheets) {
    const boxes = [...parts, ...offcuts];
    for (const box of boxes) {
      const inside =
        box.x >= margin - NEAR &&
        box.y >= margin - NEAR &&
        box.x + box.across <= stock.across - margin + NEAR &&
        box.y + box.along <= stock.along - margin + NEAR;
      expect(inside, `${JSON.stringify(box)} inside ${stock.name}`).toBe(true);
    }
    boxes.forEach((a, index) => {
      for (const b of boxes.slice(index + 1)) {
        const apart =
          a.x + a.across <= b.x + NEAR ||
          b.x + b.across <= a.x + NEAR ||
          a.y + a.along <= b.y + NEAR ||
          b.y + b.along <= a.y + NEAR;
        expect(apart, `${JSON.stringify(a)} over ${JSON.stringify(b)}`).toBe(true);
      }
    });
    let held: Held[] = [{ x: 0, y: 0, w: stock.across, h: stock.along }];
    for (const cut of cuts) {
      const across = cut.runs === 'across';
      const index = held.findIndex((box) =>
        across
          ? near(cut.from.x, box.x) && near(cut.to.x, box.x + box.w) && cut.at > box.y && cut.at < box.y + box.h
          : near(cut.from.y, box.y) && near(cut.to.y, box.y + box.h) && cut.at > box.x && cut.at < box.x + box.w,
      );
      const box = held[index];
      expect(box, `cut ${cut.n} runs from edge to edge`).toBeDefined();
      if (!box) return;
      expect(near(cut.measure, across ? cut.at - box.y : cut.at - box.x)).toBe(true);
      const halves = across
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
    for (const box of boxes) {
      const free = held.some(
        ({ x, y, w, h }) => near(x, box.x) && near(y, box.y) && near(w, box.across) && near(h, box.along),
      );
      expect(free, `${JSON.stringify(box)} is cut free`).toBe(true);
    }
  }
}

type Size = readonly [number, number];
const NUMBER = '([\\d.]+)';
const TAKE = new RegExp(`^Take the ${NUMBER} × ${NUMBER} strip(, turn it)? and trim at ${NUMBER} mm$`);
const REST = new RegExp(`^(Trim the rest at|Turn the rest and trim it at) ${NUMBER} mm$`);
const FIRST = new RegExp(`^Trim at ${NUMBER} mm from the (left|top)$`);

/** Follows the words of one sheet with figures in whole millimetres, and gives what was cut: names with sizes as they came off. */
export function followWords(plan: SheetPlan, sheet: number): readonly { readonly name: string; readonly size: Size }[] {
  const { stock } = plan.sheets[sheet] as SheetPlan['sheets'][number];
  const got: { name: string; size: Size }[] = [];
  const strips: Size[] = [[stock.across, stock.along]];
  let upright = true;
  let rest: Size | null = null;
  const take = ([w, h]: Size): Size => {
    const at = strips.findIndex(([a, b]) => near(a, w) && near(b, h));
    if (at < 0) throw new Error(`there is no strip ${w} × ${h}`);
    return strips.splice(at, 1)[0] as Size;
  };
  cutsInWords(plan, sheet).forEach((sentence, index) => {
    const words = say(sentence, { units: 'mm', grid: '0.5mm' });
    const [, n, what, outcome] = /^(\d+)\. ([^:]+): (.+)\.$/.exec(words) ?? [];
    expect(Number(n), words).toBe(index + 1);
    let hand: Size;
    let at: number;
    const [first, later, taken] = [FIRST.exec(what ?? ''), REST.exec(what ?? ''), TAKE.exec(what ?? '')];
    if (first) {
      hand = take([stock.across, stock.along]);
      at = Number(first[1]);
      upright = first[2] === 'left';
    } else if (later) {
      if (!rest) throw new Error(`there is no rest: ${words}`);
      hand = take(rest);
      at = Number(later[2]);
      if (later[1]?.startsWith('Turn')) upright = !upright;
    } else if (taken) {
      hand = take([Number(taken[1]), Number(taken[2])]);
      at = Number(taken[4]);
      if (taken[3]) upright = !upright;
    } else throw new Error(`cannot be followed: ${words}`);

    const [w, h] = hand;
    const halves: readonly [Size, Size] = upright
      ? [
          [at, h],
          [w - at, h],
        ]
      : [
          [w, at],
          [w, h - at],
        ];
    const said = sayings(outcome ?? '');
    expect(said, words).toHaveLength(2);
    rest = null;
    said.forEach(({ is, name, size }, half) => {
      const cut = halves[half] as Size;
      if (size) expect(near(size[0], cut[0]) && near(size[1], cut[1]), `${words} (${cut.join(' × ')})`).toBe(true);
      if (is === 'piece') got.push({ name, size: cut });
      if (is === 'strip') {
        strips.push(cut);
        if (half === 1) rest = cut;
      }
    });
  });
  expect(strips, 'no strip is left uncut').toEqual([]);
  return got;
}

interface Saying {
  readonly is: 'piece' | 'strip' | 'over';
  readonly name: string;
  readonly size?: Size;
}
function sayings(outcome: string): Saying[] {
  const both = /^that is the (.+), and the (.+) is left$/.exec(outcome);
  if (both) return both.slice(1).map((name) => ({ is: 'piece', name }));
  const twice = /^that is the (.+), twice$/.exec(outcome);
  if (twice) return [1, 2].map(() => ({ is: 'piece', name: twice[1] as string }));
  return outcome.split('; ').map((clause): Saying => {
    const piece = /^that is the (.+)$/.exec(clause) ?? /^the (.+) is left$/.exec(clause);
    if (piece) return { is: 'piece', name: piece[1] as string };
    const strip = /^(?:a strip|the rest is) ([\d.]+) × ([\d.]+)$/.exec(clause);
    if (strip) return { is: 'strip', name: '', size: [Number(strip[1]), Number(strip[2])] };
    const over = /^left over: offcut ([A-Z]\d*), ([\d.]+) × ([\d.]+)$/.exec(clause);
    if (over) return { is: 'over', name: over[1] as string, size: [Number(over[2]), Number(over[3])] };
    if (/^(a sliver|the edge) comes off$/.test(clause)) return { is: 'over', name: '' };
    throw new Error(`not understood: ${clause}`);
  });
}
