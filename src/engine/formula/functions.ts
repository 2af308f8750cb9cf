import { atLeast, moreThan, snap } from '../measure';

const RADIAN = Math.PI / 180;

/** Half the angle over which an arc runs, in radians; NaN when the chord is longer than the diameter. */
const halfAngle = (chord: number, radius: number): number =>
  radius > 0 && chord >= 0 && atLeast(2 * radius, chord) ? Math.asin(Math.min(1, chord / (2 * radius))) : NaN;
const onGrid =
  (round: (steps: number) => number) =>
  (value: number, grid: number): number =>
    moreThan(grid, 0) ? snap(round(snap(snap(value) / grid)) * grid) : NaN;
/** A ratio that rounding noise pushed past ±1 is ±1. */
const clampRatio = (x: number): number => (Math.abs(x) > 1 && atLeast(1, Math.abs(x)) ? Math.sign(x) : x);

/**
 * What the functions of the formula language work out. Arcs are the minor arc over a chord (Machinery's Handbook, circular
 * segments: l = r a, h = r − √(r² − c²/4), r = (c² + 4h²) / 8h). Angles are in degrees.
 */
export const WORK = {
  min: Math.min,
  max: Math.max,
  abs: Math.abs,
  hypot: Math.hypot,
  sqrt: (x) => (x < 0 && atLeast(x, 0) ? 0 : Math.sqrt(x)),
  sin: (a) => Math.sin(a * RADIAN),
  cos: (a) => Math.cos(a * RADIAN),
  tan: (a) => Math.tan(a * RADIAN),
  asin: (x) => Math.asin(clampRatio(x)) / RADIAN,
  acos: (x) => Math.acos(clampRatio(x)) / RADIAN,
  atan: (x) => Math.atan(x) / RADIAN,
  atan2: (y, x) => Math.atan2(y, x) / RADIAN,
  floor: (x) => Math.floor(snap(x)),
  ceil: (x) => Math.ceil(snap(x)),
  'up to': onGrid(Math.ceil),
  'down to': onGrid(Math.floor),
  'arc length': (chord, radius) => 2 * radius * halfAngle(chord, radius),
  'arc height': (chord, radius) => radius - radius * Math.cos(halfAngle(chord, radius)),
  'arc angle': (chord, radius) => (2 * halfAngle(chord, radius)) / RADIAN,
  'arc radius': (chord, height) => (height > 0 ? (chord ** 2 + 4 * height ** 2) / (8 * height) : NaN),
} satisfies Readonly<Record<string, (...args: number[]) => number>>;
export type FunctionName = keyof typeof WORK;
export const FUNCTION_NAMES: ReadonlySet<string> = new Set(Object.keys(WORK));
