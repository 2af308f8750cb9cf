import { helpWithTooLarge, joiningInWords, say, show, type Figures, type SheetPlan, type Sizing } from '@/engine';
import { esc } from '@/exports/escape';
import { besides } from '@/exports/material-rows';
import { CUT_FIELD } from '@/features/sheets/cut-from';
import { cutWords, gapWords, pieceCount, piecesWords, sheetsWords, timeWords } from './facts';
import { sizingHref, WARNING, type Links } from './live-html';
import { slugOf } from './sizing-link';

/** What of a reader's page depends on how the pieces lie on sheets, as HTML for the server and the browser alike. */

const CHECK =
  '<svg class="icon" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true"><path d="M4.5 12.5 10 18 19.5 7"/></svg>';

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
    // A pattern drawn up from blank need not say what it measures in the end.
    ...(outside === '' ? [] : [['Finished, outside', `${outside} ${units}`] as [string, string]]),
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
