import { describe, expect, it } from 'vitest';
import { drawFolded, drawPiece, drawSheet, planSheets } from '@/engine';
import { drawingSvg, drawingSvgStandalone } from '@/exports/svg/drawing';
import { SLUGS, figuresOf, inch, modelOf, pieceOf } from './patterns';

describe('drawPiece', () => {
  const floor = pieceOf(figuresOf(modelOf('book-box'), { circle: inch(4.5) }), 'Floor');
  it('keeps arcs as arcs and hatches glue areas', () => {
    const svg = drawingSvg(drawPiece(floor, { width: 560, units: 'in', grid: '1/16in' }));
    expect(svg).toMatch(/class="dr-cut" d="[^"]*A/);
    expect(svg.match(/dr-glue/g)).toHaveLength(3);
  });
  it('escapes what names may hold', () => {
    const svg = drawingSvg({
      width: 1,
      height: 1,
      title: '',
      alt: '"><script>',
      shapes: [{ type: 'text', role: 'label', x: 0, y: 0, text: '<b>', anchor: 'start' }],
    });
    expect(svg).not.toMatch(/<script|<b>/);
  });
});

describe('drawFolded', () => {
  it('draws every pattern inside its frame, faces with tones', () => {
    for (const slug of SLUGS) {
      const drawing = drawFolded(modelOf(slug), figuresOf(modelOf(slug)), { width: 300, height: 240 });
      const faces = drawing.shapes.filter((shape) => shape.role === 'face');
      expect(faces.length).toBeGreaterThan(4);
      for (const shape of drawing.shapes) {
        if (shape.type !== 'path') continue;
        const numbers = (shape.d.match(/-?\d+(\.\d+)?/g) ?? []).map(Number);
        expect(
          numbers.every((value) => value >= -1 && value <= 301),
          `${slug}: ${shape.d}`,
        ).toBe(true);
      }
      expect(drawingSvgStandalone(drawing)).toContain('fill="#');
    }
  });
});

describe('drawSheet', () => {
  it('names pieces and numbers cuts', () => {
    const plan = planSheets(figuresOf(modelOf('lidded-box')), { stock: '12x12in' });
    const texts = drawSheet(plan, 0, { width: 300, units: 'in', grid: '1/16in' }).shapes.flatMap((shape) =>
      shape.type === 'text' ? [shape.text] : [],
    );
    expect(texts).toContain('1');
    expect(texts.some((text) => ['Base', 'Lid'].includes(text))).toBe(true);
  });
});
