/** Which pattern the guide that answers this request shows, so that its figures need not each say so. */
const patterns = new WeakMap<Request, string>();

export function setGuidePattern(request: Request, slug: string): void {
  patterns.set(request, slug);
}
export function guidePattern(request: Request): string {
  const slug = patterns.get(request);
  if (slug === undefined) throw new Error('A figure of the handbook stands outside a guide: give it a pattern.');
  return slug;
}
