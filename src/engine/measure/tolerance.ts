/**
 * The one place that knows how close is close.
 * A value is snapped to the nanometre before it is rounded or compared, so that sums of sixty-fourths of an inch
 * (0.396875 mm exactly) and of decimal millimetres land where they should and a tie is a tie.
 */

/** One nanometre, in millimetres. */
export const NANOMETRE = 1e-6;
/** Points nearer than this are one point: far above rounding noise, far below any blade. */
export const COINCIDENT = 1e-5;

/** `x` moved to the nearest whole nanometre; never −0. */
export function snap(x: number): number {
  // Dividing by the whole number 10^6 is correctly rounded; multiplying by 1e-6 would bring noise back.
  return Number.isFinite(x) ? Math.round(x * 1e6) / 1e6 + 0 : x;
}
/** Whole nanometres, for searches that compare sums exactly: a metre is 10⁹, far below what a double holds exactly. */
export const toNanometres = (mm: number): number => Math.round(mm * 1e6);
export const fromNanometres = (whole: number): number => whole / 1e6;
/** Equal to the nanometre. */
export const same = (a: number, b: number): boolean => Math.abs(a - b) <= NANOMETRE / 2 + NANOMETRE * 1e-3;
/** `a` is at least `b`, give or take a nanometre. */
export const atLeast = (a: number, b: number): boolean => a >= b || same(a, b);
export const moreThan = (a: number, b: number): boolean => a > b && !same(a, b);
export const isZero = (a: number): boolean => same(a, 0);
/** Two places closer than a hundredth of a micrometre are one place. */
export const coincident = (a: number, b: number): boolean => Math.abs(a - b) < COINCIDENT;
