import { drawSheet, show, type Model, type SheetPlan, type Sizing } from '@/engine';
import { esc } from '@/exports/escape';
import { drawingSvg } from '@/exports/svg/drawing';
import { CUT_FIELD, keepParams, MOST_COPIES, type CutFrom } from '@/features/sheets/cut-from';
import { cardUsed, type MySheets } from '@/features/sheets/my-sheets';
import { haveHtml, stockOptionsHtml } from '@/features/sheets/my-sheets-html';
import { sizingHref, type Links } from '../live-html';
import { fitsHtml } from '../plan-html';
import { insideWords } from '../facts';
import { slugOf } from '../sizing-link';
import {
  COPIES,
  COUNT,
  EASE,
  STANDS,
  thingField,
  thingNames,
  usualEase,
  type Answer,
  type Ask,
  type AskFaults,
} from './ask';
import { waysUp, type Offer } from './thing';

/** What asks for a size and shows the answer before it is taken, as HTML for the server and the browser alike. */

export const ASK_TITLES: Readonly<Record<Ask, string>> = {
  fit: 'Fit it to a thing',
  largest: 'Largest from my sheets',
};

export interface AskState {
  readonly links: Links;
  readonly asked: Sizing;
  readonly cutFrom: CutFrom;
  readonly sheets: MySheets;
  readonly edition: number | string | null;
  readonly typed: Readonly<Record<string, string>>;
  readonly faults: AskFaults;
}

/** The form; a browser without scripts sends it to the address of the page that answers. */
export function askFormHtml(ask: Ask, state: AskState): string {
  const { links, asked } = state;
  const address = new URL(
    sizingHref({ ...links, keep: keepParams(state.cutFrom, state.edition) }, asked, `/${ask}`),
    'http://x',
  );
  const shown: readonly string[] = ask === 'largest' ? [CUT_FIELD.card, CUT_FIELD.copies] : [];
  const hidden = [...address.searchParams]
    .filter(([name]) => !shown.includes(name))
    .map(([name, value]) => `<input type="hidden" name="${esc(name)}" value="${esc(value)}">`);
  return (
    `<form class="ask-form" method="get" action="${esc(address.pathname)}" autocomplete="off">${hidden.join('')}` +
    (ask === 'fit' ? thingHtml(links.model, state) : pileHtml(state)) +
    `<button class="btn ask-submit" type="submit">Work it out</button></form>`
  );
}

function thingHtml(model: Model, state: AskState): string {
  const { units } = state.asked;
  const words = { in: 'inches', mm: 'millimetres', cm: 'centimetres' }[units];
  const fields = thingNames(model).map((name) => fieldHtml(thingField(name), name, state, ''));
  return (
    `<fieldset class="field"><legend>The thing measures, in ${words}</legend><div class="ask-fields">${fields.join('')}</div></fieldset>` +
    standsHtml(model, state) +
    fieldHtml(
      EASE,
      'Ease on every side',
      state,
      usualEase(units),
      'Enough for a finger beside a tin. Seed packets need none.',
    )
  );
}

/** How the thing stands in the box: as it was measured, or with another of its sizes as the height. */
function standsHtml(model: Model, { typed }: AskState): string {
  const ways = waysUp(model);
  if (ways.length === 0) return '';
  const chosen = typed[STANDS] ?? '';
  const way = (value: string, words: string, picture: string) =>
    `<label><input type="radio" name="${STANDS}" value="${esc(value)}"${value === chosen ? ' checked' : ''}><span>${picture}${esc(words)}</span></label>`;
  return (
    '<fieldset class="field"><legend>How it stands in the box</legend><div class="segmented ask-stands">' +
    way('', 'upright', blockSvg(BLOCK)) +
    ways
      .map((index, turned) => {
        const name = thingNames(model)[index] ?? '';
        return way(
          slugOf(name),
          `${name} side up`,
          blockSvg(turned === 0 ? [BLOCK[1], BLOCK[0], BLOCK[2]] : [BLOCK[0], BLOCK[2], BLOCK[1]]),
        );
      })
      .join('') +
    '</div></fieldset>'
  );
}

/** A block as wide, as tall and as deep as most things that stand. */
const BLOCK = [16, 24, 8] as const;

/** A block seen from the front, its depth going back to the right at half its length. */
function blockSvg([wide, tall, deep]: readonly [number, number, number]): string {
  const back = deep / 2;
  const [left, foot] = [(40 - wide - back) / 2, 32];
  const top = foot - tall;
  return (
    '<svg viewBox="0 0 40 36" width="40" height="36" aria-hidden="true">' +
    `<path d="M${left} ${foot}v${-tall}h${wide}v${tall}zM${left} ${top}l${back} ${-back}h${wide}l${-back} ${back}M${left + wide + back} ${top - back}v${tall}l${-back} ${back}"/></svg>`
  );
}

function pileHtml(state: AskState): string {
  const have = state.sheets.find(({ card }) => card === state.cutFrom.stock.id)?.count ?? 1;
  return (
    `<div class="field"><label for="ask-card">Cut it from</label><select class="input" id="ask-card" name="card">${stockOptionsHtml(state.sheets, state.cutFrom.stock)}</select></div>` +
    `<div class="ask-fields">${fieldHtml(COUNT, 'Sheets at most', state, String(have))}` +
    fieldHtml(COPIES, 'Boxes', state, String(state.cutFrom.copies), '', `up to ${MOST_COPIES}`) +
    '</div><p class="hint">All inside sizes grow alike.</p>'
  );
}

function fieldHtml(
  name: string,
  label: string,
  { typed, faults }: AskState,
  usual: string,
  hint = '',
  placeholder = '',
): string {
  const id = `ask-${name}`;
  const fault = faults[name];
  const described = [hint ? `${id}-hint` : '', fault ? `${id}-error` : ''].filter(Boolean).join(' ');
  return (
    `<div class="field"><label for="${esc(id)}">${esc(label)}</label>` +
    `<input class="input" id="${esc(id)}" name="${esc(name)}" maxlength="40" value="${esc(typed[name] ?? usual)}"` +
    (placeholder ? ` placeholder="${esc(placeholder)}"` : '') +
    (fault ? ' aria-invalid="true"' : '') +
    (described ? ` aria-describedby="${esc(described)}"` : '') +
    `>${hint ? `<p class="hint" id="${esc(id)}-hint">${esc(hint)}</p>` : ''}` +
    `${fault ? `<p class="error" id="${esc(id)}-error">${esc(fault)}</p>` : ''}</div>`
  );
}

/** The answer with what it takes, and the ways on: use it, or leave the size as it is. */
export function answerHtml(ask: Ask, answer: Answer, state: AskState): string {
  const leave = `<a class="btn" data-leave href="${esc(sizingHref(state.links, state.asked))}">Leave it</a>`;
  if (!answer.ok)
    return (
      `<div class="problem"><p><b>No size answers this.</b> ${esc(sentence(answer.reason))}</p></div>` +
      offersHtml(answer.offers, state) +
      `<p class="ask-ways">${leave}</p>`
    );
  const { figures, plan, cutFrom, stops } = answer;
  const { units, grid } = figures.sizing;
  const sizes = figures.finished.inside.map(
    ({ name, mm }) =>
      `<div><dt>${esc(name)}</dt><dd><span class="measure">${esc(show(mm, { units, grid }).typeset)}</span></dd></div>`,
  );
  const use = sizingHref({ ...state.links, keep: keepParams(cutFrom, state.edition) }, figures.sizing);
  return (
    `<h3>${ask === 'fit' ? 'The inside must be' : 'The largest that fits, inside'}</h3><dl class="ask-sizes">${sizes.join('')}</dl>` +
    (ask === 'fit'
      ? '<p class="small soft">The thing and the ease on both sides, up to the next step of your trimmer.</p>'
      : '') +
    `<ul class="fits">${fitsHtml(figures, plan, { ...state.links, keep: keepParams(cutFrom, state.edition) })}</ul>` +
    haveLine(plan, state.sheets) +
    (stops === null ? '' : `<div class="note"><p><b>What stops it.</b> ${esc(stops)}</p></div>`) +
    (ask === 'largest' ? sheetsHtml(plan, { units, grid }) : '') +
    `<p class="ask-ways"><a class="tab-button" data-use href="${esc(use)}">Use this size</a>${leave}</p>`
  );
}

/** Boxes that hold the thing all the same, each with what is different and the way to take it. */
function offersHtml(offers: readonly Offer[], state: AskState): string {
  if (offers.length === 0) return '';
  const links = { ...state.links, keep: keepParams(state.cutFrom, state.edition) };
  const items = offers.map(
    (offer) =>
      `<li><span><b>${esc(insideWords(offer.figures))}</b><small>${esc(howWords(offer))}</small></span>` +
      `<a class="btn small-btn" data-use href="${esc(sizingHref(links, offer.figures.sizing))}">Use it<span class="visually-hidden">: ${esc(insideWords(offer.figures))}</span></a></li>`,
  );
  return `<h3>These hold it too</h3><ul class="ask-offers">${items.join('')}</ul>`;
}

/** `1/2 in more wide than it needs`, `with its deep side up` */
function howWords({ how, figures }: Offer): string {
  if (how.is === 'turned') return /^tall\b/.test(how.up) ? 'standing as it was measured' : `with its ${how.up} side up`;
  const more = how.by.map(({ name, mm }) => `${show(mm, figures.sizing).typeset} more ${name}`);
  return more.length === 0 ? 'just as large' : `${more.join(', ')} than it needs`;
}

function haveLine(plan: SheetPlan, sheets: MySheets): string {
  const have = haveHtml(plan, sheets);
  return have === '' ? '' : `<p class="small">${have}</p>`;
}

/** Sheets drawn small; more than these say no more. */
const MOST_DRAWN = 6;

function sheetsHtml(plan: SheetPlan, shown: Pick<Sizing, 'units' | 'grid'>): string {
  const drawn = plan.sheets
    .slice(0, MOST_DRAWN)
    .map(
      (_, index) =>
        `<li>${drawingSvg(drawSheet(plan, index, { width: 150, ...shown }))}<span class="small soft">sheet ${index + 1}</span></li>`,
    );
  const more = plan.used - drawn.length;
  const boxes = plan.copies > 1 ? `, ${plan.copies} boxes` : '';
  return (
    `<ul class="ask-sheets" aria-label="Sheet plan">${drawn.join('')}</ul>` +
    `<p class="small soft">${cardUsed(plan)} ${cardUsed(plan) === 1 ? 'sheet' : 'sheets'} of card${boxes}${more > 0 ? `; ${more} more not drawn here` : ''}.</p>`
  );
}

const sentence = (words: string): string => {
  const text = words.charAt(0).toUpperCase() + words.slice(1);
  return /[.!?]$/.test(text) ? text : `${text}.`;
};
