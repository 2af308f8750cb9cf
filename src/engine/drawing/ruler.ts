import { MM_PER } from '../measure';
import type { Shape, Unit } from '../types';
import { segment } from './path';

/** Ticks of a working ruler along a straight edge: sixteenths of an inch or millimetres, as fine as the scale lets them stand apart. */
export function ruler(options: {
  readonly width: number;
  readonly start: number;
  readonly scale: number;
  readonly units: Unit;
}): Shape[] {
  const inches = options.units === 'in';
  const whole = (inches ? MM_PER.in : 10) * options.scale;
  const parts = (inches ? [16, 8, 4, 2, 1] : [10, 2, 1]).find((count) => whole / count >= 3) ?? 1;
  const step = whole / parts;
  const height = (index: number): number => {
    if (index % parts === 0) return 11;
    if (inches && index % (parts / 2) === 0) return 8;
    if (!inches && parts === 10 && index % 5 === 0) return 8;
    return inches && parts >= 8 && index % (parts / 4) === 0 ? 6 : 4;
  };
  const first = -Math.floor(options.start / step);
  const ticks: string[] = [];
  for (let index = first; options.start + index * step <= options.width; index += 1) {
    const x = options.start + index * step;
    ticks.push(segment(x, 0, x, height(Math.abs(index))));
  }
  return [{ type: 'path', role: 'ruler', d: ticks.join('') }];
}
