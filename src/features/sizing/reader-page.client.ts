import { showFolded } from '@/components/folded/show';
import { openModel, type Model, type SealedModel, type Sizing } from '@/engine';
import { keepParams, readCutFrom } from '@/features/sheets/cut-from';
import type { MySheets } from '@/features/sheets/my-sheets';
import { hearSheets, keptSheets } from '@/features/sheets/sheet-keeper';
import { articleFigures, markChanged } from './article-figures';
import type { DrawnPage } from './drawn-page.client';
import { later } from './later';
import { closesWords, lastGoodHtml, sizingHref, type Links } from './live-html';
import { morphInto } from './morph';
import { panelFor } from './panel';
import { bindPanel, showPanel } from './panel-dom';
import { createReaderStore, type ReaderState, type ReaderStore } from './reader-store';
import { sizeView } from './size-view';

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
  // Should the drawings not come, the server draws the page: the address says the size.
  const lost = () => void setTimeout(() => location.reload(), REMEMBERED);
  const { minutes } = data;
  const draw = later(
    import('./drawn-page.client').then(({ drawnPage }) => drawnPage(page, panel, { model, minutes, lost })),
    lost,
  );
  const paint = painter(page, panel, draw, { ...data, model });
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
  if (data.sheets === null && kept.length > 0) draw((drawn) => drawn.showSheets(painted));
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

type Draw = (use: (part: DrawnPage) => void) => void;

function painter(
  page: HTMLElement,
  panel: HTMLElement,
  draw: Draw,
  { model, ...data }: Omit<ProjectData, 'model'> & { readonly model: Model },
): (state: ReaderState) => void {
  const showFigures = articleFigures(page, model);
  const parts = (name: string) => document.querySelectorAll<HTMLElement>(`[data-${name}]`);
  const put = (name: string, html: string) => parts(name).forEach((element) => morphInto(element, html, markChanged));

  return (state) => {
    const { verdict, typed, cutFrom } = state;
    const view = sizeView(model, verdict);
    const links: Links = { model, authors: data.authors, path: data.path, keep: keepParams(cutFrom, data.edition) };
    const { shown } = verdict;

    document.documentElement.dataset.units = shown.sizing.units;
    showFigures(shown);
    put('closes', closesWords(shown));
    put('dock-size', view.insideWords);
    showFolded(page, model, shown);

    const stale = lastGoodHtml(verdict, typed, links);
    page.toggleAttribute('data-stale', stale !== '');
    parts('last-good').forEach((element) => {
      morphInto(element, stale);
      element.hidden = stale === '';
    });
    showPanel(panel, { view, panel: panelFor(model, verdict.figures), typed, links });
    remember(sizingHref(links, verdict.asked));
    draw((drawn) => {
      const sheets = drawn.show(state, links);
      say(panel, verdict.good ? `${view.insideWords} inside. ${closesWords(shown)}, ${sheets}.` : '');
    });
  };
}

/** Milliseconds: browsers refuse an address that changes with every movement of a slider. */
const REMEMBERED = 150;
let remembering: ReturnType<typeof setTimeout> | undefined;
function remember(address: string): void {
  clearTimeout(remembering);
  remembering = setTimeout(() => history.replaceState(history.state, '', address + location.hash), REMEMBERED);
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
