import { keyOf } from '@/engine';

const SAME: Readonly<Record<string, string>> = {
  wide: 'width',
  tall: 'height',
  high: 'height',
  deep: 'depth',
  long: 'length',
  thick: 'thickness',
  apart: 'spread',
  round: 'radius',
  rounded: 'radius',
};
/** A word without its ending, and with the size that it speaks of: tapered and tapers are taper, wide is width. */
export function stemOf(word: string): string {
  const plain = word.toLowerCase().replace(/'s$/, '');
  const known = SAME[plain];
  if (known !== undefined) return known;
  return plain.length > 4 ? plain.replace(/(?:ing|ed|s)$/, '') : plain.length > 3 ? plain.replace(/s$/, '') : plain;
}

/** The words of a name, each without its ending. */
export const stemsOf = (name: string): readonly string[] => keyOf(name).split(' ').map(stemOf);
