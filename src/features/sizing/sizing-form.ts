import { evaluate, GRID_IDS, gridsFor, readValue, UNITS, type Model, type Sizing, type Unit } from '@/engine';
import { keepParams, readCutFrom, type ReadCutFrom } from '@/features/sheets/cut-from';
import type { Links } from './live-html';
import { fieldText } from './panel';
import { inUnits, type Typed } from './reader-store';
import type { ReaderView } from './reader-view';
import { readingWords } from './reading-words';
import { readSizing, slugOf, writeSizing } from './sizing-link';
import { valueIn, withChoice, withValue } from './sizing-values';

/** The field that carries what the form was drawn at, as a link’s query: the sizing and the sheets. */
export const FROM = 'from';

export function formFrom(
  { model, authors }: Links,
  { verdict, cutFrom }: Pick<ReaderView, 'verdict' | 'cutFrom'>,
): string {
  return [writeSizing(model, verdict.asked, authors), keepParams(cutFrom, null)]
    .filter((part) => part !== '')
    .join('&');
}

export interface FormReading {
  readonly sizing: Sizing;
  /** Fields that do not read keep what was typed, with a sentence. */
  readonly typed: Typed;
}

/** A measure's or choice's name as it stands in links and forms alike: `inside-width`. */
export const parameterName = slugOf;

/** Whether these parameters were sent by the sizing form and not by a link. */
export const isSizingForm = (params: URLSearchParams): boolean => params.has(FROM);

/**
 * Reads the sizing form as a browser without JavaScript sends it: every field, changed or not. A field that still says
 * what it was drawn with keeps its exact value (200 mm stays 200 mm, though the field said 7 7/8), and one that was
 * never set stays unset, so that usual values worked out from others go on following them. A bare number is in the
 * units that stood beside the field, also when another unit is chosen in the same go.
 */
export function readSizingForm(model: Model, params: URLSearchParams, usual: Sizing): FormReading {
  const before = readSizing(model, drawnAt(params), usual).sizing;
  const drawn = evaluate(model, before);
  let read = before;
  const typed: Record<string, Typed[string]> = {};

  for (const measure of drawn.measures) {
    const text = params.get(parameterName(measure.name));
    if (!measure.asked || text === null || text.trim() === fieldText(measure, before)) continue;
    if (text.trim() === '') {
      read = withValue(read, measure.name, valueIn(usual, measure.name));
      continue;
    }
    const value = readValue(measure, text, { units: before.units });
    if (value.ok) read = withValue(read, measure.name, value.value);
    else typed[measure.name] = { text, sentence: readingWords(value.faults) };
  }

  for (const { name, options } of model.pattern.choices) {
    const option = params.get(parameterName(name));
    if (option !== null && options.includes(option)) read = withChoice(read, name, option);
  }

  const units = params.get('units');
  const sizing = isUnit(units) ? inUnits(read, units) : read;
  const cut = GRID_IDS.find((id) => id === params.get('cut'));
  return { sizing: cut && gridsFor(sizing.units).includes(cut) ? { ...sizing, grid: cut } : sizing, typed };
}

/** Reads what the same form says of the sheets. */
export function readSheetsForm(model: Model, params: URLSearchParams, usual: Sizing): ReadCutFrom {
  const { units } = readSizing(model, drawnAt(params), usual).sizing;
  return readCutFrom(params, { units, before: readCutFrom(drawnAt(params), { units }).value });
}

const drawnAt = (params: URLSearchParams): URLSearchParams => new URLSearchParams(params.get(FROM) ?? '');
const isUnit = (text: string | null): text is Unit => UNITS.some((unit) => unit === text);
