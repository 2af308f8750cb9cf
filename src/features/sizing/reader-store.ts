import { atom, type ReadableAtom } from 'nanostores';
import {
  defaultGrid,
  evaluate,
  GRIDS,
  gridsFor,
  readValue,
  type Figures,
  type GridId,
  type Model,
  type Result,
  type Sizing,
  type Unit,
} from '@/engine';
import type { CutFrom, ReadCutFrom } from '@/features/sheets/cut-from';
import type { MySheets } from '@/features/sheets/my-sheets';
import { readingWords } from './reading-words';
import { valueIn, withChoice, withValue } from './sizing-values';
import { judge, type Verdict } from './verdict';

/** What a reader typed that does not read, by measure; it stays in the field until it does. */
export type Typed = Readonly<Record<string, { readonly text: string; readonly sentence: string }>>;
export interface ReaderState {
  readonly verdict: Verdict;
  /** The newest sizing that can be made: what the page shows while a later one cannot. */
  readonly lastGood: Sizing;
  readonly typed: Typed;
  readonly cutFrom: CutFrom;
  /** What was typed about the sheets and does not read. */
  readonly cutTyped: ReadCutFrom['typed'];
  /** The sheets that the reader has. */
  readonly sheets: MySheets;
}
/** One reader's sizing on one page. Units and cut grid never change the size of the box. */
export interface ReaderStore {
  readonly $state: ReadableAtom<ReaderState>;
  /** Reads what was typed for a measure; an empty field takes the author's value back. */
  type(measure: string, text: string): void;
  /** Whether what was typed so far reads and can be made: then it need not wait until typing ends. */
  wouldWork(measure: string, text: string): boolean;
  set(measure: string, value: number): void;
  choose(choice: string, option: string): void;
  units(units: Unit): void;
  grid(grid: GridId): void;
  cutFrom(read: ReadCutFrom): void;
  sheets(sheets: MySheets): void;
  ask(sizing: Sizing): void;
}

export function createReaderStore(
  model: Model,
  start: { readonly sizing: Sizing; readonly authors: Sizing; readonly cutFrom: CutFrom; readonly sheets?: MySheets },
): ReaderStore {
  const first = judge(model, start.sizing, start.authors, { nearest: true });
  const $state = atom<ReaderState>({
    verdict: first,
    lastGood: first.shown.sizing,
    typed: {},
    cutFrom: start.cutFrom,
    cutTyped: {},
    sheets: start.sheets ?? [],
  });

  const ask = (sizing: Sizing, typed: Typed = {}) => {
    const before = $state.get();
    const verdict = judge(model, sizing, before.lastGood);
    $state.set({ ...before, verdict, lastGood: verdict.good ? sizing : before.lastGood, typed });
  };
  const current = () => $state.get().verdict.asked;
  const without = (measure: string): Typed => {
    const { [measure]: _, ...others } = $state.get().typed;
    return others;
  };

  const read = (measure: string, text: string): Result<Sizing> => {
    const sizing = current();
    const figure = $state.get().verdict.figures.measures.find(({ name }) => name === measure);
    if (!figure) return { ok: false, faults: [] };
    if (text.trim() === '') return { ok: true, value: withValue(sizing, measure, valueIn(start.authors, measure)) };
    const value = readValue(figure, text, { units: sizing.units });
    return value.ok ? { ok: true, value: withValue(sizing, measure, value.value) } : value;
  };

  return {
    $state,
    ask: (sizing) => ask(sizing),
    type(measure, text) {
      const sizing = read(measure, text);
      if (sizing.ok) {
        ask(sizing.value, without(measure));
        return;
      }
      const sentence = readingWords(sizing.faults);
      $state.set({ ...$state.get(), typed: { ...without(measure), [measure]: { text, sentence } } });
    },
    wouldWork(measure, text) {
      const sizing = read(measure, text);
      return sizing.ok && evaluate(model, sizing.value).problems.length === 0;
    },
    set: (measure, value) => ask(withValue(current(), measure, value), without(measure)),
    choose: (choice, option) => ask(withChoice(current(), choice, option), $state.get().typed),
    units: (units) => ask(inUnits(current(), units), $state.get().typed),
    grid: (grid) => ask({ ...current(), grid }, $state.get().typed),
    cutFrom: ({ value, typed }) => $state.set({ ...$state.get(), cutFrom: value, cutTyped: typed }),
    sheets: (sheets) => $state.set({ ...$state.get(), sheets }),
  };
}

/** The same box in other units; a cut grid of the other kind gives way to the usual one of the new units. */
export function inUnits(sizing: Sizing, units: Unit): Sizing {
  return { ...sizing, units, grid: gridsFor(units).includes(sizing.grid) ? sizing.grid : defaultGrid(units) };
}

/** The same box with its foremost lengths on whole steps of the reader's ruler (whole millimetres, sixteenths). */
export function onWholeSteps(model: Model, sizing: Sizing, figures: Figures): Sizing | null {
  const step = sizing.units === 'in' ? GRIDS['1/16in'].step : GRIDS['1mm'].step;
  let moved = sizing;
  for (const measure of figures.measures) {
    const compiled = model.measures.find(({ def }) => def.name === measure.name);
    const ask = compiled?.def.ask;
    // A size that follows from the others goes on following them.
    if (
      !ask ||
      (!measure.set && compiled.formula.uses.length > 0) ||
      ask.finer ||
      measure.kind !== 'length' ||
      measure.unit ||
      !measure.inUse
    )
      continue;
    const steps = measure.exact / step;
    if (Math.abs(steps - Math.round(steps)) < 1e-6) continue;
    const nearest = Math.round(steps) * step;
    const low = measure.from === undefined ? nearest : Math.ceil(measure.from / step - 1e-9) * step;
    const high = measure.to === undefined ? nearest : Math.floor(measure.to / step + 1e-9) * step;
    moved = withValue(moved, measure.name, Math.min(high, Math.max(low, nearest)));
  }
  return moved === sizing ? null : moved;
}
