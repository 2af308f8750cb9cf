import { esc } from '@/exports/escape';

export interface SitemapPlace {
  /** From the origin: `/projects/seed-box`. */
  readonly path: string;
  readonly changed?: Date;
}

/** A sitemap (sitemaps.org protocol 0.9) of places on one site. */
export function sitemap(siteUrl: string, places: readonly SitemapPlace[]): string {
  const urls = places.map(({ path, changed }) => {
    const when = changed ? `<lastmod>${changed.toISOString()}</lastmod>` : '';
    return `<url><loc>${esc(new URL(path, siteUrl).href)}</loc>${when}</url>`;
  });
  return `<?xml version="1.0" encoding="utf-8"?>\n<urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9">\n${urls.join('\n')}\n</urlset>\n`;
}
