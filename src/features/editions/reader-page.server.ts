import { STOCKS, type Model, type Sizing } from '@/engine';
import type { FieldFault } from '@/features/http/problem';
import { readStock as readLinked } from '@/features/sheets/stock-link';
import type { Links } from '@/features/sizing/live-html';
import { sizingHref } from '@/features/sizing/live-html';
import { inUnits, type Typed } from '@/features/sizing/reader-store';
import { keepParams, readerView, readStock, type ReaderView } from '@/features/sizing/reader-view';
import { isSizingForm, readSizingForm } from '@/features/sizing/sizing-form';
import { readingWords } from '@/features/sizing/reading-words';
import { readSizing } from '@/features/sizing/sizing-link';
import { judge } from '@/features/sizing/verdict';
import { getEdition, type Edition } from './editions.server';
import { modelOf } from './models.server';

export interface ReaderPage {
  readonly edition: Edition;
  readonly model: Model;
  readonly view: ReaderView;
  readonly links: Links;
  /** Form fields that do not read. */
  readonly typed: Typed;
  /** What does not read in the address, by what it is for. */
  readonly faults: readonly FieldFault[];
  /** The form read well: the address that says the same as a link. */
  readonly linkTo: string | null;
}

/** A published project at the sizing in the address; null when there is no such project or edition. */
export function loadReaderPage(slug: string, url: URL): ReaderPage | null {
  const params = url.searchParams;
  const asked = params.get('edition');
  if (asked !== null && !/^[1-9]\d{0,5}$/.test(asked)) return null;
  const edition = getEdition(slug, asked === null ? undefined : Number(asked));
  if (!edition) return null;

  const model = modelOf(edition);
  const stock = readStock(params.get('card'));
  const links: Links = { model, authors: edition.sizing, path: `/projects/${slug}`, keep: keepParams(stock, asked) };
  const reading = isSizingForm(params)
    ? readForm(model, params, edition.sizing)
    : readLink(model, params, edition.sizing);
  const wellRead = isSizingForm(params) && Object.keys(reading.typed).length === 0;
  return {
    edition,
    model,
    view: readerView(model, judge(model, reading.sizing, edition.sizing, { nearest: true }), stock),
    links,
    typed: reading.typed,
    faults: [...reading.faults, ...cardFaults(params.get('card'))],
    linkTo: wellRead ? sizingHref(links, reading.sizing) : null,
  };
}

interface Reading {
  readonly sizing: Sizing;
  readonly typed: Typed;
  readonly faults: readonly FieldFault[];
}

function readForm(model: Model, params: URLSearchParams, authors: Sizing): Reading {
  const { sizing, typed } = readSizingForm(model, params, authors);
  return { sizing, typed, faults: Object.entries(typed).map(([where, { sentence }]) => ({ where, sentence })) };
}

function readLink(model: Model, params: URLSearchParams, authors: Sizing): Reading {
  const { sizing, faults } = readSizing(model, params, authors);
  // A link that names units alone takes those units' usual cut grid.
  return {
    sizing: inUnits(sizing, sizing.units),
    typed: {},
    faults: faults.map((fault) => ({ where: fault.where, sentence: readingWords([fault]) })),
  };
}

function cardFaults(card: string | null): readonly FieldFault[] {
  if (card === null || card === '' || readLinked(card)) return [];
  const sentence = `“${card}” is no sheet that is known here. It can be ${Object.keys(STOCKS).join(', ')}, or a size such as 8.5x13in.`;
  return [{ where: 'card', sentence }];
}
