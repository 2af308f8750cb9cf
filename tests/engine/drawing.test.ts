import { describe, expect, it } from 'vitest';
import { drawFolded, drawPiece, drawSheet, evaluate, planSheets, type Drawing } from '@/engine';
import { drawingSvg, drawingSvgStandalone } from '@/exports/svg/drawing';
import { SLUGS, figuresOf, inch, modelOf, pieceOf, sizingsOf } from './patterns';

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly text: string;
}
/** Where text stands: digits of Figtree at 13 px are at most 7.6 wide (printing notes: 641 of 1000 units, plus bold). */
function textBoxes(drawing: Drawing): Box[] {
  return drawing.shapes.flatMap((shape) => {
    if (shape.type !== 'text' || shape.turned) return [];
    const width = [...shape.text].reduce((sum, mark) => sum + (mark === '\u202f' ? 2 : mark === '\u2044' ? 2 : 7), 0);
    const left = shape.anchor === 'middle' ? shape.x - width / 2 : shape.anchor === 'end' ? shape.x - width : shape.x;
    return [{ left, right: left + width, top: shape.y - 10, bottom: shape.y + 1, text: shape.text }];
  });
}
function overlapping(drawing: Drawing): string[] {
  const boxes = textBoxes(drawing);
  return boxes.flatMap((a, index) =>
    boxes
      .slice(index + 1)
      .flatMap((b) =>
        a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom
          ? [`${a.text} over ${b.text}`]
          : [],
      ),
  );
}

describe('drawPiece', () => {
  const floor = pieceOf(figuresOf(modelOf('book-box'), { circle: inch(4.5) }), 'Floor');
  it('dimensions from the left and the top edge, the way a scoring board is read', () => {
    const drawing = drawPiece(floor, { width: 560, units: 'in', grid: '1/16in' });
    const figures = drawing.shapes.flatMap((shape) =>
      shape.type === 'text' && shape.role === 'figure' ? [shape.text] : [],
    );
    expect(figures).toEqual(['1\u20442', '2\u202f3\u20444', '3\u202f1\u20444', '1\u20442', '6\u202f13\u204416']);
  });
  it('states size and scores in its text alternative', () => {
    expect(drawPiece(floor, { width: 560, units: 'in', grid: '1/16in' }).alt).toBe(
      'Floor, 3 1/4 × 6 13/16 in. Along the 3 1/4 in side score at 1/2 in from each end. Turn; along the 6 13/16 in side score at 1/2.',
    );
  });
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
  it('lays no figure over another on any piece, at 20 sizings a pattern and three widths', () => {
    const clashes: string[] = [];
    for (const slug of SLUGS)
      for (const sizing of sizingsOf(modelOf(slug), 20, 77))
        for (const piece of evaluate(modelOf(slug), sizing).pieces)
          for (const width of [300, 560, 900]) {
            clashes.push(
              ...overlapping(drawPiece(piece, { width, ...sizing })).map(
                (clash) => `${slug} ${piece.name} ${width}: ${clash}`,
              ),
            );
          }
    expect(clashes).toEqual([]);
  });
  it('stays inside its own frame', () => {
    for (const slug of SLUGS)
      for (const sizing of sizingsOf(modelOf(slug), 6, 5))
        for (const piece of evaluate(modelOf(slug), sizing).pieces) {
          const drawing = drawPiece(piece, { width: 320, ...sizing });
          for (const box of textBoxes(drawing))
            expect(
              box.left >= -1 && box.right <= drawing.width + 1 && box.top >= -1 && box.bottom <= drawing.height + 1,
              `${piece.name}: ${box.text}`,
            ).toBe(true);
        }
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
