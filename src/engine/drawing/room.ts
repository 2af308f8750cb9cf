import { crossingOf, encloses } from '../net';
import type { Point } from '../types';

/** A rectangle by its middle. */
export interface Spot extends Point {
  readonly wide: number;
  readonly tall: number;
}
/** Where nothing stands yet in a drawing. */
export interface Room {
  /** Whether no line goes through a rectangle within the room and no text stands there. */
  readonly isFree: (spot: Spot) => boolean;
  /** Whether a line from one point to another goes through no text and over no such line. */
  readonly isClear: (from: Point, to: Point) => boolean;
  readonly take: (spot: Spot) => void;
  readonly takeLine: (from: Point, to: Point) => void;
}
export interface Edges {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** Drawing units: as near as text comes to a line. */
const CELL = 2;
/** From one place that is tried in a panel to the next. */
const STEP = 4;

/** The room between lines, as a grid of cells that something goes through or not. */
export function roomIn({ left, right, top, bottom }: Edges, lines: readonly (readonly Point[])[]): Room {
  const [columns, rows] = [Math.floor((right - left) / CELL), Math.floor((bottom - top) / CELL)];
  const marked = new Uint8Array(columns * rows);
  const mark = (a: Point, b: Point) => {
    const steps = Math.ceil((Math.max(Math.abs(b.x - a.x), Math.abs(b.y - a.y)) / CELL) * 2) + 1;
    const [dx, dy] = [(b.x - a.x) / steps, (b.y - a.y) / steps];
    for (let step = 0; step <= steps; step += 1) {
      const column = Math.floor((a.x + dx * step - left) / CELL);
      const row = Math.floor((a.y + dy * step - top) / CELL);
      if (column >= 0 && column < columns && row >= 0 && row < rows) marked[row * columns + column] = 1;
    }
  };
  const cells = ({ x, y, wide, tall }: Spot) => ({
    from: Math.floor((x - wide / 2 - left) / CELL),
    to: Math.floor((x + wide / 2 - left) / CELL),
    over: Math.floor((y - tall / 2 - top) / CELL),
    under: Math.floor((y + tall / 2 - top) / CELL),
  });
  for (const line of lines)
    for (let index = 1; index < line.length; index += 1) mark(line[index - 1] as Point, line[index] as Point);

  const taken: Spot[] = [];
  const drawn: (readonly [Point, Point])[] = [];
  return {
    isFree(spot) {
      const { from, to, over, under } = cells(spot);
      if (from < 0 || over < 0 || to >= columns || under >= rows) return false;
      for (let row = over; row <= under; row += 1)
        for (let cell = row * columns + from; cell <= row * columns + to; cell += 1) if (marked[cell]) return false;
      return true;
    },
    isClear: (from, to) =>
      !taken.some((spot) => passes(from, to, spot)) && !drawn.some(([a, b]) => crossingOf(a, b, from, to)),
    take(spot) {
      const { from, to, over, under } = cells(spot);
      for (let row = over; row <= under; row += 1) marked.fill(1, row * columns + from, row * columns + to + 1);
      taken.push(spot);
    },
    takeLine(from, to) {
      mark(from, to);
      drawn.push([from, to]);
    },
  };
}
/** Whether a straight line goes through a rectangle: no side of it, nor the line itself, has the two apart. */
export function passes(a: Point, b: Point, { x, y, wide, tall }: Spot): boolean {
  if (Math.abs(a.x + b.x - 2 * x) > Math.abs(a.x - b.x) + wide) return false;
  if (Math.abs(a.y + b.y - 2 * y) > Math.abs(a.y - b.y) + tall) return false;
  const [dx, dy] = [b.x - a.x, b.y - a.y];
  return Math.abs(dx * (y - a.y) - dy * (x - a.x)) * 2 <= Math.abs(dx) * tall + Math.abs(dy) * wide;
}

/** The free place within a polygon and outside holes that is nearest to a point; null when there is none. */
export function freeIn(
  room: Room,
  [corners = [], ...holes]: readonly (readonly Point[])[],
  near: Point,
  { wide, tall }: Pick<Spot, 'wide' | 'tall'>,
): Spot | null {
  const [xs, ys] = [corners.map(({ x }) => x), corners.map(({ y }) => y)];
  const reach = (values: readonly number[], size: number, middle: number) => ({
    from: Math.ceil((Math.min(...values) + size / 2 - middle) / STEP),
    to: Math.floor((Math.max(...values) - size / 2 - middle) / STEP),
  });
  const [across, down] = [reach(xs, wide, near.x), reach(ys, tall, near.y)];
  let best: Spot | null = null;
  let least = Infinity;
  // From the point outwards, until nothing nearer can come.
  for (const i of outwards(across)) {
    if (i * i >= least) break;
    for (const j of outwards(down)) {
      const far = i * i + j * j;
      if (far >= least) break;
      const spot = { x: near.x + i * STEP, y: near.y + j * STEP, wide, tall };
      if (!room.isFree(spot) || !encloses(corners, spot)) continue;
      if (!holes.some((hole) => encloses(hole, spot))) [best, least] = [spot, far];
    }
  }
  return best;
}
/** 0, 1, −1, 2, −2… as far as both ends allow. */
function outwards({ from, to }: { readonly from: number; readonly to: number }): readonly number[] {
  const order: number[] = [];
  for (let step = Math.max(0, from, -to); step <= Math.max(-from, to); step += 1) {
    if (step <= to && step >= from) order.push(step);
    if (step > 0 && -step >= from && -step <= to) order.push(-step);
  }
  return order;
}
