import {
  cutsInWords,
  helpWithTooLarge,
  instructionsOf,
  joiningInWords,
  planSheets,
  say,
  show,
  showValue,
  type Figures,
  type Model,
  type PlanOptions,
  type SheetPlan,
} from '@/engine';
import { figuresAsCut } from '@/exports/as-cut';
import { materialRows } from '@/exports/material-rows';

/** The measurement sheet as plain text, for a terminal or a letter: sizes, cut list, making, fits, sheets, departure. */
export function measurementText(model: Model, figures: Figures, options: PlanOptions): string {
  const { sizing } = figures;
  const length = (mm: number) => show(mm, sizing).text;
  const bare = (mm: number) => show(mm, { ...sizing, bare: true }).text;
  const plan = planSheets(figures, options);
  const asked = figures.measures.filter((measure) => measure.asked && measure.inUse);
  const widest = Math.max(...figures.measures.map((measure) => measure.name.length));
  const lines = [
    model.pattern.name.toUpperCase(),
    model.pattern.summary,
    '',
    `Inside  ${figures.finished.inside.map(({ name, mm }) => `${bare(mm)} ${name}`).join(' × ')} ${sizing.units}`,
    `Outside ${figures.finished.outside.map(({ name, mm }) => `${bare(mm)} ${name}`).join(' × ')} ${sizing.units}`,
    '',
    'ASKED',
    ...asked.map(
      ({ name, kind, cut, unit }) =>
        `  ${name.padEnd(widest)}  ${showValue(cut, kind, { ...sizing, ...(unit ? { unit } : {}) }).text}`,
    ),
    ...Object.entries(sizing.choices).map(([name, option]) => `  ${name.padEnd(widest)}  ${option}`),
    '',
    'PIECES',
    ...figuresAsCut(figures, plan).pieces.flatMap((piece, index) => [
      `  ${index + 1} ${piece.name}, cut ${piece.count}: ${bare(piece.across)} × ${length(piece.along)}`,
      ...instructionsOf(piece).map((sentence) => `      ${say(sentence, sizing)}`),
    ]),
    '',
    'MATERIALS',
    ...materialRows(figures).map(({ name, amount }) => `  ${name}  ${amount}`),
    '',
    'FITS',
    ...figures.fits.map(
      (fit) =>
        `  ${fit.holds ? 'holds' : 'FAILS'}  ${fit.name}${fit.gap === null ? '' : ` (${gapText(fit.gap, fit.is, length)})`}${fit.holds ? '' : `: ${fit.otherwise}`}`,
    ),
    '',
    `SHEETS  ${takenWords(plan)}${plan.copies > 1 ? ` for ${plan.copies} boxes` : ''}`,
    ...plan.joined.map((joined) => `  ${say(joiningInWords(joined), sizing)}`),
    ...plan.sheets.flatMap(({ material }, index) => [
      `  Sheet ${index + 1}${plan.takes.length > 1 ? `, ${material}` : ''}`,
      ...cutsInWords(plan, index).map((sentence) => `    ${say(sentence, sizing)}`),
    ]),
    ...plan.tooLarge.map(
      (large) =>
        `  ${large.name}, ${bare(large.across)} × ${length(large.along)}, is larger than the sheet. ${say(helpWithTooLarge(large), sizing)}`,
    ),
    '',
    figures.departure.mm === 0
      ? 'Cutting to the grid changes nothing.'
      : `Furthest from exact: ${figures.departure.where}, ${Math.abs(figures.departure.mm).toFixed(2)} mm ${figures.departure.mm > 0 ? 'over' : 'under'}.`,
    ...figures.problems.map(
      (problem) =>
        `PROBLEM ${problem.sentence}${problem.nearest === null ? '' : ` Nearest that works: ${problem.measure} ${length(problem.nearest)}.`}`,
    ),
  ];
  return `${lines.join('\n')}\n`;
}
/** `3 of 12 × 12 in`; each material by its name where they come in different sheets. */
function takenWords({ used, stock, takes }: SheetPlan): string {
  if (takes.every((take) => take.stock.id === stock.id)) return `${used} of ${stock.name}`;
  return takes.map((take) => `${take.used} of ${take.material}, ${take.stock.name}`).join('; ');
}
function gapText(gap: number, is: string, length: (mm: number) => string): string {
  if (is === 'same as')
    return Math.abs(gap) < 0.01 ? 'exact' : `${Math.abs(gap).toFixed(2)} mm ${gap > 0 ? 'over' : 'under'}`;
  return gap < 0 ? `${length(-gap)} missing` : `${length(gap)} spare`;
}
