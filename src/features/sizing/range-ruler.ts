import type { KindName, Unit } from '@/engine';

export interface RangeTick {
  /** Where it stands, from 0 (start of the range) to 100 (its end). */
  readonly at: number;
  readonly height: 'short' | 'middle' | 'tall';
  readonly label?: string;
}

const MM_PER_STEP: Readonly<Record<Unit, { readonly mm: number; readonly steps: readonly number[] }>> = {
  in: { mm: 25.4, steps: [1 / 32, 1 / 16, 1 / 8, 1 / 4, 1 / 2, 1, 2, 5, 10] },
  mm: { mm: 1, steps: [0.1, 0.5, 1, 2, 5, 10, 25, 50, 100, 250] },
  cm: { mm: 10, steps: [0.01, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 25] },
};
const PLAIN_STEPS = [0.1, 0.5, 1, 2, 5, 10, 15, 30, 45, 90, 100];
const MOST_TICKS = 80;
const MOST_LABELS = 8;

/**
 * The ruler under a slider: ticks and figures of the range's own units, from its start to its end. Ticks stand on whole
 * steps of the unit, not of the range, so that 3 3/8 to 10 in still reads 4, 5, 6 … as a ruler does.
 */
export function rangeRuler(range: {
  readonly from: number;
  readonly to: number;
  readonly kind: KindName;
  readonly units: Unit;
}): readonly RangeTick[] {
  const { from, to, kind, units } = range;
  if (!(to > from)) return [];
  const { mm, steps } = kind === 'length' ? MM_PER_STEP[units] : { mm: 1, steps: PLAIN_STEPS };
  const span = (to - from) / mm;
  const fine = steps.find((step) => span / step <= MOST_TICKS) ?? span;
  const named = steps.find((step) => step >= fine && span / step <= MOST_LABELS) ?? span;
  const half = named / 2;
  const ticks: RangeTick[] = [];
  const first = Math.ceil(from / mm / fine - 1e-9);
  const last = Math.floor(to / mm / fine + 1e-9);
  for (let k = first; k <= last; k += 1) {
    const value = k * fine;
    const at = (100 * (value * mm - from)) / (to - from);
    const tall = isWhole(value / named);
    ticks.push({
      at: Math.min(100, Math.max(0, at)),
      height: tall ? 'tall' : isWhole(value / half) ? 'middle' : 'short',
      ...(tall ? { label: figure(value, kind === 'length' && units === 'in') } : {}),
    });
  }
  return ticks;
}

/** The ruler as SVG whose places are percentages, so that it fits whatever width its slider has. */
export function rangeRulerSvg(ticks: readonly RangeTick[]): string {
  const length = { short: 5, middle: 8, tall: 11 };
  const lines = ticks.map(
    ({ at, height }) => `<line x1="${at.toFixed(2)}%" x2="${at.toFixed(2)}%" y1="0" y2="${length[height]}"/>`,
  );
  const figures = ticks.flatMap(({ at, label }) =>
    label === undefined
      ? []
      : [
          `<text x="${at.toFixed(2)}%" y="25" text-anchor="${at < 4 ? 'start' : at > 96 ? 'end' : 'middle'}">${label}</text>`,
        ],
  );
  return `<svg class="ruler" width="100%" height="28" aria-hidden="true">${lines.join('')}${figures.join('')}</svg>`;
}

const isWhole = (x: number): boolean => Math.abs(x - Math.round(x)) < 1e-9;

/** Fractions below one as a ruler prints them; the fraction slash sets them small. */
function figure(value: number, inches: boolean): string {
  if (isWhole(value)) return String(Math.round(value));
  for (const bottom of inches ? [2, 4, 8, 16, 32] : []) {
    if (!isWhole(value * bottom)) continue;
    const whole = Math.floor(value);
    const top = Math.round((value - whole) * bottom);
    return `${whole === 0 ? '' : `${whole}\u202f`}${top}\u2044${bottom}`;
  }
  return String(Number(value.toFixed(2)));
}
