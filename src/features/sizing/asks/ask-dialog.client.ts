import type { SealedModel, Solved } from '@/engine';
import { CUT_FIELD, keepParams, readCutFrom, type CutFrom } from '@/features/sheets/cut-from';
import { readStock } from '@/features/sheets/stock-link';
import type { Links } from '../live-html';
import { morphInto } from '../morph';
import type { ReaderStore } from '../reader-store';
import { readSizing } from '../sizing-link';
import {
  answerPile,
  answerThing,
  COUNT,
  readPile,
  readThing,
  type Answer,
  type Ask,
  type AskFaults,
  type Pile,
} from './ask';
import { answerHtml, askFormHtml, ASK_TITLES, type AskState } from './ask-html';
import type { LargestRequest } from './largest.worker';

export interface AskPage {
  readonly dialog: HTMLDialogElement;
  readonly store: ReaderStore;
  readonly sealed: SealedModel;
  readonly links: Omit<Links, 'keep'>;
  readonly edition: number | null;
}

/** How long half-typed figures are left alone. */
const TYPING = 400;

/** Opens the dialog with one of the two questions. It answers as one types; nothing is taken until it is used. */
export function openAsk(ask: Ask, page: AskPage): void {
  const { dialog, store, edition } = page;
  const { model } = page.links;
  const form = dialog.querySelector('[data-ask-form]');
  const place = dialog.querySelector<HTMLElement>('[data-ask-answer]');
  const title = dialog.querySelector('h2');
  if (!form || !place || !title) return;
  const { verdict, sheets } = store.$state.get();
  let cutFrom: CutFrom = store.$state.get().cutFrom;
  let waiting: ReturnType<typeof setTimeout> | undefined;
  let worker: Worker | null = null;
  // Whatever was listened for goes when the dialog closes.
  const open = new AbortController();
  const endSearch = () => {
    worker?.terminate();
    worker = null;
  };
  const stop = () => {
    clearTimeout(waiting);
    endSearch();
  };

  const state = (faults: AskFaults = {}): AskState => ({
    links: { ...page.links, keep: keepParams(cutFrom, edition) },
    asked: verdict.shown.sizing,
    cutFrom,
    sheets,
    edition,
    typed: typedIn(form),
    faults,
  });
  const show = (answer: Answer) => morphInto(place, answerHtml(ask, answer, state()));
  const waitFor = (pile: Pile) => {
    morphInto(
      place,
      '<p>Trying sizes on your sheets…</p><p class="ask-ways"><button class="btn" type="button" data-cancel>Cancel</button></p>',
    );
    worker = new Worker(new URL('./largest.worker.ts', import.meta.url), { type: 'module' });
    // Only the search ends: what was typed meanwhile still waits for its own answer.
    worker.addEventListener('message', ({ data }: MessageEvent<Solved>) => {
      endSearch();
      show(answerPile(model, data, pile));
    });
    worker.addEventListener('error', () => {
      endSearch();
      morphInto(place, '<p>This browser could not finish the search. Load the page anew and try again.</p>');
    });
    worker.postMessage({ model: page.sealed, base: verdict.shown.sizing, pile } satisfies LargestRequest);
  };
  const answer = () => {
    stop();
    const field = (name: string) => typedIn(form)[name] ?? '';
    if (ask === 'fit') {
      const thing = readThing(model, verdict.shown.sizing.units, field);
      faults(thing.ok ? {} : thing.faults);
      if (thing.ok) show(answerThing(model, verdict.shown.sizing, thing.value, cutFrom));
    } else {
      const pile = readPile(cutFrom, field);
      faults(pile.ok ? {} : pile.faults);
      if (pile.ok) waitFor(pile.value);
    }
  };
  const faults = (found: AskFaults) => {
    morphInto(form, askFormHtml(ask, state(found)));
    if (Object.keys(found).length > 0) morphInto(place, '');
  };

  title.textContent = ASK_TITLES[ask];
  form.innerHTML = '';
  morphInto(form, askFormHtml(ask, state()));
  morphInto(place, '');
  const { signal } = open;
  dialog.addEventListener('close', () => (stop(), open.abort()), { signal });
  form.addEventListener(
    'input',
    (event) => {
      clearTimeout(waiting);
      const input = event.target as HTMLInputElement | HTMLSelectElement;
      if (input.name === CUT_FIELD.card) {
        const stock = readStock(input.value) ?? cutFrom.stock;
        cutFrom = { ...cutFrom, stock };
        // Another pile has another number.
        const count = form.querySelector<HTMLInputElement>(`[name=${COUNT}]`);
        const mine = sheets.find(({ card }) => card === stock.id);
        if (count && mine) count.value = String(mine.count);
      }
      // Until every size of the thing is there nothing is amiss.
      const empty = [...form.querySelectorAll<HTMLInputElement>('input:not([type=hidden], [type=radio])')].some(
        ({ value }) => value.trim() === '',
      );
      if (!empty) waiting = setTimeout(answer, TYPING);
    },
    { signal },
  );
  form.addEventListener('submit', (event) => (event.preventDefault(), answer()), { signal });
  place.addEventListener(
    'click',
    (event) => {
      const target = event.target as Element;
      const use = target.closest<HTMLAnchorElement>('a[data-use]');
      if (target.closest('[data-cancel]')) {
        stop();
        morphInto(place, '<p>Stopped. Change something above, or press Enter there, to try again.</p>');
      } else if (use) {
        event.preventDefault();
        const params = new URL(use.href).searchParams;
        dialog.close();
        const { sizing } = readSizing(model, params, page.links.authors);
        store.cutFrom(readCutFrom(params, sizing));
        store.ask(sizing);
      } else if (target.closest('[data-leave]')) {
        event.preventDefault();
        dialog.close();
      }
    },
    { signal },
  );
  dialog.showModal();
  if (ask === 'largest') answer();
}

const typedIn = (form: Element): Record<string, string> =>
  Object.fromEntries(
    [...form.querySelectorAll<HTMLInputElement>('input:not([type=hidden], [type=radio]:not(:checked))')].map(
      ({ name, value }) => [name, value],
    ),
  );
