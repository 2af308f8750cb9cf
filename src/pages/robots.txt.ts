import type { APIRoute } from 'astro';
import { config } from '@/config.server';

/** Sizings of a project are one page; the canonical address says so, and robots need not walk them all. */
const CLOSED = [
  '/api/',
  '/workroom',
  '/admin',
  '/account',
  '/dev/',
  '/sign-in',
  '/sign-up',
  '/unsubscribe',
  '/subscribe/confirm',
  '/*?*from=',
];

export const GET: APIRoute = () =>
  new Response(
    [
      'User-agent: *',
      ...CLOSED.map((path) => `Disallow: ${path}`),
      '',
      `Sitemap: ${config.siteUrl}/sitemap.xml`,
      '',
    ].join('\n'),
    {
      headers: { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'public, max-age=3600' },
    },
  );
