/** The address of a project under /projects: lower-case words joined by hyphens, 3 to 60 characters. */
export const SLUG = /^[a-z0-9]+(?:-[a-z0-9]+)*$/;
export const SLUG_LENGTH = { min: 3, max: 60 } as const;

/** The address that a title suggests: "Seed keeper’s book box" gives "seed-keepers-book-box". */
export function slugOf(title: string): string {
  const plain = title
    .normalize('NFKD')
    .replace(/[\u0300-\u036f'’‘]/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/gu, '-')
    .slice(0, SLUG_LENGTH.max)
    .replace(/^-+|-+$/gu, '');
  if (plain.length >= SLUG_LENGTH.min) return plain;
  return plain === '' ? 'project' : `project-${plain}`;
}

/** The first of `slug`, `slug-2`, `slug-3`… that is not taken. */
export function freeSlug(slug: string, taken: (slug: string) => boolean): string {
  if (!taken(slug)) return slug;
  for (let n = 2; ; n += 1) {
    const tail = `-${n}`;
    const next = slug.slice(0, SLUG_LENGTH.max - tail.length).replace(/-+$/u, '') + tail;
    if (!taken(next)) return next;
  }
}
