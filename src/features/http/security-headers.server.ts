import type { ServerResponse } from 'node:http';

const ALWAYS = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'strict-origin-when-cross-origin',
  'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=(), browsing-topics=()',
  'cross-origin-opener-policy': 'same-origin',
};
/** For documents that Astro did not make: drawings, sign-in's own pages, feeds. */
const PLAIN_DOCUMENT =
  "default-src 'none'; style-src 'unsafe-inline'; img-src 'self' data:; form-action 'self'; base-uri 'none'";
const YEAR = 365 * 24 * 60 * 60;

/** Adds what is missing; a header that the route set itself stays. Pages have their policy from Astro already. */
export function addSecurityHeaders(res: ServerResponse, { https }: { https: boolean }): void {
  for (const [name, value] of Object.entries(ALWAYS)) if (!res.hasHeader(name)) res.setHeader(name, value);
  if (https && !res.hasHeader('strict-transport-security')) {
    res.setHeader('strict-transport-security', `max-age=${YEAR}`);
  }
  const type = String(res.getHeader('content-type') ?? '');
  const policy = String(res.getHeader('content-security-policy') ?? (/html|xml/.test(type) ? PLAIN_DOCUMENT : ''));
  // A policy in a page's <meta> cannot say this, and Astro does not.
  if (!policy.includes('frame-ancestors')) {
    res.setHeader(
      'content-security-policy',
      `${policy}${policy ? '; ' : ''}frame-ancestors 'none'`.replace(/;; /, '; '),
    );
    res.setHeader('x-frame-options', 'DENY');
  }
  if (type.startsWith('text/html') && !res.hasHeader('cache-control')) {
    res.setHeader('cache-control', 'private, no-cache');
  }
}
