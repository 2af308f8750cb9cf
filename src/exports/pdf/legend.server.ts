import type { Shape } from '@/engine';
import type { LegendLine } from '../line-legend';
import { decoration, group, tagged, type Tag } from './document.server';
import { draw, UNIT, type Pen } from './drawing.server';
import { INK, SMALL } from './look';
import type { Type } from './typeset.server';

export const LEGEND_TYPE: Type = { ...SMALL, colour: INK };
/** A sample of a line and the space after it. */
export const SAMPLE = 25;

/** Samples of lines with their meaning beside them, as one list; `at` gives the top left corner of each in points. */
export function drawLegend(
  pen: Pen,
  parent: Tag,
  lines: readonly LegendLine[],
  at: (index: number) => { readonly x: number; readonly y: number },
): void {
  const { doc, type } = pen;
  const list = group(doc, parent, 'L');
  lines.forEach(({ words, d, role }, i) => {
    const { x, y } = at(i);
    const item = group(doc, list, 'LI');
    const shapes: readonly Shape[] =
      role === 'glue'
        ? [
            { type: 'path', role, d },
            { type: 'path', role: 'slit', d },
          ]
        : [{ type: 'path', role, d }];
    decoration(doc, () => draw(pen, { width: 34, height: 16, title: '', alt: '', shapes }, { x, y, scale: UNIT }));
    tagged(doc, item, 'LBody', () => type.draw(words, LEGEND_TYPE, { x: x + SAMPLE, baseline: y + 7.4 }));
  });
  list.end();
}
