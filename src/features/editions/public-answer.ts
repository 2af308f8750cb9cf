import type { AstroGlobal } from 'astro';

/** Pages that everybody may read are checked again at every visit and sent again only when something changed. */

/** Another build or start may answer differently for the same edition. */
const started = Date.now().toString(36);

/** A weak tag of everything that an answer depends on. */
export function tagOf(parts: readonly (string | number | null | undefined)[]): string {
  let hash = 0xcbf29ce484222325n;
  for (const byte of new TextEncoder().encode([started, ...parts].join('\u0000'))) {
    hash = BigInt.asUintN(64, (hash ^ BigInt(byte)) * 0x100000001b3n);
  }
  return `W/"${hash.toString(36)}"`;
}

/** Headers of a public answer; `personal` is for pages that greet someone who is signed in. */
export function publicHeaders(tag: string, { personal = false } = {}): Record<string, string> {
  return {
    etag: tag,
    'cache-control': personal ? 'private, no-cache' : 'public, max-age=0, must-revalidate',
    vary: 'Cookie',
  };
}

/** Whether the browser has this very answer already. */
export function hasTag(request: Request, tag: string): boolean {
  const sent = request.headers.get('if-none-match');
  return sent !== null && sent.split(',').some((each) => each.trim() === tag || each.trim() === '*');
}

/**
 * Begins the answer of a project's page, made of `parts`, its query and who sees it. Gives what to return instead when the
 * browser has this very page; else the headers are set and it is null.
 */
export function beginPublicPage(
  { request, url, locals, response }: Pick<AstroGlobal, 'request' | 'url' | 'locals' | 'response'>,
  parts: readonly (string | number | null | undefined)[],
): Response | null {
  const { user } = locals;
  const personal = user !== null;
  const tag = tagOf([...parts, url.search, user?.id, user?.name, user?.role]);
  if (import.meta.env.PROD && hasTag(request, tag)) return notModified(tag, { personal });
  for (const [name, value] of Object.entries(publicHeaders(tag, { personal }))) response.headers.set(name, value);
  return null;
}

export function notModified(tag: string, options: { readonly personal?: boolean } = {}): Response {
  return new Response(null, { status: 304, headers: publicHeaders(tag, options) });
}
