import { show, type Figures } from '@/engine';
import type { PaperId } from '@/exports/paper';

/** `seed-keepers-book-box-9x6x2-1-4in-sheet-letter.pdf`: plain letters alone, whatever the size. */
export function paperName(slug: string, { finished, sizing }: Figures, kind: string, paper: PaperId): string {
  const size = finished.inside
    .map(({ mm }) => show(mm, { ...sizing, bare: true }).text.replace(/[^0-9.]+/g, '-'))
    .join('x');
  return `${[slug, size === '' ? '' : `${size}${sizing.units}`, kind, paper].filter((part) => part !== '').join('-')}.pdf`;
}
