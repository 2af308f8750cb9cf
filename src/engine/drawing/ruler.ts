import { MM_PER } from '../measure';
import type { Shape, Unit } from '../types';
import { n } from './path';

/** Nearer to one another ticks would be a grey strip, drawing units. */
const NEAREST = 3.6;

/** A working ruler along an edge: sixteenths of an inch or millimetres, as fine as the drawing's scale lets them stand apart. */
export function ruler(options: {
  readonly from: number;
  readonly to: number;
  /** Where the ticks hang from. */
  readonly y: number;
  readonly scale: number;
  readonly units: Unit;
}): Shape {
  const { from, to, y, scale } = options;
  const inches = options.units === 'in';
  const whole = (inches ? MM_PER.in : 10) * scale;
  const parts = (inches ? [16, 8, 4, 2] : [10, 2]).find((count) => whole / count >= NEAREST) ?? 1;
  const tall = (index: number): number => {
    if (index % parts === 0) return 8;
    return (index * 2) % parts === 0 ? 5 : 3;
  };
  const step = whole / parts;
  let d = '';
  for (let index = 1; from + index * step <= to; index += 1) d += `M${n(from + index * step)} ${n(y)}v${tall(index)}`;
  return { type: 'path', role: 'ruler', d };
}
