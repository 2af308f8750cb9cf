import { GRIDS, show, type FitFigure, type Figures, type SheetPlan, type SizeFigure, type Sizing } from '@/engine';

type Shown = Pick<Sizing, 'units' | 'grid'>;

/** `9 1/4 × 6 9/16 × 2 5/16 in`: the unit once, at the end. */
export function sizesTogether(sizes: readonly SizeFigure[], shown: Shown): string {
  return sizes.map(({ mm }, i) => show(mm, { ...shown, bare: i < sizes.length - 1 }).typeset).join(' × ');
}

/** The sizes inside the box, as one says them: `9 × 6 × 2 1/4 in`. */
export const insideWords = (figures: Figures): string => sizesTogether(figures.finished.inside, figures.sizing);

/**
 * How much room a fit leaves: `1/16 in spare`, `about 1/64 in missing`; for two lengths that should be the same,
 * `about 1/64 in over`. Empty when it could not be worked out.
 */
export function gapWords({ gap, is }: Pick<FitFigure, 'gap' | 'is'>, { units, grid }: Shown): string {
  if (gap === null) return '';
  const size = Math.abs(gap);
  const { typeset } = show(size, { units, grid });
  const step = units === 'in' ? 25.4 / 64 : 0.1;
  const steps = size / step;
  const exact = Math.abs(steps - Math.round(steps)) < 1e-4;
  if (/^0[^\d.]/.test(typeset))
    return exact ? (is === 'same as' ? 'exactly' : 'just') : is === 'same as' ? 'nearly exactly' : 'just';
  const [more, less] = is === 'same as' ? ['over', 'short'] : ['spare', 'missing'];
  return `${exact ? '' : 'about '}${typeset} ${gap > 0 ? more : less}`;
}

/** `the nearest 1/16 in` and what that costs: `nothing is further off than about 1/64 in (the arc)`. */
export function cutWords({ sizing, departure }: Figures): { readonly to: string; readonly off: string } {
  const { units, grid } = sizing;
  const { unit, step } = GRIDS[grid];
  const to = `the nearest ${show(step, { units: unit, grid }).typeset}`;
  const off = Math.abs(departure.mm);
  if (off < 0.005) return { to, off: 'nothing is off' };
  const size = departureSize(off, units);
  return { to, off: `nothing is off by more than ${size}${departure.where === '' ? '' : ` (${departure.where})`}` };
}

/** Small lengths, which a ruler does not show: thousandths of an inch or hundredths of a millimetre, rounded up. */
export function departureSize(mm: number, units: Sizing['units']): string {
  if (units === 'in') return `${(Math.ceil((mm / 25.4) * 1000 - 1e-6) / 1000).toFixed(3)}\u00a0in`;
  return `${String(Math.ceil(mm * 100 - 1e-6) / 100)}\u00a0mm`;
}

/** How many pieces are cut, counting copies. */
export const pieceCount = (figures: Figures): number => figures.pieces.reduce((all, piece) => all + piece.count, 0);

export const piecesWords = (n: number): string => `${n} ${n === 1 ? 'piece' : 'pieces'}`;

/** `3 sheets of 12 × 12 in for 2 boxes`, and those of other materials by their name; what is too large is said first. */
export function sheetsWords({ stock, used, takes, tooLarge, copies }: SheetPlan): string {
  if (tooLarge.length > 0) {
    const [{ stock: sheet = stock } = {}] = tooLarge;
    return `too large for ${sheet.name}: ${tooLarge.map(({ name }) => name).join(', ')}`;
  }
  const boxes = copies > 1 ? ` for ${copies} boxes` : '';
  const count = (n: number) => `${n} ${n === 1 ? 'sheet' : 'sheets'}`;
  if (takes.length < 2) return `${count(used)} of ${stock.name}${boxes}`;
  const each = takes.map((take) => `${count(take.used)} of ${take.material}, ${take.stock.name}`);
  return `${each.slice(0, -1).join('; ')} and ${each.at(-1)}${boxes}`;
}

/** Minutes as a person says them: `about 40 minutes`, `about two hours`, `about 1 h 15`. */
export function timeWords(minutes: number | null): string {
  if (minutes === null) return '';
  if (minutes < 60) return `about ${minutes} minutes`;
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  const words = ['', 'one hour', 'two hours', 'three hours', 'four hours', 'five hours', 'six hours'];
  if (rest === 0) return `about ${words[hours] ?? `${hours} hours`}`;
  return `about ${hours} h ${String(rest).padStart(2, '0')}`;
}

/** Minutes in the room of a card: `40 min`, `2 h`, `1 h 15`. */
export function shortTimeWords(minutes: number | null): string {
  if (minutes === null) return '';
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, '0')}`;
}
