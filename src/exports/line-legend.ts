import type { Role } from '@/engine';

export interface LegendLine {
  readonly role: Role;
  readonly name: string;
  /** How it is told apart without colour. */
  readonly looks: string;
  /** What to do with it; empty where the name says that. */
  readonly means: string;
  /** A sample of it in a box of 34 × 16 drawing units. */
  readonly d: string;
  /** Name and meaning in one, as a sheet's legend has them. */
  readonly words: string;
}

/** What each line of a drawing means, the one list for sheets, paper and handbook. */
export const LINE_LEGEND: readonly LegendLine[] = (
  [
    ['cut', 'cut', 'a solid line', '', 'M1 8H33'],
    ['valley', 'valley fold', 'dashed', 'score, fold towards you', 'M1 8H33'],
    ['mountain', 'mountain fold', 'dash and dot', 'score, fold away', 'M1 8H33'],
    ['slit', 'slit', 'thin, with a tick at either end', '', 'M2 8H32M2 4.5v7M32 4.5v7'],
    ['glue', 'glue', 'a light hatch', '', 'M1 2H33V14H1Z'],
    ['away', 'cut away', 'crossed out', '', 'M8 1H26V15H8ZM8 1 26 15M26 1 8 15'],
    ['hidden', 'hidden edge', 'dotted', '', 'M1 8H33'],
    ['origin', 'measure from here', 'a wedge at the corner', '', 'M12 3h11v11z'],
  ] as const
).map(([role, name, looks, means, d]) => ({ role, name, looks, means, d, words: means ? `${name}: ${means}` : name }));

/** What stands beside figures in a drawing. */
export const SIGN_LEGEND: readonly { readonly sign: string; readonly words: string }[] = [
  { sign: 'R', words: 'radius of an arc' },
  { sign: 'Ø', words: 'diameter of a circle' },
  { sign: '4×', words: 'the same in four places' },
  { sign: '+ −', words: 'a card’s thickness more or less' },
  { sign: 'fold 60°', words: 'turned by so much, where it is neither square nor right over' },
  { sign: 'a', words: 'what it stands for is written below' },
];
