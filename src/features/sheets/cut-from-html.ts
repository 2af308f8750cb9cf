import type { Figures, Unit } from '@/engine';
import { esc } from '@/exports/escape';
import {
  CUT_FIELD,
  marginText,
  materialField,
  MOST_COPIES,
  OTHER_MATERIALS,
  type CutFrom,
  type ReadCutFrom,
} from './cut-from';
import type { MySheets } from './my-sheets';
import { stockOptionsHtml } from './my-sheets-html';
import { grainOf, grainWords, type Grain } from './stock-link';

/** What asks how a box is cut from its sheets, as HTML for the server and the browser alike. */

export interface CutFromState {
  readonly cutFrom: CutFrom;
  readonly typed: ReadCutFrom['typed'];
  readonly units: Unit;
  readonly sheets: MySheets;
  /** What the box is made of. */
  readonly materials: Figures['materials'];
}

/** Fields of a form: boxes, border, grain, and the sheets of what is not card. */
export function cutFromHtml({ cutFrom, typed, units, sheets, materials }: CutFromState): string {
  const grain = grainOf(cutFrom.stock);
  const grains = [null, 'long', 'short'] as const;
  const others = OTHER_MATERIALS.filter((material) => materials.stocks.some(({ stock }) => stock === material));
  return (
    '<div class="cut-from">' +
    textField(CUT_FIELD.copies, 'Boxes', String(cutFrom.copies), typed, {
      numeric: true,
      hint: `Planned together, up to ${MOST_COPIES}.`,
    }) +
    textField(CUT_FIELD.margin, `Border trimmed off first, ${units}`, marginText(cutFrom.margin, units), typed, {
      hint: 'For edges that are bent, or that a printer leaves white.',
    }) +
    `<div class="field"><label for="cut-grain">Grain of the card</label><select class="input" id="cut-grain" name="${CUT_FIELD.grain}" aria-describedby="cut-grain-hint">` +
    grains.map((one) => option(one ?? '', grainName(one), one === grain)).join('') +
    '</select><p class="hint" id="cut-grain-hint">Heeded, it runs along most folds of every piece.</p></div>' +
    others.map((material) => otherField(material, cutFrom, sheets, typed)).join('') +
    '</div>'
  );
}

/** Whether anything there is not as usual: then it is not folded away. */
export const cutFromOpen = ({ cutFrom, typed }: Pick<CutFromState, 'cutFrom' | 'typed'>): boolean =>
  Object.keys(typed).length > 0 ||
  cutFrom.margin > 0 ||
  cutFrom.copies > 1 ||
  grainOf(cutFrom.stock) !== null ||
  Object.keys(cutFrom.others).length > 0;

function textField(
  name: string,
  label: string,
  text: string,
  typed: CutFromState['typed'],
  { hint, numeric = false }: { readonly hint: string; readonly numeric?: boolean },
): string {
  const id = `cut-${name}`;
  const fault = typed[name];
  return (
    `<div class="field"><label for="${id}">${esc(label)}</label>` +
    `<input class="input" id="${id}" name="${name}" maxlength="40" autocomplete="off" value="${esc(fault?.text ?? text)}"` +
    `${numeric ? ' inputmode="numeric"' : ''}${fault ? ' aria-invalid="true"' : ''} aria-describedby="${id}-hint${fault ? ` ${id}-error` : ''}">` +
    `<p class="hint" id="${id}-hint">${esc(hint)}</p>${errorHtml(id, fault?.sentence)}</div>`
  );
}

function otherField(
  material: (typeof OTHER_MATERIALS)[number],
  { others }: CutFrom,
  sheets: MySheets,
  typed: CutFromState['typed'],
): string {
  const name = materialField(material);
  const chosen = others[material];
  const id = `cut-${name}`;
  return (
    `<div class="field"><label for="${id}">${esc(capital(material))} from</label><select class="input" id="${id}" name="${name}">` +
    option('', 'sheets as large as the card’s', chosen === undefined) +
    stockOptionsHtml(sheets, chosen ?? null) +
    `</select>${errorHtml(id, typed[name]?.sentence)}</div>`
  );
}

const errorHtml = (id: string, sentence: string | undefined): string =>
  sentence === undefined ? '' : `<p class="error" id="${id}-error" role="alert">${esc(sentence)}</p>`;
const option = (value: string, words: string, chosen: boolean): string =>
  `<option value="${value}"${chosen ? ' selected' : ''}>${esc(words)}</option>`;
const grainName = (grain: Grain | null): string =>
  grain === null ? 'not heeded' : grainWords(grain).replace('grain ', '');
const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
