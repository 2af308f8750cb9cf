import type { FunctionName } from './functions';
import { ANGLE, LENGTH, NUMBER, WHOLE, sameKind, type Kind } from './kind';

/** What went in is of the wrong kind: which argument, and what is wanted there. */
export interface KindComplaint {
  readonly argument: number;
  readonly wanted: string;
}
/** What a function wants and what kind it gives; what it works out stands in `WORK`. */
export interface Signature {
  /** How many values: "two lengths: chord and radius". */
  readonly wants: string;
  readonly least: number;
  readonly most: number;
  readonly kind: (args: readonly Kind[]) => Kind | KindComplaint;
}

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

export const SIGNATURES: Readonly<Record<FunctionName, Signature>> = {
  min: { wants: 'values of one kind', least: 1, most: 12, kind: alike() },
  max: { wants: 'values of one kind', least: 1, most: 12, kind: alike() },
  abs: { wants: 'one value', least: 1, most: 1, kind: alike() },
  hypot: {
    wants: 'two or three lengths',
    least: 2,
    most: 3,
    kind: alike((kind) => (kind.type === 'quantity' ? { ...kind, whole: false } : kind)),
  },
  sqrt: {
    wants: 'one number or area',
    least: 1,
    most: 1,
    kind: sqrtKind,
  },
  sin: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
  },
  cos: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
  },
  tan: {
    wants: 'one angle',
    least: 1,
    most: 1,
    kind: each(ANGLE, 'an angle, such as 30°', NUMBER),
  },
  asin: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
  },
  acos: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
  },
  atan: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', ANGLE),
  },
  atan2: {
    wants: 'two values of one kind',
    least: 2,
    most: 2,
    kind: alike(() => ANGLE),
  },
  floor: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', WHOLE),
  },
  ceil: {
    wants: 'one number',
    least: 1,
    most: 1,
    kind: each(NUMBER, 'a number', WHOLE),
  },
  'up to': {
    wants: 'two values of one kind: the value and the grid',
    least: 2,
    most: 2,
    kind: alike(),
  },
  'down to': {
    wants: 'two values of one kind: the value and the grid',
    least: 2,
    most: 2,
    kind: alike(),
  },
  'arc length': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
  },
  'arc height': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
  },
  'arc angle': {
    wants: 'two lengths: chord and radius',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', ANGLE),
  },
  'arc radius': {
    wants: 'two lengths: chord and height',
    least: 2,
    most: 2,
    kind: each(LENGTH, 'a length', LENGTH),
  },
};
