import {
  GRIDS,
  helpWithTooLarge,
  joiningInWords,
  say,
  show,
  type Figures,
  type Model,
  type SheetPlan,
  type Sizing,
} from '@/engine';
import { esc } from '@/exports/escape';
import { besides } from '@/exports/material-rows';
import { CUT_FIELD } from '@/features/sheets/cut-from';
import { cutWords, gapWords, insideWords, pieceCount, piecesWords, sheetsWords, timeWords } from './facts';
import type { Panel } from './panel';
import type { Typed } from './reader-store';
import { slugOf, writeSizing } from './sizing-link';
import type { Cure, Verdict } from './verdict';

/** The parts of a reader's page that follow the sizing besides the article, as HTML for the server and the browser alike. */

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

const CHECK =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M4.5 12.5 10 18 19.5 7"/></svg>';
const WARNING =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M12 3.5 22 20.5H2ZM12 10v5M12 17.6v.4"/></svg>';

/** Finished size, card, pieces, cut grid and time. */
export function factsHtml(figures: Figures, plan: SheetPlan, minutes: number | null): string {
  const { units, grid } = figures.sizing;
  const outside = figures.finished.outside
    .map(
      ({ mm, name }) =>
        `<span class="measure" title="${esc(name)}">${esc(show(mm, { units, grid, bare: true }).typeset)}</span>`,
    )
    .join(' × ');
  const cut = cutWords(figures);
  const rows: [string, string][] = [
    ['Finished, outside', `${outside} ${units}`],
    ['Card', esc(sheetsWords(plan))],
    ['Pieces', esc(piecesWords(pieceCount(figures)))],
    ...besides(figures).map(({ name, amount }): [string, string] => [esc(capital(name)), esc(amount)]),
    ['Cut to', `${esc(cut.to)}; ${esc(cut.off)}`],
  ];
  const time = timeWords(minutes);
  if (time !== '') rows.push(['Time', esc(time)]);
  return rows.map(([term, words]) => `<div><dt>${term}</dt><dd>${words}</dd></div>`).join('');
}

/** Address of the page at a sizing with a piece made of two parts should it be too large, or of one again. */
export function joinHref(
  links: Links,
  sizing: Sizing,
  { piece, joined, below = '' }: { readonly piece: string; readonly joined: boolean; readonly below?: string },
): string {
  const keep = new URLSearchParams(links.keep);
  const others = keep.getAll(CUT_FIELD.join).filter((one) => one !== slugOf(piece));
  keep.delete(CUT_FIELD.join);
  for (const one of joined ? [...others, slugOf(piece)] : others) keep.append(CUT_FIELD.join, one);
  return sizingHref({ ...links, keep: keep.toString() }, sizing, below);
}

/** The one click that makes a piece of two parts, or of one again. */
export function joinHtml(...[links, sizing, to]: Parameters<typeof joinHref>): string {
  const words = to.joined ? 'Make it of two parts' : 'Make it of one again';
  return `<a class="btn small-btn no-print" data-join="${esc(slugOf(to.piece))}" href="${esc(joinHref(links, sizing, to))}">${words}<span class="visually-hidden">: ${esc(to.piece)}</span></a>`;
}

/** Every fit with the room it leaves, then whether the pieces fit the sheet. */
export function fitsHtml(figures: Figures, plan: SheetPlan, links: Links): string {
  const fits = figures.fits.map((fit) => {
    const state = fit.holds ? 'holds' : fit.advice ? 'advice' : 'fails';
    const words = fit.holds ? '' : `<span class="fit-why">${esc(fit.otherwise)}</span>`;
    return item(state, fit.name, gapWords(fit, figures.sizing), words);
  });
  const whole = plan.tooLarge.length === 0;
  const sheets = `${plan.used} ${plan.used === 1 ? 'sheet' : 'sheets'}`;
  return [
    ...fits,
    ...(whole ? [item('holds', `All pieces fit ${plan.stock.name}`, sheets, '')] : []),
    ...plan.tooLarge.map((large) => {
      const help = `<span class="fit-why">${esc(say(helpWithTooLarge(large), figures.sizing))}</span>`;
      const offer = large.joined ? joinHtml(links, figures.sizing, { piece: large.name, joined: true }) : '';
      return item('fails', `${large.name} is too large for ${large.stock.name}`, '', help + offer);
    }),
    ...plan.joined.map((joined) => {
      const how = `<span class="fit-why">${esc(say(joiningInWords(joined), figures.sizing))}</span>`;
      const back = joinHtml(links, figures.sizing, { piece: joined.name, joined: false });
      return item('advice', `${joined.name} is made of two parts`, '', how + back);
    }),
  ].join('');
}

function item(state: 'holds' | 'advice' | 'fails', name: string, amount: string, why: string): string {
  const said = { holds: 'Holds: ', advice: 'Advice: ', fails: 'Fails: ' }[state];
  return `<li class="fit-${state}">${state === 'holds' ? CHECK : WARNING}<span><span class="visually-hidden">${said}</span>${esc(capital(name))}${why}</span><em>${esc(amount)}</em></li>`;
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

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
