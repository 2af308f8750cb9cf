import { GRIDS, show, type Figures, type Model, type Sizing } from '@/engine';
import { esc } from '@/exports/escape';
import { insideWords } from './facts';
import type { Panel } from './panel';
import type { Typed } from './reader-store';
import { writeSizing } from './sizing-link';
import type { Cure, Verdict } from './verdict';

/** The parts of a reader's page that follow the sizing alone, as HTML for the server and the browser alike. */

/** What links on the page are made of. */
export interface Links {
  readonly model: Model;
  readonly authors: Sizing;
  /** `/projects/seed-keepers-book-box` */
  readonly path: string;
  /** Parameters that stay as they are, such as the card: `card=a4`. */
  readonly keep?: string;
}

/** Address of the page, or of one below it, at a sizing. */
export function sizingHref({ model, authors, path, keep = '' }: Links, sizing: Sizing, below = ''): string {
  const query = [writeSizing(model, sizing, authors).replace(/^\?/, ''), keep].filter((part) => part !== '').join('&');
  return `${path}${below}${query === '' ? '' : `?${query}`}`;
}

/** Beside whatever does not hold. */
export const WARNING =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M12 3.5 22 20.5H2ZM12 10v5M12 17.6v.4"/></svg>';

/** `It closes` or what it does instead, over the list of fits. */
export const closesWords = (figures: Figures): string =>
  figures.fits.some((fit) => !fit.holds && !fit.advice) || figures.problems.length > 0
    ? 'It does not close'
    : 'It closes';

/** What is wrong at one field, with what would mend it; empty when nothing is. */
export function fieldTroubleHtml(measure: string, verdict: Verdict, typed: Typed, links: Links): string {
  const unread = typed[measure];
  if (unread) return trouble(unread.sentence, [], links);
  return verdict.refusals
    .filter(({ problem }) => problem.measure === measure)
    .map(({ problem, cures }) => trouble(problem.sentence, cures, links))
    .join('');
}

/** Troubles that no field in use can carry. */
export function otherTroubleHtml(verdict: Verdict, links: Links): string {
  const carried = new Set(verdict.figures.measures.filter((m) => m.asked && m.inUse).map(({ name }) => name));
  const others = verdict.refusals.filter(({ problem }) => !carried.has(problem.measure));
  return others.map(({ problem, cures }) => trouble(problem.sentence, cures, links)).join('');
}

function trouble(sentence: string, cures: readonly Cure[], links: Links): string {
  const offers = cures.map((cure) => cureHtml(cure, links));
  return `<p class="trouble">${WARNING}<span>${esc(sentence)}</span></p>${offers.length === 0 ? '' : `<p class="cures">${offers.join('')}</p>`}`;
}

const cureHtml = ({ label, sizing }: Cure, links: Links): string =>
  `<a class="btn" data-sizing href="${esc(sizingHref(links, sizing))}">${esc(label)}</a>`;

/** Over the article while it shows figures of another size than the one asked for; empty otherwise. */
export function lastGoodHtml({ good, shown, instead, refusals }: Verdict, typed: Typed, links: Links): string {
  const unread = Object.entries(typed).map(([measure, { sentence }]) => `<li>${esc(measure)}: ${esc(sentence)}</li>`);
  if (good && unread.length === 0) return '';
  const reasons = refusals.map(({ problem }) => `<li>${esc(problem.sentence)}</li>`);
  const cures = refusals.flatMap((refusal) => refusal.cures.slice(0, 1)).map((cure) => cureHtml(cure, links));
  return (
    `<p><b>These figures are not for the size you asked for.</b> They are for ${esc(insideWords(shown))} inside, ${instead === 'nearest' ? 'the nearest size' : 'a size'} that works.</p>` +
    `<ul>${[...unread, ...reasons].join('')}</ul>` +
    (cures.length === 0 ? '' : `<p class="cures">${cures.join('')}</p>`)
  );
}

/** The offer to move the size onto the ruler's whole steps; empty when it stands there already. */
export function wholeStepsHtml(figures: Figures, whole: Figures | null, links: Links): string {
  if (!whole) return '';
  const { units } = figures.sizing;
  const steps = units === 'in' ? 'sixteenths' : 'whole millimetres';
  const other = units === 'in' ? '' : `The box has not changed: only the ruler has. `;
  return `${other}<a data-sizing href="${esc(sizingHref(links, whole.sizing))}">Use ${steps}, ${esc(insideWords(whole))}</a>`;
}

/** The cut grids of the reader's units, as buttons of the form. */
export function gridsHtml({ grids, grid }: Pick<Panel, 'grids' | 'grid'>): string {
  return grids
    .map((id) => {
      const { step, unit } = GRIDS[id];
      const words = show(step, { units: unit, grid: id, bare: unit === 'in' }).typeset;
      return `<button name="cut" value="${id}" aria-pressed="${id === grid}">${esc(words)}</button>`;
    })
    .join('');
}
