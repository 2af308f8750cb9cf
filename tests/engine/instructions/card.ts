/** A piece as drawn from its words alone: plain geometry of its own, knowing nothing of the engine. Millimetres, y down. */
export interface Dot {
  readonly x: number;
  readonly y: number;
}
/** A point of an outline; corners are where one line or arc ends and the next begins. */
export interface Stop extends Dot {
  readonly corner: boolean;
}
export type Kind = 'valley' | 'mountain' | 'slit' | 'pencil';
export interface Stroke {
  readonly kind: Kind;
  readonly path: readonly Dot[];
}
export interface Card {
  across: number;
  along: number;
  outline: Stop[];
  strokes: Stroke[];
  holes: Dot[][];
}

export const corner = (x: number, y: number): Stop => ({ x, y, corner: true });
export const gap = (a: Dot, b: Dot): number => Math.hypot(a.x - b.x, a.y - b.y);
export const blank = (across: number, along: number): Card => ({
  across,
  along,
  outline: [corner(0, 0), corner(across, 0), corner(across, along), corner(0, along)],
  strokes: [],
  holes: [],
});
export const areaOf = (loop: readonly Dot[]): number =>
  loop.reduce((sum, a, index) => {
    const b = loop[(index + 1) % loop.length] as Dot;
    return sum + (a.x * b.y - b.x * a.y) / 2;
  }, 0);

/** Arcs are drawn in straight steps of two degrees. */
export const ARC_STEP = Math.PI / 90;
/** The points of an arc of less than half a turn whose middle lies to the given side; the first is left out. */
export function arcPoints(from: Dot, to: Dot, radius: number, towards: Dot): Stop[] {
  const chord = gap(from, to);
  const r = Math.max(radius, chord / 2);
  const normal = { x: -(to.y - from.y) / chord, y: (to.x - from.x) / chord };
  const side = normal.x * towards.x + normal.y * towards.y > 0 ? 1 : -1;
  const rise = Math.sqrt(r * r - (chord / 2) ** 2);
  const centre = {
    x: (from.x + to.x) / 2 - side * normal.x * rise,
    y: (from.y + to.y) / 2 - side * normal.y * rise,
  };
  const start = Math.atan2(from.y - centre.y, from.x - centre.x);
  let turn = Math.atan2(to.y - centre.y, to.x - centre.x) - start;
  while (turn > Math.PI) turn -= 2 * Math.PI;
  while (turn < -Math.PI) turn += 2 * Math.PI;
  if (Math.abs(Math.abs(turn) - Math.PI) < 1e-9) {
    const middle = { x: Math.cos(start + turn / 2), y: Math.sin(start + turn / 2) };
    if (middle.x * towards.x + middle.y * towards.y < 0) turn = -turn;
  }
  const count = Math.max(2, Math.ceil(Math.abs(turn) / ARC_STEP));
  return Array.from({ length: count }, (_, index) => {
    const angle = start + (turn * (index + 1)) / count;
    return index === count - 1
      ? corner(to.x, to.y)
      : { x: centre.x + r * Math.cos(angle), y: centre.y + r * Math.sin(angle), corner: false };
  });
}

/** Cuts along a path from edge to edge; the smaller part falls away. */
export function cut(card: Card, path: readonly Stop[]): void {
  const way = (point: Dot) => {
    let best = { index: 0, part: 0, off: Infinity };
    for (const [index, a] of card.outline.entries()) {
      const { off, part } = beside(point, a, card.outline[(index + 1) % card.outline.length] as Dot);
      if (off < best.off - 1e-9) best = { index, part, off };
    }
    if (best.off > 0.5) throw new Error(`a cut begins ${best.off} mm off the edge, at ${point.x}, ${point.y}`);
    return best.index + best.part;
  };
  const [a, b] = [way(path[0] as Dot), way(path.at(-1) as Dot)];
  const between = (from: number, to: number): Stop[] => {
    const count = card.outline.length;
    const last = to > from ? to : to + count;
    const stops: Stop[] = [];
    for (let index = Math.floor(from) + 1; index < last - 1e-9; index += 1)
      stops.push(card.outline[index % count] as Stop);
    return stops;
  };
  const [one, other] = [
    [...path, ...between(b, a)],
    [...[...path].reverse(), ...between(a, b)],
  ];
  card.outline = Math.abs(areaOf(one)) > Math.abs(areaOf(other)) ? one : other;
}
function beside(point: Dot, a: Dot, b: Dot) {
  const length = gap(a, b) || 1;
  const part = Math.max(
    0,
    Math.min(0.999999, ((point.x - a.x) * (b.x - a.x) + (point.y - a.y) * (b.y - a.y)) / length ** 2),
  );
  return { part, off: gap(point, { x: a.x + (b.x - a.x) * part, y: a.y + (b.y - a.y) * part }) };
}
/** How far a point lies from a chain of straight lines. */
export const offPath = (point: Dot, path: readonly Dot[]): number =>
  path.slice(1).reduce((least, to, index) => Math.min(least, beside(point, path[index] as Dot, to).off), Infinity);
export const offLoop = (point: Dot, loop: readonly Dot[]): number => offPath(point, [...loop, loop[0] as Dot]);
export const inside = ({ x, y }: Dot, loop: readonly Dot[]): boolean =>
  loop.reduce((odd, a, index) => {
    const b = loop[(index + 1) % loop.length] as Dot;
    return a.y > y !== b.y > y && x < a.x + ((y - a.y) * (b.x - a.x)) / (b.y - a.y) ? !odd : odd;
  }, false);
/** Points at most `step` apart along a chain, both ends among them. */
export const along = (path: readonly Dot[], step: number): Dot[] =>
  path.slice(1).flatMap((to, index) => {
    const from = path[index] as Dot;
    const count = Math.max(1, Math.ceil(gap(from, to) / step));
    return Array.from({ length: count + 1 }, (_, part) => ({
      x: from.x + ((to.x - from.x) * part) / count,
      y: from.y + ((to.y - from.y) * part) / count,
    }));
  });
