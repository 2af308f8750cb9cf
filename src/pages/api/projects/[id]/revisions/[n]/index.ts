import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json } from '@/features/http/problem';
import { noSuchProject, noSuchRevision } from '@/features/projects/answers.server';
import { openProject } from '@/features/projects/projects.server';
import { getRevision } from '@/features/projects/revisions.server';

/** One kept revision with its state. */
export const GET: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const { id = '', n = '' } = context.params;
  if (!openProject(id, user)) return noSuchProject();
  const revision = getRevision(id, Number(n), user);
  return revision ? json({ ...revision, savedAt: revision.savedAt.getTime() }) : noSuchRevision();
};
