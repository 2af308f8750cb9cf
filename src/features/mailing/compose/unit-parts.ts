import { defaultGrid, show, type Figures, type SizeFigure, type Sizing, type Unit } from '@/engine';
import { esc } from '@/exports/escape';

export const MAIL_UNITS = ['in', 'mm', 'cm'] as const satisfies readonly Unit[];

/** What depends on a subscriber's units, ready for the HTML and for the plain text. */
export interface UnitPart {
  readonly insideHtml: string;
  readonly insideText: string;
  readonly outsideHtml: string;
  readonly outsideText: string;
  readonly projectUrl: string;
}

/** The author's size as someone sees it who reads in `units`: the author's own cut grid when the units are the author's. */
export const sizingIn = (sizing: Sizing, units: Unit): Sizing =>
  units === sizing.units ? sizing : { ...sizing, units, grid: defaultGrid(units) };

/** Works out the parts for one set of units. `figures` are those of `sizingIn(sizing, units)`. */
export function unitPart(figures: Figures, projectUrl: string): UnitPart {
  const { units, grid } = figures.sizing;
  const { inside, outside } = figures.finished;
  return {
    insideHtml: sizesHtml(inside, { units, grid }, MEASURE),
    insideText: sizesText(inside, { units, grid }),
    outsideHtml: sizesHtml(outside, { units, grid }, MEASURE_PLAIN),
    outsideText: sizesText(outside, { units, grid }),
    projectUrl: `${projectUrl}?units=${units}`,
  };
}

type Shown = Pick<Sizing, 'units' | 'grid'>;

/** A measure in a mail stands on a thick line: the tapered tab of our pages is not to be had there. */
const MEASURE =
  'font-weight:600;border-bottom:4px solid #6d2e5b;white-space:nowrap;font-variant-numeric:diagonal-fractions;color:#231c2b';
const MEASURE_PLAIN = 'font-weight:600;white-space:nowrap;font-variant-numeric:diagonal-fractions;color:#231c2b';

const each = (sizes: readonly SizeFigure[], shown: Shown) =>
  sizes.map(({ mm }, i) => show(mm, { ...shown, bare: i < sizes.length - 1 }));

/** Set with a plain slash and a space: where a mail's font has no fractions of its own, "9 1/4" must not become "91/4". */
const sizesHtml = (sizes: readonly SizeFigure[], shown: Shown, style: string): string =>
  each(sizes, shown)
    .map(({ text }) => `<b style="${style}">${esc(text.replaceAll(' ', '\u00a0'))}</b>`)
    .join(' × ');

/** `9 × 6 × 2 1/4 in`, with a plain slash. */
const sizesText = (sizes: readonly SizeFigure[], shown: Shown): string =>
  each(sizes, shown)
    .map(({ text }) => text)
    .join(' × ');
