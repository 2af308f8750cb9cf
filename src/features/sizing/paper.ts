import type { Sizing, Unit } from '@/engine';
import type { PaperId } from '@/exports/paper';
import { sizingHref, type Links } from './live-html';

/** Paper that a measurement sheet is laid out for. */
export const PAPERS: readonly { readonly id: PaperId; readonly name: string }[] = [
  { id: 'a4', name: 'A4' },
  { id: 'letter', name: 'Letter' },
];

/** The paper named in a link; else Letter where people measure in inches and A4 everywhere else. */
export function readPaper(text: string | null, units: Unit): PaperId {
  return PAPERS.find(({ id }) => id === text)?.id ?? (units === 'in' ? 'letter' : 'a4');
}

/** Address of a sheet or a PDF of it at a sizing, for a paper. */
export function paperHref(links: Links, sizing: Sizing, below: PaperPath, paper: PaperId): string {
  const href = sizingHref(links, sizing, below);
  return `${href}${href.includes('?') ? '&' : '?'}paper=${paper}`;
}
export type PaperPath = '/sheet' | '/sheet.pdf' | '/templates.pdf';

/** What can be had as a PDF. */
export const PDFS: readonly { readonly below: PaperPath; readonly words: string }[] = [
  { below: '/sheet.pdf', words: 'Measurement sheet, PDF' },
  { below: '/templates.pdf', words: 'Templates at true size, PDF' },
];
