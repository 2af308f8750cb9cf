import { compileLive, showValue, type Figures, type LiveMeasure, type Model, type Result, type Shown } from '@/engine';

/** What live things follow: a compiled pattern and its figures at one sizing. */
export interface LiveFigures {
  readonly model: Model;
  readonly figures: Figures;
}
/** A live measure as it stands in the text. */
export interface LiveText {
  readonly formula: string;
  readonly bare: boolean;
}

/** A sentence of a pattern, such as `Score at [[tab]]`, as its words and its formulas in turn; nothing empty. */
export function liveParts(sentence: string): readonly SentencePart[] {
  return sentence.split(/\[\[(.+?)\]\]/gu).flatMap((part, i): SentencePart[] => {
    if (part === '') return [];
    return [i % 2 === 1 ? { formula: part.trim() } : { text: part }];
  });
}
type SentencePart = { readonly text: string } | { readonly formula: string };

const known = new WeakMap<Model, Map<string, Result<LiveMeasure>>>();

/** A formula of the text, compiled once for each pattern, however often it stands there. */
export function readLive(model: Model, formula: string): Result<LiveMeasure> {
  let formulas = known.get(model);
  if (!formulas) known.set(model, (formulas = new Map()));
  let live = formulas.get(formula);
  if (!live) formulas.set(formula, (live = compileLive(model, formula)));
  return live;
}

/** The value as the reader sees it: as cut, in their units. Null when the formula does not read or has no answer at this size. */
export function showLive({ model, figures }: LiveFigures, { formula, bare }: LiveText): Shown | null {
  const live = readLive(model, formula);
  if (!live.ok) return null;
  const value = live.value.value(figures);
  if (value === null || !Number.isFinite(value.cut)) return null;
  const { units, grid } = figures.sizing;
  return showValue(value.cut, live.value.kind, { units, grid, unit: live.value.unit, bare });
}
