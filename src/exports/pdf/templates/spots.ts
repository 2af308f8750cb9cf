import { pointsOf, type Curve, type Net, type Point } from '@/engine';

/** How close points on a line are looked at, and how far a square keeps from them; millimetres. */
const STEP = 3;
const CLEAR = 2.5;
const GRID = 3;

/** Points along every line of a piece, close enough together that no square slips between them. */
export function pointsAlong({ outline, holes, folds, creases, slits }: Net): readonly Point[] {
  const curves: readonly Curve[] = [
    ...outline,
    ...holes.flat(),
    ...folds.map(({ curve }) => curve),
    ...creases.map(({ curve }) => curve),
    ...slits,
  ];
  return pointsOn(curves);
}

/** The same along a few curves. */
export function pointsOn(curves: readonly Curve[]): readonly Point[] {
  return curves.flatMap((curve) => {
    const corners = [curve.from, ...pointsOf([curve])];
    return corners.slice(1).flatMap((to, i) => {
      const from = corners[i] as Point;
      const count = Math.max(1, Math.ceil(Math.hypot(to.x - from.x, to.y - from.y) / STEP));
      return Array.from({ length: count + 1 }, (_, k) => ({
        x: from.x + ((to.x - from.x) * k) / count,
        y: from.y + ((to.y - from.y) * k) / count,
      }));
    });
  });
}

/** Something that a square may not touch: a point, or a rectangle. */
export interface Obstacle extends Point {
  readonly across: number;
  readonly along: number;
}

/** Places for squares of these sides on a page, clear of the obstacles and of each other, from the bottom up; null when there are none. */
export function squareSpots(
  sides: readonly number[],
  page: { readonly across: number; readonly along: number },
  obstacles: readonly Obstacle[],
): readonly Point[] | null {
  const taken = [...obstacles];
  const found: Point[] = [];
  for (const side of sides) {
    const spot = firstSpot(side, page, taken);
    if (!spot) return null;
    found.push(spot);
    taken.push({ ...spot, across: side, along: side });
  }
  return found;
}

function firstSpot(
  side: number,
  page: { readonly across: number; readonly along: number },
  taken: readonly Obstacle[],
): Point | null {
  const touches = (x: number, y: number) =>
    taken.some(
      (one) =>
        one.x < x + side + CLEAR &&
        one.x + one.across > x - CLEAR &&
        one.y < y + side + CLEAR &&
        one.y + one.along > y - CLEAR,
    );
  for (let y = page.along - side; y >= 0; y -= GRID) {
    for (let x = 0; x <= page.across - side; x += GRID) {
      if (!touches(x, y)) return { x, y };
    }
  }
  return null;
}
