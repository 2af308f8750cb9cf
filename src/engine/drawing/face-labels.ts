import { encloses } from '../net';
import type { Point, Shape } from '../types';
import { textWidth } from './type';
import type { Seen } from './folded-faces';
import { isHidden, type SeenFace } from './seen';

/** From places of the projection to those of the drawing. */
export interface Placing {
  readonly x: (x: number) => number;
  readonly y: (y: number) => number;
  readonly scale: number;
}

/** Drawing units that a label needs: tall, and clear on either side of its words. */
const TALL = 16;
const BESIDE = 4;
/** From a label's middle down to the line that its words stand on. */
const DROP = 4.5;
/** Where in a face's frame a label may stand, as shares of width and height. */
const SHARES = [0.5, 0.35, 0.65, 0.2, 0.8];

interface Label {
  readonly x: number;
  readonly y: number;
  readonly half: number;
  readonly text: string;
}

/** Names on faces: each wholly on its face and, unless one sees through, wholly in view; none over another; large faces first. */
export function labelsOn(
  faces: readonly SeenFace<Seen>[],
  place: Placing,
  { seeThrough }: { readonly seeThrough: boolean },
): readonly Shape[] {
  const labels: Label[] = [];
  const named = faces
    .filter(({ face, nearness }) => face.data.words !== undefined && nearness !== null)
    .sort((a, b) => sizeOf(b) - sizeOf(a));
  for (const one of named) {
    const { words: text = '', panel, placed } = one.face.data;
    // A rolled panel is many narrow facets, and its name goes over several of them.
    const own = faces.filter(({ face }) => face.data.panel === panel && face.data.placed === placed);
    const half = textWidth(text) / 2 + BESIDE;
    const isFree = (at: Point) =>
      own.some(
        ({ corners, nearness }) =>
          nearness !== null && encloses(corners, at) && (seeThrough || !isHidden(at, nearness(at), faces)),
      );
    const spot = spotsOn(one).find((middle) => {
      const [x, y] = [place.x(middle.x), place.y(middle.y)];
      if (labels.some((other) => Math.abs(other.x - x) < other.half + half && Math.abs(other.y - y) < TALL))
        return false;
      return gridAround(middle, half / place.scale, TALL / 2 / place.scale).every(isFree);
    });
    if (spot) labels.push({ x: place.x(spot.x), y: place.y(spot.y), half, text });
  }
  return labels.map(({ x, y, text }) => ({ type: 'text', role: 'label', x, y: y + DROP, text, anchor: 'middle' }));
}

const sizeOf = ({ left, right, top, bottom }: SeenFace<Seen>): number => (right - left) * (bottom - top);

/** The middle of its corners, then places in its frame from the middle outwards. */
function spotsOn({ corners, left, right, top, bottom }: SeenFace<Seen>): readonly Point[] {
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const grid = SHARES.flatMap((x) =>
    SHARES.map((y) => ({ x: left + (right - left) * x, y: top + (bottom - top) * y })),
  );
  return [{ x: mean(corners.map(({ x }) => x)), y: mean(corners.map(({ y }) => y)) }, ...grid];
}
/** The middle, corners and sides of a label's rectangle. */
function gridAround({ x, y }: Point, half: number, tall: number): readonly Point[] {
  return [0, -1, 1, -0.5, 0.5].flatMap((i) => [0, -1, 1].map((j) => ({ x: x + i * half, y: y + j * tall })));
}
