import { describe, expect, it } from 'vitest';
import { drawPiece, type Role } from '@/engine';
import { LINE_LEGEND, SIGN_LEGEND } from '@/exports/line-legend';
import { paintOf, PRINT_THEME } from '@/exports/line-styles';
import { drawingSvgStandalone } from '@/exports/svg/drawing';
import { SLUGS, figuresOf, modelOf } from '../engine/patterns';

const pieces = SLUGS.flatMap((slug) => {
  const { pieces, sizing } = figuresOf(modelOf(slug));
  return pieces.map((piece) => drawPiece(piece, { width: 640, ...sizing }));
});
/** Dimension lines, figures and names explain themselves; a panel is the ground that lines stand on. */
const PLAIN: readonly Role[] = ['panel', 'dimension', 'extension', 'ruler', 'figure', 'label'];

describe('the legend', () => {
  it('has every kind of line that a drawing of a piece has', () => {
    const roles = new Set(pieces.flatMap(({ shapes }) => shapes.map(({ role }) => role)));
    const told = LINE_LEGEND.map(({ role }) => role);
    expect([...roles].filter((role) => !PLAIN.includes(role) && !told.includes(role))).toEqual([]);
  });
  it('has every sign that stands before a figure', () => {
    const figures = pieces.flatMap(({ shapes }) =>
      shapes.flatMap((shape) => (shape.type === 'text' && shape.role === 'figure' ? [shape.text] : [])),
    );
    const signs = new Set(figures.flatMap((text) => /(?:^|× )([RØ](?=\u202f)|fold)/.exec(text)?.[1] ?? []));
    for (const sign of signs)
      expect(
        SIGN_LEGEND.some((told) => told.sign.startsWith(sign)),
        sign,
      ).toBe(true);
    expect(signs).toEqual(new Set(['R', 'Ø', 'fold']));
  });
});

describe('a drawing in black on white', () => {
  it('tells its lines apart by dashes, width and ends alone', () => {
    const looks = (['cut', 'valley', 'mountain', 'slit', 'hidden', 'dimension'] as const).map((role) => {
      const { stroke, strokeWidth, dash, strokeOpacity = 1 } = paintOf(role, PRINT_THEME);
      expect(stroke).toBe('#000000');
      return `${dash?.join(' ') ?? 'solid'} ${strokeWidth} ${strokeOpacity}`;
    });
    expect(new Set(looks).size).toBe(looks.length);
  });
  it('hatches glue areas with lines, and leaves all paper white', () => {
    const tray = figuresOf(modelOf('tray')).pieces[0];
    if (!tray) throw new Error('a tray without a piece');
    const svg = drawingSvgStandalone(drawPiece(tray, { width: 300, units: 'in' }), PRINT_THEME);
    // Four corner tabs.
    expect(svg.match(/class="dr-glue"[^>]*fill="url\(#glue-hatch\)"/g)).toHaveLength(4);
    expect(svg).toContain('<pattern id="glue-hatch"');
    const fills = new Set([...svg.matchAll(/ fill="(#[0-9a-f]+)"/g)].map(([, colour]) => colour));
    expect(fills).toEqual(new Set(['#ffffff', '#000000']));
  });
});
