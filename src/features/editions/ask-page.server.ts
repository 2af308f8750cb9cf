import type { APIContext } from 'astro';
import { takeTurn } from '@/features/limits/limits.server';
import { sheetsOf } from '@/features/sheets/my-sheets.server';
import {
  answerPile,
  answerThing,
  COPIES,
  COUNT,
  EASE,
  STANDS,
  largestFrom,
  readPile,
  readThing,
  thingField,
  thingNames,
  type Answer,
  type Ask,
} from '@/features/sizing/asks/ask';
import type { AskState } from '@/features/sizing/asks/ask-html';
import { loadReaderPage, type ReaderPage } from './reader-page.server';

/** Trials of planning for each size that is tried: the server looks less long than a reader's own browser does. */
const TRIES = 60;

export interface AskPage {
  readonly page: ReaderPage;
  readonly state: AskState;
  /** Null until the form was sent and reads. */
  readonly answer: Answer | null;
  /** Why there is no answer just now. */
  readonly wait: string | null;
}

/** A question about a project's size, in the address of a GET form; null when there is no such project. */
export async function loadAskPage(
  ask: Ask,
  { params, url, locals, clientAddress }: Pick<APIContext, 'params' | 'url' | 'locals' | 'clientAddress'>,
): Promise<AskPage | null> {
  const page = loadReaderPage(params.slug ?? '', url);
  if (!page) return null;
  const { model, view } = page;
  const base = view.verdict.shown.sizing;
  const field = (name: string) => (url.searchParams.get(name) ?? '').slice(0, 80);
  const names = ask === 'fit' ? [...thingNames(model).map(thingField), EASE, STANDS] : [COUNT, COPIES];
  const sent = names.filter((name) => url.searchParams.has(name));
  const state = (faults: AskState['faults'] = {}): AskState => ({
    links: page.links,
    asked: base,
    cutFrom: view.cutFrom,
    sheets: sheetsOf(locals.user),
    edition: url.searchParams.get('edition'),
    typed: Object.fromEntries(sent.map((name) => [name, field(name)])),
    faults,
  });
  // How many boxes stands in every link; only the form says how many sheets.
  const asking = ask === 'fit' ? sent.length > 0 : sent.includes(COUNT);
  if (!asking) return { page, state: state(), answer: null, wait: null };
  if (ask === 'fit') {
    const thing = readThing(model, base.units, field);
    if (!thing.ok) return { page, state: state(thing.faults), answer: null, wait: null };
    return { page, state: state(), answer: answerThing(model, base, thing.value, view.cutFrom), wait: null };
  }
  const pile = readPile(view.cutFrom, field);
  if (!pile.ok) return { page, state: state(pile.faults), answer: null, wait: null };
  const turn = await takeTurn('search', { ip: clientAddress });
  if (!turn.ok) return { page, state: state(), answer: null, wait: turn.sentence };
  const solved = largestFrom(model, base, pile.value, TRIES);
  return { page, state: state(), answer: answerPile(model, solved, pile.value, TRIES), wait: null };
}
