import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { listRevisions } from '@/features/projects/revisions.server';

const A_PAGE = 50;

/** Kept revisions without their states, newest first; `?before=48` gives those before number 48. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const asked = context.url.searchParams.get('before');
  if (asked !== null && !/^[1-9]\d{0,14}$/.test(asked))
    return problem(400, 'Before which revision?', {
      detail: `“${asked}” is no number of a revision.`,
      code: 'bad-before',
    });
  const kept = listRevisions(context.params.id ?? '', user, {
    limit: A_PAGE,
    ...(asked === null ? {} : { before: Number(asked) }),
  });
  if (kept === null) return noSuchProject();
  return json({ revisions: kept.map(({ state: _, savedAt, ...mark }) => ({ ...mark, savedAt: savedAt.getTime() })) });
};
