import type { APIRoute } from 'astro';
import { config } from '@/config.server';
import { hasMailbox, readMail } from '@/features/mailing/mailbox.server';

/** A received mail's HTML part for a frame: styles and our own pictures, and nothing else that it might try. */
export const GET: APIRoute = async ({ params, url }) => {
  const mail = hasMailbox() ? await readMail(params.id ?? '') : null;
  if (!mail?.html) return new Response('No such mail.\n', { status: 404 });
  return new Response(mail.html, {
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'cache-control': 'no-store',
      'content-security-policy': `sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src ${url.origin} ${config.siteUrl} data:; frame-ancestors 'self'`,
    },
  });
};
