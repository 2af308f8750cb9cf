/** Where the handbook tells of a pattern. */
export const boxHref = (slug: string): string => `/handbook/boxes/${slug}`;
