import type { LoosePanel } from '../net';
import { line } from '../net';
import type { Arc, Point } from '../types';
import { finishNet, nonsense, type Built } from './finish';
import { arcs, circle } from './shapes';

/** A tooth every half degree; more come of a slip in a formula, and would take for ever to draw. */
export const MOST_TEETH = 720;

/** A disc with every formula worked out. */
export interface DiscPiece {
  readonly disc: string;
  readonly diameter: number;
  readonly rim: {
    readonly teeth: number;
    readonly depth: number;
    readonly toothAngle: number;
    readonly angle: number;
  } | null;
  readonly step: number;
}

/** A circle, or a circle with teeth round it that turn up: each tooth stands on its share of the rim and gives way to its neighbours. */
export function buildDisc(piece: DiscPiece): Built {
  const { diameter, rim } = piece;
  const [radius, centre] = [diameter / 2, { x: 0, y: 0 }];
  if (!(diameter > 0)) return nonsense('its diameter comes out smaller than nothing');
  if (!rim) {
    return finishNet({
      panels: [{ name: piece.disc, role: 'panel', loop: circle(centre, radius) }],
      jointOf: () => ({ is: 'nothing' }),
      step: piece.step,
    });
  }
  if (!Number.isInteger(rim.teeth) || rim.teeth < 6) return nonsense('a toothed rim needs at least six teeth');
  if (rim.teeth > MOST_TEETH) return nonsense(`nobody cuts more than ${MOST_TEETH} teeth`);
  const rimArcs = arcs(centre, radius, 0, 360, rim.teeth);
  const panels: LoosePanel[] = [{ name: piece.disc, role: 'panel', loop: rimArcs }];
  for (const [index, arc] of rimArcs.entries()) {
    const tooth = toothOn(arc, rim.depth, rim.toothAngle);
    if (!tooth) return nonsense('the teeth come to nothing');
    panels.push({ name: `tooth ${index + 1}`, role: 'tab', tooth: true, loop: tooth });
  }
  return finishNet({ panels, jointOf: () => ({ is: 'fold', kind: 'valley', angle: rim.angle }), step: piece.step });
}

/** A tooth outside an arc: root on the arc, sides that give way by `angle` degrees, a straight tip; null when nothing is left. */
export function toothOn(arc: Arc, depth: number, angle: number): readonly (Arc | ReturnType<typeof line>)[] | null {
  const [from, to] = [arc.to, arc.from];
  const pitch = Math.hypot(to.x - from.x, to.y - from.y);
  const half = pitch / 2 - depth * Math.tan((angle * Math.PI) / 180);
  if (!(half > 1e-6) || !(depth > 0)) return null;
  const along = { x: (to.x - from.x) / pitch, y: (to.y - from.y) / pitch };
  const chord = { x: (from.x + to.x) / 2 - arc.centre.x, y: (from.y + to.y) / 2 - arc.centre.y };
  const away = Math.hypot(chord.x, chord.y) || 1;
  const out = { x: chord.x / away, y: chord.y / away };
  const crown = { x: arc.centre.x + out.x * arc.radius, y: arc.centre.y + out.y * arc.radius };
  const tip = (u: number): Point => ({
    x: crown.x + out.x * depth + along.x * u,
    y: crown.y + out.y * depth + along.y * u,
  });
  const [a, b] = [tip(half), tip(-half)];
  return [{ ...arc, from, to, clockwise: !arc.clockwise }, line(to, a), line(a, b), line(b, from)];
}
