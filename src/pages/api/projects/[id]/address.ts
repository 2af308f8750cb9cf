import type { APIRoute } from 'astro';
import { requireRole } from '@/features/accounts/guard.server';
import { json, problem, readJson } from '@/features/http/problem';
import { noSuchProject, ownersDeed } from '@/features/projects/answers.server';
import { slugSchema } from '@/features/projects/project-input';
import { moveProject, openProject } from '@/features/projects/projects.server';

/** Gives a project another address: `{slug}`. An address that readers know leads on to the new one. */
export const PUT: APIRoute = async (context) => {
  const user = requireRole(context, 'author');
  if (user instanceof Response) return user;
  const id = context.params.id ?? '';
  if (!openProject(id, user)) return noSuchProject();
  const read = await readJson(context.request, slugSchema);
  if (!read.ok) return read.response;
  const moved = moveProject(id, user, read.value.slug);
  if (moved.ok) return json({ slug: moved.slug });
  return moved.code === 'not found'
    ? ownersDeed()
    : problem(409, 'Address taken', {
        detail: `Another project is or was at /projects/${read.value.slug}. Choose another address.`,
        code: 'address-taken',
      });
};
