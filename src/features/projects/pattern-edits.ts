import {
  explain,
  formulasOfPattern,
  keyOf,
  nameFault,
  type Ask,
  type ChoiceDef,
  type FitDef,
  type MeasureDef,
  type Pattern,
} from '@/engine';
import { namesIn, namesOf, searchFor } from './formula-names';
import { freeName, movedTo } from './list-edits';
import { placeIn } from './piece-edits';

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

export const changeChoice = (pattern: Pattern, name: string, change: Partial<ChoiceDef>): Pattern =>
  mapChoice(pattern, name, (choice) => ({ ...choice, ...change }));

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

/** Why a new measure or choice cannot be called this; null when it can. */
export function nameTrouble(pattern: Pattern, name: string, what: 'measure' | 'choice' = 'measure'): string | null {
  if (name.trim() === '') return `Give the ${what} a name, such as “${what === 'measure' ? 'rib height' : 'lid'}”.`;
  const fault = nameFault(pattern, { what, from: '', to: name });
  return fault && explain(fault);
}

/** Asked of the reader, asked among the finer points, or worked out: each kind stands together on the desk. */
export const groupOf = ({ ask }: MeasureDef): 'asked' | 'finer' | 'worked' =>
  ask ? (ask.finer ? 'finer' : 'asked') : 'worked';

/** The measure takes the place of `target`, which makes room. Measures of another group stay apart. */
export function moveMeasureTo(pattern: Pattern, name: string, target: string): Pattern {
  const at = (wanted: string) => pattern.measures.findIndex((measure) => measure.name === wanted);
  const [from, to] = [pattern.measures[at(name)], pattern.measures[at(target)]];
  if (from === undefined || to === undefined || groupOf(from) !== groupOf(to)) return pattern;
  return { ...pattern, measures: movedTo(pattern.measures, at(name), at(target)) };
}
/** The measure one place up (−1) or down (1) among those of its group. */
export function moveMeasure(pattern: Pattern, name: string, by: 1 | -1): Pattern {
  const own = pattern.measures.find((measure) => measure.name === name);
  if (own === undefined) return pattern;
  const group = pattern.measures.filter((measure) => groupOf(measure) === groupOf(own));
  const target = group[group.indexOf(own) + by];
  return target === undefined ? pattern : moveMeasureTo(pattern, name, target.name);
}

/** What would stop reading if the measure or choice were taken out, in words: `measure “arc”`, `piece “Floor”`. */
export function usersOf(pattern: Pattern, name: string): readonly string[] {
  const names = namesOf(pattern);
  const uses = (formula: string) => namesIn(formula, names).some((span) => keyOf(span.name) === keyOf(name));
  const own = [`measure “${name}”`, `choice “${name}”`];
  const said = pattern.order.flatMap((line) =>
    [...(typeof line === 'string' ? line : line.says).matchAll(/\[\[(.+?)\]\]/gu)].map((match) => match[1] ?? ''),
  );
  const users = formulasOfPattern(pattern)
    .filter(({ text }) => uses(text))
    .map(({ where }) => placeIn(where));
  return [...new Set([...users, ...(said.some(uses) ? ['the order of making'] : [])])].filter(
    (user) => !own.includes(user),
  );
}

// ── Choices ──────────────────────────────────────────────────────────────────────────────────────────────────────────

export const addChoice = (pattern: Pattern, name: string): Pattern => ({
  ...pattern,
  choices: [...pattern.choices, { name, question: `Which ${name}?`, options: ['plain', 'other'], usual: 'plain' }],
});
export const removeChoice = (pattern: Pattern, name: string): Pattern => ({
  ...pattern,
  choices: pattern.choices.filter((choice) => choice.name !== name),
});
export function addOption(pattern: Pattern, name: string): Pattern {
  return mapChoice(pattern, name, (choice) => ({
    ...choice,
    options: [...choice.options, freeName('option', choice.options)],
  }));
}
/** Without one option; two are left at least. When it was the usual one, the first of the others is. */
export function removeOption(pattern: Pattern, name: string, option: string): Pattern {
  return mapChoice(pattern, name, (choice) => {
    const options = choice.options.filter((known) => known !== option);
    if (options.length < 2) return choice;
    return { ...choice, options, usual: choice.usual === option ? (options[0] ?? '') : choice.usual };
  });
}
const mapChoice = (pattern: Pattern, name: string, change: (choice: ChoiceDef) => ChoiceDef): Pattern => ({
  ...pattern,
  choices: pattern.choices.map((choice) => (choice.name === name ? change(choice) : choice)),
});

/** What asks for the option: `spine is curved` and what else compares the choice with it. */
export function usersOfOption(pattern: Pattern, choice: string, option: string): readonly string[] {
  const asks = new RegExp(
    `(?<![\\p{L}\\p{N}])${searchFor(choice)}\\s+is\\s+(?:not\\s+)?${searchFor(option)}(?![\\p{L}\\p{N}])`,
    'iu',
  );
  return [
    ...new Set(
      formulasOfPattern(pattern)
        .filter(({ text }) => asks.test(text))
        .map(({ where }) => placeIn(where)),
    ),
  ];
}

// ── Fits ─────────────────────────────────────────────────────────────────────────────────────────────────────────────

export function addFit(pattern: Pattern): { readonly pattern: Pattern; readonly name: string } {
  const name = freeName(
    'it fits',
    pattern.fits.map((fit) => fit.name),
  );
  const [first] = pattern.measures;
  const fit: FitDef = {
    name,
    left: first?.name ?? '1 in',
    is: 'at least',
    right: '0 in',
    otherwise: 'It does not go together at this size. Make it larger.',
    ...(first?.ask ? { change: [first.name] } : {}),
  };
  return { pattern: { ...pattern, fits: [...pattern.fits, fit] }, name };
}
export const changeFit = (pattern: Pattern, name: string, change: Partial<FitDef>): Pattern => ({
  ...pattern,
  fits: pattern.fits.map((fit) => (fit.name === name ? { ...fit, ...change } : fit)),
});
export const removeFit = (pattern: Pattern, name: string): Pattern => ({
  ...pattern,
  fits: pattern.fits.filter((fit) => fit.name !== name),
});
