import type { Unit } from '@/engine';

/** Paper that a measurement sheet is laid out for. */
export const PAPERS = [
  { id: 'a4', name: 'A4' },
  { id: 'letter', name: 'Letter' },
] as const;
export type PaperId = (typeof PAPERS)[number]['id'];

/** The paper named in a link; else Letter where people measure in inches and A4 everywhere else. */
export function readPaper(text: string | null, units: Unit): PaperId {
  return PAPERS.find(({ id }) => id === text)?.id ?? (units === 'in' ? 'letter' : 'a4');
}
