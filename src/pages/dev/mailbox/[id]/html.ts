import type { APIRoute } from 'astro';
import { config } from '@/config.server';
import { isAtThisMachine } from '@/features/accounts/guard.server';
import { readMail } from '@/features/mailing/mailbox.server';

/** A received mail's HTML part for a frame: styles and our own pictures, and nothing else that it might try. */
export const GET: APIRoute = async (context) => {
  const mail = isAtThisMachine(context) ? await readMail(context.params.id ?? '') : null;
  if (!mail?.html) return new Response('No such mail.\n', { status: 404 });
  return new Response(mail.html, {
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'cache-control': 'no-store',
      'content-security-policy': `sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src ${context.url.origin} ${config.siteUrl} data:; frame-ancestors 'self'`,
    },
  });
};
