import { describe, expect, it } from 'vitest';
import { compileLive, drawFolded, drawPiece, evaluate, openModel, orderOf, sealFormula, sealModel } from '@/engine';
import { SLUGS, modelOf, sizingsOf } from './patterns';

/** As a page carries it: text and back. */
const carried = (model: ReturnType<typeof modelOf>, texts: readonly string[] = []) =>
  openModel(JSON.parse(JSON.stringify(sealModel(model, texts))) as ReturnType<typeof sealModel>);

describe.each(SLUGS)('%s, sealed and opened', (slug) => {
  const model = modelOf(slug);
  const opened = carried(model);

  it('works the same figures, words and drawings out', () => {
    for (const sizing of sizingsOf(model, 2, 11)) {
      const [was, is] = [evaluate(model, sizing), evaluate(opened, sizing)];
      expect(JSON.parse(JSON.stringify(is))).toEqual(JSON.parse(JSON.stringify(was)));
      expect(orderOf(opened, is)).toEqual(orderOf(model, was));
      const drawn = { width: 560, units: sizing.units, grid: sizing.grid };
      expect(is.pieces.map((piece) => drawPiece(piece, drawn))).toEqual(
        was.pieces.map((piece) => drawPiece(piece, drawn)),
      );
      const small = { width: 300, height: 300 };
      expect(drawFolded(opened, is, small)).toEqual(drawFolded(model, was, small));
    }
  });
  it('says why a size cannot be made in the same words', () => {
    const [asked] = model.measures.filter(({ def }) => def.ask && (def.kind ?? 'length') === 'length');
    const sizing = { values: { [asked?.key ?? '']: 1e5 }, choices: {}, units: 'in', grid: '1/16in' } as const;
    expect(evaluate(model, sizing).problems).not.toEqual([]);
    expect(evaluate(opened, sizing).problems).toEqual(evaluate(model, sizing).problems);
  });
});

describe('formulas of the text', () => {
  const model = modelOf('book-box');
  const text =
    'if spine is not curved then inside depth / 2 else max(−tab, arc length(inside depth, circle / 2) + 5 3/8 in)';
  const figures = (of: typeof model) => evaluate(of, { values: {}, choices: {}, units: 'in', grid: '1/16in' });

  it('are read when they came with the model, and the names of measures always', () => {
    const opened = carried(model, [text]);
    for (const formula of [text, 'Inside Width', 'lower spine.across']) {
      const [was, is] = [compileLive(model, formula), compileLive(opened, formula)];
      if (!was.ok || !is.ok) throw new Error(`${formula} does not read`);
      expect(is.value.value(figures(opened))).toEqual(was.value.value(figures(model)));
      expect([...is.value.uses].sort()).toEqual([...was.value.uses].sort());
    }
  });
  it('are refused when they did not', () => {
    const live = compileLive(carried(model), 'inside width + 1 in');
    expect(live.ok ? null : live.faults[0]).toMatchObject({ code: 'not sealed', found: '“inside width + 1 in”' });
  });
  it('are looked up by what was sealed and by nothing that every object has', () => {
    expect(compileLive(carried(model), 'constructor').ok).toBe(false);
  });
  it('are not sealed when they do not read', () => {
    expect(sealFormula(model, 'inside width +')).toBeNull();
  });
});
