import {
  around,
  atLeast,
  evaluate,
  GRIDS,
  keyOf,
  roundTo,
  snap,
  type Figures,
  type Model,
  type Sizing,
} from '@/engine';
import { withValue } from '../sizing-values';
import { judge } from '../verdict';

/** What must go into a box. */
export interface Thing {
  /** Millimetres, in the order of the box's finished inside sizes. */
  readonly sizes: readonly number[];
  /** Room on every side, millimetres. */
  readonly ease: number;
  /** Which of its sizes stands upright in the box; null as it was measured. */
  readonly up: number | null;
}

/** A box that holds a thing where the one of its exact size cannot be made. */
export interface Offer {
  readonly figures: Figures;
  /** Why it is another: `1/2 in more wide`, `with its deep side up`. */
  readonly how: OfferHow;
}
export type OfferHow =
  | { readonly is: 'looser'; readonly by: readonly { readonly name: string; readonly mm: number }[] }
  | { readonly is: 'turned'; readonly up: string };

const heightOf = (model: Model): number => model.finished.inside.findIndex(({ def }) => /^tall\b/.test(def.name));

/** The sizes of a thing, besides its height, that may stand upright in the box; none where the box has no such three sizes. */
export function waysUp(model: Model): readonly number[] {
  const tall = heightOf(model);
  return model.finished.inside.length === 3 && tall >= 0 ? [0, 1, 2].filter((way) => way !== tall) : [];
}

/** The sizes that the box must hold: the one that stands upright and the height change places. */
export function asItStands(model: Model, { sizes, up }: Pick<Thing, 'sizes' | 'up'>): readonly number[] {
  const tall = heightOf(model);
  if (up === null || !waysUp(model).includes(up)) return sizes;
  return sizes.map((mm, index) =>
    index === tall ? (sizes[up] as number) : index === up ? (sizes[tall] as number) : mm,
  );
}

/**
 * Boxes that can be made and hold the thing: the nearest sizes within range, one inside size grown until it works, and the
 * thing standing another way. Each size once, the closest first.
 */
export function otherBoxes(model: Model, base: Sizing, thing: Thing): readonly Offer[] {
  const { step } = GRIDS[base.grid];
  const needed = asItStands(model, thing).map((mm) => roundTo(mm + 2 * thing.ease, step, 'up'));
  const measures = needed.flatMap((_, index) => insideMeasure(model, index) ?? []);
  if (measures.length < needed.length) return [];
  const asked = measures.reduce((sizing, measure, index) => withValue(sizing, measure, needed[index] as number), base);
  const near = judge(model, asked, base, { nearest: true });
  const looser = [
    ...(near.instead === 'nearest' ? [near.shown] : []),
    ...needed.flatMap((_, index) => grown(model, base, needed, index) ?? []),
  ].filter(({ finished }) => finished.inside.every(({ mm }, index) => atLeast(mm, needed[index] as number)));
  const turned = [null, ...waysUp(model)].flatMap((up): Offer[] => {
    if (up === thing.up) return [];
    const solved = around(model, base, asItStands(model, { ...thing, up }), thing.ease);
    const name = model.finished.inside[up ?? heightOf(model)]?.def.name ?? '';
    return solved.ok ? [{ figures: evaluate(model, solved.sizing), how: { is: 'turned', up: name } }] : [];
  });
  const offers = looser.map(
    (figures): Offer => ({ figures, how: { is: 'looser', by: moreThanNeeded(figures, needed) } }),
  );
  const excess = ({ finished }: Figures) => finished.inside.reduce((sum, { mm }) => sum + mm, 0);
  const byRoom = [...offers].sort((a, b) => excess(a.figures) - excess(b.figures));
  const sizeOf = ({ figures }: Offer) => figures.finished.inside.map(({ mm }) => mm).join();
  return [...byRoom, ...turned].filter(
    (one, index, all) => all.findIndex((other) => sizeOf(other) === sizeOf(one)) === index,
  );
}

/** The measure that is asked for an inside size; null where that follows from others. */
function insideMeasure(model: Model, index: number): string | null {
  const formula = keyOf(model.finished.inside[index]?.def.formula ?? '');
  return model.pattern.measures.find(({ name, ask }) => ask && keyOf(name) === formula)?.name ?? null;
}

/** Steps of the cut grid that one size may grow: 2⁹ sixteenths are 32 in, more than any range. */
const MOST_DOUBLINGS = 9;

/** With one inside size larger by as few steps as it takes; null when no size of it works. */
function grown(model: Model, base: Sizing, needed: readonly number[], index: number): Figures | null {
  const { step } = GRIDS[base.grid];
  const at = (steps: number) =>
    around(
      model,
      base,
      needed.map((mm, i) => (i === index ? mm + steps * step : mm)),
      0,
    );
  let works = 0;
  for (let power = 0; power <= MOST_DOUBLINGS && works === 0; power += 1) if (at(2 ** power).ok) works = 2 ** power;
  if (works === 0) return null;
  for (let fails = works / 2; works - fails > 1; ) {
    const middle = Math.floor((works + fails) / 2);
    if (at(middle).ok) works = middle;
    else fails = middle;
  }
  const solved = at(works);
  return solved.ok ? evaluate(model, solved.sizing) : null;
}

const moreThanNeeded = ({ finished }: Figures, needed: readonly number[]) =>
  finished.inside
    .map(({ name, mm }, index) => ({ name, mm: snap(mm - (needed[index] as number)) }))
    .filter(({ mm }) => mm > 0);
