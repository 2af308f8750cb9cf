import { STOCKS, UNITS, type SheetPlan, type Stock, type Unit } from '@/engine';
import { esc } from '@/exports/escape';
import { cardUsed, haveWords, stocksOf, type MySheets } from './my-sheets';
import { countField, OWN_SIZE, USUAL_COUNT, type SheetFaults } from './sheet-form';
import { grainOf, grainWords, stockWords } from './stock-link';

/** What shows a reader's sheets, as HTML for the server and the browser alike. */

export interface EditorState {
  readonly sheets: MySheets;
  readonly faults?: SheetFaults;
  /** What was typed and did not read, to be shown again. */
  readonly typed?: Readonly<Record<string, string>>;
}

/** The list with its numbers, and the form that adds a size; both are sent to /sheets. */
export const editorHtml = (state: EditorState): string => listHtml(state) + addHtml(state);

function listHtml({ sheets, faults = {}, typed = {} }: EditorState): string {
  if (sheets.length === 0)
    return '<p class="my-sheets-none">No sheets yet. Say what lies in your drawer, and every box says whether it comes out of it.</p>';
  const rows = stocksOf(sheets).map(({ stock, count }) => {
    const name = countField(stock.id);
    const id = `sheets-${name}`;
    const grain = grainOf(stock);
    const words = esc(stockWords(stock));
    const text = typed[name] ? esc(typed[name]) : String(count);
    return (
      `<li><div class="field"><label for="${esc(id)}"><b>${esc(stock.name)}</b>` +
      (grain === null ? '' : ` <small>${grainWords(grain)}</small>`) +
      `</label>${errorHtml(id, faults[name])}</div>` +
      `<input class="input" id="${esc(id)}" name="${esc(name)}" inputmode="numeric" maxlength="4" value="${text}"${invalid(id, faults[name])}>` +
      `<button class="btn" name="remove" value="${esc(stock.id)}" aria-label="Remove ${words}">Remove</button></li>`
    );
  });
  return (
    `<form class="my-sheets-list" method="post" action="/sheets" autocomplete="off">` +
    // Enter presses a form's first button: it must be the one that keeps what was typed.
    `<button class="visually-hidden" name="do" value="keep" tabindex="-1" aria-hidden="true">Keep these numbers</button>` +
    `<ul>${rows.join('')}</ul>` +
    `<button class="btn my-sheets-keep" name="do" value="keep">Keep these numbers</button></form>`
  );
}

const UNIT_WORDS: Readonly<Record<Unit, string>> = { in: 'inches', mm: 'mm', cm: 'cm' };

function addHtml({ faults = {}, typed = {} }: EditorState): string {
  const size = typed.size ?? '12x12in';
  const option = (value: string, words: string, chosen: string) =>
    `<option value="${value}"${value === chosen ? ' selected' : ''}>${esc(words)}</option>`;
  const text = (name: string, label: string) =>
    `<div class="field"><label for="sheets-${name}">${label}</label><input class="input" id="sheets-${name}" name="${name}" maxlength="40" value="${esc(typed[name] ?? '')}"${invalid(`sheets-${name}`, faults[name])}>${errorHtml(`sheets-${name}`, faults[name])}</div>`;
  const unit = typed.unit ?? 'in';
  const units = UNITS.map(
    (one) =>
      `<label><input type="radio" name="unit" value="${one}"${one === unit ? ' checked' : ''}><span>${UNIT_WORDS[one]}</span></label>`,
  );
  const sizes = [
    ...Object.values(STOCKS).map(({ id, name }) => option(id, name, size)),
    option(OWN_SIZE, 'another size', size),
  ];
  const grains = [
    option('', 'not heeded', typed.grain ?? ''),
    option('long', 'along the long side', typed.grain ?? ''),
    option('short', 'along the short side', typed.grain ?? ''),
  ];
  return (
    `<form class="my-sheets-add" method="post" action="/sheets" autocomplete="off"><h3>Add a size</h3>` +
    `<div class="my-sheets-row"><div class="field"><label for="sheets-size">Size</label><select class="input" id="sheets-size" name="size"${invalid('sheets-size', faults.size)}>${sizes.join('')}</select>${errorHtml('sheets-size', faults.size)}</div>` +
    `<div class="field"><label for="sheets-count">How many</label><input class="input" id="sheets-count" name="count" inputmode="numeric" maxlength="4" value="${esc(typed.count ?? String(USUAL_COUNT))}"${invalid('sheets-count', faults.count)}>${errorHtml('sheets-count', faults.count)}</div></div>` +
    `<div class="my-sheets-own"><div class="my-sheets-row">${text('across', 'One side')}${text('along', 'Other side')}</div>` +
    `<fieldset class="field"><legend class="visually-hidden">Units of the sides</legend><div class="segmented">${units.join('')}</div></fieldset></div>` +
    `<div class="field"><label for="sheets-grain">Grain</label><select class="input" id="sheets-grain" name="grain" aria-describedby="sheets-grain-hint">${grains.join('')}</select>` +
    `<p class="hint" id="sheets-grain-hint">Card folds best along its grain. Where you say how it runs, pieces are laid so that most of their folds follow it.</p></div>` +
    `<button class="btn" name="do" value="add">Add this size</button></form>`
  );
}

const invalid = (id: string, fault: string | undefined): string =>
  fault === undefined ? '' : ` aria-invalid="true" aria-describedby="${esc(id)}-error"`;
const errorHtml = (id: string, fault: string | undefined): string =>
  fault === undefined ? '' : `<p class="error" id="${esc(id)}-error" role="alert">${esc(fault)}</p>`;

/** The sheets to choose from: one's own first, then those sold everywhere. A chosen one that is in neither heads the list. */
export function stockOptionsHtml(sheets: MySheets, chosen: Stock | null): string {
  const mine = stocksOf(sheets);
  const isMine = (stock: Stock) => mine.some((one) => one.stock.id === stock.id);
  const others = Object.values(STOCKS).filter((stock) => !isMine(stock));
  const option = (stock: Stock, more = '') =>
    `<option value="${esc(stock.id)}"${stock.id === chosen?.id ? ' selected' : ''}>${esc(stockWords(stock))}${more}</option>`;
  const known = chosen === null || isMine(chosen) || others.some(({ id }) => id === chosen.id);
  const rest = others.map((stock) => option(stock)).join('');
  return (
    (known ? '' : option(chosen)) +
    (mine.length === 0
      ? rest
      : `<optgroup label="My sheets">${mine.map(({ stock, count }) => option(stock, ` (${count})`)).join('')}</optgroup>` +
        `<optgroup label="Other sheets">${rest}</optgroup>`)
  );
}

/** Under the choice of a sheet: whether there are enough of it; empty when the reader has none of that size. */
export function haveHtml(plan: SheetPlan, sheets: MySheets): string {
  const words = haveWords(plan, sheets);
  const mine = sheets.find(({ card }) => card === plan.stock.id);
  if (words === '' || !mine) return '';
  return cardUsed(plan) <= mine.count
    ? `Takes ${esc(words)}; you have ${mine.count}.`
    : `<b>${esc(capital(words))}.</b>`;
}
const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
