/** A revision as HTTP says it: `"48"`. */
export const etagOf = (revision: number): string => `"${revision}"`;

/** The revision that an If-Match header or an ETag names; null when it names none (also `*`: a save must say what it changes). */
export function revisionIn(header: string | null): number | null {
  const match = /^\s*(?:W\/)?"(\d{1,15})"\s*$/u.exec(header ?? '');
  return match ? Number(match[1]) : null;
}
