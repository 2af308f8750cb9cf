/**
 * The page to go on to after signing in: a path on this site alone. Everything else, such as another site's address, an
 * address without a scheme or the sign-in page itself, gives the fallback.
 */
export function returnPath(text: string | null | undefined, fallback = '/'): string {
  if (!text || !/^\/(?![/\\])/.test(text) || /[\0-\x1f\\]/.test(text)) return fallback;
  const base = 'http://here.invalid';
  if (!URL.canParse(text, base)) return fallback;
  const url = new URL(text, base);
  if (url.origin !== base || /^\/(sign-(in|up|out)|api)(\/|$)/.test(url.pathname)) return fallback;
  return url.pathname + url.search + url.hash;
}
