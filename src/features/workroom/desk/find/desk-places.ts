import type { ProjectState } from '@/features/projects/project';
import type { ProofPlace } from '@/features/projects/proof-place';

/** A place of the desk that one can go to by its name. */
export interface DeskPlace {
  readonly label: string;
  /** "measure", "piece", "step 3": what stands beside the name. */
  readonly what: string;
  readonly place: ProofPlace;
}

/** Every measure, choice, fit, piece and step of a project, as the desk shows them from left to right. */
export function placesOf({ pattern, writeUp }: Pick<ProjectState, 'pattern' | 'writeUp'>): readonly DeskPlace[] {
  const named =
    (column: 'measures' | 'pieces', what: string, heading: string) =>
    ({ name }: { readonly name: string }): DeskPlace => ({
      label: name,
      what,
      place: { column, name, label: `${heading} · ${name}` },
    });
  const steps = writeUp.doc.content.filter((node) => node.type === 'step');
  return [
    ...pattern.measures.map((measure) =>
      named('measures', measure.ask ? 'asked measure' : 'measure', 'Measures')(measure),
    ),
    ...pattern.choices.map(named('measures', 'choice', 'Choices')),
    ...pattern.fits.map(named('measures', 'fit', 'Fits')),
    ...pattern.pieces.map(named('pieces', 'piece', 'Pieces')),
    ...steps.map(({ attrs: { title } }, index): DeskPlace => {
      const step = index + 1;
      return {
        label: title === '' ? 'No title yet' : title,
        what: `step ${step}`,
        place: { column: 'write-up', step, label: `Write-up, step ${step}` },
      };
    }),
  ];
}
