import { distance, pointAt } from '../net';
import type { Net, PieceHead, Point } from '../types';
import { panelOf } from './panel-of';

/** What is measured on a fan: its middle, the side that lies level at the foot, how far the flap on it stands out. */
export function fanSizes(net: Net, def: Extract<PieceHead, { builder: 'fan' }>) {
  const centre = panelOf(net, def.centre)?.loop ?? [];
  const flap = panelOf(net, `${def.flap.name} 1`)?.loop;
  const [side, out] = [centre[0], flap?.[1]];
  if (!side || !out) return null;
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / centre.length;
  const tip = def.flap.shape === 'triangle' ? out.to : pointAt(side, 0.5);
  const height = def.flap.shape === 'triangle' ? distance(tip, pointAt(side, 0.5)) : Math.abs(out.to.y - out.from.y);
  const tips = net.panels.flatMap((one) =>
    one.role === 'panel' && one.name.startsWith(`${def.flap.name} `.toLowerCase()) ? [one.loop[1]?.to ?? tip] : [],
  );
  return {
    sides: centre.length,
    side,
    height,
    middle: { x: mean(centre.map(({ from }) => from.x)), y: mean(centre.map(({ from }) => from.y)) },
    /** From a point on the middle line of a triangle to its tip. */
    tipOf: (point: Point) => Math.min(...tips.map((one) => distance(one, point))),
  };
}
