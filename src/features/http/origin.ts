const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Mail programs post here for their user, from anywhere and without a cookie (RFC 8058, one-click unsubscribe).
 * The token in the address is the permission.
 */
const FROM_ANYWHERE = new Set(['/unsubscribe']);

/**
 * Whether a request that changes something was sent by one of our own pages. Browsers say where a request comes from;
 * one that does not say is refused too. Reading requests always pass.
 */
export function isFromHere(
  request: Request,
  { url, ownOrigins }: { url: URL; ownOrigins: readonly string[] },
): boolean {
  if (SAFE.has(request.method)) return true;
  if (request.method === 'POST' && FROM_ANYWHERE.has(url.pathname)) return true;
  const site = request.headers.get('sec-fetch-site');
  if (site !== null && site !== 'same-origin') return false;
  return ownOrigins.includes(request.headers.get('origin') ?? 'none');
}
