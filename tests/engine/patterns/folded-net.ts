import type { Net, Placement, Point } from '@/engine';
import { foldNet, minus, plus, size, times, vector, type FoldedPanel, type Vector } from '@/engine/space';

/** A folded net with, for each panel, the way from the flat sheet into space. */
export interface InSpace {
  readonly panels: ReadonlyMap<string, FoldedPanel>;
  /** Where a point of the flat sheet lies in space as part of this panel. */
  readonly at: (panel: string, point: Point) => Vector;
}

export function inSpace(
  net: Net,
  root: string,
  across: Placement['across'] = '+x',
  along: Placement['along'] = '-y',
): InSpace {
  const panels = new Map(
    foldNet(net, { root, at: vector(0, 0, 0), across, along }).map((panel) => [panel.name, panel]),
  );
  const at = (name: string, point: Point): Vector => {
    const loop = (net.panels.find((panel) => panel.name === name)?.loop ?? []).map((curve) => curve.from);
    const [o, p] = loop as [Point, Point];
    const off = (q: Point): number => (p.x - o.x) * (q.y - o.y) - (p.y - o.y) * (q.x - o.x);
    const third = loop.findIndex((q) => Math.abs(off(q)) > 1e-3);
    const [q, points] = [loop[third] as Point, panels.get(name)?.points ?? []];
    const [O, P, Q] = [points[0], points[1], points[third]] as [Vector, Vector, Vector];
    // The point as o + u (p − o) + v (q − o), by Cramer's rule.
    const v = off(point) / off(q);
    const u = ((point.x - o.x) * (q.y - o.y) - (point.y - o.y) * (q.x - o.x)) / off(q);
    return plus(O, plus(times(minus(P, O), u), times(minus(Q, O), v)));
  };
  return { panels, at };
}

/** The worst gap, in mm, between the two panels of a fold at either end of it: nothing only when every ring of folds closes. */
export function worstFold(net: Net, { at }: InSpace): number {
  return Math.max(
    ...net.folds.flatMap(({ curve, panels: [a, b] }) =>
      [curve.from, curve.to].map((point) => size(minus(at(a, point), at(b, point)))),
    ),
  );
}
/** Corners of one panel that lie on a corner of the other, each counted once. */
export const meeting = (a: FoldedPanel | undefined, b: FoldedPanel | undefined, within = 1e-6): number =>
  (a?.points ?? []).filter(
    (p, index, all) =>
      all.findIndex((other) => size(minus(other, p)) < 1e-6) === index &&
      (b?.points ?? []).some((q) => size(minus(p, q)) < within),
  ).length;
/** From where to where a panel reaches along one axis. */
export const reach = (panel: FoldedPanel | undefined, axis: 'x' | 'y' | 'z'): readonly [number, number] => {
  const values = (panel?.points ?? []).map((point) => point[axis]);
  return [Math.min(...values), Math.max(...values)];
};
