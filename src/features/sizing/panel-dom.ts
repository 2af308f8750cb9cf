import { GRIDS, type GridId, type Model, type Sizing, type Unit } from '@/engine';
import { readCutFrom } from '@/features/sheets/cut-from';
import { cutFromHtml } from '@/features/sheets/cut-from-html';
import { haveHtml, stockOptionsHtml } from '@/features/sheets/my-sheets-html';
import { fieldTroubleHtml, gridsHtml, otherTroubleHtml, sizingHref, wholeStepsHtml, type Links } from './live-html';
import { morphInto } from './morph';
import { fieldText, type Panel, type PanelField } from './panel';
import { PAPERS, paperHref, PDFS } from './paper';
import { rangeRuler, rangeRulerSvg } from './range-ruler';
import type { ReaderState, ReaderStore, Typed } from './reader-store';
import type { ReaderView } from './reader-view';
import type { SizeView } from './size-view';
import { parameterName } from './sizing-form';
import { readSizing } from './sizing-link';

/** The sizing panel's form in the browser: what people do in it, and what it shows. */

/** How long half-typed figures are left alone before the page says that they do not read or do not fit. */
const TYPING = 700;

interface Where {
  readonly model: Model;
  readonly authors: Sizing;
  readonly path: string;
}

export function bindPanel(panel: HTMLElement, page: HTMLElement, store: ReaderStore, where: Where): void {
  const form = panel.querySelector('form');
  if (!form) return;
  const names = namesOf(where.model);
  const measureOf = (element: Element) => element.closest<HTMLElement>('[data-field]')?.dataset.field ?? '';
  let typing: ReturnType<typeof setTimeout> | undefined;
  let sliding: (() => void) | null = null;
  /** A thumb moves more often than the screen is drawn; only where it got to counts. */
  const slide = (change: () => void) => {
    if (!sliding) {
      requestAnimationFrame(() => {
        sliding?.();
        sliding = null;
      });
    }
    sliding = change;
  };
  const settle = (input: HTMLInputElement) => {
    clearTimeout(typing);
    if (input.value.trim() !== shownText(input)) store.type(measureOf(input), input.value);
  };

  const readSheets = () => {
    clearTimeout(typing);
    const { cutFrom, verdict } = store.$state.get();
    const fields = new URLSearchParams();
    for (const field of form.querySelectorAll<HTMLInputElement | HTMLSelectElement>(
      '[data-sheets-field] :is(input, select)',
    ))
      fields.append(field.name, field.value);
    store.cutFrom(readCutFrom(fields, { units: verdict.asked.units, before: cutFrom }));
  };

  form.addEventListener('input', ({ target }) => {
    if (target instanceof HTMLInputElement && target.closest('[data-sheets-field]')) {
      clearTimeout(typing);
      typing = setTimeout(readSheets, TYPING);
      return;
    }
    if (!(target instanceof HTMLInputElement) || measureOf(target) === '') return;
    clearTimeout(typing);
    if (target.type === 'range') slide(() => store.set(measureOf(target), onStep(target, Number(target.value), store)));
    else if (store.wouldWork(measureOf(target), target.value)) store.type(measureOf(target), target.value);
    else typing = setTimeout(() => settle(target), TYPING);
  });
  form.addEventListener('focusout', ({ target }) => {
    if (!(target instanceof HTMLInputElement) || target.type !== 'text' || measureOf(target) === '') return;
    settle(target);
    if (!(measureOf(target) in store.$state.get().typed)) target.value = shownText(target);
  });
  form.addEventListener('keydown', (event) => {
    const { target } = event;
    if (!(target instanceof HTMLInputElement) || target.type !== 'range') return;
    const steps = { ArrowUp: 1, ArrowRight: 1, ArrowDown: -1, ArrowLeft: -1, PageUp: 10, PageDown: -10 }[event.key];
    if (steps === undefined) return;
    event.preventDefault();
    const { measure, step } = measuring(target, store);
    if (measure) store.set(measure.name, clamp(target, snapTo(measure.exact + steps * step, step)));
  });
  form.addEventListener('click', (event) => {
    const button = (event.target as Element).closest('button');
    if (!button || button.name === '') return;
    event.preventDefault();
    const choice = names.choices.get(button.name);
    if (button.name === 'units') store.units(button.value as Unit);
    else if (button.name === 'cut') store.grid(button.value as GridId);
    else if (choice !== undefined) store.choose(choice, button.value);
  });
  form.addEventListener('change', ({ target }) => {
    if ((target as Element).closest('[data-sheets-field]')) readSheets();
  });
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    form.querySelectorAll<HTMLInputElement>('[data-field] input[type=text]').forEach(settle);
    readSheets();
  });
  const takeLink = (event: MouseEvent) => {
    const link = (event.target as Element).closest<HTMLAnchorElement>('a[data-sizing], a[data-reset]');
    if (link && !(event.metaKey || event.ctrlKey || event.shiftKey)) {
      event.preventDefault();
      store.ask(readSizing(where.model, new URL(link.href).searchParams, where.authors).sizing);
      // The link may be gone after it was followed; whoever used the keyboard goes on at the field it was about.
      const field = link.closest('[data-field]')?.querySelector<HTMLInputElement>('input[type=text]');
      if (field) {
        const { figures, asked } = store.$state.get().verdict;
        const measure = figures.measures.find(({ name }) => name === measureOf(field));
        if (measure) field.value = field.defaultValue = fieldText(measure, asked);
        field.focus();
      } else if (!link.matches('[data-reset]')) panel.querySelector<HTMLElement>('h2')?.focus();
      return;
    }
    const join = (event.target as Element).closest<HTMLAnchorElement>('a[data-join]');
    if (join && !(event.metaKey || event.ctrlKey || event.shiftKey)) {
      event.preventDefault();
      store.cutFrom(readCutFrom(new URL(join.href).searchParams, store.$state.get().verdict.asked));
      // What undoes it stands in the place of what did it.
      const { join: piece = '' } = join.dataset;
      requestAnimationFrame(() => panel.querySelector<HTMLElement>(`a[data-join="${CSS.escape(piece)}"]`)?.focus());
      return;
    }
    const copy = (event.target as Element).closest<HTMLAnchorElement>('a[data-copy-link]');
    if (!copy) return;
    event.preventDefault();
    void copyLink(copy, panel);
  };
  panel.addEventListener('click', takeLink);
  panel.addEventListener('click', (event) => {
    const dialog = panel.querySelector<HTMLDialogElement>('[data-sheets-dialog]');
    if (!dialog || !(event.target as Element).closest('a[data-my-sheets]')) return;
    event.preventDefault();
    void import('@/features/sheets/my-sheets.client');
    dialog.showModal();
  });
  page.addEventListener('click', takeLink);
}

/** Brings the form to a state. A field that has the caret keeps what is being typed. */
export function showPanel(
  root: HTMLElement,
  {
    view,
    panel,
    typed,
    links,
  }: { readonly view: SizeView; readonly panel: Panel; readonly typed: Typed; readonly links: Links },
): void {
  const { verdict } = view;
  const put = (selector: string, html: string) => {
    const place = root.querySelector(selector);
    if (place) morphInto(place, html);
  };
  for (const field of panel.fields)
    showField(root, field, fieldTroubleHtml(field.name, verdict, typed, links), field.name in typed);
  put('[data-other-trouble]', otherTroubleHtml(verdict, links));
  put('[data-whole-steps]', wholeStepsHtml(verdict.figures, view.whole, links));
  put('[data-grids]', gridsHtml(panel));
  press(root, 'units', panel.units);
  for (const choice of panel.choices) press(root, parameterName(choice.name), choice.chosen);
  const { units, grid } = panel;
  point(root, '[data-sheet-link]', sizingHref(links, verdict.shown.sizing, '/sheet'));
  for (const { below } of PDFS)
    for (const { id } of PAPERS)
      point(root, `[data-paper="${below} ${id}"]`, paperHref(links, verdict.shown.sizing, below, id));
  for (const ask of ['fit', 'largest']) point(root, `[data-ask="${ask}"]`, sizingHref(links, verdict.asked, `/${ask}`));
  point(root, '[data-cutting-link]', `${sizingHref(links, verdict.shown.sizing, '/sheet')}#cutting`);
  point(root, '[data-cutting-zip]', sizingHref(links, verdict.shown.sizing, '/pieces.zip'));
  point(root, '[data-reset]', sizingHref(links, { ...links.authors, units, grid }));
  point(root, '[data-copy-link]', sizingHref(links, verdict.asked));
}

/** The sheets to choose from, how they are used, and whether there are enough of the chosen one. */
export function showSheets(
  root: HTMLElement,
  { plan, verdict }: Pick<ReaderView, 'plan' | 'verdict'>,
  { cutFrom, cutTyped, sheets }: Pick<ReaderState, 'cutFrom' | 'cutTyped' | 'sheets'>,
): void {
  const { stock } = cutFrom;
  const select = root.querySelector<HTMLSelectElement>('[data-stocks]');
  if (select) {
    morphInto(select, stockOptionsHtml(sheets, stock));
    select.value = stock.id;
  }
  const how = root.querySelector('[data-cut-from]');
  if (how) {
    const { units } = verdict.asked;
    const { materials } = verdict.shown;
    morphInto(how, cutFromHtml({ cutFrom, typed: cutTyped, units, sheets, materials }));
    for (const field of how.querySelectorAll<HTMLInputElement | HTMLSelectElement>('input, select')) {
      if (field instanceof HTMLSelectElement)
        field.value = field.querySelector<HTMLOptionElement>('option[selected]')?.value ?? '';
      else if (field !== document.activeElement) field.value = field.defaultValue;
    }
  }
  const have = root.querySelector('[data-have]');
  if (have) morphInto(have, haveHtml(plan, sheets));
}

function showField(root: HTMLElement, field: PanelField, trouble: string, unread: boolean): void {
  const place = [...root.querySelectorAll<HTMLElement>('[data-field]')].find(
    ({ dataset }) => dataset.field === field.name,
  );
  const input = place?.querySelector<HTMLInputElement>('input[type=text]');
  if (!place || !input) return;
  place.hidden = !field.inUse;
  // The text that the server or the last change put here, to tell what was typed from what was shown.
  input.defaultValue = field.text;
  if (!unread && document.activeElement !== input) input.value = field.text;
  if (trouble === '') input.removeAttribute('aria-invalid');
  else input.setAttribute('aria-invalid', 'true');
  const written = (selector: string, text: string) => {
    const element = place.querySelector(selector);
    if (element && element.textContent !== text) element.textContent = text;
  };
  written('[data-suffix]', field.suffix);
  written('[data-range]', `From ${field.range}`);
  const told = place.querySelector('[data-trouble]');
  if (told) morphInto(told, trouble);
  const slider = place.querySelector<HTMLInputElement>('input[type=range]');
  if (!slider) return;
  const range = `${field.from} ${field.to} ${field.unit}`;
  if (slider.dataset.for !== range) {
    slider.dataset.for = range;
    slider.min = String(field.from);
    slider.max = String(field.to);
    const ruler = place.querySelector('[data-ruler]');
    if (ruler)
      morphInto(
        ruler,
        rangeRulerSvg(rangeRuler({ from: field.from, to: field.to, kind: field.kind, units: field.unit })),
      );
  }
  // While it is held the thumb stays under the finger; it comes to rest on its step when it is let go.
  if (!slider.matches(':active')) slider.value = String(field.value);
  slider.setAttribute('aria-valuetext', `${field.text} ${field.suffix}`.trim());
}

function press(root: HTMLElement, name: string, value: string): void {
  for (const button of root.querySelectorAll<HTMLButtonElement>(`button[name="${CSS.escape(name)}"]`)) {
    button.setAttribute('aria-pressed', String(button.value === value));
  }
}

function point(root: HTMLElement, selector: string, href: string): void {
  root.querySelector(selector)?.setAttribute('href', href);
}

const shownText = (input: HTMLInputElement): string => input.defaultValue;

function measuring(slider: HTMLInputElement, store: ReaderStore) {
  const name = slider.closest<HTMLElement>('[data-field]')?.dataset.field;
  const { figures, asked } = store.$state.get().verdict;
  const measure = figures.measures.find((each) => each.name === name);
  if (measure?.kind !== 'length') return { measure, step: measure?.kind === 'number' ? 0.1 : 1 };
  const { unit } = measure;
  const ofUnit = unit === undefined || unit === asked.units ? GRIDS[asked.grid].step : unit === 'in' ? 25.4 / 32 : 0.1;
  // A range shorter than ten steps, such as card's thickness, is walked in finer ones.
  const span = Number(slider.max) - Number(slider.min);
  return { measure, step: span / ofUnit < 10 ? (asked.units === 'in' && unit !== 'mm' ? 25.4 / 64 : 0.05) : ofUnit };
}

const snapTo = (value: number, step: number): number => Math.round(value / step) * step;
const clamp = (slider: HTMLInputElement, value: number): number =>
  Math.min(Number(slider.max), Math.max(Number(slider.min), value));
const onStep = (slider: HTMLInputElement, value: number, store: ReaderStore): number =>
  clamp(slider, snapTo(value, measuring(slider, store).step));

function namesOf(model: Model): { readonly choices: ReadonlyMap<string, string> } {
  return { choices: new Map(model.pattern.choices.map(({ name }) => [parameterName(name), name])) };
}

async function copyLink(link: HTMLAnchorElement, panel: HTMLElement): Promise<void> {
  const said = panel.querySelector('[data-said]');
  const label = link.textContent;
  try {
    await navigator.clipboard.writeText(link.href);
    link.textContent = 'Copied';
    if (said) said.textContent = 'The link to this size is copied.';
  } catch {
    link.textContent = 'Copy the address above';
    if (said) said.textContent = 'This browser did not let the link be copied. The address bar holds the same link.';
  }
  setTimeout(() => (link.textContent = label), 2500);
}
