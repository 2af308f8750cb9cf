import {
  compilePattern,
  evaluate,
  explain,
  formulasOfPattern,
  type Fault,
  type Figures,
  type Model,
  type Pattern,
  type Result,
  type Sizing,
} from '@/engine';
import type { WriteUp } from '@/writeup/document';
import { conditionFault } from '@/writeup/condition';
import { readLive } from '@/writeup/live';
import { collectUses, type Uses } from '@/writeup/uses';
import { namesIn } from './formula-names';
import { typedNumberItems } from './proof-numbers';
import { placeOfFault, placesIn, type PlaceAt, type ProofColumn, type ProofPlace } from './proof-place';
import { writeUpItems } from './proof-write-up';

export type { ProofColumn, ProofPlace };
export interface ProofItem {
  readonly code:
    | 'no title'
    | 'formula'
    | 'sizing'
    | 'fit fails'
    | 'no steps'
    | 'live measure'
    | 'unknown piece'
    | 'no alt text'
    | 'no summary'
    | 'no materials'
    | 'piece unused'
    | 'fit advice'
    | 'typed number'
    | 'condition'
    | 'unknown step'
    | 'measure unused'
    | 'no picture'
    | 'no caution'
    | 'link broken'
    | 'outgrows'
    | 'range fails';
  /** Keeps the project from being published; the others are worth a look. */
  readonly blocking: boolean;
  readonly title: string;
  /** What was found and what to do, as a sentence. */
  readonly detail: string;
  readonly place: ProofPlace;
  /** The pattern's fault, with its one-click cure, where there is one. */
  readonly fault?: Fault;
}
export interface ProofSubject {
  readonly title: string;
  readonly summary: string;
  readonly pattern: Pattern;
  readonly sizing: Sizing;
  readonly writeUp: WriteUp;
}
/** What is already worked out, so that it is not done twice while someone types. */
export interface Worked {
  readonly compiled?: Result<Model>;
  readonly figures?: Figures;
}

/** What keeps a project from being published, in the order of the desk, then what is worth a look. Empty when all is ready. */
export function proofList(subject: ProofSubject, worked: Worked = {}): readonly ProofItem[] {
  const compiled = worked.compiled ?? compilePattern(subject.pattern);
  const uses = collectUses(subject.writeUp.doc);
  const at = placesIn(subject.writeUp);
  const figures = compiled.ok ? (worked.figures ?? evaluate(compiled.value, subject.sizing)) : null;
  const items = [
    ...factItems(subject),
    ...(figures ? sizeItems(figures) : []),
    ...(compiled.ok ? [] : compiled.faults.map(faultItem)),
    ...(compiled.ok ? liveItems(compiled.value, uses, at) : []),
    ...(compiled.ok ? conditionItems(compiled.value, uses, at) : []),
    ...writeUpItems(subject, uses, at),
    ...(compiled.ok && figures ? typedNumberItems(subject.writeUp, { model: compiled.value, figures }, at) : []),
    ...unusedItems(subject.pattern, uses),
  ];
  // A step without a picture is the least of it, and there may be many.
  const rank = ({ blocking: stops, code }: ProofItem) => (stops ? 0 : code === 'no picture' ? 2 : 1);
  return [...items].sort((a, b) => rank(a) - rank(b));
}

export const blocking = (items: readonly ProofItem[]): readonly ProofItem[] => items.filter((item) => item.blocking);

function factItems({ title, summary }: ProofSubject): ProofItem[] {
  const items: ProofItem[] = [];
  if (title.trim() === '') {
    items.push({
      code: 'no title',
      blocking: true,
      title: 'The project has no title',
      detail: 'Give it a title: it is what readers see first.',
      place: { column: 'facts', name: 'title', label: 'Project' },
    });
  }
  if (summary.trim() === '') {
    items.push({
      code: 'no summary',
      blocking: false,
      title: 'No summary yet',
      detail: 'Say in one line what it is: cards and search results show it.',
      place: { column: 'facts', name: 'summary', label: 'Project' },
    });
  }
  return items;
}

function faultItem(fault: Fault): ProofItem {
  const place = placeOfFault(fault);
  return {
    code: 'formula',
    blocking: true,
    title: place.name === undefined ? 'The pattern does not read' : `${place.name} does not read`,
    detail: explain(fault),
    place,
    fault,
  };
}

function sizeItems(figures: Figures): ProofItem[] {
  const fits = figures.fits.filter((fit) => !fit.holds);
  const problems = figures.problems.filter((problem) => problem.code !== 'fit fails');
  return [
    ...problems.map(
      (problem): ProofItem => ({
        code: 'sizing',
        blocking: true,
        title:
          problem.measure === ''
            ? 'The size shown first does not work'
            : `${problem.measure}: the size shown first does not work`,
        detail: problem.sentence,
        place: {
          column: 'measures',
          label: problem.measure === '' ? 'Measures' : `Measures · ${problem.measure}`,
          name: problem.measure || undefined,
        },
      }),
    ),
    ...fits.map(
      (fit): ProofItem => ({
        code: fit.advice ? 'fit advice' : 'fit fails',
        blocking: !fit.advice,
        title: fit.advice ? `${fit.name}: not at this size` : `${fit.name}: fails`,
        detail: fit.otherwise,
        place: { column: 'measures', label: `Fits · ${fit.name}`, name: fit.name },
      }),
    ),
  ];
}

function liveItems(model: Model, uses: Uses, at: PlaceAt): ProofItem[] {
  return uses.formulas.flatMap(({ formula, step }, nth): ProofItem[] => {
    const live = readLive(model, formula);
    if (live.ok) return [];
    const fault = live.faults[0];
    return [
      {
        code: 'live measure',
        blocking: true,
        title: `“${formula}” in the text does not read`,
        detail: fault === undefined ? 'Choose a measure from the list instead.' : explain(fault),
        place: at(step, nth),
        fault,
      },
    ];
  });
}

/** What steps and phrases depend on, where it is no condition. */
function conditionItems(model: Model, uses: Uses, at: PlaceAt): ProofItem[] {
  return uses.conditions.flatMap(({ when, step }, nth): ProofItem[] => {
    const fault = conditionFault(model, when);
    if (fault === null) return [];
    return [
      {
        code: 'condition',
        blocking: true,
        title: `“${when}” is no condition that reads`,
        detail: explain(fault),
        place: at(step, nth),
      },
    ];
  });
}

/** Measures and choices that no formula of the pattern and nothing in the text speaks of. */
function unusedItems(pattern: Pattern, uses: Uses): ProofItem[] {
  const names = [...pattern.measures, ...pattern.choices].map(({ name }) => name);
  const texts = [
    ...formulasOfPattern(pattern).map(({ text }) => text),
    ...uses.formulas.map(({ formula }) => formula),
    ...uses.conditions.map(({ when }) => when),
  ];
  const used = new Set(texts.flatMap((text) => namesIn(text, names).map(({ name }) => name)));
  return names
    .filter((name) => !used.has(name))
    .map((name) => ({
      code: 'measure unused',
      blocking: false,
      title: `Nothing uses ${name}`,
      detail: 'No piece, fit or text depends on it. Take it out, or put it where it belongs.',
      place: { column: 'measures', label: `Measures · ${name}`, name },
    }));
}
