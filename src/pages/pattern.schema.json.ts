import type { APIRoute } from 'astro';
import { config } from '@/config.server';
import { patternJsonSchema } from '@/features/patterns/json-schema';
import { SCHEMA_PATH } from '@/features/patterns/pattern-limits';

/** What a pattern file may hold, for editors and for other programs. */
export const GET: APIRoute = () =>
  new Response(`${JSON.stringify(patternJsonSchema(`${config.siteUrl}${SCHEMA_PATH}`), null, 1)}\n`, {
    headers: { 'content-type': 'application/schema+json; charset=utf-8', 'cache-control': 'public, max-age=3600' },
  });
