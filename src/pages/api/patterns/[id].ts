import type { APIRoute } from 'astro';
import { config } from '@/config.server';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem } from '@/features/http/problem';
import { dropPattern, getOwnPattern } from '@/features/patterns/own-patterns.server';
import { patternFileName, patternFileText } from '@/features/patterns/pattern-file';
import { SCHEMA_PATH } from '@/features/patterns/pattern-limits';
import { getPattern } from '@/features/patterns/patterns.server';

const noSuchPattern = () =>
  problem(404, 'No such pattern', { detail: 'None of your patterns is at this address.', code: 'no-such-pattern' });

/** A pattern of the shelf, by its slug, or of the asker's own, as a file. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  const pattern = getPattern(id) ?? getOwnPattern(id, user.id);
  if (pattern === undefined) return noSuchPattern();
  return new Response(patternFileText(pattern, `${config.siteUrl}${SCHEMA_PATH}`), {
    headers: {
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': `attachment; filename="${patternFileName(pattern).replace(/[^\w.-]+/gu, '-')}"`,
      'cache-control': 'no-store',
    },
  });
};

/** Takes one of the asker's own patterns off the shelf. */
export const DELETE: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  return dropPattern(id, user.id) ? json({ id }) : noSuchPattern();
};
