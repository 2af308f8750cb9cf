import { drawSheet, show, type Figures, type SheetPlan, type SizeFigure } from '@/engine';
import { esc } from '@/exports/escape';
import { drawingSvg } from '@/exports/svg/drawing';
import { amountsOf, showAmount } from './amounts';
import { NOT_WORKED_OUT } from './render-measure';

/** Blocks and amounts that follow the size and the sheets, as HTML: what stands inside them, on the server and in the page. */

/** An amount in the text. */
export const amountInside = (figures: Figures, plan: SheetPlan, of: string): string => {
  const amount = showAmount(figures, plan, of);
  return amount === null ? 'none' : esc(amount);
};

/** What the box takes, a row each. */
export function amountsInside(figures: Figures, plan: SheetPlan): string {
  const rows = amountsOf(figures, plan).flatMap(({ of, label }) => {
    const amount = of.startsWith('area ') ? null : showAmount(figures, plan, of);
    return amount === null ? [] : [`<div><dt>${esc(label)}</dt><dd>${esc(amount)}</dd></div>`];
  });
  const large = plan.tooLarge.map(({ name }) => name).join(', ');
  const trouble = large === '' ? '' : `<p class="small">Too large for ${esc(plan.stock.name)}: ${esc(large)}.</p>`;
  return `<p class="live-block-word">What it takes</p><dl>${rows.join('')}</dl>${trouble}`;
}

/** Sheets that are drawn in the text; the measurement sheet has them all. */
const SHEETS = 6;
const SHEET_WIDTH = 260;

export function sheetPlanInside(figures: Figures, plan: SheetPlan): string {
  const { units, grid } = figures.sizing;
  const sheets = plan.sheets.slice(0, SHEETS).map((_, index) => {
    const drawing = drawSheet(plan, index, { width: SHEET_WIDTH, units, grid });
    return `<figure>${drawingSvg(drawing)}<figcaption>Sheet ${index + 1}</figcaption></figure>`;
  });
  const more = plan.sheets.length - sheets.length;
  const rest = more > 0 ? `<p class="small soft">And ${more} more on the measurement sheet.</p>` : '';
  const large = plan.tooLarge.map(({ name }) => name).join(', ');
  const trouble = large === '' ? '' : `<p>Too large for ${esc(plan.stock.name)}: ${esc(large)}.</p>`;
  return `<p class="live-block-word">On the sheets</p>${trouble}<div class="sheet-plan-sheets">${sheets.join('')}</div>${rest}`;
}

export function sizesInside({ finished, sizing }: Figures): string {
  const row = (term: string, sizes: readonly SizeFigure[]) =>
    sizes.length === 0 ? '' : `<div><dt>${term}</dt><dd>${sizes.map(size).join(' × ')}</dd></div>`;
  const size = ({ name, mm }: SizeFigure) =>
    `<span class="measure">${esc(Number.isFinite(mm) ? show(mm, sizing).typeset : NOT_WORKED_OUT)}</span> ${esc(name)}`;
  return `<p class="live-block-word">Finished size</p><dl>${row('Inside', finished.inside)}${row('Outside', finished.outside)}</dl>`;
}
