import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json } from '@/features/http/problem';
import { noSuchProject } from '@/features/projects/answers.server';
import { restoreProject } from '@/features/projects/projects.server';

/** Brings a deleted project back as it was. */
export const POST: APIRoute = (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  return restoreProject(id, user) ? json({ id }) : noSuchProject();
};
