import type { GridId, Rounding, Unit } from '../types';
import { snap } from './tolerance';

export const MM_PER: Readonly<Record<Unit, number>> = { in: 25.4, mm: 1, cm: 10 };
export const UNITS: readonly Unit[] = ['in', 'mm', 'cm'];

export interface Grid {
  readonly id: GridId;
  readonly unit: 'in' | 'mm';
  /** One step, in millimetres. */
  readonly step: number;
  /** Steps in an inch, for inch grids. */
  readonly denominator: number;
  readonly says: string;
}
export const GRIDS: Readonly<Record<GridId, Grid>> = {
  '1/8in': { id: '1/8in', unit: 'in', step: 25.4 / 8, denominator: 8, says: '1/8 in' },
  '1/16in': { id: '1/16in', unit: 'in', step: 25.4 / 16, denominator: 16, says: '1/16 in' },
  '1/32in': { id: '1/32in', unit: 'in', step: 25.4 / 32, denominator: 32, says: '1/32 in' },
  '1mm': { id: '1mm', unit: 'mm', step: 1, denominator: 1, says: '1 mm' },
  '0.5mm': { id: '0.5mm', unit: 'mm', step: 0.5, denominator: 2, says: '0.5 mm' },
};
export const GRID_IDS = Object.keys(GRIDS) as GridId[];
export const defaultGrid = (unit: Unit): GridId => (unit === 'in' ? '1/16in' : '1mm');
export const gridsFor = (unit: Unit): readonly GridId[] =>
  GRID_IDS.filter((id) => GRIDS[id].unit === (unit === 'in' ? 'in' : 'mm'));

/**
 * `mm` on a grid of `step` mm. Nearest takes a tie upwards (ISO 80000-1, Annex B, rule B: the higher multiple), as a maker
 * with a blade does: card can be trimmed again. `exact` gives the value back.
 */
export function roundTo(mm: number, step: number, rounding: Rounding): number {
  if (rounding === 'exact' || !(step > 0) || !Number.isFinite(mm)) return snap(mm);
  const steps = snap(snap(mm) / step);
  const whole =
    rounding === 'up' ? Math.ceil(steps) : rounding === 'down' ? Math.floor(steps) : Math.floor(steps + 0.5);
  return snap(whole * step);
}
