import type { Model, Sizing } from '@/engine';
import type { FieldFault } from '@/features/http/problem';
import { keepParams, readCutFrom, type ReadCutFrom } from '@/features/sheets/cut-from';
import type { Links } from '@/features/sizing/live-html';
import { inUnits, type Typed } from '@/features/sizing/reader-store';
import { readerView, type ReaderView } from '@/features/sizing/reader-view';
import { isSizingForm, readSheetsForm, readSizingForm } from '@/features/sizing/sizing-form';
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
  readonly cutTyped: ReadCutFrom['typed'];
  /** What does not read in the address, by what it is for. */
  readonly faults: readonly FieldFault[];
  /** Sent by a form: when it reads well, a link to the asked sizing says the same. */
  readonly fromForm: boolean;
}

/** A published project at the sizing in the address; null when there is no such project or edition. */
export function loadReaderPage(slug: string, url: URL): ReaderPage | null {
  const asked = url.searchParams.get('edition');
  if (asked !== null && !/^[1-9]\d{0,5}$/.test(asked)) return null;
  const edition = getEdition(slug, asked === null ? undefined : Number(asked));
  if (!edition) return null;

  return {
    edition,
    ...pageAt(modelOf(edition), { authors: edition.sizing, url, path: `/projects/${slug}`, edition: asked }),
  };
}

/** A pattern at the sizing in an address: `authors` is the size shown first, `path` where links of the page lead. */
export function pageAt(
  model: Model,
  { authors, url, path, edition = null }: { authors: Sizing; url: URL; path: string; edition?: string | null },
): Omit<ReaderPage, 'edition'> {
  const params = url.searchParams;
  const reading = isSizingForm(params) ? readForm(model, params, authors) : readLink(model, params, authors);
  const { value: cutFrom, typed: cutTyped } = reading.sheets;
  const faults = [...reading.faults, ...Object.entries(cutTyped).map(([where, { sentence }]) => ({ where, sentence }))];
  return {
    model,
    view: readerView(model, judge(model, reading.sizing, authors, { nearest: true }), cutFrom),
    links: { model, authors, path, keep: keepParams(cutFrom, edition) },
    typed: reading.typed,
    cutTyped,
    faults,
    fromForm: isSizingForm(params),
  };
}

interface Reading {
  readonly sizing: Sizing;
  readonly typed: Typed;
  readonly sheets: ReadCutFrom;
  readonly faults: readonly FieldFault[];
}

function readForm(model: Model, params: URLSearchParams, authors: Sizing): Reading {
  const { sizing, typed } = readSizingForm(model, params, authors);
  const sheets = readSheetsForm(model, params, authors);
  return { sizing, typed, sheets, faults: Object.entries(typed).map(([where, { sentence }]) => ({ where, sentence })) };
}

function readLink(model: Model, params: URLSearchParams, authors: Sizing): Reading {
  const { sizing, faults } = readSizing(model, params, authors);
  // A link that names units alone takes those units' usual cut grid.
  return {
    sizing: inUnits(sizing, sizing.units),
    typed: {},
    sheets: readCutFrom(params, sizing),
    faults: faults.map((fault) => ({ where: fault.where, sentence: readingWords([fault]) })),
  };
}
