import type { Unit } from '@/engine';
import type { PaperId } from '@/exports/paper';

/** Paper that a measurement sheet is laid out for. */
export const PAPERS: readonly { readonly id: PaperId; readonly name: string }[] = [
  { id: 'a4', name: 'A4' },
  { id: 'letter', name: 'Letter' },
];

/** The paper named in a link; else Letter where people measure in inches and A4 everywhere else. */
export function readPaper(text: string | null, units: Unit): PaperId {
  return PAPERS.find(({ id }) => id === text)?.id ?? (units === 'in' ? 'letter' : 'a4');
}
