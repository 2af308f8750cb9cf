import { show, type Figures } from '@/engine';
import type { PaperId } from '@/exports/paper';

/** `seed-keepers-book-box-9x6x2-1-4in-sheet-letter.pdf`: plain letters alone, whatever the size. */
export function paperName(slug: string, figures: Figures, kind: string, paper: PaperId): string {
  return `${[slug, sizeInName(figures), kind, paper].filter((part) => part !== '').join('-')}.pdf`;
}

/** `9x6x2-1-4in`; empty for a box without a size of its own. */
export function sizeInName({ finished, sizing }: Pick<Figures, 'finished' | 'sizing'>): string {
  const size = finished.inside
    .map(({ mm }) => show(mm, { ...sizing, bare: true }).text.replace(/[^0-9.]+/g, '-'))
    .join('x');
  return size === '' ? '' : `${size}${sizing.units}`;
}
