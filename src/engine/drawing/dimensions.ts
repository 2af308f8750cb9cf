import type { Shape } from '../types';
import { n, segment } from './path';

/** A position on a running dimension: where it is drawn and what it says. */
export interface Stop {
  readonly at: number;
  readonly text: string;
}
/** About the width of a figure in the drawing's type, 13 units high; erring wide keeps figures apart. */
export const textWidth = (text: string): number =>
  [...text].reduce(
    (sum, mark) =>
      sum + (mark === '\u202f' ? 2.5 : mark === ' ' ? 4 : /[0-9]/.test(mark) ? 7.6 : mark === '\u2044' ? 3.4 : 7.2),
    0,
  );
const LINE = 15;

/** Rows needed above the top dimension so that no figure touches another. */
export function topRows(stops: readonly Stop[]): readonly number[] {
  const ends: number[] = [];
  return stops.map(({ at, text }) => {
    const half = textWidth(text) / 2 + 3;
    let row = ends.findIndex((end) => end <= at - half);
    if (row < 0) row = ends.length;
    ends[row] = at + half;
    return row;
  });
}

/** Running dimension along the top, read from the left edge, as on a scoring board. */
export function acrossTop(
  stops: readonly Stop[],
  frame: { readonly from: number; readonly line: number; readonly edge: number },
): Shape[] {
  const rows = topRows(stops);
  const last = stops.at(-1)?.at ?? frame.from;
  return [
    { type: 'path', role: 'dimension', d: segment(frame.from, frame.line, last, frame.line) },
    { type: 'path', role: 'extension', d: segment(frame.from, frame.line - 4, frame.from, frame.edge - 2) },
    ...stops.flatMap(({ at, text }, index): Shape[] => {
      const base = frame.line - 6 - (rows[index] as number) * LINE;
      return [
        { type: 'path', role: 'extension', d: segment(at, base + 2, at, frame.edge - 2) },
        { type: 'text', role: 'figure', x: at, y: base - 1, text, anchor: 'middle' },
      ];
    }),
  ];
}

/** Figures of the left dimension moved apart where they would touch; a bent leader joins each to its place. */
export function spread(stops: readonly Stop[], least: number, bottom: number): readonly number[] {
  const placed: number[] = [];
  for (const { at } of stops) placed.push(Math.max(at, (placed.at(-1) ?? -Infinity) + least));
  for (let index = placed.length - 1, limit = bottom; index >= 0; index -= 1) {
    placed[index] = Math.min(placed[index] as number, limit);
    limit = (placed[index] as number) - least;
  }
  return placed;
}

/** Running dimension down the left, read from the top edge. */
export function downLeft(
  stops: readonly Stop[],
  frame: { readonly from: number; readonly line: number; readonly edge: number; readonly bottom: number },
): Shape[] {
  const places = spread(stops, LINE, frame.bottom);
  const last = stops.at(-1)?.at ?? frame.from;
  return [
    { type: 'path', role: 'dimension', d: segment(frame.line, frame.from, frame.line, last) },
    { type: 'path', role: 'extension', d: segment(frame.line - 4, frame.from, frame.edge - 2, frame.from) },
    ...stops.flatMap(({ at, text }, index): Shape[] => {
      const y = places[index] as number;
      return [
        {
          type: 'path',
          role: 'extension',
          d: `M${n(frame.edge - 2)} ${n(at)}L${n(frame.line)} ${n(at)}L${n(frame.line - 7)} ${n(y)}`,
        },
        { type: 'text', role: 'figure', x: frame.line - 10, y: y + 4.5, text, anchor: 'end' },
      ];
    }),
  ];
}
