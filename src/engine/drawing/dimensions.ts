import type { Shape } from '../types';
import { n, segment } from './path';
import { textWidth } from './type';

/** A position on a running dimension: where it is drawn and what it says. */
export interface Stop {
  readonly at: number;
  readonly text: string;
  /** How far into the piece its extension line goes, to reach what lies there: 0 for lines that meet the edge themselves. */
  readonly reach: number;
}
/** From one line of figures to the next. */
const LINE = 15;
/** Between figures side by side. */
const GAP = 7;
/** As far as a figure may be moved along the edge before figures are turned instead. */
const SHIFT = 20;
/** From the dimension line out to the figures, bridged by leaders. */
const LEADER = 7;

/** Middles moved apart as little as may be, in their order, so that each has its size between the limits. */
export function spread(
  at: readonly number[],
  sizes: readonly number[],
  [least, most]: readonly [number, number],
): readonly number[] {
  const gap = (index: number) => ((sizes[index - 1] as number) + (sizes[index] as number)) / 2;
  const half = (index: number) => (sizes[index] as number) / 2;
  const forwards = (from: readonly number[], limit: number) => {
    const placed: number[] = [];
    from.forEach((one, index) => {
      placed.push(Math.max(one, index === 0 ? limit + half(0) : (placed[index - 1] as number) + gap(index)));
    });
    return placed;
  };
  const backwards = (from: readonly number[], limit: number) => {
    const placed = [...from];
    for (let index = placed.length - 1; index >= 0; index -= 1) {
      const most = index === placed.length - 1 ? limit - half(index) : (placed[index + 1] as number) - gap(index + 1);
      placed[index] = Math.min(placed[index] as number, most);
    }
    return placed;
  };
  // Pushed to the right and to the left, both keep apart; so does what lies midway.
  const [right, left] = [forwards(at, -Infinity), backwards(at, Infinity)];
  const midway = right.map((one, index) => (one + (left[index] as number)) / 2);
  return backwards(forwards(midway, least), most);
}

/** How the figures of the top dimension stand: beside one another, or turned where there is no room for that. */
export interface TopFigures {
  readonly places: readonly number[];
  readonly turned: boolean;
  /** From the dimension line up. */
  readonly tall: number;
}
export function topFigures(stops: readonly Stop[], limits: readonly [number, number]): TopFigures {
  const at = stops.map((stop) => stop.at);
  const widths = stops.map(({ text }) => textWidth(text));
  const level = spread(
    at,
    widths.map((width) => width + GAP),
    limits,
  );
  const fits = level.every(
    (place, index) =>
      Math.abs(place - (at[index] as number)) <= SHIFT && (index > 0 || place - (widths[0] as number) / 2 >= limits[0]),
  );
  if (fits) return { places: level, turned: false, tall: LEADER + 14 };
  const places = spread(
    at,
    stops.map(() => LINE),
    limits,
  );
  return { places, turned: true, tall: LEADER + 6 + Math.max(...widths) };
}

/** Running dimension along the top, read from the left edge, as on a scoring board. */
export function acrossTop(
  stops: readonly Stop[],
  { places, turned }: TopFigures,
  frame: { readonly from: number; readonly line: number; readonly edge: number },
): Shape[] {
  const { from, line, edge } = frame;
  return [
    { type: 'path', role: 'dimension', d: segment(from, line, stops.at(-1)?.at ?? from, line) },
    { type: 'path', role: 'extension', d: segment(from, line - 4, from, edge - 2) },
    ...stops.flatMap(({ at, text, reach }, index): Shape[] => {
      const place = places[index] as number;
      return [
        {
          type: 'path',
          role: 'extension',
          d: `M${n(at)} ${n(edge - 2 + reach)}V${n(line)}L${n(place)} ${n(line - LEADER)}`,
        },
        turned
          ? { type: 'text', role: 'figure', x: place + 4.5, y: line - LEADER - 3, text, anchor: 'start', turned }
          : { type: 'text', role: 'figure', x: place, y: line - LEADER - 3, text, anchor: 'middle' },
      ];
    }),
  ];
}

/** Height that figures down the left take, however near their positions. */
export const leftHeight = (stops: readonly Stop[]): number => stops.length * LINE;

/** Running dimension down the left, read from the top edge. */
export function downLeft(
  stops: readonly Stop[],
  frame: { readonly from: number; readonly line: number; readonly edge: number; readonly bottom: number },
): Shape[] {
  const { from, line, edge, bottom } = frame;
  const places = spread(
    stops.map(({ at }) => at),
    stops.map(() => LINE),
    [from, bottom],
  );
  return [
    { type: 'path', role: 'dimension', d: segment(line, from, line, stops.at(-1)?.at ?? from) },
    { type: 'path', role: 'extension', d: segment(line - 4, from, edge - 2, from) },
    ...stops.flatMap(({ at, text, reach }, index): Shape[] => {
      const y = places[index] as number;
      return [
        {
          type: 'path',
          role: 'extension',
          d: `M${n(edge - 2 + reach)} ${n(at)}H${n(line)}L${n(line - LEADER)} ${n(y)}`,
        },
        { type: 'text', role: 'figure', x: line - LEADER - 3, y: y + 4.5, text, anchor: 'end' },
      ];
    }),
  ];
}
