import type { Figures, PieceFigure } from '@/engine';
import type { outerSize } from '@/exports/cutting/layout';
import { freeSlug } from '@/features/projects/project-slug';
import { sizingHref, type Links } from '@/features/sizing/live-html';
import { sizesTogether } from '@/features/sizing/facts';
import { sizeInName } from '../paper/paper-name';

export const CUTTING_FORMATS = ['svg', 'dxf'] as const;
export type CuttingFormat = (typeof CUTTING_FORMATS)[number];

/** Pieces by what they are called in addresses and names of files: plain letters alone, no two alike. */
export function piecesByKey({ pieces }: Pick<Figures, 'pieces'>): ReadonlyMap<string, PieceFigure> {
  const keyed = new Map<string, PieceFigure>();
  for (const piece of pieces) {
    const plain = piece.name
      .normalize('NFKD')
      .toLowerCase()
      .replace(/[\u0300-\u036f]/gu, '')
      .replace(/[^a-z0-9]+/gu, '-')
      .replace(/^-+|-+$/gu, '');
    keyed.set(
      freeSlug(plain === '' ? 'piece' : plain, (key) => keyed.has(key)),
      piece,
    );
  }
  return keyed;
}

/** `seed-keepers-book-box_fore-edge_9x6x2-1-4in.svg` */
export function cuttingName(slug: string, figures: Figures, what: string, extension: CuttingFormat | 'zip'): string {
  const size = sizeInName(figures);
  return `${[slug, what, size].filter((part) => part !== '').join('_')}.${extension}`;
}

/** Where a file is at the sizing of these figures; `below` as in `/pieces/lid.svg`. */
export function cuttingHref(
  links: Links,
  { sizing }: Figures,
  below: string,
  { glue }: { readonly glue: boolean },
): string {
  const href = sizingHref(links, sizing, below);
  return glue ? `${href}${href.includes('?') ? '&' : '?'}glue=drawn` : href;
}
export const readGlue = (params: URLSearchParams): boolean => params.get('glue') === 'drawn';

/** `8 1/2 × 6 1/2 in; the file is in millimetres: 215.9 × 165.1`: what an importer must show before anything is cut. */
export function outerWords(size: ReturnType<typeof outerSize>, { sizing }: Pick<Figures, 'sizing'>): string {
  const sizes = [size.across, size.along];
  const file = sizes.map((mm) => String(Math.round(mm * 100) / 100)).join('\u00a0×\u00a0');
  if (sizing.units === 'mm') return `${file}\u00a0mm; the file is in millimetres`;
  const own = sizesTogether(
    sizes.map((mm) => ({ name: '', mm })),
    sizing,
  );
  const step = sizing.units === 'in' ? 25.4 / 64 : 0.1;
  const exact = sizes.every((mm) => Math.abs(mm / step - Math.round(mm / step)) < 1e-4);
  return `${exact ? '' : 'about '}${own}; the file is in millimetres: ${file}`;
}
