import { MM_PER, show, showValue, type GridId, type KindName, type MeasureFigure, type Unit } from '@/engine';

export interface Showing {
  readonly units: Unit;
  readonly grid: GridId;
}

const DIGITS: Readonly<Record<Unit, number>> = { in: 4, cm: 3, mm: 2 };

/** The value before it is rounded, in the author's units, always to as many decimals, so that a column of them can be compared. */
export function exactText(figure: MeasureFigure, { units, grid }: Showing): string {
  if (figure.kind !== 'length') return showValue(figure.exact, figure.kind, { units, grid, bare: true }).typeset;
  const unit = figure.unit ?? units;
  return (figure.exact / MM_PER[unit]).toFixed(DIGITS[unit]);
}

/** The value as it is cut. The unit is said only where it is not the author's own. */
export function cutText(figure: MeasureFigure, { units, grid }: Showing): string {
  const bare = figure.kind !== 'length' || figure.unit === undefined || figure.unit === units;
  return showValue(figure.cut, figure.kind, { units, grid, unit: figure.unit, bare }).typeset;
}

/** Text to type over: "2 1/4 in". */
export const typedText = (value: number, kind: KindName, { units, grid }: Showing, unit?: Unit): string =>
  showValue(value, kind, { units, grid, unit }).text;

/** "3/16 in spare", "1/16 in missing", "exact". */
export function gapText(gap: number | null, { units, grid }: Showing): string {
  if (gap === null) return 'not worked out';
  const shown = show(Math.abs(gap), { units, grid }).typeset;
  if (/^0\b/u.test(shown)) return 'exact';
  return `${shown} ${gap < 0 ? 'missing' : 'spare'}`;
}
