import { areaOf, distance, encloses, pointAt, pointsOf } from '../net';
import type { Arc, Net, Point, Shape } from '../types';
import type { Note, Pointed } from './notes';
import { n, pathOf, segment, type Place } from './path';
import { freeIn, passes, type Room, type Spot } from './room';
import { teethOf } from './stops';
import { DROP, TALL, textWidth } from './type';

/** What a drawing shows by words and what is left for the lines below it. */
export interface Lettered {
  readonly shapes: readonly Shape[];
  readonly key: readonly KeyLine[];
  /** Panels and tabs that have no room for so much as a letter. */
  readonly unnamed: readonly string[];
}
export interface KeyLine {
  /** The letter that stands for it in the drawing. */
  readonly letter?: string;
  readonly text: string;
  readonly role: 'figure' | 'label';
}
interface Board {
  readonly room: Room;
  readonly place: Place;
  readonly panels: readonly Named[];
  readonly holes: readonly (readonly Point[])[];
}
interface Named {
  readonly name: string;
  readonly tab: boolean;
  readonly corners: readonly Point[];
}
type Words = Pick<Extract<Shape, { type: 'text' }>, 'text' | 'role' | 'of'>;

/** On either side of words. */
const BESIDE = 3;
/** From what a note points at to its words, near enough to need no leader and then with one. */
const DISTANCES = [4, 16, 30, 48] as const;
/** A letter may stand further away. */
const FURTHER = 72;
/** Turns away from the direction that is tried first, in radians. */
const TURNS = [0, 0.6, -0.6, 1.2, -1.2, 1.8, -1.8, 2.4, -2.4, 3.1];
/** Places of one note that are tried. */
const TRIED = 4;
/** Radius of the arc that marks an angle; smaller ones than the least are left out. */
const ARC = 15;
const LEAST_ARC = 6;
/** Said before the first point in the key. */
const POINTS = 'Points, across and down:';
/** What stands for words without room: none that hangs below the line or is taken for another or for a figure. */
const LETTERS = 'abcdefhkmnrstuvwxzABCDEFGHKLMNPRSTUVWXYZ';
/** From one line of the key to the next, and between two on one line. */
const KEY_LINE = 17;
const KEY_GAP = 18;
/** From a letter of the key to its words; the widest letter is an M. */
const KEY_LETTER = 16;

/** Names of panels and tabs, then notes; what has no room where it belongs is keyed by a letter. */
export function lettering(
  net: Net,
  notes: readonly Note[] | null,
  { room, place, scale }: Pick<Board, 'room' | 'place'> & { readonly scale: number },
): Lettered {
  const shapes: Shape[] = [];
  const key: KeyLine[] = [];
  const unnamed: string[] = [];
  const skipped = new Set([...net.joins.map(({ panels }) => panels[1]), ...teethOf(net).map(({ name }) => name)]);
  const named = net.panels
    .filter(({ name, loop }) => !skipped.has(name) && areaOf(loop) > 0)
    .map(({ name, role, loop }): Named => ({ name, tab: role === 'tab', corners: pointsOf(loop, 1).map(place) }))
    .sort((a, b) => Number(a.tab) - Number(b.tab));
  const holes = net.holes.map((loop) => pointsOf(loop, 1).map(place));
  const board: Board = { room, place, panels: named, holes };
  let letters = 0;
  const lettered = (role: KeyLine['role'], text: string, put: (letter: string) => readonly Shape[]): boolean => {
    const letter = LETTERS[letters] ?? '';
    const shown = letter === '' ? [] : put(letter);
    if (shown.length === 0) return false;
    shapes.push(...shown);
    key.push({ letter, text, role });
    letters += 1;
    return true;
  };

  for (const panel of named) {
    const shown = inside(board, panel, { text: panel.name, role: 'label', of: panel.name });
    shapes.push(...shown);
    if (shown.length > 0) continue;
    const put = (text: string) => inside(board, panel, { text, role: 'figure', of: panel.name });
    // One of a row of tabs is known by its number.
    const [number] = panel.tab ? (/\d+$/.exec(panel.name) ?? []) : [];
    const counted = number === undefined ? [] : put(number);
    shapes.push(...counted);
    if (counted.length > 0) continue;
    if (number !== undefined || !notes || !lettered('label', panel.name, put)) unnamed.push(panel.name);
  }
  for (const note of notes ?? []) {
    if (note.keyed && !key.some(({ text }) => text === POINTS)) key.push({ text: POINTS, role: 'label' });
    if (note.span) shapes.push({ type: 'path', role: 'dimension', d: pathOf([note.span], place, scale) });
    const shown = note.keyed ? [] : beside(board, note, note.text);
    shapes.push(...shown);
    if (shown.length > 0 || lettered('figure', note.text, (letter) => beside(board, note, letter))) continue;
    if (!note.keyed) key.push({ text: note.text, role: 'figure' });
  }
  return { shapes, key, unnamed };
}

/** A letter alone needs less around it. */
const sizeOf = (text: string): Pick<Spot, 'wide' | 'tall'> =>
  text.length === 1
    ? { wide: textWidth(text) + BESIDE, tall: TALL - 2 }
    : { wide: textWidth(text) + 2 * BESIDE, tall: TALL };
/** A clear ground under words that would stand on a hatch. */
const ground = ({ x, y, wide, tall }: Spot): Shape => ({
  type: 'path',
  role: 'panel',
  d: `M${n(x - wide / 2)} ${n(y - tall / 2)}h${n(wide)}v${n(tall)}h${n(-wide)}Z`,
});

/** Words in a panel, lying or else standing, as near as may be to where it balances; nothing when it has no room. */
function inside({ room, holes }: Board, { corners, tab }: Named, words: Words): readonly Shape[] {
  const { wide, tall } = sizeOf(words.text);
  const middle = centroidOf(corners);
  const level = freeIn(room, [corners, ...holes], middle, { wide, tall });
  const spot =
    level ?? (words.text.length === 1 ? null : freeIn(room, [corners, ...holes], middle, { wide: tall, tall: wide }));
  if (!spot) return [];
  room.take(spot);
  const [x, y] = level ? [spot.x, spot.y + DROP] : [spot.x + DROP, spot.y];
  return [
    ...(tab ? [ground(spot)] : []),
    { type: 'text', x, y, anchor: 'middle', ...words, ...(level ? {} : { turned: true }) },
  ];
}

/** Words near one of the places of a note, with a leader unless they stand right beside it; nothing when none has room. */
function beside(board: Board, { places }: Note, text: string): readonly Shape[] {
  for (const pointed of places.slice(0, TRIED)) {
    const shown = near(board, pointed, text);
    if (shown) return shown;
  }
  return [];
}
function near({ room, place, panels }: Board, pointed: Pointed, text: string): Shape[] | null {
  const { at, out, sides, within } = pointed;
  const { wide, tall } = sizeOf(text);
  const free = within && { ...place(within), wide, tall };
  if (free && room.isFree(free)) {
    room.take(free);
    return [{ type: 'text', role: 'figure', x: free.x, y: free.y + DROP, text, anchor: 'middle' }];
  }
  const whole = sides ? angleArc(place(at), sides.map(place)) : null;
  const arc = whole?.chords.every(([a, b]) => room.isClear(a, b)) ? whole : null;
  const from = arc?.middle ?? place(at);
  const start = Math.atan2(out.y, out.x);
  for (const far of text.length === 1 ? [...DISTANCES, FURTHER] : DISTANCES)
    for (const turn of TURNS) {
      const [x, y] = [Math.cos(start + turn), Math.sin(start + turn)];
      // As far as the rectangle of the words reaches towards the place.
      const half = Math.min(wide / 2 / Math.max(Math.abs(x), 0.01), tall / 2 / Math.max(Math.abs(y), 0.01));
      const spot = { x: from.x + x * (far + half), y: from.y + y * (far + half), wide, tall };
      if (!room.isFree(spot) || arc?.chords.some(([a, b]) => passes(a, b, spot))) continue;
      const end = { x: from.x + x * far, y: from.y + y * far };
      const leads = far > DISTANCES[0];
      if (leads && !room.isClear(from, end)) continue;
      room.take(spot);
      if (leads) room.takeLine(from, end);
      for (const [a, b] of arc?.chords ?? []) room.takeLine(a, b);
      const d = (arc?.d ?? '') + (leads ? segment(from.x, from.y, end.x, end.y) : '');
      return [
        ...(panels.some(({ tab, corners }) => tab && encloses(corners, spot)) ? [ground(spot)] : []),
        ...(d === '' ? [] : [{ type: 'path', role: 'dimension', d } satisfies Shape]),
        { type: 'text', role: 'figure', x: spot.x, y: spot.y + DROP, text, anchor: 'middle' },
      ];
    }
  return null;
}
/** The arc between the sides of an angle, as far out as the shorter one has room for; null for sides too short to tell. */
function angleArc(at: Point, [first, last]: readonly Point[]) {
  if (!first || !last) return null;
  const radius = Math.min(ARC, distance(at, first) * 0.7, distance(at, last) * 0.7);
  if (radius < LEAST_ARC) return null;
  const on = (point: Point) => {
    const share = radius / distance(at, point);
    return { x: at.x + (point.x - at.x) * share, y: at.y + (point.y - at.y) * share };
  };
  const [from, to] = [on(first), on(last)];
  const arc: Arc = { type: 'arc', from, to, centre: at, radius, clockwise: true };
  const chords = [0, 0.25, 0.5, 0.75].map((share) => [pointAt(arc, share), pointAt(arc, share + 0.25)] as const);
  return { chords, middle: pointAt(arc, 0.5), d: pathOf([arc], (point) => point, 1) };
}

/** Where a polygon would balance. */
function centroidOf(points: readonly Point[]): Point {
  const origin = points[0] ?? { x: 0, y: 0 };
  const sum = points.reduce<Point & { readonly twice: number }>(
    (so, a, index) => {
      const b = points[(index + 1) % points.length] ?? a;
      const twice = (a.x - origin.x) * (b.y - origin.y) - (b.x - origin.x) * (a.y - origin.y);
      const [x, y] = [(a.x + b.x + origin.x) / 3, (a.y + b.y + origin.y) / 3];
      return { x: so.x + twice * x, y: so.y + twice * y, twice: so.twice + twice };
    },
    { x: 0, y: 0, twice: 0 },
  );
  return { x: sum.x / sum.twice, y: sum.y / sum.twice };
}

/** Lines of the key one after the other, in as many rows as they take. */
export function keyRows(
  lines: readonly KeyLine[],
  frame: { readonly left: number; readonly right: number; readonly top: number },
): { readonly shapes: readonly Shape[]; readonly wide: number; readonly tall: number } {
  let [x, row] = [frame.left, 1];
  const widthOf = ({ letter, text }: KeyLine) => (letter === undefined ? 0 : KEY_LETTER) + textWidth(text);
  const shapes = lines.flatMap((line): Shape[] => {
    const { letter, text, role } = line;
    if (x > frame.left && x + widthOf(line) > frame.right) [x, row] = [frame.left, row + 1];
    const at = { x, y: frame.top + row * KEY_LINE, anchor: 'start' } as const;
    x += widthOf(line) + KEY_GAP;
    if (letter === undefined) return [{ type: 'text', role, ...at, text }];
    return [
      { type: 'text', role: 'figure', ...at, text: letter },
      { type: 'text', role, ...at, x: at.x + KEY_LETTER, text },
    ];
  });
  const wide = Math.max(0, ...lines.map(widthOf));
  return { shapes, wide, tall: lines.length === 0 ? 0 : row * KEY_LINE + 4 };
}
