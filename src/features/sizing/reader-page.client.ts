import { showFolded } from '@/components/folded/show';
import { openModel, type Figures, type Model, type SealedModel, type SheetPlan, type Sizing } from '@/engine';
import type { MySheets } from '@/features/sheets/my-sheets';
import { hearSheets, keptSheets } from '@/features/sheets/sheet-keeper';
import { planOptions, readCutFrom } from '@/features/sheets/cut-from';
import { articleFigures, markChanged } from './article-figures';
import { sheetsWords } from './facts';
import { factsHtml, fitsHtml, lastGoodHtml, closesWords, sizingHref, type Links } from './live-html';
import { morphInto } from './morph';
import { panelFor } from './panel';
import { bindPanel, showPanel, showSheets } from './panel-dom';
import { createPlanClient } from './plan-client';
import { createReaderStore, type ReaderState, type ReaderStore } from './reader-store';
import { keepParams, readerView } from './reader-view';

/** What the server puts into the page for the island. */
export interface ProjectData {
  readonly model: SealedModel;
  readonly authors: Sizing;
  readonly asked: Sizing;
  /** The sheets, as a link says them. */
  readonly cutFrom: string;
  /** The reader's sheets in their account; null without one: then the browser may keep some. */
  readonly sheets: MySheets | null;
  readonly path: string;
  /** Set when the page shows an edition that is not the newest. */
  readonly edition: number | null;
  readonly minutes: number | null;
}

/** Trials for the plan that comes with every change; better ones follow from beside the page. */
const WHILE_SIZING = 100;

/** Takes the page over from the form: from here on every change shows at once, and the address says what is shown. */
export function startReader(panel: HTMLElement): void {
  const page = document.querySelector<HTMLElement>('[data-reader]');
  const source = document.getElementById('project-data')?.textContent;
  if (!page || !source) return;
  const data = JSON.parse(source) as ProjectData;
  const model = openModel(data.model);
  const store = createReaderStore(model, {
    sizing: data.asked,
    authors: data.authors,
    cutFrom: readCutFrom(new URLSearchParams(data.cutFrom), data.asked).value,
    sheets: data.sheets ?? keptSheets(),
  });
  const paint = painter(page, panel, model, data);
  showFolded(page, model, store.$state.get().verdict.shown);
  let waiting = false;
  let painted = store.$state.get();
  // However many changes come in one frame, the page is brought up to date once.
  store.$state.listen(() => {
    if (waiting) return;
    waiting = true;
    requestAnimationFrame(() => {
      waiting = false;
      const next = store.$state.get();
      if (next !== painted) paint(next);
      painted = next;
    });
  });
  hearSheets((sheets) => store.sheets(sheets));
  const kept = keptSheets();
  // The server knew the account's sheets and drew them; what this browser keeps it could not know.
  if (data.sheets === null && kept.length > 0)
    showSheets(panel, readerView(model, painted.verdict, painted.cutFrom), painted);
  const editor = panel.querySelector('[data-my-sheets]');
  if (data.sheets !== null && kept.length > 0 && editor) editor.textContent = 'My sheets: add those this browser kept';
  bindPanel(panel, page, store, { model, authors: data.authors, path: data.path });
  bindAsks(panel, store, data, model);
  panel.dataset.ready = '';
}

/** The two questions about a size are fetched when the first is asked. */
function bindAsks(
  panel: HTMLElement,
  store: ReaderStore,
  { model: sealed, authors, path, edition }: ProjectData,
  model: Model,
) {
  const dialog = panel.querySelector<HTMLDialogElement>('[data-ask-dialog]');
  panel.addEventListener('click', (event) => {
    const link = (event.target as Element).closest<HTMLAnchorElement>('a[data-ask]');
    // A browser without workers follows the link: the server answers there.
    if (!dialog || !link || typeof Worker === 'undefined' || event.metaKey || event.ctrlKey || event.shiftKey) return;
    event.preventDefault();
    void import('./asks/ask-dialog.client').then(({ openAsk }) =>
      openAsk(link.dataset.ask === 'fit' ? 'fit' : 'largest', {
        dialog,
        store,
        sealed,
        links: { model, authors, path },
        edition,
      }),
    );
  });
}

function painter(page: HTMLElement, panel: HTMLElement, model: Model, data: ProjectData): (state: ReaderState) => void {
  const article = articleFigures(page, model);
  const parts = (name: string) => document.querySelectorAll<HTMLElement>(`[data-${name}]`);
  const put = (name: string, html: string) => parts(name).forEach((element) => morphInto(element, html, markChanged));
  const planner = createPlanClient();
  const showPlan = (shown: Figures, plan: SheetPlan, links: Links) => {
    put('facts', factsHtml(shown, plan, data.minutes));
    put('fits', fitsHtml(shown, plan, links));
    put('dock-closes', `${closesWords(shown)} · ${sheetsWords(plan)}`);
    article.showPlan(shown, plan);
  };

  return (state) => {
    const { verdict, typed, cutFrom } = state;
    const view = readerView(model, verdict, cutFrom, WHILE_SIZING);
    const links: Links = { model, authors: data.authors, path: data.path, keep: keepParams(cutFrom, data.edition) };
    const { shown } = verdict;

    document.documentElement.dataset.units = shown.sizing.units;
    article.show(shown);
    showPlan(shown, view.plan, links);
    put('closes', closesWords(shown));
    put('dock-size', view.insideWords);
    planner.think(shown, planOptions(cutFrom, shown.pieces), view.plan, (plan) => {
      showPlan(shown, plan, links);
      showSheets(panel, { plan, verdict }, state);
    });
    showFolded(page, model, shown);

    const stale = lastGoodHtml(verdict, typed, links);
    page.toggleAttribute('data-stale', stale !== '');
    parts('last-good').forEach((element) => {
      morphInto(element, stale);
      element.hidden = stale === '';
    });
    showPanel(panel, { view, panel: panelFor(model, verdict.figures), typed, links });
    showSheets(panel, view, state);
    remember(sizingHref(links, verdict.asked));
    say(panel, verdict.good ? `${view.insideWords} inside. ${closesWords(shown)}, ${view.sheetsWords}.` : '');
  };
}

/** Browsers refuse an address that changes with every movement of a slider. */
let remembering: ReturnType<typeof setTimeout> | undefined;
function remember(address: string): void {
  clearTimeout(remembering);
  remembering = setTimeout(() => history.replaceState(history.state, '', address + location.hash), 150);
}

/** One sentence for those who hear the page, once the change has come to rest. */
let saying: ReturnType<typeof setTimeout> | undefined;
export function say(panel: HTMLElement, sentence: string): void {
  clearTimeout(saying);
  saying = setTimeout(() => {
    const place = panel.querySelector('[data-said]');
    if (place && place.textContent !== sentence) place.textContent = sentence;
  }, 700);
}
