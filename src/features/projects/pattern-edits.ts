import {
  explain,
  formulasOfPiece,
  nameFault,
  type Ask,
  type ChoiceDef,
  type MeasureDef,
  type Pattern,
  type Track,
} from '@/engine';
import { formulasOfMeasure, namesIn } from './formula-names';

/** Each of these gives a new pattern and leaves the old one as it was. */

export const changeMeasure = (pattern: Pattern, name: string, change: Partial<MeasureDef>): Pattern => ({
  ...pattern,
  measures: pattern.measures.map((measure) => (measure.name === name ? { ...measure, ...change } : measure)),
});

export const changeAsk = (pattern: Pattern, name: string, change: Partial<Ask>): Pattern => ({
  ...pattern,
  measures: pattern.measures.map((measure) =>
    measure.name === name && measure.ask ? { ...measure, ask: { ...measure.ask, ...change } } : measure,
  ),
});

export const changeChoice = (pattern: Pattern, name: string, change: Partial<ChoiceDef>): Pattern => ({
  ...pattern,
  choices: pattern.choices.map((choice) => (choice.name === name ? { ...choice, ...change } : choice)),
});

/** Changes a column or row of a grid piece. */
export const changeTrack = (
  pattern: Pattern,
  at: { readonly piece: string; readonly axis: 'columns' | 'rows'; readonly index: number },
  change: Partial<Track>,
): Pattern => ({
  ...pattern,
  pieces: pattern.pieces.map((piece) =>
    piece.name === at.piece && piece.builder === 'grid'
      ? { ...piece, [at.axis]: piece[at.axis].map((track, i) => (i === at.index ? { ...track, ...change } : track)) }
      : piece,
  ),
});

/** A new measure goes last: the order of writing does not matter to what is worked out. */
export const addMeasure = (pattern: Pattern, measure: MeasureDef): Pattern => ({
  ...pattern,
  measures: [...pattern.measures, measure],
});

export const removeMeasure = (pattern: Pattern, name: string): Pattern => ({
  ...pattern,
  measures: pattern.measures.filter((measure) => measure.name !== name),
});

/** Asked becomes worked: its usual value is its formula. Worked becomes asked: its formula is its usual value. */
export function turnOver(pattern: Pattern, name: string): Pattern {
  return {
    ...pattern,
    measures: pattern.measures.map((measure): MeasureDef => {
      if (measure.name !== name) return measure;
      const { ask, formula, ...rest } = measure;
      if (ask) return { ...rest, formula: ask.usual };
      return {
        ...rest,
        ask: { question: questionFor(name), usual: formula ?? '', from: '0 in', to: '12 in' },
      };
    }),
  };
}

/** What the reader is asked until the author puts it better. */
export const questionFor = (name: string): string => `How much is the ${name}?`;

/** Why a new measure cannot be called this; null when it can. */
export function nameTrouble(pattern: Pattern, name: string): string | null {
  if (name.trim() === '') return 'Give the measure a name, such as “rib height”.';
  const fault = nameFault(pattern, { what: 'measure', from: '', to: name });
  return fault && explain(fault);
}

/** What would stop reading if the measure were taken out, in words: `measure “arc”`, `piece “Floor”`, `fit “lid goes on”`. */
export function usersOf(pattern: Pattern, name: string): readonly string[] {
  const uses = (formulas: readonly (string | undefined)[]) =>
    formulas.some((f) => f !== undefined && namesIn(f, [name, ...others]).some((s) => s.name === name));
  const others = pattern.measures.map((measure) => measure.name).filter((other) => other !== name);
  return [
    ...pattern.measures
      .filter((m) => m.name !== name && uses([...formulasOfMeasure(m), m.ask?.from, m.ask?.to]))
      .map((m) => `measure “${m.name}”`),
    ...pattern.pieces.filter((piece) => uses(formulasOfPiece(piece))).map((piece) => `piece “${piece.name}”`),
    ...pattern.fits
      .filter((fit) => uses([fit.left, fit.right, fit.tolerance, fit.when]))
      .map((fit) => `fit “${fit.name}”`),
  ];
}
