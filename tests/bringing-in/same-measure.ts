import { compileLive, evaluate, seeded, type Sizing } from '@/engine';
import type { LiveFigures } from '@/writeup/live';

/** Whether two formulas are the same length at this size and at others in the pattern's range: `base.left end` is `inside height`. */
export function sameMeasure(live: LiveFigures, one: string, other: string): boolean {
  const [a, b] = [compileLive(live.model, one), compileLive(live.model, other)];
  if (!a.ok || !b.ok) return false;
  return othersOf(live).every((figures) => {
    const [x, y] = [a.value.value(figures), b.value.value(figures)];
    return x !== null && y !== null && Math.abs(x.cut - y.cut) < 1e-6 && Math.abs(x.exact - y.exact) < 1e-6;
  });
}

const known = new WeakMap<LiveFigures, readonly LiveFigures['figures'][]>();
/** The size itself, and three at which every asked length is another. */
function othersOf(live: LiveFigures) {
  const before = known.get(live);
  if (before) return before;
  const random = seeded(7);
  const sizes = [1, 2, 3].map((): Sizing => {
    const values = live.figures.measures
      .filter(({ asked, kind }) => asked && kind === 'length')
      .map(({ name, exact }) => [name, exact * (0.9 + 0.4 * random())] as const);
    return { ...live.figures.sizing, values: { ...live.figures.sizing.values, ...Object.fromEntries(values) } };
  });
  const figures = [live.figures, ...sizes.map((sizing) => evaluate(live.model, sizing))];
  known.set(live, figures);
  return figures;
}
