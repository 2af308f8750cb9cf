import { formulasOfPattern, renameInPattern, renameInSizing, type Pattern, type Rename, type Result } from '@/engine';
import type { BlockNode, DocNode } from '@/writeup/document';
import { renameInWriteUp } from '@/writeup/rename';
import { changeAsk, questionFor } from './pattern-edits';
import type { ProjectState } from './project';

/** How many places took a new name over, the definition itself apart. */
export interface RenamedPlaces {
  readonly formulas: number;
  readonly fits: number;
  readonly steps: number;
  /** Paragraphs, lists and the like outside the steps. */
  readonly others: number;
}
export interface Renamed {
  readonly state: ProjectState;
  readonly places: RenamedPlaces;
}

/** A project with a name of its pattern changed everywhere: in the pattern, in the author's size and in the write-up. */
export function renameInProject(state: ProjectState, rename: Rename): Result<Renamed> {
  const pattern = renameInPattern(state.pattern, rename);
  if (!pattern.ok) return pattern;
  const doc = renameInWriteUp(state.writeUp.doc, rename);
  if (!doc.ok) return doc;
  return {
    ok: true,
    value: {
      state: {
        ...state,
        pattern: rename.what === 'measure' ? reworded(pattern.value, rename) : pattern.value,
        sizing: renameInSizing(state.sizing, rename),
        writeUp: { ...state.writeUp, doc: doc.value },
      },
      places: {
        formulas: changed(outsideFits(state.pattern), outsideFits(pattern.value), (one) => one.text),
        fits: changed(state.pattern.fits, pattern.value.fits),
        ...textPlaces(state.writeUp.doc, doc.value),
      },
    },
  };
}

/** A question that was made from the name follows it; one that the author worded stays. */
function reworded(pattern: Pattern, { from, to }: Rename): Pattern {
  const question = pattern.measures.find(({ name }) => name === to)?.ask?.question;
  return question === questionFor(from) ? changeAsk(pattern, to, { question: questionFor(to) }) : pattern;
}

/** “Renamed in 7 formulas, 2 fits and 3 steps.” */
export function renamedWords({ formulas, fits, steps, others }: RenamedPlaces): string {
  const counted = [
    [formulas, 'formula'],
    [fits, 'fit'],
    [steps, 'step'],
    [others, steps === 0 ? 'place of the text' : 'other place of the text'],
  ] as const;
  const parts = counted.flatMap(([n, word]) => (n === 0 ? [] : [`${n} ${n === 1 ? word : plural(word)}`]));
  const last = parts.pop();
  if (last === undefined) return 'Renamed; nothing else spoke of it.';
  return `Renamed in ${parts.length === 0 ? last : `${parts.join(', ')} and ${last}`}.`;
}
const plural = (word: string): string => word.replace(/^(other place|place|\w+)/u, '$1s');

const outsideFits = (pattern: Pattern) => formulasOfPattern({ ...pattern, fits: [] });
const changed = <T>(before: readonly T[], after: readonly T[], of: (item: T) => unknown = (item) => item): number =>
  after.filter((item, index) => of(item) !== of(before[index] as T)).length;

function textPlaces(before: DocNode, after: DocNode): Pick<RenamedPlaces, 'steps' | 'others'> {
  const isStep = (node: BlockNode) => node.type === 'step';
  const differing = after.content.filter((node, index) => node !== before.content[index]);
  const steps = differing.filter(isStep).length;
  return { steps, others: differing.length - steps };
}
