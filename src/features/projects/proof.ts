import {
  compilePattern,
  evaluate,
  explain,
  type Fault,
  type Figures,
  type Model,
  type Pattern,
  type Result,
  type Sizing,
} from '@/engine';
import type { WriteUp } from '@/writeup/document';
import { readLive } from '@/writeup/live';
import { collectUses, type Uses } from '@/writeup/uses';
import { placeOfFault, type ProofColumn, type ProofPlace } from './proof-place';

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
    | 'fit advice';
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
  const at = inText(subject.writeUp);
  const items = [
    ...factItems(subject),
    ...(compiled.ok
      ? sizeItems(worked.figures ?? evaluate(compiled.value, subject.sizing))
      : compiled.faults.map(faultItem)),
    ...(compiled.ok ? liveItems(compiled.value, uses, at) : []),
    ...writeUpItems(uses, subject.pattern, at),
  ];
  return [...items.filter((item) => item.blocking), ...items.filter((item) => !item.blocking)];
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

function liveItems(model: Model, uses: Uses, at: InText): ProofItem[] {
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

function writeUpItems(uses: Uses, pattern: Pattern, at: InText): ProofItem[] {
  const items: ProofItem[] = [];
  if (uses.steps === 0) {
    items.push({
      code: 'no steps',
      blocking: true,
      title: 'There are no steps',
      detail: 'Put in the first step: what does the maker do first?',
      place: { column: 'write-up', label: 'Write-up' },
    });
  }
  const known = new Set(pattern.pieces.map((piece) => piece.name));
  uses.pieces.forEach(({ piece, step }, nth) => {
    if (known.has(piece)) return;
    items.push({
      code: 'unknown piece',
      blocking: true,
      title: `No piece is called “${piece}”`,
      detail: 'Choose another piece for this card, or take the card out.',
      place: at(step, nth),
    });
  });
  uses.photos.forEach(({ alt, step }, nth) => {
    if (alt.trim() !== '') return;
    items.push({
      code: 'no alt text',
      blocking: true,
      title: 'A photo has no words',
      detail: 'Say what the photo shows, for those who cannot see it.',
      place: at(step, nth),
    });
  });
  if (uses.materials.length === 0) {
    items.push({
      code: 'no materials',
      blocking: false,
      title: 'No materials yet',
      detail: 'List the card, the glue and the tools, so that readers can lay them out first.',
      place: { column: 'write-up', label: 'Write-up' },
    });
  }
  const used = new Set(uses.pieces.map((card) => card.piece));
  for (const piece of pattern.pieces) {
    if (used.has(piece.name) || uses.cutLists.length > 0) continue;
    items.push({
      code: 'piece unused',
      blocking: false,
      title: `No step uses ${piece.name}`,
      detail: `Put its piece card into the step that cuts it.`,
      place: { column: 'pieces', label: `Pieces · ${piece.name}`, name: piece.name },
    });
  }
  return items;
}

type InText = (step: number | null, nth: number) => ProofPlace;
/** "Write-up, step 3, The lower spine" */
function inText({ doc }: WriteUp): InText {
  const titles = doc.content.flatMap((node) => (node.type === 'step' ? [node.attrs.title] : []));
  return (step, nth) => {
    if (step === null) return { column: 'write-up', label: 'Write-up, outside the steps', nth };
    const title = titles[step - 1] ?? '';
    return { column: 'write-up', label: `Write-up, step ${step}${title === '' ? '' : `, ${title}`}`, nth, step };
  };
}
