import type { KindName } from '../types';

/** What a formula gives. A quantity is a power of length (0 a number, 1 a length, 2 an area) or an angle. */
export type Kind =
  | { readonly type: 'quantity'; readonly power: number; readonly whole: boolean }
  | { readonly type: 'angle' }
  | { readonly type: 'choice'; readonly name: string }
  | { readonly type: 'truth' };

export const NUMBER: Kind = { type: 'quantity', power: 0, whole: false };
export const WHOLE: Kind = { type: 'quantity', power: 0, whole: true };
export const LENGTH: Kind = { type: 'quantity', power: 1, whole: false };
export const AREA: Kind = { type: 'quantity', power: 2, whole: false };
export const VOLUME: Kind = { type: 'quantity', power: 3, whole: false };
export const ANGLE: Kind = { type: 'angle' };
export const TRUTH: Kind = { type: 'truth' };

export function kindOf(name: KindName): Kind {
  switch (name) {
    case 'length':
      return LENGTH;
    case 'area':
      return AREA;
    case 'volume':
      return VOLUME;
    case 'angle':
      return ANGLE;
    case 'number':
      return NUMBER;
    case 'whole number':
      return WHOLE;
    case 'yes/no':
      return TRUTH;
    case 'choice':
      return { type: 'choice', name: '' };
  }
}

/** Null for a power of length that nobody measures. */
export function kindName(kind: Kind): KindName | null {
  if (kind.type === 'angle') return 'angle';
  if (kind.type === 'truth') return 'yes/no';
  if (kind.type === 'choice') return 'choice';
  const names: readonly KindName[] = [kind.whole ? 'whole number' : 'number', 'length', 'area', 'volume'];
  return names[kind.power] ?? null;
}

/** For sentences: "a length", "an area", "length to the power 4". */
export function sayKind(kind: Kind): string {
  const name = kindName(kind);
  if (kind.type === 'choice') return `the choice ${kind.name}`;
  if (name === null) return `length to the power ${kind.type === 'quantity' ? kind.power : 0}`;
  return /^[aeiou]/.test(name) ? `an ${name}` : `a ${name}`;
}

/** May stand for one another: a whole number is also a number. */
export function sameKind(a: Kind, b: Kind): boolean {
  if (a.type === 'quantity' && b.type === 'quantity') return a.power === b.power;
  if (a.type === 'choice' && b.type === 'choice') return a.name === b.name;
  return a.type === b.type;
}
