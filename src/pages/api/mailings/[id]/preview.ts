import type { APIRoute } from 'astro';
import { config } from '@/config.server';
import { askedMailing } from '@/features/mailing/mailing-answers.server';
import { previewMailing } from '@/features/mailing/mailings.server';

const UNITS = ['in', 'mm', 'cm'] as const;

/** The mail as a made-up person gets it: `?part=html` for a frame, `?part=text` as text; `&units=mm`. */
export const GET: APIRoute = async (context) => {
  const asked = askedMailing(context);
  if (asked instanceof Response) return asked;
  const { searchParams, origin } = context.url;
  const units = UNITS.find((unit) => unit === searchParams.get('units')) ?? asked.mailing.edition.sizing.units;
  const { html, text } = await previewMailing(asked.mailing, { units });
  if (searchParams.get('part') === 'text') {
    return new Response(text, {
      headers: { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'no-store' },
    });
  }
  return new Response(html, {
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'cache-control': 'no-store',
      // A mail carries its styles in its elements; this document may do nothing else, and only our own pages may frame it.
      'content-security-policy': `sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src ${origin} ${config.siteUrl}; frame-ancestors 'self'`,
    },
  });
};
