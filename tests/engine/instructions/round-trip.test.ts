import { describe, expect, it } from 'vitest';
import {
  GRIDS,
  evaluate,
  instructionsOf,
  say,
  type Curve,
  type Figures,
  type Model,
  type PieceFigure,
  type Sizing,
} from '@/engine';
import { SLUGS, modelOf } from '../patterns';
import { ARC_STEP, along, areaOf, gap, inside, offLoop, offPath, type Card, type Dot, type Kind } from './card';
import { readMaking } from './read-making';

/** All asked sizes but the finer points at one end of their range, one after the other, as they bear on one another. */
function atEnd(model: Model, sizing: Sizing, end: 'from' | 'to'): Sizing {
  let answered = sizing;
  for (const { name, ask } of model.pattern.measures) {
    if (!ask || ask.finer) continue;
    const value = evaluate(model, answered).measures.find((one) => one.name === name)?.[end];
    if (value !== undefined) answered = { ...answered, values: { ...answered.values, [name]: value } };
  }
  return answered;
}
/** Usual, smallest and largest, and every choice by itself at the usual size; in inches and in millimetres. */
function* sizings(model: Model): Generator<[string, Sizing]> {
  for (const grid of ['1/16in', '1mm'] as const) {
    const usual: Sizing = { values: {}, choices: {}, units: GRIDS[grid].unit, grid };
    yield [`usual, ${grid}`, usual];
    yield [`smallest, ${grid}`, atEnd(model, usual, 'from')];
    yield [`largest, ${grid}`, atEnd(model, usual, 'to')];
    for (const { name, options, usual: first } of model.pattern.choices)
      for (const option of options)
        if (option !== first) yield [`${name} ${option}, ${grid}`, { ...usual, choices: { [name]: option } }];
  }
}

/** Lines are compared at points this far apart, and at their ends. */
const STEP = 3;
const pathOf = (curve: Curve): Dot[] => {
  if (curve.type === 'line') return [curve.from, curve.to];
  const { from, to, centre, clockwise } = curve;
  const start = Math.atan2(from.y - centre.y, from.x - centre.x);
  const turn = Math.atan2(to.y - centre.y, to.x - centre.x) - start;
  const round = (turn + (clockwise ? 4 : -4) * Math.PI) % (2 * Math.PI) || (clockwise ? 2 : -2) * Math.PI;
  const count = Math.max(2, Math.ceil(Math.abs(round) / ARC_STEP));
  return Array.from({ length: count + 1 }, (_, index) => ({
    x: centre.x + curve.radius * Math.cos(start + (round * index) / count),
    y: centre.y + curve.radius * Math.sin(start + (round * index) / count),
  }));
};
const loopOf = (loop: readonly Curve[]): Dot[] => loop.flatMap((curve) => pathOf(curve).slice(0, -1));
/** Corners that turn; where a line only goes on there is nothing to find. */
const turning = (stops: readonly (Dot & { corner?: boolean })[]): Dot[] =>
  stops.filter((stop, index) => {
    if (stop.corner === false) return false;
    const [a, b] = [stops[(index + stops.length - 1) % stops.length] as Dot, stops[(index + 1) % stops.length] as Dot];
    return offPath(stop, [a, b]) > 0.02;
  });
const furthest = (points: readonly Dot[], off: (point: Dot) => number): number =>
  points.reduce((most, point) => Math.max(most, off(point)), 0);
const nearest = (points: readonly Dot[]) => (point: Dot) => Math.min(...points.map((other) => gap(point, other)));

/** What differs between a piece and what was drawn from its words, in millimetres, by what it is. */
function differences({ net }: PieceFigure, card: Card, round: boolean): Record<string, number> {
  const outline = loopOf(net.outline);
  const corners = net.outline.map(({ from }) => from);
  const strokes = [
    ...net.folds.map(({ curve, kind, angle }) => ({
      kind: (angle === 0 ? 'pencil' : kind) as Kind,
      path: pathOf(curve),
    })),
    ...net.creases.map(({ curve, kind }) => ({ kind: kind as Kind, path: pathOf(curve) })),
    ...net.slits.map((curve) => ({ kind: 'slit' as Kind, path: pathOf(curve) })),
  ];
  const kinds: readonly Kind[] = ['valley', 'mountain', 'slit', 'pencil'];
  const missing = (
    from: readonly { kind: Kind; path: readonly Dot[] }[],
    to: typeof from,
    counts: (point: Dot) => boolean,
  ) =>
    Object.fromEntries(
      kinds.map((kind) => {
        const others = to.filter((one) => one.kind === kind);
        const points = from
          .filter((one) => one.kind === kind)
          .flatMap(({ path }) => along(path, STEP))
          .filter(counts);
        return [kind, furthest(points, (point) => Math.min(...others.map(({ path }) => offPath(point, path)), 999))];
      }),
    );
  const slits = strokes.filter(({ kind }) => kind === 'slit');
  // A score is drawn from edge to edge of the blank: only where it lies on card, off its edges, does it count.
  const onCard = (point: Dot) =>
    inside(point, card.outline) &&
    offLoop(point, card.outline) > 1 &&
    slits.every(({ path }) => offPath(point, path) > 1);
  const lost = missing(strokes, card.strokes, () => true);
  const extra = missing(card.strokes, strokes, onCard);
  const holes = net.holes.map((hole) => loopOf(hole));
  return {
    across: Math.abs(card.across - net.across),
    along: Math.abs(card.along - net.along),
    outline: Math.max(
      furthest(along([...outline, outline[0] as Dot], STEP), (point) => offLoop(point, card.outline)),
      furthest(along([...card.outline, card.outline[0] as Dot], STEP), (point) => offLoop(point, outline)),
    ),
    // Circles have no corners; teeth of a disc may begin anywhere.
    corners: round
      ? 0
      : Math.max(furthest(turning(corners), nearest(card.outline)), furthest(turning(card.outline), nearest(corners))),
    area: Math.abs(Math.abs(areaOf(card.outline)) - areaOf(outline)) / (net.across + net.along),
    ...Object.fromEntries(kinds.map((kind) => [`${kind} left out`, lost[kind] ?? 0])),
    ...Object.fromEntries(kinds.map((kind) => [`${kind} too many`, extra[kind] ?? 0])),
    holes:
      holes.length === card.holes.length
        ? Math.max(
            0,
            ...holes.map((hole) =>
              Math.min(
                ...card.holes.map((other) =>
                  Math.max(
                    furthest(hole, (point) => offLoop(point, other)),
                    furthest(other, (point) => offLoop(point, hole)),
                  ),
                ),
              ),
            ),
          )
        : 999,
  };
}

/**
 * What is wrong with a piece drawn from its words; null when it is right. Inches are said to a sixty-fourth, millimetres to
 * a tenth, and a place may be the sum of two figures: 2 × 1/128 in and 2 × 0.05 mm each way. Angles are said to a tenth.
 */
function faultOf(
  piece: PieceFigure,
  { sizing }: Figures,
  model: Model,
  sentences = instructionsOf(piece),
): string | null {
  const def = model.pattern.pieces.find(({ name }) => name === piece.name);
  const tolerance = def?.builder === 'fan' ? 0.3 : sizing.units === 'in' ? 0.4 : 0.15;
  try {
    const card = readMaking(
      sentences.map((sentence) => say(sentence, sizing)),
      piece.thickness,
      def?.remarks ?? [],
    );
    const off = Object.entries(
      differences(
        piece,
        card,
        piece.net.outline.every(({ type }) => type === 'arc'),
      ),
    ).filter(([, mm]) => !(mm <= tolerance));
    return off.length === 0 ? null : off.map(([what, mm]) => `${what} ${mm.toFixed(2)}`).join(', ');
  } catch (error) {
    return String(error);
  }
}

describe.each(SLUGS)('the words of %s', (slug) => {
  const model = modelOf(slug);
  it('are enough to draw every piece again', { timeout: 60_000 }, () => {
    const wrong: string[] = [];
    for (const [title, sizing] of sizings(model)) {
      const figures = evaluate(model, sizing);
      for (const piece of figures.pieces) {
        const fault = faultOf(piece, figures, model);
        if (fault !== null) wrong.push(`${title}: ${piece.name}: ${fault}`);
      }
    }
    expect(wrong).toEqual([]);
  });
  it(
    'leave nothing out that would not be missed, and say no figure that could as well be another',
    { timeout: 60_000 },
    () => {
      const figures = evaluate(model, { values: {}, choices: {}, units: 'mm', grid: '1mm' });
      const unnoticed: string[] = [];
      for (const piece of figures.pieces) {
        const remarks = model.pattern.pieces.find(({ name }) => name === piece.name)?.remarks ?? [];
        for (const [index, sentence] of instructionsOf(piece).entries()) {
          const told = say(sentence, figures.sizing);
          if (remarks.includes(told) || WITHOUT_GEOMETRY.test(told)) continue;
          const others = instructionsOf(piece).filter((_, other) => other !== index);
          if (faultOf(piece, figures, model, others) === null) unnoticed.push(`${piece.name} without: ${told}`);
          for (const [place, part] of sentence.entries()) {
            if (typeof part === 'string' || RUNS_OUT.has(slug)) continue;
            // Longer or shorter: a score may run out over waste, but not stop short.
            const noticed = [6, -6].some((by) => {
              const changed = sentence.with(place, { ...part, mm: part.mm + by });
              return faultOf(piece, figures, model, instructionsOf(piece).with(index, changed)) !== null;
            });
            if (!noticed) unnoticed.push(`${piece.name}, part ${place} of: ${told}`);
          }
        }
      }
      expect(unnoticed).toEqual([]);
    },
  );
});
/** Folding, rolling and what a sign means are no part of the flat outline. */
const WITHOUT_GEOMETRY = /^(Fold (every|the mountain)|Each \+ is|Cut it out\. Roll)/;
/** Pieces whose scores may run out over waste or along a cut: there a longer one makes no difference. */
const RUNS_OUT: ReadonlySet<string> = new Set(['gable-carton', 'gusset-bag', 'tuck-carton', 'wedge-box']);
