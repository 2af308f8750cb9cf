import { show, type ShowOptions } from '../measure';
import type { Cut, SheetLayout, SheetPlan } from '../sheet';
import type { Drawing, Shape } from '../types';
import { textWidth } from './type';
import { n, segment } from './path';

export interface SheetDrawingOptions extends Pick<ShowOptions, 'units' | 'grid'> {
  /** Drawing units across, all in. */
  readonly width: number;
}
/** Room round the sheet, for the numbers of cuts that begin at its edge. */
const BORDER = 24;
/** Of the circle that a cut's number stands in. */
const RADIUS = 8.5;
const LINE = 15;

interface Frame {
  readonly scale: number;
  readonly x: (mm: number) => number;
  readonly y: (mm: number) => number;
  readonly says: (mm: number) => string;
}
interface Box {
  readonly x: number;
  readonly y: number;
  readonly across: number;
  readonly along: number;
}

/** One planned sheet: pieces and offcuts by name and size, offcuts dotted, cuts numbered in the order in which they are made. */
export function drawSheet(plan: SheetPlan, sheet: number, options: SheetDrawingOptions): Drawing {
  const layout = plan.sheets[sheet];
  const { width } = options;
  const title = `Sheet ${sheet + 1}`;
  if (!layout) return { width, height: 0, title, alt: '', shapes: [] };
  const { stock } = layout;
  const scale = (width - 2 * BORDER) / stock.across;
  const frame: Frame = {
    scale,
    x: (mm) => BORDER + mm * scale,
    y: (mm) => BORDER + mm * scale,
    says: (mm) => show(mm, { ...options, bare: true }).typeset,
  };
  const whole = { x: 0, y: 0, across: stock.across, along: stock.along };
  const size = ({ across, along }: Box) => `${frame.says(across)} × ${frame.says(along)}`;
  const shapes: Shape[] = [
    { type: 'path', role: 'panel', d: outline(whole, frame) },
    ...layout.offcuts.flatMap((box): Shape[] => [
      { type: 'path', role: 'hidden', d: outline(box, frame, 2) },
      ...labels(box, frame, [
        [`offcut ${box.name}`, size(box)],
        [box.name, size(box)],
        [`${box.name} ${size(box)}`],
        [box.name],
      ]),
    ]),
    ...layout.parts.flatMap((part) => labels(part, frame, [[part.piece, size(part)], [part.piece]])),
    { type: 'path', role: 'cut', d: outline(whole, frame) },
    ...layout.cuts.map(({ from, to }): Shape => {
      return { type: 'path', role: 'cut', d: segment(frame.x(from.x), frame.y(from.y), frame.x(to.x), frame.y(to.y)) };
    }),
    ...numbers(layout, frame),
  ];
  return { width, height: stock.along * scale + 2 * BORDER, title, alt: altOf(plan, sheet, size), shapes };
}

const outline = ({ x, y, across, along }: Box, frame: Frame, inset = 0): string =>
  `M${n(frame.x(x) + inset)} ${n(frame.y(y) + inset)}h${n(across * frame.scale - 2 * inset)}v${n(along * frame.scale - 2 * inset)}h${n(2 * inset - across * frame.scale)}Z`;

/** The first of several wordings that has room in a box, lying or standing; none when none has. */
function labels(box: Box, { scale, x, y }: Frame, wordings: readonly (readonly string[])[]): Shape[] {
  const [wide, tall] = [box.across * scale, box.along * scale];
  const fits = (lines: readonly string[], length: number, depth: number) =>
    length >= Math.max(...lines.map(textWidth)) + 6 && depth >= lines.length * LINE + 3;
  for (const lines of wordings) {
    const turned = !fits(lines, wide, tall);
    if (turned && !fits(lines, tall, wide)) continue;
    const [middle, centre] = [x(box.x + box.across / 2), y(box.y + box.along / 2)];
    return lines.map((text, index): Shape => {
      const shift = (index - (lines.length - 1) / 2) * LINE + 4.5;
      return {
        type: 'text',
        role: index === 0 ? 'figure' : 'label',
        x: turned ? middle + shift : middle,
        y: turned ? centre : centre + shift,
        text,
        anchor: 'middle',
        ...(turned ? { turned } : {}),
      };
    });
  }
  return [];
}

/** Numbers in circles: outside the sheet where a cut begins at its edge, on the cut itself where it does not or none has room. */
function numbers({ cuts }: SheetLayout, frame: Frame): Shape[] {
  const taken: { readonly x: number; readonly y: number }[] = [];
  const free = (at: { readonly x: number; readonly y: number }) =>
    taken.every((other) => Math.hypot(other.x - at.x, other.y - at.y) > 2 * RADIUS + 1);
  return cuts.flatMap((cut): Shape[] => {
    const places = placesFor(cut, frame);
    const place = places.find(free) ?? (places[0] as (typeof taken)[number]);
    taken.push(place);
    const { x, y } = place;
    const round = `M${n(x - RADIUS)} ${n(y)}a${RADIUS} ${RADIUS} 0 1 1 ${2 * RADIUS} 0a${RADIUS} ${RADIUS} 0 1 1 ${-2 * RADIUS} 0Z`;
    return [
      { type: 'path', role: 'panel', d: round },
      { type: 'path', role: 'slit', d: round },
      { type: 'text', role: 'figure', x, y: y + 4.5, text: `${cut.n}`, anchor: 'middle', of: 'cut number' },
    ];
  });
}
/** Where the number of a cut may stand, the best place first. */
function placesFor({ from, to, runs }: Cut, { x, y }: Frame): readonly { readonly x: number; readonly y: number }[] {
  const on = (share: number) => ({
    x: x(from.x + (to.x - from.x) * share),
    y: y(from.y + (to.y - from.y) * share),
  });
  // Near an end rather than in the middle, where the names stand.
  const inner = [0.15, 0.85, 0.5].map(on);
  if (runs === 'along' && from.y === 0) return [{ x: x(from.x), y: BORDER - RADIUS - 3 }, ...inner];
  if (runs === 'across' && from.x === 0) return [{ x: BORDER - RADIUS - 3, y: y(from.y) }, ...inner];
  return inner;
}

/** What comes from the sheet and what is left of it, for those who hear the drawing; the cuts are told beside it. */
function altOf(plan: SheetPlan, sheet: number, size: (box: Box) => string): string {
  const { stock, parts, cuts, offcuts } = plan.sheets[sheet] as SheetLayout;
  const pieces = parts.map((part) => `${part.piece} ${size(part)}`).join(', ');
  const made = `${cuts.length} ${cuts.length === 1 ? 'cut' : 'cuts'}`;
  const left = offcuts.map((offcut) => `${offcut.name} ${size(offcut)}`).join(', ');
  return `Sheet ${sheet + 1} of ${plan.used}, ${stock.name}: ${pieces}; ${made}${left === '' ? '' : `; left over: ${left}`}.`;
}
