import { mergeStates, type Choices, type Clash } from '@/features/projects/merge';
import type { ProjectState } from '@/features/projects/project';

/** Another version met ours: what it is, and the parts that somebody has to choose between. */
export interface Meeting {
  readonly base: ProjectState | null;
  readonly other: {
    readonly state: ProjectState;
    readonly revision: number;
    readonly updatedAt: number;
  };
  readonly clashes: readonly Clash[];
}

/** Ours and another version put together; where both changed the same part, a meeting instead. */
export function meet(
  base: ProjectState | null,
  mine: ProjectState,
  other: Meeting['other'],
): { readonly merged: ProjectState } | { readonly meeting: Meeting } {
  const { state, clashes } = mergeStates({ base, mine, other: other.state });
  return clashes.length === 0 ? { merged: state } : { meeting: { base, other, clashes } };
}

/** What came out of the choices; null while a part is not chosen yet, such as one that was typed in meanwhile. */
export function settled(
  { base, other }: Meeting,
  mine: ProjectState,
  choices: Choices,
): { readonly merged: ProjectState; readonly gaveWay: boolean } | { readonly clashes: readonly Clash[] } {
  const { state, clashes } = mergeStates({ base, mine, other: other.state }, choices);
  if (clashes.some(({ where }) => choices[where] === undefined)) return { clashes };
  return { merged: state, gaveWay: clashes.some(({ where }) => choices[where] === 'other') };
}
