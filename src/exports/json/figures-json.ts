import {
  cutsInWords,
  helpWithTooLarge,
  instructionsOf,
  joiningInWords,
  planSheets,
  say,
  showValue,
  type Figures,
  type Model,
  type PlanOptions,
  type Sizing,
  type Stock,
} from '@/engine';

/** How it is planned on sheets; the sheets are said, the rest may be as usual. */
export interface FiguresJsonOptions extends PlanOptions {
  readonly stock: Stock;
}

/** What the command line prints and `figures.json` answers: lengths in millimetres, angles in degrees, areas in mm². */
export function figuresJson(model: Model, figures: Figures, options: FiguresJsonOptions) {
  const { sizing } = figures;
  const plan = planSheets(figures, options);
  return {
    pattern: model.pattern.slug,
    sizing: sizingOf(figures, sizing),
    measures: figures.measures.map(({ name, kind, exact, cut, unit }) => ({
      name,
      kind,
      exact: known(exact),
      cut: known(cut),
      shown: showValue(cut, kind, { units: sizing.units, grid: sizing.grid, ...(unit ? { unit } : {}) }).text,
    })),
    pieces: figures.pieces.map((piece) => ({
      name: piece.name,
      count: piece.count,
      stock: piece.stock,
      across: piece.across,
      along: piece.along,
      scores: piece.scores,
      area: piece.area,
      perimeter: piece.perimeter,
      instructions: instructionsOf(piece).map((sentence) => say(sentence, sizing)),
    })),
    fits: figures.fits.map(({ name, holds, gap, advice }) => ({ name, holds, gap, ...(advice ? { advice } : {}) })),
    sheets: {
      stock: options.stock.id,
      count: plan.copies,
      ...(options.margin ? { margin: options.margin } : {}),
      used: plan.used,
      plan: plan.sheets.map((sheet, index) => ({
        material: sheet.material,
        stock: sheet.stock.id,
        parts: sheet.parts,
        offcuts: sheet.offcuts,
        cuts: cutsInWords(plan, index).map((sentence) => say(sentence, sizing)),
      })),
      ...(plan.joined.length > 0
        ? {
            joined: plan.joined.map((joined) => ({
              name: joined.name,
              tab: joined.tab,
              parts: joined.parts.map(({ name, across, along, scores }) => ({ name, across, along, scores })),
              hint: say(joiningInWords(joined), sizing),
            })),
          }
        : {}),
      ...(plan.tooLarge.length > 0
        ? {
            tooLarge: plan.tooLarge.map((large) => ({
              name: large.name,
              across: large.across,
              along: large.along,
              hint: say(helpWithTooLarge(large), sizing),
            })),
          }
        : {}),
    },
    materials: {
      ...figures.materials,
      extras: figures.materials.extras.map(({ name, kind, value }) => ({ name, kind, value: known(value) })),
    },
    departure: figures.departure,
    problems: figures.problems.map(({ code, measure, sentence, nearest }) => ({ code, measure, sentence, nearest })),
  };
}
/** JSON has no NaN: a measure without a value at this size is null. */
const known = (value: number): number | null => (Number.isFinite(value) ? value : null);
const sizingOf = (figures: Figures, sizing: Sizing) => ({
  values: Object.fromEntries(
    figures.measures
      .filter((measure) => measure.asked && measure.inUse)
      .map((measure) => [measure.name, known(measure.exact)]),
  ),
  choices: sizing.choices,
  units: sizing.units,
  grid: sizing.grid,
});
