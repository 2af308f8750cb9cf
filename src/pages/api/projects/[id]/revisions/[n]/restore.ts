import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { noSuchProject, noSuchRevision, revisionMissing, savedAnswer } from '@/features/projects/answers.server';
import { openProject, restoreRevision } from '@/features/projects/projects.server';
import { getRevision } from '@/features/projects/revisions.server';
import { revisionIn } from '@/features/projects/revision';

/** Saves a kept revision once more as the newest, over the one named in If-Match. */
export const POST: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', n = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  const revision = revisionIn(context.request.headers.get('if-match'));
  if (revision === null) return revisionMissing();
  if (!getRevision(id, Number(n), user)) return noSuchRevision();
  return savedAnswer(restoreRevision(id, user, { n: Number(n), revision }));
};
