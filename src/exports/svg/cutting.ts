import type { Curve } from '@/engine';
import type { CuttingLayout, CuttingLine } from '../cutting/layout';
import { inParts, written } from '../cutting/numbers';
import { WORKS, type Work } from '../cutting/works';
import { escXml } from '../escape';

const QUARTER = Math.PI / 2;
/** Shown thin; machines look at the line alone. */
const STROKE = 0.1;

/**
 * A layout as SVG for cutting machines: one unit is one millimetre, by size and by viewBox. Groups `cut`, `score` (with `valley` and
 * `mountain` in it) and `draw`, each line a path of its own with absolute coordinates; no transforms, styles, text or clipping.
 */
export function cuttingSvg({ across, along, lines }: CuttingLayout, { title }: { readonly title: string }): string {
  const [width, height] = [written(across), written(along)];
  const rows = [
    '<?xml version="1.0" encoding="utf-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}mm" height="${height}mm" viewBox="0 0 ${width} ${height}">`,
    `<title>${escXml(title)}</title>`,
    `<desc>Outer size ${hundredths(width)} × ${hundredths(height)} mm. One unit of this file is 1 mm.</desc>`,
    ...group('draw', paths(lines, 'glue'), WORKS.glue.colour),
    ...group('score', [
      ...group('valley', paths(lines, 'valley'), WORKS.valley.colour),
      ...group('mountain', paths(lines, 'mountain'), WORKS.mountain.colour),
    ]),
    ...group('cut', paths(lines, 'cut'), WORKS.cut.colour),
    '</svg>',
  ];
  return `${rows.join('\n')}\n`;
}

const hundredths = (mm: number): number => Math.round(mm * 100) / 100;

/** Nothing where there is nothing to do. */
function group(id: string, rows: readonly string[], colour?: string): readonly string[] {
  if (rows.length === 0) return [];
  const paint = colour === undefined ? '' : ` fill="none" stroke="${colour}" stroke-width="${STROKE}"`;
  return [`<g id="${id}"${paint}>`, ...rows, '</g>'];
}

const paths = (lines: readonly CuttingLine[], work: Work): readonly string[] =>
  lines.filter((line) => line.work === work).map((line) => `<path d="${pathData(line)}"/>`);

function pathData({ curves, closed }: CuttingLine): string {
  const parts = curves.flatMap((curve) => inParts(curve, QUARTER));
  const [first] = parts;
  if (!first) return '';
  // The last straight side of a closed line is what Z draws.
  const drawn = closed && parts.at(-1)?.type === 'line' ? parts.slice(0, -1) : parts;
  const ends = drawn.map((curve, k) => step(curve, closed && k === parts.length - 1 ? first.from : curve.to));
  return `M${point(first.from)}${ends.join('')}${closed ? 'Z' : ''}`;
}

function step(curve: Curve, to: Curve['to']): string {
  if (curve.type === 'line') return `L${point(to)}`;
  const radius = written(curve.radius);
  return `A${radius} ${radius} 0 0 ${curve.clockwise ? 1 : 0} ${point(to)}`;
}

const point = ({ x, y }: Curve['to']): string => `${written(x)} ${written(y)}`;
