import { showFolded } from '@/components/folded/show';
import { GRIDS, openModel, type Model, type SealedFormula, type SealedModel } from '@/engine';
import { fieldText } from '@/features/sizing/panel';
import { FROM, parameterName } from '@/features/sizing/sizing-form';
import { writeSizing } from '@/features/sizing/sizing-link';
import { drawnAt, workExample, type Example } from './example';
import { changesWords, closesHtml, liveInside, pieceSvg, troublesHtml, wordsHtml } from './example-html';
import { isExamplePart, partHtml } from './example-parts';

/**
 * In the browser: gives the function that answers a change in the form. It works the box out again and puts new figures,
 * drawings and words wherever the page shows this example; what changed is marked for a moment.
 */
export function followExample(form: HTMLFormElement): (changed: EventTarget | null) => void {
  const slug = form.dataset.example ?? '';
  const model = modelIn(document, slug);
  let example = workExample(model, parametersOf(form));
  showFolded(document, model, example.figures);

  return (changed) => {
    if (changed instanceof HTMLInputElement && changed.type === 'range') takeFromSlider(form, changed, example);
    const next = workExample(model, parametersOf(form), example.figures.sizing);
    redrawFields(form, next, changed);
    if (next.asked.units !== example.asked.units) redrawGrids(form, next);
    putFigures(slug, form, next);
    showFolded(document, model, next.figures);
    example = next;
    history.replaceState(null, '', `${location.pathname}${addressOf(next)}${location.hash}`);
  };
}

/** The model comes with the page, sealed; formulas that stand in the text come with their places. */
function modelIn(page: Document, slug: string): Model {
  const source = page.querySelector(`script[data-pattern="${CSS.escape(slug)}"]`)?.textContent ?? 'null';
  const sealed = JSON.parse(source) as SealedModel;
  const places = page.querySelectorAll<HTMLElement>(`[data-example-part="${CSS.escape(slug)}"][data-code]`);
  const texts = [...places].map(({ dataset }) => [
    dataset.live ?? '',
    JSON.parse(dataset.code ?? 'null') as SealedFormula,
  ]);
  return openModel({ ...sealed, texts: { ...sealed.texts, ...Object.fromEntries(texts) } });
}

const parametersOf = (form: HTMLFormElement): URLSearchParams =>
  new URLSearchParams([...new FormData(form)].map(([name, value]) => [name, String(value)]));

const addressOf = ({ model, figures, usual }: Example): string => {
  const query = writeSizing(model, figures.sizing, usual).replace(/^\?/, '');
  return query === '' ? '' : `?${query}`;
};

/** A slider stands on the marks of the cut grid, and its figure goes into the field beside it. */
function takeFromSlider(form: HTMLFormElement, slider: HTMLInputElement, example: Example): void {
  const measure = example.figures.measures.find(({ name }) => name === slider.dataset.slider);
  const input = measure && field(form, measure.name);
  if (!measure || !input) return;
  const step = GRIDS[example.asked.grid].step;
  const snapped = Math.round(slider.valueAsNumber / step) * step;
  const value = Math.min(Number(slider.max), Math.max(Number(slider.min), snapped));
  input.value = fieldText({ ...measure, exact: value }, example.asked);
}

const field = (form: HTMLFormElement, measure: string) =>
  form.querySelector<HTMLInputElement>(`input[name="${CSS.escape(parameterName(measure))}"]`);

/**
 * Fields, their ranges and the size that they are read from are written anew: usual values and ranges follow other
 * measures. What is being typed, and what does not read, stays as it is.
 */
function redrawFields(form: HTMLFormElement, example: Example, changed: EventTarget | null): void {
  const from = form.elements.namedItem(FROM);
  if (from instanceof HTMLInputElement) from.value = drawnAt(example);
  for (const one of example.panel.fields) {
    const input = field(form, one.name);
    if (!input) continue;
    if (input !== changed && example.typed[one.name] === undefined) input.value = one.text;
    const place = input.closest<HTMLElement>('[data-field]');
    if (place) place.hidden = !one.inUse;
    const suffix = form.querySelector(`[data-suffix="${CSS.escape(one.name)}"]`);
    if (suffix) suffix.textContent = one.suffix;
    const range = form.querySelector(`[data-range="${CSS.escape(one.name)}"]`);
    if (range) range.textContent = one.range;
  }
  moveSliders(form, example, changed);
}

function redrawGrids(form: HTMLFormElement, { panel: { grids, grid } }: Example): void {
  const options = grids.map((id) => new Option(GRIDS[id].says, id, false, id === grid));
  form.querySelector('select[data-grids]')?.replaceChildren(...options);
}

function moveSliders(form: HTMLFormElement, { panel }: Example, changed: EventTarget | null): void {
  for (const slider of form.querySelectorAll<HTMLInputElement>('input[data-slider]')) {
    const one = panel.fields.find(({ name }) => name === slider.dataset.slider);
    if (!one) continue;
    if (slider !== changed) slider.value = String(one.value);
    slider.setAttribute('aria-valuetext', `${one.text} ${one.suffix}`.trim());
  }
}

function putFigures(slug: string, form: HTMLFormElement, example: Example): void {
  let figures = 0;
  let drawings = 0;
  for (const element of document.querySelectorAll<HTMLElement>(`[data-example-part="${CSS.escape(slug)}"]`)) {
    const { live, piece, words, part, wide, narrow } = element.dataset;
    if (live !== undefined) figures += putFigure(element, liveInside(example, live, 'bare' in element.dataset));
    if (words !== undefined) figures += putWords(element, wordsHtml(example, words));
    if (part !== undefined && isExamplePart(part)) figures += putWords(element, partHtml(example, part));
    if (piece !== undefined) {
      drawings += putHtml(element, pieceSvg(example, piece, { wide: Number(wide), narrow: Number(narrow) }));
    }
  }
  say(form, '[data-troubles]', troublesHtml(example));
  say(form, '[data-closes]', closesHtml(example));
  say(form, '[data-changes]', changesWords(figures, drawings));
  document.documentElement.dataset.units = example.asked.units;
}

function say(form: HTMLFormElement, place: string, html: string): void {
  const element = form.querySelector(place);
  if (element) element.innerHTML = html;
}

/** 1 when the words changed: compared as text, for the browser may write the same HTML in another way. */
function putHtml(element: HTMLElement, html: string): 0 | 1 {
  const before = element.textContent;
  element.innerHTML = html;
  return element.textContent === before ? 0 : 1;
}

function putFigure(element: HTMLElement, html: string): 0 | 1 {
  const changed = putHtml(element, html);
  if (changed) mark(element);
  return changed;
}

/** New words; the figures in them that differ from those in the same place before are marked and counted. */
function putWords(element: HTMLElement, html: string): number {
  const before = [...element.querySelectorAll('.measure')].map((figure) => figure.textContent);
  const unfolded = [...element.querySelectorAll('details')].map(({ open }) => open);
  element.innerHTML = html;
  element.querySelectorAll('details').forEach((details, index) => (details.open = unfolded[index] ?? false));
  const after = [...element.querySelectorAll<HTMLElement>('.measure')];
  const changed = after.filter((figure, index) => figure.textContent !== before[index]);
  changed.forEach(mark);
  return changed.length;
}

function mark(element: HTMLElement): void {
  element.classList.remove('changed');
  // Reading a size makes the browser notice that the class was gone, so that the fading starts again.
  void element.offsetWidth;
  element.classList.add('changed');
  window.clearTimeout(timers.get(element));
  timers.set(
    element,
    window.setTimeout(() => element.classList.remove('changed'), 700),
  );
}
const timers = new WeakMap<HTMLElement, number>();
