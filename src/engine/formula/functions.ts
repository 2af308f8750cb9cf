import { atLeast, moreThan, snap } from '../measure';
import { ANGLE, LENGTH, NUMBER, WHOLE, sameKind, type Kind } from './kind';

/** What went in is of the wrong kind: which argument, and what is wanted there. */
export interface KindComplaint {
  readonly argument: number;
  readonly wanted: string;
}
export interface FormulaFunction {
  /** How many values: "two lengths: chord and radius". */
  readonly wants: string;
  readonly least: number;
  readonly most: number;
  readonly kind: (args: readonly Kind[]) => Kind | KindComplaint;
  readonly work: (...args: number[]) => number;
}

const RADIAN = Math.PI / 180;

/** Every argument of the given kind; the result as stated. */
const each =
  (wanted: Kind, says: string, result: Kind) =>
  (args: readonly Kind[]): Kind | KindComplaint => {
    const wrong = args.findIndex((kind) => !sameKind(kind, wanted));
    return wrong >= 0 ? { argument: wrong, wanted: says } : result;
  };
/** All of one kind, whichever; `result` from it. */
const alike =
  (result: (kind: Kind) => Kind = (kind) => kind) =>
  (args: readonly Kind[]): Kind | KindComplaint => {
    const [first] = args as [Kind, ...Kind[]];
    if (first.type === 'truth' || first.type === 'choice') return { argument: 0, wanted: 'a measure or a number' };
    const wrong = args.findIndex((kind) => !sameKind(kind, first));
    if (wrong >= 0) return { argument: wrong, wanted: 'values of one kind' };
    const whole = args.every((kind) => kind.type === 'quantity' && kind.whole);
    return result(first.type === 'quantity' ? { ...first, whole } : first);
  };
const sqrtKind = ([kind]: readonly Kind[]): Kind | KindComplaint =>
  kind?.type === 'quantity' && kind.power % 2 === 0 && kind.power >= 0
    ? { type: 'quantity', power: kind.power / 2, whole: false }
    : { argument: 0, wanted: 'a number or an area' };

/** Half the angle over which an arc runs, in radians; NaN when the chord is longer than the diameter. */
const halfAngle = (chord: number, radius: number): number =>
  radius > 0 && chord >= 0 && atLeast(2 * radius, chord) ? Math.asin(Math.min(1, chord / (2 * radius))) : NaN;
const onGrid =
  (round: (steps: number) => number) =>
  (value: number, grid: number): number =>
    moreThan(grid, 0) ? snap(round(snap(snap(value) / grid)) * grid) : NaN;

/**
 * The functions of the formula language. Arcs are the minor arc over a chord (Machinery's Handbook, circular segments:
 * l = r a, h = r − √(r² − c²/4), r = (c² + 4h²) / 8h). Angles are in degrees.
 */
export const FUNCTIONS: Readonly<Record<string, FormulaFunction>> = {
  min: { wants: 'values of one kind', least: 1, most: 12, kind: alike(), work: Math.min },
  max: { wants: 'values of one kind', least: 1, most: 12, kind: alike(), work: Math.max },
  abs: { wants: 'one value', least: 1, most: 1, kind: alike(), work: Math.abs },
  hypot: {
    wants: 'two or three lengths',
    least: 2,
    most: 3,
    kind: alike((kind) => (kind.type === 'quantity' ? { ...kind, whole: false } : kind)),
    work: Math.hypot,
  },
  sqrt: {
    wants: 'one number or area',
    least: 1,
    most: 1,
    kind: sqrtKind,
    work: (x) => (x < 0 && atLeast(x, 0) ? 0 : Math.sqrt(x)),
  },
  sin: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
    work: (a) => Math.sin(a * RADIAN),
  },
  cos: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
    work: (a) => Math.cos(a * RADIAN),
  },
  tan: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
    work: (a) => Math.tan(a * RADIAN),
  },
  asin: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
    work: (x) => Math.asin(clampRatio(x)) / RADIAN,
  },
  acos: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
    work: (x) => Math.acos(clampRatio(x)) / RADIAN,
  },
  atan: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
    work: (x) => Math.atan(x) / RADIAN,
  },
  atan2: {
    wants: 'two values of one kind',
    least: 2,
    most: 2,
    kind: alike(() => ANGLE),
    work: (y, x) => Math.atan2(y, x) / RADIAN,
  },
  floor: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', WHOLE),
    work: (x) => Math.floor(snap(x)),
  },
  ceil: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', WHOLE),
    work: (x) => Math.ceil(snap(x)),
  },
  'up to': {
    wants: 'two values of one kind: the value and the grid',
    least: 2,
    most: 2,
    kind: alike(),
    work: onGrid(Math.ceil),
  },
  'down to': {
    wants: 'two values of one kind: the value and the grid',
    least: 2,
    most: 2,
    kind: alike(),
    work: onGrid(Math.floor),
  },
  'arc length': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
    work: (chord, radius) => 2 * radius * halfAngle(chord, radius),
  },
  'arc height': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
    work: (chord, radius) => radius - radius * Math.cos(halfAngle(chord, radius)),
  },
  'arc angle': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', ANGLE),
    work: (chord, radius) => (2 * halfAngle(chord, radius)) / RADIAN,
  },
  'arc radius': {
    wants: 'two lengths: chord and height',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
    work: (chord, height) => (height > 0 ? (chord ** 2 + 4 * height ** 2) / (8 * height) : NaN),
  },
};
export const FUNCTION_NAMES: ReadonlySet<string> = new Set(Object.keys(FUNCTIONS));

/** A ratio that rounding noise pushed past ±1 is ±1. */
const clampRatio = (x: number): number => (Math.abs(x) > 1 && atLeast(1, Math.abs(x)) ? Math.sign(x) : x);
