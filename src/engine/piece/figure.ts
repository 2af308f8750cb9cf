import { isZero, roundTo, same, snap } from '../measure';
import type { SentenceFigure } from '../types';

/** A position that is off the grid only by whole card thicknesses is said as the grid value and those: no ruler shows 0.3 mm. */
export function figureMaker(step: number, thickness: number): (mm: number, bare?: boolean) => SentenceFigure {
  return (mm, bare) => {
    const plain = { mm: snap(mm), ...(bare ? { bare } : {}) };
    if (isZero(thickness) || same(roundTo(mm, step, 'nearest'), mm)) return plain;
    for (const cards of [1, -1, 2, -2, 3, -3, 4, -4]) {
      const rest = snap(mm - cards * thickness);
      if (same(roundTo(rest, step, 'nearest'), rest)) return { ...plain, mm: rest, cards };
    }
    return plain;
  };
}
