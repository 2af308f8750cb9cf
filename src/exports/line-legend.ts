import type { Role } from '@/engine';

/** What each line of a drawing means, with a sample of it in a box of 34 × 16 drawing units. */
export const LINE_LEGEND: readonly { readonly words: string; readonly d: string; readonly role: Role }[] = [
  { words: 'cut', d: 'M1 8H33', role: 'cut' },
  { words: 'valley fold: score, fold towards you', d: 'M1 8H33', role: 'valley' },
  { words: 'mountain fold: score, fold away', d: 'M1 8H33', role: 'mountain' },
  { words: 'slit', d: 'M2 8H32M2 4.5v7M32 4.5v7', role: 'slit' },
  { words: 'glue', d: 'M1 2H33V14H1Z', role: 'glue' },
  { words: 'cut away', d: 'M8 1H26V15H8ZM8 1 26 15M26 1 8 15', role: 'away' },
  { words: 'hidden edge', d: 'M1 8H33', role: 'hidden' },
  { words: 'measure from here', d: 'M12 3h11v11z', role: 'origin' },
];
