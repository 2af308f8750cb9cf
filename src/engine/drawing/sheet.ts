import { show, type ShowOptions } from '../measure';
import type { SheetPlan } from '../sheet';
import type { Drawing, Shape } from '../types';
import { textWidth } from './dimensions';
import { n, segment } from './path';

/** One planned sheet: pieces with their names, numbered cuts, lettered offcuts dotted. */
export function drawSheet(
  plan: SheetPlan,
  sheet: number,
  options: Pick<ShowOptions, 'units' | 'grid'> & { readonly width: number },
): Drawing {
  const layout = plan.sheets[sheet];
  const pad = 24;
  const scale = (options.width - 2 * pad) / plan.stock.across;
  const height = plan.stock.along * scale + 2 * pad;
  const says = (mm: number) => show(mm, { ...options, bare: true }).typeset;
  const box = (x: number, y: number, w: number, h: number) =>
    `M${n(pad + x * scale)} ${n(pad + y * scale)}h${n(w * scale)}v${n(h * scale)}h${n(-w * scale)}Z`;
  const label = (x: number, y: number, w: number, h: number, lines: readonly string[]): Shape[] => {
    const [wide, tall] = [w * scale, h * scale];
    const widest = Math.max(...lines.map(textWidth)) + 6;
    const turned = wide < widest && tall >= widest;
    const kept = (turned ? wide : tall) >= lines.length * 15 + 4 ? lines : lines.slice(0, 1);
    if ((turned ? tall : wide) < Math.max(...kept.map(textWidth)) + 4 || (turned ? wide : tall) < 16) return [];
    const [cx, cy] = [pad + (x + w / 2) * scale, pad + (y + h / 2) * scale];
    return kept.map((text, index) => {
      const shift = (index - (kept.length - 1) / 2) * 15 + 4.5;
      return {
        type: 'text',
        role: index === 0 ? 'figure' : 'label',
        x: turned ? cx + shift : cx,
        y: turned ? cy : cy + shift,
        text,
        anchor: 'middle',
        ...(turned ? { turned } : {}),
      };
    });
  };
  const shapes: Shape[] = layout
    ? [
        { type: 'path', role: 'panel', d: box(0, 0, plan.stock.across, plan.stock.along) },
        ...layout.offcuts.flatMap((cut): Shape[] => [
          {
            type: 'path',
            role: 'hidden',
            d: box(cut.x + 2 / scale, cut.y + 2 / scale, cut.across - 4 / scale, cut.along - 4 / scale),
          },
          ...label(cut.x, cut.y, cut.across, cut.along, [cut.name, `${says(cut.across)} × ${says(cut.along)}`]),
        ]),
        { type: 'path', role: 'cut', d: box(0, 0, plan.stock.across, plan.stock.along) },
        ...layout.parts.flatMap((part) =>
          label(part.x, part.y, part.across, part.along, [part.piece, `${says(part.across)} × ${says(part.along)}`]),
        ),
        ...layout.cuts.flatMap((cut): Shape[] => {
          const [x1, y1, x2, y2] = [
            pad + cut.from.x * scale,
            pad + cut.from.y * scale,
            pad + cut.to.x * scale,
            pad + cut.to.y * scale,
          ];
          const [tx, ty] = cut.runs === 'along' ? [x1, y1 - 5] : [x1 - 5, y1 + 4.5];
          return [
            { type: 'path', role: 'cut', d: segment(x1, y1, x2, y2) },
            {
              type: 'text',
              role: 'figure',
              x: tx,
              y: ty,
              text: `${cut.n}`,
              anchor: cut.runs === 'along' ? 'middle' : 'end',
              of: 'cut number',
            },
          ];
        }),
      ]
    : [];
  const alt = layout
    ? `Sheet ${sheet + 1} of ${plan.used}, ${plan.stock.name}: ${layout.parts.map((part) => part.piece).join(', ')}.`
    : '';
  return { width: options.width, height, title: `Sheet ${sheet + 1}`, alt, shapes };
}
